//! A brief as text, JSON, CSV, `GeoJSON` or KML: bytes and strings for somebody else to write.
//!
//! Computes no angle and opens no file.

mod record;
mod json;
mod csv;
mod text;
mod table;
mod caution;
mod sun;
mod days;
mod name;
mod marks;
mod position;
mod geojson;
mod kml;

pub use crate::label::one_line;
pub use csv::csv;
pub use days::{days_csv, days_json, days_stem, days_text};
pub use geojson::geojson;
pub use json::{json, json_list};
pub use kml::kml;
pub use name::file_stem;
pub use sun::{SunReport, sun_json, sun_text, year_json, year_text};
pub use text::text;
