//! What a map shows of a brief besides its track: the points at which something happens, in order of time.
//!
//! Knows no format: `GeoJSON` and KML render the same marks.

use super::record::rounded;
use crate::Brief;
use crate::label::one_line;
use crate::label::words::{
    circle_key, circle_name, direction_key, event_key, heading_key, limit_key, spoken,
};
use crate::light::{Crossing, Touch, Trust};
use crate::units::Metres;
use serde::Serialize;

/// How far a drawn track may be from the geodesic.
pub(super) const TOLERANCE: Metres = Metres(100.0);

/// A point of the track with what happens there.
pub(super) struct Mark {
    pub(super) at_s: f64,
    /// For people; may hold words from outside, on one line.
    pub(super) title: String,
    pub(super) tells: Tells,
}

/// What a mark tells to machines; what does not apply is left out.
#[derive(Debug, Clone, Default, Serialize)]
pub(super) struct Tells {
    pub(super) kind: &'static str,
    #[serde(skip_serializing_if = "Option::is_none")]
    event: Option<&'static str>,
    #[serde(skip_serializing_if = "Option::is_none")]
    limit: Option<&'static str>,
    #[serde(skip_serializing_if = "Option::is_none")]
    direction: Option<&'static str>,
    #[serde(skip_serializing_if = "Option::is_none")]
    circle: Option<&'static str>,
    #[serde(skip_serializing_if = "Option::is_none")]
    place: Option<String>,
    #[serde(skip_serializing_if = "Option::is_none")]
    margin_deg: Option<f64>,
    #[serde(skip_serializing_if = "Option::is_none")]
    uncertainty_s: Option<f64>,
    #[serde(skip_serializing_if = "Option::is_none")]
    doubtful: Option<bool>,
}

/// Take-off, waypoints, crossings, touches, circles and landing.
pub(super) fn marks(brief: &Brief) -> Vec<Mark> {
    let flight = &brief.flight;
    let labels = flight.waypoints.iter().map(|waypoint| waypoint.label.as_str());
    let waypoints = labels.zip(brief.path.waypoints_s());
    let mut marks = vec![stop("takeoff", "Take-off", &flight.from.label, 0.0)];
    marks.extend(waypoints.map(|(label, &at_s)| stop("waypoint", "Waypoint", label, at_s)));
    marks.extend(beneath(brief));
    marks.extend(deck(brief));
    marks.extend(brief.circles.iter().map(circle));
    // a stable sort: what happens at one instant keeps this order
    marks.sort_by(|a, b| a.at_s.total_cmp(&b.at_s));
    marks.push(stop("landing", "Landing", &flight.to.label, brief.path.airborne_s));
    marks
}

fn stop(kind: &'static str, word: &str, label: &str, at_s: f64) -> Mark {
    let place = one_line(label);
    let title = format!("{word} {place}");
    Mark { at_s, title, tells: Tells { kind, place: Some(place), ..Tells::default() } }
}

fn beneath(brief: &Brief) -> impl Iterator<Item = Mark> {
    let crossings = brief.light.crossings.iter().zip(&brief.trusts);
    let touches = brief.light.touches.iter().map(|one| touch(("touch", ""), one));
    crossings.map(|(one, trust)| crossing(("crossing", ""), one, *trust)).chain(touches)
}

fn deck(brief: &Brief) -> Vec<Mark> {
    let Some(view) = &brief.deck else { return Vec::new() };
    let crossings = view.deck.crossings.iter().zip(&view.trusts);
    let touches = view.deck.touches.iter().map(|one| touch(("deck_touch", "deck: "), one));
    crossings.map(|(one, trust)| crossing(("deck_crossing", "deck: "), one, *trust)).chain(touches).collect()
}

fn crossing((kind, vantage): (&'static str, &str), crossing: &Crossing, trust: Trust) -> Mark {
    let event = event_key(crossing.limit.event(crossing.direction));
    Mark {
        at_s: crossing.at_s,
        title: format!("{vantage}{}", spoken(event)),
        tells: Tells {
            kind,
            event: Some(event),
            limit: Some(limit_key(crossing.limit)),
            direction: Some(direction_key(crossing.direction)),
            uncertainty_s: Some(rounded(trust.uncertainty_s, 1)),
            doubtful: Some(trust.doubtful),
            ..Tells::default()
        },
    }
}

fn touch((kind, vantage): (&'static str, &str), touch: &Touch) -> Mark {
    let limit = limit_key(touch.limit);
    Mark {
        at_s: touch.at_s,
        title: format!("{vantage}touches the {limit} limit"),
        tells: Tells {
            kind,
            limit: Some(limit),
            margin_deg: Some(rounded(touch.margin.deg(), 7)),
            ..Tells::default()
        },
    }
}

fn circle(crossing: &crate::path::CircleCrossing) -> Mark {
    let name = crossing.circle.name;
    Mark {
        at_s: crossing.at_s,
        title: format!("{}, {}", circle_name(name), heading_key(crossing.heading)),
        tells: Tells {
            kind: "circle",
            circle: Some(circle_key(name)),
            direction: Some(heading_key(crossing.heading)),
            ..Tells::default()
        },
    }
}
