//! The flight deck's share of a brief: what it sees of the Sun, and how far that can be trusted.

use crate::intake::Flight;
use crate::light::{
    Deck, DeckHorizon, Doubt, Limit, Lookout, REFRACTION_SCATTER, Sample, Trace, Trust, deck, doubts,
    elevation_scatter, trust,
};
use crate::path::Path;
use crate::sky::{GeometricElevation, Horizon, Sky};
use crate::units::{Angle, Metres};

/// With more bends than this the limit is given by the minute alone.
const MOST_BENDS: usize = 200;

/// What the flight deck sees, with the Sun at each crossing and how far each can be trusted.
#[derive(Debug, Clone)]
pub struct DeckView {
    /// Visible or not, and when.
    pub deck: Deck,
    /// The deck's horizon along the path.
    pub horizon: DeckHorizon,
    /// Its limit each minute from take-off, at landing, and wherever the climb changes, in order of time.
    pub limits: Vec<(f64, GeometricElevation)>,
    /// The Sun at each crossing, in the crossings' order.
    pub at_crossings: Vec<Sample>,
    /// How far each crossing can be trusted, in their order.
    pub trusts: Vec<Trust>,
    /// Turns of the Sun so near to the limit that refraction could add or take away a pair.
    pub doubts: Vec<Doubt>,
}

/// Looks from the deck, at the height flown, over the sea or a horizon of the planner's own; nothing without a level.
pub(super) fn view(
    flight: &Flight,
    trace: &Trace,
    (path, sky): (&Path, &Sky),
    lookout: &Lookout<'_>,
) -> Option<DeckView> {
    let heights = path.heights.clone()?;
    let sea = flight.horizon.and_then(|height| Horizon::raised(height).ok());
    let horizon = DeckHorizon::new(path, sky, sea.unwrap_or_else(Horizon::clear_sea), heights);
    let (trace, elevation) = horizon.trace(trace, path, sky);
    let deck = deck(&horizon, (&trace, elevation), path.airborne_s);
    let (scatter, ut1_known) = (scatter(&deck), flight.dut1.is_some());
    let at_crossings: Vec<Sample> = deck.crossings.iter().map(|c| lookout.at(c.at_s)).collect();
    let trusts = deck.crossings.iter().zip(&at_crossings).map(|(crossing, sample)| {
        trust(&trace, crossing, elevation, elevation_scatter(sample, scatter, ut1_known))
    });
    Some(DeckView {
        trusts: trusts.collect(),
        doubts: doubts(&trace, (Limit::Horizon, elevation), scatter),
        at_crossings,
        limits: limits(&horizon, path),
        horizon,
        deck,
    })
}

fn limits(horizon: &DeckHorizon, path: &Path) -> Vec<(f64, GeometricElevation)> {
    let minutes = (0..=(path.airborne_s / super::STEP_S) as u32).map(|i| f64::from(i) * super::STEP_S);
    // a recording bends at every point: its minutes are enough to draw
    let bends = path.heights.iter().flat_map(crate::path::Heights::bends_s).take(MOST_BENDS + 1);
    let bends: Vec<f64> = bends.collect();
    let few = if bends.len() > MOST_BENDS { &[][..] } else { &bends[..] };
    let mut times: Vec<f64> =
        minutes.chain(few.iter().copied()).chain(std::iter::once(path.airborne_s)).collect();
    times.sort_by(f64::total_cmp);
    times.dedup();
    times.into_iter().map(|at_s| (at_s, horizon.limit_at(at_s))).collect()
}

/// Refraction's scatter on the ray that grazes the deck's horizon: that at sea level, grown with the bending itself.
/// The growth is this tool's assumption: no published scatter for a flight deck was found.
fn scatter(deck: &Deck) -> Angle {
    let at_sea_level = Horizon::clear_sea().refraction(Metres(0.0));
    Angle::from_rad(REFRACTION_SCATTER.rad() * (deck.refraction.rad() / at_sea_level.rad()).max(1.0))
}
