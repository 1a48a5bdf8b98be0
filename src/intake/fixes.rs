//! A user's own points by name: rows of name, latitude and longitude, taken a line at a time.
//!
//! Does not open files: its caller feeds it the lines and says what the file is called.

use super::draft::Origin;
use super::problem::{IntakeError, Problem};
use crate::units::Place;
use std::collections::HashMap;

/// The most fixes that are held.
const MOST_FIXES: usize = 1_000_000;
/// The longest name of a fix, in bytes.
const LONGEST_NAME: usize = 64;
/// What the columns may be called: name, latitude, longitude.
const HEADERS: [&[&str]; 3] = [
    &["name", "fix", "ident", "id", "point", "waypoint"],
    &["lat", "latitude", "lat_deg", "latitude_deg"],
    &["lon", "long", "lng", "longitude", "lon_deg", "longitude_deg"],
];

/// Named points; a name may stand for several.
///
/// # Shapes and units
/// Rows of a name, a latitude and a longitude in decimal degrees, parted by commas, semicolons or tabs (the first line
/// tells which; after semicolons and tabs decimals may have a comma). A first line without numbers names the columns in
/// any order, or stands above name, latitude, longitude in this one.
#[derive(Debug, Clone, Default)]
pub struct Fixes {
    source_name: String,
    places: HashMap<String, Vec<Place>>,
    count: usize,
    line: usize,
    layout: Option<Layout>,
}

/// How the rows are written.
#[derive(Debug, Clone, Copy)]
struct Layout {
    separator: char,
    columns: [usize; 3],
}

impl Fixes {
    /// No fixes yet, of a source with a name.
    pub fn of(source_name: &str) -> Self {
        Self { source_name: source_name.to_string(), ..Self::default() }
    }

    /// How many there are.
    pub fn count(&self) -> usize {
        self.count
    }

    /// Takes the next line.
    ///
    /// # Errors
    /// A row that is no fix, with its line; those before and after it hold.
    pub fn take(&mut self, line: &str) -> Result<(), IntakeError> {
        self.line += 1;
        // a byte-order mark says nothing that UTF-8 does not
        let line = if self.line == 1 { line.trim_start_matches('\u{feff}') } else { line };
        if line.trim().is_empty() {
            return Ok(());
        }
        let origin = Origin::At(self.line, 1);
        self.row(line).map_err(|problem| IntakeError {
            source_name: self.source_name.clone(),
            origin,
            problem,
        })
    }

    fn row(&mut self, line: &str) -> Result<(), Problem> {
        if line.contains('\0') {
            return Err(Problem::NotALine);
        }
        let Some(layout) = self.layout else {
            let (layout, is_header) = Layout::of(line);
            self.layout = Some(layout);
            return if is_header { Ok(()) } else { self.row(line) };
        };
        if self.count >= MOST_FIXES {
            return Err(Problem::TooManyFixes { most: MOST_FIXES });
        }
        let (name, place) = layout.fix(line)?;
        self.places.entry(name).or_default().push(place);
        self.count += 1;
        Ok(())
    }

    /// All places of a name, in either case of letters.
    pub(super) fn named(&self, name: &str) -> &[Place] {
        self.places.get(&name.trim().to_uppercase()).map_or(&[], Vec::as_slice)
    }
}

impl Layout {
    /// The layout that a first line tells, and whether that line is a header and no fix.
    fn of(line: &str) -> (Self, bool) {
        let separator = [';', '\t'].into_iter().find(|&c| line.contains(c)).unwrap_or(',');
        let plain = Self { separator, columns: [0, 1, 2] };
        if plain.fix(line).is_ok() {
            return (plain, false);
        }
        let cells = cells(line, separator);
        let column = |names: &[&str]| {
            cells.iter().position(|cell| names.contains(&cell.trim().to_lowercase().as_str()))
        };
        if let [Some(name), Some(lat), Some(lon)] = HEADERS.map(column) {
            return (Self { separator, columns: [name, lat, lon] }, true);
        }
        // a row whose numbers are wrong is a bad fix, one without digits a header in words of its own
        let has_numbers = cells.iter().skip(1).any(|cell| cell.bytes().any(|b| b.is_ascii_digit()));
        (plain, !has_numbers)
    }

    fn fix(self, line: &str) -> Result<(String, Place), Problem> {
        let cells = cells(line, self.separator);
        let cell = |i: usize| cells.get(self.columns[i]).map(|cell| cell.trim()).filter(|c| !c.is_empty());
        let (Some(name), Some(lat), Some(lon)) = (cell(0), cell(1), cell(2)) else {
            return Err(Problem::NoFix(line.to_string()));
        };
        if name.len() > LONGEST_NAME || name.chars().any(char::is_control) {
            return Err(Problem::FixName(name.to_string()));
        }
        let number = |text: &str| {
            let text = if self.separator == ',' { text.to_string() } else { text.replace(',', ".") };
            text.parse::<f64>().map_err(|_| Problem::FixNumber(text))
        };
        let (lat, lon) = (number(lat)?, number(lon)?);
        let swapped = lat.abs() > 90.0 && lon.abs() <= 90.0;
        let place = Place::from_deg(lat, lon);
        if swapped && lat.abs() <= 180.0 {
            return Err(Problem::Swapped { lat, lon });
        }
        Ok((name.to_uppercase(), place?))
    }
}

/// The cells of a row; within double quotes a separator is a letter like any other, and a doubled quote is one.
fn cells(line: &str, separator: char) -> Vec<String> {
    let mut cells = vec![String::new()];
    let mut quoted = false;
    let mut letters = line.chars().peekable();
    while let Some(c) = letters.next() {
        match (c, cells.last_mut()) {
            ('"', Some(cell)) if quoted && letters.peek() == Some(&'"') => {
                letters.next();
                cell.push('"');
            }
            ('"', _) => quoted = !quoted,
            (c, _) if c == separator && !quoted => cells.push(String::new()),
            (c, Some(cell)) => cell.push(c),
            (_, None) => {}
        }
    }
    cells
}
