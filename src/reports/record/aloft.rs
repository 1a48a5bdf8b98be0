//! What the flight deck sees, as a record in the shape of the one beneath.

use super::beneath::{
    CrossingRecord, DoubtRecord, PeakRecord, TouchRecord, crossings, doubts, peak, touches,
};
use super::{deg, rounded, when};
use crate::label::words::visibility_key;
use crate::{Brief, DeckView};
use serde::Serialize;

#[derive(Debug, Serialize)]
pub(super) struct AloftRecord {
    height_m: f64,
    horizon_m: f64,
    dip_deg: f64,
    refraction_deg: f64,
    limit_deg: f64,
    state_at_takeoff: &'static str,
    state_at_landing: &'static str,
    crossings: Vec<CrossingRecord>,
    touches: Vec<TouchRecord>,
    doubts: Vec<DoubtRecord>,
    segments: Vec<VisibleRecord>,
    seconds: VisibleSeconds,
    highest: PeakRecord,
    lowest: PeakRecord,
}

#[derive(Debug, Serialize)]
struct VisibleRecord {
    state: &'static str,
    begins_utc: String,
    ends_utc: String,
    seconds: f64,
}

#[derive(Debug, Serialize)]
struct VisibleSeconds {
    sun_visible: f64,
    sun_below_horizon: f64,
}

impl AloftRecord {
    pub(super) fn of(brief: &Brief, view: &DeckView) -> Self {
        let deck = &view.deck;
        let segment = |s: &crate::light::DeckSegment| VisibleRecord {
            state: visibility_key(s.sun_visible),
            begins_utc: when(brief, s.begin_s),
            ends_utc: when(brief, s.end_s),
            seconds: rounded(s.end_s - s.begin_s, 3),
        };
        Self {
            height_m: rounded(deck.height.0, 1),
            horizon_m: rounded(deck.horizon.0, 1),
            dip_deg: deg(deck.dip.deg()),
            refraction_deg: deg(deck.refraction.deg()),
            limit_deg: deg(deck.limit.0.deg()),
            state_at_takeoff: visibility_key(deck.sun_visible_at(0.0)),
            state_at_landing: visibility_key(deck.sun_visible_at(brief.path.airborne_s)),
            crossings: crossings(brief, (&deck.crossings, &view.at_crossings, &view.trusts)),
            touches: touches(brief, &deck.touches),
            doubts: doubts(brief, &view.doubts),
            segments: deck.segments.iter().map(segment).collect(),
            seconds: VisibleSeconds {
                sun_visible: rounded(deck.seconds(true), 3),
                sun_below_horizon: rounded(deck.seconds(false), 3),
            },
            highest: peak(brief, &brief.at_highest),
            lowest: peak(brief, &brief.at_lowest),
        }
    }
}
