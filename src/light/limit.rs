//! The four limits, the five states between them, and the names of the eight events.

use crate::sky::HORIZONTAL_REFRACTION;
use crate::units::Angle;
use std::sync::LazyLock;

/// The Sun's semidiameter by the almanacs' convention, as [`HORIZONTAL_REFRACTION`] is.
const MEAN_SEMIDIAMETER: Angle = Angle::from_arcmin(16.0);

/// A geometric elevation of the Sun's centre at which the state changes.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Limit {
    /// The upper limb on the horizon: −50′ for the centre.
    Horizon,
    /// −6°.
    Civil,
    /// −12°.
    Nautical,
    /// −18°.
    Astronomical,
}

/// The way in which the Sun meets a limit.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Direction {
    /// Upwards.
    Rising,
    /// Downwards.
    Setting,
}

/// What a crossing is called.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Event {
    /// The upper limb appears.
    Sunrise,
    /// The upper limb disappears.
    Sunset,
    /// Civil twilight begins in the morning sense.
    CivilDawn,
    /// Civil twilight ends.
    CivilDusk,
    /// Nautical twilight begins.
    NauticalDawn,
    /// Nautical twilight ends.
    NauticalDusk,
    /// Astronomical twilight begins.
    AstronomicalDawn,
    /// Astronomical twilight ends.
    AstronomicalDusk,
}

/// What holds between two crossings, from light to dark.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum State {
    /// The Sun's upper limb is above the horizon.
    Daylight,
    /// The centre is above −6°.
    CivilTwilight,
    /// The centre is above −12°.
    NauticalTwilight,
    /// The centre is above −18°.
    AstronomicalTwilight,
    /// The centre is below −18°.
    Darkness,
}

impl Limit {
    /// All limits, from the highest down.
    pub const ALL: [Self; 4] = [Self::Horizon, Self::Civil, Self::Nautical, Self::Astronomical];

    /// The Sun's geometric elevation at the limit.
    ///
    /// # Source
    /// Astronomical Almanac, section M (glossary: sunrise, sunset; twilight).
    pub fn elevation(self) -> Angle {
        match self {
            Self::Horizon => -(HORIZONTAL_REFRACTION + MEAN_SEMIDIAMETER),
            Self::Civil => Angle::from_deg(-6.0),
            Self::Nautical => Angle::from_deg(-12.0),
            Self::Astronomical => Angle::from_deg(-18.0),
        }
    }

    /// The sine of that elevation.
    pub(super) fn sine(self) -> f64 {
        static SINES: LazyLock<[f64; 4]> =
            LazyLock::new(|| Limit::ALL.map(|limit| limit.elevation().rad().sin()));
        SINES[self as usize]
    }

    /// What meeting the limit is called.
    pub fn event(self, direction: Direction) -> Event {
        match (self, direction) {
            (Self::Horizon, Direction::Rising) => Event::Sunrise,
            (Self::Horizon, Direction::Setting) => Event::Sunset,
            (Self::Civil, Direction::Rising) => Event::CivilDawn,
            (Self::Civil, Direction::Setting) => Event::CivilDusk,
            (Self::Nautical, Direction::Rising) => Event::NauticalDawn,
            (Self::Nautical, Direction::Setting) => Event::NauticalDusk,
            (Self::Astronomical, Direction::Rising) => Event::AstronomicalDawn,
            (Self::Astronomical, Direction::Setting) => Event::AstronomicalDusk,
        }
    }

    /// The state just above the limit.
    pub fn above(self) -> State {
        State::ALL[self as usize]
    }

    /// The state just below the limit.
    pub fn below(self) -> State {
        State::ALL[self as usize + 1]
    }
}

impl State {
    /// All states, from light to dark.
    pub const ALL: [Self; 5] = [
        Self::Daylight,
        Self::CivilTwilight,
        Self::NauticalTwilight,
        Self::AstronomicalTwilight,
        Self::Darkness,
    ];

    /// The state that holds where the Sun's centre has this sine of geometric elevation; on a limit the lighter one.
    pub fn of_sine(sine: f64) -> Self {
        let below = Limit::ALL.iter().filter(|limit| sine < limit.sine()).count();
        Self::ALL[below]
    }
}

#[cfg(test)]
mod tests {
    use super::{Limit, State};

    #[test]
    fn sunrise_is_at_fifty_minutes_below_the_horizon() {
        assert!((Limit::Horizon.elevation().deg() * 60.0 + 50.0).abs() < 1e-12);
    }

    #[test]
    fn each_limit_parts_two_neighbouring_states() {
        for limit in Limit::ALL {
            let sine = limit.elevation().rad().sin();
            assert_eq!(State::of_sine(sine), limit.above());
            assert_eq!(State::of_sine(sine - 1e-9), limit.below());
        }
    }
}
