//! The table of contents of everything that is checked against the outside.

mod charts;
