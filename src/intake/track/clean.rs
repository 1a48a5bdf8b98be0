//! From points as recorded to a track that can be flown: sorted, without repeats and jumps, heights filled in.
//!
//! Does not know in what format the points came.

use super::super::draft::LONGEST_H;
use super::jump::believed;
use super::raw::{RawPoint, RawTrack, Tally};
use super::repair::{Bridge, Repair, Repairs};
use super::{Found, TrackOptions, TrackPoint, TrackProblem};
use crate::units::Metres;
use std::ops::RangeInclusive;

/// The heights of aircraft, of fields below the sea among them: the Dead Sea's is at −1,240 ft. The highest is that of
/// flight files.
const HEIGHTS_M: RangeInclusive<f64> = Metres::from_feet(-2_000.0).0..=Metres::from_feet(60_000.0).0;
/// Latitudes and longitudes are taken for swapped if at least this share of the points says so.
const SWAPPED_SHARE: f64 = 0.01;

/// The name, the points and what was mended.
type Cleaned = (Option<String>, Vec<TrackPoint>, Repairs);

/// Mends what can be mended of a track.
pub(super) fn clean(raw: RawTrack, options: &TrackOptions) -> Found<Cleaned> {
    let RawTrack { name, at, mut points, tally, clock, unit_guessed } = raw;
    check_swapped(&tally, points.len())?;
    if points.is_empty() {
        let (at, problem) = tally.first_untimed.unwrap_or((at, TrackProblem::NoPlaces));
        return Err((Some(at), problem));
    }
    let mut repairs = Repairs::default();
    repairs.note(tally.untimed, Repair::Untimed);
    repairs.note(tally.out_of_years, Repair::OutOfYears);
    repairs.note(tally.unplaced, Repair::Unplaced);
    repairs.note(tally.at_zero, Repair::AtZero);
    repairs.note(clock.zoneless, Repair::UtcAssumed);
    repairs.note(clock.midnights, Repair::Midnights);
    sort(&mut points, &mut repairs);
    let recorded = points.len();
    drop_repeats(&mut points, &mut repairs);
    if points.len() == 1 && recorded > 1 {
        return Err((Some(at), TrackProblem::OneInstant(recorded)));
    }
    let distinct = points.len();
    drop_jumps(&mut points, options.max_speed_kt, &mut repairs);
    if points.len() == 1 && distinct > 1 {
        return Err((Some(at), TrackProblem::AllJumps(options.max_speed_kt.to_string())));
    }
    check_duration(&points).map_err(|problem| (Some(at), problem))?;
    repairs.0.extend(unit_guessed.map(|(column, why)| Repair::UnitAssumed { column, why }));
    fill_heights(&mut points, &mut repairs);
    note_bridges(&points, options.gap_s, &mut repairs);
    Ok((name, points.iter().map(finished).collect(), repairs))
}

fn finished(point: &RawPoint) -> TrackPoint {
    let height = Some(point.height_m).filter(|height| height.is_finite()).map(Metres);
    TrackPoint { instant: point.instant, place: point.place, height }
}

fn check_swapped(tally: &Tally, usable: usize) -> Found<()> {
    let all = (usable + tally.lost()) as f64;
    match tally.first_swapped {
        Some((at, lat)) if tally.swapped > 1 && tally.swapped as f64 >= SWAPPED_SHARE * all => {
            Err((Some(at), TrackProblem::Swapped(lat.to_string())))
        }
        _ => Ok(()),
    }
}

fn check_duration(points: &[RawPoint]) -> Result<(), TrackProblem> {
    let (Some(first), Some(last)) = (points.first(), points.last()) else {
        return Err(TrackProblem::OnePoint);
    };
    let hours = last.instant.since_s(first.instant) / 3600.0;
    if points.len() < 2 {
        return Err(TrackProblem::OnePoint);
    }
    if hours > LONGEST_H {
        return Err(TrackProblem::TooLong { hours: format!("{hours:.1}") });
    }
    Ok(())
}

/// Sorts by time; points of one time stay as they were recorded.
fn sort(points: &mut [RawPoint], repairs: &mut Repairs) {
    let mut latest = f64::NEG_INFINITY;
    let mut late = 0;
    for point in points.iter() {
        let s = point.instant.seconds();
        late += usize::from(s < latest);
        latest = latest.max(s);
    }
    if late > 0 {
        points.sort_by(|a, b| a.instant.seconds().total_cmp(&b.instant.seconds()));
    }
    repairs.note(late, Repair::Unsorted);
}

/// Keeps the first point of each time, with the height of a later one if it has none itself.
fn drop_repeats(points: &mut Vec<RawPoint>, repairs: &mut Repairs) {
    let (mut repeated, mut contradicted) = (0, 0);
    points.dedup_by(|later, first| {
        if later.instant != first.instant {
            return false;
        }
        if later.place == first.place {
            repeated += 1;
            if first.height_m.is_nan() {
                first.height_m = later.height_m;
            }
        } else {
            contradicted += 1;
        }
        true
    });
    repairs.note(repeated, Repair::Repeated);
    repairs.note(contradicted, Repair::Contradicted);
}

fn drop_jumps(points: &mut Vec<RawPoint>, max_speed_kt: f64, repairs: &mut Repairs) {
    let mut kept = believed(points, max_speed_kt).into_iter();
    let before = points.len();
    points.retain(|_| kept.next().unwrap_or(true));
    repairs.note(before - points.len(), |count| Repair::Jumped { count, max_speed_kt });
}

/// Fills missing heights along a straight line in time between their neighbours; at an end the nearest is held.
fn fill_heights(points: &mut [RawPoint], repairs: &mut Repairs) {
    let mut dropped = 0;
    for point in points.iter_mut().filter(|point| point.height_m.is_finite()) {
        if !HEIGHTS_M.contains(&point.height_m) {
            point.height_m = f64::NAN;
            dropped += 1;
        }
    }
    repairs.note(dropped, Repair::HeightsDropped);
    let known: Vec<usize> = (0..points.len()).filter(|&i| points[i].height_m.is_finite()).collect();
    let (Some(&first), Some(&last)) = (known.first(), known.last()) else {
        repairs.0.push(Repair::NoHeights);
        return;
    };
    repairs.note(points.len() - known.len(), Repair::HeightsFilled);
    let (low, high) = (points[first].height_m, points[last].height_m);
    points[..first].iter_mut().for_each(|point| point.height_m = low);
    points[last + 1..].iter_mut().for_each(|point| point.height_m = high);
    for pair in known.windows(2) {
        let (from, to) = (points[pair[0]], points[pair[1]]);
        let rate = (to.height_m - from.height_m) / to.instant.since_s(from.instant);
        for point in &mut points[pair[0] + 1..pair[1]] {
            point.height_m = from.height_m + rate * point.instant.since_s(from.instant);
        }
    }
}

fn note_bridges(points: &[RawPoint], gap_s: f64, repairs: &mut Repairs) {
    for pair in points.windows(2) {
        let (from, to) = (pair[0].instant, pair[1].instant);
        if to.since_s(from) > gap_s {
            repairs.0.push(Repair::Bridged(Bridge { from, to }));
        }
    }
}
