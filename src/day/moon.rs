//! The Moon's day: when it rises and sets, and how much of it is lit.

use super::clock::{CivilDay, Clock};
use crate::light::{Light, MoonCrossing, moon_beneath};
use crate::path::Path;
use crate::sky::{Phase, Sky};
use crate::units::Instant;

/// The Moon in one civil day.
#[derive(Debug, Clone)]
pub struct MoonDay {
    /// Risings and settings, in order of time; none on a day that it passes over, at high latitudes none for days.
    pub events: Vec<MoonCrossing>,
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
pub(super) fn moon_day(
    (path, light): (&Path, &Light),
    day: &CivilDay,
    (clock, sky): (Clock, &Sky),
) -> MoonDay {
    let moon = moon_beneath(path, sky, light);
    let noon = day.date.and_hms_opt(12, 0, 0).and_then(|noon| clock.shows(noon));
    let noon = noon.map_or(day.begin.after_s(day.seconds / 2.0), |(first, _)| first);
    MoonDay {
        is_up_at_begin: moon.is_up_at(0.0),
        events: moon.crossings,
        noon,
        phase: sky.moon_at(noon).phase(&sky.sun_at(noon)),
    }
}
