//! A year's equinoxes, solstices, perihelion and aphelion.

use super::{model, time};
use crate::units::{Angle, Instant};
use chrono::{DateTime, NaiveDate, Utc};

/// What happens at a moment of the Sun's year.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum YearEvent {
    /// The Earth is nearest to the Sun.
    Perihelion,
    /// Apparent longitude 0°.
    MarchEquinox,
    /// Apparent longitude 90°.
    JuneSolstice,
    /// The Earth is farthest from the Sun.
    Aphelion,
    /// Apparent longitude 180°.
    SeptemberEquinox,
    /// Apparent longitude 270°.
    DecemberSolstice,
}

/// An event and its instant.
#[derive(Debug, Clone, Copy)]
pub struct YearMoment {
    /// What happens.
    pub event: YearEvent,
    /// When.
    pub instant: Instant,
}

const DAY_S: f64 = 86_400.0;

/// The equinoxes, solstices and apsides of a calendar year (UTC) in order of time; a year may lack an apsis or have two.
///
/// # Accuracy
/// Equinoxes and solstices within 1 s of JPL DE421; perihelion and aphelion within 3 minutes of it, where the distance
/// itself is flat: it changes by less than a kilometre in that time (`tests/tables/skyfield-de421/seasons.csv`).
pub fn year_moments(year: i32) -> Vec<YearMoment> {
    let (begin, end) = (new_year(year), new_year(year + 1));
    let mut moments = seasons(begin, end);
    moments.extend(apsides(begin, end));
    moments.sort_by(|a, b| a.instant.seconds().total_cmp(&b.instant.seconds()));
    moments
}

fn new_year(year: i32) -> Instant {
    let midnight =
        NaiveDate::from_ymd_opt(year, 1, 1).and_then(|d| d.and_hms_opt(0, 0, 0)).unwrap_or_default();
    Instant::from_utc(DateTime::<Utc>::from_naive_utc_and_offset(midnight, Utc))
}

/// The longitudes that are multiples of 90°: each is passed once, about a quarter of a year after the last.
fn seasons(begin: Instant, end: Instant) -> Vec<YearMoment> {
    use YearEvent::{DecemberSolstice, JuneSolstice, MarchEquinox, SeptemberEquinox};
    let wanted =
        [(MarchEquinox, 79.0), (JuneSolstice, 171.5), (SeptemberEquinox, 265.0), (DecemberSolstice, 355.0)];
    let moments = wanted.iter().zip(0_u8..).map(|(&(event, day), quarter)| {
        let target = Angle::from_deg(90.0 * f64::from(quarter));
        let ahead = |t: Instant| {
            let longitude = Angle::from_rad(model::apparent_longitude_rad(time::tt_days(t)));
            (longitude - target).turned_about_zero().rad()
        };
        let guess = begin.after_s(day * DAY_S);
        YearMoment { event, instant: zero(ahead, guess.after_s(-5.0 * DAY_S), guess.after_s(5.0 * DAY_S)) }
    });
    moments.filter(|m| m.instant >= begin && m.instant < end).collect()
}

/// Sign changes of the distance's rate, looked for every eight days: the rate swings within 27 days by the Moon's pull,
/// but by less than its yearly course, so that it has no pair of zeros closer than that.
fn apsides(begin: Instant, end: Instant) -> Vec<YearMoment> {
    let rate = |t: Instant| model::distance_and_rate(time::tt_days(t)).1;
    let step = 8.0 * DAY_S;
    let mut found = Vec::new();
    let mut from = begin;
    while from < end {
        let to = if from.after_s(step) < end { from.after_s(step) } else { end };
        if rate(from) < 0.0 && rate(to) >= 0.0 {
            found.push(YearMoment { event: YearEvent::Perihelion, instant: zero(rate, from, to) });
        } else if rate(from) > 0.0 && rate(to) <= 0.0 {
            found.push(YearMoment { event: YearEvent::Aphelion, instant: zero(rate, from, to) });
        }
        from = to;
    }
    found
}

/// A zero between two instants of opposite sign, to a hundredth of a second: the Illinois form of false position
/// (Dowell and Jarratt 1971, BIT 11:168).
fn zero(f: impl Fn(Instant) -> f64, from: Instant, to: Instant) -> Instant {
    let (mut a, mut b) = (0.0, to.since_s(from));
    let (mut f_a, mut f_b) = (f(from), f(to));
    for _ in 0..60 {
        if (b - a).abs() < 0.01 || f_b == 0.0 {
            break;
        }
        let c = b - f_b * (b - a) / (f_b - f_a);
        let f_c = f(from.after_s(c));
        if f_c * f_b < 0.0 {
            (a, f_a) = (b, f_b);
        } else {
            f_a /= 2.0;
        }
        (b, f_b) = (c, f_c);
    }
    from.after_s(b)
}

/// The Sun's geocentric distance in au at an instant, geometric (no light time).
pub(super) fn distance_au(instant: Instant) -> f64 {
    model::distance_and_rate(time::tt_days(instant)).0
}

impl YearMoment {
    /// The Sun's geocentric distance in astronomical units then.
    pub fn distance_au(&self) -> f64 {
        distance_au(self.instant)
    }
}

#[cfg(test)]
mod tests {
    use super::{YearEvent, year_moments};

    #[test]
    fn a_year_has_four_seasons_in_order() {
        let moments = year_moments(2026);
        let dates: Vec<String> = moments.iter().map(|m| m.instant.utc().to_rfc3339()).collect();
        assert_eq!(moments.len(), 6, "{dates:?}");
        assert_eq!(moments[0].event, YearEvent::Perihelion);
        // Astronomical Almanac for 2026 (from memory): 3 Jan, 20 Mar 14:46, 21 Jun 08:24, 6 Jul, 23 Sep 00:05, 21 Dec 20:50
        for (date, begins) in dates.iter().zip([
            "2026-01-03T17",
            "2026-03-20T14:4",
            "2026-06-21T08:2",
            "2026-07-06T1",
            "2026-09-23T00:0",
            "2026-12-21T20:",
        ]) {
            assert!(date.starts_with(begins), "{date} is not {begins}");
        }
    }
}
