//! Smooth functions of time as Chebyshev series, and the search that finds every turning point and crossing of one.
//!
//! Knows nothing of the Sun, of flights or of the Earth: tests feed it toy skies.
//!
//! # The search's promise
//! A function f on an interval is sampled at n Chebyshev–Lobatto nodes (both ends among them) and replaced by its
//! interpolating polynomial p. The caller bounds |f − p| ≤ ε beforehand with [`error_bound`]. From there on nothing is
//! sampled: the turning points of p are isolated by a certificate (see [`Curve::turning_points`]), between two of them
//! p is monotone, and so it meets a level once if its ends lie on both sides of it and not at all otherwise. Hence
//! every excursion of f across a level that is higher than ε is found, however short it is, and none is invented.

mod bound;
mod near;
mod nodes;
mod polynomial;
mod turning;
mod root;

pub use bound::{Bandwidth, error_bound, nodes_for};
pub use near::Near;
pub use nodes::{MAX_NODES, coefficients, lobatto};
pub use polynomial::Curve;
pub use turning::TurningPoints;
