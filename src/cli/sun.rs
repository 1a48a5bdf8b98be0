//! `gloamline sun`.

use super::Outcome;
use super::arguments::SunRequest;
use super::terminal;
use gloamline::intake::{IntakeError, instant_argument, place_argument};
use gloamline::sky::{Sky, year_moments};
use gloamline::units::{Dut1, Dut1Error, YEARS};
use gloamline::{reports, sun_brief};

#[derive(Debug, thiserror::Error)]
enum Refusal {
    #[error("{0}")]
    Intake(#[from] IntakeError),
    #[error("--dut1-s: {0}")]
    Dut1(#[from] Dut1Error),
    #[error("--year: {0} is outside the years {first} to {last}", first = YEARS.start(), last = YEARS.end())]
    Year(i32),
    #[error("{0}")]
    Json(#[from] serde_json::Error),
    #[error("standard output: {0}")]
    Output(#[from] std::io::Error),
}

pub(super) fn run(request: &SunRequest) -> Outcome {
    Outcome::of(told(request), |refusal| match refusal {
        Refusal::Intake(error) => error.hint(),
        _ => None,
    })
}

fn told(request: &SunRequest) -> Result<(), Refusal> {
    let sky = Sky::new(Dut1::from_s(request.dut1_s)?);
    let json = request.form == "json";
    let text = match request.year {
        Some(year) => year_report(year, &sky, json)?,
        None => instant_report(request, &sky, json)?,
    };
    Ok(terminal::show(&text)?)
}

fn instant_report(request: &SunRequest, sky: &Sky, json: bool) -> Result<String, Refusal> {
    let instant = instant_argument("TIME", request.time.as_deref().unwrap_or_default())?;
    let stop = request.place.as_deref().map(|text| place_argument("PLACE", text)).transpose()?;
    let brief = sun_brief(instant, stop, sky);
    Ok(if json { reports::sun_json(&brief)? } else { reports::sun_text(&brief) })
}

fn year_report(year: i32, sky: &Sky, json: bool) -> Result<String, Refusal> {
    if !YEARS.contains(&year) {
        return Err(Refusal::Year(year));
    }
    let moments: Vec<_> =
        year_moments(year).into_iter().map(|m| (m, sun_brief(m.instant, None, sky))).collect();
    Ok(if json { reports::year_json(&moments)? } else { reports::year_text(year, &moments) })
}
