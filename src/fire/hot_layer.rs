//! Temperature of the hot layer under the ceiling.

use super::design_fire::{DesignFire, Phases};
use super::linings::{Surface, penetration_time_s, total_conductance_kw_k};
use super::ventilation::WallOpening;
use super::{Exceeded, NotConverged, flashover, search};

/// A fire in a room with one wall opening, at one moment.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Vented {
    /// Heat release, kW.
    pub heat_release_kw: f64,
    /// The opening.
    pub opening: WallOpening,
    /// Conductance times area `h_k A_T`, kW/K.
    pub conductance_kw_k: f64,
}

/// Rise of the hot layer above ambient, in K, by McCaffrey, Quintiere and Harkleroad.
///
/// ```text
/// ΔT = 6.85 ( Q² / (A_o √H_o · h_k A_T) )^(1/3)
/// ```
///
/// | symbol    | field              | unit |
/// |-----------|--------------------|------|
/// | `Q`       | `heat_release_kw`  | kW   |
/// | `A_o H_o` | `opening`          | m²,m |
/// | `h_k A_T` | `conductance_kw_k` | kW/K |
///
/// Range: see [`mccaffrey_limits`].
///
/// Source: [`MCCAFFREY_1981`](crate::fire::sources::MCCAFFREY_1981).
///
/// ```
/// use sootline::fire::hot_layer::{Vented, mccaffrey_rise_k};
/// use sootline::fire::ventilation::WallOpening;
///
/// // By hand: 6.85 · (300² / (1.6·√2 · 0.03·44.48))^(1/3) = 6.85 · (29 807)^(1/3) = 212.4 K.
/// let room = Vented {
///     heat_release_kw: 300.0,
///     opening: WallOpening { area_m2: 1.6, height_m: 2.0 },
///     conductance_kw_k: 0.03 * 44.48,
/// };
/// assert!((mccaffrey_rise_k(room) - 212.4).abs() < 0.1);
/// ```
#[must_use]
pub fn mccaffrey_rise_k(room: Vented) -> f64 {
    if room.heat_release_kw <= 0.0 {
        return 0.0;
    }
    let loss = room.opening.factor_m5_2() * room.conductance_kw_k;
    MCCAFFREY_RISE * (room.heat_release_kw * room.heat_release_kw / loss).cbrt()
}

/// The 6.85 of [`mccaffrey_rise_k`], which its search for the time shares.
const MCCAFFREY_RISE: f64 = 6.85;

/// What a state exceeds of the range of [`mccaffrey_rise_k`]: 112 tests in eight series, rises of 20 to
/// 600 K, rooms 0.3 to 2.7 m high, fire in the middle, quasi-steady, no fans.
#[must_use]
pub fn mccaffrey_limits(room: Vented, rise_k: f64) -> Exceeded {
    Exceeded::none()
        .when(
            room.opening.factor_m5_2() <= 0.0,
            "no wall opening: the correlation does not hold",
        )
        .when(rise_k > 600.0, "rise above 600 K, the highest of the fit")
        .when(rise_k < 20.0, "rise below 20 K, the lowest of the fit")
        .when(
            room.opening.height_m > 2.7,
            "opening higher than the rooms of the fit (0.3 to 2.7 m)",
        )
}

/// Where the fire stands in the room.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Position {
    /// Away from walls.
    Centre,
    /// Flush against one wall.
    Wall,
    /// In a corner.
    Corner,
}

/// Factor on the rise for a fire against a wall or in a corner, by Mowrer and Williamson.
///
/// ```text
/// centre 1.0    wall 1.3    corner 1.7
/// ```
///
/// Range: fire flush with the wall. Measured rooms support less: Steckler's give about 1.3 and 1.4, the
/// 2018 compartment burns 1.0 to 1.15 for the corner. Not to be applied blindly: see
/// [`measured_position_factor`].
///
/// Source: [`MOWRER_WILLIAMSON_1987`](crate::fire::sources::MOWRER_WILLIAMSON_1987).
///
/// ```
/// use sootline::fire::hot_layer::{Position, mowrer_williamson_factor};
///
/// assert_eq!(mowrer_williamson_factor(Position::Corner), 1.7);
/// ```
#[must_use]
pub const fn mowrer_williamson_factor(position: Position) -> f64 {
    match position {
        Position::Centre => 1.0,
        Position::Wall => 1.3,
        Position::Corner => 1.7,
    }
}

