//! What light each alternate would be used in.
//!
//! Knows no weather and no way there: only when the place is abeam and how long after that it would be reached.

use crate::intake::Alternate;
use crate::light::{Abeam, Event, Limit, State, abeam, along};
use crate::path::Path;
use crate::sky::{GeometricElevation, Sky, azimuth, elevation};
use crate::units::{Angle, Instant};

/// How far ahead the next change is looked for; the sky answers for no longer at once.
const AHEAD_S: f64 = 48.0 * 3600.0;

/// Whether the Sun neither rises nor sets in the two days from an alternate's use.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Polar {
    /// It is above the horizon all the while.
    Day,
    /// It is below it all the while.
    Night,
}

/// An alternate with the light at the time of its use, for an observer who stands there.
#[derive(Debug, Clone, Copy)]
pub struct AlternateView {
    /// When it is abeam, and how far.
    pub abeam: Abeam,
    /// When it would be used.
    pub used: Instant,
    /// The light there then.
    pub state: State,
    /// The Sun's geometric elevation there then.
    pub elevation: GeometricElevation,
    /// Its azimuth.
    pub azimuth: Angle,
    /// The next change of the light and when it comes, if within 48 hours.
    pub next: Option<(Event, Instant)>,
    /// Whether the Sun neither rises nor sets within 48 hours.
    pub polar: Option<Polar>,
}

/// Looks at an alternate at the time of its use.
pub(super) fn view(alternate: &Alternate, path: &Path, sky: &Sky) -> AlternateView {
    let place = alternate.stop.place;
    let abeam = abeam(path, place);
    let used = path.takeoff.after_s(abeam.at_s + alternate.after_s);
    let light = along(&Path::standing(place, used, AHEAD_S), sky);
    let sun = sky.sun_at(used);
    let changes = light.crossings.iter().map(|c| (c.limit.event(c.direction), used.after_s(c.at_s)));
    let horizon_met = light.crossings.iter().any(|crossing| crossing.limit == Limit::Horizon);
    let polar = if light.at_takeoff == State::Daylight { Polar::Day } else { Polar::Night };
    AlternateView {
        abeam,
        used,
        state: light.at_takeoff,
        elevation: elevation(place, &sun),
        azimuth: azimuth(place, &sun),
        next: changes.take(1).find(|(_, at)| at.is_answered_for()),
        polar: (!horizon_met).then_some(polar),
    }
}
