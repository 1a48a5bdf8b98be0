//! Where names are looked up: codes and coordinates first, then the user's own fixes, of equal ones the nearest.
//!
//! Does not know flight files; distances here choose among fixes and are those on a sphere.

use super::fixes::Fixes;
use super::place::{Named, icao, place};
use super::problem::{Problem, quoted};
use crate::places::aerodrome;
use crate::units::{Metres, Place, dot};
use std::cell::{Cell, RefCell};

/// The Earth's mean radius: enough to say how far a fix is.
const MEAN_RADIUS_M: f64 = 6_371_009.0;
/// No more warnings than this are held of one flight.
const MOST_WARNINGS: usize = 50;

/// Looks names up in the order of a route, and keeps what its reader should know of them.
pub(super) struct Gazetteer<'f> {
    fixes: Option<&'f Fixes>,
    last: Cell<Option<Place>>,
    warnings: RefCell<Vec<String>>,
}

impl<'f> Gazetteer<'f> {
    pub(super) fn new(fixes: Option<&'f Fixes>) -> Self {
        Self { fixes, last: Cell::new(None), warnings: RefCell::default() }
    }

    /// A point of the route, which is where the next is looked for.
    pub(super) fn next(&self, text: &str) -> Result<Named, Problem> {
        let found = self.find(text)?;
        self.passed(found.place);
        Ok(found)
    }

    /// The route goes on from a place that was given in degrees.
    pub(super) fn passed(&self, place: Place) {
        self.last.set(Some(place));
    }

    /// A place that is no point of the route.
    pub(super) fn find(&self, text: &str) -> Result<Named, Problem> {
        let named = self.fixes.map_or(&[][..], |fixes| fixes.named(text));
        let found = match (place(text), named) {
            (Err(problem), []) => return Err(self.unknown(problem)),
            (Err(_), several) => self.nearest(text.trim(), several)?,
            (Ok(found), []) => found,
            (Ok(found), _) => {
                self.warn(format!(
                    "{} was taken for {}, and not for the fix of that name",
                    quoted(text.trim()),
                    if aerodrome(text).is_ok() { "the aerodrome's code" } else { "coordinates" }
                ));
                found
            }
        };
        if let Some(warning) = &found.warning {
            self.warn(warning.clone());
        }
        Ok(found)
    }

    /// Where fixes were looked through as well, that is said.
    fn unknown(&self, problem: Problem) -> Problem {
        match problem {
            Problem::UnknownAerodrome(unknown) if self.fixes.is_some_and(|fixes| fixes.count() > 0) => {
                Problem::UnknownName(unknown)
            }
            other => other,
        }
    }

    fn nearest(&self, name: &str, several: &[Place]) -> Result<Named, Problem> {
        if let [only] = several {
            return Ok(Named::at(name.to_uppercase(), *only));
        }
        let count = several.len();
        let last = self.last.get().ok_or_else(|| Problem::SeveralFixes { name: name.to_string(), count })?;
        let far = |a: &Place| distance(last, *a).0;
        let nearest = several.iter().min_by(|a, b| far(a).total_cmp(&far(b)));
        let place = *nearest.ok_or_else(|| Problem::SeveralFixes { name: name.to_string(), count })?;
        self.warn(format!(
            "{} names {count} fixes; the one nearest to the route so far was taken: {}, {:.0} NM from the point before",
            quoted(name),
            icao(place),
            distance(last, place).nautical_miles(),
        ));
        Ok(Named::at(name.to_uppercase(), place))
    }

    fn warn(&self, warning: String) {
        let mut warnings = self.warnings.borrow_mut();
        if !warnings.contains(&warning) && warnings.len() <= MOST_WARNINGS {
            let full = warnings.len() == MOST_WARNINGS;
            warnings.push(if full { "further warnings are left out".to_string() } else { warning });
        }
    }

    /// What was to be said, once each.
    pub(super) fn warnings(&self) -> Vec<String> {
        self.warnings.borrow().clone()
    }
}

fn distance(a: Place, b: Place) -> Metres {
    let (a, b) = (a.normal(), b.normal());
    let chord = [0, 1, 2].map(|i| a[i] - b[i]);
    Metres(2.0 * MEAN_RADIUS_M * (dot(chord, chord).sqrt() / 2.0).min(1.0).asin())
}
