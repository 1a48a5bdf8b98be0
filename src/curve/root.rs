//! The one crossing of a level on an interval where a curve is monotone.

use super::curve::Curve;

impl Curve {
    /// The time at which a curve that is monotone on [`from_s`, `to_s`] meets `level`, its ends lying on both sides of it.
    ///
    /// # Accuracy
    /// 1e−10 of the curve's half duration, or the last bit of the value where the curve is flat.
    pub fn meets(&self, level: f64, from_s: f64, to_s: f64) -> f64 {
        let scaled =
            |t: f64| ((t - self.time_s(0.0)) / (self.time_s(1.0) - self.time_s(0.0))).clamp(-1.0, 1.0);
        let (mut low, mut high) = (scaled(from_s), scaled(to_s));
        let (at_low, at_high) = (self.value_x(low) - level, self.value_x(high) - level);
        let rising = at_high >= at_low;
        let mut x = low + (high - low) * at_low / (at_low - at_high);
        if !x.is_finite() {
            x = low;
        }
        for _ in 0..80 {
            let [value, slope, _] = self.jet_x(x);
            let gap = value - level;
            if (gap < 0.0) == rising {
                low = x
            } else {
                high = x
            }
            let next = x - gap / slope;
            let next = if next > low && next < high { next } else { f64::midpoint(low, high) };
            if (next - x).abs() < 1e-10 {
                return self.time_s(next);
            }
            x = next;
        }
        self.time_s(x)
    }
}

#[cfg(test)]
mod tests {
    use crate::curve::{Bandwidth, Curve};

    #[test]
    fn a_level_is_met_where_the_sine_is_that_high() {
        let band = Bandwidth { body_rad_s: 1.0, path_rad_s: 0.0 };
        let curve = Curve::through(0.0, 3.0, band, f64::sin).unwrap();
        let half_pi = std::f64::consts::FRAC_PI_2;
        for level in [0.0001_f64, 0.5, 0.999_999] {
            assert!((curve.meets(level, 0.0, half_pi) - level.asin()).abs() < 3e-6, "{level}");
        }
    }
}
