//! Off blocks and on blocks, kept apart from the time in the air.

use super::{FLIGHT, said};
use gloamline::intake::flight_file;
use gloamline::sky::Sky;

#[test]
fn blocks_are_times_or_taxies_and_leave_the_time_in_the_air_alone() {
    let sky = Sky::default();
    let bare = gloamline::brief(flight_file(FLIGHT, "f.toml").unwrap(), &sky).unwrap();
    for more in [
        "off_block = 2026-12-18T04:50:00Z\non_block = 2026-12-18T20:15:00Z",
        "taxi_out = \"20m\"\ntaxi_in = \"10m\"",
        "off_block = 2026-12-18T04:50:00Z\ntaxi_in = \"10m\"",
    ] {
        let flight = flight_file(&format!("{FLIGHT}{more}"), "f.toml").unwrap();
        let brief = gloamline::brief(flight, &sky).unwrap();
        assert_eq!(brief.path.airborne_s, bare.path.airborne_s);
        let head = gloamline::reports::text(&brief);
        let line = "\nblocks off 04:50:00 UTC (taxi 20 min 00 s), on 20:15:00 UTC (taxi 10 min 00 s), 15 h 25 min in all\n";
        assert!(head.contains(line), "{head}");
        let json = gloamline::reports::json(&brief).unwrap();
        for wanted in [
            "\"off_block_utc\": \"2026-12-18T04:50:00.000Z\"",
            "\"on_block_utc\": \"2026-12-18T20:15:00.000Z\"",
            "\"block_s\": 55500.0",
        ] {
            assert!(json.contains(wanted), "{json}");
        }
    }
    assert!(!gloamline::reports::json(&bare).unwrap().contains("block"));
}

#[test]
fn blocks_out_of_order_are_refused() {
    for (more, wanted) in [
        (
            "off_block = 2026-12-18T05:11:00Z",
            "f.toml:5:13: off blocks at 2026-12-18T05:11:00Z is after the take-off at 2026-12-18T05:10:00Z",
        ),
        (
            "on_block = 2026-12-18T20:04:00Z",
            "f.toml:5:12: on blocks at 2026-12-18T20:04:00Z is before the landing at 2026-12-18T20:05:00Z",
        ),
        ("taxi_out = \"13h\"", "f.toml:5:12: 13.0 h between blocks and runway is outside 0 h to 12 h"),
        (
            "on_block = 2026-12-19T20:04:00Z",
            "f.toml:5:12: 24.0 h between blocks and runway is outside 0 h to 12 h",
        ),
        (
            "off_block = 2026-12-18T05:00:00Z\ntaxi_out = \"10m\"",
            "f.toml:5:13: 'off_block' and 'taxi_out' are both given\nleave one of them out",
        ),
        (
            "on_block = 2026-12-18T21:00:00Z\ntaxi_in = \"10m\"",
            "f.toml:5:12: 'on_block' and 'taxi_in' are both given\nleave one of them out",
        ),
        ("taxi_in = 10", "f.toml:5:11: 'taxi_in' is integer, but must be a string"),
    ] {
        assert_eq!(said(&format!("{FLIGHT}{more}\n")), wanted);
    }
}

#[test]
fn on_blocks_before_a_landing_that_speeds_make_is_refused_when_that_is_known() {
    let text = FLIGHT.replace("airborne = \"14h55m\"", "ground_speed_kt = 480");
    let with = |on: &str| {
        let flight = flight_file(&format!("{text}on_block = {on}\n"), "f.toml").unwrap();
        gloamline::brief(flight, &Sky::default()).map(|brief| brief.on_block())
    };
    assert!(with("2026-12-18T21:00:00Z").unwrap().is_some());
    let error = with("2026-12-18T15:00:00Z").unwrap_err().to_string();
    assert!(error.contains("after the landing that the speeds make, outside 0 min to 720 min"), "{error}");
}
