//! Levels and shares of brightness, in flight files and as an option.

use super::{FLIGHT, folder, run_in};

fn told(text: &str, more: &[&str]) -> serde_json::Value {
    let folder = folder(&[("flight.toml", text)]);
    let arguments = [&["brief", "flight.toml", "--as", "json"], more].concat();
    serde_json::from_str(&run_in(folder.path(), &arguments).done()).unwrap()
}

fn levels(record: &serde_json::Value) -> Vec<f64> {
    let rows = record["illuminance"]["seconds_above"].as_array().unwrap();
    rows.iter().map(|row| row["lux"].as_f64().unwrap()).collect()
}

#[test]
fn levels_come_from_the_file_before_the_option_before_the_usual_ones() {
    assert_eq!(levels(&told(FLIGHT, &[])), [1.0, 10.0, 100.0, 1000.0, 10_000.0]);
    assert_eq!(levels(&told(FLIGHT, &["--lux-levels=250,50"])), [50.0, 250.0]);
    let own = format!("{FLIGHT}lux_levels = [3.4, 2, 3.4]\n");
    assert_eq!(levels(&told(&own, &["--lux-levels=250"])), [2.0, 3.4]);
}

#[test]
fn the_light_inside_is_what_the_planners_own_factors_make_of_it() {
    assert!(told(FLIGHT, &[])["illuminance"].get("inside").is_none());
    let own = format!("{FLIGHT}transmittance = 0.7\nview_factor = 0.25\n");
    let record = told(&own, &[]);
    let (outside, inside) = (&record["illuminance"]["lux_hours"], &record["illuminance"]["inside"]);
    let share = inside["inside_lux_hours"].as_f64().unwrap() / outside.as_f64().unwrap();
    // both are printed to five figures
    assert!((share / 0.175 - 1.0).abs() < 1e-4, "{share}");
    assert!(inside["meaning"].as_str().unwrap().contains("user's own"));
    let one = told(&format!("{FLIGHT}view_factor = 0.5\n"), &[]);
    assert!(one["illuminance"]["inside"].get("transmittance").is_none());
}

#[test]
fn a_level_or_share_that_cannot_be_is_refused_with_its_place() {
    for (line, wanted) in [
        ("transmittance = 0", ":7:17: a transmittance of 0 is not above 0 and up to 1"),
        ("view_factor = 1.5", ":7:15: a view_factor of 1.5 is not above 0 and up to 1"),
        ("view_factor = nan", ":7:15: a view_factor of NaN is not above 0 and up to 1"),
        ("lux_levels = [1, 0]", ":7:14: a level of 0 lx is not above 0 lx and up to 200000 lx"),
        ("lux_levels = [inf]", ":7:14: a level of inf lx is not above 0 lx and up to 200000 lx"),
        ("lux_levels = 5", ":7:14: 'lux_levels' is integer, but must be an array of numbers"),
        ("lux_levels = [\"5\"]", ":7:15: 'lux_levels' is string, but must be a decimal number"),
        ("lux_level = [5]", ":7:1: unknown field 'lux_level'\n  hint: did you mean 'lux_levels'?"),
        ("transmitance = 0.5", ":7:1: unknown field 'transmitance'\n  hint: did you mean 'transmittance'?"),
    ] {
        let folder = folder(&[("flight.toml", &format!("{FLIGHT}{line}\n"))]);
        let ran = run_in(folder.path(), &["brief", "flight.toml"]);
        assert!(ran.refused().contains(wanted), "{line}: {}", ran.err);
    }
    let many = vec!["1"; 33].join(", ");
    let folder = folder(&[("flight.toml", &format!("{FLIGHT}lux_levels = [{many}]\n"))]);
    let ran = run_in(folder.path(), &["brief", "flight.toml"]);
    assert!(ran.refused().contains("33 levels of brightness are more than the 32"), "{}", ran.err);
}

#[test]
fn a_level_on_the_command_line_is_held_to_the_same_range() {
    let folder = folder(&[("flight.toml", FLIGHT)]);
    for value in ["-1", "0", "nan", "1,300000"] {
        let option = format!("--lux-levels={value}");
        let ran = run_in(folder.path(), &["brief", "flight.toml", &option]);
        assert!(ran.refused().contains("--lux-levels: a level of "), "{value}: {}", ran.err);
    }
}
