//! Recordings as they are: each fault is mended, counted and said, or refused with its cure.

use super::{mended, only, points, read, refusal};
use gloamline::intake::{TrackOptions, tracks};

/// A minute apart from 2026-12-18T05:10Z on a meridian, 0.1° each, with heights; `edit` changes the rows.
fn flight(edit: impl Fn(&mut Vec<String>)) -> String {
    let row =
        |i: i64| format!("{},{:.1},10,{}", 1_797_570_600 + 60 * i, 60.0 + 0.1 * i as f64, 10_000 + 10 * i);
    let mut rows: Vec<String> = (0..8).map(row).collect();
    edit(&mut rows);
    format!("time,lat,lon,height_m\n{}\n", rows.join("\n"))
}

/// What is said of a flight that comes out as if nothing had been done to it, but for the points of these numbers.
fn mended_to_all_but(lost: &[usize], edit: impl Fn(&mut Vec<String>)) -> Vec<String> {
    let mut wanted = points(&only(&flight(|_| {}), "a"));
    for number in lost.iter().rev() {
        wanted.remove(*number);
    }
    let track = only(&flight(edit), "a.csv");
    assert_eq!(points(&track), wanted);
    mended(&track)
}

#[test]
fn rows_out_of_order_are_sorted() {
    assert_eq!(mended_to_all_but(&[], |rows| rows.swap(2, 5)), ["3 points out of order sorted by time"]);
    assert_eq!(mended_to_all_but(&[], |rows| rows.reverse()), ["7 points out of order sorted by time"]);
}

#[test]
fn of_one_time_the_first_place_is_kept() {
    let again = |rows: &mut Vec<String>| rows.insert(3, rows[2].clone());
    assert_eq!(mended_to_all_but(&[], again), ["1 point with a time and place already given dropped"]);
    let other = |rows: &mut Vec<String>| rows.insert(3, rows[2].replace(",10,", ",11,"));
    assert_eq!(mended_to_all_but(&[], other), ["1 point with another place at a time already given dropped"]);
    let height = |rows: &mut Vec<String>| {
        rows.insert(3, rows[2].clone());
        rows[2] = rows[2].replace("10020", "");
    };
    assert_eq!(mended_to_all_but(&[], height), ["1 point with a time and place already given dropped"]);
}

#[test]
fn jumps_are_dropped_even_if_the_first_point_is_one() {
    for jump in [0, 4, 7] {
        let edit = |rows: &mut Vec<String>| rows[jump] = rows[jump].replace(",10,", ",50,");
        assert_eq!(mended_to_all_but(&[jump], edit), ["1 point needing more than 1500 kt dropped"]);
    }
    // 0.1° in a minute is 360 kt
    let slow = TrackOptions { max_speed_kt: 300.0, ..TrackOptions::default() };
    let error = tracks(flight(|_| {}).as_bytes(), "a.csv", &slow).unwrap_err();
    assert_eq!(error.to_string(), "a.csv:2:1: no two points are within 300 kt of each other");
    assert_eq!(error.hint().unwrap(), "allow a higher speed, if it is right");
}

#[test]
fn places_that_are_none_are_dropped() {
    let zero = |rows: &mut Vec<String>| rows[3] = rows[3].replace(",60.3,10,", ",0.0,0,");
    assert_eq!(mended_to_all_but(&[3], zero), ["1 point at exactly 0°, 0° dropped"]);
    for none in ["", "NaN", "null", "1e999", "95.2", "n/a"] {
        let edit = |rows: &mut Vec<String>| rows[3] = rows[3].replace(",60.3,", &format!(",{none},"));
        assert_eq!(
            mended_to_all_but(&[3], edit),
            ["1 point without a position that exists dropped"],
            "{none}"
        );
    }
}

#[test]
fn times_that_are_none_are_dropped() {
    let edit = |rows: &mut Vec<String>| rows[3] = "noon,60.3,10,1".to_string();
    assert_eq!(mended_to_all_but(&[3], edit), ["1 point without a time that can be read dropped"]);
    let edit = |rows: &mut Vec<String>| rows[3] = "3,60.3,10,1".to_string();
    assert_eq!(mended_to_all_but(&[3], edit), ["1 point outside the years answered for dropped"]);
}

