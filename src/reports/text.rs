//! A brief that a crew reads in half a minute.

use super::table::{columns, wrapped};
use crate::Brief;
use crate::intake::{Flight, Stop};
use crate::label::clock::{
    date, day_and_second, duration, local_day_and_minute, local_minute, offsets, second,
};
use crate::label::one_line;
use crate::label::words::{circle_name, event_key, heading_key, limit_key, spoken, state_key};
use crate::light::{Sample, State};
use crate::units::{Instant, Metres, Place};
use chrono_tz::Tz;

/// How wide a paragraph is set.
const WIDTH: usize = 96;

/// The brief as plain text.
pub fn text(brief: &Brief) -> String {
    let parts = [
        headline(brief),
        ends(brief),
        segments(brief),
        crossings(brief),
        touches(brief),
        extremes(brief),
        circles(brief),
        cautions(brief),
    ];
    parts.into_iter().filter(|part| !part.is_empty()).collect::<Vec<_>>().join("\n")
}

fn headline(brief: &Brief) -> String {
    let flight = &brief.flight;
    let length = Metres(brief.path.distance_m());
    let level = flight.level.map_or(String::new(), |level| format!(", cruise {:.0} ft", level.feet()));
    format!(
        "{}   {} → {}   {}\n{}{:.0} km ({:.0} NM) in {}{level}\n",
        one_line(&flight.name),
        stop_name(&flight.from),
        stop_name(&flight.to),
        date(flight.takeoff),
        long_names(flight),
        length.0 / 1000.0,
        length.nautical_miles(),
        duration(brief.path.airborne_s),
    )
}

/// A stop's code, or its position where it was given by coordinates.
fn stop_name(stop: &Stop) -> String {
    if stop.name.is_some() { stop.label.clone() } else { place(stop.place) }
}

/// The aerodromes' names on a line of their own, where they have any.
fn long_names(flight: &Flight) -> String {
    let names: Vec<&str> =
        [&flight.from, &flight.to].iter().filter_map(|stop| stop.name.as_deref()).collect();
    if names.is_empty() { String::new() } else { format!("{}\n", names.join(" to ")) }
}

/// The local clocks that times are given on besides UTC: each end's, once.
struct Clocks(Vec<(String, Tz)>);

impl Clocks {
    fn of(flight: &Flight) -> Self {
        let mut clocks: Vec<(String, Tz)> = Vec::new();
        for stop in [&flight.from, &flight.to] {
            match (stop.zone, clocks.last_mut()) {
                (Some(zone), Some((label, other))) if zone == *other => {
                    *label = format!("{label}, {}", stop.label)
                }
                (Some(zone), _) => clocks.push((stop.label.clone(), zone)),
                (None, _) => {}
            }
        }
        Self(clocks)
    }

    /// A row of cells with the clocks' own after the first.
    fn row(&self, first: String, clock: impl Fn(&str, Tz) -> String, rest: &[String]) -> Vec<String> {
        let own = self.0.iter().map(|(label, zone)| clock(label, *zone));
        std::iter::once(first).chain(own).chain(rest.iter().cloned()).collect()
    }
}

/// Take-off and landing on every clock, with the Sun there.
fn ends(brief: &Brief) -> String {
    let flight = &brief.flight;
    let clocks = Clocks::of(flight);
    let head = |label: &str, zone| format!("{label} ({})", offsets(flight.takeoff, flight.landing, zone));
    let mut rows = vec![clocks.row(
        "          UTC".into(),
        head,
        &["Sun's elevation, bearing".into(), "light beneath".into()],
    )];
    for (what, at, sample, state) in [
        ("Take-off", flight.takeoff, brief.at_takeoff(), brief.light.at_takeoff),
        ("Landing ", flight.landing, brief.at_landing(), brief.light.at_landing),
    ] {
        let first = format!("{what}  {}", day_and_second(at));
        rows.push(clocks.row(
            first,
            |_, zone| local_day_and_minute(at, zone),
            &[sun(sample), spoken(state_key(state))],
        ));
    }
    columns(&rows)
}

fn sun(sample: &Sample) -> String {
    format!("{} at {}", elevation(sample), bearing(sample.azimuth.deg()))
}

fn elevation(sample: &Sample) -> String {
    signed(sample.elevation.0.deg(), 1)
}

/// A true bearing in whole degrees.
fn bearing(deg: f64) -> String {
    format!("{:03}°", (deg.round() as i64).rem_euclid(360))
}

/// Degrees with a real minus sign, and a plus where positive.
fn signed(deg: f64, decimals: usize) -> String {
    let text = format!("{:.decimals$}", deg.abs());
    let zero = text.bytes().all(|b| b == b'0' || b == b'.');
    match deg {
        _ if zero => format!("{text}°"),
        d if d < 0.0 => format!("−{text}°"),
        _ => format!("+{text}°"),
    }
}

