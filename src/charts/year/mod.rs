//! A place's days in one picture: the states over the hours of its clock (upwards) and the dates (to the right).
//!
//! Computes no angle: what is drawn stands in [`PlaceDays`] and [`Field`]. Knows nothing of files.

mod frame;
mod areas;
mod axes;
mod heading;

use crate::charts::canvas::{Canvas, CanvasError, Size};
use crate::day::{Field, PlaceDays};
use frame::Frame;

/// Draws a place's days.
///
/// # Shapes and units
/// 1600 × 900 px, like the timeline.
///
/// # Errors
/// None for days; the canvas' own are handed on.
pub fn year(here: &PlaceDays, field: &Field) -> Result<Canvas, CanvasError> {
    let size = Size::new(frame::WIDTH_PX, frame::HEIGHT_PX)?;
    let mut canvas = Canvas::new(size, &heading::title(here), &heading::description(here));
    let frame = Frame { days: field.days };
    heading::draw(&mut canvas, here);
    areas::draw(&mut canvas, field, frame);
    axes::draw(&mut canvas, here, frame);
    heading::draw_legend(&mut canvas, !field.gaps.is_empty());
    Ok(canvas)
}
