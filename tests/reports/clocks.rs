//! Local times in the text, where clocks go forward or back while a flight is in the air.

use chrono::{DateTime, SubsecRound, Utc};
use gloamline::intake::flight_file;
use gloamline::sky::Sky;
use gloamline::units::Instant;
use gloamline::{Brief, brief, reports};
use std::sync::LazyLock;

static SKY: LazyLock<Sky> = LazyLock::new(Sky::default);

/// Flights with a change of clocks at one of their ends while they are in the air, or an odd zone.
const FLIGHTS: [(&str, &str, &str, &str); 12] = [
    // Toronto goes forward at 07:00Z, London at 01:00Z, Helsinki with it
    ("CYYZ", "EGLL", "2026-03-08T04:30:00Z", "7h10m"),
    ("EGLL", "CYYZ", "2026-03-08T03:00:00Z", "7h40m"),
    ("EGLL", "VHHH", "2026-03-28T22:00:00Z", "12h30m"),
    ("EFHK", "RJTT", "2026-03-28T21:00:00Z", "13h20m"),
    // and back: the hours from 05:00Z to 07:00Z read alike in Toronto
    ("CYYZ", "VHHH", "2026-11-01T03:10:00Z", "14h55m"),
    ("KJFK", "EGLL", "2026-11-01T05:30:00Z", "6h50m"),
    ("VHHH", "EGLL", "2026-10-24T17:00:00Z", "13h30m"),
    // half and quarter hours; the date line; the south, where spring is in September
    ("YSSY", "YLHI", "2026-10-03T14:00:00Z", "2h0m"),
    ("NZAA", "SCEL", "2026-09-26T10:30:00Z", "11h15m"),
    ("NZCH", "PHNL", "2026-04-04T12:00:00Z", "9h30m"),
    ("VNKT", "VIDP", "2026-05-01T23:00:00Z", "1h40m"),
    ("CYYT", "EGLL", "2005-10-30T00:30:00Z", "5h20m"),
];

fn briefed((from, to, takeoff, airborne): (&str, &str, &str, &str)) -> Brief {
    let text = format!(
        "from = \"{from}\"\nto = \"{to}\"\ntakeoff = {takeoff}\nairborne = \"{airborne}\"\nname = \"t\""
    );
    brief(flight_file(&text, "clocks").unwrap(), &SKY).unwrap()
}

/// The lines below a heading, parted into their columns.
fn rows(text: &str, heading: &str) -> Vec<Vec<String>> {
    let below = text.lines().skip_while(|line| *line != heading).skip(1);
    let own = below.take_while(|line| !line.is_empty());
    own.map(|line| {
        line.trim().split("  ").map(str::trim).filter(|c| !c.is_empty()).map(String::from).collect()
    })
    .collect()
}

fn to_second(instant: Instant) -> DateTime<Utc> {
    instant.utc().round_subsecs(0)
}

/// A zone's clock as chrono-tz has it, with the days by which its date is not that of UTC.
fn clock(instant: Instant, zone: chrono_tz::Tz) -> String {
    let utc = to_second(instant);
    let local = utc.with_timezone(&zone);
    let days = (local.date_naive() - utc.date_naive()).num_days();
    let mark = ["−1", "", "+1"][usize::try_from(days + 1).unwrap()];
    format!("{}{mark}", local.format("%H:%M"))
}

#[test]
fn the_local_times_of_every_row_are_those_of_the_zones() {
    let mut crossings = 0;
    for given in FLIGHTS {
        let brief = briefed(given);
        let text = reports::text(&brief);
        let zones = [&brief.flight.from, &brief.flight.to].map(|stop| stop.zone.unwrap());
        let at = |at_s: f64| brief.path.takeoff.after_s(at_s);
        let own: Vec<f64> = brief.light.crossings.iter().map(|c| c.at_s).collect();
        for (row, at_s) in rows(&text, "Crossings").iter().skip(1).zip(&own) {
            let wanted = zones.map(|zone| clock(at(*at_s), zone));
            assert_eq!(row[0], to_second(at(*at_s)).format("%H:%M:%S").to_string(), "{given:?}");
            assert_eq!(row[1..3], wanted, "{given:?}\n{text}");
            crossings += 1;
        }
        let mut segments = rows(&text, "Light");
        let sums = segments.iter().position(|row| row[0].starts_with("in all:")).unwrap();
        segments.truncate(sums);
        assert_eq!(segments.len(), brief.light.segments.len() + 1, "{text}");
        for (row, segment) in segments.iter().skip(1).zip(&brief.light.segments) {
            assert_eq!(row[1..3], zones.map(|zone| clock(at(segment.begin_s), zone)), "{given:?}\n{text}");
        }
        for (what, instant) in [("Take-off", brief.flight.takeoff), ("Landing", brief.path.landing())] {
            let line = text.lines().find(|line| line.trim_start().starts_with(what)).unwrap();
            let local =
                zones.map(|zone| instant.utc().with_timezone(&zone).format("%d %b %H:%M").to_string());
            assert!(line.contains(&format!("{}  ", instant.utc().format("%d %b %H:%M:%S"))), "{line}");
            for time in local {
                assert!(line.contains(&format!("  {time}  ")), "{time} is not in {line}");
            }
        }
    }
    assert!(crossings > 20, "only {crossings} crossings");
}

/// The changes as the zones' authorities announced them, so that this does not rest on one library.
#[test]
fn a_change_of_clocks_in_the_air_is_told_with_both_offsets() {
    for (given, lines) in [
        (FLIGHTS[0], ["CYYZ (UTC−5, then UTC−4)  EGLL (UTC+0)", "07 Mar 23:30", "08 Mar 07:40"]),
        (FLIGHTS[2], ["EGLL (UTC+0, then UTC+1)  VHHH (UTC+8)", "28 Mar 22:00", "29 Mar 11:30"]),
        (FLIGHTS[4], ["CYYZ (UTC−4, then UTC−5)  VHHH (UTC+8)", "31 Oct 23:10", "01 Nov 13:05"]),
        (
            FLIGHTS[7],
            ["YSSY (UTC+10, then UTC+11)  YLHI (UTC+10:30, then UTC+11)", "04 Oct 00:00", "04 Oct 03:00"],
        ),
        (
            FLIGHTS[11],
            ["CYYT (UTC−2:30, then UTC−3:30)  EGLL (UTC+1, then UTC+0)", "29 Oct 22:00", "30 Oct 02:20"],
        ),
    ] {
        let text = reports::text(&briefed(given));
        for line in lines {
            assert!(text.contains(line), "{line} is not in\n{text}");
        }
    }
}
