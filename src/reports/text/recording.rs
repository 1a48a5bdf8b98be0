//! What a flight was recorded as, and what was mended of it.

use super::WIDTH;
use crate::Brief;
use crate::reports::table::wrapped;

/// More lines than this are counted and not shown: JSON has them all.
const MOST: usize = 20;

/// The recording's points and repairs; nothing for a flight that was planned.
pub(super) fn recording(brief: &Brief) -> String {
    let Some(recorded) = &brief.flight.recorded else { return String::new() };
    let heights =
        if recorded.heights.is_some() { "" } else { ", without heights: nothing is said of the flight deck" };
    let all = &recorded.repairs.0;
    let lines: String =
        all.iter().take(MOST).map(|repair| wrapped("  - ", &repair.to_string(), WIDTH)).collect();
    let more = all.len().saturating_sub(MOST);
    let more = if more == 0 { String::new() } else { format!("  - and {more} more\n") };
    format!("Recording\n  {} points used{heights}\n{lines}{more}", recorded.points)
}
