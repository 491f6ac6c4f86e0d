//! The flashover screen of one room in one scenario: the hot path.

use super::design_fire::DesignFire;
use super::flashover::{self, Enclosure, LIMIT_600_C_GAS_K};
use super::hot_layer::{self, GrowingVented, Vented};
use super::linings::{Surface, total_conductance_kw_k};
use super::ventilation::{kawagoe_limit_kw, kawagoe_limits};
use super::{Exceeded, NotConverged};

/// A room, its opening, its linings and the fire in it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ScreenInput<'a> {
    /// Surface and opening.
    pub enclosure: Enclosure,
    /// The linings.
    pub surfaces: &'a [Surface],
    /// The fire that the fuel allows; the screen cuts it at the ventilation limit.
    pub fire: DesignFire,
    /// Factor on the rise for the place of the fire; 1 in the middle.
    pub position_factor: f64,
    /// Ambient temperature, K.
    pub ambient_temperature_k: f64,
}

/// What one correlation asks for, and when the fire has it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Requirement {
    /// Heat release at flashover, kW.
    pub required_kw: f64,
    /// When the fire has it, s on the clock of the fire's curve; none where it never does.
    pub time_s: Option<f64>,
    /// Limits of the correlation that the room exceeds.
    pub exceeded: Exceeded,
}

/// What holds the fire down.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum LimitedBy {
    /// The fuel that burns at once.
    Fuel,
    /// The air through the opening.
    Ventilation,
}

/// The answer of [`flashover_screen`].
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Screen {
    /// By [`flashover::babrauskas_kw`].
    pub babrauskas: Requirement,
    /// By [`flashover::thomas_kw`].
    pub thomas: Requirement,
    /// By [`flashover::mccaffrey_kw`], with the conductance at the end of the steady burning, when
    /// it asks for least.
    pub mccaffrey: Requirement,
    /// Heat release that the air through the opening allows, kW.
    pub ventilation_limit_kw: f64,
    /// Limits of the ventilation rule that the room exceeds.
    pub ventilation_exceeded: Exceeded,
    /// Heat release that the fuel reaches with all the air it wants, kW.
    pub fuel_limit_kw: f64,
    /// Heat release that is reached: the lesser of the two limits.
    pub available_kw: f64,
    /// Which of them it is.
    pub limited_by: LimitedBy,
    /// The fire after the cut: its clock is that of all times here.
    pub fire: DesignFire,
    /// Highest rise of the hot layer, K.
    pub hot_layer_rise_k: f64,
    /// Limits of the rise that the room exceeds.
    pub hot_layer_exceeded: Exceeded,
    /// When the layer reaches 600 °C, s; none where it never does.
    pub time_to_600_c_s: Option<f64>,
}

impl Screen {
    /// The three correlations with their method keys, in the order of reports.
    #[must_use]
    pub fn requirements(&self) -> [(&'static str, &Requirement); 3] {
        [
            ("babrauskas_flashover", &self.babrauskas),
            ("thomas_flashover", &self.thomas),
            ("mccaffrey_flashover", &self.mccaffrey),
        ]
    }

    /// Lowest and highest heat release asked for by the correlations in range, kW; by all three where none is.
    #[must_use]
    pub fn required_span_kw(&self) -> (f64, f64) {
        let any_in_range = self.requirements().iter().any(|(_, r)| r.exceeded.is_empty());
        self.requirements()
            .iter()
            .filter(|(_, r)| !any_in_range || r.exceeded.is_empty())
            .fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), (_, r)| {
                (low.min(r.required_kw), high.max(r.required_kw))
            })
    }
}

