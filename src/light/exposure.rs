//! How bright it is outside along a path: lux on level ground beneath a clear sky, its sum over time, and how long it
//! exceeds given levels.
//!
//! Knows no cloud, no height and no aeroplane's windows. Sun and Moon are those of [`crate::sky::sunlight`] and
//! [`crate::sky::moonlight`].
//!
//! # The quadrature
//! Simpson's rule on cells of at most a minute, none of which straddles a waypoint. The error of a cell is
//! h⁵ |f⁗| / 2880. Light falls by at most 0.7 of a power of ten for each degree (tested in `sky`), so that f⁗ ≤ k⁴ f with
//! k = 1.6 for each degree: 0.0067/s at the Earth's own turn, twice that for an eastbound aircraft as fast. That is 1e−5
//! and 1.5e−4 of the light of that minute, some times more where two of the published pieces pass into each other, and far
//! less in broad daylight.
//!
//! # The search for levels
//! The nodes are the cells' ends and middles and every point where the Sun or the Moon turns. Between two nodes either
//! light only rises or only falls, so that an excursion across a level is missed only where they go opposite ways, and then
//! it is no higher than what moonlight changes by in half a minute: 0.001 lx. The crossing itself is a root of the smooth
//! function's logarithm, to a millisecond.

use super::limit::Direction;
use super::moon::MoonLight;
use super::trace::Trace;
use crate::path::{Leg, Path};
use crate::sky::{
    GeometricElevation, Lux, MoonWindow, Sky, SunWindow, moonlight, sine_of_elevation, sunlight,
};
use crate::units::Angle;

/// The levels that are looked for unless others are asked for.
pub const USUAL_LEVELS: [Lux; 5] = [Lux(1.0), Lux(10.0), Lux(100.0), Lux(1000.0), Lux(10_000.0)];
/// The longest cell of the quadrature in seconds.
const CELL_S: f64 = 60.0;
/// A cell as short as a recording's steps needs no middle: the trapezoid errs by h² k² / 12, 6e−5 of its light at worst.
const SHORT_S: f64 = 2.0;
/// How well a level's crossing is found, in seconds.
const ROOT_S: f64 = 1e-3;

/// The brightness at an instant.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LuxAt {
    /// Seconds from take-off.
    pub at_s: f64,
    /// On a level surface.
    pub lux: Lux,
}

/// A level of brightness and how long it is exceeded.
#[derive(Debug, Clone, PartialEq)]
pub struct Above {
    /// The level.
    pub level: Lux,
    /// Seconds in which it is brighter.
    pub seconds: f64,
    /// When the level is crossed, with whether it grows brighter or darker.
    pub crossings: Vec<(f64, Direction)>,
}

/// The light outside along a path.
#[derive(Debug, Clone)]
pub struct Exposure {
    /// Lux summed over the hours of the flight.
    pub lux_hours: f64,
    /// The levels asked for, in the order asked.
    pub above: Vec<Above>,
    /// Where it is brightest, to half a minute.
    pub brightest: LuxAt,
    /// Where it is darkest, to half a minute.
    pub darkest: LuxAt,
}

/// Looks at the brightness from given instants, in seconds from take-off.
#[derive(Debug)]
pub struct LightMeter<'a> {
    path: &'a Path,
    sun: SunWindow<'a>,
    moon: MoonWindow<'a>,
}

impl<'a> LightMeter<'a> {
    /// A meter carried along a path.
    pub fn new(path: &'a Path, sky: &'a Sky) -> Self {
        let (begin, end) = (path.takeoff, path.landing());
        Self { path, sun: sky.window(begin, end), moon: sky.moon_window(begin, end) }
    }

    /// The light of Sun, Moon and night sky at one instant.
    ///
    /// # Accuracy
    /// That of [`sunlight`]: a clear sky itself varies by tens of per cent.
    pub fn at(&self, at_s: f64) -> Lux {
        self.on(self.path.leg_at(at_s), at_s)
    }

    fn on(&self, leg: &Leg, at_s: f64) -> Lux {
        let (sun, moon, normal) = (self.sun.at(at_s), self.moon.at(at_s), leg.normal(at_s));
        let elevation = |sine: f64| GeometricElevation(Angle::from_rad(sine.clamp(-1.0, 1.0).asin()));
        let by_sun = sunlight(elevation(sine_of_elevation(normal, &sun)), &sun);
        by_sun + moonlight(elevation(sine_of_elevation(normal, &moon)), &moon, &moon.phase(&sun))
    }
}

