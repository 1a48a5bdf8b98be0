//! `gloamline brief`.

use super::Outcome;
use super::arguments::{BriefRequest, Form};
use super::files::{self, Batch, FileError};
use super::fixes;
use super::terminal;
use gloamline::intake::{
    BrightnessError, Columns, Fixes, Flight, Inline, InputKind, IntakeError, Origin, PolarLimits, Problem,
    TrackOptions, date_argument, flight_file_with_fixes, inline_flight, kind_of, lux_levels, plain, tracks,
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
    levels_lux: Option<Vec<f64>>,
    fixes: Fixes,
}

/// Briefs every flight asked for; a bad one does not keep the others back.
pub(super) fn run(request: &BriefRequest) -> Outcome {
    let mut common = match common(request) {
        Ok(common) => common,
        Err(problem) => {
            terminal::complain(&problem, None);
            return Outcome::Failed;
        }
    };
    let (mut briefs, mut refused) = (Vec::new(), 0);
    if let Some(path) = &request.fixes {
        match fixes::read(path) {
            Ok((fixes, bad)) => (common.fixes, refused) = (fixes, bad),
            Err(problem) => {
                terminal::complain(&problem, None);
                return Outcome::Failed;
            }
        }
    }
    for flight in flights(request, &common.fixes) {
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
    #[error("--lux-levels: {0}")]
    Levels(#[from] BrightnessError),
}

fn common(request: &BriefRequest) -> Result<Common, OptionError> {
    let dut1 = Dut1::from_s(request.dut1_s)?;
    let usual = PolarLimits::default();
    let given = request.north_polar_area.is_some() || request.south_polar_area.is_some();
    let north = request.north_polar_area.unwrap_or(usual.north.deg());
    let south = request.south_polar_area.unwrap_or(-usual.south.deg());
    let polar_limits = if given { Some(PolarLimits::from_deg(north, south)?) } else { None };
    let levels_lux = request.lux_levels.clone().map(lux_levels).transpose()?;
    Ok(Common { dut1, sky: Sky::new(dut1), polar_limits, levels_lux, fixes: Fixes::default() })
}

/// Each flight with the name of its source, read one at a time.
fn flights(request: &BriefRequest, fixes: &Fixes) -> Vec<Result<(Flight, String), Refusal>> {
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
            ground_speed_kt: inline.ground_speed_kt,
            route: inline.route.as_deref(),
            fixes: Some(fixes),
        };
        return vec![
            inline_flight(&given).map(|flight| (flight, "the flight".to_string())).map_err(Refusal::from),
        ];
    }
    request.files.iter().flat_map(|path| read_flights(path, (request, fixes))).collect()
}

/// The flights of a file: one of a flight file, or all of a recording, the kind told by content and ending.
fn read_flights(
    path: &Path,
    (request, fixes): (&BriefRequest, &Fixes),
) -> Vec<Result<(Flight, String), Refusal>> {
    let source_name = files::source_name(path);
    let bytes = match files::read(path) {
        Ok(bytes) => bytes,
        Err(error) => return vec![Err(error.into())],
    };
    match kind_of(&bytes, &source_name) {
        None | Some(InputKind::Flight) => {
            vec![
                planned(&bytes, &source_name, fixes)
                    .map(|flight| (flight, source_name))
                    .map_err(Refusal::from),
            ]
        }
        Some(_) => recorded(&bytes, &source_name, request),
    }
}

fn planned(bytes: &[u8], source_name: &str, fixes: &Fixes) -> Result<Flight, IntakeError> {
    let bytes = plain(bytes, source_name)?;
    let text = std::str::from_utf8(&bytes).map_err(|error| IntakeError {
        source_name: source_name.to_string(),
        origin: Origin::Whole,
        problem: Problem::NotText(error.valid_up_to()),
    })?;
    // a byte-order mark says nothing that UTF-8 does not
    flight_file_with_fixes(text.trim_start_matches('\u{feff}'), source_name, fixes)
}

/// A recording's flights, with the refusals of those that cannot be used.
fn recorded(
    bytes: &[u8],
    source_name: &str,
    request: &BriefRequest,
) -> Vec<Result<(Flight, String), Refusal>> {
    let read = track_options(request).and_then(|options| tracks(bytes, source_name, &options));
    let read = match read {
        Ok(read) => read,
        Err(error) => return vec![Err(error.into())],
    };
    let stem = Path::new(source_name).file_stem().map_or("recording".into(), |stem| stem.to_string_lossy());
    let stem = stem.split('.').next().unwrap_or("recording").to_string();
    let used = read.tracks.into_iter().map(|track| Ok((track.flight(&stem), source_name.to_string())));
    used.chain(read.refused.into_iter().map(|error| Err(error.into()))).collect()
}

fn track_options(request: &BriefRequest) -> Result<TrackOptions, IntakeError> {
    let columns = request.columns.as_deref().map(|text| Columns::parse(text, "--columns")).transpose()?;
    let date = request.recorded_on.as_deref().map(|text| date_argument("--recorded-on", text)).transpose()?;
    let usual = TrackOptions::default();
    Ok(TrackOptions {
        columns: columns.unwrap_or_default(),
        date,
        swap_lat_lon: request.swap_lat_lon,
        ..usual
    })
}

fn briefed(mut flight: Flight, source_name: &str, common: &Common) -> Result<Brief, Refusal> {
    flight.polar_limits = flight.polar_limits.or(common.polar_limits);
    flight.brightness.levels_lux = flight.brightness.levels_lux.or_else(|| common.levels_lux.clone());
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
