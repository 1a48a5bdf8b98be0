//! A path as points on a plain chart of longitude against latitude, cut where such a chart is torn: on the 180° meridian
//! and at a pole.
//!
//! Knows nothing of formats, nor of any projection but that plain one.

use super::circle::meridian_crossing;
use super::fly::Path;
use super::height::Heights;
use super::leg::Leg;
use crate::units::{Metres, Place, wgs84};

/// The largest radius of curvature of the ellipsoid, at the poles: with it a distance is never taken for too short.
const R_MAX_M: f64 = wgs84::A_M / (1.0 - wgs84::F);
/// The smallest one in any direction: with it an arc is never taken for too flat.
const R_MIN_M: f64 = wgs84::R_MIN_M;
/// What a probe may be off, as a share of the tolerance: the greatest deviation lies near a probe and not on it.
const PROBED_SHARE: f64 = 0.75;
/// Times nearer than this are one: 0.3 mm of flight.
const ONE_INSTANT_S: f64 = 1e-6;
/// Nearer to a pole or to 180° than this, in degrees, is on it: 0.1 mm.
const ON_IT_DEG: f64 = 1e-9;
/// Points nearer to each other than this, in degrees, are one.
const SAME_DEG: f64 = 1e-6;

/// A point of a track.
///
/// # Shapes and units
/// The longitude is held in [−180°, 180°]: which of both ends names the 180° meridian says from which side it is met.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct TrackPoint {
    /// Seconds from take-off.
    pub at_s: f64,
    /// Degrees north.
    pub lat_deg: f64,
    /// Degrees east.
    pub lon_deg: f64,
    /// Height above mean sea level, where known.
    pub height: Option<Metres>,
}

/// A stretch of a leg that a chart shows without a tear, and along which the longitude is monotone.
struct Piece<'a> {
    leg: &'a Leg,
    begin_s: f64,
    end_s: f64,
    /// The longitude of its middle, in degrees, which says on which side of 180° it lies.
    mid_lon: f64,
    /// When its leg crosses the 180° meridian, if it does.
    flips_s: Option<f64>,
    heights: Option<&'a Heights>,
}

impl Path {
    /// The lines that a chart of longitude against latitude shows between two times, in order, each of two points or more.
    ///
    /// # Shapes and units
    /// A line ends, and the next begins, where the 180° meridian is crossed (at the same instant and latitude, with
    /// longitudes of 180° and −180°) and where a pole is passed (at ±90° with the longitudes of both meridians, for a
    /// pole has none of its own). A path that passes beside a pole, however near, is not cut there: its longitude
    /// sweeps through half a turn.
    ///
    /// # Accuracy
    /// A point on the straight line between two neighbours, taken at a share of it, lies no farther than the tolerance
    /// from where the aircraft is at that share of the time between; heights lie on straight lines exactly. Neighbours are
    /// so near that a straight line through space does not sink by more than the tolerance either.
    pub fn track(&self, begin_s: f64, end_s: f64, tolerance: Metres) -> Vec<Vec<TrackPoint>> {
        let mut lines: Vec<Vec<TrackPoint>> = Vec::new();
        for leg in self.legs().iter().filter(|leg| leg.end_s > begin_s && leg.begin_s < end_s) {
            let span = (leg.begin_s.max(begin_s), leg.end_s.min(end_s));
            let last = lines.last().and_then(|line| line.last()).copied();
            for piece in pieces(leg, span, last, self.heights.as_ref()) {
                append(&mut lines, piece.points(tolerance));
            }
        }
        lines
    }
}

/// Goes on with the last line where the next one begins at its end, else begins another.
fn append(lines: &mut Vec<Vec<TrackPoint>>, points: Vec<TrackPoint>) {
    let Some((line, end)) = lines.last_mut().and_then(|line| line.last().copied().map(|end| (line, end)))
    else {
        lines.push(points);
        return;
    };
    let begin = points[0];
    let (lat_off, lon_off) = ((end.lat_deg - begin.lat_deg).abs(), (end.lon_deg - begin.lon_deg).abs());
    if lat_off < SAME_DEG && lon_off < SAME_DEG {
        line.extend(&points[1..]);
    } else if end.lat_deg.abs() < 90.0 && lon_off < 1.0 && lat_off < SAME_DEG {
        // a hand's breadth from a pole nanometres show in the longitude
        line.extend(&points);
    } else {
        lines.push(points);
    }
}

/// A leg's pieces between two times; `last` is where the track before it ended.
fn pieces<'a>(
    leg: &'a Leg,
    (begin_s, end_s): (f64, f64),
    last: Option<TrackPoint>,
    heights: Option<&'a Heights>,
) -> Vec<Piece<'a>> {
    let flips_s = meridian_crossing(leg).map(|crossing| crossing.at_s);
    let turns = leg.line().vertices().map(|d| leg.time_s(d));
    let bends = heights.into_iter().flat_map(|heights| heights.bends_within_s(begin_s, end_s));
    let inside = |t: &f64| *t > begin_s + ONE_INSTANT_S && *t < end_s - ONE_INSTANT_S;
    let mut times: Vec<f64> = turns.chain(bends).chain(flips_s).filter(inside).collect();
    times.extend([begin_s, end_s]);
    times.sort_by(f64::total_cmp);
    times.dedup_by(|next, kept| *next - *kept < ONE_INSTANT_S && *next < end_s);
    let piece = |pair: &[f64]| {
        let mid_lon = lon_between(leg, pair[0], pair[1], last);
        Piece { leg, begin_s: pair[0], end_s: pair[1], mid_lon, flips_s, heights }
    };
    times.windows(2).map(piece).collect()
}