/// Lowest and highest factor that measured rooms support: the span between two series of tests.
///
/// Source: [`STECKLER_1982`](crate::fire::sources::STECKLER_1982) for the high end,
/// [`FSRI_2018`](crate::fire::sources::FSRI_2018) for the low end.
#[must_use]
pub const fn measured_position_factor(position: Position) -> (f64, f64) {
    match position {
        Position::Centre => (1.0, 1.0),
        Position::Wall => (1.0, 1.3),
        Position::Corner => (1.0, 1.4),
    }
}

/// A growing fire in a room with one wall opening.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct GrowingVented<'a> {
    /// The fire.
    pub fire: DesignFire,
    /// The opening.
    pub opening: WallOpening,
    /// The linings.
    pub surfaces: &'a [Surface],
    /// Factor on the rise for the place of the fire: [`mowrer_williamson_factor`] or 1.
    pub position_factor: f64,
}

/// First time at which the layer of a growing fire has risen by so much, in s on the clock of the fire's
/// curve; none where it never does.
///
/// The conductance falls with time while the fire grows and burns steadily, so the rise of
/// [`mccaffrey_rise_k`] only climbs until the decay begins: a bounded bisection finds the moment. In
/// the decay it can only jump up where heat comes through a lining, so those moments are tried too.
///
/// # Errors
///
/// [`NotConverged`] where a number handed in is not finite.
pub fn mccaffrey_time_to_rise_s(
    room: &GrowingVented<'_>,
    rise_k: f64,
) -> Result<Option<f64>, NotConverged> {
    // ΔT ≥ rise  ⇔  Q² ≥ (rise / (6.85 f))³ · A√H · Σ h_k A: no power in the loop.
    let per_factor_k = rise_k / (MCCAFFREY_RISE * room.position_factor);
    first_time_over_loss_s(
        "time at which the hot layer has risen",
        room,
        per_factor_k.powi(3),
    )
}

/// First time at which a growing fire has the heat release that
/// [`flashover::mccaffrey_kw`] asks for *at that time*, in s on the clock of the fire's curve.
///
/// The heat asked for falls as the lining warms through. The place of the fire is not in it.
///
/// # Errors
///
/// [`NotConverged`] where a number handed in is not finite.
pub fn mccaffrey_time_to_flashover_s(
    room: &GrowingVented<'_>,
) -> Result<Option<f64>, NotConverged> {
    let coefficient = flashover::MCCAFFREY_FLASHOVER * flashover::MCCAFFREY_FLASHOVER;
    first_time_over_loss_s("time to flashover by McCaffrey", room, coefficient)
}

fn first_time_over_loss_s(
    what: &'static str,
    room: &GrowingVented<'_>,
    coefficient: f64,
) -> Result<Option<f64>, NotConverged> {
    let phases = room.fire.phases();
    let factor_m5_2 = room.opening.factor_m5_2();
    if phases.reached_kw <= 0.0 || factor_m5_2 <= 0.0 {
        return Ok(None);
    }
    if !(coefficient.is_finite() && factor_m5_2.is_finite() && phases.end_s.is_finite()) {
        return Err(NotConverged { what, after: 0 });
    }
    let reached = |time_s: f64| {
        let heat_kw = phases.heat_release_kw(room.fire.growth_kw_s2, time_s);
        heat_kw * heat_kw
            >= coefficient * factor_m5_2 * total_conductance_kw_k(room.surfaces, time_s)
    };
    if reached(phases.decay_start_s) {
        return search::first_time_s(what, 0.0, phases.decay_start_s, reached).map(Some);
    }
    Ok(first_jump_in_decay_s(room.surfaces, &phases, reached))
}

