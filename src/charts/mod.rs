//! Pictures of a brief.
//!
//! Knows nothing of the sky or of files: a chart computes no angle and opens nothing.

pub mod canvas;
pub mod labels;
mod timeline;

pub use timeline::timeline;
