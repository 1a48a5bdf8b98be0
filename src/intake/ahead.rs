//! What a flight file says of the low Sun, of the air at its ends and of its alternates.
//!
//! Does not know where any of them is used.

use super::file::{Found, Value, named, number, only, string, table, wrong};
use super::flight::Stop;
use super::gazetteer::Gazetteer;
use super::problem::Problem;
use super::time::duration_s;
use crate::units::Angle;
use std::ops::{Range, RangeInclusive};
use toml::de::DeTable;

/// What each table may hold.
pub(super) const LOW_SUN_FIELDS: [&str; 3] = ["sector_deg", "strong_deg", "up_to_deg"];
pub(super) const AIR_FIELDS: [&str; 2] = ["pressure_hpa", "temperature_c"];
pub(super) const ALTERNATE_FIELDS: [&str; 2] = ["at", "after"];
/// The most alternates of one flight.
const MOST_ALTERNATES: usize = 50;
/// The longest that an alternate is reached after it was abeam.
const LONGEST_AFTER_S: f64 = 24.0 * 3600.0;

const SECTORS_DEG: RangeInclusive<f64> = 1.0..=90.0;
const ELEVATIONS_DEG: RangeInclusive<f64> = 0.0..=60.0;
/// From the highest aerodromes (4,400 m, 590 hPa in standard air) to the strongest highs (1,085 hPa).
const PRESSURES_HPA: RangeInclusive<f64> = 500.0..=1100.0;
const TEMPERATURES_C: RangeInclusive<f64> = -90.0..=60.0;

/// What counts as a low Sun ahead.
///
/// # Source
/// The default is this tool's convention and no published limit: published events lie at bearings of some 10° and
/// elevations of 10° to 12° (ATSB, Launceston, 13 June 2025); a sector of 25° to either side is quoted in work on glare
/// from the ground (from memory).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LowSunLimits {
    /// The largest bearing from the track or the runway, to either side.
    pub sector: Angle,
    /// The largest at which it is called strong.
    pub strong: Angle,
    /// The highest apparent elevation.
    pub up_to: Angle,
}

impl Default for LowSunLimits {
    fn default() -> Self {
        Self { sector: Angle::from_deg(25.0), strong: Angle::from_deg(10.0), up_to: Angle::from_deg(15.0) }
    }
}

/// The air at an aerodrome; what is not given is left to the reckoning's own default.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct StationAir {
    /// Pressure at the field (QFE).
    pub pressure_hpa: Option<f64>,
    /// Temperature.
    pub temperature_c: Option<f64>,
}

/// An aerodrome that the flight may divert to.
#[derive(Debug, Clone)]
pub struct Alternate {
    /// Which.
    pub stop: Stop,
    /// Seconds after it is abeam at which it would be used.
    pub after_s: f64,
}

/// A number in a table, within its range, or the usual one where it is not given.
fn within(table: &DeTable<'_>, field: &'static str, range: &RangeInclusive<f64>) -> Found<Option<f64>> {
    let Some(value) = table.get(field) else { return Ok(None) };
    let given = number(field, value)?;
    if range.contains(&given) {
        return Ok(Some(given));
    }
    let (low, high) = (*range.start(), *range.end());
    Err((value.span(), Problem::OutOfRange { field, given, low, high }))
}

pub(super) fn low_sun(value: &Value<'_>) -> Found<LowSunLimits> {
    let table = table("low_sun", value)?;
    only(table, &LOW_SUN_FIELDS)?;
    let usual = LowSunLimits::default();
    let sector_deg = within(table, "sector_deg", &SECTORS_DEG)?.unwrap_or(usual.sector.deg());
    // a sector narrower than the usual strong one is strong throughout, unless told otherwise
    let strong_deg = within(table, "strong_deg", &(0.0..=sector_deg))?;
    let strong_deg = strong_deg.unwrap_or(usual.strong.deg().min(sector_deg));
    let up_to_deg = within(table, "up_to_deg", &ELEVATIONS_DEG)?.unwrap_or(usual.up_to.deg());
    Ok(LowSunLimits {
        sector: Angle::from_deg(sector_deg),
        strong: Angle::from_deg(strong_deg),
        up_to: Angle::from_deg(up_to_deg),
    })
}

pub(super) fn air(field: &'static str, value: &Value<'_>) -> Found<StationAir> {
    let table = table(field, value)?;
    only(table, &AIR_FIELDS)?;
    Ok(StationAir {
        pressure_hpa: within(table, "pressure_hpa", &PRESSURES_HPA)?,
        temperature_c: within(table, "temperature_c", &TEMPERATURES_C)?,
    })
}

/// Each alternate with the bytes it stands on.
pub(super) fn alternates(value: &Value<'_>, names: &Gazetteer<'_>) -> Found<Vec<(Alternate, Range<usize>)>> {
    let Some(list) = value.get_ref().as_array() else {
        return Err(wrong("alternate", value.get_ref(), "written as [[alternate]]", value.span()));
    };
    if list.len() > MOST_ALTERNATES {
        let problem = Problem::TooManyAlternates { count: list.len(), most: MOST_ALTERNATES };
        return Err((value.span(), problem));
    }
    list.iter().map(|value| Ok((alternate(value, names)?, value.span()))).collect()
}

fn alternate(value: &Value<'_>, names: &Gazetteer<'_>) -> Found<Alternate> {
    let table = table("alternate", value)?;
    only(table, &ALTERNATE_FIELDS)?;
    let at = table.get("at").ok_or((value.span(), Problem::MissingField("at")))?;
    let stop = Stop::from(named("at", at, |text| names.find(text))?);
    let Some(after) = table.get("after") else { return Ok(Alternate { stop, after_s: 0.0 }) };
    let after_s = duration_s(string("after", after)?).map_err(|problem| (after.span(), problem))?;
    if after_s > LONGEST_AFTER_S {
        let (given, high) = (after_s / 3600.0, LONGEST_AFTER_S / 3600.0);
        return Err((after.span(), Problem::AfterTooLong { hours: given, longest: high }));
    }
    Ok(Alternate { stop, after_s })
}
