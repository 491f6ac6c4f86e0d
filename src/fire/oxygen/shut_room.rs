//! A fire in a shut room, followed until its flame dies.

use super::{LimitingOxygen, extinction_mass_fraction};
use crate::fire::constants::{
    AIR_SPECIFIC_HEAT_KJ_KGK, HEAT_PER_OXYGEN_KJ_KG, OXYGEN_IN_AIR_MASS_FRACTION, air_density_kg_m3,
};
use crate::fire::design_fire::DesignFire;
use crate::fire::linings::{Surface, deal_beyler_conductance_kw_k};
use crate::fire::{Exceeded, leakage};

/// A shut room.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ShutRoom<'a> {
    /// Volume, m³.
    pub volume_m3: f64,
    /// Height, m: it drives the exchange through the cracks.
    pub height_m: f64,
    /// Leakage area, m².
    pub leakage_area_m2: f64,
    /// The linings.
    pub surfaces: &'a [Surface],
    /// Ambient temperature, K.
    pub ambient_temperature_k: f64,
    /// When a flame goes out.
    pub limit: LimitingOxygen,
}

/// State of a shut room with a fire, at the end of [`burn_shut`].
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ShutState {
    /// Time on the clock of the fire's curve, s.
    pub time_s: f64,
    /// Gas, K, well mixed.
    pub temperature_k: f64,
    /// Gas left in the room, kg.
    pub gas_mass_kg: f64,
    /// Oxygen, mass fraction.
    pub oxygen_mass_fraction: f64,
    /// Heat that would have been released with air enough: the fuel that turned to gas, kJ.
    pub gasified_kj: f64,
    /// Heat that was released, kJ.
    pub released_kj: f64,
    /// Heat of combustion of unburned fuel per mass of gas, kJ/kg.
    pub unburned_kj_kg: f64,
    /// Highest gas temperature until then, K.
    pub peak_temperature_k: f64,
}

/// How the fire of a shut room ended.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ShutBurn {
    /// The state at the end.
    pub state: ShutState,
    /// True when the flame died of lack of oxygen; false when the fuel or the time ran out.
    pub starved: bool,
}

/// Follows a fire in a shut room until it dies of lack of oxygen, its fuel is spent, or the horizon.
///
/// ```text
/// heat    m c_p dT/dt = η Q - h A (T - T_a)        h A of Deal and Beyler, at the age E/Q
/// gas     m T = m_0 T_a                            what swells leaves
/// oxygen  m dY/dt = m_in (0.2315 - Y) - η Q / 13 100
/// excess  m de/dt = (1 - η) Q - m_in e
/// flame   η = (Y - Y_ext(T) + δ) / 2δ, 0 to 1; out below one half, that is at Y_ext
/// air     m_in = max(0, exchange by buoyancy - dm/dt outward)
/// ```
///
/// | symbol  | field or function                                                             | unit    |
/// |---------|-------------------------------------------------------------------------------|---------|
/// | `Q`     | [`DesignFire::heat_release_kw`]                                               | kW      |
/// | `m`     | `gas_mass_kg`                                                                 | kg      |
/// | `T`     | `temperature_k`                                                               | K       |
/// | `Y`     | `oxygen_mass_fraction`                                                        | kg/kg   |
/// | `e`     | `unburned_kj_kg`                                                              | kJ/kg   |
/// | `Y_ext` | [`extinction_mass_fraction`]                                                  | kg/kg   |
/// | `h A`   | [`deal_beyler_conductance_kw_k`]                                              | kW/K    |
/// | `δ`     | 2 % by volume, 0.022 by mass                                                  | kg/kg   |
///
/// Why the age `E/Q` (heat released over heat release) and not the time: the conductance was fitted
/// to steady fires, for which the two are the same; under a fire that grows with the square of time
/// the wall has felt most of its heat in the last third, so it takes more. The exact ratio for a
/// thick wall is 1.87, the age gives √3.
///
/// The gas is one well-mixed body: cooler than the real upper layer, warmer than the real lower one.
/// Range: see [`burn_shut_limits`].
///
/// Sources: [`HUGGETT_1980`](crate::fire::sources::HUGGETT_1980),
/// [`QUINTIERE_RANGWALA_2004`](crate::fire::sources::QUINTIERE_RANGWALA_2004),
/// [`DEAL_BEYLER_1990`](crate::fire::sources::DEAL_BEYLER_1990),
/// [`KARLSSON_QUINTIERE_2000`](crate::fire::sources::KARLSSON_QUINTIERE_2000).
///
/// ```
/// use sootline::fire::DesignFire;
/// use sootline::fire::oxygen::{LimitingOxygen, ShutRoom, burn_shut};
///
/// // 10 MJ in 60 m³ of air: by hand 72.2 kg · (0.2315 - 0.15) · 13.1 MJ/kg = 77 MJ could
/// // burn, so the fuel runs out first.
/// let fire = DesignFire { growth_kw_s2: 0.0117, peak_kw: 500.0, energy_kj: 10_000.0, decay_from_share: 0.7 };
/// let room = ShutRoom { volume_m3: 60.0, height_m: 2.4, leakage_area_m2: 0.02, surfaces: &[],
///                       ambient_temperature_k: 293.15, limit: LimitingOxygen::TYPICAL };
/// assert!(!burn_shut(&fire, &room, 3600.0).starved);
/// ```
#[must_use]
pub fn burn_shut(fire: &DesignFire, room: &ShutRoom<'_>, horizon_s: f64) -> ShutBurn {
    burn_in_steps(fire, room, horizon_s, 1.0)
}

