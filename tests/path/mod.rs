//! Geodesics, circles and positions.

mod geodesics;
mod circles;
mod waypoints;
