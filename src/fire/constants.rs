//! Constants of nature and of air, once.
//!
//! Coefficients of a correlation are not here: they stand in its function, as printed in its source.

/// Acceleration of gravity, m/s². Defined (standard gravity).
pub const GRAVITY_M_S2: f64 = 9.806_65;

/// Stefan-Boltzmann constant, kW/(m² K⁴). Derived from defined constants.
pub const STEFAN_BOLTZMANN_KW_M2K4: f64 = 5.670_374_419e-11;

/// Ice point, K. Defined.
pub const ICE_POINT_K: f64 = 273.15;

/// Ambient temperature that the correlations were printed for, 20 °C. Common practice.
pub const AMBIENT_K: f64 = 293.15;

/// Specific heat of air at constant pressure, kJ/(kg K), at 20 °C. Measured.
pub const AIR_SPECIFIC_HEAT_KJ_KGK: f64 = 1.005;

/// Density × temperature of air at 101 325 Pa, kg K/m³: `ρ = 353/T`. Measured, as ISO 16737 prints it.
pub const AIR_DENSITY_TIMES_TEMPERATURE_KG_K_M3: f64 = 353.0;

/// Mass fraction of oxygen in dry air. Measured.
pub const OXYGEN_IN_AIR_MASS_FRACTION: f64 = 0.2315;

/// Mole fraction of oxygen in dry air. Measured.
pub const OXYGEN_IN_AIR_MOLE_FRACTION: f64 = 0.2095;

/// Heat released per kg of oxygen used, kJ/kg, ± 5 % over common fuels. Measured.
///
/// Source: [`HUGGETT_1980`](crate::fire::sources::HUGGETT_1980).
pub const HEAT_PER_OXYGEN_KJ_KG: f64 = 13_100.0;

/// Heat released per kg of air used up, kJ/kg: 13 100 × 0.2315, rounded as the trade does. Derived.
pub const HEAT_PER_AIR_KJ_KG: f64 = 3_000.0;

/// Density of air at one atmosphere, kg/m³.
///
/// ```
/// use sootline::fire::constants::air_density_kg_m3;
///
/// // By hand: 353 / 293.15 = 1.2042.
/// assert!((air_density_kg_m3(293.15) - 1.2042).abs() < 1e-4);
/// ```
#[must_use]
pub fn air_density_kg_m3(temperature_k: f64) -> f64 {
    AIR_DENSITY_TIMES_TEMPERATURE_KG_K_M3 / temperature_k
}
