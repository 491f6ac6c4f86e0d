//! The layer of a room with a wall opening.

use crate::fire::design_fire::{DesignFire, Phases};
use crate::fire::linings::{Surface, penetration_time_s, total_conductance_kw_k};
use crate::fire::ventilation::WallOpening;
use crate::fire::{Exceeded, NotConverged, flashover, search};

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
        .when(room.opening.factor_m5_2() <= 0.0, "no wall opening: the correlation does not hold")
        .when(rise_k > 600.0, "rise above 600 K, the highest of the fit")
        .when(rise_k < 20.0, "rise below 20 K, the lowest of the fit")
        .when(room.opening.height_m > 2.7, "opening higher than the rooms of the fit (0.3 to 2.7 m)")
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
pub fn mccaffrey_time_to_rise_s(room: &GrowingVented<'_>, rise_k: f64) -> Result<Option<f64>, NotConverged> {
    // ΔT ≥ rise  ⇔  Q² ≥ (rise / (6.85 f))³ · A√H · Σ h_k A: no power in the loop.
    let per_factor_k = rise_k / (MCCAFFREY_RISE * room.position_factor);
    first_time_over_loss_s("time at which the hot layer has risen", room, per_factor_k.powi(3))
}

/// First time at which a growing fire has the heat release that
/// [`flashover::mccaffrey_kw`] asks for *at that time*, in s on the clock of the fire's curve.
///
/// The heat asked for falls as the lining warms through. The place of the fire is not in it.
///
/// # Errors
///
/// [`NotConverged`] where a number handed in is not finite.
pub fn mccaffrey_time_to_flashover_s(room: &GrowingVented<'_>) -> Result<Option<f64>, NotConverged> {
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
        heat_kw * heat_kw >= coefficient * factor_m5_2 * total_conductance_kw_k(room.surfaces, time_s)
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

#[cfg(test)]
mod tests {
    use super::*;
    use approx::{assert_relative_eq, relative_eq};
    use proptest::prelude::*;

    fn vented(heat_release_kw: f64, width_m: f64, height_m: f64, conductance_kw_k: f64) -> Vented {
        Vented {
            heat_release_kw,
            opening: WallOpening { area_m2: width_m * height_m, height_m },
            conductance_kw_k,
        }
    }

    #[test]
    fn the_vented_rise_is_what_others_worked_out() {
        for (room, expected_k, origin) in [
            (vented(300.0, 0.8, 2.0, 0.03 * 44.48), 212.39, "by hand: plaster room, 300 kW"),
            (vented(500.0, 0.9, 2.0, 0.010_692 * 60.713), 365.0, "by hand: board room, 500 kW"),
            (vented(1000.0, 2.0, 1.2, 0.054_16 * 105.6), 277.53, "by hand: concrete room, 1000 kW"),
        ] {
            let got_k = mccaffrey_rise_k(room);
            assert!(relative_eq!(got_k, expected_k, max_relative = 5e-3), "{origin}: {got_k}");
        }
    }

    #[test]
    fn the_two_prints_of_the_vented_rise_agree_within_two_percent() {
        // 480 (Q/(√g c_p ρ T A√H))^(2/3) (h A/(√g c_p ρ A√H))^(-1/3) for 295 K, the other print of
        // the same paper.
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
        let room = vented(610.0 * (1.2 * 0.9 * 2.0_f64.powf(1.5)).sqrt(), 0.9, 2.0, 1.2);

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

        assert!(mccaffrey_limits(room, 20.0).is_empty() && mccaffrey_limits(room, 600.0).is_empty());
        assert!(!mccaffrey_limits(room, 19.9).is_empty() && !mccaffrey_limits(room, 600.1).is_empty());
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
        // t = kρc/h² = 0.12087/0.000370826 = 325.9 s. But the board is warmed through after 264.3
        // s, when h falls below: 264.3 s.
        let mut room = GrowingVented {
            fire: DesignFire { growth_kw_s2: 1e6, peak_kw: 500.0, energy_kj: 1e6, decay_from_share: 0.7 },
            opening: WallOpening { area_m2: 1.8, height_m: 2.0 },
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
        // Steady until 125 000 kJ / 500 kW = 250 s, then down over 2·65 840/500 = 263 s. The board
        // is warmed through at 264.3 s with 473 kW left: the rise falls from 250 s on and then
        // jumps by 2^(1/3), above all it was.
        let fire =
            DesignFire { growth_kw_s2: 1e6, peak_kw: 500.0, energy_kj: 190_840.0, decay_from_share: 0.655 };
        let room = GrowingVented {
            fire,
            opening: WallOpening { area_m2: 1.8, height_m: 2.0 },
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
            opening: WallOpening { area_m2: 1.8, height_m: 2.0 },
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
}
