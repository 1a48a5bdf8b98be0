//! A ray of light bent by the standard atmosphere around a round Earth.
//!
//! Knows no weather and no ellipsoid: over the ellipsoid's radii of curvature, 6335 to 6400 km, the horizon seen from
//! an airliner moves by 0.006° (`tests/tables/horizon-trace`).

use super::isa::{Layer, RHO0_KG_M3, layers};

/// The Earth's radius in metres: the mean (2a + b)/3 of the reference ellipsoid (IUGG 1980).
const RADIUS_M: f64 = 6_371_008.8;
/// Wave number squared in µm⁻² at 0.574 µm, the middle of what daylight and the eye make of each other.
const SIGMA2: f64 = 1.0 / (0.574 * 0.574);
/// Refractivity of dry air at 15 °C and 1013.25 hPa: Ciddor 1996, Applied Optics 35:1566, equation 1.
const REFRACTIVITY_AT_SEA_LEVEL: f64 =
    1e-8 * (5_792_105.0 / (238.0185 - SIGMA2) + 167_917.0 / (57.362 - SIGMA2));
/// Where the bending air ends: at 80 km (geopotential) less than 0.01″ is left, which is added in closed form.
pub(crate) const TOP_M: f64 = super::isa::geometric_m(80_000.0);
/// Panels of eight nodes for each layer of the atmosphere; the tests show twice as many to change nothing.
const PANELS: usize = 2;

/// Nodes and weights of Gauss and Legendre's rule on [−1, 1], the positive half (Abramowitz and Stegun, table 25.4).
const GAUSS: [(f64, f64); 4] = [
    (0.183434642495650, 0.362683783378362),
    (0.525532409916329, 0.313706645877887),
    (0.796666477413627, 0.222381034453374),
    (0.960289856497536, 0.101228536290376),
];

/// A ray, by what stays the same along it: refractive index × distance from the Earth's centre × cosine of the angle
/// to the horizontal, in metres (Bouguer's law).
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Ray {
    constant_m: f64,
}

/// Refractive index less one, and its change per metre.
///
/// # Source
/// n − 1 in proportion to the density (Gladstone and Dale); Ciddor's own dispersion and compressibility move it by
/// less than 1e−3 of itself within this atmosphere.
fn refractivity(layer: &Layer, height_m: f64) -> (f64, f64) {
    let (density, slope) = layer.density_and_slope(height_m);
    let scale = REFRACTIVITY_AT_SEA_LEVEL / RHO0_KG_M3;
    (scale * density, scale * slope)
}

/// Refractive index × radius in metres at a height.
fn optical_radius_m(layer: &Layer, height_m: f64) -> f64 {
    let radius_m = RADIUS_M + height_m;
    radius_m + refractivity(layer, height_m).0 * radius_m
}

fn layer_at(height_m: f64) -> &'static Layer {
    let all = layers();
    all.iter().find(|layer| height_m < layer.to_m).unwrap_or(&all[all.len() - 1])
}

impl Ray {
    /// The ray that is level at a height: it comes no lower.
    pub(crate) fn level_at(height_m: f64) -> Self {
        Self { constant_m: optical_radius_m(layer_at(height_m), height_m) }
    }

    /// The ray that reaches an observer at a height from an apparent elevation in radians, not within 0.01 of the zenith,
    /// where slants no longer tell heights.
    pub(crate) fn seen_from(height_m: f64, apparent_rad: f64) -> Self {
        Self { constant_m: Self::level_at(height_m).constant_m * apparent_rad.cos() }
    }

    /// The ray's angle to the horizontal in radians at a height; 0 where it does not come so low.
    pub(crate) fn slant_rad(self, height_m: f64) -> f64 {
        self.slant_in(layer_at(height_m), height_m)
    }

    fn slant_in(self, layer: &Layer, height_m: f64) -> f64 {
        let optical_m = optical_radius_m(layer, height_m);
        let half_versine = (optical_m - self.constant_m).max(0.0) / (2.0 * optical_m);
        2.0 * half_versine.sqrt().asin()
    }

    /// The height in metres at which the ray is level, sought below a height that it passes.
    pub(crate) fn lowest_m(self, below_m: f64) -> f64 {
        let mut height_m = below_m;
        // secant steps in air whose optical radius is nearly linear in the height
        for _ in 0..30 {
            let layer = layer_at(height_m);
            let step = (optical_radius_m(layer, height_m) - self.constant_m) / stretch(layer, height_m);
            height_m -= step;
            if step.abs() < 1e-7 {
                break;
            }
        }
        height_m
    }

    /// How far the ray turns, in radians, between two heights that it passes on its way up or down.
    ///
    /// # Source
    /// Auer and Standish 2000, AJ 119:2472: dR = −(r dn/dr)/(n + r dn/dr) dψ, ψ the zenith distance along the ray, whose
    /// integrand stays finite where the ray is level.
    pub(crate) fn bending_rad(self, from_m: f64, to_m: f64) -> f64 {
        self.bending_by_panels(from_m, to_m, PANELS)
    }

    /// The same from a height all the way out of the air.
    pub(crate) fn bending_to_space_rad(self, from_m: f64) -> f64 {
        self.bending_rad(from_m, TOP_M) + self.beyond_the_top_rad()
    }