/// [`burn_shut`] with steps of `scale` seconds, or `scale` × 2 % of the time where that is longer.
fn burn_in_steps(fire: &DesignFire, room: &ShutRoom<'_>, horizon_s: f64, scale: f64) -> ShutBurn {
    /// The flame fades over ± 2 % by volume about the limit rather than at a blow.
    const HALF_RAMP_MASS_FRACTION: f64 = 0.022;
    /// At the limit itself half burns; below, nothing keeps the flame alive.
    const OUT_BELOW_SHARE: f64 = 0.5;

    let phases = fire.phases();
    let ambient_k = room.ambient_temperature_k;
    let first_mass_kg = room.volume_m3 * air_density_kg_m3(ambient_k);
    let mut now = ShutState {
        time_s: 0.0,
        temperature_k: ambient_k,
        gas_mass_kg: first_mass_kg,
        oxygen_mass_fraction: OXYGEN_IN_AIR_MASS_FRACTION,
        gasified_kj: 0.0,
        released_kj: 0.0,
        unburned_kj_kg: 0.0,
        peak_temperature_k: ambient_k,
    };
    let end_s = horizon_s.min(phases.end_s);
    while now.time_s < end_s {
        let limit = extinction_mass_fraction(room.limit, now.temperature_k);
        let burning = ((now.oxygen_mass_fraction - limit + HALF_RAMP_MASS_FRACTION)
            / (2.0 * HALF_RAMP_MASS_FRACTION))
            .clamp(0.0, 1.0);
        if burning < OUT_BELOW_SHARE {
            return ShutBurn { state: now, starved: true };
        }
        let step_s = scale * (0.02 * now.time_s).max(1.0);
        let step_s = step_s.min(end_s - now.time_s).max(1e-6);
        let gasified_kw = phases.heat_release_kw(fire.growth_kw_s2, now.time_s + 0.5 * step_s);
        now = step(&now, room, Step { step_s, gasified_kw, burning, first_mass_kg });
    }
    ShutBurn { state: now, starved: false }
}

struct Step {
    step_s: f64,
    gasified_kw: f64,
    burning: f64,
    first_mass_kg: f64,
}

