//! The Sun's upper meridian passages in a day: where its hour angle is zero, which is not where it stands highest.

use super::clock::CivilDay;
use crate::sky::{MEAN_SUN_RAD_S, Sky};
use crate::units::{Angle, Longitude};

const DAY_S: f64 = 86_400.0;
/// True and mean Sun come together to within this in a day (30 s), and a good deal more.
const DRIFT_S: f64 = 300.0;

/// Seconds from the day's beginning to each passage of a meridian: one, but where clocks change about noon.
///
/// # Accuracy
/// Of the geocentric hour angle, to a microsecond of the tables; the observer's own motion shifts what he sees by up
/// to 0.02 s.
pub(super) fn transits(lon: Longitude, day: &CivilDay, sky: &Sky) -> Vec<f64> {
    let window = sky.window(day.begin, day.end());
    let hour_angle = |at_s: f64| window.at(at_s).gha() + lon.angle();
    let full = std::f64::consts::TAU;
    let first_s = (full - hour_angle(0.0).turned_positive().rad()) / MEAN_SUN_RAD_S;
    // the day before's too, in case the guess is late by the drift
    let guesses = [first_s - DAY_S, first_s, first_s + DAY_S];
    let near = guesses.into_iter().filter(|guess| (-DRIFT_S..day.seconds + DRIFT_S).contains(guess));
    near.map(|guess| refined(guess, hour_angle)).filter(|at_s| (0.0..day.seconds).contains(at_s)).collect()
}

/// Newton's steps by the mean Sun's rate, each of which leaves less than a thousandth of the error.
fn refined(guess_s: f64, hour_angle: impl Fn(f64) -> Angle) -> f64 {
    (0..5).fold(guess_s, |at_s, _| at_s - hour_angle(at_s).turned_about_zero().rad() / MEAN_SUN_RAD_S)
}
