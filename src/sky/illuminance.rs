//! How bright it is on level ground under a clear sky, by the Sun and by the Moon.
//!
//! Knows no cloud, no terrain, no town and no height: at high Sun an airliner has a few per cent more, at low Sun more
//! still, for which no published figure was found.

use super::{GeometricElevation, MoonPlace, Phase, SunPlace};

/// Illuminance of a level surface in lux.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd, Default)]
pub struct Lux(pub f64);

impl std::ops::Add for Lux {
    type Output = Self;
    fn add(self, other: Self) -> Self {
        Self(self.0 + other.0)
    }
}

/// A cubic in elevation/90° for the common logarithm of lux.
type Cubic = [f64; 4];

/// The Sun's pieces from the lowest up, each with the elevation in degrees at which it begins.
const SUN: [(f64, Cubic); 6] = [
    (-18.0, [13.84, 262.72, 1447.42, 2797.93]),
    (-12.0, [2.70, 12.17, -431.69, -1899.83]),
    (-5.0, [2.88, 21.81, -258.11, -858.36]),
    (-0.8, [2.88, 22.26, -207.64, 1034.30]),
    (5.0, [3.05, 13.28, -45.98, 64.33]),
    (20.0, [3.74, 3.97, -4.07, 1.47]),
];
/// The full Moon's pieces.
const MOON: [(f64, Cubic); 3] = [
    (-0.8, [-2.79, 24.27, -252.95, 1321.29]),
    (5.0, [-2.58, 12.58, -42.58, 59.06]),
    (20.0, [-1.95, 4.06, -4.24, 1.56]),
];
/// How far on either side of a joint two pieces pass into each other, in degrees.
const BLEND_DEG: f64 = 0.5;
/// The Sun's diameter in degrees and the Moon's parallax in degrees that the pieces hold for.
const SUN_DIAMETER_DEG: f64 = 0.5066;
const MOON_PARALLAX_DEG: f64 = 0.951;

/// The light of the Sun and of the moonless night sky.
///
/// # Accuracy
/// The published cubics, but that neighbours, which differ by up to 1.6 % where they meet, pass smoothly into each other
/// within half a degree of the joint, and that the last is brought to rest between −17° and −18°: below, 0.0006 lx of
/// starlight and airglow remain. The curve rises everywhere and has no step. A clear sky itself varies by tens of per cent.
///
/// # Source
/// P. K. Seidelmann (ed.), *Explanatory Supplement to the Astronomical Almanac*, 1992, by way of D. Vallado, *Fundamentals of
/// Astrodynamics and Applications*, table 5-1 (the supplement itself was not opened).
pub fn sunlight(elevation: GeometricElevation, sun: &SunPlace) -> Lux {
    let nearness = 2.0 * sun.semidiameter().deg() / SUN_DIAMETER_DEG;
    Lux(10_f64.powf(sun_log(elevation.0.deg())) * nearness * nearness)
}

/// The light of the Moon alone.
///
/// # Accuracy
/// As for [`sunlight`]. The source ends at −0.8°; below, the light fades as the Sun's does there, which is our own.
///
/// # Source
/// The same; its phase angle is 180° less the elongation.
pub fn moonlight(elevation: GeometricElevation, moon: &MoonPlace, phase: &Phase) -> Lux {
    let f = 180.0 - phase.elongation.deg();
    let dimmed = -8.68e-3 * f - 2.2e-9 * f.powi(4);
    let nearness = moon.horizontal_parallax().deg() / MOON_PARALLAX_DEG;
    Lux(10_f64.powf(moon_log(elevation.0.deg()) + dimmed) * nearness * nearness)
}

/// Common logarithm of the Sun's lux at mean distance.
fn sun_log(deg: f64) -> f64 {
    let (lowest, night) = (SUN[0].0, cubic(SUN[0].1, SUN[0].0));
    let twilight = joined(&SUN, deg.max(lowest));
    // the rest is met from above, so that the curve cannot turn
    night + smooth(deg - lowest) * (twilight - night)
}

/// Common logarithm of the full Moon's lux at mean distance.
fn moon_log(deg: f64) -> f64 {
    let (lowest, first) = MOON[0];
    let twilight = sun_log(deg) + cubic(first, lowest) - sun_log(lowest);
    let share = smooth((deg - lowest + BLEND_DEG) / (2.0 * BLEND_DEG));
    if share == 0.0 { twilight } else { twilight + share * (joined(&MOON, deg) - twilight) }
}

/// The pieces as one curve: the lowest, and each next one let in over its joint.
fn joined(pieces: &[(f64, Cubic)], deg: f64) -> f64 {
    let mut value = cubic(pieces[0].1, deg);
    for &(from_deg, piece) in &pieces[1..] {
        let share = smooth((deg - from_deg + BLEND_DEG) / (2.0 * BLEND_DEG));
        value += share * (cubic(piece, deg) - value);
    }
    value
}

fn cubic([a, b, c, d]: Cubic, deg: f64) -> f64 {
    let x = deg / 90.0;
    a + x * (b + x * (c + x * d))
}

