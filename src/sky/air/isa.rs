//! The ICAO standard atmosphere: temperature, pressure and density from −5 km to 80 km.
//!
//! Dry air at rest. Knows neither weather nor season.

use crate::units::Metres;
use std::sync::LazyLock;

/// Standard acceleration of free fall in m/s² (Doc 7488/3).
const G0_M_S2: f64 = 9.80665;
/// Specific gas constant of air in J/(kg K) (Doc 7488/3).
const GAS_J_KG_K: f64 = 287.05287;
/// Nominal Earth radius in metres, which turns geometric into geopotential height (Doc 7488/3).
const NOMINAL_RADIUS_M: f64 = 6_356_766.0;
/// Pressure at sea level in Pa (Doc 7488/3).
const P0_PA: f64 = 101_325.0;
/// Density at sea level in kg/m³ (Doc 7488/3).
pub(super) const RHO0_KG_M3: f64 = 1.225;
/// The lowest height that the standard is defined for, geopotential.
const FLOOR_M: f64 = -5_000.0;
/// Where the standard's tables end, geopotential.
const CEILING_M: f64 = 80_000.0;
/// Base height (geopotential metres), base temperature (K) and gradient (K/m) of each layer (Doc 7488/3).
const LAYERS: [(f64, f64, f64); 7] = [
    (0.0, 288.15, -0.0065),
    (11_000.0, 216.65, 0.0),
    (20_000.0, 216.65, 0.001),
    (32_000.0, 228.65, 0.0028),
    (47_000.0, 270.65, 0.0),
    (51_000.0, 270.65, -0.0028),
    (71_000.0, 214.65, -0.002),
];
/// The geometric height of the tropopause.
pub(crate) const TROPOPAUSE_M: f64 = geometric_m(LAYERS[1].0);

/// The state of the air at a height.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Air {
    /// Pressure in hectopascals.
    pub pressure_hpa: f64,
    /// Temperature in kelvins.
    pub temperature_k: f64,
    /// Density in kilograms per cubic metre.
    pub density_kg_m3: f64,
}

/// The standard atmosphere at a geometric height above mean sea level; beyond −5 km or 80 km (geopotential) that of
/// the nearer end.
///
/// # Accuracy
/// Within 1e−5 of the printed values at the layers' bases.
///
/// # Source
/// ICAO Doc 7488/3, *Manual of the ICAO Standard Atmosphere extended to 80 kilometres*, 3rd ed. 1993;
/// its constants are those that later copies print (the manual itself was not opened).
pub fn standard_air(height: Metres) -> Air {
    let geopotential_m = geopotential_m(height.0).clamp(FLOOR_M, CEILING_M);
    let layer = BUILT.iter().rev().find(|layer| geopotential_m >= layer.base_m).unwrap_or(&BUILT[0]);
    let temperature_k = layer.temperature_k(geopotential_m);
    let pressure_pa = layer.pressure_pa(geopotential_m);
    Air {
        pressure_hpa: pressure_pa / 100.0,
        temperature_k,
        density_kg_m3: pressure_pa / (GAS_J_KG_K * temperature_k),
    }
}

/// One layer of linear temperature.
#[derive(Debug, Clone, Copy)]
pub(super) struct Layer {
    base_m: f64,
    base_k: f64,
    k_per_m: f64,
    base_pa: f64,
    /// The layer's geometric range.
    pub(super) from_m: f64,
    pub(super) to_m: f64,
}

static BUILT: LazyLock<[Layer; LAYERS.len()]> = LazyLock::new(build);

/// The layers from the ground up.
pub(super) fn layers() -> &'static [Layer] {
    &*BUILT
}

/// Each layer's base pressure is the pressure at the top of the one below it.
fn build() -> [Layer; LAYERS.len()] {
    let mut base_pa = P0_PA;
    std::array::from_fn(|i| {
        let (base_m, base_k, k_per_m) = LAYERS[i];
        let top_m = LAYERS.get(i + 1).map_or(CEILING_M, |next| next.0);
        let from_m = geometric_m(if i == 0 { FLOOR_M } else { base_m });
        let layer = Layer { base_m, base_k, k_per_m, base_pa, from_m, to_m: geometric_m(top_m) };
        base_pa = layer.pressure_pa(top_m);
        layer
    })
}