/// Earliest moment in the decay at which heat comes through a lining and the condition then holds.
fn first_jump_in_decay_s(
    surfaces: &[Surface],
    phases: &Phases,
    reached: impl Fn(f64) -> bool,
) -> Option<f64> {
    surfaces
        .iter()
        .map(penetration_time_s)
        .filter(|&time_s| time_s > phases.decay_start_s && time_s < phases.end_s && reached(time_s))
        .min_by(f64::total_cmp)
}

/// A fire in a room that a fan feeds with air.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Forced {
    /// Heat release, kW.
    pub heat_release_kw: f64,
    /// Air through the fan, kg/s.
    pub mass_flow_kg_s: f64,
    /// Conductance times area, kW/K: `h_k A_T` of [`total_conductance_kw_k`] for
    /// [`foote_pagni_alvares_rise_k`], of [`deal_beyler_conductance_kw_k`](super::linings::deal_beyler_conductance_kw_k)
    /// for [`deal_beyler_rise_k`].
    pub conductance_kw_k: f64,
    /// Air that comes in, K.
    pub ambient_temperature_k: f64,
    /// Specific heat of the air, kJ/(kg K).
    pub specific_heat_kj_kgk: f64,
}

/// Rise of the layer in a fan-driven room, in K, by Foote, Pagni and Alvares.
///
/// ```text
/// ΔT/T_a = 0.63 ( Q / (m c_p T_a) )^0.72 ( h_k A_T / (m c_p) )^(-0.36)
/// ```
///
/// | symbol    | field                   | unit      |
/// |-----------|-------------------------|-----------|
/// | `Q`       | `heat_release_kw`       | kW        |
/// | `m`       | `mass_flow_kg_s`        | kg/s      |
/// | `c_p`     | `specific_heat_kj_kgk`  | kJ/(kg K) |
/// | `T_a`     | `ambient_temperature_k` | K         |
/// | `h_k A_T` | `conductance_kw_k`      | kW/K      |
///
/// Range: see [`foote_pagni_alvares_limits`].
///
/// Source: [`FOOTE_1986`](crate::fire::sources::FOOTE_1986).
///
/// ```
/// use sootline::fire::hot_layer::{Forced, foote_pagni_alvares_rise_k};
///
/// // By hand: 293 · 0.63 · (1000/(2.4·293))^0.72 · (0.076594·130/2.4)^(-0.36)
/// //        = 293 · 0.63 · 1.2896 · 0.5987 = 142.5 K.
/// let room = Forced { heat_release_kw: 1000.0, mass_flow_kg_s: 2.4, conductance_kw_k: 0.076594 * 130.0,
///                     ambient_temperature_k: 293.0, specific_heat_kj_kgk: 1.0 };
/// assert!((foote_pagni_alvares_rise_k(room) - 142.5).abs() < 0.3);
/// ```
#[must_use]
pub fn foote_pagni_alvares_rise_k(room: Forced) -> f64 {
    if room.heat_release_kw <= 0.0 {
        return 0.0;
    }
    let flow_kw_k = room.mass_flow_kg_s * room.specific_heat_kj_kgk;
    0.63 * room.ambient_temperature_k
        * (room.heat_release_kw / (flow_kw_k * room.ambient_temperature_k)).powf(0.72)
        * (room.conductance_kw_k / flow_kw_k).powf(-0.36)
}

