//! A sheet to draw a chart on, and the two pictures made of it: SVG and PNG, from one layout.
//!
//! Knows nothing of flights, of light or of files: it takes coordinates in pixels and gives bytes.
//!
//! What is drawn is recorded on a [`Canvas`], by its own methods at full precision or through [`Grid`] by `plotters`.
//! The same calls give the same bytes, on every machine: letters come from embedded fonts, as outlines.
//!
//! ```
//! use gloamline::charts::canvas::{Canvas, Dash, Grid, Ink, Point, Size, Stroke};
//! use plotters::prelude::{ChartBuilder, IntoDrawingArea};
//!
//! let mut canvas = Canvas::new(Size::new(800, 450)?, "Elevation of the Sun", "It sets twice.");
//! let root = canvas.grid().into_drawing_area();
//! let mut chart = ChartBuilder::on(&root)
//!     .x_label_area_size(Grid::steps(40.0))
//!     .y_label_area_size(Grid::steps(60.0))
//!     .build_cartesian_2d(0.0..12.0, -30.0..30.0)?;
//! chart.configure_mesh().label_style(("sans-serif", Grid::steps(14.0))).draw()?;
//! let plot = Grid::rect(chart.plotting_area().get_pixel_range());
//! drop((chart, root));
//! canvas.clipped(plot, |canvas| {
//!     let ends = [Point::new(plot.left, plot.top), Point::new(plot.right, plot.bottom)];
//!     canvas.line(&ends, Stroke::new(Ink::hex(0xb22222), 1.5).dashed(Dash::Dashed(6.0, 4.0)));
//! });
//! let (svg, png) = (canvas.to_svg(), canvas.to_png(2.0)?);
//! # assert!(svg.contains("stroke-dasharray") && png.len() > 1000);
//! # Ok::<(), Box<dyn std::error::Error>>(())
//! ```

mod error;
mod geometry;
mod ink;
mod hatch;
mod font;
mod text;
mod scene;
mod grid;
mod xml;
mod svg;
mod svg_text;
mod snap;
mod raster;
mod encode;

pub use error::CanvasError;
pub use geometry::{Point, Rect, Size};
pub use grid::Grid;
pub use ink::{Dash, Hatch, Ink, Look, Stroke, Texture};
pub use scene::{Canvas, Marker};
pub use svg::SvgOptions;
pub use text::{Across, Extent, Level, TextStyle, Turn, measure};
