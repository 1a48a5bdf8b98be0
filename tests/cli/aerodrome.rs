//! A place's days, as the program tells them and as it refuses to.

use super::{folder, names, run, run_in};

fn json(arguments: &[&str]) -> serde_json::Value {
    let text = run(&[&["aerodrome"], arguments, &["--as", "json"]].concat()).done();
    serde_json::from_str(&text).unwrap()
}

fn rows(arguments: &[&str]) -> Vec<std::collections::HashMap<String, String>> {
    let text = run(&[&["aerodrome"], arguments, &["--as", "csv"]].concat()).done();
    let mut reader = csv::Reader::from_reader(text.as_bytes());
    let names = reader.headers().unwrap().clone();
    let row = |record: csv::StringRecord| {
        names.iter().map(str::to_string).zip(record.iter().map(str::to_string)).collect()
    };
    reader.records().map(|record| row(record.unwrap())).collect()
}

#[test]
fn what_cannot_be_a_day_is_refused_with_its_option() {
    for (arguments, wanted) in [
        (&["ENTC", "--on", "2026-02-29"][..], "--on: '2026-02-29' is no date\n  hint: write 2026-12-18\n"),
        (&["ENTC", "--on", "tomorrow"], "--on: 'tomorrow' is no date\n"),
        (&["ENTC", "--on", "2026-12-18T05:10Z"], "--on: '2026-12-18T05:10Z' is no date\n"),
        (&["ENTC", "--on", "2026-01-01", "--to", "01.02.2026"], "--to: '01.02.2026' is no date\n"),
        (
            &["ENTC", "--on", "2026-02-01", "--to", "2026-01-31"],
            "--on, --to: the last date, 2026-01-31, is before the first, 2026-02-01\n",
        ),
        (
            &["ENTC", "--on", "2026-01-01", "--to", "2027-02-05"],
            "--on, --to: 401 dates from 2026-01-01 to 2027-02-05 are more than 400\n",
        ),
        (&["ENTC", "--on", "1972-12-31"], "--on, --to: 1972-12-31 is outside the years 1973 to 2099\n"),
        (
            &["ENTC", "--on", "2099-12-31", "--to", "2100-01-01"],
            "--on, --to: 2100-01-01 is outside the years 1973 to 2099\n",
        ),
        (
            &["NSFA", "--on", "2011-12-30"],
            "--on, --to: the clocks at NSFA skipped 2011-12-30: there was no such date\n",
        ),
        (&["ENTX", "--on", "2026-01-01"], "CODE: no aerodrome has the code ENTX\n  hint: did you mean "),
        (&["91,0", "--on", "2026-01-01"], "CODE: latitude 91° is outside −90° to 90°\n"),
        (&["", "--on", "2026-01-01"], "CODE: the aerodrome code is empty\n"),
        (
            &["ENTC", "--on", "2026-01-01", "--dut1-s=-1"],
            "--dut1-s: UT1 − UTC of -1 s is outside −0.9 s to 0.9 s\n",
        ),
    ] {
        let ran = run(&[&["aerodrome"], arguments].concat());
        let said = ran.refused().strip_prefix("gloamline: ").unwrap();
        assert!(said.starts_with(wanted.trim_end_matches('\n')), "{arguments:?}: {said}");
    }
    for (arguments, wanted) in [
        (&["aerodrome", "ENTC"][..], "--on <DATE>"),
        (&["aerodrome", "--on", "2026-01-01"], "<CODE>"),
        (&["aerodrome", "ENTC", "--on", "2026-01-01", "--as", "xml"], "'xml'"),
    ] {
        assert!(run(arguments).refused().contains(wanted), "{arguments:?}");
    }
}

#[test]
fn a_polar_night_is_told_with_its_dates_in_every_form() {
    let one = ["ENTC", "--on", "2026-12-21"];
    let text = run(&["aerodrome", "ENTC", "--on", "2026-12-21"]).done();
    let told = text.split_whitespace().collect::<Vec<_>>().join(" ");
    assert!(told.contains("polar night: the Sun does not rise on this date; the first such date is 27 Nov 2026, the last 14 Jan 2027"), "{text}");
    assert!(!text.contains("sunrise  "), "{text}");
    let day = &json(&one)["days"][0];
    let polar = serde_json::json!({ "kind": "polar_night", "first": "2026-11-27", "last": "2027-01-14" });
    assert_eq!(day["polar"], polar);
    let row = &rows(&one)[0];
    assert_eq!(
        [&row["polar"], &row["polar_first"], &row["polar_last"]],
        ["polar_night", "2026-11-27", "2027-01-14"]
    );
    assert_eq!([&row["sunrise_utc"], &row["sunrise_local"], &row["sunrise_count"]], ["", "", "0"]);
}

#[test]
fn an_event_that_comes_twice_is_listed_twice_and_counted() {
    // when the polar day ends, the Sun sets just after a midnight and just before the next
    let range = ["ENTC", "--on", "2026-07-15", "--to", "2026-08-15"];
    let twice: Vec<_> = rows(&range).into_iter().filter(|row| row["sunset_count"] == "2").collect();
    assert!(!twice.is_empty());
    let date = twice[0]["date"].clone();
    let day = &json(&["ENTC", "--on", &date])["days"][0];
    let sunsets = day["events"].as_array().unwrap().iter().filter(|event| event["event"] == "sunset");
    let sunsets: Vec<_> = sunsets.collect();
    assert_eq!(sunsets.len(), 2);
    assert_eq!(sunsets[0]["local"], twice[0]["sunset_local"]);
    let text = run(&[&["aerodrome"], &range[..]].concat()).done();
    let line = text.lines().find(|line| line.trim_start().starts_with(&date)).unwrap();
    let clock = |event: &serde_json::Value| event["local"].as_str().unwrap()[11..15].to_string();
    assert!(sunsets.iter().all(|event| line.contains(&clock(event))), "{line}");
}

