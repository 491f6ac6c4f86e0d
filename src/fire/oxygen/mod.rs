//! Oxygen of a shut room: what it yields, and when it no longer carries a flame.

mod shut_room;

pub use shut_room::{ShutBurn, ShutRoom, ShutState, burn_shut, burn_shut_limits};

use super::constants::{HEAT_PER_OXYGEN_KJ_KG, OXYGEN_IN_AIR_MASS_FRACTION, OXYGEN_IN_AIR_MOLE_FRACTION};
use super::design_fire::DesignFire;

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
///
/// ```
/// use sootline::fire::oxygen::mass_from_mole_fraction;
///
/// // By hand: 0.135 · 0.2315/0.2095 = 0.1492: 13.5 % by volume is about 0.15 by mass.
/// assert!((mass_from_mole_fraction(0.135) - 0.1492).abs() < 1e-4);
/// ```
#[must_use]
pub fn mass_from_mole_fraction(mole_fraction: f64) -> f64 {
    mole_fraction * OXYGEN_IN_AIR_MASS_FRACTION / OXYGEN_IN_AIR_MOLE_FRACTION
}

/// Time at which a fire has used the oxygen of a shut room down to a limit, in s, by the plain budget; none
/// where its fuel is not enough.
///
/// ```text
/// E(t) = (m + m_leak t) (0.2315 - Y_lim) 13 100
/// ```
///
/// | symbol   | argument              | unit  |
/// |----------|-----------------------|-------|
/// | `m`      | `air_mass_kg`         | kg    |
/// | `m_leak` | `leak_inflow_kg_s`    | kg/s  |
/// | `Y_lim`  | `limit_mass_fraction` | kg/kg |
///
/// The rival of [`burn_shut`]: it leaves out that hot gas carries oxygen away, and that a limit
/// falls with the heat. The two errors pull against each other.
///
/// Source: [`HUGGETT_1980`](crate::fire::sources::HUGGETT_1980).
///
/// ```
/// use sootline::fire::DesignFire;
/// use sootline::fire::oxygen::budget_time_s;
///
/// // By hand: 36 · 0.0815 · 13 100 = 38 435 kJ = 0.0117 t³/3, so t = (3 · 38 435 / 0.0117)^(1/3) = 214.4 s.
/// let fire = DesignFire { growth_kw_s2: 0.0117, peak_kw: 5000.0, energy_kj: 1e6, decay_from_share: 0.7 };
/// assert!((budget_time_s(&fire, 36.0, 0.0, 0.15).unwrap() - 214.4).abs() < 0.1);
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

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fire::constants::air_density_kg_m3;
    use approx::{assert_relative_eq, relative_eq};

    fn t_squared(growth_kw_s2: f64) -> DesignFire {
        DesignFire { growth_kw_s2, peak_kw: 1e6, energy_kj: 1e7, decay_from_share: 0.7 }
    }

    fn steady(heat_release_kw: f64) -> DesignFire {
        DesignFire { growth_kw_s2: 1e9, peak_kw: heat_release_kw, energy_kj: 1e8, decay_from_share: 0.7 }
    }

    #[test]
    fn the_limit_falls_with_the_heat_as_published() {
        // Critical flame temperature, worked by hand: 0.15 at 293 K, about 0.117 at 600 K, 0.085 at 900 K.
        for (temperature_k, expected) in [(293.0, 0.15), (600.0, 0.117), (900.0, 0.085)] {
            let got = extinction_mass_fraction(LimitingOxygen::TYPICAL, temperature_k);
            assert_relative_eq!(got, expected, max_relative = 5e-3);
        }
        assert_eq!(extinction_mass_fraction(LimitingOxygen::TYPICAL, 1800.0), 0.0);
        assert_eq!(extinction_mass_fraction(LimitingOxygen::TYPICAL, 250.0), 0.15);
    }

    #[test]
    fn the_budget_is_that_of_the_closed_form() {
        // Derived: 32.7 m³ at 293 K, 100 kW: 420.6 s to a mass fraction of 0.15.
        let mass_kg = 32.7 * air_density_kg_m3(293.0);

        assert_relative_eq!(
            budget_time_s(&steady(100.0), mass_kg, 0.0, 0.15).unwrap(),
            420.6,
            max_relative = 1e-3
        );
    }

    #[test]
    fn the_budget_meets_a_table_worked_elsewhere() {
        // Heat and times of t² fires in sealed rooms, worked by formula with mole fractions:
        // volume, limit, MJ, s at 0.0117 and at 0.0469 kW/s². The table took slightly denser air: 1
        // %.
        for (volume_m3, mole_fraction, heat_mj, medium_s, fast_s) in [
            (10.0, 0.15, 10.46, 139.0, 87.0),
            (30.0, 0.15, 31.39, 200.0, 126.0),
            (30.0, 0.13, 41.9, 221.0, 139.0),
            (60.0, 0.10, 115.35, 309.0, 195.0),
            (500.0, 0.0, 1837.48, 778.0, 490.0),
        ] {
            let mass_kg = volume_m3 * air_density_kg_m3(293.15);
            let limit = mass_from_mole_fraction(mole_fraction);
            let heat_kj = usable_heat_kj(mass_kg, limit);
            assert!(relative_eq!(heat_kj / 1000.0, heat_mj, max_relative = 0.015), "{volume_m3}: {heat_kj}");
            for (growth, expected_s) in [(0.0117, medium_s), (0.0469, fast_s)] {
                let got_s = budget_time_s(&t_squared(growth), mass_kg, 0.0, limit).unwrap();
                assert!(relative_eq!(got_s, expected_s, max_relative = 0.01), "{volume_m3}: {got_s}");
            }
        }
    }

    #[test]
    fn a_leak_lengthens_the_budget_and_a_large_one_feeds_the_fire_for_ever() {
        let mass_kg = 39.0;
        let tight_s = budget_time_s(&steady(100.0), mass_kg, 0.0, 0.15).unwrap();
        let leaky_s = budget_time_s(&steady(100.0), mass_kg, 0.02, 0.15).unwrap();
        assert!(leaky_s > tight_s);

        // By hand: 100 kW need 100/(0.0815·13 100) = 0.09366 kg/s.
        assert!(budget_time_s(&steady(100.0), mass_kg, 0.0936, 0.15).is_some());
        assert!(budget_time_s(&steady(100.0), mass_kg, 0.0937, 0.15).is_none());
    }

    #[test]
    fn fuel_that_is_too_little_is_never_starved_by_the_budget() {
        let candle =
            DesignFire { growth_kw_s2: 0.01, peak_kw: 100.0, energy_kj: 5000.0, decay_from_share: 0.7 };

        assert_eq!(budget_time_s(&candle, 39.0, 0.0, 0.15), None);
    }
}
