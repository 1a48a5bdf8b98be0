//! Output that cannot be written: whole or not at all, and never in silence.

use super::{FLIGHT, folder, names, program, run_in};
use std::io::Read;
use std::process::Stdio;

#[test]
fn a_file_in_the_way_of_the_folder_is_named() {
    let folder = folder(&[("a.toml", FLIGHT), ("out", "in the way")]);
    let ran = run_in(folder.path(), &["brief", "a.toml", "--out", "out"]);
    assert!(ran.err.starts_with("gloamline: out: cannot be written: "), "{}", ran.err);
    assert_eq!(ran.code, Some(2), "nothing was written");
    assert_eq!(std::fs::read_to_string(folder.path().join("out")).unwrap(), "in the way");
}

#[test]
fn a_flight_whose_files_cannot_all_be_named_leaves_none() {
    for ending in ["txt", "json", "csv", "geojson", "kml"] {
        let folder = folder(&[("a.toml", FLIGHT)]);
        let blocked = format!("varde-71.{ending}");
        std::fs::create_dir_all(folder.path().join("out").join(&blocked)).unwrap();
        let ran = run_in(folder.path(), &["brief", "a.toml", "--out", "out"]);
        assert_eq!(ran.code, Some(2), "{}", ran.err);
        assert!(ran.err.contains(&blocked) && ran.err.contains("cannot be written: "), "{}", ran.err);
        assert_eq!(names(&folder.path().join("out")), [blocked]);
    }
}

#[test]
fn one_flight_that_cannot_be_written_does_not_keep_the_others_back() {
    let folder = folder(&[("a.toml", FLIGHT), ("b.toml", &FLIGHT.replace("Varde 71", "Other"))]);
    std::fs::create_dir_all(folder.path().join("out/other.csv")).unwrap();
    let ran = run_in(folder.path(), &["brief", "a.toml", "b.toml", "--out", "out"]);
    assert_eq!(ran.code, Some(1), "{}", ran.err);
    let found = names(&folder.path().join("out"));
    assert_eq!(
        found,
        [
            "other.csv",
            "varde-71.csv",
            "varde-71.geojson",
            "varde-71.json",
            "varde-71.kml",
            "varde-71.png",
            "varde-71.svg",
            "varde-71.txt"
        ]
    );
}

#[test]
fn files_of_an_earlier_run_are_replaced() {
    let folder = folder(&[("a.toml", FLIGHT)]);
    let brief = || run_in(folder.path(), &["brief", "a.toml", "--out", "out"]).done();
    brief();
    let text = folder.path().join("out/varde-71.txt");
    let first = std::fs::read(&text).unwrap();
    std::fs::write(&text, "old").unwrap();
    brief();
    assert_eq!(std::fs::read(&text).unwrap(), first);
    assert_eq!(names(&folder.path().join("out")).len(), 7);
}

#[cfg(target_os = "linux")]
#[test]
fn a_full_disk_behind_standard_output_is_a_failure() {
    let folder = folder(&[("a.toml", FLIGHT)]);
    for arguments in [&["brief", "a.toml"][..], &["brief", "a.toml", "--as=csv"], &["sun", "--year=2026"]] {
        let full = std::fs::OpenOptions::new().write(true).open("/dev/full").unwrap();
        let output = program().current_dir(folder.path()).args(arguments).stdout(full).output().unwrap();
        let said = String::from_utf8(output.stderr).unwrap();
        assert_eq!(output.status.code(), Some(2), "{said}");
        assert!(said.starts_with("gloamline: standard output: "), "{said}");
    }
}

/// A limit on the size of a file stands for a full disk: the write fails in the middle of the file.
#[cfg(unix)]
#[test]
fn a_disk_that_fills_up_leaves_no_file_behind() {
    let folder = folder(&[("a.toml", FLIGHT)]);
    std::fs::create_dir(folder.path().join("out")).unwrap();
    let script = format!(
        "trap '' XFSZ; ulimit -f 32; exec '{}' brief a.toml --out out",
        env!("CARGO_BIN_EXE_gloamline")
    );
    let output = std::process::Command::new("bash").args(["-c", &script]).current_dir(folder.path()).output();
    let output = output.unwrap();
    let said = String::from_utf8(output.stderr).unwrap();
    assert_eq!(output.status.code(), Some(2), "{said}");
    assert!(said.contains("out/varde-71.csv: cannot be written: "), "{said}");
    assert!(names(&folder.path().join("out")).is_empty());
}

#[test]
fn a_reader_that_goes_away_has_what_it_wanted() {
    let folder = folder(&[("a.toml", FLIGHT)]);
    let files = ["a.toml"; 40];
    let mut child = program()
        .current_dir(folder.path())
        .args([&["brief", "--as=csv"], &files[..]].concat())
        .stdout(Stdio::piped())
        .stderr(Stdio::piped())
        .spawn()
        .unwrap();
    let mut first = [0; 6];
    child.stdout.take().unwrap().read_exact(&mut first).unwrap();
    assert_eq!(&first, b"flight");
    let output = child.wait_with_output().unwrap();
    assert_eq!((output.status.code(), output.stderr.as_slice()), (Some(0), &b""[..]));
}
