//! A flight as its planner holds it: two ends, two times, perhaps points between.

use super::ahead::{Alternate, LowSunLimits, StationAir};
use super::block::OnBlock;
use super::brightness::Brightness;
use super::pace::{Pace, ProfilePoint};
use super::place::Named;
use super::track::Repairs;
use crate::places::Aerodrome;
use crate::units::{Dut1, Instant, Latitude, Metres, Place, PlaceError};
use chrono_tz::Tz;

/// A flight, valid in itself: times in order and within the years answered for.
#[derive(Debug, Clone)]
pub struct Flight {
    /// What its planner calls it.
    pub name: String,
    /// Where it takes off.
    pub from: Stop,
    /// Where it lands.
    pub to: Stop,
    /// Take-off.
    pub takeoff: Instant,
    /// Landing, where its planner says when; otherwise it follows from the pace.
    pub landing: Option<Instant>,
    /// What tells how fast it is flown.
    pub pace: Pace,
    /// When it goes off blocks, where known.
    pub off_block: Option<Instant>,
    /// When it comes on blocks, where known.
    pub on_block: Option<OnBlock>,
    /// Heights and speeds along the way, in order; where there are any, the level is the highest of them.
    pub profile: Vec<ProfilePoint>,
    /// Cruise height above mean sea level.
    pub level: Option<Metres>,
    /// How fast it climbs to that height and descends from it; without it the height holds from take-off to landing.
    pub climb: Option<ClimbRates>,
    /// Height of the cloud tops or terrain that make the flight deck's horizon, if not the sea.
    pub horizon: Option<Metres>,
    /// The points between, in order.
    pub waypoints: Vec<RoutePoint>,
    /// Where its operator's authority draws the polar areas, if not where 14 CFR 121.7 does.
    pub polar_limits: Option<PolarLimits>,
    /// What it was recorded as, if it is no plan.
    pub recorded: Option<Recorded>,
    /// UT1 − UTC on its date, if the planner knows it.
    pub dut1: Option<Dut1>,
    /// What the planner asks about the brightness outside.
    pub brightness: Brightness,
    /// What counts as a low Sun ahead, if not what usually does.
    pub low_sun: Option<LowSunLimits>,
    /// The air at take-off, where known.
    pub from_air: Option<StationAir>,
    /// The air at landing, where known.
    pub to_air: Option<StationAir>,
    /// Where it may divert to, in the order given.
    pub alternates: Vec<Alternate>,
    /// What its planner should know of how it was read.
    pub warnings: Vec<String>,
}

/// One end of a flight.
#[derive(Debug, Clone)]
pub struct Stop {
    /// The code or coordinates it was given as.
    pub label: String,
    /// The aerodrome's name, where it was given by code.
    pub name: Option<String>,
    /// Where it is.
    pub place: Place,
    /// The zone its clocks keep, where known.
    pub zone: Option<Tz>,
    /// The aerodrome, where it was given by code.
    pub aerodrome: Option<Aerodrome>,
}

impl Stop {
    /// Its height above mean sea level, where it was given by code.
    pub fn height(&self) -> Option<Metres> {
        self.aerodrome.map(Aerodrome::height)
    }
}

impl From<Named> for Stop {
    fn from(named: Named) -> Self {
        let Named { label, place, aerodrome, .. } = named;
        let name = aerodrome.map(|a| a.name().to_string());
        Self { label, name, place, zone: aerodrome.map(Aerodrome::zone), aerodrome }
    }
}

/// A flight that was recorded: its waypoints are the recording's points.
#[derive(Debug, Clone)]
pub struct Recorded {
    /// How many points were kept.
    pub points: usize,
    /// Seconds from take-off and height of each point, where heights are recorded.
    pub heights: Option<Vec<(f64, Metres)>>,
    /// What was mended.
    pub repairs: Repairs,
}

/// Rates of climb and descent, each a height a minute.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct ClimbRates {
    /// Upwards.
    pub climb: Metres,
    /// Downwards.
    pub descent: Metres,
}

/// A point of the route.
#[derive(Debug, Clone)]
pub struct RoutePoint {
    /// What it was given as.
    pub label: String,
    /// Where it is.
    pub place: Place,
    /// When it is passed, if the planner says so.
    pub time: Option<Instant>,
    /// The tailwind on the leg that ends here, in metres a second, where the flight is flown at an airspeed.
    pub wind_m_s: Option<f64>,
}

/// Where the polar areas begin.
///
/// # Source
/// The default is 14 CFR 121.7 (72 FR 1878, 16 January 2007): the North Polar Area is all north of 78°00′N, the South
/// Polar Area all south of 60°00′S. Other states draw them elsewhere (one at 67°S: AC-OPS 27, 2010), so both are data.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PolarLimits {
    /// The northern area's limit.
    pub north: Latitude,
    /// The southern area's limit.
    pub south: Latitude,
}

impl PolarLimits {
    /// Limits in degrees of latitude, each counted from the equator towards its own pole.
    ///
    /// # Errors
    /// Outside 0° to 90°.
    pub fn from_deg(north: f64, south: f64) -> Result<Self, PlaceError> {
        let limit =
            |deg: f64| if (0.0..=90.0).contains(&deg) { Ok(deg) } else { Err(PlaceError::PolarLimit(deg)) };
        Ok(Self { north: Latitude::from_deg(limit(north)?)?, south: Latitude::from_deg(-limit(south)?)? })
    }
}

impl Default for PolarLimits {
    fn default() -> Self {
        Self { north: Latitude::NORTH_78, south: Latitude::SOUTH_60 }
    }
}
