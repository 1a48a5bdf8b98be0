//! What was mended of a recorded track, with a line for each.

use super::super::draft::said;
use super::super::problem::quoted;
use crate::units::Instant;
use std::fmt::{Display, Formatter, Result};

/// A silence of the recording, over which the path goes straight.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Bridge {
    /// The last point before it.
    pub from: Instant,
    /// The first point after it.
    pub to: Instant,
}

/// Why heights whose column names no unit were taken in one.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum UnitReason {
    /// Metres, since nothing speaks against it.
    Default,
    /// Feet, since as metres more than one in ten would be higher than aircraft fly.
    TooHigh,
    /// Feet, since they come in the steps in which transponders count.
    Stepped,
}

/// One kind of repair; counts are of points unless said otherwise.
#[derive(Debug, Clone, PartialEq)]
pub enum Repair {
    /// Times that cannot be read: dropped.
    Untimed(usize),
    /// Times outside the years answered for: dropped.
    OutOfYears(usize),
    /// Coordinates that are missing or do not exist: dropped.
    Unplaced(usize),
    /// Positions at exactly 0°, 0°: dropped.
    AtZero(usize),
    /// Times that name no zone: taken as UTC.
    UtcAssumed(usize),
    /// Midnights passed by times of day.
    Midnights(usize),
    /// Points that stood after later ones: sorted.
    Unsorted(usize),
    /// The same place at the same time again: dropped.
    Repeated(usize),
    /// Another place at a time that had one: dropped.
    Contradicted(usize),
    /// Points that need more than the fastest speed: dropped.
    Jumped {
        /// How many.
        count: usize,
        /// The fastest that is believed.
        max_speed_kt: f64,
    },
    /// Heights in a column that names no unit.
    UnitAssumed {
        /// The column.
        column: String,
        /// How a unit was found.
        why: UnitReason,
    },
    /// Heights that no aircraft flies at: taken as missing.
    HeightsDropped(usize),
    /// Heights that were missing: filled along a straight line in time, or held at an end.
    HeightsFilled(usize),
    /// No height anywhere.
    NoHeights,
    /// A silence.
    Bridged(Bridge),
}

/// Everything that was mended of one track, in the order in which it was.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Repairs(pub Vec<Repair>);

impl Repairs {
    /// The silences, in order.
    pub fn bridges(&self) -> impl Iterator<Item = Bridge> {
        self.0.iter().filter_map(|repair| match repair {
            Repair::Bridged(bridge) => Some(*bridge),
            _ => None,
        })
    }

    /// Notes a repair of so many points, if there are any.
    pub(super) fn note(&mut self, count: usize, repair: impl FnOnce(usize) -> Repair) {
        if count > 0 {
            self.0.push(repair(count));
        }
    }
}

impl Display for Repair {
    fn fmt(&self, f: &mut Formatter<'_>) -> Result {
        let points = |count: &usize| if *count == 1 { "1 point".into() } else { format!("{count} points") };
        match self {
            Self::Untimed(n) => write!(f, "{} without a time that can be read dropped", points(n)),
            Self::OutOfYears(n) => write!(f, "{} outside the years answered for dropped", points(n)),
            Self::Unplaced(n) => write!(f, "{} without a position that exists dropped", points(n)),
            Self::AtZero(n) => write!(f, "{} at exactly 0°, 0° dropped", points(n)),
            Self::UtcAssumed(n) => write!(f, "{} with a time that names no zone taken as UTC", points(n)),
            Self::Midnights(1) => write!(f, "times of day followed past a midnight"),
            Self::Midnights(n) => write!(f, "times of day followed past {n} midnights"),
            Self::Unsorted(n) => write!(f, "{} out of order sorted by time", points(n)),
            Self::Repeated(n) => write!(f, "{} with a time and place already given dropped", points(n)),
            Self::Contradicted(n) => {
                write!(f, "{} with another place at a time already given dropped", points(n))
            }
            Self::Jumped { count, max_speed_kt } => {
                write!(f, "{} needing more than {max_speed_kt} kt dropped", points(count))
            }
            Self::UnitAssumed { column, why } => {
                let taken = match why {
                    UnitReason::Default => "metres",
                    UnitReason::TooHigh => "feet, since as metres they were too high",
                    UnitReason::Stepped => "feet, since they come in steps of 25",
                };
                write!(f, "heights in {}, which names no unit, taken as {taken}", quoted(column))
            }
            Self::HeightsDropped(n) => {
                write!(f, "heights of {} that no aircraft flies at dropped", points(n))
            }
            Self::HeightsFilled(n) => write!(f, "heights of {} filled in by time", points(n)),
            Self::NoHeights => write!(f, "no heights are recorded"),
            Self::Bridged(Bridge { from, to }) => {
                let minutes = to.since_s(*from) / 60.0;
                write!(f, "no points from {} to {} ({minutes:.0} min): bridged", said(*from), said(*to))
            }
        }
    }
}
