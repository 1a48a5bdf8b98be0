//! The flight deck's share of a brief: what it sees of the Sun, and how far that can be trusted.

use crate::light::{
    Deck, Doubt, Limit, Lookout, REFRACTION_SCATTER, Sample, Trace, Trust, deck, doubts, elevation_scatter,
    trust,
};
use crate::path::Path;
use crate::sky::{Horizon, Sky};
use crate::units::{Angle, Metres};

/// What the flight deck sees, with the Sun at each crossing and how far each can be trusted.
#[derive(Debug, Clone)]
pub struct DeckView {
    /// Visible or not, and when.
    pub deck: Deck,
    /// The Sun at each crossing, in the crossings' order.
    pub at_crossings: Vec<Sample>,
    /// How far each crossing can be trusted, in their order.
    pub trusts: Vec<Trust>,
    /// Turns of the Sun so near to the limit that refraction could add or take away a pair.
    pub doubts: Vec<Doubt>,
}

/// Looks from the deck, at the height flown, over the sea or a horizon of the planner's own.
pub(super) fn view(
    trace: &Trace,
    (path, sky): (&Path, &Sky),
    lookout: &Lookout<'_>,
    flown: Flown,
) -> DeckView {
    let horizon =
        flown.horizon.and_then(|height| Horizon::raised(height).ok()).unwrap_or_else(Horizon::clear_sea);
    let deck = deck(trace, path, sky, (&horizon, flown.height));
    let scatter = scatter(&deck);
    let at_crossings: Vec<Sample> = deck.crossings.iter().map(|c| lookout.at(c.at_s)).collect();
    let trusts = deck.crossings.iter().zip(&at_crossings).map(|(crossing, sample)| {
        trust(trace, crossing, deck.limit.0, elevation_scatter(sample, scatter, flown.ut1_known))
    });
    DeckView {
        trusts: trusts.collect(),
        doubts: doubts(trace, (Limit::Horizon, deck.limit.0), scatter),
        at_crossings,
        deck,
    }
}

/// Heights as they were given, and whether UT1 was.
#[derive(Debug, Clone, Copy)]
pub(super) struct Flown {
    pub(super) height: Metres,
    pub(super) horizon: Option<Metres>,
    pub(super) ut1_known: bool,
}

/// Refraction's scatter on the ray that grazes the deck's horizon: that at sea level, grown with the bending itself.
/// The growth is this tool's assumption: no published scatter for a flight deck was found.
fn scatter(deck: &Deck) -> Angle {
    let at_sea_level = Horizon::clear_sea().refraction(Metres(0.0));
    Angle::from_rad(REFRACTION_SCATTER.rad() * (deck.refraction.rad() / at_sea_level.rad()).max(1.0))
}
