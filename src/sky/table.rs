//! The Sun tabulated: Chebyshev pieces of its direction in a frame that turns with the mean Sun.
//!
//! In that frame the direction hardly moves (a degree a day), so few coefficients hold it, and one exact rotation by a
//! linear angle brings it to the Earth. Pieces are keyed by TT, the scale in which the Sun moves smoothly; neither a
//! leap second nor UT1 − UTC enters before the rotation. Each piece answers for eight days and is fitted with a day of
//! margin on both sides, so that one piece serves a whole flight: no edge, however small, lies within one.

use super::model::apparent;
use super::sun::SunPlace;
use super::time::tt_minus_utc_s;
use crate::curve::{coefficients, lobatto};
use crate::units::{Dut1, Instant, Lane};
use std::f64::consts::TAU;
use std::sync::OnceLock;

/// Coefficients of a piece.
const TERMS: usize = 9;
/// Days that a piece answers for.
const PIECE_DAYS: f64 = 8.0;
/// Days of margin on each side of a piece: half the longest interval that is certain to lie in one piece.
const MARGIN_DAYS: f64 = 1.0;
/// The last TT day since J2000.0 that the ephemeris is stated for, noon of 1 January 2100; the last piece's margin ends
/// there and must not go beyond.
const LAST_DAY: f64 = 36_525.0;
/// Pieces from before 1973 to the last day.
const PIECES: usize = 5799;
/// TT days since J2000.0 of the first piece's beginning.
const FIRST_DAY: f64 = LAST_DAY - MARGIN_DAYS - PIECES as f64 * PIECE_DAYS;

/// Earth rotation angle in turns at J2000.0 UT1 and its excess over a turn a day (IAU 2000 resolution B1.8).
const ROTATION_AT_J2000: f64 = 0.779_057_273_264_0;
const ROTATION_EXCESS: f64 = 0.002_737_811_911_354_48;

/// One piece: four series (the direction's components in the mean Sun's frame, the distance in au).
#[derive(Debug)]
struct Piece {
    terms: [[f64; 4]; TERMS],
}

/// The tabulated sky, from 1973 to 2099, each piece built when first asked for and then shared by all threads.
///
/// # Accuracy
/// Within 0.001″ of the model it tabulates, and that within 0.022″ of JPL DE421 (`tests/tables/skyfield-de421`).
/// UT1 − UTC is the caller's: left at 0 it can turn the Earth by up to 13.5″, which moves an event by up to 0.9 s for an
/// observer at rest and more where the Sun moves slowly against him.
#[derive(Debug)]
pub struct Sky {
    dut1_s: f64,
    pieces: Box<[OnceLock<Box<Piece>>]>,
}

impl Default for Sky {
    fn default() -> Self {
        Self::new(Dut1::default())
    }
}

impl Sky {
    /// The sky for a value of UT1 − UTC.
    pub fn new(dut1: Dut1) -> Self {
        Self { dut1_s: dut1.s(), pieces: (0..PIECES).map(|_| OnceLock::new()).collect() }
    }

    /// UT1 − UTC in seconds.
    pub fn dut1_s(&self) -> f64 {
        self.dut1_s
    }

    /// The Sun over an interval, which may be as long as 48 hours; outside the years answered for the last piece is stretched.
    pub fn window(&self, begin: Instant, end: Instant) -> SunWindow<'_> {
        let offset_s = tt_minus_utc_s(begin);
        let begin_tt = (begin.seconds() + offset_s) / 86_400.0;
        let mid_tt = begin_tt + end.since_s(begin) / 2.0 / 86_400.0;
        let index = ((mid_tt - FIRST_DAY) / PIECE_DAYS).clamp(0.0, (PIECES - 1) as f64) as usize;
        let piece_mid = FIRST_DAY + (index as f64 + 0.5) * PIECE_DAYS;
        let reach = PIECE_DAYS / 2.0 + MARGIN_DAYS;
        let piece = self.pieces[index].get_or_init(|| Box::new(Piece::fitted(piece_mid, reach)));
        SunWindow {
            piece,
            x_at_begin: (begin_tt - piece_mid) / reach,
            x_per_s: 1.0 / (reach * 86_400.0),
            angle_at_begin: mean_sun_angle(begin, self.dut1_s, offset_s),
            begin,
        }
    }

    /// The Sun at one instant.
    pub fn sun_at(&self, instant: Instant) -> SunPlace {
        self.window(instant, instant).at(0.0)
    }
}

/// The Sun over an interval of up to two days, cheap to evaluate.
#[derive(Debug, Clone, Copy)]
pub struct SunWindow<'a> {
    piece: &'a Piece,
    x_at_begin: f64,
    x_per_s: f64,
    angle_at_begin: f64,
    begin: Instant,
}

