//! Polar days and nights: their first and last dates.

use super::{days, stop, stop_of};
use crate::tables::rows;
use gloamline::day::PolarKind;
use std::collections::BTreeSet;

#[test]
fn polar_days_and_nights_begin_and_end_on_the_dates_of_an_independent_script() {
    let all = rows("skyfield-de421/polar_dates.csv");
    let places: BTreeSet<&str> = all.iter().map(|row| row["code"].as_str()).collect();
    assert!(places.len() >= 6 && all.len() >= 40, "{places:?}");
    for row in &all {
        let kind = if row["kind"] == "day" { PolarKind::Day } else { PolarKind::Night };
        // asked from its first and its last date, each finds the whole run
        for date in ["first", "last"] {
            let here = days(stop_of(row), &row[date], &row[date]);
            let run = here.days[0].polar.unwrap_or_else(|| panic!("{row:?} is no polar date"));
            assert_eq!(run.kind, kind, "{row:?}");
            let found = [run.first, run.last].map(|date| date.unwrap().to_string());
            assert_eq!(found, [row["first"].clone(), row["last"].clone()], "{row:?} from its {date} date");
        }
    }
}

#[test]
fn no_other_dates_of_these_places_are_polar() {
    let all = rows("skyfield-de421/polar_dates.csv");
    for code in ["ENTC", "CYLT", "NZIR"] {
        let own: Vec<_> = all.iter().filter(|row| row["code"] == code).collect();
        let here = days(stop_of(own[0]), "2026-01-01", "2026-12-31");
        for day in &here.days {
            let date = day.civil.date.to_string();
            let wanted = own.iter().any(|row| row["first"] <= date && date <= row["last"]);
            assert_eq!(day.polar.is_some(), wanted, "{code} {date}");
        }
    }
}

#[test]
fn a_run_that_leaves_the_years_served_has_no_end_on_that_side() {
    let first = days(stop(80.0, 0.0, None), "1973-01-01", "1973-01-01");
    let run = first.days[0].polar.unwrap();
    assert_eq!((run.kind, run.first), (PolarKind::Night, None));
    assert!(run.last.unwrap().to_string().starts_with("1973-02"), "{run:?}");
    let last = days(stop(-80.0, 0.0, None), "2099-12-31", "2099-12-31");
    let run = last.days[0].polar.unwrap();
    assert_eq!((run.kind, run.last), (PolarKind::Day, None));
    assert!(run.first.unwrap().to_string().starts_with("2099-10"), "{run:?}");
}
