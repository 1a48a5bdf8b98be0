//! A sheet to draw a chart on, and the two pictures made of it: SVG and PNG, from one layout.
//!
//! Knows nothing of flights, of light or of files: it takes coordinates in pixels and gives bytes.
//!
//! What is drawn is recorded on a [`Canvas`], by its own methods at full precision or through [`Grid`] by `plotters`.
//! The same calls give the same bytes, on every machine: letters come from embedded fonts, as outlines.

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
