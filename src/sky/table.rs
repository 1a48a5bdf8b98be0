//! The Sun and the Moon tabulated: Chebyshev pieces of their directions in a frame that turns with the mean Sun.
//!
//! In that frame the Sun hardly moves (a degree a day) and the Moon slowly (twelve), so few coefficients hold them, and one
//! exact rotation by a linear angle brings them to the Earth. Pieces are keyed by TT, the scale in which the Sun moves smoothly; neither a
//! leap second nor UT1 − UTC enters before the rotation. Each piece answers for eight days and is fitted with a day of
//! margin on both sides, so that one piece serves a whole flight: no edge, however small, lies within one.

use super::model::{self, Apparent};
use super::moon::MoonPlace;
use super::piece::Piece;
use super::sun::SunPlace;
use super::time::tt_minus_utc_s;
use crate::units::{Dut1, Instant, Lane};
use std::f64::consts::TAU;
use std::sync::OnceLock;

/// Coefficients of a piece of the Sun's and of the Moon's course.
const SUN_TERMS: usize = 9;
const MOON_TERMS: usize = 14;
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

/// The tabulated sky, from 1973 to 2099, each piece built when first asked for and then shared by all threads.
///
/// # Accuracy
/// The Sun within 0.001″ of the model it tabulates, and that within 0.022″ of JPL DE421 (`tests/tables/skyfield-de421`);
/// for the Moon see [`MoonPlace`].
/// UT1 − UTC is the caller's: left at 0 it can turn the Earth by up to 13.5″, which moves an event by up to 0.9 s for an
/// observer at rest and more where the Sun moves slowly against him.
#[derive(Debug)]
pub struct Sky {
    dut1_s: f64,
    sun: Shelf<SUN_TERMS>,
    moon: Shelf<MOON_TERMS>,
}

/// Pieces side by side, each empty until asked for.
type Shelf<const N: usize> = Box<[OnceLock<Box<Piece<N>>>]>;

impl Default for Sky {
    fn default() -> Self {
        Self::new(Dut1::default())
    }
}

impl Sky {
    /// The sky for a value of UT1 − UTC.
    pub fn new(dut1: Dut1) -> Self {
        Self {
            dut1_s: dut1.s(),
            sun: (0..PIECES).map(|_| OnceLock::new()).collect(),
            moon: (0..PIECES).map(|_| OnceLock::new()).collect(),
        }
    }

    /// UT1 − UTC in seconds.
    pub fn dut1_s(&self) -> f64 {
        self.dut1_s
    }

    /// The Sun over an interval, which may be as long as 48 hours; outside the years answered for the last piece is stretched.
    pub fn window(&self, begin: Instant, end: Instant) -> SunWindow<'_> {
        let (index, span) = self.span(begin, end);
        let sun = |tt| in_mean_frame(tt, &model::apparent(tt));
        let piece =
            self.sun[index].get_or_init(|| Box::new(Piece::fitted(middle_of(index), REACH_DAYS, sun)));
        SunWindow { piece, span }
    }

    /// The Moon over an interval of the same kind.
    pub fn moon_window(&self, begin: Instant, end: Instant) -> MoonWindow<'_> {
        let (index, span) = self.span(begin, end);
        let moon = |tt| in_mean_frame(tt, &model::apparent_moon(tt));
        let piece =
            self.moon[index].get_or_init(|| Box::new(Piece::fitted(middle_of(index), REACH_DAYS, moon)));
        MoonWindow { piece, span }
    }

    /// The Sun at one instant.
    pub fn sun_at(&self, instant: Instant) -> SunPlace {
        self.window(instant, instant).at(0.0)
    }

    /// The Moon at one instant.
    pub fn moon_at(&self, instant: Instant) -> MoonPlace {
        self.moon_window(instant, instant).at(0.0)
    }

    /// Which piece serves an interval, and where in it the interval lies.
    fn span(&self, begin: Instant, end: Instant) -> (usize, Span) {
        let offset_s = tt_minus_utc_s(begin);
        let begin_tt = (begin.seconds() + offset_s) / 86_400.0;
        let mid_tt = begin_tt + end.since_s(begin) / 2.0 / 86_400.0;
        let index = ((mid_tt - FIRST_DAY) / PIECE_DAYS).clamp(0.0, (PIECES - 1) as f64) as usize;
        let span = Span {
            x_at_begin: (begin_tt - middle_of(index)) / REACH_DAYS,
            x_per_s: 1.0 / (REACH_DAYS * 86_400.0),
            angle_at_begin: mean_sun_angle(begin, self.dut1_s, offset_s),
            begin,
        };
        (index, span)
    }
}

/// Days on either side of a piece's middle that it is fitted over.
const REACH_DAYS: f64 = PIECE_DAYS / 2.0 + MARGIN_DAYS;

/// TT days since J2000.0 of a piece's middle.
fn middle_of(index: usize) -> f64 {
    FIRST_DAY + (index as f64 + 0.5) * PIECE_DAYS
}