    /// What is left above the top: thin enough for (n − 1) tan z.
    fn beyond_the_top_rad(self) -> f64 {
        refractivity(layer_at(TOP_M), TOP_M).0 / self.slant_rad(TOP_M).tan()
    }

    fn bending_by_panels(self, from_m: f64, to_m: f64, panels: usize) -> f64 {
        let within = layers().iter().map(|l| (l, l.from_m.max(from_m), l.to_m.min(to_m)));
        within.filter(|(_, from, to)| to > from).map(|(l, from, to)| self.in_layer(l, from, to, panels)).sum()
    }

    /// Gauss's rule over the ray's slant within one layer, where the integrand is smooth.
    fn in_layer(self, layer: &Layer, from_m: f64, to_m: f64, panels: usize) -> f64 {
        let (first, last) = (self.slant_in(layer, from_m), self.slant_in(layer, to_m));
        let half = (last - first) / (2 * panels) as f64;
        let mut height_m = from_m;
        let mut sum = 0.0;
        for panel in 0..panels {
            let mid = first + half * (2 * panel + 1) as f64;
            for (x, weight) in rising(GAUSS) {
                height_m = self.height_of_slant(layer, mid + half * x, height_m);
                sum += weight * turn_per_slant(layer, height_m);
            }
        }
        sum * half
    }

    /// The height within a layer at which the ray has a slant: Newton from a height nearby.
    fn height_of_slant(self, layer: &Layer, slant_rad: f64, near_m: f64) -> f64 {
        let wanted_m = self.constant_m / slant_rad.cos();
        let mut height_m = near_m;
        for _ in 0..12 {
            let step = (wanted_m - optical_radius_m(layer, height_m)) / stretch(layer, height_m);
            height_m += step;
            if step.abs() < 1e-4 {
                break;
            }
        }
        height_m
    }
}

/// d(n r)/dr.
fn stretch(layer: &Layer, height_m: f64) -> f64 {
    let (less_one, slope) = refractivity(layer, height_m);
    1.0 + less_one + (RADIUS_M + height_m) * slope
}

/// How far the ray turns for each radian of its slant.
fn turn_per_slant(layer: &Layer, height_m: f64) -> f64 {
    let (less_one, slope) = refractivity(layer, height_m);
    let lean = (RADIUS_M + height_m) * slope;
    -lean / (1.0 + less_one + lean)
}

/// The whole rule from its half, nodes rising.
fn rising(half: [(f64, f64); 4]) -> impl Iterator<Item = (f64, f64)> {
    let below = half.into_iter().rev().map(|(x, weight)| (-x, weight));
    below.chain(half)
}

#[cfg(test)]
mod tests {
    use super::{PANELS, RADIUS_M, REFRACTIVITY_AT_SEA_LEVEL, Ray, TOP_M};

    #[test]
    fn halving_the_steps_changes_no_ray_by_a_hundred_thousandth_of_a_degree() {
        for graze_m in [0.0, 1_500.0, 9_000.0, 10_900.0, 15_000.0] {
            let ray = Ray::level_at(graze_m);
            for to_m in [graze_m + 1.0, graze_m + 500.0, 12_000.0, 18_288.0, TOP_M] {
                let coarse = ray.bending_by_panels(graze_m, to_m, PANELS);
                let fine = ray.bending_by_panels(graze_m, to_m, 2 * PANELS);
                assert!((coarse - fine).abs().to_degrees() < 1e-9, "{graze_m} to {to_m}: {}", coarse - fine);
            }
        }
    }

    #[test]
    fn the_level_ray_at_sea_level_bends_by_thirty_three_minutes() {
        let arcmin = Ray::level_at(0.0).bending_to_space_rad(0.0).to_degrees() * 60.0;
        assert!((arcmin - 32.95).abs() < 0.02, "{arcmin}");
    }

    #[test]
    fn a_ray_at_half_height_bends_by_the_series_of_the_textbooks() {
        // R = (n − 1)(1 − β) tan z − (n − 1)(β − (n − 1)/2) tan³ z with β = H/r, H = p/(ρ g), and tan z = 1
        // (any text on spherical astronomy)
        let bent = Ray::seen_from(0.0, std::f64::consts::FRAC_PI_4).bending_to_space_rad(0.0);
        let beta = 101_325.0 / (1.225 * 9.80665) / RADIUS_M;
        let wanted = 1.0 - 2.0 * beta + REFRACTIVITY_AT_SEA_LEVEL / 2.0;
        assert!((bent / REFRACTIVITY_AT_SEA_LEVEL - wanted).abs() < 3e-5);
    }

    #[test]
    fn a_ray_that_dips_is_level_where_it_says() {
        let ray = Ray::seen_from(10_668.0, -0.03);
        let lowest_m = ray.lowest_m(10_668.0);
        assert!(ray.slant_rad(lowest_m + 1e-6) < 1e-5 && (ray.slant_rad(10_668.0) - 0.03).abs() < 1e-9);
        // bent towards the Earth it comes lower than the straight line, r cos 0.03
        assert!(lowest_m < (RADIUS_M + 10_668.0) * 0.03_f64.cos() - RADIUS_M);
    }
}
