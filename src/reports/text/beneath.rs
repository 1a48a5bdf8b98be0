//! The light beneath: states, crossings, and what cannot be decided.

use super::format::{bearing, from_track, place};
use super::head::Clocks;
use super::{WIDTH, at};
use crate::Brief;
use crate::label::clock::{duration, local_minute, second};
use crate::label::words::{event_key, limit_key, spoken, state_key};
use crate::light::{Crossing, Doubt, Sample, State, Touch, Trust};
use crate::reports::table::{columns, wrapped};

/// The states in order, and the sums.
pub(super) fn segments(brief: &Brief) -> String {
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

pub(super) fn crossings(brief: &Brief) -> String {
    let all = (&brief.light.crossings[..], &brief.at_crossings[..], &brief.trusts[..]);
    if all.0.is_empty() {
        return format!(
            "Crossings\n  none: the Sun meets no limit on this flight\n{}",
            doubts(brief, &brief.doubts)
        );
    }
    let name = |crossing: &Crossing| spoken(event_key(crossing.limit.event(crossing.direction)));
    format!("Crossings\n{}{}", table(brief, all, name), doubts(brief, &brief.doubts))
}

/// A row for each crossing: clocks, event, trust, place and the Sun's bearing.
pub(super) fn table(
    brief: &Brief,
    (crossings, samples, trusts): (&[Crossing], &[Sample], &[Trust]),
    name: impl Fn(&Crossing) -> String,
) -> String {
    let clocks = Clocks::of(&brief.flight);
    let tail = ["event", "give or take", "place beneath", "Sun's bearing"].map(str::to_string);
    let mut rows = vec![clocks.row("UTC".into(), |label, _| label.to_string(), &tail)];
    for ((crossing, sample), trust) in crossings.iter().zip(samples).zip(trusts) {
        let when = at(brief, crossing.at_s);
        let tail = [
            name(crossing),
            give_or_take(trust),
            place(sample.position.place),
            format!("{} true, {}", bearing(sample.azimuth.deg()), from_track(sample.relative_bearing.deg())),
        ];
        rows.push(clocks.row(second(when), |_, zone| local_minute(when, zone), &tail));
    }
    columns(&rows)
}

/// One standard deviation, in seconds or minutes, and whether the event is certain at all.
fn give_or_take(trust: &Trust) -> String {
    let time = match trust.uncertainty_s {
        s if s < 99.5 => format!("{:.0} s", s.max(1.0)),
        s => format!("{:.0} min", s / 60.0),
    };
    if trust.doubtful { format!("{time}, doubtful") } else { time }
}

/// Turns of the Sun at which refraction could add or take away a pair of crossings.
pub(super) fn doubts(brief: &Brief, all: &[Doubt]) -> String {
    let line = |doubt: &Doubt| {
        let (turn, side) = (
            if doubt.top { "highest" } else { "lowest" },
            if doubt.margin.deg() < 0.0 { "below" } else { "above" },
        );
        let sentence = format!(
            "doubtful: at {} the Sun is {turn} only {:.2}° {side} the limit; refraction scatters by as much and could add or \
             take away a pair of crossings",
            second(at(brief, doubt.at_s)),
            doubt.margin.deg().abs(),
        );
        wrapped("  ", &sentence, WIDTH)
    };
    all.iter().map(line).collect()
}

pub(super) fn touches(brief: &Brief) -> String {
    let pairs = brief.light.touches.iter().zip(&brief.at_touches);
    let line = |(touch, sample): (&Touch, &Sample)| {
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
