//! Aerodromes, their runways and time zones: found by code in a table that the program carries.
//!
//! Knows nothing of flights, of the sky, or of anything that opened, moved or closed after the table was made
//! (`data/PROVENANCE.md`).

mod table;
mod lookup;
mod near;
mod nearest;
mod runway;
mod zone;

pub use lookup::{UnknownAerodrome, aerodrome};
pub use nearest::nearest;
pub use runway::RunwayEnd;
pub use table::{Aerodrome, aerodromes};