fn step(now: &ShutState, room: &ShutRoom<'_>, step: Step) -> ShutState {
    let ambient_k = room.ambient_temperature_k;
    let step_s = step.step_s;
    let heat_kw = step.burning * step.gasified_kw;

    let elapsed_s = now.time_s + 0.5 * step_s;
    let age_s = if now.released_kj > 0.0 && heat_kw > 0.0 {
        (now.released_kj / heat_kw + 0.5 * step_s).min(elapsed_s)
    } else {
        elapsed_s
    };
    let loss_kw_k = deal_beyler_conductance_kw_k(room.surfaces, age_s);
    let capacity_kj_k = now.gas_mass_kg * AIR_SPECIFIC_HEAT_KJ_KGK;
    let old_rise_k = now.temperature_k - ambient_k;
    // Relaxes towards the steady rise: no step is too long for it.
    let new_rise_k = if loss_kw_k > 0.0 {
        let steady_k = heat_kw / loss_kw_k;
        steady_k + (old_rise_k - steady_k) * (-loss_kw_k * step_s / capacity_kj_k).exp()
    } else {
        old_rise_k + heat_kw * step_s / capacity_kj_k
    };
    let temperature_k = ambient_k + new_rise_k;
    let gas_mass_kg = step.first_mass_kg * ambient_k / temperature_k;

    // What leaves takes its share of everything along; what comes in is air.
    let pushed_out_kg_s = (now.gas_mass_kg - gas_mass_kg) / step_s;
    let exchange_kg_s = leakage::buoyant_exchange_kg_s(leakage::LeakyRoom {
        leakage_area_m2: room.leakage_area_m2,
        height_m: room.height_m,
        gas_temperature_k: temperature_k,
        ambient_temperature_k: ambient_k,
    });
    let inflow_kg_s = (exchange_kg_s - pushed_out_kg_s).max(0.0);
    let mass_kg = 0.5 * (now.gas_mass_kg + gas_mass_kg);
    let renewed = (inflow_kg_s * step_s / mass_kg).min(1.0);
    let oxygen = now.oxygen_mass_fraction
        + renewed * (OXYGEN_IN_AIR_MASS_FRACTION - now.oxygen_mass_fraction)
        - heat_kw * step_s / (HEAT_PER_OXYGEN_KJ_KG * mass_kg);
    let excess_kw = step.gasified_kw - heat_kw;

    ShutState {
        time_s: now.time_s + step_s,
        temperature_k,
        gas_mass_kg,
        oxygen_mass_fraction: oxygen.max(0.0),
        gasified_kj: now.gasified_kj + step.gasified_kw * step_s,
        released_kj: now.released_kj + heat_kw * step_s,
        unburned_kj_kg: now.unburned_kj_kg * (1.0 - renewed) + excess_kw * step_s / mass_kg,
        peak_temperature_k: now.peak_temperature_k.max(temperature_k),
    }
}

