//! Circles and waypoints: upright lines with flags along the top.
//!
//! Knows nothing of the Sun.

use super::frame::Frame;
use super::layout::{FLAG_ROW, PLOT_LEFT, PLOT_RIGHT, RIGHT};
use super::style::{CIRCLE, INK, MUTED, SMALL, fitted, letters};
use crate::Brief;
use crate::charts::canvas::{Across, Canvas, Dash, Ink, Level, Point, Stroke, TextStyle, measure};
use crate::charts::labels::{Flag, Mast, flags};
use crate::label::words::circle_name;
use crate::path::Heading;

/// The rows of flags at most.
const MOST_ROWS: usize = 4;
/// A waypoint's flag is no wider.
const WIDEST: f64 = 132.0;
/// Waypoints that are not named stand at least so far apart, or a long route would be one block of ink.
const LEAST_APART: f64 = 3.0;

struct Gate {
    x: f64,
    label: String,
    is_circle: bool,
    flag: Option<Flag>,
}

/// Everything that is passed on the way.
pub(super) struct Gates(Vec<Gate>);

fn style(is_circle: bool) -> TextStyle {
    let style = letters(SMALL).anchored(Across::Start, Level::Middle);
    TextStyle { ink: if is_circle { CIRCLE } else { INK }, ..style }
}

/// North is up.
fn arrow(heading: Heading) -> char {
    match heading {
        Heading::Northbound => '↑',
        Heading::Southbound => '↓',
        Heading::Eastbound => '→',
        Heading::Westbound => '←',
    }
}

impl Gates {
    /// The gates of a flight, with their flags hung: circles first, then waypoints from the last to the first.
    pub(super) fn new(brief: &Brief) -> Self {
        let x = |at_s: f64| PLOT_LEFT + at_s / brief.path.airborne_s * (PLOT_RIGHT - PLOT_LEFT);
        let circles = brief.circles.iter().rev().map(|crossing| Gate {
            x: x(crossing.at_s),
            label: format!("{} {}", circle_name(crossing.circle.name), arrow(crossing.heading)),
            is_circle: true,
            flag: None,
        });
        let named = brief.flight.waypoints.iter().zip(brief.path.waypoints_s());
        let waypoints = named.rev().map(|(waypoint, &at_s)| Gate {
            x: x(at_s),
            label: fitted(&waypoint.label, &style(false), WIDEST),
            is_circle: false,
            flag: None,
        });
        let mut gates: Vec<Gate> = circles.chain(waypoints).collect();
        hang(&mut gates);
        Self(gates)
    }

    /// How many rows the flags take.
    pub(super) fn rows(&self) -> usize {
        self.0.iter().filter_map(|gate| gate.flag).map(|flag| flag.row + 1).max().unwrap_or(0)
    }

    /// The lines and their flags.
    pub(super) fn draw(&self, canvas: &mut Canvas, frame: &Frame) {
        let mut last_x = f64::INFINITY;
        for gate in self.0.iter().filter(|gate| gate.flag.is_none()) {
            if gate.is_circle || (last_x - gate.x).abs() >= LEAST_APART {
                gate.line(canvas, frame, frame.plot.top);
                last_x = gate.x;
            }
        }
        for gate in &self.0 {
            let Some(flag) = gate.flag else { continue };
            let middle = frame.plot.top - 4.0 - FLAG_ROW * (flag.row as f64 + 0.5);
            gate.line(canvas, frame, middle - 7.0);
            canvas.text(&gate.label, Point::new(flag.left, middle), &style(gate.is_circle));
        }
    }
}

impl Gate {
    fn line(&self, canvas: &mut Canvas, frame: &Frame, top: f64) {
        let at = |y: f64| Point::new(self.x, y);
        let plot = frame.plot;
        let (stroke, dash) = if self.is_circle {
            (Stroke::new(CIRCLE, 1.4), Dash::DashDot(8.0, 4.0))
        } else {
            (Stroke::new(MUTED, 1.0), Dash::Dashed(2.0, 5.0))
        };
        canvas.line(&[at(top), at(plot.top)], stroke);
        canvas.line(&[at(plot.top), at(plot.bottom)], Stroke::new(Ink::WHITE.with_alpha(0.32), 3.0));
        canvas.line(&[at(plot.top), at(plot.bottom)], stroke.dashed(dash));
    }
}

fn hang(gates: &mut [Gate]) {
    let named: Vec<usize> = (0..gates.len()).filter(|&i| !gates[i].label.is_empty()).collect();
    let mast = |i: &usize| Mast {
        x: gates[*i].x,
        width: measure(&gates[*i].label, &style(gates[*i].is_circle)).width.ceil(),
    };
    let masts: Vec<Mast> = named.iter().map(mast).collect();
    for (i, flag) in named.into_iter().zip(flags(&masts, MOST_ROWS, (PLOT_LEFT - 100.0, RIGHT))) {
        gates[i].flag = flag;
    }
}