/// Sums the light along a path and finds how long it exceeds each level. `trace` is the Sun's.
///
/// # Accuracy
/// Of the smooth model: the sum to 0.1 %, in the calm of daylight far better; seconds above a level to some milliseconds.
pub fn exposure(path: &Path, sky: &Sky, (trace, moon): (&Trace, &MoonLight), levels: &[Lux]) -> Exposure {
    let meter = LightMeter::new(path, sky);
    let (mut nodes, lux_seconds) = summed(&meter);
    let turns = moon.turns_s.iter().copied().chain(trace.peaks().iter().map(|peak| peak.at_s));
    // where a curve is only joined there is a node already
    let at_node = |at_s: f64| nodes.binary_search_by(|node| node.at_s.total_cmp(&at_s)).is_ok();
    let turned: Vec<f64> = turns.filter(|&at_s| !at_node(at_s)).collect();
    nodes.extend(turned.into_iter().map(|at_s| LuxAt { at_s, lux: meter.at(at_s) }));
    nodes.sort_by(|a, b| a.at_s.total_cmp(&b.at_s));
    let by_lux = |a: &&LuxAt, b: &&LuxAt| a.lux.0.total_cmp(&b.lux.0);
    let none = LuxAt { at_s: 0.0, lux: meter.at(0.0) };
    Exposure {
        lux_hours: lux_seconds / 3600.0,
        above: levels.iter().map(|&level| above(&meter, &nodes, level)).collect(),
        brightest: nodes.iter().max_by(by_lux).copied().unwrap_or(none),
        darkest: nodes.iter().min_by(by_lux).copied().unwrap_or(none),
    }
}

/// The nodes in order of time, and lux-seconds by Simpson's rule.
fn summed(meter: &LightMeter<'_>) -> (Vec<LuxAt>, f64) {
    let (mut nodes, mut sum) = (Vec::new(), 0.0);
    let mut begin = LuxAt { at_s: 0.0, lux: meter.at(0.0) };
    for leg in meter.path.legs() {
        let seconds = leg.end_s - leg.begin_s;
        let cells = (seconds / CELL_S).ceil().max(1.0);
        let width_s = seconds / cells;
        let look = |place: f64| {
            let at_s = (leg.begin_s + place * width_s).min(leg.end_s);
            LuxAt { at_s, lux: meter.on(leg, at_s) }
        };
        for cell in 0..cells as usize {
            if width_s <= SHORT_S {
                let end = look(cell as f64 + 1.0);
                sum += width_s / 2.0 * (begin.lux.0 + end.lux.0);
                nodes.push(begin);
                begin = end;
                continue;
            }
            let (middle, end) = (look(cell as f64 + 0.5), look(cell as f64 + 1.0));
            sum += width_s / 6.0 * (begin.lux.0 + 4.0 * middle.lux.0 + end.lux.0);
            nodes.extend([begin, middle]);
            begin = end;
        }
    }
    nodes.push(begin);
    (nodes, sum)
}

/// How long a level is exceeded.
fn above(meter: &LightMeter<'_>, nodes: &[LuxAt], level: Lux) -> Above {
    let mut found = Above { level, seconds: 0.0, crossings: Vec::new() };
    for pair in nodes.windows(2) {
        let [a, b] = [pair[0], pair[1]];
        found.seconds += match (a.lux > level, b.lux > level) {
            (true, true) => b.at_s - a.at_s,
            (false, false) => 0.0,
            (bright, _) => {
                let at_s = met(meter, level, a, b);
                let direction = if bright { Direction::Setting } else { Direction::Rising };
                found.crossings.push((at_s, direction));
                if bright { at_s - a.at_s } else { b.at_s - at_s }
            }
        };
    }
    found
}

/// When a level is met between two nodes on either side of it: false position on the logarithm, the end that stays halved
/// in weight (Illinois), so that the bracket closes from both sides.
fn met(meter: &LightMeter<'_>, level: Lux, a: LuxAt, b: LuxAt) -> f64 {
    let gap = |lux: Lux| (lux.0 / level.0).ln();
    let (mut low, mut high) = ((a.at_s, gap(a.lux)), (b.at_s, gap(b.lux)));
    let mut kept = 0_i8;
    for _ in 0..60 {
        let at_s = (low.0 * high.1 - high.0 * low.1) / (high.1 - low.1);
        let now = (at_s, gap(meter.at(at_s)));
        if now.1.abs() < 1e-12 || (high.0 - low.0).abs() < ROOT_S {
            return at_s;
        }
        if (now.1 > 0.0) == (high.1 > 0.0) {
            low.1 *= if kept == 1 { 0.5 } else { 1.0 };
            (high, kept) = (now, 1);
        } else {
            high.1 *= if kept == -1 { 0.5 } else { 1.0 };
            (low, kept) = (now, -1);
        }
    }
    f64::midpoint(low.0, high.0)
}
