//! How long the whole program takes, from its start to its exit: `cargo bench --bench process`.
#![allow(clippy::unwrap_used, reason = "a benchmark whose program cannot run should stop")]

use divan::Bencher;
use std::process::{Command, Stdio};

fn main() {
    divan::main();
}

/// Runs the built program on a demo flight, its output thrown away.
fn run(arguments: &[&str]) {
    let status = Command::new(env!("CARGO_BIN_EXE_gloamline"))
        .current_dir(env!("CARGO_MANIFEST_DIR"))
        .args(arguments)
        .stdout(Stdio::null())
        .status()
        .unwrap();
    assert!(status.success());
}

const FLIGHT: &str = "demo-flights/varde-225-timed-waypoints.toml";

#[divan::bench]
fn a_program_that_only_says_its_version() {
    run(&["--version"]);
}

#[divan::bench]
fn a_brief_without_pictures() {
    run(&["brief", FLIGHT]);
}

#[divan::bench]
fn a_brief_with_its_files_and_both_pictures(bencher: Bencher<'_, '_>) {
    let folder = tempfile::tempdir().unwrap();
    let out = folder.path().to_str().unwrap();
    bencher.bench_local(|| run(&["brief", FLIGHT, "--out", out]));
}

#[divan::bench]
fn the_sun_at_a_place() {
    run(&["sun", "2026-12-18T05:10Z", "ENSB"]);
}
