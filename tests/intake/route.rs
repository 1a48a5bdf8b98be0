//! Routes as one string.

use super::{FLIGHT, said};
use gloamline::intake::{Flight, Inline, flight_file, inline_flight};
use gloamline::path::fly;
use gloamline::sky::Sky;
use gloamline::units::Place;

fn routed(route: &str) -> Flight {
    flight_file(&format!("{FLIGHT}route = \"{route}\"\n"), "f.toml").unwrap()
}

fn places(flight: &Flight) -> Vec<(f64, f64)> {
    let rounded = |deg: f64| (deg * 1e6).round() / 1e6;
    flight.waypoints.iter().map(|w| (rounded(w.place.lat.deg()), rounded(w.place.lon.deg()))).collect()
}

#[test]
fn a_route_is_points_parted_by_blanks_and_a_point_may_have_blanks_itself() {
    let flight = routed("7030N06000W 78N040W 8530N 00000E N78 30.0 E020 00.0 DCT 5275N 60.5,-20 60.5, -30");
    assert_eq!(
        places(&flight),
        [
            (70.5, -60.0),
            (78.0, -40.0),
            (85.5, 0.0),
            (78.5, 20.0),
            (52.0, -75.0),
            (60.5, -20.0),
            (60.5, -30.0)
        ]
    );
    assert_eq!(flight.warnings.len(), 1);
    let aerodromes = routed("CYFB bgtl ENSB");
    let labels: Vec<&str> = aerodromes.waypoints.iter().map(|w| w.label.as_str()).collect();
    assert_eq!(labels, ["CYFB", "BGTL", "ENSB"]);
}

#[test]
fn a_latitude_alone_is_a_point_of_five_characters_only_where_no_longitude_follows() {
    assert_eq!(places(&routed("8530N 00000E")), [(85.5, 0.0)]);
    assert_eq!(places(&routed("8530N CYFB"))[0], (85.0, -30.0));
    assert_eq!(places(&routed("5230N 5240E")), [(52.0, -30.0), (52.0, 40.0)]);
}

#[test]
fn a_route_may_run_over_lines_and_its_error_names_the_line() {
    let text = format!("{FLIGHT}route = \"\"\"\n7030N06000W 78N040W\n  8530N00000E 78X\n\"\"\"\n");
    assert_eq!(said(&text).lines().next().unwrap(), "f.toml:7:15: '78X' is no coordinate pair");
    assert!(said(&format!("{FLIGHT}route = \"78N040W CYXX1\"")).starts_with("f.toml:5:18: no aerodrome has"));
}

#[test]
fn a_route_that_cannot_be_is_refused() {
    assert_eq!(
        said(&format!("{FLIGHT}route = \"78N040W\"\n[[waypoint]]\nat = \"78N040W\"")),
        "f.toml:5:9: 'route' and 'waypoint' are both given\nleave one of them out"
    );
    for text in ["", "  ", "DCT dct"] {
        let wanted = "the route names no point\nwrite points parted by blanks: \"7030N06000W 78N040W CYFB\"";
        assert!(said(&format!("{FLIGHT}route = \"{text}\"")).ends_with(wanted), "{text}");
    }
    assert_eq!(
        said(&format!("{FLIGHT}route = [\"78N040W\"]")),
        "f.toml:5:9: 'route' is array, but must be a string"
    );
    let long = "78N040W ".repeat(20_001);
    assert!(said(&format!("{FLIGHT}route = \"{long}\"")).contains("20001 waypoints are more than the 20000"));
}

#[test]
fn an_inline_flight_has_its_route_too() {
    let given = Inline {
        from: "CYYZ",
        to: "VHHH",
        takeoff: "2026-12-18T05:10Z",
        airborne: Some("14h55m"),
        route: Some("78N040W 8530N 00000E"),
        ..Inline::default()
    };
    assert_eq!(places(&inline_flight(&given).unwrap()), [(78.0, -40.0), (85.5, 0.0)]);
    let bad = inline_flight(&Inline { route: Some("78N"), ..given }).unwrap_err();
    assert_eq!(bad.to_string(), "--route: '78N' is no coordinate pair");
}

#[test]
fn a_straight_flight_has_the_same_crossings_as_points_on_its_geodesic() {
    // a leg's ends are rounded to 1e-9°, 0.1 mm, which no crossing here turns into 0.2 s
    const SAME_S: f64 = 0.2;
    let sky = Sky::default();
    for ends in [
        "from = \"BIKF\"\nto = \"PANC\"\ntakeoff = 2026-11-06T16:50:00Z\nairborne = \"6h35m\"\n",
        "from = \"EFHK\"\nto = \"SCEL\"\ntakeoff = 2026-03-12T16:30:00Z\nairborne = \"15h\"\n",
    ] {
        let two = flight_file(ends, "f.toml").unwrap();
        let path = fly(&two).unwrap();
        let point = |i: i32| {
            let at: Place = path.at(path.airborne_s * f64::from(i) / 40.0).place;
            format!("{:.9},{:.9}", at.lat.deg(), at.lon.deg())
        };
        let route = (1..40).map(point).collect::<Vec<_>>().join(" ");
        let many = flight_file(&format!("{ends}route = \"{route}\"\n"), "f.toml").unwrap();
        let straight = gloamline::brief(two, &sky).unwrap();
        let cut = gloamline::brief(many, &sky).unwrap();
        assert_eq!(cut.path.legs().len(), 40);
        assert!(straight.light.crossings.len() >= 3);
        assert_eq!(straight.light.crossings.len(), cut.light.crossings.len());
        for (a, b) in straight.light.crossings.iter().zip(&cut.light.crossings) {
            assert_eq!((a.limit, a.direction), (b.limit, b.direction));
            assert!((a.at_s - b.at_s).abs() < SAME_S, "{} {}", a.at_s, b.at_s);
        }
    }
}