/// What a room exceeds of the tests behind [`foote_pagni_alvares_rise_k`]: 150 to 490 kW,
/// 0.11 to 0.325 kg/s, walls of 0.1 m refractory, layers of 100 to 300 °C.
#[must_use]
pub fn foote_pagni_alvares_limits(room: Forced, rise_k: f64) -> Exceeded {
    Exceeded::none()
        .when(
            room.mass_flow_kg_s <= 0.0,
            "no forced flow: the closed-room form counts instead",
        )
        .when(
            !(150.0..=490.0).contains(&room.heat_release_kw),
            "heat release outside the 150 to 490 kW of the tests",
        )
        .when(
            !(0.11..=0.325).contains(&room.mass_flow_kg_s),
            "air flow outside the 0.11 to 0.325 kg/s of the tests",
        )
        .when(
            rise_k > 300.0,
            "layer hotter than the 100 to 300 °C of the tests",
        )
}

/// Rise of the layer in a fan-driven room, in K, by Deal and Beyler.
///
/// ```text
/// ΔT = Q / (m c_p + h A_T)
/// ```
///
/// Symbols as [`foote_pagni_alvares_rise_k`], but with the conductance of
/// [`deal_beyler_conductance_kw_k`](super::linings::deal_beyler_conductance_kw_k).
/// Range: up to about 2000 s.
///
/// Source: [`DEAL_BEYLER_1990`](crate::fire::sources::DEAL_BEYLER_1990).
///
/// ```
/// use sootline::fire::hot_layer::{Forced, deal_beyler_rise_k};
///
/// // By hand: 1000 / (2.4·1.0 + 0.030638·130) = 1000 / 6.3829 = 156.7 K.
/// let room = Forced { heat_release_kw: 1000.0, mass_flow_kg_s: 2.4, conductance_kw_k: 0.030638 * 130.0,
///                     ambient_temperature_k: 293.0, specific_heat_kj_kgk: 1.0 };
/// assert!((deal_beyler_rise_k(room) - 156.7).abs() < 0.1);
/// ```
#[must_use]
pub fn deal_beyler_rise_k(room: Forced) -> f64 {
    room.heat_release_kw.max(0.0)
        / (room.mass_flow_kg_s * room.specific_heat_kj_kgk + room.conductance_kw_k)
}

/// What a time exceeds of the range of [`deal_beyler_rise_k`].
#[must_use]
pub fn deal_beyler_limits(time_s: f64) -> Exceeded {
    Exceeded::none().when(
        time_s > 2000.0,
        "later than about 2000 s, the end of the fitted tests",
    )
}

/// A steady fire in a shut room.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Closed {
    /// Heat release, kW.
    pub heat_release_kw: f64,
    /// Time since it began, s.
    pub time_s: f64,
    /// Thermal inertia of the linings, weighted by area, kW² s/(m⁴ K²).
    pub inertia_kw2_s_m4k2: f64,
    /// Walls, ceiling and floor, m².
    pub bounding_area_m2: f64,
    /// Air in the room, kg.
    pub air_mass_kg: f64,
    /// Specific heat of the air, kJ/(kg K).
    pub specific_heat_kj_kgk: f64,
}

