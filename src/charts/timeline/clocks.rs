//! The time axes: UTC and the local clocks of both ends, each with its own round hours and its own dates.
//!
//! Knows nothing of the Sun.

use super::frame::Frame;
use super::layout::{MARGIN, PLOT_LEFT, PLOT_RIGHT};
use super::style::{INK, MUTED, RULE, SMALL, TEXT, fitted, letters};
use crate::Brief;
use crate::charts::canvas::{Across, Canvas, Level, Point, Stroke, TextStyle};
use crate::label::clock::{date, day_in, minute_in, minute_of_day, offset};
use crate::units::Instant;
use chrono_tz::Tz;

/// Minutes from tick to tick, of which the finest with room is taken. All divide the day, so midnight has a tick.
const STEPS_MIN: [u32; 11] = [1, 2, 5, 10, 15, 30, 60, 120, 180, 240, 360];
/// From tick to tick at least.
const TICK_ROOM: f64 = 62.0;
/// Since 1973 every zone's offset, and every change of one, falls on a quarter of an hour.
const QUARTER_MIN: u32 = 15;

/// A tick of a clock.
#[derive(Debug, Clone, PartialEq)]
struct Tick {
    at_s: f64,
    minute: String,
    /// The date, where it is another than at the tick before.
    day: Option<String>,
}

/// A clock along the flight.
#[derive(Debug, Clone)]
pub(super) struct Clock {
    name: String,
    note: String,
    ticks: Vec<Tick>,
    /// When its offset changes, seconds from take-off.
    changes_s: Vec<f64>,
}

impl Clock {
    /// The clocks of a flight: UTC, then those whose zones are known; two that show the same share an axis.
    pub(super) fn of(brief: &Brief) -> Vec<Self> {
        let ends = [&brief.flight.from, &brief.flight.to];
        let known = ends.into_iter().filter_map(|stop| Some((&stop.label, stop.zone?)));
        let mut local: Vec<Self> = known.map(|(label, zone)| Self::new(brief, label.clone(), zone)).collect();
        if let [from, to] = &local[..]
            && (&from.note, &from.ticks, &from.changes_s) == (&to.note, &to.ticks, &to.changes_s)
        {
            if from.name != to.name {
                local[0].name = format!("{}, {}", from.name, to.name);
            }
            local.pop();
        }
        local.insert(0, Self::new(brief, "UTC".to_string(), Tz::UTC));
        local
    }

    fn new(brief: &Brief, name: String, zone: Tz) -> Self {
        let (takeoff, airborne_s) = (brief.path.takeoff, brief.path.airborne_s);
        let changes_s = changes(takeoff, airborne_s, zone);
        let note = if zone == Tz::UTC {
            date(takeoff)
        } else {
            let later = changes_s.iter().map(|&s| offset(takeoff.after_s(s), zone));
            let offsets: Vec<String> = std::iter::once(offset(takeoff, zone)).chain(later).collect();
            let offsets = offsets.join("/").replace("/UTC", "/");
            format!("{offsets} · {}", day_in(takeoff, zone))
        };
        Self { name, note, ticks: ticks(takeoff, airborne_s, zone), changes_s }
    }

    /// The axis with its ticks beneath `top`, and the clock's name at its left.
    pub(super) fn draw(&self, canvas: &mut Canvas, top: f64, frame: &Frame) {
        let (left, right) = (frame.plot.left, frame.plot.right);
        canvas.line(&[Point::new(left, top + 2.0), Point::new(right, top + 2.0)], Stroke::new(INK, 1.0));
        let name = letters(TEXT).bold();
        // a tick at the very left reaches so far out
        let room = left - MARGIN - 26.0;
        canvas.text(&fitted(&self.name, &name, room), Point::new(MARGIN, top + 15.0), &name);
        let note = TextStyle { ink: MUTED, ..letters(SMALL) };
        canvas.text(&fitted(&self.note, &note, room), Point::new(MARGIN, top + 33.0), &note);
        for tick in &self.ticks {
            tick.draw(canvas, top + 2.0, frame.x(tick.at_s));
        }
        for &at_s in &self.changes_s {
            let x = frame.x(at_s);
            canvas.line(&[Point::new(x, top - 3.0), Point::new(x, top + 9.0)], Stroke::new(INK, 3.0));
        }
    }
}

impl Tick {
    fn draw(&self, canvas: &mut Canvas, y: f64, x: f64) {
        let length = if self.day.is_some() { 8.0 } else { 5.0 };
        canvas.line(&[Point::new(x, y), Point::new(x, y + length)], Stroke::new(INK, 1.0));
        // the first and the last tick may stand at the very edge, where there is room beside the plot
        let style = letters(TEXT).anchored(Across::Middle, Level::Baseline);
        let style = if self.day.is_some() { style.bold() } else { style };
        canvas.text(&self.minute, Point::new(x, y + 19.0), &style);
        if let Some(day) = &self.day {
            canvas.text(day, Point::new(x, y + 34.0), &TextStyle { size: SMALL, ..style });
        }
    }
}

