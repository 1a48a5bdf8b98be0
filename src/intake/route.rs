//! A route as one string of points parted by blanks.
//!
//! Does not know airways or procedures: `DCT` (direct) is passed over, any other word must name a point.

use super::draft::MOST_WAYPOINTS;
use super::file::Found;
use super::flight::RoutePoint;
use super::gazetteer::Gazetteer;
use super::place::is_coordinates;
use super::problem::Problem;
use std::ops::Range;

/// A point takes at most so many words: degrees, minutes, seconds and a letter, twice.
const MOST_WORDS: usize = 8;

/// Reads a route; each point with the bytes of the string that it stands on, as is what is wrong with one.
pub(super) fn route(text: &str, gazetteer: &Gazetteer<'_>) -> Found<Vec<(RoutePoint, Range<usize>)>> {
    let words = words(text);
    let mut points = Vec::new();
    let mut next = 0;
    while next < words.len() {
        let count = point_words(text, &words[next..]);
        let span = words[next].start..words[next + count - 1].end;
        next += count;
        let given = &text[span.clone()];
        if given.eq_ignore_ascii_case("DCT") {
            continue;
        }
        if points.len() == MOST_WAYPOINTS {
            return Err((span, Problem::TooManyWaypoints { count: words.len(), most: MOST_WAYPOINTS }));
        }
        let found = gazetteer.next(given).map_err(|problem| (span.clone(), problem))?;
        points
            .push((RoutePoint { label: found.label, place: found.place, time: None, wind_m_s: None }, span));
    }
    if points.is_empty() { Err((0..text.len(), Problem::EmptyRoute)) } else { Ok(points) }
}

/// The bytes of each word.
fn words(text: &str) -> Vec<Range<usize>> {
    let start = text.as_ptr() as usize;
    let span = |word: &str| {
        let at = word.as_ptr() as usize - start;
        at..at + word.len()
    };
    text.split_whitespace().map(span).collect()
}

/// How many of the words make the next point: as many as are coordinates together (`8530N 00000E`), else one.
fn point_words(text: &str, words: &[Range<usize>]) -> usize {
    let most = words.len().min(MOST_WORDS);
    let together = |count: &usize| is_coordinates(&text[words[0].start..words[*count - 1].end]);
    (2..=most).rev().find(together).unwrap_or(1)
}
