//! The first backdraft screen: can the gas of a shut room hold so much unburned fuel that it burns when air comes in?
//!
//! It answers *not indicated* or *cannot be excluded*, nothing else. Whether a backdraft follows needs the mixing, the ignition
//! and the confinement, which no closed form gives.

use super::Exceeded;
use super::design_fire::DesignFire;
use super::oxygen::{self, ShutBurn, ShutRoom};

/// Heat of combustion per mass of layer gas from which some mixture with air burns at 1700 K or more, for gas of 600 K: low end, kJ/kg.
///
/// Methane 0.10 and diesel 0.16 by mass, the published thresholds, are 5.0 and 6.8 MJ/kg: the computed value is the more
/// cautious.
///
/// Source: [`CRITICAL_FUEL_FRACTION`](crate::fire::sources::CRITICAL_FUEL_FRACTION).
pub const THRESHOLD_LOW_KJ_KG: f64 = 3000.0;
/// High end of the same.
pub const THRESHOLD_HIGH_KJ_KG: f64 = 3900.0;

/// Fuel that turns to gas after the flame is out, from the heat in fuel and lining, as a share of what had turned to gas until then.
///
/// Where the share comes from: no published value was found; this is our judgement from an energy argument. Nearly all heat
/// released in a shut room sits in lining, fuel and gas when the flame dies. A kilogram of furniture fuel takes 2 to 3 MJ to
/// gasify and holds 15 to 25 MJ, so a seventh to a tenth of that heat, radiated back, gasifies as much again as was burnt. We
/// take 1 % (low), 6 % (typical) and 18 % (high) coming back: shares of 0.1, 0.5 and 1.5. Combustible linings gasify too and
/// count double; that they promote backdraft is published in words only ([`BENGTSSON_2001`](crate::fire::sources::BENGTSSON_2001)).
/// Honest doubt: a leak-fed smoulder over an hour can gasify more; fuel that only chars gasifies less.
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
    pub const NONCOMBUSTIBLE_LINING: Self = Self {
        low: 0.1,
        typical: 0.5,
        high: 1.5,
    };
    /// Linings that gasify too.
    pub const COMBUSTIBLE_LINING: Self = Self {
        low: 0.2,
        typical: 1.0,
        high: 3.0,
    };
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

/// Threshold for gas of a temperature, in kJ/kg.
///
/// ```text
/// e_crit = 3000 - 3 (T - 600)     T > 600 K, not below 1000
/// e_crit = 3000                   else
/// ```
///
/// Hotter gas needs less fuel: the critical fractions computed at 450 K and 600 K for seven gases fall by 2.7 to 3.7 kJ/kg per
/// kelvin. Colder gas would need more; that credit is not taken.
///
/// Source: [`CRITICAL_FUEL_FRACTION`](crate::fire::sources::CRITICAL_FUEL_FRACTION).
///
/// ```
/// use sootline::fire::excess_fuel::threshold_kj_kg;
///
/// assert_eq!(threshold_kj_kg(500.0), 3000.0);
/// assert_eq!(threshold_kj_kg(700.0), 2700.0); // by hand: 3000 - 3·100
/// ```
#[must_use]
pub fn threshold_kj_kg(layer_temperature_k: f64) -> f64 {
    const REFERENCE_K: f64 = 600.0;
    const SLOPE_KJ_KG_K: f64 = 3.0;

    (THRESHOLD_LOW_KJ_KG - SLOPE_KJ_KG_K * (layer_temperature_k - REFERENCE_K).max(0.0)).max(1000.0)
}

/// Can the gas of this shut room hold fuel enough for a backdraft?
///
/// ```text
/// e = unburned when the flame dies + min( share × gasified, fuel left ) / m
/// not indicated  if e with the high share < e_crit(T)
/// ```
///
/// | symbol     | from                                                                  | unit  |
/// |------------|-----------------------------------------------------------------------|-------|
/// | unburned   | [`burn_shut`](super::oxygen::burn_shut): heat of combustion gasified beyond the oxygen used | kJ/kg |
/// | gasified   | the same, until the flame dies                                        | kJ    |
/// | share      | [`AftergasShare`]                                                     | -     |
/// | `m`, `T`   | gas left in the room when the flame dies, and its temperature         | kg, K |
/// | `e_crit`   | [`threshold_kj_kg`]                                                   | kJ/kg |
///
/// Solid fuel left on the floor does not count, only what turns to gas; but no more turns to gas than is left. Where the flame never
/// dies of lack of oxygen nothing gasifies afterwards.
///
/// Range: see [`screen_limits`]. Leakage decides, and is seldom known: look at both ends of its class.
///
/// Sources: [`CRITICAL_FUEL_FRACTION`](crate::fire::sources::CRITICAL_FUEL_FRACTION),
/// [`FLEISCHMANN_1994`](crate::fire::sources::FLEISCHMANN_1994), [`GOTTUK_1999`](crate::fire::sources::GOTTUK_1999).
///
/// ```
/// use sootline::fire::DesignFire;
/// use sootline::fire::excess_fuel::{AftergasShare, ExcessInput, Outcome, screen};
/// use sootline::fire::oxygen::{LimitingOxygen, ShutRoom};
///
/// // A waste basket in a hall: by hand 602 kg of air could burn 640 MJ down to the limit; 20 MJ never starve.
/// let basket = ExcessInput {
///     fire: DesignFire { growth_kw_s2: 0.0117, peak_kw: 300.0, energy_kj: 20_000.0, decay_from_share: 0.7 },
///     room: ShutRoom { volume_m3: 500.0, height_m: 4.0, leakage_area_m2: 0.1, surfaces: &[],
///                      ambient_temperature_k: 293.15, limit: LimitingOxygen::TYPICAL },
///     aftergas: AftergasShare::NONCOMBUSTIBLE_LINING,
///     horizon_s: 7200.0,
/// };
/// assert_eq!(screen(&basket).outcome, Outcome::NotIndicated);
/// ```
#[must_use]
pub fn screen(input: &ExcessInput<'_>) -> ExcessFuel {
    let burn = oxygen::burn_shut(&input.fire, &input.room, input.horizon_s);
    let state = burn.state;
    let left_kj = (input.fire.energy_kj - state.gasified_kj).max(0.0);
    let after = |share: f64| {
        let after_kj = if burn.starved {
            (share * state.gasified_kj).min(left_kj)
        } else {
            0.0
        };
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
        outcome: if high_kj_kg < threshold_kj_kg {
            Outcome::NotIndicated
        } else {
            Outcome::CannotBeExcluded
        },
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
