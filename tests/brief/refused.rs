//! Flight files whose limits, airs or alternates cannot be: refused with line, column and range.

use gloamline::intake::flight_file;
use std::fmt::Write;

const FLIGHT: &str =
    "from = \"CYYZ\"\nto = \"VHHH\"\ntakeoff = 2026-12-18T05:10:00Z\nairborne = \"14h55m\"\n";

fn assert_said(more: &str, wanted: &str) {
    let error = flight_file(&format!("{FLIGHT}{more}"), "f.toml").unwrap_err();
    let hint = error.hint().map_or(String::new(), |hint| format!("\n{hint}"));
    assert_eq!(format!("{error}{hint}"), wanted, "\nof: {more}");
}

#[test]
fn limits_of_a_low_sun_that_cannot_be_are_refused() {
    for (line, wanted) in [
        ("sector_deg = 0.5", "f.toml:6:14: 'sector_deg' of 0.5 is outside 1 to 90"),
        ("sector_deg = 91", "f.toml:6:14: 'sector_deg' of 91 is outside 1 to 90"),
        ("sector_deg = nan", "f.toml:6:14: 'sector_deg' of NaN is outside 1 to 90"),
        ("strong_deg = 26", "f.toml:6:14: 'strong_deg' of 26 is outside 0 to 25"),
        ("strong_deg = -1", "f.toml:6:14: 'strong_deg' of -1 is outside 0 to 25"),
        ("up_to_deg = 61.0", "f.toml:6:13: 'up_to_deg' of 61 is outside 0 to 60"),
        ("up_to_deg = \"low\"", "f.toml:6:13: 'up_to_deg' is string, but must be a decimal number"),
        ("sektor_deg = 3", "f.toml:6:1: unknown field 'sektor_deg'\ndid you mean 'sector_deg'?"),
    ] {
        assert_said(&format!("[low_sun]\n{line}\n"), wanted);
    }
    assert_said("low_sun = 5", "f.toml:5:11: 'low_sun' is integer, but must be a table");
}

#[test]
fn a_narrow_sector_is_strong_throughout_unless_it_is_told_otherwise() {
    let limits = |lines: &str| {
        let limits = flight_file(&format!("{FLIGHT}[low_sun]\n{lines}"), "f").unwrap().low_sun.unwrap();
        [limits.sector, limits.strong, limits.up_to].map(|angle| (angle.deg() * 1e9).round() / 1e9)
    };
    assert_eq!(limits(""), [25.0, 10.0, 15.0]);
    assert_eq!(limits("sector_deg = 6"), [6.0, 6.0, 15.0]);
    assert_eq!(limits("sector_deg = 6\nstrong_deg = 0\nup_to_deg = 60"), [6.0, 0.0, 60.0]);
}

#[test]
fn air_that_cannot_be_is_refused() {
    for table in ["from_air", "to_air"] {
        for (line, wanted) in [
            ("pressure_hpa = 29.92", "6:16: 'pressure_hpa' of 29.92 is outside 500 to 1100"),
            ("pressure_hpa = inf", "6:16: 'pressure_hpa' of inf is outside 500 to 1100"),
            ("temperature_c = 280", "6:17: 'temperature_c' of 280 is outside -90 to 60"),
            ("temperature = 3", "6:1: unknown field 'temperature'\ndid you mean 'temperature_c'?"),
        ] {
            assert_said(&format!("[{table}]\n{line}\n"), &format!("f.toml:{wanted}"));
        }
        assert_said(
            &format!("{table} = 1013"),
            &format!("f.toml:5:{}: '{table}' is integer, but must be a table", table.len() + 4),
        );
    }
}

#[test]
fn alternates_that_cannot_be_are_refused() {
    for (lines, wanted) in [
        ("after = \"45m\"", "f.toml:5:1: the field 'at' is missing"),
        ("at = \"91,0\"", "f.toml:6:6: latitude 91° is outside −90° to 90°"),
        ("at = 7", "f.toml:6:6: 'at' is integer, but must be a code, coordinates or { lat, lon }"),
        ("at = \"BGSF\"\nafter = \"soon\"", "f.toml:7:9: 'soon' is no duration\nwrite 14h55m, 14h or 55m"),
        ("at = \"BGSF\"\nafter = \"-5m\"", "f.toml:7:9: '-5m' is no duration\nwrite 14h55m, 14h or 55m"),
        ("at = \"BGSF\"\nafter = 45", "f.toml:7:9: 'after' is integer, but must be a string"),
        ("at = \"BGSF\"\nafter = \"24h30m\"", "f.toml:7:9: 'after' of 24.5 h is outside 0 h to 24 h"),
        ("at = \"BGSF\"\nafetr = \"45m\"", "f.toml:7:1: unknown field 'afetr'\ndid you mean 'after'?"),
    ] {
        assert_said(&format!("[[alternate]]\n{lines}\n"), wanted);
    }
    assert_said(
        "alternate = \"BGSF\"",
        "f.toml:5:13: 'alternate' is string, but must be written as [[alternate]]",
    );
    assert_said("alternate = [3]", "f.toml:5:14: 'alternate' is integer, but must be a table");
    let late = "from = \"EGLL\"\nto = \"LFPG\"\ntakeoff = 2099-12-31T21:00:00Z\nairborne = \"1h\"\n[[alternate]]\nat = \"EGKK\"\nafter = \"3h\"";
    let error = flight_file(late, "f.toml").unwrap_err().to_string();
    assert_eq!(error, "f.toml:5:1: '2100-01-01T01:00:00Z' is outside the years 1973 to 2099");
}

#[test]
fn fifty_alternates_are_taken_and_more_are_refused() {
    let with = |count: usize| {
        let mut text = FLIGHT.to_string();
        for i in 0..count {
            writeln!(text, "[[alternate]]\nat = {{ lat = {i}, lon = 5 }}").unwrap();
        }
        flight_file(&text, "f.toml")
    };
    assert_eq!(with(50).unwrap().alternates.len(), 50);
    let error = with(51).unwrap_err().to_string();
    assert_eq!(error, "f.toml:5:1: 51 alternates are more than the 50 that a flight file may have");
}
