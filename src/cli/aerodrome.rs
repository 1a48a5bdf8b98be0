//! `gloamline aerodrome`.

use super::Outcome;
use super::arguments::AerodromeRequest;
use super::files::{Batch, FileError};
use super::terminal;
use gloamline::charts::{self, canvas::CanvasError};
use gloamline::day::{DayRange, PlaceDays, RangeError, field, place_days};
use gloamline::intake::{IntakeError, date_argument, place_argument};
use gloamline::reports;
use gloamline::sky::Sky;
use gloamline::units::{Dut1, Dut1Error};
use std::path::Path;

#[derive(Debug, thiserror::Error)]
enum Refusal {
    #[error("{0}")]
    Intake(#[from] IntakeError),
    #[error("--dut1-s: {0}")]
    Dut1(#[from] Dut1Error),
    #[error("--on, --to: {0}")]
    Range(#[from] RangeError),
    #[error("{0}")]
    Json(#[from] serde_json::Error),
    #[error("{0}")]
    Csv(#[from] csv::Error),
    #[error("{0}")]
    Picture(#[from] CanvasError),
    #[error("{0}")]
    File(#[from] FileError),
    #[error("standard output: {0}")]
    Output(#[from] std::io::Error),
}

pub(super) fn run(request: &AerodromeRequest) -> Outcome {
    Outcome::of(told(request), |refusal| match refusal {
        Refusal::Intake(error) => error.hint(),
        _ => None,
    })
}

fn told(request: &AerodromeRequest) -> Result<(), Refusal> {
    let sky = Sky::new(Dut1::from_s(request.dut1_s)?);
    let stop = place_argument("CODE", &request.place)?;
    let first = date_argument("--on", &request.on)?;
    let last = request.to.as_deref().map_or(Ok(first), |text| date_argument("--to", text))?;
    let here = place_days(stop, DayRange::new(first, last)?, &sky)?;
    if let Some(folder) = &request.out {
        write(folder, &here, &sky)?;
    }
    let text = match request.form.as_str() {
        "json" => reports::days_json(&here)?,
        "csv" => reports::days_csv(&here)?,
        _ => reports::days_text(&here),
    };
    Ok(terminal::show(&text)?)
}

fn write(folder: &Path, here: &PlaceDays, sky: &Sky) -> Result<(), Refusal> {
    let stem = reports::days_stem(here);
    let picture = charts::year(here, &field(here, sky))?;
    let mut batch = Batch::new(folder)?;
    batch.add(&format!("{stem}.txt"), reports::days_text(here).as_bytes())?;
    batch.add(&format!("{stem}.json"), reports::days_json(here)?.as_bytes())?;
    batch.add(&format!("{stem}.csv"), reports::days_csv(here)?.as_bytes())?;
    batch.add(&format!("{stem}.svg"), picture.to_svg().as_bytes())?;
    batch.add(&format!("{stem}.png"), &picture.to_png(1.0)?)?;
    Ok(batch.finish()?)
}
