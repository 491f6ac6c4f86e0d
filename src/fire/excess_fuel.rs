//! The first backdraft screen: can the gas of a shut room hold so much unburned fuel that it burns
//! when air comes in?
//!
//! It answers *not indicated* or *cannot be excluded*, nothing else. Whether a backdraft follows
//! needs the mixing, the ignition and the confinement, which no closed form gives.

use super::Exceeded;
use super::design_fire::DesignFire;
use super::oxygen::{self, ShutBurn, ShutRoom};

/// Heat of combustion per mass of layer gas from which some mixture with air burns at 1700 K or
/// more, for gas of 600 K: low end, kJ/kg.
///
/// Methane 0.10 and diesel 0.16 by mass, the published thresholds, are 5.0 and 6.8 MJ/kg: the
/// computed value is the more cautious.
///
/// Source: [`CRITICAL_FUEL_FRACTION`](crate::fire::sources::CRITICAL_FUEL_FRACTION).
pub const THRESHOLD_LOW_KJ_KG: f64 = 3000.0;
/// High end of the same.
pub const THRESHOLD_HIGH_KJ_KG: f64 = 3900.0;

/// Fuel that turns to gas after the flame is out, from the heat in fuel and lining, as a share of
/// what had turned to gas until then.
///
/// Where the share comes from: no published value was found; this is our judgement from an energy
/// argument. Nearly all heat released in a shut room sits in lining, fuel and gas when the flame
/// dies. A kilogram of furniture fuel takes 2 to 3 MJ to gasify and holds 15 to 25 MJ, so a seventh
/// to a tenth of that heat, radiated back, gasifies as much again as was burnt. We take 1 % (low),
/// 6 % (typical) and 18 % (high) coming back: shares of 0.1, 0.5 and 1.5. Combustible linings
/// gasify too and count double; that they promote backdraft is published in words only
/// ([`BENGTSSON_2001`](crate::fire::sources::BENGTSSON_2001)). Honest doubt: a leak-fed smoulder
/// over an hour can gasify more; fuel that only chars gasifies less.
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
    pub const NONCOMBUSTIBLE_LINING: Self = Self { low: 0.1, typical: 0.5, high: 1.5 };
    /// Linings that gasify too.
    pub const COMBUSTIBLE_LINING: Self = Self { low: 0.2, typical: 1.0, high: 3.0 };
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
    /// Heat of combustion of the fuel gas, kJ/kg: the gas is itself part of the layer.
    pub heat_of_combustion_kj_kg: f64,
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
/// Hotter gas needs less fuel: the critical fractions computed at 450 K and 600 K for seven gases
/// fall by 2.7 to 3.7 kJ/kg per kelvin. Colder gas would need more; that credit is not taken.
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
/// e' = unburned when the flame dies + min( share × gasified, fuel left ) / m
/// e  = e' / ( 1 + e' / ΔH_c )
/// not indicated  if e with the high share < e_crit(T)
/// ```
///
/// | symbol     | from                                                                  | unit  |
/// |------------|-----------------------------------------------------------------------|-------|
/// | unburned   | [`burn_shut`](super::oxygen::burn_shut): heat of combustion gasified beyond the oxygen used | kJ/kg |
/// | gasified   | the same, until the flame dies                                        | kJ    |
/// | share      | [`AftergasShare`]                                                     | -     |
/// | `m`, `T`   | gas left in the room when the flame dies, and its temperature         | kg, K |
/// | `ΔH_c`     | `heat_of_combustion_kj_kg`: the fuel gas adds its own mass to the layer | kJ/kg |
/// | `e_crit`   | [`threshold_kj_kg`]                                                   | kJ/kg |
///
/// Solid fuel left on the floor does not count, only what turns to gas; but no more turns to gas
/// than is left. Where the flame never dies of lack of oxygen nothing gasifies afterwards.
///
/// Range: see [`screen_limits`]. Leakage decides, and is seldom known: look at both ends of its class.
///
/// Sources: [`CRITICAL_FUEL_FRACTION`](crate::fire::sources::CRITICAL_FUEL_FRACTION),
/// [`FLEISCHMANN_1994`](crate::fire::sources::FLEISCHMANN_1994),
/// [`GOTTUK_1999`](crate::fire::sources::GOTTUK_1999).
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
///     heat_of_combustion_kj_kg: 17_500.0,
/// };
/// assert_eq!(screen(&basket).outcome, Outcome::NotIndicated);
/// ```
#[must_use]
pub fn screen(input: &ExcessInput<'_>) -> ExcessFuel {
    let burn = oxygen::burn_shut(&input.fire, &input.room, input.horizon_s);
    let state = burn.state;
    let left_kj = (input.fire.energy_kj - state.gasified_kj).max(0.0);
    let after = |share: f64| {
        let after_kj = if burn.starved { (share * state.gasified_kj).min(left_kj) } else { 0.0 };
        of_layer_kj_kg(state.unburned_kj_kg + after_kj / state.gas_mass_kg, input.heat_of_combustion_kj_kg)
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

/// Heat of combustion per mass of layer gas and fuel gas together, from that per mass of the other gas alone.
fn of_layer_kj_kg(of_other_gas_kj_kg: f64, heat_of_combustion_kj_kg: f64) -> f64 {
    of_other_gas_kj_kg / (1.0 + of_other_gas_kj_kg / heat_of_combustion_kj_kg)
}

/// What a room exceeds of the range of [`screen`].
#[must_use]
pub fn screen_limits(room: &ShutRoom<'_>, layer_temperature_k: f64) -> Exceeded {
    oxygen::burn_shut_limits(room).when(
        layer_temperature_k > 900.0,
        "layer above some 900 K: the gas would take fire in the opening rather than mix first",
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fire::linings::Surface;
    use crate::fire::oxygen::LimitingOxygen;
    use approx::assert_relative_eq;
    use proptest::prelude::*;

    const BOARD: Surface = Surface {
        area_m2: 62.0,
        conductivity_w_mk: 0.17,
        density_kg_m3: 790.0,
        specific_heat_j_kgk: 900.0,
        thickness_m: 0.0159,
    };

    const FIRE: DesignFire =
        DesignFire { growth_kw_s2: 0.0469, peak_kw: 3000.0, energy_kj: 2e6, decay_from_share: 0.7 };

    fn shut(volume_m3: f64, leakage_area_m2: f64) -> ShutRoom<'static> {
        ShutRoom {
            volume_m3,
            height_m: 2.4,
            leakage_area_m2,
            surfaces: &[BOARD],
            ambient_temperature_k: 293.15,
            limit: LimitingOxygen::TYPICAL,
        }
    }

    fn input(fire: DesignFire, room: ShutRoom<'static>) -> ExcessInput<'static> {
        ExcessInput {
            fire,
            room,
            aftergas: AftergasShare::NONCOMBUSTIBLE_LINING,
            horizon_s: 7200.0,
            heat_of_combustion_kj_kg: 17_500.0,
        }
    }

    #[test]
    fn little_fuel_in_a_big_leaky_room_is_not_indicated() {
        let basket =
            DesignFire { growth_kw_s2: 0.0117, peak_kw: 300.0, energy_kj: 30_000.0, decay_from_share: 0.7 };
        let answer = screen(&input(basket, shut(400.0, 0.2)));

        assert_eq!(answer.outcome, Outcome::NotIndicated);
        assert!(!answer.burn.starved);
    }

    #[test]
    fn a_small_shut_room_full_of_fuel_cannot_be_excluded() {
        for growth_kw_s2 in [0.0117, 0.0469, 0.1876] {
            let answer = screen(&input(DesignFire { growth_kw_s2, ..FIRE }, shut(30.0, 0.005)));

            assert_eq!(answer.outcome, Outcome::CannotBeExcluded, "{growth_kw_s2}");
            assert!(answer.burn.starved);
        }
    }

    #[test]
    fn fuel_that_hardly_outlasts_the_oxygen_is_not_indicated() {
        // What is left when the flame dies is all that can turn to gas: 30 m³ of air burn about 35
        // MJ, so 45 MJ leave less than 0.7 MJ per kg.
        let fire = DesignFire { energy_kj: 45_000.0, ..FIRE };
        let answer = screen(&input(fire, shut(30.0, 0.005)));

        assert!(answer.burn.starved);
        assert_eq!(answer.outcome, Outcome::NotIndicated);
        assert!(
            answer.high_kj_kg
                <= answer.burn.state.unburned_kj_kg
                    + (fire.energy_kj - answer.burn.state.gasified_kj) / answer.burn.state.gas_mass_kg
                    + 1e-9
        );
    }

    #[test]
    fn no_layer_holds_more_per_kilogram_than_its_fuel() {
        // By hand: 10 MJ of fuel of 20 MJ/kg is 0.5 kg; with 1 kg of other gas 10/1.5 = 6.667 MJ/kg.
        assert_relative_eq!(of_layer_kj_kg(10_000.0, 20_000.0), 6_666.667, max_relative = 1e-6);
        assert!(of_layer_kj_kg(1e9, 20_000.0) < 20_000.0);
    }

    #[test]
    fn a_lining_that_burns_can_only_make_it_worse() {
        let mineral = screen(&input(FIRE, shut(30.0, 0.005)));
        let timber = screen(&ExcessInput {
            aftergas: AftergasShare::COMBUSTIBLE_LINING,
            ..input(FIRE, shut(30.0, 0.005))
        });

        assert!(timber.low_kj_kg > mineral.low_kj_kg);
        assert!(timber.typical_kj_kg > mineral.typical_kj_kg);
        assert!(timber.high_kj_kg > mineral.high_kj_kg);
    }

    #[test]
    fn the_threshold_is_below_both_published_experiments() {
        // Methane 0.10 by mass at 50.0 MJ/kg (Fleischmann) and diesel 0.16 at about 42.5 MJ/kg
        // (Gottuk): a screen must not stay silent where backdrafts were seen.
        for published_kj_kg in [0.10 * 50_000.0, 0.16 * 42_500.0] {
            assert!(THRESHOLD_HIGH_KJ_KG < published_kj_kg);
        }
    }

    #[test]
    fn the_threshold_falls_above_600_k_as_the_critical_fractions_do() {
        // Critical fractions at 1700 K, computed by equilibrium, at 450 and 600 K times the heat of
        // combustion: methane (0.089 - 0.078)·50.0, propane (0.089 - 0.078)·46.4, ethylene (0.076 -
        // 0.067)·47.2 MJ/kg over 150 K: 3.7, 3.4 and 2.8 kJ/kg per kelvin.
        let slope = (threshold_kj_kg(600.0) - threshold_kj_kg(700.0)) / 100.0;
        assert!((2.8..=3.7).contains(&slope));
        assert_eq!(threshold_kj_kg(599.9), THRESHOLD_LOW_KJ_KG);
        assert!(threshold_kj_kg(5000.0) > 0.0);
    }

    #[test]
    fn corners_stand_in_order_and_the_high_one_decides() {
        let answer = screen(&input(FIRE, shut(30.0, 0.005)));

        assert!(answer.low_kj_kg <= answer.typical_kj_kg && answer.typical_kj_kg <= answer.high_kj_kg);
        assert_eq!(answer.outcome == Outcome::CannotBeExcluded, answer.high_kj_kg >= answer.threshold_kj_kg);
        assert_relative_eq!(answer.threshold_kj_kg, threshold_kj_kg(answer.layer_temperature_k));
    }

    #[test]
    fn a_room_out_of_range_is_told() {
        assert!(screen_limits(&shut(30.0, 0.005), 700.0).is_empty());
        assert!(!screen_limits(&shut(30.0, 0.005), 950.0).is_empty());
        assert!(!screen_limits(&shut(30.0, 0.5), 700.0).is_empty());
        assert!(!screen_limits(&shut(600.0, 0.05), 700.0).is_empty());
    }

    proptest! {
        #[test]
        fn more_fuel_of_the_same_growth_never_turns_the_outcome_to_not_indicated(
            fuel in 2e4..2e6_f64, more in 1.0..5.0_f64, volume in 10.0..200.0_f64,
        ) {
            // A peak so high that only the energy differs while the flame lives.
            let fire = DesignFire { peak_kw: 1e5, energy_kj: fuel, ..FIRE };
            let richer = DesignFire { energy_kj: more * fuel, ..fire };
            let before = screen(&input(fire, shut(volume, 0.0)));
            let after = screen(&input(richer, shut(volume, 0.0)));

            prop_assert!(after.outcome >= before.outcome);
        }
    }
}
