//! What a planner asks about the brightness outside: levels, and factors of their own for what comes in.
//!
//! Does not know how bright it is, nor what a window lets through: a factor is used as given.

/// The brightest level that can be asked for, half as bright again as the Sun overhead.
const BRIGHTEST_LUX: f64 = 200_000.0;
/// The most levels of one flight.
const MOST_LEVELS: usize = 32;

/// What is asked about the brightness outside.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Brightness {
    /// Levels in lux, from the lowest up, if others than the usual ones are wanted.
    pub levels_lux: Option<Vec<f64>>,
    /// The share of the light that the windows let through, 0 to 1.
    pub transmittance: Option<f64>,
    /// The share of the light outside that falls on the place of interest inside, 0 to 1.
    pub view_factor: Option<f64>,
}

/// A level or factor that cannot be.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
pub enum BrightnessError {
    /// No level of daylight.
    #[error("a level of {0} lx is not above 0 lx and up to {BRIGHTEST_LUX} lx")]
    Level(f64),
    /// More levels than anyone reads.
    #[error("{0} levels of brightness are more than the {MOST_LEVELS} that can be asked for")]
    TooMany(usize),
    /// No share.
    #[error("a {name} of {value} is not above 0 and up to 1")]
    Share {
        /// What the share is of.
        name: &'static str,
        /// As given.
        value: f64,
    },
}

/// Levels in lux, from the lowest up and each once.
///
/// # Errors
/// A level outside 0 lx to 200,000 lx, or too many.
pub fn lux_levels(mut given: Vec<f64>) -> Result<Vec<f64>, BrightnessError> {
    if given.len() > MOST_LEVELS {
        return Err(BrightnessError::TooMany(given.len()));
    }
    if let Some(&level) = given.iter().find(|&&level| !(level > 0.0 && level <= BRIGHTEST_LUX)) {
        return Err(BrightnessError::Level(level));
    }
    given.sort_by(f64::total_cmp);
    given.dedup();
    Ok(given)
}

/// A share of light above 0 and up to 1.
pub(super) fn share(name: &'static str, value: f64) -> Result<f64, BrightnessError> {
    if value > 0.0 && value <= 1.0 { Ok(value) } else { Err(BrightnessError::Share { name, value }) }
}

#[cfg(test)]
mod tests {
    use super::{lux_levels, share};

    #[test]
    fn levels_come_in_order_and_each_once() {
        assert_eq!(lux_levels(vec![100.0, 1.0, 100.0]), Ok(vec![1.0, 100.0]));
        for wrong in [0.0, -1.0, f64::NAN, f64::INFINITY, 200_001.0] {
            assert!(lux_levels(vec![1.0, wrong]).is_err(), "{wrong}");
        }
        assert!(lux_levels(vec![1.0; 33]).is_err());
    }

    #[test]
    fn a_share_of_nothing_or_of_more_than_all_is_refused() {
        assert_eq!(share("transmittance", 1.0), Ok(1.0));
        for wrong in [0.0, 1.001, f64::NAN, -0.5] {
            assert!(share("transmittance", wrong).is_err(), "{wrong}");
        }
    }
}