#[test]
fn times_are_utc_and_local_with_the_offset_that_holds_then() {
    for row in rows(&["EGLL", "--on", "2026-10-24", "--to", "2026-10-26"]) {
        let [utc, local] = ["sunrise_utc", "sunrise_local"]
            .map(|name| chrono::DateTime::parse_from_rfc3339(&row[name]).unwrap());
        assert_eq!(utc, local);
        assert!(row["sunrise_local"].starts_with(&row["date"]), "{row:?}");
        let offset = if row["date"] == "2026-10-24" { "+01:00" } else { "+00:00" };
        assert!(row["sunrise_local"].ends_with(offset), "{row:?}");
        assert_eq!(row["seconds"], if row["date"] == "2026-10-25" { "90000" } else { "86400" });
    }
    let row = &rows(&["YPDN", "--on", "2026-06-01"])[0];
    assert!(row["sunset_local"].ends_with("+09:30") && row["begins_utc"] == "2026-05-31T14:30:00.000Z");
    // local mean time to the whole minute: 18.9189° are 1 h 15 min 41 s
    let row = &rows(&["69.6833,18.9189", "--on", "2026-02-01"])[0];
    assert!(row["sunset_local"].ends_with("+01:16"), "{row:?}");
}

#[test]
fn json_is_one_object_whose_keys_do_not_depend_on_the_number_of_days() {
    let here = json(&["NSFA", "--on", "2011-12-29", "--to", "2011-12-31"]);
    assert_eq!((&here["schema"], &here["clock"]), (&1.into(), &"Pacific/Apia".into()));
    assert_eq!(here["skipped"], serde_json::json!(["2011-12-30"]));
    assert_eq!(here["days"].as_array().unwrap().len(), 2);
    let keys = |value: &serde_json::Value| value.as_object().unwrap().keys().cloned().collect::<Vec<_>>();
    let one = json(&["ENTC", "--on", "2026-06-21"]);
    assert_eq!(keys(&here), keys(&one));
    assert_eq!(keys(&here["days"][0]), keys(&one["days"][0]));
    let held = one["days"][0]["seconds_in"].as_object().unwrap();
    assert_eq!(held.len(), 5);
    assert_eq!(held.values().map(|seconds| seconds.as_f64().unwrap()).sum::<f64>(), 86_400.0);
    let lit = one["days"][0]["moon"]["illuminated"].as_f64().unwrap();
    assert!((0.0..=1.0).contains(&lit));
}

#[test]
fn every_form_says_that_the_authority_decides() {
    for form in ["text", "json", "csv"] {
        for last in ["2026-01-01", "2026-01-03"] {
            let text = run(&["aerodrome", "EGLL", "--on", "2026-01-01", "--to", last, "--as", form]).done();
            let told = text.split_whitespace().collect::<Vec<_>>().join(" ");
            assert!(told.contains("published tables decide"), "{form} {last}: {text}");
        }
    }
}

#[test]
fn a_folder_gets_all_forms_or_none() {
    let folder = folder(&[]);
    let arguments = ["aerodrome", "ENTC", "--on", "2026-11-20", "--to", "2026-12-03", "--out", "out"];
    let shown = run_in(folder.path(), &arguments).done();
    let out = folder.path().join("out");
    let stem = "entc-2026-11-20-2026-12-03";
    assert_eq!(names(&out), ["csv", "json", "png", "svg", "txt"].map(|ending| format!("{stem}.{ending}")));
    assert_eq!(std::fs::read_to_string(out.join(format!("{stem}.txt"))).unwrap(), shown);
    let svg = std::fs::read_to_string(out.join(format!("{stem}.svg"))).unwrap();
    assert!(roxmltree::Document::parse(&svg).is_ok());
    for name in names(&out) {
        std::fs::remove_file(out.join(name)).unwrap();
    }
    std::fs::create_dir(out.join(format!("{stem}.svg"))).unwrap();
    let ran = run_in(folder.path(), &arguments);
    assert_eq!((ran.code, ran.out.as_str()), (Some(2), ""), "{}", ran.err);
    assert!(ran.err.contains("cannot be written: "), "{}", ran.err);
    assert_eq!(names(&out), [format!("{stem}.svg")]);
}

#[test]
fn coordinates_on_both_sides_of_a_meridian_do_not_share_a_file() {
    let folder = folder(&[]);
    for place in ["78.5,-20", "78.5,20"] {
        run_in(folder.path(), &["aerodrome", place, "--on", "2026-01-01", "--out", "out"]).done();
    }
    assert_eq!(names(&folder.path().join("out")).len(), 10);
}

#[test]
fn the_poles_and_the_edges_of_the_years_are_answered() {
    for place in ["90,0", "-90,0", "0,180", "0,-180", "PLCH", "NSTU"] {
        for (first, last) in [("1973-01-01", "1973-01-03"), ("2099-12-29", "2099-12-31")] {
            let here = json(&[place, "--on", first, "--to", last]);
            assert_eq!(here["days"].as_array().unwrap().len(), 3, "{place} {first}");
        }
    }
}
