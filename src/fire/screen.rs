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
    /// By [`flashover::mccaffrey_kw`], with the conductance at the end of the steady burning, when it asks for least.
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
