//! What a flight was recorded as, and what was mended of it.

use crate::intake::{Recorded, Repair};
use crate::label::clock::machine;
use serde::Serialize;

#[derive(Debug, Serialize)]
pub(super) struct RecordingRecord {
    points: usize,
    has_heights: bool,
    repairs: Vec<String>,
    bridged: Vec<BridgeRecord>,
}

#[derive(Debug, Serialize)]
struct BridgeRecord {
    from_utc: String,
    to_utc: String,
    seconds: f64,
}

impl RecordingRecord {
    pub(super) fn of(recorded: &Recorded) -> Self {
        let repairs = recorded.repairs.0.iter().filter(|repair| !matches!(repair, Repair::Bridged(_)));
        let bridge = |bridge: crate::intake::Bridge| BridgeRecord {
            from_utc: machine(bridge.from),
            to_utc: machine(bridge.to),
            seconds: super::rounded(bridge.to.since_s(bridge.from), 3),
        };
        Self {
            points: recorded.points,
            has_heights: recorded.heights.is_some(),
            repairs: repairs.map(ToString::to_string).collect(),
            bridged: recorded.repairs.bridges().map(bridge).collect(),
        }
    }
}