/// Rise of the gas in a shut room with a steady fire, in K, by Beyler.
///
/// ```text
/// ΔT = 2 K2/K1² ( K1 √t - 1 + e^(-K1 √t) )
/// K1 = 2 · 0.4 √(kρc) A_T / (m c_p)      K2 = Q / (m c_p)
/// ```
///
/// | symbol | field                  | unit           |
/// |--------|------------------------|----------------|
/// | `Q`    | `heat_release_kw`      | kW             |
/// | `t`    | `time_s`               | s              |
/// | `kρc`  | `inertia_kw2_s_m4k2`   | kW² s/(m⁴ K²)  |
/// | `A_T`  | `bounding_area_m2`     | m²             |
/// | `m`    | `air_mass_kg`          | kg             |
/// | `c_p`  | `specific_heat_kj_kgk` | kJ/(kg K)      |
///
/// Several prints leave `A_T` out of `K1`; then it has not the unit s^(-1/2), so it must stand there.
/// Range: see [`beyler_closed_limits`].
///
/// Source: [`BEYLER_1991`](crate::fire::sources::BEYLER_1991).
///
/// ```
/// use sootline::fire::hot_layer::{Closed, beyler_closed_rise_k};
///
/// // By hand: kρc = 0.00016·790·0.9 = 0.11376, K1 = 0.8·0.33728·94/72 = 0.35227, K2 = 1.38889,
/// // K1√200 = 4.9819: 2·1.38889/0.124095 · (4.9819 - 1 + 0.00686) = 89.3 K.
/// let room = Closed { heat_release_kw: 100.0, time_s: 200.0, inertia_kw2_s_m4k2: 0.11376, bounding_area_m2: 94.0,
///                     air_mass_kg: 72.0, specific_heat_kj_kgk: 1.0 };
/// assert!((beyler_closed_rise_k(room) - 89.3).abs() < 0.1);
/// ```
#[must_use]
pub fn beyler_closed_rise_k(room: Closed) -> f64 {
    let capacity_kj_k = room.air_mass_kg * room.specific_heat_kj_kgk;
    let k1 = 2.0 * 0.4 * room.inertia_kw2_s_m4k2.sqrt() * room.bounding_area_m2 / capacity_kj_k;
    let k2 = room.heat_release_kw.max(0.0) / capacity_kj_k;
    let x = k1 * room.time_s.max(0.0).sqrt();
    // x - 1 + e^(-x) loses all digits for a small x: e^(-x) - 1 is what `exp_m1` keeps.
    if k1 > 0.0 {
        2.0 * k2 / (k1 * k1) * (x + (-x).exp_m1())
    } else {
        k2 * room.time_s.max(0.0)
    }
}

