//! The brightness outside, as a record.

use super::{rounded, when};
use crate::light::{Above, LuxAt};
use crate::reports::caution;
use crate::{Brief, Inside};
use serde::Serialize;

#[derive(Debug, Serialize)]
pub(super) struct IlluminanceRecord {
    meaning: &'static str,
    at_takeoff_lux: f64,
    at_landing_lux: f64,
    lux_hours: f64,
    seconds_above: Vec<AboveRecord>,
    brightest: LuxRecord,
    darkest: LuxRecord,
    #[serde(skip_serializing_if = "Option::is_none")]
    inside: Option<InsideRecord>,
}

#[derive(Debug, Serialize)]
struct AboveRecord {
    lux: f64,
    seconds: f64,
    crossings: Vec<LevelCrossingRecord>,
}

#[derive(Debug, Serialize)]
struct LevelCrossingRecord {
    utc: String,
    becomes: &'static str,
}

#[derive(Debug, Serialize)]
struct LuxRecord {
    utc: String,
    lux: f64,
}

#[derive(Debug, Serialize)]
struct InsideRecord {
    meaning: &'static str,
    #[serde(skip_serializing_if = "Option::is_none")]
    transmittance: Option<f64>,
    #[serde(skip_serializing_if = "Option::is_none")]
    view_factor: Option<f64>,
    inside_lux_hours: f64,
}

impl IlluminanceRecord {
    pub(super) fn of(brief: &Brief) -> Self {
        let (view, exposure) = (&brief.exposure, &brief.exposure.exposure);
        Self {
            meaning: caution::OUTSIDE,
            at_takeoff_lux: figures(view.at_takeoff().0),
            at_landing_lux: figures(view.at_landing().0),
            lux_hours: figures(exposure.lux_hours),
            seconds_above: exposure.above.iter().map(|above| above_record(brief, above)).collect(),
            brightest: lux_record(brief, exposure.brightest),
            darkest: lux_record(brief, exposure.darkest),
            inside: view.inside.map(inside_record),
        }
    }
}

fn above_record(brief: &Brief, above: &Above) -> AboveRecord {
    let crossing = |(at_s, direction): &(f64, crate::light::Direction)| LevelCrossingRecord {
        utc: when(brief, *at_s),
        becomes: if *direction == crate::light::Direction::Rising { "brighter" } else { "darker" },
    };
    AboveRecord {
        lux: above.level.0,
        seconds: rounded(above.seconds, 1),
        crossings: above.crossings.iter().map(crossing).collect(),
    }
}

fn lux_record(brief: &Brief, at: LuxAt) -> LuxRecord {
    LuxRecord { utc: when(brief, at.at_s), lux: figures(at.lux.0) }
}

fn inside_record(inside: Inside) -> InsideRecord {
    InsideRecord {
        meaning: caution::INSIDE,
        transmittance: inside.transmittance,
        view_factor: inside.view_factor,
        inside_lux_hours: figures(inside.lux_hours),
    }
}

/// To five significant figures, more than any clear sky keeps.
pub(in crate::reports) fn figures(value: f64) -> f64 {
    if value > 0.0 { rounded(value, 4 - value.log10().floor() as i32) } else { 0.0 }
}

#[cfg(test)]
mod tests {
    use super::figures;

    #[test]
    fn five_figures_are_kept_of_any_size() {
        assert_eq!(figures(123_456.78), 123_460.0);
        assert_eq!(figures(0.000_612_345_6), 0.000_612_35);
        assert_eq!(figures(0.0), 0.0);
    }
}
