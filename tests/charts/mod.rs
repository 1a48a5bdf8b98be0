//! Pictures, checked from the outside.

mod canvas;
mod timeline;
mod year;
