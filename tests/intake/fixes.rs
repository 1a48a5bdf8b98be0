//! A user's own fixes.

use super::FLIGHT;
use gloamline::intake::{Fixes, Flight, IntakeError, flight_file_with_fixes};
use proptest::prelude::*;

/// The fixes of a text, and what was said of its bad rows.
fn taken(text: &str) -> (Fixes, Vec<String>) {
    let mut fixes = Fixes::of("fixes.csv");
    let bad = text.lines().filter_map(|line| fixes.take(line).err());
    let bad: Vec<String> = bad.map(|error| error.to_string()).collect();
    (fixes, bad)
}

fn flown(fixes: &str, route: &str) -> Result<Flight, IntakeError> {
    let text = format!("{FLIGHT}route = \"{route}\"\n");
    flight_file_with_fixes(&text, "f.toml", &taken(fixes).0)
}

fn first(flight: &Flight) -> (f64, f64) {
    let place = flight.waypoints[0].place;
    (place.lat.deg().round(), place.lon.deg().round())
}

#[test]
fn the_columns_are_told_by_the_header_or_by_their_order() {
    for text in [
        "NOVEM,60,-20",
        "Name,Lat,Lon\nNOVEM,60,-20",
        "\u{feff}LONGITUDE_DEG,country,Ident,latitude_deg\n-20,XX,novem,60",
        "Punkt,Breite,Länge\nNOVEM,60,-20",
        "lon;lat;name\n-20,0;60,0;NOVEM",
        "name\tlat\tlon\nnovem\t60\t-20\n\n",
        "\"NOVEM\",\"60\",\"-20\"",
    ] {
        let (fixes, bad) = taken(text);
        assert_eq!((fixes.count(), bad.len()), (1, 0), "{text}: {bad:?}");
        let flight = flown(text, "novem").unwrap();
        assert_eq!((first(&flight), flight.waypoints[0].label.as_str()), ((60.0, -20.0), "NOVEM"), "{text}");
        assert!(flight.warnings.is_empty());
    }
}

#[test]
fn of_equal_names_the_nearest_to_the_route_so_far_is_taken_and_said() {
    let fixes = "DOVEK,51,1\nDOVEK,64,-79\nDOVEK,-40,100";
    let flight = flown(fixes, "dovek").unwrap();
    assert_eq!(first(&flight), (64.0, -79.0));
    assert_eq!(
        flight.warnings,
        [
            "'dovek' names 3 fixes; the one nearest to the route so far was taken: 6400N07900W, 1220 NM from the point before"
        ]
    );
    assert_eq!(first(&flown(fixes, "50N000E DOVEK").unwrap()), (50.0, 0.0));
    assert!((flown(fixes, "50N000E DOVEK").unwrap().waypoints[1].place.lat.deg() - 51.0).abs() < 1e-9);
}

#[test]
fn codes_and_coordinates_come_before_fixes() {
    let flight = flown("CYFB,0,0\n78N040W,1,1", "CYFB 78N040W").unwrap();
    assert_eq!(first(&flight), (64.0, -69.0));
    assert_eq!(
        flight.warnings,
        [
            "'CYFB' was taken for the aerodrome's code, and not for the fix of that name",
            "'78N040W' was taken for coordinates, and not for the fix of that name"
        ]
    );
}

#[test]
fn a_take_off_from_one_of_several_fixes_is_refused() {
    let fixes = taken("STRIP,60,10\nSTRIP,61,11\nCAMP,80,10").0;
    let text = |from: &str| FLIGHT.replace("CYYZ", from);
    let error = flight_file_with_fixes(&text("STRIP"), "f.toml", &fixes).unwrap_err();
    assert_eq!(error.to_string(), "f.toml:1:8: 'STRIP' names 2 fixes, and no point before it tells which");
    assert_eq!(error.hint().unwrap(), "give its coordinates instead");
    assert_eq!(flight_file_with_fixes(&text("Camp"), "f.toml", &fixes).unwrap().from.label, "CAMP");
}

#[test]
fn a_bad_row_is_refused_with_its_line_and_the_others_are_used() {
    let (fixes, bad) = taken(
        "name,lat,lon\nALFA,60,-20\nBRAVO,60\nC\u{1},60,1\nDELTA,x,1\nECHOO,120,40\nFOXIE,95,200\nGOLFO,1e999,0\nHOTEL,61,-20",
    );
    assert_eq!(fixes.count(), 2);
    assert_eq!(
        bad,
        [
            "fixes.csv:3:1: 'BRAVO,60' is no fix: name, latitude and longitude are wanted",
            "fixes.csv:4:1: 'C\\u{1}' is no name of a fix",
            "fixes.csv:5:1: 'x' is no number of degrees",
            "fixes.csv:6:1: latitude 120° is outside −90° to 90°; with longitude 40° they look exchanged",
            "fixes.csv:7:1: latitude 95° is outside −90° to 90°",
            "fixes.csv:8:1: latitude inf° is outside −90° to 90°",
        ]
    );
}

#[test]
fn a_first_row_that_is_bad_is_no_header() {
    let (fixes, bad) = taken("ALFA,95,200\nBRAVO,60,1");
    assert_eq!(
        (fixes.count(), bad.as_slice()),
        (1, &["fixes.csv:1:1: latitude 95° is outside −90° to 90°".to_string()][..])
    );
}

#[test]
fn a_name_that_is_neither_code_nor_fix_is_said_to_be() {
    let error = flown("NOVEM,60,-20", "NOVEX").unwrap_err();
    assert_eq!(error.to_string(), "f.toml:5:10: no aerodrome has the code NOVEX, and no fix that name");
}

proptest! {
    #[test]
    fn no_row_makes_the_reader_panic(lines in prop::collection::vec("[A-Z0-9,;\t\"é.\u{0}-]{0,20}", 0..6)) {
        let _ = taken(&lines.join("\n"));
    }
}
