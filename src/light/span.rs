//! Stretches of time, [begin, end), in which something holds: found on curves, cut with one another, joined.
//!
//! Does not know what holds.

use super::trace::Trace;
use crate::curve::{Bandwidth, Curve};
use crate::units::Four;

/// Seconds from take-off to the beginning and to the end.
pub(super) type Span = (f64, f64);

/// What is shorter is no stretch: the roots' own error.
const SHORTEST_S: f64 = 1e-3;

/// The spans of `within` in which a function of the given bandwidth is not below zero, as its curve has them.
pub(super) fn not_negative(within: Span, band: Bandwidth, f: &impl Fn(Four) -> Four) -> Vec<Span> {
    if within.1 - within.0 < SHORTEST_S {
        return Vec::new();
    }
    let Some(curve) = Curve::through(within.0, within.1, band, f) else {
        let middle = f64::midpoint(within.0, within.1);
        let mut spans = not_negative((within.0, middle), band, f);
        spans.extend(not_negative((middle, within.1), band, f));
        return joined(spans);
    };
    let mut points = vec![(within.0, curve.first())];
    points.extend(curve.turns(&curve.turning_points()));
    points.push((within.1, curve.last()));
    above(&points, 0.0, |i| {
        let rising = points[i].1 < 0.0;
        curve.meets(0.0, rising, points[i].0, points[i + 1].0)
    })
}

/// The spans of a flight in which the sine of the Sun's elevation is at most `level`.
pub(super) fn not_above(trace: &Trace, level: f64) -> Vec<Span> {
    let points: Vec<(f64, f64)> = trace.peaks().iter().map(|peak| (peak.at_s, peak.sine)).collect();
    let above = above(&points, level, |i| trace.meets(level, i));
    let end_s = points[points.len() - 1].0;
    without((0.0, end_s), &above)
}

/// The spans in which a function, monotone from each point to the next, is not below a level; `meets` tells when it meets
/// the level after a point.
fn above(points: &[(f64, f64)], level: f64, meets: impl Fn(usize) -> f64) -> Vec<Span> {
    let mut spans = Vec::new();
    let mut since = (points[0].1 >= level).then_some(points[0].0);
    for (i, pair) in points.windows(2).enumerate() {
        match (since, pair[1].1 >= level) {
            (None, true) => since = Some(meets(i)),
            (Some(begin), false) => {
                spans.push((begin, meets(i)));
                since = None;
            }
            _ => {}
        }
    }
    spans.extend(since.map(|begin| (begin, points[points.len() - 1].0)));
    spans
}

/// What two lists of spans have in common.
pub(super) fn common(a: &[Span], b: &[Span]) -> Vec<Span> {
    let (mut i, mut j, mut spans) = (0, 0, Vec::new());
    while let (Some(x), Some(y)) = (a.get(i), b.get(j)) {
        let span = (x.0.max(y.0), x.1.min(y.1));
        if span.0 < span.1 {
            spans.push(span);
        }
        if x.1 < y.1 { i += 1 } else { j += 1 }
    }
    spans
}

/// A span less others within it.
fn without(whole: Span, others: &[Span]) -> Vec<Span> {
    let begins = std::iter::once(whole.0).chain(others.iter().map(|span| span.1));
    let ends = others.iter().map(|span| span.0).chain(std::iter::once(whole.1));
    begins.zip(ends).filter(|span| span.0 < span.1).collect()
}

/// Spans of which those that follow one another without a gap are one.
pub(super) fn joined(spans: Vec<Span>) -> Vec<Span> {
    let mut out: Vec<Span> = Vec::with_capacity(spans.len());
    for span in spans {
        match out.last_mut() {
            Some(last) if follows(*last, span) => last.1 = span.1,
            _ => out.push(span),
        }
    }
    out
}

/// Whether a span begins where another ends.
pub(super) fn follows(first: Span, next: Span) -> bool {
    next.0 - first.1 < 2.0 * SHORTEST_S
}

#[cfg(test)]
mod tests {
    use super::{common, joined, not_negative, without};
    use crate::curve::Bandwidth;

    #[test]
    fn a_sine_is_positive_in_every_other_half_wave() {
        let band = Bandwidth { body_rad_s: 1.0, path_rad_s: 0.0 };
        let spans = not_negative((-1.0, 11.0), band, &|t| t.sin());
        let pi = std::f64::consts::PI;
        let wanted = [(0.0, pi), (2.0 * pi, 3.0 * pi)];
        assert_eq!(spans.len(), 2, "{spans:?}");
        for (span, wanted) in spans.iter().zip(wanted) {
            assert!((span.0 - wanted.0).abs() < 1e-6 && (span.1 - wanted.1).abs() < 1e-6, "{spans:?}");
        }
    }

    #[test]
    fn spans_are_cut_and_joined() {
        assert_eq!(
            common(&[(0.0, 4.0), (6.0, 9.0)], &[(3.0, 7.0), (8.0, 12.0)]),
            [(3.0, 4.0), (6.0, 7.0), (8.0, 9.0)]
        );
        assert_eq!(without((0.0, 9.0), &[(0.0, 2.0), (5.0, 6.0)]), [(2.0, 5.0), (6.0, 9.0)]);
        assert_eq!(joined(vec![(0.0, 1.0), (1.0, 2.0), (3.0, 4.0)]), [(0.0, 2.0), (3.0, 4.0)]);
        assert!(not_negative((0.0, 1e-4), Bandwidth { body_rad_s: 1.0, path_rad_s: 0.0 }, &|t| t).is_empty());
    }
}
