//! What the flight deck sees of the Sun.

use super::beneath::{doubts, table};
use super::{WIDTH, at};
use crate::Brief;
use crate::label::clock::{duration, second};
use crate::light::{Crossing, Direction};
use crate::reports::table::{columns, wrapped};

/// When the Sun shows above the horizon that the deck sees; nothing where no level is known.
pub(super) fn deck(brief: &Brief) -> String {
    let Some(view) = &brief.deck else { return String::new() };
    let deck = &view.deck;
    let over =
        if deck.horizon.0 == 0.0 { "the sea".to_string() } else { format!("{:.0} ft", deck.horizon.feet()) };
    let head = format!(
        "From the flight deck at {:.0} ft, horizon {over}: {:.2}° below level (dip {:.2}°, refraction {:.2}°, and the \
         semidiameter for the centre)",
        deck.height.feet(),
        -deck.limit.0.deg(),
        deck.dip.deg(),
        deck.refraction.deg(),
    );
    let name = |crossing: &Crossing| {
        if crossing.direction == Direction::Rising { "deck sunrise" } else { "deck sunset" }.to_string()
    };
    let all = (&deck.crossings[..], &view.at_crossings[..], &view.trusts[..]);
    let crossings = if all.0.is_empty() { String::new() } else { table(brief, all, name) };
    format!("{}{}{crossings}{}", wrapped("", &head, WIDTH), spans(brief), doubts(brief, &view.doubts))
}

/// When the Sun shows and when it does not.
fn spans(brief: &Brief) -> String {
    let segments = brief.deck.iter().flat_map(|view| &view.deck.segments);
    let row = |s: &crate::light::DeckSegment| {
        [
            second(at(brief, s.begin_s)),
            second(at(brief, s.end_s)),
            duration(s.end_s - s.begin_s),
            if s.sun_visible { "Sun visible" } else { "Sun below the horizon" }.to_string(),
        ]
    };
    columns(&segments.map(row).collect::<Vec<_>>())
}
