//! Which aerodrome a position belongs to.

use super::table::{Aerodrome, aerodromes};
use crate::units::{Metres, Place, dot, wgs84};

/// The aerodrome nearest to a position, if one lies within a distance.
///
/// # Accuracy
/// Distances are chords of a sphere with the ellipsoid's greater radius: right to a part in 200, at which it tells apart
/// what lies a few kilometres off. Looks at every aerodrome: half a millisecond.
pub fn nearest(place: Place, within: Metres) -> Option<Aerodrome> {
    let here = place.normal();
    let closeness = |field: &Aerodrome| dot(here, field.place().normal());
    let best = aerodromes().max_by(|a, b| closeness(a).total_cmp(&closeness(b)))?;
    let chord_m = wgs84::A_M * (2.0 * (1.0 - closeness(&best))).max(0.0).sqrt();
    (chord_m <= within.0).then_some(best)
}

#[cfg(test)]
mod tests {
    use super::nearest;
    use crate::units::{Metres, Place};

    #[test]
    fn a_position_on_a_runway_belongs_to_its_aerodrome() {
        let place = Place::from_deg(69.68, 18.91).unwrap();
        assert_eq!(nearest(place, Metres(8000.0)).map(crate::places::Aerodrome::code), Some("ENTC"));
        assert!(nearest(Place::from_deg(85.0, 10.0).unwrap(), Metres(8000.0)).is_none());
    }
}