#[test]
fn missing_heights_are_filled_by_time_and_held_at_the_ends() {
    let edit = |rows: &mut Vec<String>| {
        for i in [2, 3, 5] {
            rows[i] = rows[i].rsplit_once(',').unwrap().0.to_string() + ",";
        }
    };
    assert_eq!(mended_to_all_but(&[], edit), ["heights of 3 points filled in by time"]);
    let ends =
        only("time,lat,lon,height_m\n1797570600,60,10,\n1797570660,60.1,10,500\n1797570720,60.2,10,\n", "a");
    assert!(points(&ends).iter().all(|point| point.ends_with(" 500.0")));
    let high = |rows: &mut Vec<String>| rows[4] = rows[4].replace("10040", "38000");
    assert_eq!(
        mended_to_all_but(&[], high),
        ["heights of 1 point that no aircraft flies at dropped", "heights of 1 point filled in by time"]
    );
}

#[test]
fn heights_without_a_unit_are_metres_unless_too_high_and_it_is_said() {
    let metres = only("time,lat,lon,alt\n1797570600,60,10,9000\n1797570660,60.1,10,9100\n", "a");
    assert!(points(&metres)[0].ends_with(" 9000.0"));
    assert_eq!(mended(&metres), ["heights in 'alt', which names no unit, taken as metres"]);
    let feet = only("time,lat,lon,alt\n1797570600,60,10,35000\n1797570660,60.1,10,36000\n", "a");
    assert!(points(&feet)[0].ends_with(" 10668.0"));
    assert_eq!(
        mended(&feet),
        ["heights in 'alt', which names no unit, taken as feet, since as metres they were too high"]
    );
}

#[test]
fn heights_in_a_transponders_steps_are_feet_for_all_flights_of_the_file() {
    let row = |i: i64| format!("A,{},{:.2},10,{}\n", 1_797_570_600 + 60 * i, 60.0 + 0.05 * i as f64, 125 * i);
    let climb: String =
        (0..30).fold("flight,time,lat,lon,baroaltitude\n".to_string(), |text, i| text + &row(i));
    let both = climb.clone() + "B,1797570600,50,10,1000\nB,1797570660,50.1,10,1000\n";
    for track in read(&both, "a").unwrap().tracks {
        let said =
            "heights in 'baroaltitude', which names no unit, taken as feet, since they come in steps of 25";
        assert_eq!(mended(&track), [said]);
    }
    let metres = only(&climb.replace("0\n", "1\n").replace("5\n", "6\n"), "a");
    assert_eq!(mended(&metres), ["heights in 'baroaltitude', which names no unit, taken as metres"]);
}

#[test]
fn a_silence_is_marked() {
    let track = only(&flight(|rows| drop(rows.drain(1..7))).replace("1797571020", "1797571980"), "a");
    assert_eq!(
        mended(&track),
        ["no points from 2026-12-18T05:10:00Z to 2026-12-18T05:33:00Z (23 min): bridged"]
    );
    let bridge = track.repairs.bridges().next().unwrap();
    assert_eq!(bridge.to.since_s(bridge.from), 1380.0);
    let patient = TrackOptions { gap_s: 1380.0, ..TrackOptions::default() };
    let text = "time,lat,lon\n1797570600,60,10\n1797571980,60.1,10\n";
    assert_eq!(tracks(text.as_bytes(), "a", &patient).unwrap().tracks[0].repairs.bridges().count(), 0);
}

#[test]
fn times_without_a_zone_are_utc_and_it_is_said() {
    let track = only("time,lat,lon\n2026-12-18 05:10:00,60,10\n2026-12-18T05:11,60.1,10\n", "a");
    assert_eq!(points(&track)[1], "2026-12-18T05:11:00 60.1000 10.0000 -");
    assert_eq!(mended(&track)[0], "2 points with a time that names no zone taken as UTC");
}