impl Layer {
    fn temperature_k(&self, geopotential_m: f64) -> f64 {
        self.base_k + self.k_per_m * (geopotential_m - self.base_m)
    }

    fn pressure_pa(&self, geopotential_m: f64) -> f64 {
        let rise_m = geopotential_m - self.base_m;
        if self.k_per_m == 0.0 {
            return self.base_pa * (-G0_M_S2 * rise_m / (GAS_J_KG_K * self.base_k)).exp();
        }
        let ratio = 1.0 + self.k_per_m * rise_m / self.base_k;
        self.base_pa * ratio.powf(-G0_M_S2 / (GAS_J_KG_K * self.k_per_m))
    }

    /// Density in kg/m³ and its change per metre of geometric height.
    pub(super) fn density_and_slope(&self, height_m: f64) -> (f64, f64) {
        let geopotential_m = geopotential_m(height_m);
        let temperature_k = self.temperature_k(geopotential_m);
        let density = self.pressure_pa(geopotential_m) / (GAS_J_KG_K * temperature_k);
        let shrink = NOMINAL_RADIUS_M / (NOMINAL_RADIUS_M + height_m);
        let slope = -density * (G0_M_S2 / GAS_J_KG_K + self.k_per_m) / temperature_k;
        (density, slope * shrink * shrink)
    }
}

const fn geopotential_m(height_m: f64) -> f64 {
    NOMINAL_RADIUS_M * height_m / (NOMINAL_RADIUS_M + height_m)
}

/// The geometric height of a geopotential one.
pub(crate) const fn geometric_m(geopotential_m: f64) -> f64 {
    NOMINAL_RADIUS_M * geopotential_m / (NOMINAL_RADIUS_M - geopotential_m)
}

#[cfg(test)]
mod tests {
    use super::{geometric_m, layers, standard_air};
    use crate::units::Metres;

    #[test]
    fn the_air_is_that_of_the_printed_tables() {
        // base values of the U.S. Standard Atmosphere 1976, the same but for a gas constant 7e−7 larger, which has grown
        // to 8e−6 of the pressure at the top: geopotential metres, K, hPa, kg/m³
        for (at_m, k, hpa, density) in [
            (0.0, 288.15, 1013.25, 1.2250),
            (5_000.0, 255.65, 540.199, 0.736116),
            (11_000.0, 216.65, 226.3206, 0.363918),
            (20_000.0, 216.65, 54.74889, 0.0880349),
            (32_000.0, 228.65, 8.680187, 0.0132250),
            (47_000.0, 270.65, 1.109063, 0.00142753),
            (71_000.0, 214.65, 0.03956420, 6.42110e-5),
        ] {
            let air = standard_air(Metres(geometric_m(at_m)));
            assert!((air.temperature_k - k).abs() < 1e-9, "{at_m}: {air:?}");
            assert!((air.pressure_hpa / hpa - 1.0).abs() < 1e-5, "{at_m}: {air:?}");
            assert!((air.density_kg_m3 / density - 1.0).abs() < 1e-5, "{at_m}: {air:?}");
        }
    }

    #[test]
    fn layers_join_and_slopes_are_those_of_the_density() {
        for pair in layers().windows(2) {
            let at = pair[0].to_m;
            let (below, above) = (pair[0].density_and_slope(at).0, pair[1].density_and_slope(at).0);
            assert!((below / above - 1.0).abs() < 1e-12);
        }
        for layer in layers() {
            let at = f64::midpoint(layer.from_m, layer.to_m);
            let (density, slope) = layer.density_and_slope(at);
            let by_difference =
                (layer.density_and_slope(at + 1.0).0 - layer.density_and_slope(at - 1.0).0) / 2.0;
            assert!((slope - by_difference).abs() < 1e-7 * density);
        }
    }
}
