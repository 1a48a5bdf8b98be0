//! The search for turning points and crossings, fed toy skies: sums of waves within the bandwidth.

use gloamline::curve::{Bandwidth, Curve};
use gloamline::units::Four;
use proptest::prelude::*;

/// What a curve may err by, as its room promises.
const ERROR: f64 = 2e-9;
/// A root is good to 1e−9 of its curve's half, in which the fastest wave turns by less than ten radians.
const ROOT: f64 = 1e-8;
/// How often the dense sampling looks.
const STEPS: u32 = 20_000;

/// A sum of waves: amplitude, rate as a share of the band, phase. The amplitudes sum to one.
#[derive(Debug, Clone)]
struct Toy {
    waves: Vec<(f64, f64, f64)>,
    band_rad_s: f64,
    seconds: f64,
}

impl Toy {
    fn at(&self, t: f64) -> f64 {
        self.waves.iter().map(|(a, share, phase)| a * (share * self.band_rad_s * t + phase).cos()).sum()
    }

    fn at_four(&self, t: Four) -> Four {
        Four::from(t.to_array().map(|t| self.at(t)))
    }

    /// The curves that cover the toy's time with where each ends, halved until each takes few enough nodes.
    fn curves(&self) -> Vec<(Curve, f64)> {
        let mut spans = vec![(0.0, self.seconds)];
        let mut curves = Vec::new();
        while let Some((from, to)) = spans.pop() {
            let band = Bandwidth { body_rad_s: self.band_rad_s, path_rad_s: 0.0 };
            if let Some(curve) = Curve::through(from, to, band, |t| self.at_four(t)) {
                curves.push((curve, to));
            } else {
                let middle = f64::midpoint(from, to);
                spans.extend([(middle, to), (from, middle)]);
            }
        }
        curves
    }

    /// Times between which the sum is monotone, with its value there, curve by curve.
    fn peaks(&self) -> Vec<Vec<(f64, f64)>> {
        let of_one = |(curve, end): &(Curve, f64)| {
            let turns = curve.turning_points();
            let begin = std::iter::once((curve.begin_s(), curve.first()));
            begin.chain(curve.turns(&turns)).chain(std::iter::once((*end, curve.last()))).collect()
        };
        self.curves().iter().map(of_one).collect()
    }

    /// The times at which a level is met.
    fn crossings(&self, level: f64) -> Vec<f64> {
        let mut found = Vec::new();
        for ((curve, _), peaks) in self.curves().iter().zip(self.peaks()) {
            let on_both_sides = |pair: &&[(f64, f64)]| (pair[0].1 >= level) != (pair[1].1 >= level);
            let meets = |pair: &[(f64, f64)]| curve.meets(level, pair[1].1 >= level, pair[0].0, pair[1].0);
            found.extend(peaks.windows(2).filter(on_both_sides).map(meets));
        }
        found
    }
}

fn toy() -> impl Strategy<Value = Toy> {
    let wave = (0.05..1.0, 0.0..1.0, 0.0..std::f64::consts::TAU);
    // from half an hour at the Sun's own rate to a day at that of a supersonic aircraft
    (prop::collection::vec(wave, 1..7), 7e-5..2e-4, 1800.0..86_400.0).prop_map(
        |(waves, band_rad_s, seconds)| {
            let sum: f64 = waves.iter().map(|(a, ..): &(f64, f64, f64)| a).sum();
            Toy { waves: waves.into_iter().map(|(a, w, p)| (a / sum, w, p)).collect(), band_rad_s, seconds }
        },
    )
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(300))]

    #[test]
    fn a_curve_is_its_toy_within_the_promised_error(toy in toy()) {
        for (curve, end) in toy.curves() {
            for i in 0..=200 {
                let t = curve.begin_s() + (end - curve.begin_s()) * f64::from(i) / 200.0;
                prop_assert!((curve.value(t) - toy.at(t)).abs() <= ERROR, "{t}");
            }
        }
    }

    #[test]
    fn every_crossing_of_a_dense_sampling_is_found_and_no_other(toy in toy(), level in -0.9..0.9) {
        let found = toy.crossings(level);
        for &at in &found {
            prop_assert!((toy.at(at) - level).abs() <= ERROR + ROOT, "{at}");
        }
        let time = |i: u32| toy.seconds * f64::from(i) / f64::from(STEPS);
        let mut explained = found.iter().peekable();
        for i in 1..=STEPS {
            let (before, after) = (toy.at(time(i - 1)), toy.at(time(i)));
            let mut inside = 0;
            while explained.next_if(|at| **at < time(i)).is_some() {
                inside += 1;
            }
            // a sample that close to the level may fall on either side
            if (before - level).abs() > 2.0 * ERROR && (after - level).abs() > 2.0 * ERROR {
                prop_assert_eq!(inside % 2 == 1, (before > level) != (after > level), "at {}", time(i));
            }
        }
    }

    #[test]
    fn no_sample_leaves_the_band_between_two_peaks(toy in toy()) {
        let peaks = toy.peaks();
        for pair in peaks.iter().flat_map(|own| own.windows(2)) {
            let (low, high) = (pair[0].1.min(pair[1].1), pair[0].1.max(pair[1].1));
            for i in 1..50 {
                let value = toy.at(pair[0].0 + (pair[1].0 - pair[0].0) * f64::from(i) / 50.0);
                // a rise below 5e−10 counts as flat
                prop_assert!(value >= low - ERROR - 1e-9 && value <= high + ERROR + 1e-9, "{value} of {low}..{high}");
            }
        }
    }

    #[test]
    fn a_level_just_within_an_extreme_is_met_twice_and_just_beyond_it_never(toy in toy(), exponent in -8.55..-6.0) {
        let peaks = toy.peaks();
        let gap = 10_f64.powf(exponent);
        for trio in peaks.iter().flat_map(|own| own.windows(3)) {
            let [before, top, after] = [trio[0], trio[1], trio[2]];
            let up = if top.1 > before.1 { 1.0 } else { -1.0 };
            // an extreme that stands out from its neighbours by more than the gap tried
            if (top.1 - before.1) * up < 3.0 * gap || (top.1 - after.1) * up < 3.0 * gap {
                continue;
            }
            let between = |level: f64| {
                let all = toy.crossings(level);
                all.into_iter().filter(|at| *at > before.0 && *at < after.0).collect::<Vec<_>>()
            };
            let pair = between(toy.at(top.0) - up * gap);
            prop_assert_eq!(pair.len(), 2, "{} about {:?}", gap, top);
            prop_assert!(pair[0] < top.0 && pair[1] > top.0);
            prop_assert_eq!(between(toy.at(top.0) + up * gap).len(), 0, "{} about {:?}", gap, top);
        }
    }
}
