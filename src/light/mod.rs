//! What light a path meets: every crossing of the horizon and the twilights' limits, and the states between.
//!
//! # The search's promise
//! The Sun's elevation along a leg is replaced by a polynomial that errs by less than 2e−9 of its sine (0.0004″; derived
//! in [`crate::curve`]), whose turning points are all found. Each excursion across a limit that is higher than that
//! error is found, however short, and none is invented. Where the Sun turns within [`TOUCH`] of a limit, which is what
//! the model itself may err by, the two times would mean nothing: the Sun is then said to touch the limit, with the
//! margin. Nothing is assumed about the order of events or their number: from an aircraft the Sun may rise in the west.

mod limit;
mod trace;
mod meet;
mod segment;
mod along;
mod sample;
mod deck;
mod trust;
mod moon;
mod exposure;
mod span;
mod ahead;
mod abeam;

pub use abeam::{Abeam, abeam};
pub use ahead::{AheadSpan, Sector, SunAhead, Watch, ahead};
pub use along::{Light, along, beneath};
pub use deck::{Deck, DeckHorizon, DeckSegment, deck};
pub use exposure::{Above, Exposure, LightMeter, LuxAt, USUAL_LEVELS, exposure};
pub use limit::{Direction, Event, Limit, State};
pub use meet::{Crossing, TOUCH, Touch};
pub use moon::{
    MOON_TOUCH, MoonCrossing, MoonLight, MoonLookout, MoonSample, MoonSegment, MoonTouch, Moonlit,
    moon_beneath,
};
pub use sample::{Lookout, Sample};
pub use segment::{Segment, StateSeconds};
pub use trace::{Peak, Trace};
pub use trust::{Doubt, REFRACTION_SCATTER, Trust, doubts, elevation_scatter, trust};