/// Can this room flash over with this fire, and when: three correlations, both limits and the hot layer.
///
/// No heap, no power function in a loop: a few microseconds. A room without an opening gets a
/// ventilation limit of zero and says so in its limits; its oxygen counts instead
/// ([`oxygen`](super::oxygen)).
///
/// # Errors
///
/// [`NotConverged`] where a number handed in is not finite.
pub fn flashover_screen(input: &ScreenInput<'_>) -> Result<Screen, NotConverged> {
    let room = input.enclosure;
    let opening = room.opening();
    let ventilation_limit_kw = kawagoe_limit_kw(opening);
    let fuel_limit_kw = input.fire.reached_kw();
    let fire = input.fire.capped_kw(ventilation_limit_kw);
    let phases = fire.phases();
    let available_kw = phases.reached_kw;
    let limited_by =
        if ventilation_limit_kw < fuel_limit_kw { LimitedBy::Ventilation } else { LimitedBy::Fuel };

    let conductance_kw_k = total_conductance_kw_k(input.surfaces, phases.decay_start_s);
    let growing =
        GrowingVented { fire, opening, surfaces: input.surfaces, position_factor: input.position_factor };

    let babrauskas_kw = flashover::babrauskas_kw(room);
    let thomas_kw = flashover::thomas_kw(room);
    let vented = Vented { heat_release_kw: available_kw, opening, conductance_kw_k };
    let hot_layer_rise_k = input.position_factor * hot_layer::mccaffrey_rise_k(vented);
    let open = ventilation_limit_kw > 0.0;
    Ok(Screen {
        babrauskas: Requirement {
            required_kw: babrauskas_kw,
            time_s: fire.time_to_kw_s(babrauskas_kw).filter(|_| open),
            exceeded: flashover::babrauskas_limits(room),
        },
        thomas: Requirement {
            required_kw: thomas_kw,
            time_s: fire.time_to_kw_s(thomas_kw).filter(|_| open),
            exceeded: flashover::thomas_limits(room),
        },
        mccaffrey: Requirement {
            required_kw: if open { flashover::mccaffrey_kw(room, conductance_kw_k) } else { 0.0 },
            time_s: hot_layer::mccaffrey_time_to_flashover_s(&growing)?,
            exceeded: flashover::mccaffrey_limits(room),
        },
        ventilation_limit_kw,
        ventilation_exceeded: kawagoe_limits(opening),
        fuel_limit_kw,
        available_kw,
        limited_by,
        fire,
        hot_layer_rise_k,
        hot_layer_exceeded: hot_layer::mccaffrey_limits(vented, hot_layer_rise_k),
        time_to_600_c_s: hot_layer::mccaffrey_time_to_rise_s(
            &growing,
            LIMIT_600_C_GAS_K - input.ambient_temperature_k,
        )?,
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fire::ventilation::WallOpening;
    use approx::assert_relative_eq;
    use proptest::prelude::*;

    const BOARD: Surface = Surface {
        area_m2: 60.713,
        conductivity_w_mk: 0.17,
        density_kg_m3: 790.0,
        specific_heat_j_kgk: 900.0,
        thickness_m: 0.0159,
    };

    fn input(surfaces: &[Surface], opening: WallOpening, peak_kw: f64) -> ScreenInput<'_> {
        ScreenInput {
            enclosure: Enclosure::of_box(3.66, 3.66, 2.44, opening),
            surfaces,
            fire: DesignFire { growth_kw_s2: 0.0469, peak_kw, energy_kj: 4e6, decay_from_share: 0.7 },
            position_factor: 1.0,
            ambient_temperature_k: 293.15,
        }
    }

    const DOOR: WallOpening = WallOpening { area_m2: 1.8, height_m: 2.0 };

    #[test]
    fn one_room_is_screened_as_worked_by_hand() {
        // 750·2.54558 = 1909.2 kW, after √(1909.2/0.0469) = 201.8 s; 7.8·60.713 + 378·2.54558 =
        // 1435.8 kW, 175.0 s; 1500·2.54558 = 3818.4 kW of air; 610·√(0.010692·60.713·2.54558) =
        // 784.1 kW with the board warmed through.
        let screen = flashover_screen(&input(&[BOARD], DOOR, 3000.0)).unwrap();

        assert_relative_eq!(screen.babrauskas.required_kw, 1909.2, max_relative = 1e-4);
        assert_relative_eq!(screen.babrauskas.time_s.unwrap(), 201.8, max_relative = 1e-3);
        assert_relative_eq!(screen.thomas.required_kw, 1435.8, max_relative = 1e-4);
        assert_relative_eq!(screen.thomas.time_s.unwrap(), 175.0, max_relative = 1e-3);
        assert_relative_eq!(screen.mccaffrey.required_kw, 784.1, max_relative = 1e-4);
        assert_relative_eq!(screen.ventilation_limit_kw, 3818.4, max_relative = 1e-4);
        assert_eq!((screen.available_kw, screen.limited_by), (3000.0, LimitedBy::Fuel));

        // At that time Q² = 610² √(kρc/t) A √H A_T: 0.0469² t^4.5 = 372 100·√0.12087·154.55 gives t = 163.3 s.
        assert_relative_eq!(screen.mccaffrey.time_s.unwrap(), 163.3, max_relative = 1e-3);
    }

    #[test]
    fn air_cuts_the_fire_and_says_so() {
        let slit = WallOpening { area_m2: 0.4, height_m: 2.0 };
        let screen = flashover_screen(&input(&[BOARD], slit, 3000.0)).unwrap();

        // By hand: 1500·0.4·√2 = 848.5 kW.
        assert_relative_eq!(screen.available_kw, 848.5, max_relative = 1e-4);
        assert_eq!(screen.limited_by, LimitedBy::Ventilation);
        assert_eq!(screen.fuel_limit_kw, 3000.0);
    }

    #[test]
    fn a_room_without_an_opening_never_flashes_over_by_these_and_says_why() {
        let screen = flashover_screen(&input(&[BOARD], WallOpening::default(), 3000.0)).unwrap();

        assert_eq!(screen.available_kw, 0.0);
        for (_, requirement) in screen.requirements() {
            assert!(requirement.time_s.is_none() && !requirement.exceeded.is_empty());
        }
        assert!(screen.time_to_600_c_s.is_none() && screen.hot_layer_rise_k.is_finite());
    }

    #[test]
    fn the_span_leaves_out_what_is_out_of_range_unless_all_is() {
        let ordinary = flashover_screen(&input(&[BOARD], DOOR, 3000.0)).unwrap();
        let (low, high) = ordinary.required_span_kw();
        assert!(low == ordinary.mccaffrey.required_kw && high == ordinary.babrauskas.required_kw);

        let mut hall = input(&[BOARD], DOOR, 3000.0);
        hall.enclosure.bounding_area_m2 = 120.0;
        let hall = flashover_screen(&hall).unwrap();
        assert!(!hall.thomas.exceeded.is_empty());
        assert!(hall.required_span_kw().1 == hall.babrauskas.required_kw.max(hall.mccaffrey.required_kw));
    }

    #[test]
    fn methods_of_the_screen_stand_in_the_registry() {
        let screen = flashover_screen(&input(&[BOARD], DOOR, 3000.0)).unwrap();
        for (key, _) in screen.requirements() {
            assert!(crate::fire::methods::find(key).is_some(), "{key}");
        }
    }

    proptest! {
        #[test]
        fn a_time_stands_exactly_where_the_heat_suffices(
            growth in 0.001..0.3_f64, peak in 50.0..8000.0_f64, fuel in 1e4..1e7_f64, width in 0.02..4.0_f64,
        ) {
            let opening = WallOpening { area_m2: 2.0 * width, height_m: 2.0 };
            let mut input = input(&[BOARD], opening, peak);
            input.fire = DesignFire { growth_kw_s2: growth, peak_kw: peak, energy_kj: fuel, decay_from_share: 0.7 };
            let screen = flashover_screen(&input).unwrap();

            for requirement in [screen.babrauskas, screen.thomas] {
                prop_assert_eq!(requirement.time_s.is_some(), screen.available_kw >= requirement.required_kw);
            }
            // McCaffrey may still be met in the decay, where the lining is warmed through.
            if screen.available_kw >= screen.mccaffrey.required_kw {
                prop_assert!(screen.mccaffrey.time_s.is_some());
            }
            prop_assert!(screen.available_kw <= screen.ventilation_limit_kw.min(screen.fuel_limit_kw) * (1.0 + 1e-9));
            prop_assert!(screen.hot_layer_rise_k.is_finite());
        }
    }
}
