//! Which points of a track belong together, and which are jumps that no aircraft can make.
//!
//! Knows points and a speed only. A point that is wrong may be the first, and wrong points may come in runs, so no
//! single point is believed: points are strung into chains within which the speed holds, and the longest chain stays.

use super::raw::RawPoint;
use crate::units::Vector;

/// The Earth's mean radius (IUGG R1 of WGS84), which tells distances to half a percent.
const RADIUS_M: f64 = 6_371_008.8;
/// One knot, exactly.
const KNOT_M_S: f64 = 1852.0 / 3600.0;
/// How many chains are kept open: a recording that is wrong in more ways at a time has no right one.
const MOST_CHAINS: usize = 8;

struct Chain {
    number: usize,
    last: usize,
    count: usize,
}

/// For points in order of time, whether each belongs to the longest chain in which no point needs more than the speed
/// from the one before it.
///
/// The time is proportional to the number of points, however wrong they are.
pub(super) fn believed(points: &[RawPoint], max_speed_kt: f64) -> Vec<bool> {
    let normals: Vec<Vector> = points.iter().map(|point| point.place.normal()).collect();
    let within = |a: usize, b: usize| {
        let seconds = points[b].instant.since_s(points[a].instant);
        distance_m(normals[a], normals[b]) <= max_speed_kt * KNOT_M_S * seconds
    };
    let mut open: Vec<Chain> = Vec::with_capacity(MOST_CHAINS);
    let mut member_of = Vec::with_capacity(points.len());
    let mut longest = (0, 0);
    for index in 0..points.len() {
        let reached =
            open.iter_mut().filter(|chain| within(chain.last, index)).max_by_key(|chain| chain.count);
        let chain = if let Some(chain) = reached {
            chain.last = index;
            chain.count += 1;
            chain
        } else {
            begin(&mut open, index)
        };
        member_of.push(chain.number);
        // of two that are equally long the earlier stays
        if chain.count > longest.1 {
            longest = (chain.number, chain.count);
        }
    }
    member_of.into_iter().map(|number| number == longest.0).collect()
}

/// Opens a chain in which the point stands alone; the shortest makes room. A chain has its first point's number.
fn begin(open: &mut Vec<Chain>, index: usize) -> &mut Chain {
    let fresh = Chain { number: index, last: index, count: 1 };
    let shortest = (0..open.len()).min_by_key(|&i| open[i].count).filter(|_| open.len() >= MOST_CHAINS);
    let place = shortest.unwrap_or(open.len());
    if place == open.len() {
        open.push(fresh);
    } else {
        open[place] = fresh;
    }
    &mut open[place]
}

/// Along a sphere, by the chord.
fn distance_m(a: Vector, b: Vector) -> f64 {
    let chord = ((a[0] - b[0]).powi(2) + (a[1] - b[1]).powi(2) + (a[2] - b[2]).powi(2)).sqrt();
    2.0 * (chord / 2.0).min(1.0).asin() * RADIUS_M
}

#[cfg(test)]
mod tests {
    use super::super::raw::RawPoint;
    use super::believed;
    use crate::units::{Instant, Place};

    /// Points a minute apart on a parallel, at these degrees north.
    fn kept(latitudes: &[f64]) -> Vec<bool> {
        let points: Vec<RawPoint> = latitudes
            .iter()
            .enumerate()
            .map(|(i, lat)| RawPoint {
                instant: Instant::from_seconds(60.0 * i as f64),
                place: Place::from_deg(*lat, 10.0).unwrap(),
                height_m: f64::NAN,
            })
            .collect();
        believed(&points, 1500.0)
    }

    #[test]
    fn what_cannot_be_reached_is_not_believed_wherever_it_stands() {
        assert_eq!(kept(&[50.0, 50.1, 50.2]), [true; 3]);
        assert_eq!(kept(&[50.0, 70.0, 50.2]), [true, false, true]);
        assert_eq!(kept(&[70.0, 50.1, 50.2, 50.3]), [false, true, true, true]);
        assert_eq!(kept(&[50.0, 50.1, 50.2, 20.0]), [true, true, true, false]);
        let run = kept(&[50.0, 50.1, 20.0, 20.1, 20.2, 50.5, 50.6, 50.7]);
        assert_eq!(run, [true, true, false, false, false, true, true, true]);
    }

    #[test]
    fn more_wrong_points_than_chains_do_not_lose_the_right_one() {
        let mut latitudes = vec![0.0, 0.1, 0.2];
        latitudes
            .extend((0..20).map(|i| if i % 2 == 0 { -80.0 + f64::from(i) } else { 80.0 - f64::from(i) }));
        latitudes.extend([2.3, 2.4]);
        let kept = kept(&latitudes);
        assert!(kept[..3].iter().chain(&kept[23..]).all(|k| *k), "{kept:?}");
        assert!(!kept[3..23].iter().any(|k| *k), "{kept:?}");
    }
}
