//! The horizon against a ray trace by other numerics, and against the formulae of the trade.

use crate::tables::{Row, number, rows};
use gloamline::sky::Horizon;
use gloamline::units::{Angle, Metres};

/// The table's semidiameter (its certificate).
const SEMIDIAMETER: Angle = Angle::from_arcsec(959.63);
/// Two formulae for the refractivity of dry air (1e−4 of it, of up to 1.1°) and our series.
const TWO_TRACES_DEG: f64 = 0.0002;

fn horizon(row: &Row) -> Horizon {
    Horizon::raised(Metres::from_feet(number(row, "horizon_ft"))).expect("a horizon that can be")
}

/// Our limit less the row's, in degrees.
fn off_deg(row: &Row) -> f64 {
    let height = Metres::from_feet(number(row, "height_ft"));
    horizon(row).sun_centre_limit(height, SEMIDIAMETER).0.deg() - number(row, "limit_deg")
}

/// Rows of the standard atmosphere over the mean radius, or of those that differ from it.
fn traced(standard: bool) -> Vec<Row> {
    let is_standard = |row: &Row| row["offset_k"] == "0" && row["radius_km"] == "6371.0088";
    rows("horizon-trace/horizon.csv").into_iter().filter(|row| is_standard(row) == standard).collect()
}

#[test]
fn the_horizon_is_where_an_independent_trace_puts_it() {
    let all = traced(true);
    assert!(all.len() > 100);
    for row in all {
        let height = Metres::from_feet(number(&row, "height_ft"));
        let dip = horizon(&row).dip(height).deg() - number(&row, "dip_deg");
        let refraction = horizon(&row).refraction(height).deg() - number(&row, "refraction_deg");
        for off in [dip, refraction, off_deg(&row)] {
            assert!(off.abs() < TWO_TRACES_DEG, "{off}° off in {row:?}");
        }
    }
}

#[test]
fn the_earths_radius_and_a_warm_or_cold_day_move_the_horizon_by_what_is_said() {
    let mut worst = [0.0_f64; 2];
    for row in traced(false) {
        let warm = row["offset_k"] != "0";
        worst[usize::from(warm)] = worst[usize::from(warm)].max(off_deg(&row).abs());
    }
    // stated: 0.006° up to FL350 for the radius, 0.08° for 15 K; FL430 a little more
    assert!(worst[0] < 0.01 && worst[1] < 0.10, "{worst:?}");
}

#[test]
fn the_limit_at_thirty_five_thousand_feet_is_the_one_computed_beforehand() {
    let sea = Horizon::clear_sea();
    let height = Metres::from_feet(35_000.0);
    assert!((sea.dip(height).deg() - 3.118).abs() < 0.001);
    assert!((sea.refraction(height).deg() * 60.0 - 61.6).abs() < 0.2);
    assert!((sea.sun_centre_limit(height, SEMIDIAMETER).0.deg() + 4.41).abs() < 0.005);
}

#[test]
fn the_dip_is_the_almanacs_near_the_sea() {
    // 1.76′ √h(m) (Nautical Almanac, 2022, page 9) for an average sea air, which bends a little more than the standard dry air
    for height_m in [2.0_f64, 10.0, 30.0, 100.0] {
        let arcmin = Horizon::clear_sea().dip(Metres(height_m)).deg() * 60.0;
        let almanac = 1.76 * height_m.sqrt();
        assert!((arcmin / almanac - 1.0).abs() < 0.01, "{height_m}: {arcmin} {almanac}");
    }
}

#[test]
fn the_standard_air_bends_the_level_ray_a_minute_less_than_the_convention() {
    let arcmin = Horizon::clear_sea().refraction(Metres(0.0)).deg() * 60.0;
    assert!((34.0 - arcmin - 1.05).abs() < 0.02, "{arcmin}");
}