/// From 0 below 0 to 1 above 1, with two smooth derivatives.
fn smooth(t: f64) -> f64 {
    let t = t.clamp(0.0, 1.0);
    t * t * t * (10.0 + t * (6.0 * t - 15.0))
}

#[cfg(test)]
mod tests {
    use super::{MOON, SUN, cubic, moon_log, moonlight, sun_log, sunlight};
    use crate::sky::{GeometricElevation, MoonPlace, Phase, Sky, SunPlace};
    use crate::units::{Angle, Instant};

    fn sun_lux(deg: f64) -> f64 {
        10_f64.powf(sun_log(deg))
    }

    #[test]
    fn the_published_cubics_are_reproduced() {
        // computed beforehand from the same coefficients by other hands
        for (deg, lux) in [
            (90.0, 128_820.0),
            (45.0, 77_848.0),
            (20.0, 27_376.0),
            (10.0, 11_121.0),
            (5.0, 4_538.0),
            (0.0, 758.6),
            (-0.8333, 453.5),
            (-3.0, 79.1),
            (-6.0, 3.41),
            (-9.0, 0.116),
            (-12.0, 0.00806),
            (-15.0, 0.00202),
            (-18.0, 0.000645),
        ] {
            // three figures, and what neighbours differ by at a joint
            assert!((sun_lux(deg) / lux - 1.0).abs() < 0.01, "{deg}: {}", sun_lux(deg));
        }
    }

    #[test]
    fn twilight_is_as_bright_as_the_glossaries_say() {
        // American Meteorological Society, Glossary: 585 to 410 lx at sunset, 3.5 to 2 lx at −6°, 0.008 lx at −12°, 6e−4 lx at −18°
        assert!((410.0..585.0).contains(&sun_lux(-50.0 / 60.0)));
        assert!((2.0..3.5).contains(&sun_lux(-6.0)));
        assert!((sun_lux(-12.0) / 0.008 - 1.0).abs() < 0.05);
        assert!((sun_lux(-18.0) / 6e-4 - 1.0).abs() < 0.1);
        // Biberman 1971: 10,000 fc at noon, at least, and 12,500 fc above the air at most
        assert!((10_000.0..12_500.0).contains(&(sun_lux(90.0) / 10.764)));
    }

    #[test]
    fn light_rises_with_the_body_and_nowhere_steps() {
        for log in [sun_log, moon_log] {
            let mut last = log(-30.0);
            for i in 1..=120_000 {
                let now = log(-30.0 + f64::from(i) * 1e-3);
                // nowhere steeper than 0.7 of a power of ten for each degree
                assert!(now >= last && now - last < 0.7e-3, "{}", -30.0 + f64::from(i) * 1e-3);
                last = now;
            }
        }
    }

    #[test]
    fn neighbours_differ_by_little_where_they_meet() {
        for pair in SUN.windows(2).chain(MOON.windows(2)) {
            let at = pair[1].0;
            let gap = cubic(pair[1].1, at) - cubic(pair[0].1, at);
            assert!(gap.abs() < 0.007, "{at}: {gap}");
        }
    }

    #[test]
    fn a_full_moon_overhead_gives_a_quarter_of_a_lux_and_a_half_moon_an_eighth_of_that() {
        let moon =
            MoonPlace { direction: [1.0, 0.0, 0.0], distance_au: 4.2635e-5 / 0.951_f64.to_radians().sin() };
        let zenith = GeometricElevation(Angle::from_deg(90.0));
        let lit = |elongation: f64| {
            let sun = SunPlace { direction: [elongation.cos(), elongation.sin(), 0.0], distance_au: 1.0 };
            moonlight(zenith, &moon, &moon.phase(&sun)).0
        };
        assert!((lit(std::f64::consts::PI) - 0.269).abs() < 0.001, "{}", lit(std::f64::consts::PI));
        assert!((lit(std::f64::consts::FRAC_PI_2) - 0.032).abs() < 0.0005);
    }

    #[test]
    fn a_near_sun_is_brighter_than_a_far_one() {
        let sky = Sky::default();
        let zenith = GeometricElevation(Angle::from_deg(90.0));
        // early January and early July
        let at = |seconds: f64| sky.sun_at(Instant::from_seconds(seconds));
        let ratio = sunlight(zenith, &at(8.205e8)).0 / sunlight(zenith, &at(8.365e8)).0;
        assert!((ratio - 1.069).abs() < 0.003, "{ratio}");
    }

    #[test]
    fn a_new_moon_gives_no_light_worth_the_name() {
        let sky = Sky::default();
        let moon = sky.moon_at(Instant::from_seconds(8.5e8));
        let new = Phase {
            elongation: Angle::ZERO,
            phase_angle: Angle::from_deg(180.0),
            illuminated: 0.0,
            bright_limb: Angle::ZERO,
            is_waxing: true,
        };
        assert!(moonlight(GeometricElevation(Angle::from_deg(90.0)), &moon, &new).0 < 1e-3);
    }
}
