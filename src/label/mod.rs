//! What things are called where people read: names from outside made harmless, times on clocks, words for states.
//!
//! Knows nothing of pages or pictures: the charts and the reports both take their words from here.

pub(crate) mod clock;
pub(crate) mod words;
mod name;

pub use name::one_line;
