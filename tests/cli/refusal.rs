//! Flights that cannot be briefed: each is refused with its place, what is wrong, and the cure.

use super::{FLIGHT, folder, run, run_fed, run_in};
use std::fmt::Write;

/// Runs a flight file that must be refused; what was said, without the program's name.
fn said_of(text: &str) -> String {
    let folder = folder(&[("flight.toml", text)]);
    let ran = run_in(folder.path(), &["brief", "flight.toml"]);
    ran.refused().strip_prefix("gloamline: ").unwrap().trim_end().to_string()
}

/// The usual flight with one line in place of another.
fn with(field: &str, line: &str) -> String {
    let lines = FLIGHT.lines().map(|own| if own.starts_with(field) { line } else { own });
    lines.collect::<Vec<_>>().join("\n")
}

fn assert_said(text: &str, wanted: &str) {
    let said = said_of(text);
    assert_eq!(said, wanted, "\nof the file:\n{text}");
}

#[test]
fn an_unknown_code_is_named_with_near_ones() {
    let said = said_of(&with("from", r#"from = "CYYX""#));
    assert!(
        said.starts_with("flight.toml:3:8: no aerodrome has the code CYYX\n  hint: did you mean "),
        "{said}"
    );
    assert!(said.contains("CYYZ (Toronto Pearson International Airport"), "{said}");
}

#[test]
fn a_place_that_is_not_on_the_earth_is_refused() {
    assert_said(
        &with("from", "from = { lat = 95, lon = 0 }"),
        "flight.toml:3:8: latitude 95° is outside −90° to 90°",
    );
    assert_said(
        &with("to =", "to = { lat = 5, lon = 361.0 }"),
        "flight.toml:4:6: longitude 361° is outside −180° to 360°",
    );
    assert_said(&with("from", r#"from = "91,0""#), "flight.toml:3:8: latitude 91° is outside −90° to 90°");
    assert_said(
        &with("from", r#"from = "7860N02000W""#),
        "flight.toml:3:8: '7860N02000W' is no coordinate pair\n  hint: write 7830N02000W, 78N020W, 78-30N 020-00W or \
         78.5,-20: two digits for degrees of latitude, three for longitude",
    );
}

#[test]
fn what_is_no_number_is_out_of_every_range() {
    for (value, said) in [("nan", "NaN"), ("-nan", "NaN"), ("inf", "inf"), ("-inf", "-inf")] {
        assert_said(
            &with("from", &format!("from = {{ lat = {value}, lon = 0 }}")),
            &format!("flight.toml:3:8: latitude {said}° is outside −90° to 90°"),
        );
        assert_said(
            &format!("{FLIGHT}level_ft = {value}"),
            &format!("flight.toml:7:12: a level of {said} ft is outside 0 ft to 60000 ft"),
        );
        assert_said(
            &format!("{FLIGHT}dut1_s = {value}"),
            &format!("flight.toml:7:10: UT1 − UTC of {said} s is outside −0.9 s to 0.9 s"),
        );
        assert_said(
            &format!("{FLIGHT}polar_areas = {{ north_deg = {value} }}"),
            &format!("flight.toml:7:15: a polar area's limit of {said}° is outside 0° to 90°"),
        );
    }
    let inline = ["brief", "--from=CYYZ", "--to=VHHH", "--takeoff=2026-12-18T05:10Z", "--airborne=14h"];
    for value in ["nan", "inf", "-inf", "1e999"] {
        for (option, wanted) in [
            ("--level-ft", "--level-ft: a level of "),
            ("--dut1-s", "--dut1-s: UT1 − UTC of "),
            ("--north-polar-area", "a polar area's limit of "),
        ] {
            let given = format!("{option}={value}");
            let ran = run(&[&inline[..], &[given.as_str()]].concat());
            assert!(ran.refused().contains(wanted), "{given}: {}", ran.err);
        }
    }
}

#[test]
fn a_landing_before_or_at_the_take_off_is_refused() {
    for (landing, said) in [
        ("2026-12-18T05:09:59Z", "2026-12-18T05:09:59Z"),
        ("2026-12-18T05:10:00Z", "2026-12-18T05:10:00Z"),
        ("2026-12-18T06:09:00+01:00", "2026-12-18T05:09:00Z"),
    ] {
        assert_said(
            &with("airborne", &format!("landing = {landing}")),
            &format!(
                "flight.toml:6:11: the landing at {said} is not after the take-off at 2026-12-18T05:10:00Z"
            ),
        );
    }
    let nothing = "flight.toml:6:12: the landing at 2026-12-18T05:10:00Z is not after the take-off at 2026-12-18T05:10:00Z";
    assert_said(&with("airborne", r#"airborne = "0h""#), nothing);
}

#[test]
fn two_ends_that_disagree_are_refused_and_none_as_well() {
    assert_said(
        &format!("{FLIGHT}landing = 2026-12-18T21:00:00Z"),
        "flight.toml:7:11: 'airborne' puts the landing at 2026-12-18T20:05:00Z, 'landing' at 2026-12-18T21:00:00Z\n  \
         hint: leave one of them out",
    );
    assert_said(
        &with("airborne", ""),
        "flight.toml: neither 'airborne' nor 'landing' says when the flight ends\n  \
         hint: give one of airborne = \"14h55m\" and landing = 2026-12-18T20:05:00Z",
    );
    let inline = run(&["brief", "--from=CYYZ", "--to=VHHH", "--takeoff=2026-12-18T05:10Z"]);
    assert!(inline.refused().starts_with("gloamline: --airborne, --landing: neither "), "{}", inline.err);
}

#[test]
fn waypoint_times_rise_from_take_off_to_landing() {
    let point = |time: &str| format!("[[waypoint]]\nat = \"78N020W\"\ntime = 2026-12-18T{time}Z\n");
    assert_said(
        &format!("{FLIGHT}{}{}", point("09:00:00"), point("08:00:00")),
        "flight.toml:11:1: waypoint 2 (78N020W) at 2026-12-18T08:00:00Z is not after waypoint 1 (78N020W) at \
         2026-12-18T09:00:00Z",
    );
    assert_said(
        &format!("{FLIGHT}{}", point("05:10:00")),
        "flight.toml:8:1: waypoint 1 (78N020W) at 2026-12-18T05:10:00Z is not after the take-off at \
         2026-12-18T05:10:00Z",
    );
    assert_said(
        &format!("{FLIGHT}{}", point("20:05:00")),
        "flight.toml:8:1: waypoint 1 (78N020W) at 2026-12-18T20:05:00Z is not before the landing at \
         2026-12-18T20:05:00Z",
    );
}

#[test]
fn a_missing_field_is_named() {
    for field in ["from", "to", "takeoff"] {
        assert_said(
            &with(&format!("{field} ="), ""),
            &format!("flight.toml: the field '{field}' is missing"),
        );
    }
    assert_said(
        &format!("{FLIGHT}[[waypoint]]\ntime = 2026-12-18T09:00:00Z"),
        "flight.toml:7:1: the field 'at' is missing",
    );
    assert_said(&with("from", "from = { lat = 5 }"), "flight.toml:3:8: the field 'lon' is missing");
}

#[test]
fn a_misspelt_field_is_named_with_the_one_that_was_meant() {
    assert_said(
        &with("takeoff", "take_off = 2026-12-18T05:10:00Z"),
        "flight.toml:5:1: unknown field 'take_off'\n  hint: did you mean 'takeoff'?",
    );
    assert_said(
        &format!("{FLIGHT}levle_ft = 36000"),
        "flight.toml:7:1: unknown field 'levle_ft'\n  hint: did you mean 'level_ft'?",
    );
    assert_said(
        &with("from", "from = { latitude = 5, lon = 3 }"),
        "flight.toml:3:10: unknown field 'latitude'\n  hint: did you mean 'lat'?",
    );
    assert_said(&format!("{FLIGHT}zzz = 1"), "flight.toml:7:1: unknown field 'zzz'");
    assert_said(
        &format!("{FLIGHT}[[waypoint]]\nat = \"78N020W\"\ntiem = 2026-12-18T09:00:00Z"),
        "flight.toml:9:1: unknown field 'tiem'\n  hint: did you mean 'time'?",
    );
}

#[test]
fn a_value_of_the_wrong_kind_is_refused_with_the_right_one() {
    for (field, line, wanted) in [
        ("name", "name = 71", "2:8: 'name' is integer, but must be a string"),
        ("from", "from = 5", "3:8: 'from' is integer, but must be a code, coordinates or { lat, lon }"),
        ("takeoff", "takeoff = 5", "5:11: 'takeoff' is integer, but must be a date and time with an offset"),
        ("airborne", "airborne = 14.9", "6:12: 'airborne' is float, but must be a string"),
        ("name", "level_ft = \"high\"", "2:12: 'level_ft' is string, but must be a decimal number"),
        ("name", "level_ft = 0x10", "2:12: 'level_ft' is integer, but must be a decimal number"),
        ("name", "waypoint = 5", "2:12: 'waypoint' is integer, but must be written as [[waypoint]]"),
        ("name", "waypoint = [5]", "2:13: 'waypoint' is integer, but must be a table"),
        ("name", "polar_areas = true", "2:15: 'polar_areas' is boolean, but must be a table"),
    ] {
        assert_said(&with(field, line), &format!("flight.toml:{wanted}"));
    }
}

#[test]
fn times_are_read_with_an_offset_or_not_at_all() {
    let cure = "\n  hint: write 2026-12-18T05:10Z, or 2026-12-18T00:10-05:00 with an offset";
    for (given, said) in [
        ("2026-12-18T05:10:00", "'2026-12-18T05:10:00' says no offset from UTC"),
        ("2026-12-18", "'2026-12-18' is no date and time"),
        ("\"tomorrow\"", "'tomorrow' is no date and time"),
        ("\"2026-02-30T05:10Z\"", "'2026-02-30T05:10Z' is no date and time"),
    ] {
        assert_said(
            &with("takeoff", &format!("takeoff = {given}")),
            &format!("flight.toml:5:11: {said}{cure}"),
        );
    }
}

#[test]
fn years_that_are_not_answered_for_are_refused() {
    for (given, said) in [
        ("1972-12-31T23:59:59Z", "1972-12-31T23:59:59Z"),
        ("2100-01-01T00:00:00Z", "2100-01-01T00:00:00Z"),
        ("2099-12-31T23:30:00-01:00", "2099-12-31T23:30:00-01:00"),
    ] {
        assert_said(
            &with("takeoff", &format!("takeoff = {given}")),
            &format!("flight.toml:5:11: '{said}' is outside the years 1973 to 2099"),
        );
    }
    assert_said(
        &with("takeoff", "takeoff = 2099-12-31T20:00:00Z"),
        "flight.toml:6:12: '2100-01-01T10:55:00Z' is outside the years 1973 to 2099",
    );
}

#[test]
fn a_flight_that_no_aircraft_flies_is_refused() {
    assert_said(
        &with("airborne", r#"airborne = "40h""#),
        "flight.toml:6:12: 40.0 h in the air is outside 0 h to 36 h",
    );
    assert_said(
        &with("to =", r#"to = "CYYZ""#),
        "flight.toml: the flight from CYYZ to CYYZ has no length: both are the same place and no waypoint lies between",
    );
    let fast = said_of(&with("airborne", r#"airborne = "3h23m""#));
    assert!(
        fast.starts_with("flight.toml: from CYYZ to VHHH is 6787 NM in 203.0 min, a ground speed of 2006 kt"),
        "{fast}"
    );
    assert_said(
        &format!("{FLIGHT}level_ft = 60001"),
        "flight.toml:7:12: a level of 60001 ft is outside 0 ft to 60000 ft",
    );
}

#[test]
fn what_is_no_text_is_refused_as_such() {
    let cure = "  hint: a flight file is TOML in UTF-8: save it as UTF-8, not as UTF-16\n";
    let utf16 = |mark: bool| {
        let units = FLIGHT.encode_utf16().flat_map(u16::to_le_bytes);
        let mark = if mark { vec![0xff, 0xfe] } else { Vec::new() };
        mark.into_iter().chain(units).collect::<Vec<u8>>()
    };
    let binary: Vec<u8> = (0..=255).cycle().take(5000).collect();
    for (bytes, place) in [(utf16(true), 0), (utf16(false), 1), (binary, 128)] {
        let ran = run_fed(&bytes, &["brief", "-"]);
        let wanted = format!("gloamline: standard input: the file is not UTF-8 text (byte {place})\n{cure}");
        assert_eq!(ran.refused(), wanted);
    }
    for empty in ["", " \n\t\r\n", "\u{feff}"] {
        let said = said_of(empty);
        assert!(
            said.starts_with("flight.toml: the file is empty\n  hint: a flight file needs at least "),
            "{said}"
        );
    }
}

#[test]
fn a_byte_order_mark_is_no_hindrance() {
    let folder = folder(&[("flight.toml", &format!("\u{feff}{FLIGHT}"))]);
    run_in(folder.path(), &["brief", "flight.toml"]).done();
}

#[test]
fn broken_toml_is_refused_with_line_and_column() {
    for (line, place) in
        [("level_ft = = 3", "7:12"), ("level_ft", "7:9"), ("name = \"again\"", "7:1"), ("x = \"", "7:6")]
    {
        let said = said_of(&format!("{FLIGHT}{line}"));
        assert!(
            said.starts_with(&format!("flight.toml:{place}: cannot be read as TOML: ")),
            "{line}: {said}"
        );
    }
}

#[test]
fn nesting_without_end_is_refused() {
    let deep = 200_000;
    for text in [
        format!("a{} = 1", ".a".repeat(deep)),
        format!("a = {}{}", "[".repeat(deep), "]".repeat(deep)),
        format!("a = {}1{}", "{a=".repeat(deep), "}".repeat(deep)),
        format!("[{}a]", "a.".repeat(deep)),
    ] {
        let said = said_of(&text);
        assert!(said.contains("cannot be read as TOML: ") && said.contains("recurs"), "{said}");
    }
}

fn with_waypoints(count: usize) -> String {
    let mut text = FLIGHT.to_string();
    for i in 0..count {
        // a slow curve that stays within any speed
        let share = f64::from(u32::try_from(i).unwrap()) / 1e5;
        writeln!(text, "[[waypoint]]\nat = {{ lat = {}, lon = {} }}", 50.0 + 20.0 * share, -79.0 + share)
            .unwrap();
    }
    text
}

#[test]
fn twenty_thousand_waypoints_are_flown_and_more_are_refused_at_once() {
    let said = said_of(&with_waypoints(100_000));
    assert_eq!(said, "flight.toml:7:1: 100000 waypoints are more than the 20000 that a flight file may have");
    let folder = folder(&[("flight.toml", &with_waypoints(20_000))]);
    run_in(folder.path(), &["brief", "flight.toml"]).done();
}

#[test]
fn a_file_that_is_not_there_or_is_none_is_said_to_be_so() {
    let folder = folder(&[]);
    let ran = run_in(folder.path(), &["brief", "flight.toml"]);
    assert!(ran.refused().starts_with("gloamline: flight.toml: cannot be read: "), "{}", ran.err);
    let ran = run_in(folder.path(), &["brief", "."]);
    assert!(ran.refused().starts_with("gloamline: .: cannot be read: "), "{}", ran.err);
    let endless = vec![b'#'; 65 << 20];
    let ran = run_fed(&endless, &["brief", "-"]);
    assert_eq!(
        ran.refused(),
        "gloamline: standard input: longer than 64 MB, which no flight and no recording is\n"
    );
}

#[test]
fn missing_arguments_are_said_to_be_missing() {
    for (arguments, missing) in [
        (&["brief"][..], "<FLIGHT>"),
        (&["brief", "--from", "CYYZ"], "--to <PLACE>"),
        (&["brief", "--to", "CYYZ"], "--from <PLACE>"),
        (&["sun"], "<TIME>"),
        (&[], "Usage: gloamline"),
        (&["brief", "x.toml", "--as", "xml"], "text, json, csv"),
        (&["brief", "x.toml", "--from", "CYYZ", "--to", "VHHH", "--takeoff", "x"], "cannot be used with"),
    ] {
        let ran = run(arguments);
        assert!(ran.refused().contains(missing), "{arguments:?}: {}", ran.err);
    }
    assert!(run(&["--help"]).done().contains("Usage: gloamline"));
}
