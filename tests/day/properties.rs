//! Whatever the place and the date: events in order, states that tile the day, and a field that is the day's own.

use super::{SKY, days, stop};
use chrono::{Days, NaiveDate};
use gloamline::day::{DayRange, PolarKind, field, place_days};
use gloamline::light::{Limit, State};
use proptest::prelude::*;

const ZONES: [Option<&str>; 6] = [
    None,
    Some("Europe/London"),
    Some("Australia/Lord_Howe"),
    Some("America/St_Johns"),
    Some("Pacific/Apia"),
    Some("Antarctica/Troll"),
];

proptest! {
    #![proptest_config(ProptestConfig::with_cases(48))]

    #[test]
    fn events_are_in_order_and_states_tile_the_day(
        lat in -90.0..=90.0, lon in -180.0..180.0, zone in 0..ZONES.len(), after in 0_u64..46_000, count in 0_u64..6
    ) {
        let first = NaiveDate::from_ymd_opt(1973, 1, 2).unwrap() + Days::new(after);
        let range = DayRange::new(first, first + Days::new(count)).unwrap();
        let Ok(here) = place_days(stop(lat, lon, ZONES[zone]), range, &SKY) else { return Ok(()) };
        prop_assert_eq!(here.days.len() + here.skipped.len(), range.len());
        for day in &here.days {
            let light = &day.light;
            prop_assert!(light.crossings.windows(2).all(|w| w[0].at_s <= w[1].at_s));
            prop_assert!(day.moon.events.windows(2).all(|w| w[0].at_s < w[1].at_s && w[0].direction != w[1].direction));
            prop_assert_eq!(light.segments[0].begin_s, 0.0);
            prop_assert_eq!(light.segments[light.segments.len() - 1].end_s, day.civil.seconds);
            prop_assert!(light.segments.windows(2).all(|w| w[0].end_s == w[1].begin_s));
            let held: f64 = State::ALL.iter().map(|state| light.seconds.in_state(*state)).sum();
            prop_assert!((held - day.civil.seconds).abs() < 1e-6);
            let daylight = light.seconds.in_state(State::Daylight);
            match day.polar.map(|run| run.kind) {
                Some(PolarKind::Day) => prop_assert_eq!(daylight, day.civil.seconds),
                Some(PolarKind::Night) => prop_assert_eq!(daylight, 0.0),
                None => prop_assert!(daylight > 0.0 && daylight < day.civil.seconds),
            }
            prop_assert!(day.lowest.elevation <= day.highest.elevation);
        }
    }

    #[test]
    fn a_field_covers_its_range_from_left_to_right(
        lat in -90.0..=90.0, lon in -180.0..180.0, zone in 0..ZONES.len(), after in 0_u64..45_900, count in 0_u64..90
    ) {
        let first = NaiveDate::from_ymd_opt(1973, 1, 2).unwrap() + Days::new(after);
        let range = DayRange::new(first, first + Days::new(count)).unwrap();
        let Ok(here) = place_days(stop(lat, lon, ZONES[zone]), range, &SKY) else { return Ok(()) };
        let field = field(&here, &SKY);
        prop_assert!(field.columns.windows(2).all(|w| w[0].at_days <= w[1].at_days));
        prop_assert!(field.columns.iter().all(|c| (0.0..=field.days as f64).contains(&c.at_days)));
        for column in &field.columns {
            for above in &column.above {
                let ends: Vec<f64> = above.iter().flat_map(|i| [i.from_h, i.to_h]).collect();
                prop_assert!(ends.windows(2).all(|w| w[0] <= w[1]), "{ends:?}");
                prop_assert!(ends.iter().all(|h| (0.0..=24.0 + 1e-9).contains(h)), "{ends:?}");
            }
        }
    }
}

#[test]
fn a_field_passes_a_dates_middle_where_its_events_are() {
    let here = days(stop(60.2, 24.9, Some("Europe/Helsinki")), "2026-05-01", "2026-05-08");
    let field = field(&here, &SKY);
    for (i, day) in here.days.iter().enumerate() {
        let middle = i as f64 + 0.5;
        let column = field.columns.iter().find(|c| (c.at_days - middle).abs() < 1e-9).unwrap();
        let found: Vec<f64> =
            column.above[Limit::Horizon as usize].iter().flat_map(|i| [i.from_h, i.to_h]).collect();
        let crossings = day.light.crossings.iter().filter(|c| c.limit == Limit::Horizon);
        let wanted: Vec<f64> = crossings.map(|c| c.at_s / 3600.0).collect();
        assert_eq!(found.len(), wanted.len());
        assert!(found.iter().zip(&wanted).all(|(a, b)| (a - b).abs() < 1e-6), "{found:?} {wanted:?}");
    }
}

#[test]
fn a_field_is_blank_where_the_clock_skips() {
    let gaps = |zone: &str, from: &str, to: &str| {
        let here = days(stop(51.0, 0.0, Some(zone)), from, to);
        let gaps = field(&here, &SKY).gaps;
        gaps.iter().map(|gap| (gap.day, gap.hours.from_h, gap.hours.to_h)).collect::<Vec<_>>()
    };
    assert_eq!(gaps("Europe/London", "2026-03-28", "2026-03-30"), [(1, 1.0, 2.0)]);
    assert_eq!(gaps("Australia/Lord_Howe", "2026-10-04", "2026-10-04"), [(0, 2.0, 2.5)]);
    assert_eq!(gaps("America/Sao_Paulo", "2018-11-03", "2018-11-05"), [(1, 0.0, 1.0)]);
    assert_eq!(gaps("Pacific/Apia", "2011-12-29", "2011-12-31"), [(1, 0.0, 24.0)]);
    assert!(gaps("Europe/London", "2026-10-24", "2026-10-26").is_empty());
}
