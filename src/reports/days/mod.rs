//! A place's days as text, JSON and CSV.
//!
//! Computes no time: it tells those of [`PlaceDays`].

mod words;
mod text;
mod table;
mod record;
mod csv;

pub use csv::days_csv;
pub use record::days_json;

use crate::day::PlaceDays;
use crate::label::one_line;

const WIDTH: usize = 96;

/// A place's days as text: every event of one day, or a table with a row for each of several.
pub fn days_text(here: &PlaceDays) -> String {
    if let [day] = &here.days[..] { text::one_day(here, day) } else { table::several(here) }
}

/// What the files of a place's days are called, without their ending.
pub fn days_stem(here: &PlaceDays) -> String {
    let (first, last) = (here.range.first(), here.range.last());
    let place = here.stop.place;
    let part = |deg: f64, letters: [char; 2]| format!("{:.4}{}", deg.abs(), letters[usize::from(deg < 0.0)]);
    // a minus and a comma are one hyphen in a file's name: coordinates need their letters
    let is_code = here.stop.name.is_some();
    let where_ = if is_code {
        here.stop.label.clone()
    } else {
        format!("{} {}", part(place.lat.deg(), ['N', 'S']), part(place.lon.deg(), ['E', 'W']))
    };
    let dates = if first == last { first.to_string() } else { format!("{first} {last}") };
    super::file_stem(&format!("{where_} {dates}"))
}

/// `ENTC Tromsø Airport, Langnes`.
fn title(here: &PlaceDays) -> String {
    let name = here.stop.name.as_deref().map_or(String::new(), |name| format!(" {}", one_line(name)));
    one_line(&here.stop.label) + &name
}

/// What a reader must know besides.
fn cautions(here: &PlaceDays) -> Vec<String> {
    super::caution::at_place(here.dut1_s)
}
