//! Labels for points on a curve: each beside its point, clear of the others and, if it can be, of the curve.
//!
//! Knows nothing of text: a label is the size of its box.

use super::boxes::{cross, link, meets, overlap, widened, within};
use crate::charts::canvas::{Point, Rect};

/// A label that is asked for.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Wanted {
    /// The point it belongs to.
    pub anchor: Point,
    /// Its width.
    pub width: f64,
    /// Its height.
    pub height: f64,
}

/// What the labels are set on.
#[derive(Debug, Clone, Copy)]
pub struct Ground<'a> {
    /// No label leaves this.
    pub bounds: Rect,
    /// A curve from left to right that labels should leave free.
    pub curve: &'a [Point],
}

/// Between two labels at least.
const GAP: f64 = 4.0;
/// From a point to its label, from the nearest to the farthest that is tried.
const REACHES: [f64; 16] =
    [10.0, 16.0, 24.0, 34.0, 46.0, 60.0, 76.0, 94.0, 114.0, 136.0, 160.0, 186.0, 214.0, 250.0, 300.0, 360.0];
/// How often every label is set anew, knowing the others.
const ROUNDS: usize = 3;

/// Where a label is lost from its point: from here on, twice as far is more than twice as bad.
const FAR: f64 = 180.0;
/// What is wrong with a place, as if it were so many pixels farther away.
const ON_CURVE: f64 = 220.0;
const ON_POINT: f64 = 400.0;
const ON_LINK: f64 = 300.0;
const LINKS_CROSS: f64 = 260.0;
const LINK_ON_CURVE: f64 = 40.0;
const UNSET: f64 = 1e5;
/// A link may run along the curve so far from its point.
const CLEAR: f64 = 9.0;

/// Sets labels beside their points; `None` where no room was found.
///
/// Boxes that are set never overlap, keep a gap and stay within the bounds. Links from point to box are kept from
/// crossing labels and each other where that is possible. The same wishes give the same places.
pub fn beside(wanted: &[Wanted], ground: &Ground<'_>) -> Vec<Option<Rect>> {
    let mut best: Option<(f64, Vec<Option<Rect>>)> = None;
    for order in orders(wanted) {
        let (cost, set) = set_in(&order, wanted, ground);
        if best.as_ref().is_none_or(|(least, _)| cost < *least) {
            best = Some((cost, set));
        }
    }
    best.map_or_else(Vec::new, |(_, set)| set)
}

/// The orders in which labels are tried: who comes first takes the best place, and it depends on the curve whose that
/// should be.
fn orders(wanted: &[Wanted]) -> Vec<Vec<usize>> {
    let forwards: Vec<usize> = (0..wanted.len()).collect();
    let mut downwards = forwards.clone();
    downwards.sort_by(|&a, &b| wanted[a].anchor.y.total_cmp(&wanted[b].anchor.y));
    let reversed = |order: &[usize]| order.iter().rev().copied().collect();
    vec![reversed(&forwards), reversed(&downwards), downwards, forwards]
}

/// Sets labels in an order and says what it costs.
fn set_in(order: &[usize], wanted: &[Wanted], ground: &Ground<'_>) -> (f64, Vec<Option<Rect>>) {
    let mut set: Vec<Option<Rect>> = vec![None; wanted.len()];
    let mut costs = vec![UNSET; wanted.len()];
    for _ in 0..ROUNDS {
        let before = set.clone();
        for &index in order {
            let found = best(index, wanted, &set, ground);
            costs[index] = found.map_or(UNSET, |(cost, _)| cost);
            set[index] = found.map(|(_, rect)| rect);
        }
        if set == before {
            break;
        }
    }
    (costs.iter().sum(), set)
}

fn best(index: usize, wanted: &[Wanted], set: &[Option<Rect>], ground: &Ground<'_>) -> Option<(f64, Rect)> {
    let own = wanted[index];
    let others: Vec<Other> = (0..wanted.len())
        .filter(|&i| i != index)
        .map(|i| Other { anchor: wanted[i].anchor, rect: set[i] })
        .collect();
    let mut best: Option<(f64, Rect)> = None;
    for reach in REACHES {
        // nothing farther away can be better
        if best.is_some_and(|(cost, _)| cost <= reach) {
            break;
        }
        for (rect, lean) in around(own, reach) {
            let free = within(rect, ground.bounds)
                && !others.iter().filter_map(|o| o.rect).any(|r| overlap(widened(rect, GAP), r));
            if !free {
                continue;
            }
            let cost = reach + reach * reach / FAR + lean + faults(rect, own.anchor, &others, ground.curve);
            if best.is_none_or(|(least, _)| cost < least) {
                best = Some((cost, rect));
            }
        }
    }
    best
}

