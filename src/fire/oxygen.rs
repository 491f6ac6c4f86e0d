//! Oxygen of a shut room: what it yields, and when it no longer carries a flame.

use super::Exceeded;
use super::constants::{
    AIR_SPECIFIC_HEAT_KJ_KGK, HEAT_PER_OXYGEN_KJ_KG, OXYGEN_IN_AIR_MASS_FRACTION, air_density_kg_m3,
};
use super::design_fire::DesignFire;
use super::leakage;
use super::linings::{Surface, deal_beyler_conductance_kw_k};

/// Mass fraction of oxygen at which a flame in cold surroundings goes out: about 13.5 % by volume.
/// Published values run from 0.13 to 0.16.
pub const LIMIT_AT_AMBIENT: f64 = 0.15;

/// Oxygen at which a flame goes out, and how it falls as the gas gets hotter.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct LimitingOxygen {
    /// Mass fraction in cold surroundings.
    pub at_ambient_mass_fraction: f64,
    /// Flame temperature that must be kept up, K.
    pub flame_temperature_k: f64,
}

impl LimitingOxygen {
    /// 0.15 and 1700 K.
    pub const TYPICAL: Self =
        Self { at_ambient_mass_fraction: LIMIT_AT_AMBIENT, flame_temperature_k: 1700.0 };
    /// Flames go out early: 0.16 and 1800 K.
    pub const EARLY: Self = Self { at_ambient_mass_fraction: 0.16, flame_temperature_k: 1800.0 };
    /// Flames go out late: 0.13 and 1600 K.
    pub const LATE: Self = Self { at_ambient_mass_fraction: 0.13, flame_temperature_k: 1600.0 };
}

/// Mass fraction of oxygen below which a flame goes out.
///
/// ```text
/// Y_ext(T) = Y_ext,0 (T_f - T) / (T_f - 293)
/// ```
///
/// | symbol    | argument                   | unit  |
/// |-----------|----------------------------|-------|
/// | `Y_ext,0` | `at_ambient_mass_fraction` | kg/kg |
/// | `T_f`     | `flame_temperature_k`      | K     |
/// | `T`       | `temperature_k`            | K     |
///
/// Range: 293 K to some 900 K; above that carbon monoxide burns on without a flame.
///
/// Source: [`QUINTIERE_RANGWALA_2004`](crate::fire::sources::QUINTIERE_RANGWALA_2004).
///
/// ```
/// use sootline::fire::oxygen::{LimitingOxygen, extinction_mass_fraction};
///
/// // By hand: 0.15 · (1700 - 600) / (1700 - 293) = 0.1173.
/// assert!((extinction_mass_fraction(LimitingOxygen::TYPICAL, 600.0) - 0.1173).abs() < 1e-4);
/// ```
#[must_use]
pub fn extinction_mass_fraction(limit: LimitingOxygen, temperature_k: f64) -> f64 {
    let share = (limit.flame_temperature_k - temperature_k) / (limit.flame_temperature_k - 293.0);
    limit.at_ambient_mass_fraction * share.clamp(0.0, 1.0)
}

/// Heat that the oxygen of a mass of air yields until a mass fraction is left, in kJ.
///
/// ```text
/// E = m (0.2315 - Y_lim) 13 100
/// ```
///
/// | symbol  | argument                | unit  |
/// |---------|-------------------------|-------|
/// | `m`     | `air_mass_kg`           | kg    |
/// | `Y_lim` | `limit_mass_fraction`   | kg/kg |
///
/// The bound without leakage, and without the oxygen that hot gas takes out with it.
///
/// Source: [`HUGGETT_1980`](crate::fire::sources::HUGGETT_1980).
///
/// ```
/// use sootline::fire::oxygen::usable_heat_kj;
///
/// // By hand: 36 · (0.2315 - 0.15) · 13 100 = 38 435 kJ.
/// assert!((usable_heat_kj(36.0, 0.15) - 38_435.4).abs() < 0.1);
/// ```
#[must_use]
pub fn usable_heat_kj(air_mass_kg: f64, limit_mass_fraction: f64) -> f64 {
    air_mass_kg * (OXYGEN_IN_AIR_MASS_FRACTION - limit_mass_fraction).max(0.0) * HEAT_PER_OXYGEN_KJ_KG
}

