//! When a low Sun stands ahead of the flight deck.

use super::{Brief, DeckView};
use crate::intake::LowSunLimits;
use crate::light::{AheadSpan, Light, Sector, State, Trace, Watch, ahead};
use crate::path::Path;
use crate::sky::{ApparentElevation, Sky};

impl Brief {
    /// Seconds in which a low Sun stands ahead, and in which it is strong.
    pub fn low_sun_seconds(&self) -> (f64, f64) {
        let all = self.low_sun.iter().map(|span| span.end.at_s - span.begin.at_s).sum();
        let strong = self.low_sun.iter().flat_map(|span| &span.strong).map(|(begin, end)| end - begin).sum();
        (all, strong)
    }
}

/// Looks ahead from the deck where the flight's level is known, else from sea level beneath.
pub(super) fn spans(
    trace: &Trace,
    (path, sky): (&Path, &Sky),
    (light, deck): (&Light, Option<&DeckView>),
    limits: LowSunLimits,
) -> Vec<AheadSpan> {
    let visible: Vec<(f64, f64)> = if let Some(view) = deck {
        let shown = view.deck.segments.iter().filter(|segment| segment.sun_visible);
        shown.map(|segment| (segment.begin_s, segment.end_s)).collect()
    } else {
        let shown = light.segments.iter().filter(|segment| segment.state == State::Daylight);
        shown.map(|segment| (segment.begin_s, segment.end_s)).collect()
    };
    let sector =
        Sector { half_width: limits.sector, strong: limits.strong, up_to: ApparentElevation(limits.up_to) };
    ahead(trace, path, sky, &Watch { visible: &visible, sector })
}
