//! Pictures of a brief, and of a place's days.
//!
//! Knows nothing of the sky or of files: a chart computes no angle and opens nothing.

pub mod canvas;
pub mod labels;
mod timeline;
mod year;

pub(crate) use timeline::style::state_ink;
pub use timeline::timeline;
pub use year::year;