impl SunWindow<'_> {
    /// The instant from which seconds are counted.
    pub fn begin(&self) -> Instant {
        self.begin
    }

    /// The Sun's place, so many seconds after the window's beginning.
    #[inline]
    pub fn at<L: Lane>(&self, seconds: L) -> SunPlace<L> {
        let [x, y, z, distance_au] =
            self.piece.at(L::splat(self.x_at_begin) + seconds * L::splat(self.x_per_s));
        let angle = L::splat(self.angle_at_begin) + seconds * L::splat(super::MEAN_SUN_RAD_S);
        let (sin, cos) = angle.sine_cosine();
        SunPlace { direction: [cos * x + sin * y, cos * y - sin * x, z], distance_au }
    }
}

/// The angle in radians by which the mean Sun's frame has turned from the Greenwich meridian.
///
/// Earth rotation angle (of UT1) less the mean Sun's right ascension (of TT): a turn a day and no more.
fn mean_sun_angle(instant: Instant, dut1_s: f64, tt_minus_utc_s: f64) -> f64 {
    let turns = (instant.seconds() + dut1_s) / 86_400.0;
    let excess = ROTATION_EXCESS * (dut1_s - tt_minus_utc_s) / 86_400.0;
    TAU * ((turns - turns.floor()) + excess)
}

impl Piece {
    fn fitted(mid_tt: f64, reach_days: f64) -> Self {
        let samples: Vec<[f64; 4]> = lobatto(TERMS).map(|x| in_mean_frame(mid_tt + reach_days * x)).collect();
        let mut terms = [[0.0; 4]; TERMS];
        for component in 0..4 {
            let values: [f64; TERMS] = std::array::from_fn(|j| samples[j][component]);
            let mut c = [0.0; TERMS];
            coefficients(&values, &mut c);
            for (term, c) in terms.iter_mut().zip(c) {
                term[component] = c;
            }
        }
        Self { terms }
    }

    /// Clenshaw's sum for the four series at once.
    #[inline]
    fn at<L: Lane>(&self, x: L) -> [L; 4] {
        let (mut b1, mut b2) = ([L::splat(0.0); 4], [L::splat(0.0); 4]);
        let twice = L::splat(2.0) * x;
        for term in self.terms[1..].iter().rev() {
            let b0 = std::array::from_fn(|i| twice * b1[i] + (L::splat(term[i]) - b2[i]));
            (b1, b2) = (b0, b1);
        }
        std::array::from_fn(|i| x * b1[i] + (L::splat(self.terms[0][i]) - b2[i]))
    }
}

/// The model's direction turned back by the mean Sun's right ascension, and the distance.
fn in_mean_frame(tt_days: f64) -> [f64; 4] {
    let sun = apparent(tt_days);
    let (sin, cos) = (TAU * (ROTATION_AT_J2000 + ROTATION_EXCESS * tt_days)).sin_cos();
    let [x, y, z] = sun.direction;
    [cos * x + sin * y, cos * y - sin * x, z, sun.distance_au]
}

#[cfg(test)]
mod tests {
    use super::super::model;
    use super::Sky;
    use crate::units::{Dut1, Instant, dot};

    /// Straight from the model, by Earth rotation angle of UT1 = UTC.
    fn direct(instant: Instant) -> [f64; 3] {
        let tt = super::super::time::tt_days(instant);
        let era = sofars::erst::era00(2_451_545.0, instant.seconds() / 86_400.0);
        let [x, y, z] = model::apparent(tt).direction;
        let (sin, cos) = era.sin_cos();
        [cos * x + sin * y, cos * y - sin * x, z]
    }

    #[test]
    fn the_table_is_within_a_thousandth_of_an_arcsecond_of_the_model() {
        let sky = Sky::default();
        // uneven steps of about 131 days over the whole span
        for i in 0..350 {
            let instant = Instant::from_seconds(-8.519e8 + f64::from(i) * 1.1357e7);
            let (a, b) = (sky.sun_at(instant).direction, direct(instant));
            let gap = (0..3).map(|k| (a[k] - b[k]).powi(2)).sum::<f64>().sqrt();
            assert!(gap * 206_265.0 < 0.001, "{:?}: {}″", instant.utc(), gap * 206_265.0);
            assert!((dot(a, a) - 1.0).abs() < 1e-8);
        }
    }

    #[test]
    fn ut1_turns_the_earth_and_leaves_the_declination() {
        let instant = Instant::from_seconds(8.5e8);
        let (a, b) = (Sky::default().sun_at(instant), Sky::new(Dut1::from_s(0.5).unwrap()).sun_at(instant));
        let turned = (b.gha() - a.gha()).deg();
        assert!((turned - 0.5 * 1.002_737_9 * 360.0 / 86_400.0).abs() < 1e-9, "{turned}");
        assert_eq!(a.declination(), b.declination());
        assert!(Dut1::from_s(1.0).is_err() && Dut1::from_s(f64::NAN).is_err());
    }
}
