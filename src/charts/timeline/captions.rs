//! The events' names beside the curve, or numbers with a key where the names have no room.
//!
//! Knows nothing of the sky.

use super::curve::on_sheet;
use super::events::Event;
use super::frame::{Frame, Seen};
use super::layout::{KEY_ROW, MARGIN, RIGHT};
use super::style::{CURVE, INK, MUTED, SMALL, TEXT, fitted, letters, plate, set};
use crate::charts::canvas::{Across, Canvas, Ink, Level, Look, Point, Rect, Stroke, TextStyle, measure};
use crate::charts::labels::{Ground, Wanted, beside, link};

/// More names than this are not tried: they would hide the curve.
const MOST_WORDED: usize = 20;
/// The columns and rows of the key; what is beyond is in the other reports.
const COLUMNS: usize = 6;
const MOST_ROWS: usize = 7;
const LINE: f64 = 18.0;
const PAD: f64 = 5.0;

/// Labels as they are set, in the events' order.
pub(super) struct Captions {
    labels: Vec<Vec<String>>,
    places: Vec<Option<Rect>>,
    has_key: bool,
}

fn name_style() -> TextStyle {
    letters(TEXT).bold()
}

fn size(lines: &[String]) -> (f64, f64) {
    let widths = lines.iter().enumerate().map(|(i, line)| measure(line, &line_style(i)).width);
    (widths.fold(0.0, f64::max).ceil() + 2.0 * PAD, LINE * lines.len() as f64 + 2.0)
}

fn line_style(line: usize) -> TextStyle {
    if line == 0 { name_style() } else { letters(SMALL) }
}

fn worded(event: &Event) -> Vec<String> {
    vec![event.name.clone(), event.time.clone()]
}

impl Captions {
    /// Names for all events, if there is room for all.
    pub(super) fn worded(events: &[Event], curve: &[Seen], frame: &Frame) -> Option<Self> {
        if events.len() > MOST_WORDED + 2 {
            return None;
        }
        let labels: Vec<Vec<String>> = events.iter().map(worded).collect();
        let captions = Self::placed(labels, events, (curve, frame));
        captions.places.iter().all(Option::is_some).then_some(captions)
    }

    /// Numbers for crossings and touches, for the key to explain.
    pub(super) fn numbered(events: &[Event], curve: &[Seen], frame: &Frame) -> Self {
        let mut number = 0;
        let label = |event: &Event| {
            if !event.is_numbered {
                return worded(event);
            }
            number += 1;
            vec![number.to_string()]
        };
        let labels = events.iter().map(label).collect();
        Self { has_key: true, ..Self::placed(labels, events, (curve, frame)) }
    }

    fn placed(labels: Vec<Vec<String>>, events: &[Event], (curve, frame): (&[Seen], &Frame)) -> Self {
        let wanted: Vec<Wanted> = labels
            .iter()
            .zip(events)
            .map(|(lines, event)| {
                let (width, height) = size(lines);
                Wanted { anchor: frame.point(event.seen), width, height }
            })
            .collect();
        let plot = frame.plot;
        let bounds = Rect {
            left: plot.left + 4.0,
            top: plot.top + 4.0,
            right: plot.right - 4.0,
            bottom: plot.bottom - 4.0,
        };
        let places = beside(&wanted, &Ground { bounds, curve: &on_sheet(curve, frame) });
        Self { labels, places, has_key: false }
    }

    /// The rows of a key to the events.
    pub(super) fn key_rows(events: &[Event]) -> usize {
        let count = events.iter().filter(|event| event.is_numbered).count();
        count.div_ceil(COLUMNS).min(MOST_ROWS)
    }

    /// Links, plates, names and markers.
    pub(super) fn draw(&self, canvas: &mut Canvas, events: &[Event], frame: &Frame) {
        for (event, place) in events.iter().zip(&self.places) {
            let Some(rect) = *place else { continue };
            let anchor = frame.point(event.seen);
            let (end, distance) = link(rect, anchor);
            if distance > 12.0 {
                canvas.line(&[anchor, end], Stroke::new(Ink::WHITE.with_alpha(0.7), 3.0));
                canvas.line(&[anchor, end], Stroke::new(MUTED, 1.1));
            }
        }
        for event in events {
            let look = Look::filled(Ink::WHITE).edged(Stroke::new(CURVE, 1.8));
            canvas.marker(event.marker, frame.point(event.seen), 5.2, look);
        }
        for (lines, place) in self.labels.iter().zip(&self.places) {
            let Some(rect) = *place else { continue };
            plate(canvas, rect);
            let middle = f64::midpoint(rect.left, rect.right);
            for (i, line) in lines.iter().enumerate() {
                let at = Point::new(middle, rect.top + 1.0 + LINE * (i as f64 + 0.5));
                canvas.text(line, at, &line_style(i).anchored(Across::Middle, Level::Middle));
            }
        }
    }

    /// What the numbers stand for, column by column.
    pub(super) fn draw_key(&self, canvas: &mut Canvas, events: &[Event], top: f64) {
        if !self.has_key {
            return;
        }
        let numbered: Vec<&Event> = events.iter().filter(|event| event.is_numbered).collect();
        let rows = Self::key_rows(events);
        let columns = numbered.len().div_ceil(rows.max(1)).min(COLUMNS);
        let width = (RIGHT - MARGIN) / COLUMNS as f64;
        let room = rows * columns;
        for (i, event) in numbered.iter().take(room).enumerate() {
            let (column, row) = (i / rows, i % rows);
            let at = Point::new(MARGIN + width * column as f64, top + KEY_ROW * (row as f64 + 0.5));
            if i + 1 == room && numbered.len() > room {
                let more = format!("and {} more: see the table", numbered.len() - i);
                canvas.text(&more, at, &letters(SMALL).anchored(Across::Start, Level::Middle));
            } else {
                entry(canvas, i + 1, event, (at, width));
            }
        }
    }
}

fn entry(canvas: &mut Canvas, number: usize, event: &Event, (at, width): (Point, f64)) {
    let bold = name_style().anchored(Across::End, Level::Middle);
    canvas.text(&number.to_string(), at.moved(26.0, 0.0), &TextStyle { size: SMALL, ..bold });
    let style = letters(SMALL).anchored(Across::Start, Level::Middle);
    let time = event.time.trim_end_matches(" UTC");
    let end = set(canvas, time, at.moved(34.0, 0.0), &TextStyle { ink: INK, ..style });
    let name = fitted(&event.name, &style, at.x + width - end - 14.0);
    canvas.text(&name, Point::new(end + 8.0, at.y), &style);
}