struct Other {
    anchor: Point,
    rect: Option<Rect>,
}

/// The places about a point at one distance, each with what it costs to look there.
fn around(own: Wanted, reach: f64) -> impl Iterator<Item = (Rect, f64)> {
    let Wanted { anchor: Point { x, y }, width: w, height: h } = own;
    let at = move |left: f64, top: f64| Rect { left, top, right: left + w, bottom: top + h };
    let shares = [0.5, 0.2, 0.8, 0.0, 1.0];
    let leaning = shares.into_iter().enumerate().flat_map(move |(i, share)| {
        let lean = i as f64;
        [(at(x - share * w, y - reach - h), lean), (at(x - share * w, y + reach), lean)]
    });
    let aside = [0.0, 0.5, 1.0, -0.6, 1.6].into_iter().flat_map(move |share: f64| {
        let lean = 3.0 + 10.0 * (share - 0.5).abs();
        [(at(x + reach, y - share * h), lean), (at(x - reach - w, y - share * h), lean)]
    });
    leaning.chain(aside)
}

fn faults(rect: Rect, anchor: Point, others: &[Other], curve: &[Point]) -> f64 {
    let (end, distance) = link(rect, anchor);
    let own_link = [anchor, end];
    let roomy = widened(rect, GAP);
    let mut cost = if on_curve(roomy, curve) { ON_CURVE } else { 0.0 };
    for other in others {
        if meets_point(widened(rect, 8.0), other.anchor) {
            cost += ON_POINT;
        }
        let Some(its) = other.rect else { continue };
        let its_link = [other.anchor, link(its, other.anchor).0];
        if meets(roomy, its_link) {
            cost += ON_LINK;
        }
        if meets(widened(its, GAP), own_link) {
            cost += ON_LINK;
        }
        if cross(own_link, its_link) {
            cost += LINKS_CROSS;
        }
    }
    if distance > CLEAR {
        // the link begins on the curve and should not meet it again
        let share = CLEAR / distance;
        let begin = anchor.moved((end.x - anchor.x) * share, (end.y - anchor.y) * share);
        let again = near(curve, begin.x.min(end.x), begin.x.max(end.x));
        let times = again.windows(2).filter(|w| cross([begin, end], [w[0], w[1]])).count();
        cost += LINK_ON_CURVE * times as f64;
    }
    cost
}

fn meets_point(rect: Rect, point: Point) -> bool {
    rect.left < point.x && point.x < rect.right && rect.top < point.y && point.y < rect.bottom
}

fn on_curve(rect: Rect, curve: &[Point]) -> bool {
    near(curve, rect.left, rect.right).windows(2).any(|w| meets(rect, [w[0], w[1]]))
}

/// The part of the curve that covers a stretch from left to right.
fn near(curve: &[Point], left: f64, right: f64) -> &[Point] {
    let first = curve.partition_point(|p| p.x < left).saturating_sub(1);
    let last = (curve.partition_point(|p| p.x <= right) + 1).min(curve.len());
    curve.get(first..last).unwrap_or_default()
}

#[cfg(test)]
mod tests {
    use super::*;

    const BOUNDS: Rect = Rect { left: 0.0, top: 0.0, right: 400.0, bottom: 200.0 };

    #[test]
    fn a_lone_label_sits_close_above_or_below_and_off_the_curve() {
        let curve = [Point::new(0.0, 100.0), Point::new(400.0, 100.0)];
        let wanted = [Wanted { anchor: Point::new(200.0, 100.0), width: 80.0, height: 30.0 }];
        let rect = beside(&wanted, &Ground { bounds: BOUNDS, curve: &curve })[0].unwrap();
        assert_eq!(rect, Rect { left: 160.0, top: 60.0, right: 240.0, bottom: 90.0 });
    }

    #[test]
    fn what_has_no_room_is_not_set() {
        let wanted = [Wanted { anchor: Point::new(200.0, 100.0), width: 500.0, height: 30.0 }];
        assert_eq!(beside(&wanted, &Ground { bounds: BOUNDS, curve: &[] }), [None]);
    }
}
