//! How long the horizon and the Moon take: `cargo bench --bench sky`.
#![allow(clippy::unwrap_used, reason = "a benchmark on a flight that cannot be flown should stop")]

use divan::{Bencher, black_box};
use gloamline::sky::{
    GeometricElevation, GroundAir, Horizon, Sky, apparent_aloft, apparent_from_ground, sine_of_elevation,
};
use gloamline::units::{Angle, Instant, Metres, Place};

fn main() {
    divan::main();
}

#[divan::bench]
fn horizon_built() -> Horizon {
    Horizon::clear_sea()
}

#[divan::bench]
fn horizon_limit(bencher: Bencher<'_, '_>) {
    let sea = Horizon::clear_sea();
    let semidiameter = Angle::from_arcmin(16.0);
    bencher.bench_local(|| sea.sun_centre_limit(black_box(Metres(10_668.0)), semidiameter));
}

#[divan::bench]
fn horizon_dip(bencher: Bencher<'_, '_>) {
    let sea = Horizon::clear_sea();
    bencher.bench_local(|| sea.dip(black_box(Metres(10_668.0))));
}

#[divan::bench]
fn seen_from_the_ground(bencher: Bencher<'_, '_>) {
    let low = GeometricElevation(Angle::from_deg(0.5));
    bencher.bench_local(|| apparent_from_ground(black_box(low), GroundAir::default()));
}

#[divan::bench]
fn seen_from_aloft(bencher: Bencher<'_, '_>) {
    let low = GeometricElevation(Angle::from_deg(-2.5));
    bencher.bench_local(|| apparent_aloft(black_box(low), Metres(10_668.0)));
}

#[divan::bench]
fn moon_piece_built(bencher: Bencher<'_, '_>) {
    bencher
        .with_inputs(Sky::default)
        .bench_local_values(|sky| sky.moon_at(black_box(Instant::from_seconds(8.5e8))));
}

#[divan::bench]
fn moon_elevation_at_a_time(bencher: Bencher<'_, '_>) {
    let sky = Sky::default();
    let begin = Instant::from_seconds(8.5e8);
    let window = sky.moon_window(begin, begin.after_s(43_200.0));
    let normal = Place::from_deg(60.0, 25.0).expect("a place").normal();
    bencher.bench_local(|| sine_of_elevation(normal, &window.at(black_box(20_000.0))));
}

#[divan::bench]
fn moon_phase(bencher: Bencher<'_, '_>) {
    let sky = Sky::default();
    let at = Instant::from_seconds(8.5e8);
    let (moon, sun) = (sky.moon_at(at), sky.sun_at(at));
    bencher.bench_local(|| moon.phase(black_box(&sun)));
}
