//! The Sun at an instant and a place's day, as the program tells them.

use super::run;

fn day(time: &str, place: &str) -> serde_json::Value {
    let text = run(&["sun", time, place, "--as", "json"]).done();
    let record: serde_json::Value = serde_json::from_str(&text).unwrap();
    record["here"].clone()
}

fn events(day: &serde_json::Value) -> Vec<&str> {
    day["events"].as_array().unwrap().iter().map(|event| event["event"].as_str().unwrap()).collect()
}

fn number(value: &serde_json::Value) -> f64 {
    value.as_f64().unwrap()
}

#[test]
fn the_polar_day_and_the_polar_night_are_named() {
    let summer = day("2026-06-21T12:00Z", "ENSB");
    assert!(events(&summer).is_empty());
    assert_eq!((&summer["polar_day"], &summer["polar_night"]), (&true.into(), &false.into()));
    let winter = day("2026-12-21T12:00Z", "ENSB");
    assert_eq!((&winter["polar_day"], &winter["polar_night"]), (&false.into(), &true.into()));
    assert!(!events(&winter).contains(&"sunrise"));
    for (month, said) in
        [("06", "polar day: the Sun does not set"), ("12", "polar night: the Sun does not rise")]
    {
        let text = run(&["sun", &format!("2026-{month}-21T12:00Z"), "ENSB"]).done();
        assert!(text.contains(said), "{text}");
    }
    for place in ["90,0", "-90,0", "90,180", "-90,-180"] {
        let pole = day("2026-12-21T12:00Z", place);
        assert_eq!(pole["polar_day"] == true, place.starts_with('-'), "{place}");
    }
}

#[test]
fn a_day_is_as_long_as_its_clocks_make_it() {
    for (time, place, begins, hours) in [
        ("2026-03-08T12:00Z", "CYYZ", "2026-03-08T05:00:00.000Z", 23.0),
        ("2026-11-01T12:00Z", "CYYZ", "2026-11-01T04:00:00.000Z", 25.0),
        ("2026-07-01T12:00Z", "CYYZ", "2026-07-01T04:00:00.000Z", 24.0),
        // half an hour is what Lord Howe's clocks change by
        ("2026-04-04T18:00Z", "YLHI", "2026-04-04T13:00:00.000Z", 24.5),
        // clocks that go forward at midnight: the date begins at 01:00
        ("2018-11-04T12:00Z", "SBGR", "2018-11-04T03:00:00.000Z", 23.0),
        // and back at midnight: the old date's last hour comes twice
        ("2018-02-17T12:00Z", "SBGR", "2018-02-17T02:00:00.000Z", 25.0),
        ("2018-02-18T02:30Z", "SBGR", "2018-02-17T02:00:00.000Z", 25.0),
    ] {
        let day = day(time, place);
        assert_eq!(day["begins_utc"], begins, "{time} {place}");
        assert_eq!(number(&day["seconds"]), hours * 3600.0, "{time} {place}");
    }
}

#[test]
fn a_date_that_a_zone_skipped_ends_the_one_before_it() {
    for (time, place, date, begins) in [
        // Samoa had no 30 December 2011, the Line Islands no 31 December 1994, Kwajalein no 21 August 1993
        ("2011-12-30T09:59Z", "NSFA", "2011-12-29", "2011-12-29T10:00:00.000Z"),
        ("2011-12-30T10:00Z", "NSFA", "2011-12-31", "2011-12-30T10:00:00.000Z"),
        ("1994-12-31T09:59Z", "PLCH", "1994-12-30", "1994-12-30T10:00:00.000Z"),
        ("1993-08-21T11:59Z", "PKWA", "1993-08-20", "1993-08-20T12:00:00.000Z"),
    ] {
        let day = day(time, place);
        assert_eq!((&day["date"], &day["begins_utc"]), (&date.into(), &begins.into()), "{time} {place}");
        assert_eq!(number(&day["seconds"]), 86_400.0, "{time} {place}");
        let (light, state) = (number(&day["elevation_deg"]), day["state"].as_str().unwrap());
        assert_eq!(light > -50.0 / 60.0, state == "daylight", "{time} {place}: {light}° is {state}");
    }
}