/// Mass fraction of oxygen in air or smoke from its mole fraction, with the mean molar mass of air.
#[must_use]
pub fn mass_from_mole_fraction(mole_fraction: f64) -> f64 {
    mole_fraction * OXYGEN_IN_AIR_MASS_FRACTION / super::constants::OXYGEN_IN_AIR_MOLE_FRACTION
}

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
/// Placeholder text; see below.
#[must_use]
pub fn burn_shut(fire: &DesignFire, room: &ShutRoom<'_>, horizon_s: f64) -> ShutBurn {
    /// The flame fades over ± 2 % by volume about the limit rather than at a blow.
    const HALF_RAMP_MASS_FRACTION: f64 = 0.022;
    /// Below this share of the fuel burning, the flame counts as out.
    const OUT_AT_SHARE: f64 = 0.1;

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
        let step_s = (0.02 * now.time_s).max(1.0).min(end_s - now.time_s).max(1e-6);
        let middle_s = now.time_s + 0.5 * step_s;
        let gasified_kw = phases.heat_release_kw(fire.growth_kw_s2, middle_s);
        let limit = extinction_mass_fraction(room.limit, now.temperature_k);
        let burning = ((now.oxygen_mass_fraction - limit + HALF_RAMP_MASS_FRACTION)
            / (2.0 * HALF_RAMP_MASS_FRACTION))
            .clamp(0.0, 1.0);
        if burning < OUT_AT_SHARE {
            return ShutBurn { state: now, starved: true };
        }
        let heat_kw = burning * gasified_kw;

        // Heat: relaxes towards the steady rise, so that no step is too long for it.
        let loss_kw_k = deal_beyler_conductance_kw_k(room.surfaces, middle_s);
        let capacity_kj_k = now.gas_mass_kg * AIR_SPECIFIC_HEAT_KJ_KGK;
        let old_rise_k = now.temperature_k - ambient_k;
        let new_rise_k = if loss_kw_k > 0.0 {
            let steady_k = heat_kw / loss_kw_k;
            steady_k + (old_rise_k - steady_k) * (-loss_kw_k * step_s / capacity_kj_k).exp()
        } else {
            old_rise_k + heat_kw * step_s / capacity_kj_k
        };
        let temperature_k = ambient_k + new_rise_k;
        let gas_mass_kg = first_mass_kg * ambient_k / temperature_k;

        // Gas: what leaves takes its share of everything along; what comes in is air.
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
        let unburned_kj_kg =
            now.unburned_kj_kg * (1.0 - renewed) + (gasified_kw - heat_kw) * step_s / mass_kg;

        now = ShutState {
            time_s: now.time_s + step_s,
            temperature_k,
            gas_mass_kg,
            oxygen_mass_fraction: oxygen.max(0.0),
            gasified_kj: now.gasified_kj + gasified_kw * step_s,
            released_kj: now.released_kj + heat_kw * step_s,
            unburned_kj_kg,
            peak_temperature_k: now.peak_temperature_k.max(temperature_k),
        };
    }
    ShutBurn { state: now, starved: false }
}

/// Time at which a fire has used the oxygen of a shut room down to a limit, in s, by the plain budget; none
/// where its fuel is not enough.
///
/// ```text
/// E(t) = m (0.2315 - Y_lim) 13 100 + m_leak t (0.2315 - Y_lim) 13 100
/// ```
#[must_use]
pub fn budget_time_s(
    fire: &DesignFire,
    air_mass_kg: f64,
    leak_inflow_kg_s: f64,
    limit_mass_fraction: f64,
) -> Option<f64> {
    let stored_kj = usable_heat_kj(air_mass_kg, limit_mass_fraction);
    let leak_kw = usable_heat_kj(leak_inflow_kg_s, limit_mass_fraction);
    let used_up = |time_s: f64| fire.energy_released_kj(time_s) >= stored_kj + leak_kw * time_s;
    let phases = fire.phases();
    // In the decay the fire outruns the leak only until its heat release has fallen to what leaks in.
    let last_s = if phases.reached_kw > leak_kw {
        phases.end_s - (phases.end_s - phases.decay_start_s) * leak_kw / phases.reached_kw
    } else {
        return None;
    };
    if !used_up(last_s) {
        return None;
    }
    super::search::first_time_s("oxygen budget", 0.0, last_s, used_up).ok()
}

/// What a room exceeds of the range of [`burn_shut`].
#[must_use]
pub fn burn_shut_limits(room: &ShutRoom<'_>) -> Exceeded {
    Exceeded::none().when(room.volume_m3 > 500.0, "volume above 500 m³: the gas is hardly well mixed").when(
        room.leakage_area_m2 > 0.001 * room.volume_m3,
        "leakage like that of an opening: the openings count instead",
    )
}
