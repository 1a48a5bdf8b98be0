//! The Moon's day: when it rises and sets, and how much of it is lit.

use super::clock::{CivilDay, Clock};
use crate::curve::{Bandwidth, Curve};
use crate::light::Direction;
use crate::sky::{MoonWindow, Phase, Sky, sine_of_elevation};
use crate::units::{Four, Instant, Place, Vector};

/// The Earth's turn in rad/s: a bound on the Moon's, which falls behind it.
const EARTH_RAD_S: f64 = 7.292_115e-5;

/// The Moon rises or sets: its upper limb on the level horizon, with the almanacs' refraction.
#[derive(Debug, Clone, Copy)]
pub struct MoonEvent {
    /// Seconds from the day's beginning.
    pub at_s: f64,
    /// Rising or setting.
    pub direction: Direction,
}

/// The Moon in one civil day.
#[derive(Debug, Clone)]
pub struct MoonDay {
    /// Risings and settings, in order of time; none on a day that it passes over, at high latitudes none for days.
    pub events: Vec<MoonEvent>,
    /// Whether it is up when the day begins.
    pub is_up_at_begin: bool,
    /// The clock's noon, for which the phase is given.
    pub noon: Instant,
    /// How it is lit at the clock's noon.
    pub phase: Phase,
}

/// Looks at the Moon for a day.
///
/// # Accuracy
/// The series' 10″ move a rising by a second at low latitudes, and by its elevation's rate elsewhere.
pub(super) fn moon_day(place: Place, day: &CivilDay, (clock, sky): (Clock, &Sky)) -> MoonDay {
    let window = sky.moon_window(day.begin, day.end());
    let mut curves = Vec::with_capacity(3);
    fit(place.normal(), &window, (0.0, day.seconds), &mut curves);
    let noon = day.date.and_hms_opt(12, 0, 0).and_then(|noon| clock.shows(noon));
    let noon = noon.map_or(day.begin.after_s(day.seconds / 2.0), |(first, _)| first);
    MoonDay {
        events: events(&curves, day.seconds),
        is_up_at_begin: curves[0].first() >= 0.0,
        noon,
        phase: sky.moon_at(noon).phase(&sky.sun_at(noon)),
    }
}

/// Appends curves of the elevation's sine less that of the limit, which moves with the Moon's distance.
fn fit(normal: Vector, window: &MoonWindow<'_>, span: (f64, f64), curves: &mut Vec<Curve>) {
    let band = Bandwidth { body_rad_s: EARTH_RAD_S, path_rad_s: 0.0 };
    let above = |at_s: f64| {
        let moon = window.at(at_s);
        sine_of_elevation(normal, &moon) - moon.rise_limit().0.rad().sin()
    };
    let four = |t: Four| Four::from(t.to_array().map(above));
    if let Some(curve) = Curve::through(span.0, span.1, band, four) {
        curves.push(curve);
    } else {
        let middle = f64::midpoint(span.0, span.1);
        fit(normal, window, (span.0, middle), curves);
        fit(normal, window, (middle, span.1), curves);
    }
}

/// The zeros between one turning point or join and the next.
fn events(curves: &[Curve], end_s: f64) -> Vec<MoonEvent> {
    let mut peaks: Vec<(f64, f64, &Curve)> = Vec::with_capacity(8);
    for curve in curves {
        peaks.push((curve.begin_s(), curve.first(), curve));
        let turns = curve.turning_points();
        peaks.extend(curve.turns(&turns).map(|(at_s, above)| (at_s, above, curve)));
    }
    peaks.extend(curves.last().map(|curve| (end_s, curve.last(), curve)));
    let crossed = peaks.windows(2).filter(|pair| (pair[0].1 >= 0.0) != (pair[1].1 >= 0.0));
    let event = |pair: &[(f64, f64, &Curve)]| {
        let rising = pair[0].1 < 0.0;
        let direction = if rising { Direction::Rising } else { Direction::Setting };
        MoonEvent { at_s: pair[0].2.meets(0.0, rising, pair[0].0, pair[1].0), direction }
    };
    crossed.map(event).collect()
}