/// An interval's place in its piece, and how the frame has turned by its beginning.
#[derive(Debug, Clone, Copy)]
struct Span {
    x_at_begin: f64,
    x_per_s: f64,
    angle_at_begin: f64,
    begin: Instant,
}

impl Span {
    /// A piece's Earth-fixed direction and its distance in au, so many seconds after the beginning.
    #[inline]
    fn look<L: Lane, const N: usize>(&self, piece: &Piece<N>, seconds: L) -> ([L; 3], L) {
        let [x, y, z, distance_au] = piece.at(L::splat(self.x_at_begin) + seconds * L::splat(self.x_per_s));
        let angle = L::splat(self.angle_at_begin) + seconds * L::splat(super::MEAN_SUN_RAD_S);
        let (sin, cos) = angle.sine_cosine();
        ([cos * x + sin * y, cos * y - sin * x, z], distance_au)
    }
}

/// The Sun over an interval of up to two days, cheap to evaluate.
#[derive(Debug, Clone, Copy)]
pub struct SunWindow<'a> {
    piece: &'a Piece<SUN_TERMS>,
    span: Span,
}

/// The Moon over an interval of up to two days, cheap to evaluate.
#[derive(Debug, Clone, Copy)]
pub struct MoonWindow<'a> {
    piece: &'a Piece<MOON_TERMS>,
    span: Span,
}

impl SunWindow<'_> {
    /// The instant from which seconds are counted.
    pub fn begin(&self) -> Instant {
        self.span.begin
    }

    /// The Sun's place, so many seconds after the window's beginning.
    #[inline]
    pub fn at<L: Lane>(&self, seconds: L) -> SunPlace<L> {
        let (direction, distance_au) = self.span.look(self.piece, seconds);
        SunPlace { direction, distance_au }
    }
}

impl MoonWindow<'_> {
    /// The instant from which seconds are counted.
    pub fn begin(&self) -> Instant {
        self.span.begin
    }

    /// The Moon's place, so many seconds after the window's beginning.
    #[inline]
    pub fn at<L: Lane>(&self, seconds: L) -> MoonPlace<L> {
        let (direction, distance_au) = self.span.look(self.piece, seconds);
        MoonPlace { direction, distance_au }
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

/// A direction turned back by the mean Sun's right ascension, and the distance.
fn in_mean_frame(tt_days: f64, body: &Apparent) -> [f64; 4] {
    let (sin, cos) = (TAU * (ROTATION_AT_J2000 + ROTATION_EXCESS * tt_days)).sin_cos();
    let [x, y, z] = body.direction;
    [cos * x + sin * y, cos * y - sin * x, z, body.distance_au]
}

#[cfg(test)]
mod tests {
    use super::super::model;
    use super::Sky;
    use crate::units::{Dut1, Instant, dot};

    /// Straight from the model, by Earth rotation angle of UT1 = UTC.
    fn direct(instant: Instant, body: impl Fn(f64) -> model::Apparent) -> [f64; 3] {
        let era = sofars::erst::era00(2_451_545.0, instant.seconds() / 86_400.0);
        let [x, y, z] = body(super::super::time::tt_days(instant)).direction;
        let (sin, cos) = era.sin_cos();
        [cos * x + sin * y, cos * y - sin * x, z]
    }

    fn gap_arcsec(a: [f64; 3], b: [f64; 3]) -> f64 {
        (0..3).map(|k| (a[k] - b[k]).powi(2)).sum::<f64>().sqrt() * 206_265.0
    }

    #[test]
    fn the_moons_table_is_within_a_hundredth_of_an_arcsecond_of_the_model() {
        let sky = Sky::default();
        let mut worst = 0.0_f64;
        for i in 0..700 {
            let instant = Instant::from_seconds(-8.519e8 + f64::from(i) * 5.6785e6);
            let moon = sky.moon_at(instant);
            let gap = gap_arcsec(moon.direction, direct(instant, model::apparent_moon));
            worst = worst.max(gap);
            // a flight's window reaches a day beyond its piece
            let early = instant.after_s(-86_400.0);
            let ahead = sky.moon_window(early, instant.after_s(86_400.0)).at(0.0);
            worst = worst.max(gap_arcsec(ahead.direction, direct(early, model::apparent_moon)));
        }
        assert!(worst < 0.01, "{worst}″");
    }

    #[test]
    fn the_table_is_within_a_thousandth_of_an_arcsecond_of_the_model() {
        let sky = Sky::default();
        // uneven steps of about 131 days over the whole span
        for i in 0..350 {
            let instant = Instant::from_seconds(-8.519e8 + f64::from(i) * 1.1357e7);
            let (a, b) = (sky.sun_at(instant).direction, direct(instant, model::apparent));
            let gap = gap_arcsec(a, b);
            assert!(gap < 0.001, "{:?}: {gap}″", instant.utc());
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
