//! Well-known aerodromes against an independent collection (`tests/tables/aerodromes/known.csv`).
//!
//! Does not know which of the two is right where they differ.

use gloamline::places::aerodrome;
use gloamline::units::{Place, dot};

const TABLE: &str = include_str!("../tables/aerodromes/known.csv");
const MEAN_EARTH_RADIUS_M: f64 = 6_371_000.0;
/// A reference point may lie at the tower or amid the runways of a large field.
const SIZE_OF_A_LARGE_FIELD_M: f64 = 3_000.0;
/// Highest point of the landing area, or the reference point: either is published.
const SLOPE_OF_A_FIELD_FT: f64 = 100.0;

#[derive(Debug, serde::Deserialize)]
struct Row {
    icao: String,
    iata: String,
    lat: f64,
    lon: f64,
    elevation_ft: f64,
}

fn rows() -> Vec<Row> {
    let mut reader = csv::ReaderBuilder::new().comment(Some(b'#')).from_reader(TABLE.as_bytes());
    reader.deserialize().map(|row| row.expect("every row can be read")).collect()
}

fn metres_apart(a: Place, b: Place) -> f64 {
    dot(a.normal(), b.normal()).min(1.0).acos() * MEAN_EARTH_RADIUS_M
}

#[test]
fn well_known_aerodromes_lie_where_another_collection_has_them() {
    let rows = rows();
    assert!(rows.len() >= 25);
    for row in rows {
        let field = aerodrome(&row.icao).unwrap();
        let apart = metres_apart(field.place(), Place::from_deg(row.lat, row.lon).unwrap());
        assert!(apart < SIZE_OF_A_LARGE_FIELD_M, "{row:?}: {apart:.0} m");
        let higher = field.height().feet() - row.elevation_ft;
        assert!(higher.abs() < SLOPE_OF_A_FIELD_FT, "{row:?}: {higher:.0} ft");
        assert_eq!(aerodrome(&row.iata).unwrap(), field);
    }
}

#[test]
fn brussels_and_luxembourg_are_not_where_their_minutes_read_as_decimals_would_put_them() {
    // ourairports: runway 07L/25R of Brussels and 06/24 of Luxembourg straddle these points
    for (code, lat, lon) in [("BRU", 50.9014, 4.4844), ("LUX", 49.6233, 6.2044)] {
        let apart = metres_apart(aerodrome(code).unwrap().place(), Place::from_deg(lat, lon).unwrap());
        assert!(apart < SIZE_OF_A_LARGE_FIELD_M, "{code}: {apart:.0} m");
    }
}
