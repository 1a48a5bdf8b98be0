//! Several flights in one run: the good ones are done, the bad ones named, and the exit code tells.

use super::{FLIGHT, Ran, folder, names, run_fed, run_in};

fn json(ran: &Ran) -> serde_json::Value {
    serde_json::from_str(&ran.out).unwrap()
}

#[test]
fn one_bad_flight_does_not_keep_the_good_ones_back() {
    let bad = FLIGHT.replace("CYYZ", "CYYX");
    let folder = folder(&[("a.toml", FLIGHT), ("b.toml", &bad), ("c.toml", FLIGHT), ("d.toml", FLIGHT)]);
    let all = ["brief", "a.toml", "b.toml", "c.toml", "d.toml", "--as", "json", "--out", "out"];
    let ran = run_in(folder.path(), &all);
    assert_eq!(ran.code, Some(1));
    assert!(ran.err.starts_with("gloamline: b.toml:3:8: no aerodrome has the code CYYX\n"), "{}", ran.err);
    assert_eq!(json(&ran).as_array().unwrap().len(), 3);
    assert_eq!(names(&folder.path().join("out")).len(), 21);
}

#[test]
fn flights_that_are_all_bad_are_a_failure() {
    let bad = FLIGHT.replace("CYYZ", "CYYX");
    let folder = folder(&[("a.toml", &bad), ("b.toml", "")]);
    let ran = run_in(folder.path(), &["brief", "a.toml", "b.toml", "c.toml", "--out", "out"]);
    let said = ran.refused();
    assert_eq!(said.matches("gloamline: ").count(), 3, "{said}");
    assert_eq!(names(folder.path()), ["a.toml", "b.toml"], "no folder is made for nothing");
}

#[test]
fn flights_of_one_name_are_numbered() {
    let folder = folder(&[
        ("a.toml", FLIGHT),
        ("b.toml", &FLIGHT.replace("Varde 71", "VARDE  71")),
        ("c.toml", &FLIGHT.replace("Varde 71", "varde-71-2")),
        ("d.toml", FLIGHT),
    ]);
    let all = ["brief", "a.toml", "b.toml", "c.toml", "d.toml", "--out", "out"];
    run_in(folder.path(), &all).done();
    let found = names(&folder.path().join("out"));
    let texts: Vec<&str> = found.iter().filter_map(|name| name.strip_suffix(".txt")).collect();
    assert_eq!(texts, ["varde-71-2-2", "varde-71-2", "varde-71-3", "varde-71"]);
    assert_eq!(found.len(), 28);
}

#[test]
fn a_dash_reads_standard_input() {
    let ran = run_fed(FLIGHT.as_bytes(), &["brief", "-", "--as", "json"]);
    assert_eq!((ran.code, ran.err.as_str()), (Some(0), ""));
    assert_eq!(json(&ran)["flight"]["name"], "Varde 71");
    let bad = run_fed(b"from = 5", &["brief", "-"]);
    assert!(bad.refused().starts_with("gloamline: standard input:1:8: 'from' is integer"), "{}", bad.err);
}

#[test]
fn several_flights_are_an_array_and_one_is_an_object() {
    let folder = folder(&[("a.toml", FLIGHT), ("b.toml", FLIGHT)]);
    let one = json(&run_in(folder.path(), &["brief", "a.toml", "--as", "json"]));
    let two = json(&run_in(folder.path(), &["brief", "a.toml", "b.toml", "--as", "json"]));
    assert!(one.is_object());
    assert_eq!(two.as_array().unwrap()[..], [one.clone(), one]);
}
