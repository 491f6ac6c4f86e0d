//! The first backdraft screen: is there more unburned fuel in the gas than air can make harmless?

use super::Exceeded;
use super::design_fire::DesignFire;
use super::oxygen::{self, ShutBurn, ShutRoom};

/// Heat of combustion per mass of layer gas from which a mixture with air can carry a flame, kJ/kg: low end.
///
/// Source: [`CRITICAL_FUEL_FRACTION`](crate::fire::sources::CRITICAL_FUEL_FRACTION).
pub const THRESHOLD_LOW_KJ_KG: f64 = 3000.0;
/// High end of the same.
pub const THRESHOLD_HIGH_KJ_KG: f64 = 3900.0;

/// Fuel that turns to gas after the flame is out, as a share of what had turned to gas until then.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct AftergasShare {
    /// Least.
    pub low: f64,
    /// Usual.
    pub typical: f64,
    /// Most: decides the outcome.
    pub high: f64,
}

impl AftergasShare {
    /// Linings that do not burn.
    pub const NONCOMBUSTIBLE_LINING: Self = Self { low: 0.1, typical: 0.4, high: 1.0 };
    /// Linings that gasify too.
    pub const COMBUSTIBLE_LINING: Self = Self { low: 0.2, typical: 0.8, high: 2.0 };
}

/// What [`screen`] looks at.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ExcessInput<'a> {
    /// The fire with all the air it wants; its energy is the fuel of the room.
    pub fire: DesignFire,
    /// The shut room.
    pub room: ShutRoom<'a>,
    /// Fuel that turns to gas after the flame is out.
    pub aftergas: AftergasShare,
    /// When to stop looking, s.
    pub horizon_s: f64,
}

/// What the screen may answer: it never says that there is a backdraft, nor that there is none.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Outcome {
    /// Even the most of the unburned gas stays below the low threshold.
    NotIndicated,
    /// It does not.
    CannotBeExcluded,
}

/// The answer of [`screen`].
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ExcessFuel {
    /// Unburned heat of combustion per mass of layer gas, least, kJ/kg.
    pub low_kj_kg: f64,
    /// Usual.
    pub typical_kj_kg: f64,
    /// Most.
    pub high_kj_kg: f64,
    /// Threshold at the layer temperature then, kJ/kg.
    pub threshold_kj_kg: f64,
    /// Gas then, K.
    pub layer_temperature_k: f64,
    /// How the fire ended.
    pub burn: ShutBurn,
    /// The outcome.
    pub outcome: Outcome,
}

/// Threshold at a layer temperature, kJ/kg.
#[must_use]
pub fn threshold_kj_kg(layer_temperature_k: f64) -> f64 {
    const REFERENCE_K: f64 = 600.0;
    const SLOPE_KJ_KG_K: f64 = 3.0;

    (THRESHOLD_LOW_KJ_KG - SLOPE_KJ_KG_K * (layer_temperature_k - REFERENCE_K).max(0.0)).max(1000.0)
}

/// Placeholder text; see below.
#[must_use]
pub fn screen(input: &ExcessInput<'_>) -> ExcessFuel {
    let burn = oxygen::burn_shut(&input.fire, &input.room, input.horizon_s);
    let state = burn.state;
    let left_kj = (input.fire.energy_kj - state.gasified_kj).max(0.0);
    let after = |share: f64| {
        let after_kj = if burn.starved { (share * state.gasified_kj).min(left_kj) } else { 0.0 };
        state.unburned_kj_kg + after_kj / state.gas_mass_kg
    };
    let threshold_kj_kg = threshold_kj_kg(state.temperature_k);
    let high_kj_kg = after(input.aftergas.high);
    ExcessFuel {
        low_kj_kg: after(input.aftergas.low),
        typical_kj_kg: after(input.aftergas.typical),
        high_kj_kg,
        threshold_kj_kg,
        layer_temperature_k: state.temperature_k,
        burn,
        outcome: if high_kj_kg < threshold_kj_kg { Outcome::NotIndicated } else { Outcome::CannotBeExcluded },
    }
}

/// What a room exceeds of the range of [`screen`].
#[must_use]
pub fn screen_limits(room: &ShutRoom<'_>, layer_temperature_k: f64) -> Exceeded {
    oxygen::burn_shut_limits(room).when(
        layer_temperature_k > 900.0,
        "layer above some 900 K: the gas would take fire in the opening rather than mix first",
    )
}
