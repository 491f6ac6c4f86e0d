//! Cracks of a shut room: their area, the pressure they let build up, the gas they let through.

use super::Exceeded;
use super::constants::{AIR_SPECIFIC_HEAT_KJ_KGK, GRAVITY_M_S2, air_density_kg_m3};

/// Discharge coefficient of cracks. Source: [`KLOTE_MILKE`](crate::fire::sources::KLOTE_MILKE).
pub const CRACK_DISCHARGE_COEFFICIENT: f64 = 0.65;

/// Leakage area of a surface from its ratio, m².
#[must_use]
pub fn surface_area_m2(area_m2: f64, leakage_ratio: f64) -> f64 {
    area_m2 * leakage_ratio
}

/// Volume that the gas of a room grows by each second while a fire heats it, in m³/s.
///
/// ```text
/// V' = Q / (ρ_a c_p T_a)
/// ```
#[must_use]
pub fn expansion_m3_s(net_heat_release_kw: f64, ambient_temperature_k: f64) -> f64 {
    net_heat_release_kw.max(0.0)
        / (air_density_kg_m3(ambient_temperature_k) * AIR_SPECIFIC_HEAT_KJ_KGK * ambient_temperature_k)
}

/// Overpressure of a leaky shut room with a steady fire, in Pa.
///
/// ```text
/// Δp = ( Q / (c_p T_a C_d A) )² / (2 ρ_a)
/// ```
#[must_use]
pub fn quasi_steady_pressure_pa(vent: PressureInput) -> f64 {
    let mass_flow_kg_s = vent.net_heat_release_kw / (AIR_SPECIFIC_HEAT_KJ_KGK * vent.ambient_temperature_k);
    let flux = mass_flow_kg_s / (vent.discharge_coefficient * vent.leakage_area_m2);
    flux * flux / (2.0 * air_density_kg_m3(vent.ambient_temperature_k))
}

/// What [`quasi_steady_pressure_pa`] needs.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PressureInput {
    /// Heat that stays in the gas, kW.
    pub net_heat_release_kw: f64,
    /// Leakage area, m².
    pub leakage_area_m2: f64,
    /// Air at the crack, K.
    pub ambient_temperature_k: f64,
    /// Discharge coefficient: [`CRACK_DISCHARGE_COEFFICIENT`] unless known better.
    pub discharge_coefficient: f64,
}

/// What a pressure exceeds of the range of [`quasi_steady_pressure_pa`].
#[must_use]
pub fn quasi_steady_pressure_limits(pressure_pa: f64) -> Exceeded {
    Exceeded::none().when(
        pressure_pa > 2000.0,
        "above about 2 kPa glass and light doors give way and the room is shut no more",
    )
}

/// A warm room with cracks, half of them low and half of them high.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct LeakyRoom {
    /// Leakage area, m².
    pub leakage_area_m2: f64,
    /// Height between the low and the high cracks, m.
    pub height_m: f64,
    /// Gas in the room, K.
    pub gas_temperature_k: f64,
    /// Air outside, K.
    pub ambient_temperature_k: f64,
}

/// Air drawn in low while hot gas leaves high, through the cracks of a shut room, in kg/s.
///
/// ```text
/// z_n = H / (1 + ρ_a/ρ_g)      m = C_d (A/2) √( 2 ρ_a (ρ_a - ρ_g) g z_n )
/// ```
#[must_use]
pub fn buoyant_exchange_kg_s(room: LeakyRoom) -> f64 {
    if room.gas_temperature_k <= room.ambient_temperature_k {
        return 0.0;
    }
    let outside = air_density_kg_m3(room.ambient_temperature_k);
    let inside = air_density_kg_m3(room.gas_temperature_k);
    let neutral_plane_m = room.height_m / (1.0 + outside / inside);
    CRACK_DISCHARGE_COEFFICIENT
        * 0.5
        * room.leakage_area_m2
        * (2.0 * outside * (outside - inside) * GRAVITY_M_S2 * neutral_plane_m).sqrt()
}
