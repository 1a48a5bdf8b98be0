//! Gzip: what is inside is read, and what is torn, damaged or a bomb is refused.

use flate2::Compression;
use flate2::write::GzEncoder;
use gloamline::intake::{InputKind, TrackOptions, kind_of, plain, tracks};
use std::fmt::Write as _;
use std::io::Write;

fn packed(bytes: &[u8]) -> Vec<u8> {
    let mut encoder = GzEncoder::new(Vec::new(), Compression::best());
    encoder.write_all(bytes).unwrap();
    encoder.finish().unwrap()
}

fn text() -> String {
    let mut text = "time,lat,lon\n".to_string();
    for i in 0..2000 {
        writeln!(text, "{},{:.5},10.{}", 1_797_570_600 + i, 60.0 + 0.001 * f64::from(i), i * 7919 % 1000)
            .unwrap();
    }
    text
}

fn refused(bytes: &[u8]) -> String {
    tracks(bytes, "a.csv.gz", &TrackOptions { max_speed_kt: 1e9, ..TrackOptions::default() })
        .unwrap_err()
        .to_string()
}

#[test]
fn gzip_is_told_by_its_content_and_read() {
    let text = text();
    let bytes = packed(text.as_bytes());
    assert_eq!(kind_of(&bytes, "a"), Some(InputKind::Csv));
    assert_eq!(kind_of(&packed(b"<gpx>"), "a.csv"), Some(InputKind::Gpx));
    assert_eq!(kind_of(&packed(b"from = 'CYYZ'"), "a"), Some(InputKind::Flight));
    assert_eq!(&*plain(&bytes, "a").unwrap(), text.as_bytes());
    let options = TrackOptions { max_speed_kt: 1e9, ..TrackOptions::default() };
    let inside = tracks(&bytes, "a.csv.gz", &options).unwrap();
    assert_eq!(inside, tracks(text.as_bytes(), "a.csv.gz", &options).unwrap());
    // RFC 1952, 2.2: members follow one another
    let half = text.len() / 2;
    let members = [packed(&text.as_bytes()[..half]), packed(&text.as_bytes()[half..])].concat();
    assert_eq!(inside, tracks(&members, "a.csv.gz", &options).unwrap());
}

#[test]
fn gzip_that_ends_early_is_refused_at_every_length() {
    let bytes = packed(text().as_bytes());
    for length in [bytes.len() - 1, bytes.len() - 8, bytes.len() / 2, 100, 20] {
        let what = refused(&bytes[..length]);
        assert!(what.starts_with("a.csv.gz: the gzip data end early, after "), "{length}: {what}");
    }
    for length in 3..bytes.len() {
        assert!(plain(&bytes[..length], "a").is_err(), "{length}");
    }
}

#[test]
fn damaged_gzip_is_refused() {
    let mut bytes = packed(text().as_bytes());
    let check = bytes.len() - 6;
    bytes[check] ^= 1;
    assert!(refused(&bytes).starts_with("a.csv.gz: the gzip data are damaged after "));
    assert_eq!(refused(&packed(&packed(b"x"))), "a.csv.gz: the file is gzip within gzip");
}

#[test]
fn a_bomb_is_refused() {
    let bomb = packed(&vec![b'0'; 20 << 20]);
    assert!(bomb.len() < 30_000);
    assert_eq!(
        refused(&bomb),
        "a.csv.gz: the gzip data swell to more than 200 times their size, as no track does"
    );
}
