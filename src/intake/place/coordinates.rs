//! Coordinates with hemisphere letters: ICAO's, and degrees, minutes and seconds as charts and flight decks write them.
//!
//! A reading that could be meant in two ways is refused. Does not know aerodromes.

use crate::units::Place;

/// One part of a latitude or longitude, with the sign that stands behind it.
struct Part<'t> {
    digits: &'t str,
    mark: Option<char>,
}

/// Which of the two is read: how many digits its degrees have where nothing parts them from the minutes.
#[derive(Clone, Copy)]
enum Axis {
    Lat = 2,
    Lon = 3,
}

/// Reads a latitude and a longitude, each with its letter before or behind it: `78N020W`, `7830N02000W`,
/// `783000N0200000W`, `78-30N 020-00W`, `N78 30.0 W020 00.0`, `78°30'00"N 20°00'00"W`.
///
/// # Source
/// ICAO Doc 4444 (PANS-ATM), appendix 2, item 15(c), for seven and eleven characters; ICAO Annex 15 publications for
/// fifteen; the others are those of charts and flight decks.
pub(super) fn lettered(text: &str) -> Result<Option<Place>, crate::units::PlaceError> {
    let Some(upper) = plain(text) else { return Ok(None) };
    let Some(parted) = parted(&upper) else { return Ok(None) };
    let (Some(lat), Some(lon)) = (degrees(parted.lat, Axis::Lat), degrees(parted.lon, Axis::Lon)) else {
        return Ok(None);
    };
    // 7830N020W may be a slip either way; with signs behind the numbers it cannot be
    if lat.parts != lon.parts && !(lat.marked && lon.marked) || lon.value > 180.0 {
        return Ok(None);
    }
    let signed = |value: f64, minus: bool| if minus { -value } else { value };
    Place::from_deg(signed(lat.value, parted.south), signed(lon.value, parted.west)).map(Some)
}

/// Capitals, one sign for each of degree, minute and second, and blanks for commas that part latitude from longitude.
fn plain(text: &str) -> Option<String> {
    let upper = text.trim().to_uppercase().replace("''", "\"");
    let mut out = String::with_capacity(upper.len());
    for c in upper.chars() {
        out.push(match c {
            '0'..='9' | 'N' | 'S' | 'E' | 'W' | '.' | ' ' | ',' => c,
            '-' | ':' => '-',
            '°' | 'º' | '˚' => '°',
            '\'' | '′' | '’' => '\'',
            '"' | '″' | '”' => '"',
            _ => return None,
        });
    }
    // between two digits a comma may be a decimal one
    let commas: Vec<&str> = out.split(',').map(str::trim).collect();
    let is_digit = |c: Option<char>| c.is_some_and(|c| c.is_ascii_digit());
    let decimal = |pair: &[&str]| is_digit(pair[0].chars().next_back()) && is_digit(pair[1].chars().next());
    (commas.len() <= 2 && !commas.windows(2).any(decimal)).then(|| commas.join(" "))
}

struct Parted<'t> {
    lat: &'t str,
    south: bool,
    lon: &'t str,
    west: bool,
}

/// Latitude and longitude without their letters, which must stand both before or both behind.
fn parted(text: &str) -> Option<Parted<'_>> {
    let one = |letters: [char; 2]| {
        let mut found = text.match_indices(letters);
        found.next().filter(|_| found.next().is_none())
    };
    let ((at_lat, lat_letter), (at_lon, lon_letter)) = (one(['N', 'S'])?, one(['E', 'W'])?);
    let (south, west) = (lat_letter == "S", lon_letter == "W");
    if at_lat == 0 {
        return Some(Parted { lat: &text[1..at_lon], south, lon: &text[at_lon + 1..], west });
    }
    let is_last = at_lon + 1 == text.len();
    (at_lat < at_lon && is_last).then(|| Parted {
        lat: &text[..at_lat],
        south,
        lon: &text[at_lat + 1..at_lon],
        west,
    })
}

struct Degrees {
    value: f64,
    parts: usize,
    marked: bool,
}

fn degrees(text: &str, axis: Axis) -> Option<Degrees> {
    let parts = parts(text.trim())?;
    let marked = parts.iter().any(|part| part.mark.is_some());
    let digits: Vec<&str> = match parts[..] {
        [ref one] if !marked => unparted(one.digits, axis)?,
        _ => parts.iter().map(|part| part.digits).collect(),
    };
    let value = sexagesimal(&digits)?;
    Some(Degrees { value, parts: digits.len(), marked })
}

/// The numbers of a latitude or longitude: parted by blanks, dashes or the signs of degree, minute and second in order.
fn parts(text: &str) -> Option<Vec<Part<'_>>> {
    let mut parts = Vec::new();
    let mut rest = text;
    while !rest.is_empty() {
        let end = rest.find(|c: char| !c.is_ascii_digit() && c != '.').unwrap_or(rest.len());
        let digits = &rest[..end];
        rest = &rest[end..];
        let mark = rest.chars().next().filter(|c| ['°', '\'', '"'].contains(c));
        rest = mark.map_or(rest, |mark| &rest[mark.len_utf8()..]).trim_start();
        if let Some(more) = rest.strip_prefix('-') {
            // a dash parts two numbers and is no sign
            rest = more.trim_start();
            if rest.is_empty() {
                return None;
            }
        }
        parts.push(Part { digits, mark });
    }
    let in_order = |(part, mark): (&Part<'_>, char)| part.mark.is_none_or(|own| own == mark);
    let fits = parts.len() <= 3 && parts.iter().zip(['°', '\'', '"']).all(in_order);
    (fits && !parts.is_empty()).then_some(parts)
}

/// Degrees, minutes and seconds written without anything between: told apart by their count alone.
fn unparted(digits: &str, axis: Axis) -> Option<Vec<&str>> {
    let own = axis as usize;
    let whole = digits.find('.').unwrap_or(digits.len());
    if whole < digits.len() && whole <= own {
        return Some(vec![digits]);
    }
    let (degrees, rest) = digits.split_at_checked(own)?;
    match whole - own {
        0 => Some(vec![degrees]),
        2 => Some(vec![degrees, rest]),
        4 => Some(vec![degrees, &rest[..2], &rest[2..]]),
        _ => None,
    }
}

/// Degrees from up to three numbers, of which only the last may have decimals, and the second and third are below 60.
fn sexagesimal(parts: &[&str]) -> Option<f64> {
    let mut value = 0.0;
    for (i, (text, unit)) in parts.iter().zip([1.0, 60.0, 3600.0]).enumerate() {
        let is_last = i + 1 == parts.len();
        let starts_and_ends = text.starts_with(|c: char| c.is_ascii_digit()) && !text.ends_with('.');
        let whole = text.find('.').unwrap_or(text.len());
        if !starts_and_ends || whole > 3 || text.len() > 16 || (whole < text.len() && !is_last) {
            return None;
        }
        let number: f64 = text.parse().ok()?;
        if i > 0 && number >= 60.0 {
            return None;
        }
        value += number / unit;
    }
    Some(value)
}