#[test]
fn clocks_that_went_back_across_midnight_keep_the_old_date() {
    // Newfoundland's clocks went from 00:01 to 23:01 the day before
    let again = day("2005-10-30T02:32Z", "CYYT");
    assert_eq!((&again["date"], number(&again["seconds"])), (&"2005-10-29".into(), 90_000.0));
}

#[test]
fn on_both_sides_of_the_date_line_the_day_is_the_clocks_own() {
    let at = "2026-12-18T10:30Z";
    for (place, date) in
        [("NZAA", "2026-12-18"), ("PLCH", "2026-12-19"), ("NSTU", "2026-12-17"), ("PHNL", "2026-12-18")]
    {
        assert_eq!(day(at, place)["date"], date, "{place}");
    }
    // where no zone is known, local mean time: the meridian itself is counted as west
    for (place, date) in [("0,179.9", "2026-12-18"), ("0,-179.9", "2026-12-17"), ("0,180", "2026-12-17")] {
        assert_eq!(day(at, place)["date"], date, "{place}");
    }
}

#[test]
fn the_first_and_last_day_of_the_years_served_are_answered() {
    for (time, place) in [
        ("1973-01-01T00:00Z", "KJFK"),
        ("1973-01-01T00:00Z", "NZAA"),
        ("1973-01-01T00:00Z", "0,179.9"),
        ("2099-12-31T23:59:59Z", "KJFK"),
        ("2099-12-31T23:59:59Z", "PLCH"),
        ("2099-12-31T23:59:59Z", "0,-179.9"),
        ("2099-12-31T00:00Z", "EGLL"),
    ] {
        let day = day(time, place);
        assert_eq!(events(&day).iter().filter(|event| **event == "sunrise").count(), 1, "{time} {place}");
        assert!(number(&day["elevation_deg"]).abs() <= 90.0);
    }
}

#[test]
fn a_year_has_its_seasons_and_a_year_beyond_is_refused() {
    for year in ["1973", "2026", "2099"] {
        let text = run(&["sun", "--year", year, "--as", "json"]).done();
        let moments: Vec<serde_json::Value> = serde_json::from_str(&text).unwrap();
        let seasons = moments.iter().filter(|m| {
            let event = m["event"].as_str().unwrap();
            event.ends_with("equinox") || event.ends_with("solstice")
        });
        assert_eq!(seasons.count(), 4, "{year}");
        assert!(moments.iter().all(|m| m["utc"].as_str().unwrap().starts_with(year)));
    }
    for year in ["1972", "2100", "-5", "2147483647"] {
        let ran = run(&["sun", "--year", year]);
        let wanted = format!("gloamline: --year: {year} is outside the years 1973 to 2099\n");
        assert_eq!(ran.refused(), wanted);
    }
    assert!(run(&["sun", "--year", "soon"]).refused().contains("invalid value 'soon'"));
    assert!(run(&["sun", "2026-01-01T00:00Z", "--year", "2026"]).refused().contains("cannot be used with"));
}

#[test]
fn a_time_or_place_that_cannot_be_read_is_refused_by_name() {
    for (arguments, wanted) in [
        (&["sun", "noon"][..], "gloamline: TIME: 'noon' is no date and time\n  hint: write "),
        (
            &["sun", "2026-12-18T05:10"],
            "gloamline: TIME: '2026-12-18T05:10' says no offset from UTC\n  hint: ",
        ),
        (
            &["sun", "2100-01-01T00:00Z"],
            "gloamline: TIME: '2100-01-01T00:00Z' is outside the years 1973 to 2099",
        ),
        (&["sun", "2026-12-18T05:10Z", "95,0"], "gloamline: PLACE: latitude 95° is outside −90° to 90°"),
        (
            &["sun", "2026-12-18T05:10Z", "CYYX"],
            "gloamline: PLACE: no aerodrome has the code CYYX\n  hint: did you mean ",
        ),
        (
            &["sun", "2026-12-18T05:10Z", "--dut1-s=1"],
            "gloamline: --dut1-s: UT1 − UTC of 1 s is outside −0.9 s to 0.9 s",
        ),
    ] {
        let ran = run(arguments);
        assert!(ran.refused().starts_with(wanted), "{arguments:?}: {}", ran.err);
    }
}
