//! A flight as it was recorded, clean and then soiled in every way at once.

use super::{mended, only};
use gloamline::intake::{Track, TrackOptions, tracks};

fn recording() -> String {
    std::fs::read_to_string(crate::tables::folder().join("recorded-track/flight.csv")).unwrap()
}

/// The rows below the header, and what stands above them with it.
fn parted(text: &str) -> (String, Vec<String>) {
    let (head, body) = text.split_once("altitude_ft\n").unwrap();
    (format!("{head}altitude_ft\n"), body.lines().map(str::to_string).collect())
}

fn is_as_recorded(track: &Track, rows: &[String]) {
    assert_eq!(track.points.len(), rows.len());
    for (point, row) in track.points.iter().zip(rows) {
        let cells: Vec<f64> = row.split(',').map(|cell| cell.parse().unwrap()).collect();
        assert_eq!(point.instant.utc().timestamp() as f64, cells[0]);
        // 1e-12°, the rounding of a degree held in radians
        assert!((point.place.lat.deg() - cells[1]).abs() < 1e-12);
        assert!((point.place.lon.deg() - cells[2]).abs() < 1e-12);
        // 1e-9 ft, the rounding of a foot held in metres
        assert!((point.height.unwrap().feet() - cells[3]).abs() < 1e-9);
    }
}

#[test]
fn a_recorded_flight_needs_no_repair() {
    let text = recording();
    let track = only(&text, "flight.csv");
    is_as_recorded(&track, &parted(&text).1);
    assert_eq!(mended(&track), [""; 0]);
    assert_eq!(track.origin.to_string(), ":10:1");
}

#[test]
fn its_one_long_silence_is_found() {
    let options = TrackOptions { gap_s: 100.0, ..TrackOptions::default() };
    let read = tracks(recording().as_bytes(), "flight.csv", &options).unwrap();
    let silences: Vec<f64> = read.tracks[0].repairs.bridges().map(|b| b.to.since_s(b.from)).collect();
    assert_eq!(silences, [290.0]);
}

#[test]
fn the_same_flight_soiled_comes_out_as_it_was() {
    let text = recording();
    let (head, clean) = parted(&text);
    let mut rows = clean.clone();
    for row in (50..1600).step_by(97) {
        rows.push(clean[row].clone());
        // three seconds after a point, a third of the way round the Earth
        let second: i64 = clean[row][..10].parse().unwrap();
        rows.push(format!("{},-30.5,{},35000", second + 3, row % 180));
        rows.push(format!("{},0,0,35000", second + 4));
        rows.push(format!("{},,,35000", second + 5));
        rows.swap(row, row + 20);
    }
    let track = only(&(head + &rows.join("\r\n")), "flight.csv");
    is_as_recorded(&track, &clean);
    let said = mended(&track);
    assert_eq!(said[0], "16 points without a position that exists dropped");
    assert_eq!(said[1], "16 points at exactly 0°, 0° dropped");
    assert!(said[2].ends_with("out of order sorted by time"));
    assert_eq!(said[3], "16 points with a time and place already given dropped");
    assert_eq!(said[4..], ["16 points needing more than 1500 kt dropped"]);
}
