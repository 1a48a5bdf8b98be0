//! The brightness outside as a brief's share, and what a planner's own factors make of it inside.

use crate::intake::Brightness;
use crate::light::{Exposure, LightMeter, MoonLight, Sample, Trace, USUAL_LEVELS, exposure};
use crate::path::Path;
use crate::sky::{Lux, Sky};

/// How bright it is outside on level ground beneath a clear sky.
#[derive(Debug, Clone)]
pub struct ExposureView {
    /// Sums, levels and extremes.
    pub exposure: Exposure,
    /// The brightness at each of the brief's minutes, in their order.
    pub minutes: Vec<Lux>,
    /// What the planner's own factors make of it, if any was given.
    pub inside: Option<Inside>,
}

/// The light outside times the planner's own factors: no statement about any real window.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Inside {
    /// As given.
    pub transmittance: Option<f64>,
    /// As given.
    pub view_factor: Option<f64>,
    /// Lux-hours outside times every factor given.
    pub lux_hours: f64,
}

impl ExposureView {
    /// The brightness at take-off.
    pub fn at_takeoff(&self) -> Lux {
        self.minutes[0]
    }

    /// The brightness at landing.
    pub fn at_landing(&self) -> Lux {
        self.minutes[self.minutes.len() - 1]
    }
}

/// Measures the light along a path for what was asked.
pub(super) fn view(
    (path, sky): (&Path, &Sky),
    bodies: (&Trace, &MoonLight),
    minutes: &[Sample],
    asked: &Brightness,
) -> ExposureView {
    let own: Option<Vec<Lux>> =
        asked.levels_lux.as_ref().map(|levels| levels.iter().copied().map(Lux).collect());
    let exposure = exposure(path, sky, bodies, own.as_deref().unwrap_or(&USUAL_LEVELS));
    let meter = LightMeter::new(path, sky);
    ExposureView {
        minutes: minutes.iter().map(|sample| meter.at(sample.at_s)).collect(),
        inside: inside(exposure.lux_hours, asked),
        exposure,
    }
}

fn inside(outside: f64, asked: &Brightness) -> Option<Inside> {
    let (transmittance, view_factor) = (asked.transmittance, asked.view_factor);
    if transmittance.is_none() && view_factor.is_none() {
        return None;
    }
    let lux_hours = outside * transmittance.unwrap_or(1.0) * view_factor.unwrap_or(1.0);
    Some(Inside { transmittance, view_factor, lux_hours })
}
