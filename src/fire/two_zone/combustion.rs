//! What burns, and what comes of it.

use super::gas::{
    CARBON_DIOXIDE, CARBON_MONOXIDE, HYDROGEN_CYANIDE, OXYGEN, PRODUCTS, SOOT, WATER, elements, fuel_elements,
};
use super::network::Fuel;
use super::real::Real;

/// What one kilogram of burnt fuel uses and makes, kg; oxygen is negative. Balanced by elements.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Products {
    /// Per species.
    pub made: [f64; PRODUCTS],
}

impl Products {
    /// Oxygen used, kg per kg of fuel.
    pub(super) fn oxygen(&self) -> f64 {
        -self.made[OXYGEN]
    }
}

/// Carbon monoxide of a starved fire, kg per kg of fuel, by Gottuk and Lattimer's fit to fires under hoods and
/// in rooms.
///
/// ```text
/// gas below 800 K   y = 0.19/180 atan(10 (φ - 0.80)) + 0.095
/// gas above 900 K   y = 0.22/180 atan(10 (φ - 1.25)) + 0.110      atan in degrees
/// ```
///
/// Source: [`GOTTUK_LATTIMER`](crate::fire::sources::GOTTUK_LATTIMER), from memory.
pub(super) fn carbon_monoxide_yield(equivalence_ratio: f64, layer_temperature_k: f64) -> f64 {
    let arc = |at: f64| (10.0 * (equivalence_ratio - at)).atan().to_degrees() / 180.0;
    let cold = 0.19 * arc(0.80) + 0.095;
    let hot = 0.22 * arc(1.25) + 0.110;
    let share = layer_temperature_k.smooth_step(800.0, 900.0);
    cold + (hot - cold) * share
}

/// What a fuel makes at a ratio of fuel to oxygen against the chemical need.
pub(super) fn products(fuel: &Fuel, equivalence_ratio: f64, layer_temperature_k: f64) -> Products {
    let starved = equivalence_ratio.smooth_step(0.5, 1.5);
    let [fuel_c, fuel_h, fuel_o, _] = fuel_elements(fuel);
    let co = elements(CARBON_MONOXIDE);
    let hcn_elements = elements(HYDROGEN_CYANIDE);

    // No product may hold more of an element than the fuel has.
    let hcn = (fuel.hydrogen_cyanide_yield * starved).min(0.99 * fuel.nitrogen / hcn_elements[3]);
    let soot = fuel.soot_yield.min(0.5 * fuel_c);
    let carbon_left = (fuel_c - soot - hcn * hcn_elements[0]).max(0.0);
    let monoxide = fuel
        .carbon_monoxide_yield
        .max(carbon_monoxide_yield(equivalence_ratio, layer_temperature_k))
        .min(0.8 * carbon_left / co[0]);
    let dioxide = (carbon_left - monoxide * co[0]) / elements(CARBON_DIOXIDE)[0];
    let water = (fuel_h - hcn * hcn_elements[1]).max(0.0) / elements(WATER)[1];
    let oxygen =
        dioxide * elements(CARBON_DIOXIDE)[2] + monoxide * co[2] + water * elements(WATER)[2] - fuel_o;

    let mut made = [0.0; PRODUCTS];
    made[OXYGEN] = -oxygen.max(1e-3);
    made[CARBON_DIOXIDE] = dioxide;
    made[WATER] = water;
    made[CARBON_MONOXIDE] = monoxide;
    made[HYDROGEN_CYANIDE] = hcn;
    made[SOOT] = soot;
    Products { made }
}

/// Oxygen that a fuel wants with all the air it can have, kg/kg.
pub(super) fn oxygen_need(fuel: &Fuel) -> f64 {
    products(fuel, 0.0, 300.0).oxygen()
}

/// The smaller of two rates, rounded where they meet: `a/(1 + (a/b)⁴)^(1/4)`.
#[inline]
pub(super) fn smooth_min<R: Real>(a: R, b: R) -> R {
    let (small, large) = if a.value() <= b.value() { (a, b) } else { (b, a) };
    if small.value() <= 0.0 {
        return R::constant(0.0);
    }
    let ratio = (small / large).squared().squared();
    small / (ratio + 1.0).sqrt().sqrt()
}

/// Share of a flame that burns on in gas of this oxygen and temperature: 1 well above the limit, 0 well below.
///
/// The limit falls as the gas gets warmer, so that the flame keeps its least temperature:
/// `Y(T) = Y₀ (T_f - T)/(T_f - 293)` as [`extinction_mass_fraction`](crate::fire::oxygen::extinction_mass_fraction);
/// the share rises smoothly over [`FLAME_BAND`] about it.
#[inline]
pub(super) fn flame_share<R: Real>(oxygen: R, temperature_k: R) -> R {
    let room =
        ((-temperature_k + FLAME_LEAST_K) * (1.0 / (FLAME_LEAST_K - 293.0))).at_least(0.0).at_most(1.0);
    let limit = room * OXYGEN_LIMIT;
    // With a hot enough gas there is no limit; the band then shrinks with it.
    let band = room * FLAME_BAND + 1e-3;
    ((oxygen - limit) / band + 0.5).smooth_step(0.0, 1.0)
}

/// Oxygen at which a flame in cold surroundings goes out, kg/kg.
pub(super) const OXYGEN_LIMIT: f64 = 0.135;
/// Least temperature of a flame, K.
pub(super) const FLAME_LEAST_K: f64 = 1700.0;
/// Width over which a flame weakens, kg/kg.
pub(super) const FLAME_BAND: f64 = 0.06;

/// Does unburned gas light where it meets air? 0 below 700 K, 1 above 900 K.
#[inline]
pub(super) fn lights<R: Real>(temperature_k: R) -> R {
    temperature_k.smooth_step(700.0, 900.0)
}
