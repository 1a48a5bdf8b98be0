//! Runway ends: designator, place, true bearing and displaced threshold.
//!
//! Does not know magnetic variation, lengths, surfaces, nor which end is in use.

use super::table::{letters, place_at};
use crate::units::{Angle, Metres, Place};

/// Designator 0..4, latitude 4..8 and longitude 8..12 in millionths of a degree, true bearing 12..14 in hundredths of a
/// degree, displacement of the threshold 14..16 in feet.
type Record = [u8; 16];

static BYTES: &[u8] = include_bytes!("data/runway_ends.bin");
static RECORDS: &[Record] = BYTES.as_chunks().0;

/// One end of a runway, as it meets a pilot who lands over it.
#[derive(Clone, Copy, PartialEq, Eq, Hash)]
pub struct RunwayEnd {
    record: &'static Record,
}

/// A run of ends in the table.
pub(super) fn ends(first: usize, count: usize) -> impl ExactSizeIterator<Item = RunwayEnd> {
    let run = RECORDS.get(first..first + count).unwrap_or_default();
    run.iter().map(|record| RunwayEnd { record })
}

impl RunwayEnd {
    /// The designator painted on it, such as `07L`.
    pub fn designator(self) -> &'static str {
        letters(&self.record[..4]).unwrap_or_default()
    }

    /// The middle of the end of the runway; a displaced threshold lies [`displaced`](Self::displaced) further on.
    pub fn place(self) -> Place {
        place_at(self.i32_at(4), self.i32_at(8))
    }

    /// The true bearing here towards the other end: the track of a landing on this end.
    ///
    /// # Accuracy
    /// A WGS84 geodesic between the two ends as published, kept to 0.01°; ends given to four decimals leave about 0.5° on a
    /// short runway.
    pub fn bearing(self) -> Angle {
        Angle::from_deg(f64::from(self.u16_at(12)) / 100.0)
    }

    /// How far along the runway its threshold is displaced.
    pub fn displaced(self) -> Metres {
        Metres::from_feet(f64::from(self.u16_at(14)))
    }

    fn i32_at(self, at: usize) -> i32 {
        let r = self.record;
        i32::from_le_bytes([r[at], r[at + 1], r[at + 2], r[at + 3]])
    }

    fn u16_at(self, at: usize) -> u16 {
        u16::from_le_bytes([self.record[at], self.record[at + 1]])
    }
}

impl std::fmt::Debug for RunwayEnd {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        write!(f, "RunwayEnd({} {:.2}°)", self.designator(), self.bearing().deg())
    }
}

#[cfg(test)]
mod tests {
    use super::{BYTES, RECORDS};
    use crate::places::{aerodrome, aerodromes};

    #[test]
    fn every_record_belongs_to_one_aerodrome() {
        assert_eq!(RECORDS.len() * 16, BYTES.len());
        let counted: usize = aerodromes().map(|field| field.runway_ends().len()).sum();
        assert_eq!(counted, RECORDS.len());
    }

    #[test]
    fn an_end_reads_its_record() {
        let ends: Vec<_> = aerodrome("LHR").unwrap().runway_ends().collect();
        let names: Vec<_> = ends.iter().map(|end| end.designator()).collect();
        assert_eq!(names, ["09L", "09R", "27L", "27R"]);
        assert!((ends[0].bearing().deg() - 89.7).abs() < 0.5, "{:?}", ends[0]);
        assert!((ends[0].displaced().0 - 306.0).abs() < 5.0, "{:?}", ends[0].displaced());
    }
}
