//! Boxes that meet boxes and lines.

use crate::charts::canvas::{Point, Rect};

/// Whether two boxes share more than an edge.
pub fn overlap(a: Rect, b: Rect) -> bool {
    a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom
}

/// The box with `px` more on every side.
pub(super) const fn widened(a: Rect, px: f64) -> Rect {
    Rect { left: a.left - px, top: a.top - px, right: a.right + px, bottom: a.bottom + px }
}

/// Whether `inner` lies within `outer`.
pub(super) fn within(inner: Rect, outer: Rect) -> bool {
    inner.left >= outer.left
        && inner.right <= outer.right
        && inner.top >= outer.top
        && inner.bottom <= outer.bottom
}

/// The point of a box that is nearest to a point, and how far it is.
pub fn link(a: Rect, to: Point) -> (Point, f64) {
    let nearest = Point::new(to.x.clamp(a.left, a.right), to.y.clamp(a.top, a.bottom));
    (nearest, (nearest.x - to.x).hypot(nearest.y - to.y))
}

/// Whether a straight line meets the inside of a box: what is left of it when each side has cut it.
pub(super) fn meets(a: Rect, [from, to]: [Point; 2]) -> bool {
    let (dx, dy) = (to.x - from.x, to.y - from.y);
    let (mut enters, mut leaves) = (0.0_f64, 1.0_f64);
    for (step, gap) in
        [(-dx, from.x - a.left), (dx, a.right - from.x), (-dy, from.y - a.top), (dy, a.bottom - from.y)]
    {
        if step == 0.0 {
            if gap <= 0.0 {
                return false;
            }
        } else if step < 0.0 {
            enters = enters.max(gap / step);
        } else {
            leaves = leaves.min(gap / step);
        }
    }
    enters < leaves
}

/// Whether two straight lines cross between their ends.
pub(super) fn cross([a, b]: [Point; 2], [c, d]: [Point; 2]) -> bool {
    let side = |p: Point, q: Point, r: Point| (q.x - p.x) * (r.y - p.y) - (q.y - p.y) * (r.x - p.x);
    side(a, b, c) * side(a, b, d) < 0.0 && side(c, d, a) * side(c, d, b) < 0.0
}

#[cfg(test)]
mod tests {
    use super::*;

    const BOX: Rect = Rect { left: 10.0, top: 10.0, right: 20.0, bottom: 20.0 };

    fn line(ax: f64, ay: f64, bx: f64, by: f64) -> [Point; 2] {
        [Point::new(ax, ay), Point::new(bx, by)]
    }

    #[test]
    fn a_line_meets_a_box_through_it_within_it_or_into_it() {
        for through in [line(0.0, 15.0, 30.0, 15.0), line(12.0, 12.0, 13.0, 18.0), line(0.0, 0.0, 15.0, 15.0)]
        {
            assert!(meets(BOX, through), "{through:?}");
        }
        for past in [
            line(0.0, 5.0, 30.0, 5.0),
            line(0.0, 0.0, 9.0, 9.0),
            line(10.0, 0.0, 10.0, 30.0),
            line(0.0, 14.0, 14.0, 0.0),
        ] {
            assert!(!meets(BOX, past), "{past:?}");
        }
    }

    #[test]
    fn the_link_of_a_box_ends_on_its_rim() {
        assert_eq!(link(BOX, Point::new(15.0, 4.0)), (Point::new(15.0, 10.0), 6.0));
        assert_eq!(link(BOX, Point::new(7.0, 6.0)), (Point::new(10.0, 10.0), 5.0));
        assert_eq!(link(BOX, Point::new(15.0, 15.0)).1, 0.0);
    }

    #[test]
    fn lines_cross_only_between_their_ends() {
        assert!(cross(line(0.0, 0.0, 2.0, 2.0), line(0.0, 2.0, 2.0, 0.0)));
        assert!(!cross(line(0.0, 0.0, 1.0, 1.0), line(1.0, 1.0, 2.0, 0.0)));
    }
}