/// The longitude halfway. One that waits keeps where it came from, and one along 180° the side from which it came: both
/// have no longitude that is better.
fn lon_between(leg: &Leg, begin_s: f64, end_s: f64, last: Option<TrackPoint>) -> f64 {
    let waits = leg.length_m() == 0.0;
    let lon = if waits { leg.from.lon.deg() } else { raw(leg, f64::midpoint(begin_s, end_s)).1 };
    let at_pole = waits && leg.from.lat.deg().abs() > 90.0 - ON_IT_DEG;
    let on_180 = lon.abs() > 180.0 - ON_IT_DEG;
    match last {
        Some(last) if at_pole => last.lon_deg,
        Some(last) if on_180 => 180_f64.copysign(last.lon_deg),
        _ if on_180 => -180.0,
        _ => lon,
    }
}

/// Latitude and longitude in degrees; a leg's ends are the places that were given.
fn raw(leg: &Leg, at_s: f64) -> (f64, f64) {
    let place = match at_s {
        s if s == leg.begin_s => leg.from,
        s if s == leg.end_s => leg.to,
        s => Place::from_normal(leg.normal(s)),
    };
    (place.lat.deg(), place.lon.deg())
}

impl Piece<'_> {
    /// All points, both ends included.
    fn points(&self, tolerance: Metres) -> Vec<TrackPoint> {
        let (begin, end) = (self.at(self.begin_s), self.at(self.end_s));
        let mut points = vec![begin];
        self.refine((begin, end), tolerance.0, &mut points);
        points.push(end);
        points
    }

    /// Appends the points that are needed between two.
    fn refine(&self, (a, b): (TrackPoint, TrackPoint), tolerance_m: f64, points: &mut Vec<TrackPoint>) {
        if b.at_s - a.at_s < ONE_INSTANT_S || self.is_straight(a, b, tolerance_m) {
            return;
        }
        let mid = self.at(f64::midpoint(a.at_s, b.at_s));
        self.refine((a, mid), tolerance_m, points);
        points.push(mid);
        self.refine((mid, b), tolerance_m, points);
    }

    /// Whether a straight line serves, on the chart and through space.
    fn is_straight(&self, a: TrackPoint, b: TrackPoint, tolerance_m: f64) -> bool {
        let flown_m = (b.at_s - a.at_s) * self.leg.speed_m_s();
        // the sagitta of a short arc s is s²/8R
        let sinks_m = flown_m * flown_m / (8.0 * R_MIN_M);
        let allowed_m = tolerance_m * PROBED_SHARE;
        sinks_m <= tolerance_m
            && [0.25, 0.5, 0.75].iter().all(|&share| self.deviation_m(a, b, share) <= allowed_m)
    }

    /// How far the straight line between two points is from the aircraft at a share of the way.
    fn deviation_m(&self, a: TrackPoint, b: TrackPoint, share: f64) -> f64 {
        let between = |from: f64, to: f64| from + share * (to - from);
        let (lat, lon) =
            (between(a.lat_deg, b.lat_deg).to_radians(), between(a.lon_deg, b.lon_deg).to_radians());
        let drawn = [lat.cos() * lon.cos(), lat.cos() * lon.sin(), lat.sin()];
        let flown = self.leg.normal(between(a.at_s, b.at_s));
        let gap: f64 = drawn.iter().zip(flown).map(|(d, f)| (d - f).powi(2)).sum();
        gap.sqrt() * R_MAX_M
    }

    fn at(&self, at_s: f64) -> TrackPoint {
        let (lat, lon) = raw(self.leg, at_s);
        let lat_deg = if lat.abs() > 90.0 - ON_IT_DEG { 90_f64.copysign(lat) } else { lat };
        let height = self.heights.map(|heights| heights.at(at_s));
        TrackPoint { at_s, lat_deg, lon_deg: self.on_its_side(at_s, lon), height }
    }

    /// A longitude of this piece, told from the side of 180° on which the piece lies.
    fn on_its_side(&self, at_s: f64, lon: f64) -> f64 {
        if self.leg.line().is_meridional() || self.leg.length_m() == 0.0 {
            return self.mid_lon;
        }
        let flips = self.flips_s.is_some_and(|flips| (flips - at_s).abs() <= ONE_INSTANT_S);
        // a longitude is monotone here and sweeps half a turn at most: what lies farther off was rounded across 180°
        let across = (lon - self.mid_lon).abs() > 180.0 + ON_IT_DEG;
        if flips || across || lon.abs() > 180.0 - ON_IT_DEG { 180_f64.copysign(self.mid_lon) } else { lon }
    }
}
