//! The aerodrome table, held against another collection and against what must hold of any such table.
//!
//! Does not know how the table was made.

mod hostile;
mod known;
mod runways;
mod table;
