//! The states as bands of elevation, the limits between them, and the elevation axis.
//!
//! Knows nothing of the flight.

use super::frame::{Frame, degrees};
use super::layout::{MARGIN, RIGHT};
use super::style::{DECK, INK, MUTED, RULE, SMALL, TEXT, fitted, letters, look};
use crate::charts::canvas::{Across, Canvas, Dash, Level, Look, Point, Rect, Stroke, TextStyle, Turn};
use crate::charts::labels::apart;
use crate::label::words::{limit_elevation, spoken, state_key};
use crate::light::{Limit, State};

/// Between the middles of two labels at the edge at least.
const LABEL_ROOM: f64 = 19.0;
/// From line to line of a name at the edge.
const NAME_LINE: f64 = 18.0;

/// The upper and lower elevation of a state.
fn extent(state: State) -> (f64, f64) {
    let limit = |i: usize| Limit::ALL.get(i).map(|l| l.elevation().deg());
    let i = state as usize;
    (i.checked_sub(1).and_then(limit).unwrap_or(90.0), limit(i).unwrap_or(-90.0))
}

/// The part of the plot that is a state's.
fn band(state: State, frame: &Frame) -> Option<Rect> {
    let (upper, lower) = extent(state);
    let top = frame.y(upper.min(frame.span.high_deg));
    let bottom = frame.y(lower.max(frame.span.low_deg));
    (bottom > top).then_some(Rect { top, bottom, ..frame.plot })
}

/// The grounds, the limits and the level grid.
pub(super) fn draw(canvas: &mut Canvas, frame: &Frame) {
    for state in State::ALL {
        if let Some(band) = band(state, frame) {
            canvas.rect(band, look(state));
        }
    }
    let level = |y: f64| [Point::new(frame.plot.left, y), Point::new(frame.plot.right, y)];
    for (deg, _) in frame.elevation_ticks() {
        canvas.line(&level(frame.y(deg)), Stroke::new(RULE.with_alpha(0.28), 1.0));
    }
    for limit in Limit::ALL {
        let deg = limit.elevation().deg();
        if frame.span.holds(deg) {
            canvas.line(&level(frame.y(deg)), Stroke::new(INK, 1.0).dashed(Dash::Dashed(9.0, 4.0)));
        }
    }
}

/// The frame, the axis at its left, and limits and states at its right.
pub(super) fn draw_edges(canvas: &mut Canvas, frame: &Frame, deck_deg: Option<f64>) {
    canvas.rect(frame.plot, Look::outlined(Stroke::new(INK, 1.0)));
    let number = letters(TEXT).anchored(Across::End, Level::Middle);
    let left = frame.plot.left;
    for (deg, label) in frame.elevation_ticks() {
        let y = frame.y(deg);
        canvas.line(&[Point::new(left - 6.0, y), Point::new(left, y)], Stroke::new(INK, 1.0));
        canvas.text(&label, Point::new(left - 10.0, y), &number);
    }
    let middle = f64::midpoint(frame.plot.top, frame.plot.bottom);
    let upwards = letters(TEXT).anchored(Across::Middle, Level::Middle).turned(Turn::ThreeQuarters);
    let muted = TextStyle { ink: MUTED, size: SMALL, ..upwards };
    let x = left - 100.0;
    canvas.text("Sun's elevation beneath the aircraft", Point::new(x, middle), &upwards);
    canvas.text("geometric, of its centre", Point::new(x + 22.0, middle), &muted);
    limits(canvas, frame, deck_deg);
    names(canvas, frame, deck_deg.map(|deg| frame.y(deg)));
}

/// The limits at the right edge, the deck's among them, moved apart where they would touch.
fn limits(canvas: &mut Canvas, frame: &Frame, deck_deg: Option<f64>) {
    let own = Limit::ALL.map(|limit| (limit.elevation().deg(), limit_elevation(limit).to_string(), INK));
    let deck = deck_deg.map(|deg| (deg, format!("deck {}", degrees(deg, 1)), DECK));
    let mut shown: Vec<_> = own.into_iter().chain(deck).filter(|(deg, ..)| frame.span.holds(*deg)).collect();
    shown.sort_by(|a, b| b.0.total_cmp(&a.0));
    let ys: Vec<f64> = shown.iter().map(|(deg, ..)| frame.y(*deg)).collect();
    let right = frame.plot.right;
    let edge = (frame.plot.top, frame.plot.bottom - LABEL_ROOM / 2.0);
    for (((_, label, ink), &y), label_y) in shown.iter().zip(&ys).zip(apart(&ys, LABEL_ROOM, edge)) {
        let style = TextStyle { ink: *ink, ..letters(TEXT).bold().anchored(Across::Start, Level::Middle) };
        let lead = [Point::new(right, y), Point::new(right + 4.0, y), Point::new(right + 10.0, label_y)];
        canvas.line(&lead, Stroke::new(*ink, 1.0));
        canvas.text(label, Point::new(right + 13.0, label_y), &style);
    }
}

/// The larger part of a band that the deck's own label parts.
fn roomier(band: Rect, deck_y: Option<f64>) -> Rect {
    match deck_y.filter(|y| (band.top..band.bottom).contains(y)) {
        Some(y) if y - band.top > band.bottom - y => Rect { bottom: y, ..band },
        Some(y) => Rect { top: y, ..band },
        None => band,
    }
}

/// The states' names at the right edge, in bands that have room.
fn names(canvas: &mut Canvas, frame: &Frame, deck_y: Option<f64>) {
    let style = TextStyle { ink: MUTED, ..letters(TEXT).anchored(Across::Start, Level::Middle) };
    for state in State::ALL {
        let Some(band) = band(state, frame) else { continue };
        let band = roomier(band, deck_y);
        let x = frame.plot.right + 13.0;
        let middle = f64::midpoint(band.top, band.bottom);
        let name = spoken(state_key(state));
        let lines: Vec<&str> = name.split(' ').collect();
        // the limits above and below need their own room
        if band.height() < NAME_LINE * lines.len() as f64 + 24.0 {
            continue;
        }
        for (i, line) in lines.iter().enumerate() {
            let y = middle + NAME_LINE * (i as f64 - (lines.len() - 1) as f64 / 2.0);
            canvas.text(&fitted(line, &style, RIGHT - x + MARGIN / 2.0), Point::new(x, y), &style);
        }
    }
}