#[test]
fn times_of_day_need_a_date_and_pass_midnight() {
    let text = "time,lat,lon\n23:59:00,60,10\n00:01:00,60.1,10\n00:00:00,60.05,10\n";
    let (what, cure) = refusal(text, "a.csv");
    assert_eq!(what, "a.csv:2:1: '23:59:00' is a time of day, and no date is given");
    assert_eq!(cure, "give the date (UTC) of the first point");
    let dated = TrackOptions { date: "2026-12-18".parse().ok(), ..TrackOptions::default() };
    let track = tracks(text.as_bytes(), "a", &dated).unwrap().tracks.remove(0);
    assert_eq!(points(&track)[2], "2026-12-19T00:01:00 60.1000 10.0000 -");
    assert_eq!(
        mended(&track)[..3],
        [
            "3 points with a time that names no zone taken as UTC",
            "times of day followed past a midnight",
            "1 point out of order sorted by time"
        ]
    );
    let beside = only("date,time,lat,lon\n2026-12-18,23:59:00Z,60,10\n2026-12-19,00:01:00Z,60.1,10\n", "a");
    assert_eq!(points(&beside)[1], "2026-12-19T00:01:00 60.1000 10.0000 -");
}

#[test]
fn swapped_coordinates_are_noticed_and_can_be_swapped_back() {
    let text = "time,lat,lon\n1797570600,-120.5,60\n1797570660,-120.6,60.1\n1797570720,-120.7,60.2\n";
    let (what, cure) = refusal(text, "a.csv");
    assert_eq!(
        what,
        "a.csv:2:1: latitude -120.5° is outside −90° to 90°, while all longitudes beside such are within: they seem swapped"
    );
    assert!(cure.contains("swapped"));
    let swap = TrackOptions { swap_lat_lon: true, ..TrackOptions::default() };
    let track = tracks(text.as_bytes(), "a", &swap).unwrap().tracks.remove(0);
    assert_eq!(points(&track)[0], "2026-12-18T05:10:00 60.0000 -120.5000 -");
}

#[test]
fn what_is_no_flight_is_refused() {
    for (rows, wanted) in [
        ("1797570600,60,10", "a.csv:2:1: the track has one usable point only"),
        ("1797570600,60,10\n1797570600,60,10\n", "a.csv:2:1: all 2 points are at one instant"),
        (
            "1797570600,60,10\n1797707400,60,10\n",
            "a.csv:2:1: 38.0 h from the first point to the last is outside 0 h to 36 h",
        ),
        ("0,60,10\n60,60,10\n", "a.csv:2:1: '0' is outside the years 1973 to 2099"),
        ("noon,60,10\n", "a.csv:2:1: no point has a date and time that can be read; the first is 'noon'"),
        (
            "1797570600,x,10\n1797570601,,\n",
            "a.csv:2:1: no point has a latitude within ±90° and a longitude within −180° to 360°",
        ),
        ("", "a.csv: there is no track in it"),
    ] {
        assert_eq!(refusal(&format!("time,lat,lon\n{rows}"), "a.csv").0, wanted);
    }
}

#[test]
fn several_flights_are_split_by_a_column_and_a_bad_one_is_refused_alone() {
    let text = "callsign,time,lat,lon\n,1797570600,60,10\nAAA1,1797570660,60.1,10\nBBB2,1797570600,10,10\n\
        AAA1,1797570720,60.2,10\nCCC3,1797570600,70,10\n,1797570660,70.1,10\n";
    let read = read(text, "a.csv").unwrap();
    let told: Vec<(Option<&str>, usize)> =
        read.tracks.iter().map(|track| (track.name.as_deref(), track.points.len())).collect();
    assert_eq!(told, [(Some("AAA1"), 3), (Some("CCC3"), 2)]);
    assert_eq!(read.tracks[1].origin.to_string(), ":6:1");
    assert_eq!(read.refused.len(), 1);
    assert_eq!(read.refused[0].to_string(), "a.csv:4:1: flight 'BBB2': the track has one usable point only");
    let numbered = "id,time,lat,lon\n1,1797570600,60,10\n2,1797570660,60.1,10\n3,1797570720,60.2,10\n";
    assert_eq!(only(numbered, "a").points.len(), 3);
}
