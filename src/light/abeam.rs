//! When a path comes nearest to a place beside it.
//!
//! Knows no airspace and no terrain between.

use crate::curve::{Bandwidth, Curve};
use crate::path::{Leg, Line, Path};
use crate::units::{Four, Metres, Place, Vector, dot, wgs84};

/// Cosines nearer to one another than this are the same: the last bits of two legs that meet, 0.3 m at most.
const SAME: f64 = 4.0 * f64::EPSILON;

/// Where a path is nearest to a place.
#[derive(Debug, Clone, Copy)]
pub struct Abeam {
    /// Seconds from take-off; of equally near instants the first.
    pub at_s: f64,
    /// How far the place is then, along the geodesic.
    pub distance: Metres,
}

/// Finds where a path comes nearest to a place.
///
/// # Accuracy
/// Nearest by the angle between the verticals, n·m, of which each leg's turning points are all found. On the ellipsoid the
/// shortest geodesic may be up to 0.4 % of its own length further along the track: 5 s for a place 300 km aside.
pub fn abeam(path: &Path, place: Place) -> Abeam {
    let vertical = place.normal();
    let mut best = Nearest { at_s: 0.0, cosine: cosine(path.legs()[0].normal(0.0), vertical) };
    for leg in path.legs().iter().filter(|leg| leg.length_m() > 0.0) {
        // a leg that cannot come nearer than its own length is passed over
        let reach = leg.length_m() / wgs84::R_MIN_M + best.cosine.acos();
        if cosine(leg.normal(leg.begin_s), vertical).acos() <= reach {
            nearest(leg, vertical, (leg.begin_s, leg.end_s), &mut best);
        }
    }
    let there = Place::from_normal(path.at(best.at_s).normal);
    Abeam { at_s: best.at_s, distance: Metres(Line::between(there, place).length_m()) }
}

struct Nearest {
    at_s: f64,
    cosine: f64,
}

fn cosine(a: Vector, b: Vector) -> f64 {
    dot(a, b).clamp(-1.0, 1.0)
}

/// Looks for a nearer point on a leg, or on its halves where one polynomial would need too many nodes.
fn nearest(leg: &Leg, vertical: Vector, span: (f64, f64), best: &mut Nearest) {
    // the place stands still on the Earth
    let band = Bandwidth { body_rad_s: 0.0, path_rad_s: leg.speed_m_s() / wgs84::R_MIN_M };
    let f = |t: Four| dot(leg.normal(t), vertical.map(Four::splat));
    let Some(curve) = Curve::through(span.0, span.1, band, f) else {
        let middle = f64::midpoint(span.0, span.1);
        nearest(leg, vertical, (span.0, middle), best);
        return nearest(leg, vertical, (middle, span.1), best);
    };
    let turns = curve.turning_points();
    let ends = [(span.0, curve.first()), (span.1, curve.last())];
    for (at_s, cosine) in ends.into_iter().chain(curve.turns(&turns)) {
        if cosine > best.cosine + SAME {
            *best = Nearest { at_s, cosine: cosine.min(1.0) };
        }
    }
}
