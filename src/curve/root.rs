//! The one crossing of a level on an interval where a curve is monotone.

use super::polynomial::Curve;

/// Scaled time, the curve's gap to the level and its slope there.
#[derive(Clone, Copy)]
struct End {
    x: f64,
    gap: f64,
    slope: f64,
}

/// A stretch of scaled time that holds the crossing.
#[derive(Clone, Copy)]
struct Bracket {
    low: End,
    high: End,
}

impl Curve {
    /// The time at which a curve that is monotone on [`from_s`, `to_s`] meets `level`, its ends lying on both sides of it.
    ///
    /// # Accuracy
    /// 1e−9 of the curve's half duration, or the last bit of the value where the curve is flat.
    pub fn meets(&self, level: f64, rising: bool, from_s: f64, to_s: f64) -> f64 {
        let bracket = self.bracket(level, rising, (self.scaled(from_s), self.scaled(to_s)));
        self.time_s(self.refined(level, rising, bracket))
    }

    /// Narrows a bracket to the cell between two nodes, or between a node and an end, that holds the crossing: the nodes'
    /// values are at hand.
    fn bracket(&self, level: f64, rising: bool, (from, to): (f64, f64)) -> Bracket {
        let nodes = self.nodes();
        let begin = nodes.partition_point(|&x| x <= from);
        let end = begin + nodes[begin..].partition_point(|&x| x < to);
        // monotone: the nodes before the crossing come first
        let split = begin + self.values[begin..end].partition_point(|&value| (value < level) == rising);
        let node = |i: usize| End { x: nodes[i], gap: self.values[i] - level, slope: self.slopes[i] };
        let free = |x: f64| {
            let [value, slope] = self.value_and_slope_x(x);
            End { x, gap: value - level, slope }
        };
        let low = match split {
            s if s > begin => node(s - 1),
            _ if from == -1.0 => node(0),
            _ => free(from),
        };
        let high = match split {
            s if s < end => node(s),
            _ if to == 1.0 => node(nodes.len() - 1),
            _ => free(to),
        };
        Bracket { low, high }
    }

    /// Newton from a good start, kept inside its bracket by bisection.
    fn refined(&self, level: f64, rising: bool, bracket: Bracket) -> f64 {
        let (mut low, mut high) = (bracket.low.x, bracket.high.x);
        let bend = bracket.bend();
        let mut x = bracket.start();
        for _ in 0..80 {
            let [value, slope] = self.value_and_slope_x(x);
            let gap = value - level;
            if (gap < 0.0) == rising {
                low = x;
            } else {
                high = x;
            }
            let step = gap / slope;
            let next = x - step;
            let inside = next >= low && next <= high;
            let next = if inside { next } else { f64::midpoint(low, high) };
            // Newton's next error is half the bend over the slope, times the square of this step
            let settled = inside && step * step * bend <= 1e-9 * slope.abs();
            if settled || high - low < 1e-13 {
                return next;
            }
            x = next;
        }
        x
    }
}

impl Bracket {
    /// How large the second derivative is in the bracket, by its ends' slopes; twice that, to be on the safe side.
    fn bend(&self) -> f64 {
        2.0 * ((self.high.slope - self.low.slope) / (self.high.x - self.low.x)).abs()
    }

    /// Where Newton begins: the inverse cubic through both ends with their slopes where that stays inside, else the
    /// chord's crossing.
    fn start(&self) -> f64 {
        let (low, high) = (self.low, self.high);
        let (run, rise) = (high.x - low.x, high.gap - low.gap);
        if rise == 0.0 {
            return low.x;
        }
        // x as a function of the gap, u from 0 to 1 over the bracket, Hermite form
        let u = -low.gap / rise;
        let (da, db) = (rise / low.slope, rise / high.slope);
        let x = low.x + u * (run * u * (3.0 - 2.0 * u) + (1.0 - u) * (da * (1.0 - u) - db * u));
        if x > low.x && x < high.x { x } else { low.x + u * run }
    }
}

#[cfg(test)]
mod tests {
    use crate::curve::{Bandwidth, Curve};

    #[test]
    fn a_level_is_met_where_the_sine_is_that_high() {
        let band = Bandwidth { body_rad_s: 1.0, path_rad_s: 0.0 };
        let curve = Curve::through(0.0, 3.0, band, wide::f64x4::sin).unwrap();
        let half_pi = std::f64::consts::FRAC_PI_2;
        for level in [0.0001_f64, 0.5, 0.999_999] {
            assert!((curve.meets(level, true, 0.0, half_pi) - level.asin()).abs() < 3e-6, "{level}");
            let down = std::f64::consts::PI - level.asin();
            if down < 3.0 {
                assert!((curve.meets(level, false, half_pi, 3.0) - down).abs() < 3e-6, "{level} downwards");
            }
        }
    }
}