/// What a room exceeds of the range of [`burn_shut`].
#[must_use]
pub fn burn_shut_limits(room: &ShutRoom<'_>) -> Exceeded {
    Exceeded::none().when(room.volume_m3 > 500.0, "volume above 500 m³: the gas is hardly well mixed").when(
        room.leakage_area_m2 > 0.001 * room.volume_m3,
        "leakage like that of an opening: the openings count instead",
    )
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fire::hot_layer::{Closed, beyler_closed_rise_k};
    use approx::assert_relative_eq;
    use proptest::prelude::*;

    const BOARD: Surface = Surface {
        area_m2: 60.0,
        conductivity_w_mk: 0.17,
        density_kg_m3: 790.0,
        specific_heat_j_kgk: 900.0,
        thickness_m: 0.0159,
    };

    fn room(surfaces: &[Surface]) -> ShutRoom<'_> {
        ShutRoom {
            volume_m3: 32.7,
            height_m: 2.44,
            leakage_area_m2: 0.0,
            surfaces,
            ambient_temperature_k: 293.0,
            limit: LimitingOxygen::TYPICAL,
        }
    }

    fn t_squared(growth_kw_s2: f64) -> DesignFire {
        DesignFire { growth_kw_s2, peak_kw: 1e6, energy_kj: 1e7, decay_from_share: 0.7 }
    }

    fn steady(heat_release_kw: f64) -> DesignFire {
        DesignFire { growth_kw_s2: 1e9, peak_kw: heat_release_kw, energy_kj: 1e8, decay_from_share: 0.7 }
    }

    #[test]
    fn a_small_steady_fire_warms_the_room_as_beyler_says() {
        // The rise stays below 25 K, so hardly any gas is lost and both say the same.
        let mass_kg = 32.7 * air_density_kg_m3(293.0);
        for time_s in [30.0, 100.0, 200.0] {
            let fire = steady(20.0);
            let burnt = burn_in_steps(&fire, &room(&[BOARD]), time_s, 0.1);
            let beyler_k = beyler_closed_rise_k(Closed {
                heat_release_kw: 20.0,
                time_s,
                inertia_kw2_s_m4k2: BOARD.inertia_kw2_s_m4k2(),
                bounding_area_m2: BOARD.area_m2,
                air_mass_kg: mass_kg,
                specific_heat_kj_kgk: AIR_SPECIFIC_HEAT_KJ_KGK,
            });
            assert_relative_eq!(burnt.state.temperature_k - 293.0, beyler_k, max_relative = 0.05);
        }
    }

    #[test]
    fn without_losses_the_temperature_is_that_of_the_closed_form() {
        // Derived for an adiabatic leaky room: T = T_0 e^(Q t/(c_p m_0 T_0)); 60 m³ at 1.2047
        // kg/m³, 50 kW, 120 s: 388.41 K.
        let adiabatic = ShutRoom { volume_m3: 60.0, ..room(&[]) };
        let burnt = burn_in_steps(&steady(50.0), &adiabatic, 120.0, 0.1);

        assert_relative_eq!(burnt.state.temperature_k, 388.412, max_relative = 1e-3);
        assert_relative_eq!(burnt.state.gas_mass_kg, 54.526, max_relative = 1e-3);
    }

    #[test]
    fn halving_the_step_halves_the_error_at_least() {
        let at = |scale| burn_in_steps(&t_squared(0.0117), &room(&[BOARD]), 150.0, scale).state;
        let fine = at(0.02);
        let error = |scale: f64| (at(scale).temperature_k - fine.temperature_k).abs();

        assert!(error(0.5) < 0.65 * error(1.0), "{} {}", error(0.5), error(1.0));
        assert!(error(1.0) < 0.03 * (fine.temperature_k - 293.0));
    }

    #[test]
    fn oxygen_and_heat_balance_while_nothing_leaks_in() {
        // Oxygen gone = burnt + carried out; what is carried out had at most 0.2315 in it.
        let state = burn_in_steps(&t_squared(0.0117), &room(&[BOARD]), 150.0, 0.1).state;
        let first_kg = 32.7 * air_density_kg_m3(293.0);
        let gone_kg = OXYGEN_IN_AIR_MASS_FRACTION * first_kg - state.oxygen_mass_fraction * state.gas_mass_kg;
        let burnt_kg = state.released_kj / HEAT_PER_OXYGEN_KJ_KG;
        let carried_kg = gone_kg - burnt_kg;

        assert!(carried_kg > state.oxygen_mass_fraction * (first_kg - state.gas_mass_kg) * 0.99);
        assert!(carried_kg < OXYGEN_IN_AIR_MASS_FRACTION * (first_kg - state.gas_mass_kg) * 1.01);
    }

    #[test]
    fn leakage_that_feeds_the_fire_keeps_it_alive() {
        let small =
            DesignFire { growth_kw_s2: 0.01, peak_kw: 30.0, energy_kj: 60_000.0, decay_from_share: 0.7 };
        let tight = burn_shut(&small, &room(&[BOARD]), 7200.0);
        let leaky = burn_shut(&small, &ShutRoom { leakage_area_m2: 0.1, ..room(&[BOARD]) }, 7200.0);

        assert!(tight.starved && !leaky.starved);
    }

    proptest! {
        #[test]
        fn the_burn_stays_within_its_balances(
            growth in 0.001..0.3_f64, peak in 20.0..5000.0_f64, fuel in 1e3..1e7_f64, volume in 5.0..500.0_f64, leak in 0.0..0.1_f64,
        ) {
            let fire = DesignFire { growth_kw_s2: growth, peak_kw: peak, energy_kj: fuel, decay_from_share: 0.7 };
            let shut = ShutRoom { volume_m3: volume, leakage_area_m2: leak, ..room(&[BOARD]) };
            let state = burn_shut(&fire, &shut, 7200.0).state;

            prop_assert!(state.temperature_k.is_finite() && state.temperature_k >= 293.0 - 1e-6);
            prop_assert!((0.0..=0.2316).contains(&state.oxygen_mass_fraction));
            prop_assert!(state.released_kj <= state.gasified_kj * (1.0 + 1e-9));
            // Steps of 2 % take the middle of each step for the whole: a little over the fuel is
            // rounding of the curve.
            prop_assert!(state.gasified_kj <= fuel * 1.02);
            prop_assert!(state.unburned_kj_kg >= 0.0);
            prop_assert!(state.gas_mass_kg > 0.0 && state.gas_mass_kg <= volume * 1.21);
        }
    }
}
