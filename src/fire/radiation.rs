//! Heat by radiation: from a flame to what stands near, from the layer to the floor.

use super::Exceeded;
use super::constants::STEFAN_BOLTZMANN_KW_M2K4;

/// Flux at a distance from a flame taken as a point, in kW/m².
///
/// ```text
/// q = χ_r Q / (4 π r²)
/// ```
///
/// | symbol | argument             | unit |
/// |--------|----------------------|------|
/// | `Q`    | `heat_release_kw`    | kW   |
/// | `χ_r`  | `radiative_fraction` | -    |
/// | `r`    | `distance_m`         | m    |
///
/// Range: see [`point_source_limits`].
///
/// Source: [`MODAK_1977`](crate::fire::sources::MODAK_1977).
///
/// ```
/// use sootline::fire::radiation::point_source_kw_m2;
///
/// // By hand: 0.35 · 1000 / (4π · 2²) = 6.963 kW/m².
/// assert!((point_source_kw_m2(1000.0, 0.35, 2.0) - 6.963).abs() < 0.001);
/// ```
#[must_use]
pub fn point_source_kw_m2(heat_release_kw: f64, radiative_fraction: f64, distance_m: f64) -> f64 {
    radiative_fraction * heat_release_kw.max(0.0) / (4.0 * std::f64::consts::PI * distance_m * distance_m)
}

/// Heat release that gives a flux at a distance, in kW: [`point_source_kw_m2`] turned round.
#[must_use]
pub fn point_source_heat_release_kw(flux_kw_m2: f64, radiative_fraction: f64, distance_m: f64) -> f64 {
    4.0 * std::f64::consts::PI * distance_m * distance_m * flux_kw_m2 / radiative_fraction
}

/// What a place exceeds of the range of [`point_source_kw_m2`]: further than about two and a half radii of the
/// fire from its middle; nearer, the flame is no point and the flux is overstated or understated by half.
#[must_use]
pub fn point_source_limits(distance_m: f64, fire_diameter_m: f64) -> Exceeded {
    Exceeded::none().when(
        distance_m < 1.25 * fire_diameter_m,
        "nearer than two and a half radii of the fire, where the flame is no point",
    )
}

/// A hot layer above a surface.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct HotLayer {
    /// Gas, K.
    pub temperature_k: f64,
    /// Emissivity: 1 for thick smoke.
    pub emissivity: f64,
    /// Share of the sky of the surface that the layer fills.
    pub view_factor: f64,
    /// The surface, K.
    pub surface_temperature_k: f64,
}

/// Net flux from a hot layer to a surface below, in kW/m².
///
/// ```text
/// q = F ε σ (T_g⁴ - T_s⁴)
/// ```
///
/// | symbol | field                   | unit |
/// |--------|-------------------------|------|
/// | `T_g`  | `temperature_k`         | K    |
/// | `T_s`  | `surface_temperature_k` | K    |
/// | `ε`    | `emissivity`            | -    |
/// | `F`    | `view_factor`           | -    |
///
/// Without the part of the hot ceiling and walls that shows through thin smoke. Range: grey gas, black floor.
///
/// Source: [`STEFAN_BOLTZMANN_LAW`](crate::fire::sources::STEFAN_BOLTZMANN_LAW).
///
/// ```
/// use sootline::fire::radiation::{HotLayer, layer_flux_kw_m2};
///
/// // Published (Korean qualification question): ε 0.7, 400 °C against 250 °C, 5172.66 W/m² with 0 °C = 273 K.
/// let layer = HotLayer { temperature_k: 673.0, emissivity: 0.7, view_factor: 1.0, surface_temperature_k: 523.0 };
/// assert!((layer_flux_kw_m2(layer) - 5.17266).abs() < 0.002);
/// ```
#[must_use]
pub fn layer_flux_kw_m2(layer: HotLayer) -> f64 {
    layer.view_factor
        * layer.emissivity
        * STEFAN_BOLTZMANN_KW_M2K4
        * (layer.temperature_k.powi(4) - layer.surface_temperature_k.powi(4))
}

/// Temperature of the layer that gives a flux, in K: [`layer_flux_kw_m2`] turned round. The temperature of
/// the layer handed in is not used.
///
/// ```
/// use sootline::fire::radiation::{HotLayer, layer_temperature_for_flux_k};
///
/// // By hand: black layer filling the sky: (20/5.6704e-11 + 293.15⁴)^(1/4) = (3.527e11 + 7.385e9)^(1/4) = 774.6 K (501 °C).
/// let layer = HotLayer { temperature_k: 0.0, emissivity: 1.0, view_factor: 1.0, surface_temperature_k: 293.15 };
/// assert!((layer_temperature_for_flux_k(layer, 20.0) - 774.6).abs() < 0.2);
/// ```
#[must_use]
pub fn layer_temperature_for_flux_k(layer: HotLayer, flux_kw_m2: f64) -> f64 {
    let seen = layer.view_factor * layer.emissivity * STEFAN_BOLTZMANN_KW_M2K4;
    (flux_kw_m2 / seen + layer.surface_temperature_k.powi(4)).sqrt().sqrt()
}

/// Share of the sky that a rectangle overhead fills, seen from the point below its middle.
///
/// ```text
/// F = (2/π) [ X/√(1+X²) atan( Y/√(1+X²) ) + Y/√(1+Y²) atan( X/√(1+Y²) ) ]
/// X = a/(2h)    Y = b/(2h)
/// ```
///
/// | symbol  | argument                | unit |
/// |---------|-------------------------|------|
/// | `a`,`b` | `length_m`, `width_m`   | m    |
/// | `h`     | `distance_m`            | m    |
///
/// Source: [`CONFIGURATION_FACTORS`](crate::fire::sources::CONFIGURATION_FACTORS): four times the factor of a quarter.
///
/// ```
/// use sootline::fire::radiation::overhead_view_factor;
///
/// // By hand: 2 × 2 m at 1 m: X = Y = 1: (2/π) · 2 · 0.70711 · atan(0.70711) = 0.5541.
/// assert!((overhead_view_factor(2.0, 2.0, 1.0) - 0.5541).abs() < 1e-4);
/// ```
#[must_use]
pub fn overhead_view_factor(length_m: f64, width_m: f64, distance_m: f64) -> f64 {
    if distance_m <= 0.0 {
        return 1.0;
    }
    let x = 0.5 * length_m / distance_m;
    let y = 0.5 * width_m / distance_m;
    let half = |a: f64, b: f64| {
        let root = (1.0 + a * a).sqrt();
        a / root * (b / root).atan()
    };
    2.0 / std::f64::consts::PI * (half(x, y) + half(y, x))
}
