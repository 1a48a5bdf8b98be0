//! Polar day and polar night by the civil date: whether a date is one, and the dates between which it holds.

use super::clock::{CivilDay, Clock};
use crate::light::{Light, State, along};
use crate::path::Path;
use crate::sky::Sky;
use crate::units::{Place, YEARS};
use chrono::{Datelike, NaiveDate};

/// How many dates before and after are looked at: at a pole each lasts half a year.
const MOST_DATES: usize = 366;

/// What a date without sunrise and sunset is called.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum PolarKind {
    /// The Sun is up for the whole date.
    Day,
    /// The Sun is not up at any time of the date.
    Night,
}

/// A run of dates that are all polar day, or all polar night.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Polar {
    /// Which.
    pub kind: PolarKind,
    /// The first such date; nothing if it lies before the years served or more than a year back.
    pub first: Option<NaiveDate>,
    /// The last such date; nothing if it lies beyond the years served or more than a year ahead.
    pub last: Option<NaiveDate>,
}

impl PolarKind {
    /// What a day's light makes of it, if it is one.
    pub fn of(light: &Light) -> Option<Self> {
        let up = |state: State| state == State::Daylight;
        let mut states = light.segments.iter().map(|segment| up(segment.state));
        let first = states.next()?;
        let same = states.all(|state| state == first);
        same.then_some(if first { Self::Day } else { Self::Night })
    }
}

/// Looks for the ends of runs, date by date.
#[derive(Debug, Clone, Copy)]
pub(super) struct Search<'a> {
    pub(super) place: Place,
    pub(super) clock: Clock,
    pub(super) sky: &'a Sky,
}

impl Search<'_> {
    /// Each date's run, from the dates' own kinds.
    pub(super) fn runs(&self, dates: &[(NaiveDate, Option<PolarKind>)]) -> Vec<Option<Polar>> {
        let mut runs = Vec::with_capacity(dates.len());
        for group in dates.chunk_by(|a, b| a.1 == b.1) {
            let run = group[0].1.map(|kind| Polar {
                kind,
                first: self.last_alike(group[0].0, kind, |date| date.pred_opt()),
                last: self.last_alike(group[group.len() - 1].0, kind, |date| date.succ_opt()),
            });
            runs.extend(std::iter::repeat_n(run, group.len()));
        }
        runs
    }

    /// The last date of the same kind in one direction.
    fn last_alike(
        &self,
        from: NaiveDate,
        kind: PolarKind,
        step: impl Fn(NaiveDate) -> Option<NaiveDate>,
    ) -> Option<NaiveDate> {
        let mut alike = from;
        let mut date = from;
        for _ in 0..MOST_DATES {
            date = step(date).filter(|date| YEARS.contains(&date.year()))?;
            // a date that the clock skipped breaks no run
            let Some(day) = self.clock.day(date) else { continue };
            if self.kind(&day) != Some(kind) {
                return Some(alike);
            }
            alike = date;
        }
        None
    }

    fn kind(&self, day: &CivilDay) -> Option<PolarKind> {
        PolarKind::of(&along(&Path::standing(self.place, day.begin, day.seconds), self.sky))
    }
}
