//! Routes and a user's own fixes from the command line.

use super::{folder, run, run_in};

const ENDS: [&str; 5] =
    ["brief", "--from=CYYZ", "--to=VHHH", "--takeoff=2026-12-18T05:10Z", "--airborne=14h55m"];

#[test]
fn a_bad_row_of_fixes_is_told_and_the_flight_is_flown_by_the_others() {
    let folder = folder(&[("fixes.csv", "name,lat,lon\nNOVEM,78,-40\nBROKE,x,1\n")]);
    let route = ["--route", "novem 5275N", "--fixes", "fixes.csv", "--as=json"];
    let ran = run_in(folder.path(), &[&ENDS[..], &route].concat());
    assert_eq!(ran.code, Some(1), "{}", ran.err);
    assert_eq!(
        ran.err,
        "gloamline: fixes.csv:3:1: 'x' is no number of degrees\n  hint: write decimal degrees, such as 78.5 and -20\n"
    );
    assert!(ran.out.contains("\"warnings\": [\n    \"'5275N' was taken for 5200N07500W"), "{}", ran.out);
}

#[test]
fn warnings_stand_in_the_text() {
    let said = run(&[&ENDS[..], &["--route=5275N"]].concat()).done();
    assert!(said.contains("\nWarnings\n  - '5275N' was taken for 5200N07500W, as navigation"), "{said}");
}

#[test]
fn fixes_that_are_no_text_are_refused_line_by_line_and_their_number_is_told() {
    let folder = folder(&[("long.csv", &format!("NOVEM,78,-40\n{}\nOTHER,78,-41\n", "x".repeat(1 << 17)))]);
    std::fs::write(folder.path().join("wild.csv"), [0xff, 0xfe, b'\n'].repeat(100)).unwrap();
    let with = |file: &str| run_in(folder.path(), &[&ENDS[..], &["--route=OTHER", "--fixes", file]].concat());
    let ran = with("long.csv");
    assert_eq!(ran.code, Some(1));
    assert_eq!(
        ran.err,
        "gloamline: long.csv:2:1: the line is not UTF-8 text of ordinary length\n  hint: save the file as UTF-8, not as UTF-16\n"
    );
    let ran = with("wild.csv");
    assert!(ran.refused().contains("wild.csv: 80 more rows were refused\n"), "{}", ran.err);
    assert!(with("none.csv").refused().starts_with("gloamline: none.csv: cannot be read"));
}

#[test]
fn a_ground_speed_stands_for_the_time_in_the_air() {
    let ends = &ENDS[..4];
    let said = run(&[ends, &["--ground-speed-kt=480", "--route=78N040W"]].concat()).done();
    assert!(said.contains("Landing "), "{said}");
    let ran = run(&[ends, &["--ground-speed-kt=-480"]].concat());
    assert_eq!(
        ran.refused(),
        "gloamline: --ground-speed-kt: 'ground_speed_kt' of -480 is outside 10 to 1500\n"
    );
    let ran = run(&[&ENDS[..], &["--ground-speed-kt=300"]].concat());
    assert!(ran.refused().contains("more than 1 % apart, so leave one of them out"), "{}", ran.err);
}
