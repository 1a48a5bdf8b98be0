//! Where labels go so that none covers another: boxes in, boxes out.
//!
//! Knows nothing of what the labels say or of what a chart shows.

mod boxes;
mod apart;
mod beside;
mod flags;

pub use apart::apart;
pub use beside::{Ground, Wanted, beside};
pub use boxes::{link, overlap};
pub use flags::{Flag, Mast, flags};
