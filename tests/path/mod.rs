//! Geodesics, circles and positions.

mod geodesics;
mod circles;
