//! Circles and waypoints: upright lines with their names along the top.
//!
//! The names are level flags while all of them have room, else they stand upright. Knows nothing of the Sun.

use super::frame::Frame;
use super::layout::{FLAG_ROW, PLOT_LEFT, PLOT_RIGHT, RIGHT};
use super::style::{CIRCLE, INK, MUTED, SMALL, fitted, letters};
use crate::Brief;
use crate::charts::canvas::{Across, Canvas, Dash, Ink, Level, Point, Stroke, TextStyle, Turn, measure};
use crate::charts::labels::{Flag, Mast, apart, flags};
use crate::label::words::circle_name;
use crate::path::Heading;

/// The rows of flags at most.
const MOST_ROWS: usize = 4;
/// No waypoint's name is longer, and no circle's needs more.
const LONGEST_WAYPOINT: f64 = 132.0;
const LONGEST_CIRCLE: f64 = 190.0;
/// From one upright name to the next at least.
const UPRIGHT_ROOM: f64 = 17.0;
/// The height in which the lines to upright names lean to where there is room.
const LEAN: f64 = 16.0;
/// Waypoints stand at least so far apart, or a long route would be one block of ink.
const LEAST_APART: f64 = 3.0;

struct Gate {
    x: f64,
    name: String,
    is_circle: bool,
    sign: Sign,
}

/// Where a gate's name is.
enum Sign {
    None,
    Flag(Flag),
    /// Upright above this x.
    Upright(f64),
}

/// Everything that is passed on the way.
pub(super) struct Gates {
    gates: Vec<Gate>,
    height_px: f64,
}

fn style(is_circle: bool) -> TextStyle {
    let style = letters(SMALL).anchored(Across::Start, Level::Middle);
    TextStyle { ink: if is_circle { CIRCLE } else { INK }, ..style }
}

/// An arrow along the text with a letter, which holds however the text is turned.
fn towards(heading: Heading) -> &'static str {
    match heading {
        Heading::Northbound => "→N",
        Heading::Southbound => "→S",
        Heading::Eastbound => "→E",
        Heading::Westbound => "→W",
    }
}

impl Gates {
    /// The gates of a flight with their names.
    pub(super) fn new(brief: &Brief) -> Self {
        let x = |at_s: f64| PLOT_LEFT + at_s / brief.path.airborne_s * (PLOT_RIGHT - PLOT_LEFT);
        let gate = |at_s: f64, name: &str, is_circle: bool| Gate {
            x: x(at_s),
            name: fitted(name, &style(is_circle), if is_circle { LONGEST_CIRCLE } else { LONGEST_WAYPOINT }),
            is_circle,
            sign: Sign::None,
        };
        let circles = brief.circles.iter().map(|crossing| {
            let name = format!("{} {}", circle_name(crossing.circle.name), towards(crossing.heading));
            gate(crossing.at_s, &name, true)
        });
        let waypoints = brief.flight.waypoints.iter().zip(brief.path.waypoints_s());
        let waypoints = waypoints.map(|(waypoint, &at_s)| gate(at_s, &waypoint.label, false));
        let mut gates: Vec<Gate> = thinned(circles.chain(waypoints).collect());
        let height_px = hung(&mut gates).unwrap_or_else(|| stood(&mut gates));
        Self { gates, height_px }
    }

    /// The height that the names take above the plot.
    pub(super) fn height_px(&self) -> f64 {
        self.height_px
    }

    /// The lines and their names.
    pub(super) fn draw(&self, canvas: &mut Canvas, frame: &Frame) {
        for gate in &self.gates {
            gate.draw(canvas, frame);
        }
    }
}

/// Circles, and those waypoints that stand far enough from the last to be told apart; in order from the left.
fn thinned(mut gates: Vec<Gate>) -> Vec<Gate> {
    gates.sort_by(|a, b| a.x.total_cmp(&b.x));
    let mut last_x = f64::NEG_INFINITY;
    gates.retain(|gate| {
        let kept = gate.is_circle || gate.x - last_x >= LEAST_APART;
        if kept && !gate.is_circle {
            last_x = gate.x;
        }
        kept
    });
    gates
}