/// Degrees and minutes with hemisphere letters behind.
fn place(place: Place) -> String {
    let part = |deg: f64, width: usize, letters: [char; 2]| {
        let minutes = (deg.abs() * 60.0).round() as i64;
        let letter = letters[usize::from(deg < 0.0)];
        format!("{:0width$}°{:02}′{letter}", minutes / 60, minutes % 60)
    };
    format!("{} {}", part(place.lat.deg(), 2, ['N', 'S']), part(place.lon.deg(), 3, ['E', 'W']))
}

fn at(brief: &Brief, at_s: f64) -> Instant {
    brief.path.takeoff.after_s(at_s)
}

/// The states in order, and the sums.
fn segments(brief: &Brief) -> String {
    let clocks = Clocks::of(&brief.flight);
    let tail = ["until UTC", "lasts", "light beneath"].map(str::to_string);
    let mut rows = vec![clocks.row("from UTC".into(), |label, _| label.to_string(), &tail)];
    for segment in &brief.light.segments {
        let (begin, end) = (at(brief, segment.begin_s), at(brief, segment.end_s));
        let tail = [second(end), duration(segment.seconds()), spoken(state_key(segment.state))];
        rows.push(clocks.row(second(begin), |_, zone| local_minute(begin, zone), &tail));
    }
    let sums = State::ALL.into_iter().filter_map(|state| {
        let seconds = brief.light.seconds.in_state(state);
        (seconds > 0.0).then(|| format!("{} {}", spoken(state_key(state)), duration(seconds)))
    });
    format!("Light\n{}{}", columns(&rows), wrapped("  in all: ", &sums.collect::<Vec<_>>().join(", "), WIDTH))
}

fn crossings(brief: &Brief) -> String {
    if brief.light.crossings.is_empty() {
        return "Crossings\n  none: the Sun meets no limit on this flight\n".to_string();
    }
    let clocks = Clocks::of(&brief.flight);
    let tail = ["event", "place beneath", "Sun's bearing"].map(str::to_string);
    let mut rows = vec![clocks.row("UTC".into(), |label, _| label.to_string(), &tail)];
    for (crossing, sample) in brief.light.crossings.iter().zip(&brief.at_crossings) {
        let when = at(brief, crossing.at_s);
        let tail = [
            spoken(event_key(crossing.limit.event(crossing.direction))),
            place(sample.position.place),
            format!("{} true, {}", bearing(sample.azimuth.deg()), from_track(sample.relative_bearing.deg())),
        ];
        rows.push(clocks.row(second(when), |_, zone| local_minute(when, zone), &tail));
    }
    format!("Crossings\n{}", columns(&rows))
}

/// Where the Sun is against the track: `40° right of track`.
fn from_track(deg: f64) -> String {
    match deg.round() as i64 {
        0 => "ahead".to_string(),
        d @ 1..=179 => format!("{d}° right of track"),
        d if d.abs() == 180 => "behind".to_string(),
        d => format!("{}° left of track", -d),
    }
}

fn touches(brief: &Brief) -> String {
    let pairs = brief.light.touches.iter().zip(&brief.at_touches);
    let line = |(touch, sample): (&crate::light::Touch, &Sample)| {
        let side = if touch.margin.deg() < 0.0 { "below" } else { "above" };
        let sentence = format!(
            "the Sun touches the {} limit at {} near {}: its turning point is {:.2}″ {side} it, less than the computed \
             elevation may err, so neither a crossing nor its absence is certain",
            limit_key(touch.limit),
            second(at(brief, touch.at_s)),
            place(sample.position.place),
            touch.margin.arcsec().abs(),
        );
        wrapped("  ", &sentence, WIDTH)
    };
    let lines: String = pairs.map(line).collect();
    if lines.is_empty() { lines } else { format!("Touches\n{lines}") }
}

fn extremes(brief: &Brief) -> String {
    let row = |what: &str, sample: &Sample| {
        [what.to_string(), second(at(brief, sample.at_s)), place(sample.position.place), sun(sample)]
    };
    let point = |what: &str, passed: crate::path::Passed| {
        [what.to_string(), second(at(brief, passed.at_s)), place(passed.place), String::new()]
    };
    let rows = [
        row("highest Sun", &brief.at_highest),
        row("lowest Sun", &brief.at_lowest),
        point("northernmost", brief.northernmost),
        point("southernmost", brief.southernmost),
    ];
    format!("Extremes\n{}", columns(&rows))
}

fn circles(brief: &Brief) -> String {
    if brief.circles.is_empty() {
        return String::new();
    }
    let row = |crossing: &crate::path::CircleCrossing| {
        [
            second(at(brief, crossing.at_s)),
            circle_name(crossing.circle.name).to_string(),
            heading_key(crossing.heading).to_string(),
            place(crossing.place),
        ]
    };
    format!("Circles\n{}", columns(&brief.circles.iter().map(row).collect::<Vec<_>>()))
}

fn cautions(brief: &Brief) -> String {
    let lines: String =
        super::caution::cautions(brief).iter().map(|caution| wrapped("  - ", caution, WIDTH)).collect();
    format!("Cautions\n{lines}")
}
