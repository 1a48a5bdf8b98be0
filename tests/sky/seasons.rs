//! Equinoxes, solstices and apsides against JPL DE421 by way of skyfield.

use crate::tables::{instant, number, rows};
use chrono::Datelike;
use gloamline::sky::{YearEvent, year_moments};

/// The Sun takes 24 s for an arcsecond of longitude; the series and DE421 agree to 0.022″.
const SEASON_S: f64 = 0.022 * 24.4 + 0.05;
/// The distance is flat at its extreme: the series' 5 mm/s of velocity (their own note) moves it by this.
const APSIS_S: f64 = 180.0;
/// The routine's own note: within 11.2 km of a JPL ephemeris.
const DISTANCE_AU: f64 = 11.2 / 149_597_870.7;

#[test]
fn a_years_moments_are_those_of_de421() {
    let all = rows("skyfield-de421/seasons.csv");
    assert!(all.len() >= 60);
    for row in all {
        let wanted = instant(&row, "utc");
        let event = match row["event"].as_str() {
            "march_equinox" => YearEvent::MarchEquinox,
            "june_solstice" => YearEvent::JuneSolstice,
            "september_equinox" => YearEvent::SeptemberEquinox,
            "december_solstice" => YearEvent::DecemberSolstice,
            "perihelion" => YearEvent::Perihelion,
            "aphelion" => YearEvent::Aphelion,
            other => panic!("no moment is called {other}"),
        };
        let moments = year_moments(wanted.utc().year());
        let found = moments.iter().find(|m| m.event == event).unwrap();
        let apsis = matches!(event, YearEvent::Perihelion | YearEvent::Aphelion);
        let gap = found.instant.since_s(wanted);
        assert!(gap.abs() < if apsis { APSIS_S } else { SEASON_S }, "{row:?}: {gap} s");
        if apsis {
            assert!(
                (found.distance_au() - number(&row, "distance_au")).abs() < DISTANCE_AU,
                "{row:?}: {}",
                found.distance_au()
            );
        }
    }
}