/// Faint upright lines at the ticks of the first clock.
pub(super) fn draw_grid(canvas: &mut Canvas, clocks: &[Clock], frame: &Frame) {
    for tick in clocks.first().iter().flat_map(|clock| &clock.ticks) {
        let x = frame.x(tick.at_s);
        let ends = [Point::new(x, frame.plot.top), Point::new(x, frame.plot.bottom)];
        canvas.line(&ends, Stroke::new(RULE.with_alpha(0.28), 1.0));
    }
}

/// The instants of a flight that lie on whole multiples of some minutes of UTC, as seconds from take-off.
fn whole(takeoff: Instant, airborne_s: f64, minutes: u32) -> impl Iterator<Item = f64> {
    let step_s = f64::from(minutes) * 60.0;
    let first = (takeoff.seconds() / step_s).ceil() * step_s;
    let count = ((takeoff.seconds() + airborne_s - first) / step_s).floor() as i64;
    (0..=count).map(move |i| first - takeoff.seconds() + i as f64 * step_s)
}

/// A zone's round times during a flight.
fn ticks(takeoff: Instant, airborne_s: f64, zone: Tz) -> Vec<Tick> {
    let px_per_min = (PLOT_RIGHT - PLOT_LEFT) / (airborne_s / 60.0);
    let step = STEPS_MIN.into_iter().find(|&s| f64::from(s) * px_per_min >= TICK_ROOM).unwrap_or(360);
    let mut last_day = day_in(takeoff, zone);
    let round = whole(takeoff, airborne_s, step.min(QUARTER_MIN))
        .filter(|&at_s| minute_of_day(takeoff.after_s(at_s), zone).is_multiple_of(step));
    let tick = |at_s: f64| {
        let at = takeoff.after_s(at_s);
        let day = day_in(at, zone);
        let is_new = day != last_day;
        last_day.clone_from(&day);
        Tick { at_s, minute: minute_in(at, zone), day: is_new.then_some(day) }
    };
    round.map(tick).collect()
}

/// When a zone's offset changes during a flight.
fn changes(takeoff: Instant, airborne_s: f64, zone: Tz) -> Vec<f64> {
    let mut last = offset(takeoff, zone);
    let differs = |at_s: &f64| {
        let now = offset(takeoff.after_s(*at_s), zone);
        let differs = now != last;
        last = now;
        differs
    };
    whole(takeoff, airborne_s, QUARTER_MIN).filter(differs).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn at(text: &str) -> Instant {
        Instant::from_utc(text.parse().unwrap())
    }

    fn minutes(ticks: &[Tick]) -> Vec<&str> {
        ticks.iter().map(|t| t.minute.as_str()).collect()
    }

    #[test]
    fn the_hour_that_a_clock_skips_has_no_tick() {
        // New York, 8 March 2026: 02:00 becomes 03:00 at 07:00 UTC
        let (takeoff, airborne_s) = (at("2026-03-08T04:30:00Z"), 12.0 * 3600.0);
        let ticks = ticks(takeoff, airborne_s, chrono_tz::America::New_York);
        assert_eq!(minutes(&ticks)[..5], ["00:00", "01:00", "03:00", "04:00", "05:00"]);
        assert!(ticks.windows(2).all(|w| w[1].at_s - w[0].at_s == 3600.0), "{ticks:?}");
        assert_eq!(ticks[0].day.as_deref(), Some("8 Mar"));
        assert_eq!(changes(takeoff, airborne_s, chrono_tz::America::New_York), [2.5 * 3600.0]);
    }

    #[test]
    fn a_zone_of_odd_quarters_has_its_own_round_hours() {
        let ticks = ticks(at("2026-12-18T16:00:00Z"), 12.0 * 3600.0, chrono_tz::Asia::Kathmandu);
        assert_eq!(minutes(&ticks)[..3], ["22:00", "23:00", "00:00"]);
        let days: Vec<f64> = ticks.iter().filter(|t| t.day.is_some()).map(|t| t.at_s).collect();
        assert_eq!(days, [2.25 * 3600.0]);
    }

    #[test]
    fn ticks_never_crowd_whatever_the_flight_lasts() {
        for minutes in [1.0, 7.0, 25.0, 90.0, 600.0, 1150.0, 2160.0] {
            let airborne_s = minutes * 60.0;
            let ticks = ticks(at("2026-12-18T05:10:10Z"), airborne_s, Tz::UTC);
            assert!((1..=20).contains(&ticks.len()), "{minutes}: {}", ticks.len());
            assert!(ticks.iter().all(|t| (0.0..=airborne_s).contains(&t.at_s)));
        }
    }
}
