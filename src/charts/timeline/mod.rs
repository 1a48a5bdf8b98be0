//! One flight in one picture: the Sun's elevation beneath the aircraft over time, the states it stands for, and the
//! clocks at both ends.
//!
//! Computes no angle: every number is found in the [`Brief`]. Knows nothing of files.

pub(super) mod style;
mod frame;
mod layout;
mod heading;
mod bands;
mod gates;
mod curve;
mod deck;
mod events;
mod captions;
mod clocks;
mod strip;
mod low_sun;

use crate::Brief;
use crate::charts::canvas::{Canvas, CanvasError, Size};
use captions::Captions;
use clocks::Clock;
use frame::{Frame, Span};
use gates::Gates;
use layout::Layout;

/// Draws a flight's timeline.
///
/// # Shapes and units
/// 1600 × 900 px: the shape of a screen, and on A4 across no letter is smaller than 2.4 mm.
///
/// # Errors
/// None for a brief; the canvas' own are handed on.
pub fn timeline(brief: &Brief) -> Result<Canvas, CanvasError> {
    let events = events::events(brief);
    let size = Size::new(layout::WIDTH_PX, layout::HEIGHT_PX)?;
    let mut canvas = Canvas::new(size, &heading::title(brief), &heading::description(brief));
    let curve = curve::points(brief);
    let span = Span::of(&curve);
    let gates = Gates::new(brief);
    let clocks = Clock::of(brief);
    let roomy = Layout { flags_px: gates.height_px(), clocks: clocks.len(), key_rows: 0 };
    let frame = |layout: &Layout| Frame { plot: layout.plot(), span, airborne_s: brief.path.airborne_s };

    let worded = Captions::worded(&events, &curve, &frame(&roomy));
    let (layout, captions) = worded.map_or_else(
        || {
            let layout = Layout { key_rows: Captions::key_rows(&events), ..roomy };
            let captions = Captions::numbered(&events, &curve, &frame(&layout));
            (layout, captions)
        },
        |captions| (roomy, captions),
    );
    let frame = frame(&layout);
    heading::draw(&mut canvas, brief);
    bands::draw(&mut canvas, &frame);
    clocks::draw_grid(&mut canvas, &clocks, &frame);
    gates.draw(&mut canvas, &frame);
    bands::draw_edges(&mut canvas, &frame, deck::lowest_deg(brief));
    deck::draw(&mut canvas, brief, &frame);
    curve::draw(&mut canvas, &curve, &frame);
    captions.draw(&mut canvas, &events, &frame);
    strip::draw(&mut canvas, &brief.light.segments, (layout.strip(), &frame));
    low_sun::draw(&mut canvas, &brief.low_sun, (layout.strip(), &frame));
    for (clock, top) in clocks.iter().zip(layout.clock_tops()) {
        clock.draw(&mut canvas, top, &frame);
    }
    captions.draw_key(&mut canvas, &events, layout.key_top());
    heading::draw_caution(&mut canvas);
    Ok(canvas)
}
