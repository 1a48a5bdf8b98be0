//! The embedded aerodrome records and the handle that reads them.
//!
//! Nothing is parsed before it is asked for. Does not know how the records were made (`data/make_aerodromes.py`);
//! the layout below is that of `data/pack.py`.

use super::runway::{self, RunwayEnd};
use super::zone::ZONES;
use crate::units::{Metres, Place};

/// Code, name, place and the rest of one aerodrome: ICAO code 0..4, IATA code 4..7, country 7..9, lengths of name and
/// city, number of runway ends, latitude 12..16 and longitude 16..20 in millionths of a degree, where the name begins
/// 20..24, first runway end 24..26, elevation in feet 26..28, zone 28..30. A missing code is zeros.
type Record = [u8; 30];

/// An IATA code 0..3 and the index of its aerodrome 3..5.
type IataRecord = [u8; 5];

static AERODROME_BYTES: &[u8] = include_bytes!("data/aerodromes.bin");
static IATA_BYTES: &[u8] = include_bytes!("data/iata.bin");
static NAMES: &str = include_str!("data/names.txt");

static RECORDS: &[Record] = AERODROME_BYTES.as_chunks().0;
static IATA_RECORDS: &[IataRecord] = IATA_BYTES.as_chunks().0;

/// One aerodrome of the table: a handle as light as a pointer.
#[derive(Clone, Copy, PartialEq, Eq, Hash)]
pub struct Aerodrome {
    record: &'static Record,
}

/// Every aerodrome of the table, those without an ICAO code first, then in the order of ICAO codes.
pub fn aerodromes() -> impl ExactSizeIterator<Item = Aerodrome> {
    RECORDS.iter().map(|record| Aerodrome { record })
}

/// Where the codes that begin with each pair of letters begin, reckoned by the compiler: a search has half the steps.
type Starts = [u16; LETTERS * LETTERS + 1];
const LETTERS: usize = 26;
static ICAO_STARTS: Starts = starts(RECORDS);
static IATA_STARTS: Starts = starts(IATA_RECORDS);

/// The starts of sorted records whose first two bytes are capital letters, or zeros (which come first).
const fn starts<const N: usize>(records: &[[u8; N]]) -> Starts {
    let mut starts = [0; LETTERS * LETTERS + 1];
    let (mut at, mut pair) = (0, 0);
    while pair <= LETTERS * LETTERS {
        while at < records.len() && (records[at][0] == 0 || pair_of(records[at][0], records[at][1]) < pair) {
            at += 1;
        }
        starts[pair] = at as u16;
        pair += 1;
    }
    starts
}

const fn pair_of(first: u8, second: u8) -> usize {
    (first - b'A') as usize * LETTERS + (second - b'A') as usize
}