/// Hangs all names as flags; the height they take, or nothing where one has no room.
fn hung(gates: &mut [Gate]) -> Option<f64> {
    // from the right, so that they can climb; circles first
    let mut order: Vec<usize> = (0..gates.len()).rev().filter(|&i| !gates[i].name.is_empty()).collect();
    order.sort_by_key(|&i| !gates[i].is_circle);
    let mast = |&i: &usize| {
        let gate = &gates[i];
        Mast { x: gate.x, width: measure(&gate.name, &style(gate.is_circle)).width.ceil() }
    };
    // more cannot have room for all, and need not be tried
    if order.len() as f64 > (RIGHT - PLOT_LEFT) / UPRIGHT_ROOM {
        return None;
    }
    let masts: Vec<Mast> = order.iter().map(mast).collect();
    let flags: Option<Vec<Flag>> = flags(&masts, MOST_ROWS, (PLOT_LEFT - 100.0, RIGHT)).into_iter().collect();
    let mut rows = 0;
    for (&i, flag) in order.iter().zip(flags?) {
        rows = rows.max(flag.row + 1);
        gates[i].sign = Sign::Flag(flag);
    }
    Some(FLAG_ROW * rows as f64)
}

/// Stands names upright, all circles and as many waypoints as have room; the height they take.
fn stood(gates: &mut [Gate]) -> f64 {
    let named = |gate: &Gate| !gate.name.is_empty();
    let circles = gates.iter().filter(|gate| gate.is_circle).count();
    let waypoints = gates.iter().filter(|gate| !gate.is_circle && named(gate)).count();
    let room = ((PLOT_RIGHT - PLOT_LEFT) / UPRIGHT_ROOM) as usize;
    // every second, third, … where not all have room
    let step = waypoints.div_ceil(room.saturating_sub(circles).max(1)).max(1);
    let mut seen = 0_usize;
    let mut chosen = Vec::new();
    for (i, gate) in gates.iter().enumerate().filter(|(_, gate)| named(gate)) {
        if gate.is_circle || seen.is_multiple_of(step) {
            chosen.push(i);
        }
        seen += usize::from(!gate.is_circle);
    }
    let wished: Vec<f64> = chosen.iter().map(|&i| gates[i].x).collect();
    let mut longest = 0.0_f64;
    for (&i, x) in chosen.iter().zip(apart(&wished, UPRIGHT_ROOM, (PLOT_LEFT, PLOT_RIGHT))) {
        longest = longest.max(measure(&gates[i].name, &style(true)).width);
        gates[i].sign = Sign::Upright(x);
    }
    longest.ceil() + LEAN + 4.0
}

impl Gate {
    fn draw(&self, canvas: &mut Canvas, frame: &Frame) {
        let at = |y: f64| Point::new(self.x, y);
        let plot = frame.plot;
        let (stroke, dash) = if self.is_circle {
            (Stroke::new(CIRCLE, 2.0), Dash::DashDot(8.0, 5.0))
        } else {
            (Stroke::new(MUTED, 1.0), Dash::Dashed(2.0, 5.0))
        };
        canvas.line(&[at(plot.top), at(plot.bottom)], Stroke::new(Ink::WHITE.with_alpha(0.32), 4.0));
        canvas.line(&[at(plot.top), at(plot.bottom)], stroke.dashed(dash));
        let style = style(self.is_circle);
        match self.sign {
            Sign::None => {}
            Sign::Flag(flag) => {
                let middle = plot.top - 4.0 - FLAG_ROW * (flag.row as f64 + 0.5);
                canvas.line(&[at(middle - 7.0), at(plot.top)], stroke);
                canvas.text(&self.name, Point::new(flag.left, middle), &style);
            }
            Sign::Upright(x) => {
                let foot = Point::new(x, plot.top - LEAN);
                canvas.line(&[at(plot.top), foot.moved(0.0, 3.0), foot], stroke);
                canvas.text(&self.name, foot.moved(0.0, -3.0), &style.turned(Turn::ThreeQuarters));
            }
        }
    }
}
