//! A range of civil dates, valid in itself.

use crate::units::YEARS;
use chrono::{Datelike, NaiveDate};

/// The most dates that one range holds.
pub const LONGEST_DAYS: i64 = 400;

/// The first and the last date of a range.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct DayRange {
    first: NaiveDate,
    last: NaiveDate,
}

/// Why there is no such range, or no day in it.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
pub enum RangeError {
    /// It ends before it begins.
    #[error("the last date, {last}, is before the first, {first}")]
    Backwards {
        /// As given.
        first: NaiveDate,
        /// As given.
        last: NaiveDate,
    },
    /// It is longer than anything is asked for.
    #[error("{days} dates from {first} to {last} are more than {LONGEST_DAYS}")]
    TooLong {
        /// As given.
        first: NaiveDate,
        /// As given.
        last: NaiveDate,
        /// How many.
        days: i64,
    },
    /// A date beyond the ephemeris.
    #[error("{0} is outside the years {first} to {last}", first = YEARS.start(), last = YEARS.end())]
    Years(NaiveDate),
    /// The clock skipped it.
    #[error("the clocks at {place} skipped {date}: there was no such date")]
    NoSuchDate {
        /// Where.
        place: String,
        /// Which.
        date: NaiveDate,
    },
}

impl DayRange {
    /// The dates from the first to the last, both included.
    ///
    /// # Errors
    /// A last date before the first, more than [`LONGEST_DAYS`], or dates outside the years served.
    pub fn new(first: NaiveDate, last: NaiveDate) -> Result<Self, RangeError> {
        if let Some(beyond) = [first, last].into_iter().find(|date| !YEARS.contains(&date.year())) {
            return Err(RangeError::Years(beyond));
        }
        let days = last.signed_duration_since(first).num_days() + 1;
        match days {
            ..=0 => Err(RangeError::Backwards { first, last }),
            1..=LONGEST_DAYS => Ok(Self { first, last }),
            _ => Err(RangeError::TooLong { first, last, days }),
        }
    }

    /// The first date.
    pub fn first(self) -> NaiveDate {
        self.first
    }

    /// The last date.
    pub fn last(self) -> NaiveDate {
        self.last
    }

    /// How many dates the calendar has in it.
    pub fn len(self) -> usize {
        usize::try_from(self.last.signed_duration_since(self.first).num_days() + 1).unwrap_or(1)
    }

    /// Whether it holds no date: never.
    pub fn is_empty(self) -> bool {
        false
    }

    /// The dates, in order.
    pub fn dates(self) -> impl Iterator<Item = NaiveDate> {
        self.first.iter_days().take(self.len())
    }
}

#[cfg(test)]
mod tests {
    use super::{DayRange, LONGEST_DAYS, RangeError};
    use chrono::{Days, NaiveDate};

    #[test]
    fn a_range_holds_from_one_date_to_four_hundred() {
        let date = |text: &str| text.parse::<NaiveDate>().unwrap();
        let (first, most) = (date("2026-01-01"), Days::new(LONGEST_DAYS as u64));
        assert_eq!(DayRange::new(first, first).unwrap().dates().collect::<Vec<_>>(), [first]);
        assert_eq!(DayRange::new(first, first + most - Days::new(1)).unwrap().len(), 400);
        assert!(matches!(DayRange::new(first, first + most), Err(RangeError::TooLong { days: 401, .. })));
        assert!(matches!(DayRange::new(first, first - Days::new(1)), Err(RangeError::Backwards { .. })));
        assert!(matches!(DayRange::new(date("1972-12-31"), first), Err(RangeError::Years(_))));
        assert!(matches!(DayRange::new(first, NaiveDate::MAX), Err(RangeError::Years(_))));
    }
}
