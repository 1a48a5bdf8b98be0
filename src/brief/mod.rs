//! Everything that is said of one flight: the value that every report renders.

mod ahead;
mod alternates;
mod boundary;
mod deck;
mod exposure;
mod moon;
mod runways;

pub use alternates::{AlternateView, Polar};
pub use deck::DeckView;
pub use exposure::{ExposureView, Inside};
pub use moon::MoonView;
pub use runways::{Glare, RunwaySun, RunwayView};

use crate::intake::{Flight, LowSunLimits, PolarLimits};
use crate::light::{
    AheadSpan, Doubt, Light, Limit, Lookout, REFRACTION_SCATTER, Sample, Trace, Trust, beneath, doubts,
    elevation_scatter, trust,
};
use crate::path::{CircleCrossing, FlightError, Passed, Path, circles, fly};
use crate::sky::Sky;
use crate::units::{Angle, Instant};

/// Seconds between the rows of a brief's table.
const STEP_S: f64 = 60.0;

/// One flight with its path, its light and what it crosses.
#[derive(Debug, Clone)]
pub struct Brief {
    /// The flight as it was given.
    pub flight: Flight,
    /// Where it is at any instant.
    pub path: Path,
    /// The light beneath it.
    pub light: Light,
    /// The Sun at each crossing, in the crossings' order.
    pub at_crossings: Vec<Sample>,
    /// How far each crossing can be trusted, in the crossings' order.
    pub trusts: Vec<Trust>,
    /// Turns of the Sun so near to the horizon's limit that refraction could add or take away a pair of crossings.
    pub doubts: Vec<Doubt>,
    /// What the flight deck sees, if the flight's level is known.
    pub deck: Option<DeckView>,
    /// Limits that the Sun meets within two minutes of take-off, and of landing, at the place itself.
    pub on_boundary: (Vec<Limit>, Vec<Limit>),
    /// The Sun at each touch, in the touches' order.
    pub at_touches: Vec<Sample>,
    /// The Sun at each waypoint, in the flight's order.
    pub at_waypoints: Vec<Sample>,
    /// The Sun where it stands highest.
    pub at_highest: Sample,
    /// The Sun where it stands lowest.
    pub at_lowest: Sample,
    /// The Sun each minute from take-off, and at landing.
    pub minutes: Vec<Sample>,
    /// The Moon.
    pub moon: MoonView,
    /// The brightness outside.
    pub exposure: ExposureView,
    /// The circles crossed.
    pub circles: Vec<CircleCrossing>,
    /// Where the polar areas were taken to begin.
    pub polar_limits: PolarLimits,
    /// The northernmost point.
    pub northernmost: Passed,
    /// The southernmost point.
    pub southernmost: Passed,
    /// When a low Sun stands ahead.
    pub low_sun: Vec<AheadSpan>,
    /// What was taken for a low Sun ahead, in flight and along runways.
    pub low_sun_limits: LowSunLimits,
    /// The Sun against the runways at take-off and at landing.
    pub runways: [RunwayView; 2],
    /// The alternates in the flight's order.
    pub alternates: Vec<AlternateView>,
    /// UT1 − UTC as it was taken, in seconds.
    pub dut1_s: f64,
}

/// Briefs a flight: flies it, finds the light along it, and looks at the Sun where it matters.
///
/// # Errors
/// A flight that cannot be flown.
pub fn brief(flight: Flight, sky: &Sky) -> Result<Brief, FlightError> {
    let path = fly(&flight)?;
    let trace = Trace::beneath(&path, sky);
    let light = beneath(&trace, path.airborne_s);
    let lookout = Lookout::new(&path, &light, sky);
    let ut1_known = flight.dut1.is_some();
    let at_crossings: Vec<Sample> = light.crossings.iter().map(|c| lookout.at(c.at_s)).collect();
    let deck = deck::view(&flight, &trace, (&path, sky), &lookout);
    let at_touches = light.touches.iter().map(|t| lookout.at(t.at_s)).collect();
    let at_waypoints = path.waypoints_s().iter().map(|&at_s| lookout.at(at_s)).collect();
    let (at_highest, at_lowest) = (lookout.at(light.highest.at_s), lookout.at(light.lowest.at_s));
    let minutes = lookout.every_s(STEP_S);
    let moon = moon::view((&path, sky), &light, &minutes);
    let exposure = exposure::view((&path, sky), (&trace, &moon.moon), &minutes, &flight.brightness);
    let polar_limits = flight.polar_limits.unwrap_or_default();
    let low_sun_limits = flight.low_sun.unwrap_or_default();
    let ends = (&minutes[0], &minutes[minutes.len() - 1]);
    Ok(Brief {
        low_sun: ahead::spans(&trace, (&path, sky), (&light, deck.as_ref()), low_sun_limits),
        runways: [
            runways::view(&flight.from, ends.0, flight.from_air, low_sun_limits),
            runways::view(&flight.to, ends.1, flight.to_air, low_sun_limits),
        ],
        alternates: flight.alternates.iter().map(|one| alternates::view(one, &path, sky)).collect(),
        low_sun_limits,
        circles: circles(&path, sky.true_obliquity(path.middle()), polar_limits),
        northernmost: path.northernmost(),
        southernmost: path.southernmost(),
        dut1_s: sky.dut1_s(),
        polar_limits,
        trusts: trusts(&trace, &light, &at_crossings, ut1_known),
        at_crossings,
        doubts: doubts(&trace, (Limit::Horizon, Limit::Horizon.elevation()), REFRACTION_SCATTER),
        on_boundary: boundary::of(&path, sky),
        deck,
        at_touches,
        at_waypoints,
        at_highest,
        at_lowest,
        minutes,
        moon,
        exposure,
        light,
        path,
        flight,
    })
}

/// How far each crossing beneath can be trusted: refraction counts at the horizon only.
fn trusts(trace: &Trace, light: &Light, at_crossings: &[Sample], ut1_known: bool) -> Vec<Trust> {
    let pairs = light.crossings.iter().zip(at_crossings);
    let one = |(crossing, sample): (&crate::light::Crossing, &Sample)| {
        let scatter = if crossing.limit == Limit::Horizon { REFRACTION_SCATTER } else { Angle::ZERO };
        trust(trace, crossing, crossing.limit.elevation(), elevation_scatter(sample, scatter, ut1_known))
    };
    pairs.map(one).collect()
}

impl Brief {
    /// The Sun at take-off.
    pub fn at_takeoff(&self) -> &Sample {
        &self.minutes[0]
    }

    /// When it comes on blocks, where known.
    pub fn on_block(&self) -> Option<Instant> {
        self.flight.on_block.map(|on| on.after(self.path.landing()))
    }

    /// The Sun at landing.
    pub fn at_landing(&self) -> &Sample {
        &self.minutes[self.minutes.len() - 1]
    }
}
