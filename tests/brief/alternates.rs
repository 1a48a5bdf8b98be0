//! Alternates: the light at the time of their use, and the next change as a day at the place has it.

use super::briefed;
use gloamline::light::{State, along};
use gloamline::path::Path;
use gloamline::sky::Sky;
use gloamline::{Brief, Polar};

/// A flight over the Arctic with three alternates, in the month of the year that is given.
fn flight(month: u32) -> Brief {
    briefed(&format!(
        "from = \"CYYZ\"\nto = \"VHHH\"\ntakeoff = 2026-{month:02}-18T05:10:00Z\nairborne = \"14h55m\"\n\
         [[alternate]]\nat = \"CYFB\"\nafter = \"45m\"\n\
         [[alternate]]\nat = \"ENSB\"\n\
         [[alternate]]\nat = {{ lat = 89.9, lon = 12.0 }}\nafter = \"1h\"\n"
    ))
}

#[test]
fn the_light_and_its_next_change_are_those_of_a_day_at_the_place() {
    let (sky, mut polar) = (Sky::default(), Vec::new());
    for brief in (1..=12).map(flight) {
        for (given, view) in brief.flight.alternates.iter().zip(&brief.alternates) {
            let used = brief.path.takeoff.after_s(view.abeam.at_s + given.after_s);
            assert_eq!(used, view.used);
            // from a day before, so that the search begins elsewhere
            let light = along(&Path::standing(given.stop.place, used.after_s(-43_200.0), 86_400.0), &sky);
            assert_eq!(light.state_at(43_200.0), view.state, "{}", given.stop.label);
            let next = light.crossings.iter().find(|crossing| crossing.at_s > 43_200.0);
            let Some(next) = next else {
                assert!(view.next.is_none_or(|(_, at)| at.since_s(used) > 43_200.0), "{view:?}");
                polar.extend(view.polar);
                continue;
            };
            let (event, at) = view.next.unwrap();
            assert_eq!(event, next.limit.event(next.direction));
            // two searches, each good to 0.05 s and more where the Sun is slow at these latitudes
            assert!((at.since_s(used) - (next.at_s - 43_200.0)).abs() < 0.3, "{view:?} {next:?}");
        }
    }
    assert!(polar.contains(&Polar::Day) && polar.contains(&Polar::Night), "{polar:?}");
}

#[test]
fn polar_day_and_night_are_said() {
    for (month, state, wanted) in [(6, State::Daylight, Polar::Day), (12, State::Darkness, Polar::Night)] {
        let brief = flight(month);
        let pole = &brief.alternates[2];
        assert_eq!((pole.state, pole.polar, pole.next), (state, Some(wanted), None), "{pole:?}");
        let text = gloamline::reports::text(&brief);
        let said = if wanted == Polar::Day {
            "none within 48 h (polar day)"
        } else {
            "none within 48 h (polar night)"
        };
        assert!(text.contains(said), "{text}");
    }
}

#[test]
fn nothing_is_said_of_the_time_after_the_years_served() {
    let brief = briefed(
        "from = \"EGLL\"\nto = \"LFPG\"\ntakeoff = 2099-12-31T21:00:00Z\nairborne = \"1h\"\n[[alternate]]\nat = \"EGKK\"\n",
    );
    assert_eq!((brief.alternates[0].state, brief.alternates[0].next), (State::Darkness, None));
}
