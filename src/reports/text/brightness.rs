//! How bright it is outside, and what the planner's own factors make of it inside.

use super::{WIDTH, at};
use crate::label::clock::{duration, second};
use crate::light::Above;
use crate::reports::caution;
use crate::reports::table::{columns, wrapped};
use crate::{Brief, Inside};

/// How many levels stand side by side.
const LEVELS_ABREAST: usize = 6;

pub(super) fn brightness(brief: &Brief) -> String {
    let (view, exposure) = (&brief.exposure, &brief.exposure.exposure);
    let ends = format!(
        "take-off {} lx, landing {} lx; brightest {} lx at {}, darkest {} lx at {}",
        lux(view.at_takeoff().0),
        lux(view.at_landing().0),
        lux(exposure.brightest.lux.0),
        second(at(brief, exposure.brightest.at_s)),
        lux(exposure.darkest.lux.0),
        second(at(brief, exposure.darkest.at_s)),
    );
    format!(
        "Brightness outside\n{}{}{}{}{}",
        wrapped("  ", &ends, WIDTH),
        exposure.above.chunks(LEVELS_ABREAST).map(levels).collect::<String>(),
        wrapped("  ", &format!("in all {} lux-hours", lux(exposure.lux_hours)), WIDTH),
        view.inside.map_or(String::new(), inside),
        wrapped("  ", caution::OUTSIDE, WIDTH),
    )
}

/// Some levels side by side, each with how long it is exceeded.
fn levels(some: &[Above]) -> String {
    let row = |head: &str, cell: &dyn Fn(&Above) -> String| {
        std::iter::once(head.to_string()).chain(some.iter().map(cell)).collect::<Vec<_>>()
    };
    let span = |above: &Above| match above.seconds {
        0.0 => "never".to_string(),
        seconds => duration(seconds),
    };
    columns(&[row("brighter than", &|above| format!("{} lx", above.level.0)), row("", &span)])
}

fn inside(inside: Inside) -> String {
    let factors = [("transmittance", inside.transmittance), ("view factor", inside.view_factor)];
    let given = factors.iter().filter_map(|(name, value)| Some(format!("{name} {}", (*value)?)));
    let sentence = format!(
        "inside {} lux-hours with the flight file's own {}: {}",
        lux(inside.lux_hours),
        given.collect::<Vec<_>>().join(" and "),
        caution::INSIDE,
    );
    wrapped("  ", &sentence, WIDTH)
}

/// Three figures, thousands parted by commas.
fn lux(value: f64) -> String {
    if value <= 0.0 {
        return "0".to_string();
    }
    if value < 1.0 {
        let digits = (2 - value.log10().floor() as i32).clamp(2, 6);
        let text = format!("{value:.*}", digits as usize);
        return text.trim_end_matches('0').trim_end_matches('.').to_string();
    }
    let scale = 10_f64.powi(value.log10().floor() as i32 - 2);
    let rounded = (value / scale).round() * scale;
    if rounded < 100.0 {
        let text = format!("{rounded:.*}", if rounded < 10.0 { 2 } else { 1 });
        return text.trim_end_matches('0').trim_end_matches('.').to_string();
    }
    let digits = format!("{rounded:.0}");
    let parts = digits.as_bytes().rchunks(3).rev().map(String::from_utf8_lossy);
    parts.collect::<Vec<_>>().join(",")
}

#[cfg(test)]
mod tests {
    use super::lux;

    #[test]
    fn brightness_has_three_figures_of_any_size() {
        let pairs = [
            (0.000_612_3, "0.000612"),
            (0.25, "0.25"),
            (1.0, "1"),
            (3.456, "3.46"),
            (45.67, "45.7"),
            (999.6, "1,000"),
            (1234.0, "1,230"),
            (1_234_567.0, "1,230,000"),
            (0.0, "0"),
        ];
        for (value, text) in pairs {
            assert_eq!(lux(value), text);
        }
    }
}
