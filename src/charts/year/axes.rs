//! The hours of the clock at the left, the dates beneath, and a light grid of both.
//!
//! Knows nothing of the Sun.

use super::frame::Frame;
use crate::charts::canvas::{Across, Canvas, Level, Look, Point, Stroke, Turn, measure};
use crate::charts::timeline::style::{INK, RULE, SMALL, TEXT, letters};
use crate::day::PlaceDays;
use chrono::{Datelike, NaiveDate};

/// Hours from label to label.
const STEP_H: u32 = 3;
/// More dates than this are labelled by their months.
const MOST_DATED: usize = 70;
/// From label to label at least.
const ROOM: f64 = 16.0;

/// A label beneath the plot: from which date to which, counted from the range's first.
struct Label {
    from: usize,
    to: usize,
    text: String,
}

pub(super) fn draw(canvas: &mut Canvas, here: &PlaceDays, frame: Frame) {
    let plot = Frame::PLOT;
    hours(canvas);
    let dates: Vec<NaiveDate> = here.range.dates().collect();
    let months = spans(&dates, |date| (date.year(), date.month()));
    if dates.len() <= MOST_DATED {
        days(canvas, &dates, frame);
        names(canvas, &months, (plot.bottom + 46.0, frame));
    } else {
        names(canvas, &months, (plot.bottom + 20.0, frame));
        let years = spans(&dates, |date| (date.year(), 0));
        names(canvas, &years, (plot.bottom + 46.0, frame));
    }
    for month in months.iter().skip(1) {
        let x = frame.x(month.from as f64);
        canvas.line(
            &[Point::new(x, plot.top), Point::new(x, plot.bottom + 8.0)],
            Stroke::new(RULE.with_alpha(0.6), 1.0),
        );
    }
    canvas.rect(plot, Look::outlined(Stroke::new(INK, 1.0)));
}

/// Runs of dates that share a key, named by their month or year.
fn spans(dates: &[NaiveDate], key: impl Fn(&NaiveDate) -> (i32, u32)) -> Vec<Label> {
    let mut from = 0;
    let label = |run: &[NaiveDate]| {
        let (_, month) = key(&run[0]);
        let text = match (month, dates.len() <= MOST_DATED) {
            (0, _) => run[0].format("%Y"),
            (_, true) => run[0].format("%B %Y"),
            (_, false) => run[0].format("%b"),
        };
        let span = Label { from, to: from + run.len(), text: text.to_string() };
        from += run.len();
        span
    };
    dates.chunk_by(|a, b| key(a) == key(b)).map(label).collect()
}

fn hours(canvas: &mut Canvas) {
    let plot = Frame::PLOT;
    let number = letters(TEXT).anchored(Across::End, Level::Middle);
    for hour in 0..=24 {
        let y = Frame::y(f64::from(hour));
        let labelled = hour % STEP_H == 0;
        let reach = if labelled { 7.0 } else { 4.0 };
        canvas.line(&[Point::new(plot.left - reach, y), Point::new(plot.left, y)], Stroke::new(INK, 1.0));
        if labelled {
            canvas.text(&format!("{hour:02}:00"), Point::new(plot.left - 11.0, y), &number);
            canvas.line(
                &[Point::new(plot.left, y), Point::new(plot.right, y)],
                Stroke::new(RULE.with_alpha(0.55), 1.0),
            );
        }
    }
    let upwards = letters(TEXT).anchored(Across::Middle, Level::Middle).turned(Turn::ThreeQuarters);
    let middle = f64::midpoint(plot.top, plot.bottom);
    canvas.text("local time", Point::new(TITLE_X, middle), &upwards);
}

/// Where the title of the hours stands.
const TITLE_X: f64 = 38.0;

/// Ticks at each date, with the numbers that have room.
fn days(canvas: &mut Canvas, dates: &[NaiveDate], frame: Frame) {
    let bottom = Frame::PLOT.bottom;
    let style = letters(SMALL).anchored(Across::Middle, Level::Middle);
    let room = measure("30", &style).width + ROOM * 0.6;
    let every = (room / (frame.x(1.0) - frame.x(0.0))).ceil().max(1.0) as usize;
    for (i, date) in dates.iter().enumerate() {
        let x = frame.x(i as f64);
        canvas.line(&[Point::new(x, bottom), Point::new(x, bottom + 5.0)], Stroke::new(INK, 1.0));
        if i % every == 0 {
            let middle = frame.x(i as f64 + 0.5);
            canvas.text(&date.day().to_string(), Point::new(middle, bottom + 18.0), &style);
        }
    }
}

/// Names in the middle of their dates, where they have room.
fn names(canvas: &mut Canvas, labels: &[Label], (y, frame): (f64, Frame)) {
    let style = letters(TEXT).anchored(Across::Middle, Level::Middle);
    let mut free = f64::MIN;
    for label in labels {
        let (left, right) = (frame.x(label.from as f64), frame.x(label.to as f64));
        let half = measure(&label.text, &style).width / 2.0;
        let middle = f64::midpoint(left, right).max(Frame::PLOT.left + half).min(Frame::PLOT.right - half);
        let fits = 2.0 * half <= right - left + ROOM;
        if fits && middle - half >= free {
            canvas.text(&label.text, Point::new(middle, y), &style);
            free = middle + half + ROOM / 2.0;
        }
    }
}
