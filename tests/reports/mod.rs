//! What the reports say, against what they were made from.

mod clocks;