/// The records that begin with a code's first two capital letters.
fn alike<const N: usize>(records: &'static [[u8; N]], starts: &Starts, code: &[u8]) -> &'static [[u8; N]] {
    let pair = pair_of(code[0], code[1]);
    &records[usize::from(starts[pair])..usize::from(starts[pair + 1])]
}

/// The aerodrome with an ICAO code in capital letters.
pub(super) fn by_icao(code: [u8; 4]) -> Option<Aerodrome> {
    let alike = alike(RECORDS, &ICAO_STARTS, &code);
    let rest = u16::from_be_bytes([code[2], code[3]]);
    let at = alike.binary_search_by_key(&rest, |r| u16::from_be_bytes([r[2], r[3]])).ok()?;
    Some(Aerodrome { record: &alike[at] })
}

/// The aerodrome with an IATA code in capital letters.
pub(super) fn by_iata(code: [u8; 3]) -> Option<Aerodrome> {
    let alike = alike(IATA_RECORDS, &IATA_STARTS, &code);
    let at = alike.binary_search_by(|r| r[2].cmp(&code[2])).ok()?;
    let [.., low, high] = alike[at];
    let record = RECORDS.get(usize::from(u16::from_le_bytes([low, high])))?;
    Some(Aerodrome { record })
}

/// The place at a pair of coordinates in millionths of a degree.
pub(super) fn place_at(lat: i32, lon: i32) -> Place {
    Place::from_deg(f64::from(lat) / 1e6, f64::from(lon) / 1e6)
        .expect("the tables hold only places that exist")
}

/// Letters padded with zeros, or nothing where there are only zeros.
pub(super) fn letters(bytes: &'static [u8]) -> Option<&'static str> {
    let end = bytes.iter().position(|&b| b == 0).unwrap_or(bytes.len());
    std::str::from_utf8(&bytes[..end]).ok().filter(|text| !text.is_empty())
}

impl Aerodrome {
    /// The ICAO location indicator, of four letters.
    pub fn icao(self) -> Option<&'static str> {
        letters(&self.record[0..4])
    }

    /// The IATA location code, of three letters.
    pub fn iata(self) -> Option<&'static str> {
        letters(&self.record[4..7])
    }

    /// The code by which it is best known to a planner: ICAO where there is one, else IATA.
    pub fn code(self) -> &'static str {
        self.icao().or(self.iata()).unwrap_or_default()
    }

    /// The name, such as `Toronto Pearson International Airport`.
    pub fn name(self) -> &'static str {
        self.text(0, self.record[9])
    }

    /// The city or settlement it serves or stands in; empty where none is stated.
    pub fn city(self) -> &'static str {
        self.text(usize::from(self.record[9]) + 1, self.record[10])
    }

    /// The country, as two letters of ISO 3166-1 (and `XK`).
    pub fn country(self) -> &'static str {
        letters(&self.record[7..9]).unwrap_or_default()
    }

    /// The aerodrome's reference point.
    ///
    /// # Accuracy
    /// Within 3 km of an independent collection at the large aerodromes of `tests/tables/aerodromes/known.csv`;
    /// `data/cross_check.txt` lists where two collections are more than 5 km apart.
    pub fn place(self) -> Place {
        place_at(self.i32_at(12), self.i32_at(16))
    }

    /// The elevation of the field above mean sea level.
    ///
    /// # Accuracy
    /// The source warns that elevations are often wrong; 71 differ by over 300 ft from a second one.
    pub fn height(self) -> Metres {
        Metres::from_feet(f64::from(i16::from_le_bytes([self.record[26], self.record[27]])))
    }

    /// The time zone its clocks keep.
    pub fn zone(self) -> chrono_tz::Tz {
        ZONES[self.u16_at(28)]
    }

    /// The ends of its runways in the order of their designators; none where they are not known.
    pub fn runway_ends(self) -> impl ExactSizeIterator<Item = RunwayEnd> {
        runway::ends(self.u16_at(24), self.runway_end_count())
    }

    pub(super) fn runway_end_count(self) -> usize {
        usize::from(self.record[11])
    }

    fn text(self, skip: usize, length: u8) -> &'static str {
        let from = self.i32_at(20) as usize + skip;
        NAMES.get(from..from + usize::from(length)).unwrap_or_default()
    }

    fn i32_at(self, at: usize) -> i32 {
        let r = self.record;
        i32::from_le_bytes([r[at], r[at + 1], r[at + 2], r[at + 3]])
    }

    fn u16_at(self, at: usize) -> usize {
        usize::from(u16::from_le_bytes([self.record[at], self.record[at + 1]]))
    }
}

impl std::fmt::Debug for Aerodrome {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        write!(f, "Aerodrome({})", self.code())
    }
}

#[cfg(test)]
mod tests {
    use super::{AERODROME_BYTES, IATA_BYTES, IATA_RECORDS, RECORDS, aerodromes, by_icao};

    #[test]
    fn the_tables_are_whole_and_sorted() {
        assert_eq!(RECORDS.len() * 30, AERODROME_BYTES.len());
        assert_eq!(IATA_RECORDS.len() * 5, IATA_BYTES.len());
        assert!(RECORDS.is_sorted_by(|a, b| a[..7] < b[..7]));
        assert!(IATA_RECORDS.is_sorted_by(|a, b| a[..3] < b[..3]));
    }

    #[test]
    fn a_handle_reads_its_record() {
        let toronto = by_icao(*b"CYYZ").unwrap();
        assert_eq!((toronto.code(), toronto.iata(), toronto.country()), ("CYYZ", Some("YYZ"), "CA"));
        assert_eq!(toronto.name(), "Toronto Pearson International Airport");
        assert_eq!((toronto.city(), toronto.zone().name()), ("Mississauga", "America/Toronto"));
        assert!((toronto.height().feet() - 569.0).abs() < 1.0);
    }

    #[test]
    fn every_name_is_one_line_of_the_names() {
        for field in aerodromes() {
            assert!(!field.name().is_empty() && !field.name().contains(['\t', '\n']), "{field:?}");
            assert!(!field.city().contains(['\t', '\n']), "{field:?}");
        }
    }
}