/// What a state exceeds of the range of [`beyler_closed_rise_k`]: shut but leaky enough not to build up
/// pressure, and oxygen not yet short, which limits the heat to `air mass × 13.1 MJ/kg × 8 %`.
#[must_use]
pub fn beyler_closed_limits(room: Closed, rise_k: f64) -> Exceeded {
    let released_kj = room.heat_release_kw * room.time_s;
    Exceeded::none()
        .when(
            released_kj
                > super::oxygen::usable_heat_kj(room.air_mass_kg, super::oxygen::LIMIT_AT_AMBIENT),
            "more heat than the oxygen of the shut room yields",
        )
        .when(
            rise_k > 150.0,
            "rise above 150 K, where the lost gas mass begins to matter",
        )
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::{assert_relative_eq, relative_eq};
    use proptest::prelude::*;

    fn vented(heat_release_kw: f64, width_m: f64, height_m: f64, conductance_kw_k: f64) -> Vented {
        Vented {
            heat_release_kw,
            opening: WallOpening {
                area_m2: width_m * height_m,
                height_m,
            },
            conductance_kw_k,
        }
    }

    #[test]
    fn the_vented_rise_is_what_others_worked_out() {
        for (room, expected_k, origin) in [
            (
                vented(300.0, 0.8, 2.0, 0.03 * 44.48),
                212.39,
                "by hand: plaster room, 300 kW",
            ),
            (
                vented(500.0, 0.9, 2.0, 0.010_692 * 60.713),
                365.0,
                "by hand: board room, 500 kW",
            ),
            (
                vented(1000.0, 2.0, 1.2, 0.054_16 * 105.6),
                277.53,
                "by hand: concrete room, 1000 kW",
            ),
        ] {
            let got_k = mccaffrey_rise_k(room);
            assert!(
                relative_eq!(got_k, expected_k, max_relative = 5e-3),
                "{origin}: {got_k}"
            );
        }
    }

    #[test]
    fn the_two_prints_of_the_vented_rise_agree_within_two_percent() {
        // 480 (Q/(√g c_p ρ T A√H))^(2/3) (h A/(√g c_p ρ A√H))^(-1/3) for 295 K, the other print of the same paper.
        let room = vented(300.0, 0.8, 2.0, 0.03 * 44.48);
        let group = 9.81_f64.sqrt() * 1.0 * 1.2 * room.opening.factor_m5_2();
        let other_k = 480.0
            * (room.heat_release_kw / (group * 295.0)).powf(2.0 / 3.0)
            * (room.conductance_kw_k / group).powf(-1.0 / 3.0);

        assert_relative_eq!(mccaffrey_rise_k(room), other_k, max_relative = 0.02);
    }

    #[test]
    fn flashover_by_610_is_a_rise_of_about_500_k() {
        // (500/6.85)^1.5 = 623.6, printed 610: 1.5 % less rise.
        let room = vented(
            610.0 * (1.2 * 0.9 * 2.0_f64.powf(1.5)).sqrt(),
            0.9,
            2.0,
            1.2,
        );

        assert_relative_eq!(mccaffrey_rise_k(room), 492.7, max_relative = 1e-3);
    }

    #[test]
    fn the_vented_rise_grows_with_heat_over_its_whole_range() {
        let mut last_k = 0.0;
        for step in 1..400 {
            let rise_k = mccaffrey_rise_k(vented(10.0 * f64::from(step), 0.9, 2.0, 0.6));
            assert!(rise_k.is_finite() && rise_k > last_k);
            last_k = rise_k;
        }
        assert_eq!(mccaffrey_rise_k(vented(0.0, 0.9, 2.0, 0.6)), 0.0);
    }

    #[test]
    fn limits_of_the_vented_rise_lie_at_20_and_600_k() {
        let room = vented(300.0, 0.8, 2.0, 1.3);

        assert!(
            mccaffrey_limits(room, 20.0).is_empty() && mccaffrey_limits(room, 600.0).is_empty()
        );
        assert!(
            !mccaffrey_limits(room, 19.9).is_empty() && !mccaffrey_limits(room, 600.1).is_empty()
        );
    }

    #[test]
    fn measured_places_matter_less_than_mowrer_and_williamson_say() {
        for position in [Position::Centre, Position::Wall, Position::Corner] {
            let (low, high) = measured_position_factor(position);
            assert!(low <= high && high <= mowrer_williamson_factor(position));
        }
    }

    const BOARD: Surface = Surface {
        area_m2: 60.713,
        conductivity_w_mk: 0.17,
        density_kg_m3: 790.0,
        specific_heat_j_kgk: 900.0,
        thickness_m: 0.0159,
    };

    #[test]
    fn the_time_of_a_steady_fire_is_the_one_worked_by_hand() {
        // 500 kW from the start: 300 K needs h A = (6.85/300)³ · 500²/2.5456 = 1.16914 kW/K, h = 0.0192568, so
        // t = kρc/h² = 0.12087/0.000370826 = 325.9 s. But the board is warmed through after 264.3 s, when h falls below: 264.3 s.
        let mut room = GrowingVented {
            fire: DesignFire {
                growth_kw_s2: 1e6,
                peak_kw: 500.0,
                energy_kj: 1e6,
                decay_from_share: 0.7,
            },
            opening: WallOpening {
                area_m2: 1.8,
                height_m: 2.0,
            },
            surfaces: &[BOARD],
            position_factor: 1.0,
        };
        let time_s = mccaffrey_time_to_rise_s(&room, 300.0).unwrap().unwrap();
        assert_relative_eq!(time_s, 264.3, max_relative = 1e-3);

        // 270 K needs h A = 1.60377 kW/K, h = 0.0264156, t = 0.12087/0.00069778 = 173.2 s: before that.
        let time_s = mccaffrey_time_to_rise_s(&room, 270.0).unwrap().unwrap();
        assert_relative_eq!(time_s, 173.2, max_relative = 2e-3);

        // The same fire in a corner by a factor 1.7: 459 K are as 270 K.
        room.position_factor = 1.7;
        let time_s = mccaffrey_time_to_rise_s(&room, 459.0).unwrap().unwrap();
        assert_relative_eq!(time_s, 173.2, max_relative = 2e-3);
    }

    #[test]
    fn heat_that_comes_through_the_lining_in_the_decay_is_not_missed() {
        // Steady until 125 000 kJ / 500 kW = 250 s, then down over 2·65 840/500 = 263 s. The board is warmed through at 264.3 s with
        // 473 kW left: the rise falls from 250 s on and then jumps by 2^(1/3), above all it was.
        let fire = DesignFire {
            growth_kw_s2: 1e6,
            peak_kw: 500.0,
            energy_kj: 190_840.0,
            decay_from_share: 0.655,
        };
        let room = GrowingVented {
            fire,
            opening: WallOpening {
                area_m2: 1.8,
                height_m: 2.0,
            },
            surfaces: &[BOARD],
            position_factor: 1.0,
        };
        let jump_s = penetration_time_s(&BOARD);
        let rise_at = |time_s| {
            mccaffrey_rise_k(Vented {
                heat_release_kw: fire.heat_release_kw(time_s),
                opening: room.opening,
                conductance_kw_k: total_conductance_kw_k(room.surfaces, time_s),
            })
        };
        let before_k = rise_at(fire.phases().decay_start_s).max(rise_at(jump_s * (1.0 - 1e-9)));
        let after_k = rise_at(jump_s);
        assert!(after_k > 1.05 * before_k);

        let found = mccaffrey_time_to_rise_s(&room, 0.5 * (before_k + after_k)).unwrap();

        assert_relative_eq!(found.unwrap(), jump_s, max_relative = 1e-6);
        assert_eq!(mccaffrey_time_to_rise_s(&room, 1.01 * after_k), Ok(None));
    }

    #[test]
    fn numbers_that_are_not_finite_are_told() {
        let room = GrowingVented {
            fire: DesignFire {
                growth_kw_s2: 0.01,
                peak_kw: 500.0,
                energy_kj: f64::INFINITY,
                decay_from_share: 0.7,
            },
            opening: WallOpening {
                area_m2: 1.8,
                height_m: 2.0,
            },
            surfaces: &[BOARD],
            position_factor: 1.0,
        };

        assert!(mccaffrey_time_to_rise_s(&room, 500.0).is_err());
    }

    proptest! {
        #[test]
        fn the_time_to_a_rise_is_the_first_time_it_is_there(
            growth in 0.001..0.3_f64, peak in 100.0..5000.0_f64, fuel in 1e4..1e7_f64, width in 0.1..4.0_f64, rise in 30.0..900.0_f64,
        ) {
            let fire = DesignFire { growth_kw_s2: growth, peak_kw: peak, energy_kj: fuel, decay_from_share: 0.7 };
            let opening = WallOpening { area_m2: 2.0 * width, height_m: 2.0 };
            let room = GrowingVented { fire, opening, surfaces: &[BOARD], position_factor: 1.0 };
            let rise_at = |time_s: f64| mccaffrey_rise_k(Vented {
                heat_release_kw: fire.heat_release_kw(time_s),
                opening,
                conductance_kw_k: total_conductance_kw_k(&[BOARD], time_s),
            });
            let samples = (1..=400).map(|i| fire.duration_s() * f64::from(i) / 400.0);

            match mccaffrey_time_to_rise_s(&room, rise).unwrap() {
                Some(time_s) => {
                    prop_assert!(rise_at(time_s) >= rise * (1.0 - 1e-9));
                    let mut earlier = samples.filter(|&at_s| at_s < time_s - 0.011);
                    prop_assert!(earlier.all(|at_s| rise_at(at_s) < rise));
                }
                None => {
                    let mut any = samples;
                    prop_assert!(any.all(|at_s| rise_at(at_s) < rise));
                }
            }
        }
    }

    fn forced(conductance_kw_k: f64) -> Forced {
        Forced {
            heat_release_kw: 1000.0,
            mass_flow_kg_s: 2.4,
            conductance_kw_k,
            ambient_temperature_k: 293.0,
            specific_heat_kj_kgk: 1.0,
        }
    }

    #[test]
    fn both_forced_forms_give_what_others_worked_out_and_agree() {
        // By hand: 1000 kW, 2.4 kg/s, 130 m² of concrete after 300 s: 142.5 K and 156.7 K.
        let foote_k = foote_pagni_alvares_rise_k(forced(0.076_59 * 130.0));
        let deal_k = deal_beyler_rise_k(forced(0.030_64 * 130.0));

        assert_relative_eq!(foote_k, 142.5, max_relative = 5e-3);
        assert_relative_eq!(deal_k, 156.7, max_relative = 5e-3);
        assert_relative_eq!(foote_k, deal_k, max_relative = 0.3);
    }

    #[test]
    fn a_lumped_loss_gives_the_closed_form() {
        // Derived: Q/(m c_p + hA) = 500/(0.6·1.005 + 0.02·40) = 356.38 K.
        let room = Forced {
            heat_release_kw: 500.0,
            mass_flow_kg_s: 0.6,
            conductance_kw_k: 0.8,
            ambient_temperature_k: 293.0,
            specific_heat_kj_kgk: 1.005,
        };
        assert_relative_eq!(deal_beyler_rise_k(room), 356.38, max_relative = 1e-4);
    }

    #[test]
    fn more_air_cools_and_more_heat_warms_a_forced_room() {
        for step in 1..100 {
            let flow = 0.05 * f64::from(step);
            let less = Forced {
                mass_flow_kg_s: flow,
                ..forced(4.0)
            };
            let more = Forced {
                mass_flow_kg_s: flow + 0.05,
                ..forced(4.0)
            };
            let hotter = Forced {
                heat_release_kw: 1200.0,
                ..less
            };
            for rise in [foote_pagni_alvares_rise_k, deal_beyler_rise_k] {
                assert!(rise(more) < rise(less) && rise(hotter) > rise(less));
            }
        }
        assert!(!foote_pagni_alvares_limits(forced(4.0), 142.0).is_empty());
        assert!(deal_beyler_limits(2000.0).is_empty() && !deal_beyler_limits(2001.0).is_empty());
    }

    fn closed(time_s: f64, inertia_kw2_s_m4k2: f64) -> Closed {
        Closed {
            heat_release_kw: 100.0,
            time_s,
            inertia_kw2_s_m4k2,
            bounding_area_m2: 94.0,
            air_mass_kg: 72.0,
            specific_heat_kj_kgk: 1.0,
        }
    }

    #[test]
    fn the_closed_rise_is_what_others_worked_out() {
        // By hand, with A_T in K1: 89.3 K.
        assert_relative_eq!(
            beyler_closed_rise_k(closed(200.0, 0.113_76)),
            89.3,
            max_relative = 5e-3
        );
    }

    #[test]
    fn the_closed_rise_has_both_ends_right() {
        // Early: all heat in the gas, Q t/(m c_p). Late: the loss decides, Q √t / (0.4 √(kρc) A_T).
        let early = closed(0.01, 0.113_76);
        assert_relative_eq!(
            beyler_closed_rise_k(early),
            100.0 * 0.01 / 72.0,
            max_relative = 0.03
        );
        let late = closed(1e8, 0.113_76);
        let steady_k = 100.0 * 1e4 / (0.4 * 0.113_76_f64.sqrt() * 94.0);
        assert_relative_eq!(beyler_closed_rise_k(late), steady_k, max_relative = 0.01);
        assert_relative_eq!(beyler_closed_rise_k(closed(50.0, 0.0)), 100.0 * 50.0 / 72.0);
        assert_eq!(beyler_closed_rise_k(closed(0.0, 0.1)), 0.0);
    }

    #[test]
    fn a_closed_room_short_of_oxygen_is_told() {
        // 72 kg of air yield 72 · 0.0815 · 13 100 = 76 871 kJ, which 100 kW use in 769 s.
        assert!(beyler_closed_limits(closed(760.0, 0.113_76), 100.0).is_empty());
        assert!(!beyler_closed_limits(closed(780.0, 0.113_76), 100.0).is_empty());
    }
}
