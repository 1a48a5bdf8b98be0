//! How long the heart of the matter takes: `cargo bench --bench light`.
#![allow(clippy::unwrap_used, reason = "a benchmark on a flight that cannot be flown should stop")]

use chrono::{DateTime, Utc};
use divan::{Bencher, black_box};
use gloamline::intake::{Flight, Inline, inline_flight};
use gloamline::light::along;
use gloamline::path::{Line, fly};
use gloamline::sky::{Sky, sine_of_elevation};
use gloamline::units::{Instant, Place};

fn main() {
    divan::main();
}

fn flight(from: &str, to: &str, takeoff: &str, airborne: &str) -> Flight {
    inline_flight(&Inline { from, to, takeoff, airborne: Some(airborne), ..Inline::default() }).unwrap()
}

/// Twelve hours and ten crossings' worth of terminator.
fn twelve_hours() -> Flight {
    flight("EFHK", "SCEL", "2026-03-12T16:30Z", "12h")
}

#[divan::bench]
fn elevation_at_a_time_along_a_path(bencher: Bencher<'_, '_>) {
    let (sky, path) = (Sky::default(), fly(&twelve_hours()).unwrap());
    let window = sky.window(path.takeoff, path.landing());
    let leg = &path.legs()[0];
    bencher
        .bench_local(|| sine_of_elevation(leg.normal(black_box(20_000.0)), &window.at(black_box(20_000.0))));
}

#[divan::bench]
fn sun_at_a_time(bencher: Bencher<'_, '_>) {
    let (sky, path) = (Sky::default(), fly(&twelve_hours()).unwrap());
    let window = sky.window(path.takeoff, path.landing());
    bencher.bench_local(|| window.at(black_box(20_000.0)));
}

#[divan::bench]
fn normal_at_a_time(bencher: Bencher<'_, '_>) {
    let path = fly(&twelve_hours()).unwrap();
    let leg = &path.legs()[0];
    bencher.bench_local(|| leg.normal(black_box(20_000.0)));
}

#[divan::bench]
fn geodesic_between_two_places(bencher: Bencher<'_, '_>) {
    let (from, to) = (Place::from_deg(60.3, 25.0).unwrap(), Place::from_deg(-33.4, -70.8).unwrap());
    bencher.bench_local(|| Line::between(black_box(from), black_box(to)));
}

/// The bar: all crossings at four limits, the geodesic's inverse problem included, once the Sun's tables exist.
#[divan::bench]
fn all_crossings_of_a_twelve_hour_flight(bencher: Bencher<'_, '_>) {
    let (sky, flight) = (Sky::default(), twelve_hours());
    bencher.bench_local(|| along(&fly(black_box(&flight)).unwrap(), &sky));
}

#[divan::bench]
fn all_crossings_once_the_path_is_flown(bencher: Bencher<'_, '_>) {
    let (sky, path) = (Sky::default(), fly(&twelve_hours()).unwrap());
    bencher.bench_local(|| along(black_box(&path), &sky));
}

#[divan::bench]
fn all_crossings_of_a_two_hour_flight(bencher: Bencher<'_, '_>) {
    let (sky, flight) = (Sky::default(), flight("ENTC", "ENSB", "2026-10-20T12:00Z", "2h"));
    bencher.bench_local(|| along(&fly(black_box(&flight)).unwrap(), &sky));
}

#[divan::bench]
fn one_piece_of_the_suns_table(bencher: Bencher<'_, '_>) {
    let utc: DateTime<Utc> = "2026-03-12T16:30:00Z".parse().unwrap();
    bencher.bench_local(|| Sky::default().sun_at(black_box(Instant::from_utc(utc))));
}
