//! The states as areas, one painted over another from dark to light, and the edge of daylight.
//!
//! Each limit's area is one shape of several rings, so that rings which share an upright edge leave no seam.

use super::frame::Frame;
use crate::charts::canvas::{Canvas, Ink, Look, Point, Rect, Stroke};
use crate::charts::timeline::style::{CURVE, MUTED, RULE, look};
use crate::day::{Column, Field, Interval};
use crate::light::{Limit, State};

/// How far a curve's crest leans: invisible, but not upright.
const LEAN_PX: f64 = 0.02;

/// A stretch of the clock that goes on from column to column: its points from left to right at both ends.
#[derive(Debug, Default)]
struct Ribbon {
    lower: Vec<Point>,
    upper: Vec<Point>,
}

impl Ribbon {
    fn reach(&mut self, days: f64, interval: Interval, frame: Frame) {
        self.lower.push(frame.point(days, interval.from_h));
        self.upper.push(frame.point(days, interval.to_h));
    }

    fn ring(self) -> Vec<Point> {
        self.lower.into_iter().chain(self.upper.into_iter().rev()).collect()
    }
}

/// A limit's area, ready to be drawn.
#[derive(Debug, Default)]
struct Area {
    rings: Vec<Vec<Point>>,
    edges: Vec<Vec<Point>>,
}

pub(super) fn draw(canvas: &mut Canvas, field: &Field, frame: Frame) {
    canvas.clipped(Frame::PLOT, |canvas| {
        canvas.rect(Frame::PLOT, look(State::Darkness));
        for limit in Limit::ALL.into_iter().rev() {
            let area = area(field, limit, frame);
            canvas.rings(&area.rings, look(limit.above()));
            let stroke =
                if limit == Limit::Horizon { Stroke::new(CURVE, 2.4) } else { Stroke::new(RULE, 0.8) };
            for edge in &area.edges {
                canvas.line(edge, stroke);
            }
        }
        for gap in &field.gaps {
            let corner = |days: usize, hours: f64| frame.point(days as f64, hours);
            let rect = Rect::spanned(corner(gap.day, gap.hours.from_h), corner(gap.day + 1, gap.hours.to_h));
            canvas.rect(rect, Look::filled(Ink::WHITE).edged(Stroke::new(MUTED, 0.8)));
        }
    });
}

/// The area above a limit with its edges, but for those along midnight.
fn area(field: &Field, limit: Limit, frame: Frame) -> Area {
    let mut area = Area::default();
    let mut open: Vec<Ribbon> = Vec::new();
    for (i, column) in field.columns.iter().enumerate() {
        let above = &column.above[limit as usize];
        let before = i.checked_sub(1).map(|i| &field.columns[i]);
        let joins = before.is_some_and(|before| before.leads_on && open.len() == above.len());
        if !joins {
            // what goes on until here ends here, and what follows begins here: the step between is an edge as well
            if let Some(before) = before.filter(|before| is_next(before, column)) {
                let last = &before.above[limit as usize];
                open.iter_mut()
                    .zip(last)
                    .for_each(|(ribbon, last)| ribbon.reach(column.at_days, *last, frame));
                area.step((before.at_days, column.at_days), (last, above), frame);
            }
            area.close(std::mem::take(&mut open));
            open.resize_with(above.len(), Ribbon::default);
        }
        open.iter_mut().zip(above).for_each(|(ribbon, above)| ribbon.reach(column.at_days, *above, frame));
    }
    area.close(open);
    area
}

/// Whether no date lies between two columns that was skipped.
fn is_next(before: &Column, column: &Column) -> bool {
    column.at_days - before.at_days < 0.999
}

impl Area {
    fn close(&mut self, ribbons: Vec<Ribbon>) {
        for ribbon in ribbons {
            let on = |point: &Point, hours: f64| (point.y - Frame::y(hours)).abs() < 1e-9;
            if !ribbon.lower.iter().all(|point| on(point, 0.0)) {
                self.edges.push(ribbon.lower.clone());
            }
            if !ribbon.upper.iter().all(|point| on(point, 24.0)) {
                self.edges.push(ribbon.upper.clone());
            }
            self.rings.push(ribbon.ring());
        }
    }

    /// The upright edges where one column's stretches follow another's: what only one of them holds.
    fn step(&mut self, (from, days): (f64, f64), (a, b): (&[Interval], &[Interval]), frame: Frame) {
        // upright lines are set on whole pixels, which is right for a clock's step and not for a curve's crest
        let lean = if from < days { LEAN_PX } else { 0.0 };
        let mut ends: Vec<f64> = a.iter().chain(b).flat_map(|i| [i.from_h, i.to_h]).collect();
        ends.sort_by(f64::total_cmp);
        let holds = |set: &[Interval], hour: f64| set.iter().any(|i| i.from_h < hour && hour < i.to_h);
        for pair in ends.windows(2) {
            let middle = f64::midpoint(pair[0], pair[1]);
            if holds(a, middle) != holds(b, middle) {
                let ends = [frame.point(days, pair[0]).moved(-lean, 0.0), frame.point(days, pair[1])];
                self.edges.push(ends.to_vec());
            }
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn column(at_days: f64, above: &[(f64, f64)], leads_on: bool) -> Column {
        let above: Vec<Interval> = above.iter().map(|&(from_h, to_h)| Interval { from_h, to_h }).collect();
        Column { at_days, above: [(); 4].map(|()| above.clone()), leads_on }
    }

    fn covered(area: &Area) -> f64 {
        let one = |ring: &Vec<Point>| {
            let pairs = ring.iter().zip(ring.iter().cycle().skip(1));
            pairs.map(|(a, b)| a.x * b.y - b.x * a.y).sum::<f64>().abs() / 2.0
        };
        area.rings.iter().map(one).sum::<f64>() / (Frame::PLOT.width() * Frame::PLOT.height())
    }

    #[test]
    fn areas_close_where_a_stretch_begins_and_where_it_takes_the_whole_day() {
        let columns = vec![
            column(0.0, &[], true),
            column(1.0, &[], false),
            column(1.0, &[(12.0, 12.0)], true),
            column(2.0, &[(6.0, 18.0)], false),
            column(2.0, &[(0.0, 24.0)], true),
            column(4.0, &[(0.0, 24.0)], false),
        ];
        let field = Field { days: 4, columns, gaps: Vec::new() };
        let area = area(&field, Limit::Horizon, Frame { days: 4 });
        // a quarter of a date's triangle, and two whole dates
        assert!((covered(&area) - (0.25 + 2.0) / 4.0).abs() < 1e-12, "{}", covered(&area));
        // two curves, and two steps at which the day becomes whole
        assert_eq!(area.edges.len(), 4, "{:?}", area.edges);
    }

    #[test]
    fn a_step_of_the_clock_is_an_edge_and_a_skipped_date_is_not() {
        let steps = |to: f64| {
            let columns = vec![
                column(0.0, &[(6.0, 18.0)], true),
                column(1.0, &[(6.0, 18.0)], false),
                column(to, &[(7.0, 19.0)], true),
                column(to + 1.0, &[(7.0, 19.0)], false),
            ];
            area(&Field { days: 3, columns, gaps: Vec::new() }, Limit::Horizon, Frame { days: 3 }).edges.len()
        };
        assert_eq!((steps(1.0), steps(2.0)), (6, 4));
    }
}
