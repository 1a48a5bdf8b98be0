//! `gloamline brief`.

use super::Outcome;
use super::arguments::{BriefRequest, Form};
use super::files::{self, Batch, FileError};
use super::terminal;
use gloamline::intake::{
    Flight, Inline, IntakeError, Origin, PolarLimits, Problem, flight_file, inline_flight,
};
use gloamline::sky::Sky;
use gloamline::units::{Dut1, Dut1Error, PlaceError};
use gloamline::{Brief, brief, charts, reports};
use std::collections::HashSet;
use std::path::Path;

/// Anything that keeps one flight from being briefed.
#[derive(Debug, thiserror::Error)]
enum Refusal {
    #[error(transparent)]
    File(#[from] FileError),
    #[error(transparent)]
    Intake(#[from] IntakeError),
    #[error("{source_name}: {error}")]
    Flight { source_name: String, error: gloamline::path::FlightError },
    #[error("{0}")]
    Report(String),
}

impl Refusal {
    fn hint(&self) -> Option<String> {
        if let Self::Intake(error) = self { error.hint() } else { None }
    }
}

/// What holds for all flights of a run.
struct Common {
    dut1: Dut1,
    sky: Sky,
    polar_limits: Option<PolarLimits>,
}

/// Briefs every flight asked for; a bad one does not keep the others back.
pub(super) fn run(request: &BriefRequest) -> Outcome {
    let common = match common(request) {
        Ok(common) => common,
        Err(problem) => {
            terminal::complain(&problem, None);
            return Outcome::Failed;
        }
    };
    let (mut briefs, mut refused) = (Vec::new(), 0);
    for flight in flights(request) {
        match flight.and_then(|(flight, source)| briefed(flight, &source, &common)) {
            Ok(brief) => briefs.push(brief),
            Err(refusal) => {
                terminal::complain(&refusal, refusal.hint().as_deref());
                refused += 1;
            }
        }
    }
    let unwritten = written(request, &briefs);
    let shown = shown(&briefs, request.form)
        .map_or_else(Err, |text| terminal::show(&text).map_err(|e| e.to_string()));
    if let Err(problem) = shown {
        terminal::complain(&format!("standard output: {problem}"), None);
        return Outcome::Failed;
    }
    match (briefs.len() == unwritten, refused + unwritten) {
        (true, _) => Outcome::Failed,
        (false, 0) => Outcome::Done,
        (false, _) => Outcome::SomeRefused,
    }
}

#[derive(Debug, thiserror::Error)]
enum OptionError {
    #[error("--dut1-s: {0}")]
    Dut1(#[from] Dut1Error),
    #[error("--north-polar-area, --south-polar-area: {0}")]
    Polar(#[from] PlaceError),
}

fn common(request: &BriefRequest) -> Result<Common, OptionError> {
    let dut1 = Dut1::from_s(request.dut1_s)?;
    let usual = PolarLimits::default();
    let given = request.north_polar_area.is_some() || request.south_polar_area.is_some();
    let north = request.north_polar_area.unwrap_or(usual.north.deg());
    let south = request.south_polar_area.unwrap_or(-usual.south.deg());
    let polar_limits = if given { Some(PolarLimits::from_deg(north, south)?) } else { None };
    Ok(Common { dut1, sky: Sky::new(dut1), polar_limits })
}

/// Each flight with the name of its source, read one at a time.
fn flights(request: &BriefRequest) -> Vec<Result<(Flight, String), Refusal>> {
    let inline = &request.inline;
    if let Some(from) = &inline.from {
        let given = Inline {
            name: inline.name.as_deref(),
            from,
            to: inline.to.as_deref().unwrap_or_default(),
            takeoff: inline.takeoff.as_deref().unwrap_or_default(),
            airborne: inline.airborne.as_deref(),
            landing: inline.landing.as_deref(),
            level_ft: inline.level_ft,
            horizon_ft: inline.horizon_ft,
            climb_ft_min: inline.climb_ft_min,
            descent_ft_min: inline.descent_ft_min,
        };
        return vec![
            inline_flight(&given).map(|flight| (flight, "the flight".to_string())).map_err(Refusal::from),
        ];
    }
    request.files.iter().map(|path| read_flight(path)).collect()
}

fn read_flight(path: &Path) -> Result<(Flight, String), Refusal> {
    let source_name = files::source_name(path);
    let bytes = files::read(path)?;
    let text = std::str::from_utf8(&bytes).map_err(|error| IntakeError {
        source_name: source_name.clone(),
        origin: Origin::Whole,
        problem: Problem::NotText(error.valid_up_to()),
    })?;
    // a byte-order mark says nothing that UTF-8 does not
    Ok((flight_file(text.trim_start_matches('\u{feff}'), &source_name)?, source_name))
}

fn briefed(mut flight: Flight, source_name: &str, common: &Common) -> Result<Brief, Refusal> {
    flight.polar_limits = flight.polar_limits.or(common.polar_limits);
    let own_sky = flight.dut1.filter(|dut1| *dut1 != common.dut1).map(Sky::new);
    let sky = own_sky.as_ref().unwrap_or(&common.sky);
    brief(flight, sky).map_err(|error| Refusal::Flight { source_name: source_name.to_string(), error })
}

/// Writes each brief's files; returns how many flights could not be written.
fn written(request: &BriefRequest, briefs: &[Brief]) -> usize {
    let Some(folder) = &request.out else { return 0 };
    let mut taken = HashSet::new();
    let mut failed = 0;
    for brief in briefs {
        let stem = free_stem(&brief.flight.name, &mut taken);
        if let Err(refusal) = write_one(folder, &stem, brief) {
            terminal::complain(&refusal, None);
            failed += 1;
        }
    }
    failed
}

/// A stem that no flight of this run has taken: later ones of the same name are numbered.
fn free_stem(name: &str, taken: &mut HashSet<String>) -> String {
    let stem = reports::file_stem(name);
    let numbered = (1..).map(|n| if n == 1 { stem.clone() } else { format!("{stem}-{n}") });
    numbered.into_iter().find(|candidate| taken.insert(candidate.clone())).unwrap_or(stem)
}

fn write_one(folder: &Path, stem: &str, brief: &Brief) -> Result<(), Refusal> {
    let said = |e: &dyn std::fmt::Display| Refusal::Report(format!("{stem}: {e}"));
    let mut batch = Batch::new(folder)?;
    batch.add(&format!("{stem}.txt"), reports::text(brief).as_bytes())?;
    batch.add(&format!("{stem}.json"), reports::json(brief).map_err(|e| said(&e))?.as_bytes())?;
    batch.add(
        &format!("{stem}.csv"),
        reports::csv(std::slice::from_ref(brief)).map_err(|e| said(&e))?.as_bytes(),
    )?;
    batch.add(&format!("{stem}.geojson"), reports::geojson(brief).map_err(|e| said(&e))?.as_bytes())?;
    batch.add(&format!("{stem}.kml"), reports::kml(brief).as_bytes())?;
    let picture = charts::timeline(brief).map_err(|e| said(&e))?;
    batch.add(&format!("{stem}.svg"), picture.to_svg().as_bytes())?;
    batch.add(&format!("{stem}.png"), &picture.to_png(1.0).map_err(|e| said(&e))?)?;
    batch.finish()?;
    Ok(())
}

/// What goes to standard output.
fn shown(briefs: &[Brief], form: Form) -> Result<String, String> {
    match (form, briefs) {
        (_, []) => Ok(String::new()),
        (Form::Text, _) => Ok(briefs.iter().map(reports::text).collect::<Vec<_>>().join("\n\n")),
        (Form::Json, [one]) => reports::json(one).map_err(|e| e.to_string()),
        (Form::Json, several) => reports::json_list(several).map_err(|e| e.to_string()),
        (Form::Csv, _) => reports::csv(briefs).map_err(|e| e.to_string()),
    }
}
