//! What happens on the curve: crossings, touches, the highest and the lowest Sun.
//!
//! Knows nothing of the sheet.

use super::frame::{Seen, degrees};
use crate::Brief;
use crate::charts::canvas::Marker;
use crate::label::clock::second;
use crate::label::words::{event_key, limit_elevation, spoken};
use crate::light::{Direction, Sample};

/// A point of the curve with its name and time.
#[derive(Debug, Clone)]
pub(super) struct Event {
    pub(super) seen: Seen,
    pub(super) name: String,
    pub(super) time: String,
    pub(super) marker: Marker,
    /// Whether it is numbered where the names have no room; the highest and the lowest Sun keep their names.
    pub(super) is_numbered: bool,
}

/// All events, in order of time.
pub(super) fn events(brief: &Brief) -> Vec<Event> {
    let event = |sample: &Sample, name: String, marker: Marker| Event {
        seen: Seen { at_s: sample.at_s, deg: sample.elevation.0.deg() },
        name,
        time: format!("{} UTC", second(brief.path.takeoff.after_s(sample.at_s))),
        marker,
        is_numbered: true,
    };
    let crossings = brief.light.crossings.iter().zip(&brief.at_crossings).map(|(crossing, sample)| {
        let marker = match crossing.direction {
            Direction::Rising => Marker::TriangleUp,
            Direction::Setting => Marker::TriangleDown,
        };
        event(sample, spoken(event_key(crossing.limit.event(crossing.direction))), marker)
    });
    let touches = brief.light.touches.iter().zip(&brief.at_touches);
    let touches = touches.map(|(touch, sample)| {
        event(sample, format!("touches {}", limit_elevation(touch.limit)), Marker::Circle)
    });
    let between_deg = brief.at_highest.elevation.0.deg() - brief.at_lowest.elevation.0.deg();
    // as many as tell the two apart
    let decimals = if between_deg < 0.2 { 3 } else { 1 + usize::from(between_deg < 2.0) };
    let peaks = [("highest", &brief.at_highest), ("lowest", &brief.at_lowest)].map(|(what, sample)| Event {
        is_numbered: false,
        ..event(sample, format!("{what} {}", degrees(sample.elevation.0.deg(), decimals)), Marker::Diamond)
    });
    let deck = brief.deck.iter().flat_map(|view| view.deck.crossings.iter().zip(&view.at_crossings));
    let deck = deck.map(|(crossing, sample)| {
        let name = if crossing.direction == Direction::Rising { "deck sunrise" } else { "deck sunset" };
        event(sample, name.to_string(), Marker::Circle)
    });
    let mut events: Vec<Event> = crossings.chain(touches).chain(deck).chain(peaks).collect();
    events.sort_by(|a, b| a.seen.at_s.total_cmp(&b.seen.at_s));
    events
}
