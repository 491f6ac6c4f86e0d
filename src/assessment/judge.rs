//! One room, one state, one fire: the heat release that is there against the heat release required.

use super::inputs::Inputs;
use super::openings::State;
use crate::fire::DesignFire;
use crate::fire::Exceeded;
use crate::fire::excess_fuel::{self, AftergasShare, ExcessFuel, ExcessInput};
use crate::fire::flashover::{self, Enclosure, LIMIT_20_KW_M2_FLOOR, LIMIT_600_C_GAS_K};
use crate::fire::hot_layer::{GrowingVented, Position, mccaffrey_time_to_rise_s, measured_position_factor};
use crate::fire::linings::{Surface, conductance_limits, total_area_m2, total_conductance_kw_k};
use crate::fire::oxygen::{LimitingOxygen, ShutBurn, ShutRoom, burn_shut};
use crate::fire::radiation::{HotLayer, layer_temperature_for_flux_k, overhead_view_factor};

/// What decides a rating.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Judged {
    /// Heat release that is reached, kW.
    pub available_kw: f64,
    /// Lowest and highest required by the correlations in range, kW; none in a shut room.
    pub required_kw: Option<(f64, f64)>,
    /// Available over highest and over lowest required; in a shut room the rise over that to 600 °C.
    pub to_highest: f64,
    pub to_lowest: f64,
    pub limit: Limit,
    /// How the fire of a shut room ended, and what gas it left.
    pub excess: Option<ExcessFuel>,
}

impl Judged {
    /// How the fire of a shut room ended.
    pub fn burn(&self) -> Option<ShutBurn> {
        self.excess.map(|excess| excess.burn)
    }
}

/// What holds the fire down.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Limit {
    Fuel,
    Air,
    Oxygen,
}

/// The enclosure of the correlations.
pub(super) fn enclosure(state: &State, surfaces: &[Surface]) -> Enclosure {
    Enclosure {
        bounding_area_m2: total_area_m2(surfaces),
        opening_area_m2: state.wall.area_m2,
        opening_height_m: state.wall.height_m,
    }
}

/// The shut room of the oxygen method.
pub(super) fn shut_room<'s>(inputs: &Inputs<'_>, leak_m2: f64, surfaces: &'s [Surface]) -> ShutRoom<'s> {
    ShutRoom {
        volume_m3: inputs.geometry.volume_m3,
        height_m: inputs.geometry.height_m,
        leakage_area_m2: leak_m2,
        surfaces,
        ambient_temperature_k: inputs.ambient_k,
        limit: LimitingOxygen::TYPICAL,
    }
}

/// Judges a fire with all the air it wants in a room that stands so.
pub(super) fn judge(inputs: &Inputs<'_>, state: &State, fire: DesignFire, surfaces: &[Surface]) -> Judged {
    if state.is_open() {
        judge_open(state, fire, surfaces, inputs.horizon.open_s)
    } else {
        judge_excess(&fire, excess_in(inputs, fire, surfaces, state.leak_m2), inputs.ambient_k)
    }
}

/// The screen for unburned gas of a shut room.
pub(super) fn excess_in(
    inputs: &Inputs<'_>,
    fire: DesignFire,
    surfaces: &[Surface],
    leak_m2: f64,
) -> ExcessFuel {
    excess_fuel::screen(&ExcessInput {
        fire,
        room: shut_room(inputs, leak_m2, surfaces),
        aftergas: aftergas(inputs),
        horizon_s: inputs.horizon.shut_s,
        heat_of_combustion_kj_kg: inputs.contents.heat_of_combustion_kj_kg,
    })
}

/// What hot fuel and linings give off after the flame is out.
pub(super) fn aftergas(inputs: &Inputs<'_>) -> AftergasShare {
    if inputs.lined.combustible {
        AftergasShare::COMBUSTIBLE_LINING
    } else {
        AftergasShare::NONCOMBUSTIBLE_LINING
    }
}

fn judge_open(state: &State, fire: DesignFire, surfaces: &[Surface], horizon_s: f64) -> Judged {
    let fuel_kw = reached_by(&fire, horizon_s).0;
    let (available_kw, hottest_s) = reached_by(&state.admits(fire), horizon_s);
    let required = Required::of(enclosure(state, surfaces), surfaces, hottest_s);
    let (lowest_kw, highest_kw) = required.span_kw();
    Judged {
        available_kw,
        required_kw: Some((lowest_kw, highest_kw)),
        to_highest: ratio(available_kw, highest_kw),
        to_lowest: ratio(available_kw, lowest_kw),
        limit: if available_kw < fuel_kw { Limit::Air } else { Limit::Fuel },
        excess: None,
    }
}

/// Heat release that a fire has reached by the horizon of the fire clock, kW, and when its lining is warmest while it
/// has it: at the end of the steady burning, or at the horizon. On the clock of the curve, s.
pub(super) fn reached_by(fire: &DesignFire, horizon_s: f64) -> (f64, f64) {
    let phases = fire.phases();
    let end_s = FireClock::of(fire).on_curve_s(horizon_s);
    if end_s < phases.growth_end_s {
        (phases.heat_release_kw(fire.growth_kw_s2, end_s), end_s)
    } else {
        (phases.reached_kw, phases.decay_start_s.min(end_s))
    }
}

/// Judges a shut room by how its fire ended.
fn judge_excess(fire: &DesignFire, excess: ExcessFuel, ambient_k: f64) -> Judged {
    let state = excess.burn.state;
    let share = ((state.peak_temperature_k - ambient_k) / (LIMIT_600_C_GAS_K - ambient_k)).max(0.0);
    Judged {
        available_kw: fire.heat_release_kw(state.time_s),
        required_kw: None,
        to_highest: share,
        to_lowest: share,
        limit: if excess.burn.starved { Limit::Oxygen } else { Limit::Fuel },
        excess: Some(excess),
    }
}

fn ratio(available_kw: f64, required_kw: f64) -> f64 {
    if available_kw <= 0.0 || required_kw <= 0.0 { 0.0 } else { available_kw / required_kw }
}

/// What the three correlations ask for, and what of their ranges the room exceeds.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Required {
    pub babrauskas: (f64, Exceeded),
    pub thomas: (f64, Exceeded),
    pub mccaffrey: (f64, Exceeded),
}

impl Required {
    /// With the conductance of the lining at a time of the fire's curve.
    pub fn of(room: Enclosure, surfaces: &[Surface], at_s: f64) -> Self {
        let conductance_kw_k = total_conductance_kw_k(surfaces, at_s);
        let of_lining = flashover::mccaffrey_limits(room).and(conductance_limits(surfaces));
        Self {
            babrauskas: (flashover::babrauskas_kw(room), flashover::babrauskas_limits(room)),
            thomas: (flashover::thomas_kw(room), flashover::thomas_limits(room)),
            mccaffrey: (flashover::mccaffrey_kw(room, conductance_kw_k), of_lining),
        }
    }

    /// Lowest and highest of those in range; of all three where none is.
    pub fn span_kw(&self) -> (f64, f64) {
        let all = [&self.babrauskas, &self.thomas, &self.mccaffrey];
        let any_in_range = all.iter().any(|(_, exceeded)| exceeded.is_empty());
        all.iter()
            .filter(|(_, exceeded)| exceeded.is_empty() || !any_in_range)
            .fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), (kw, _)| (low.min(*kw), high.max(*kw)))
    }
}

/// Moments of flashover on the fire clock, s; none where they never come.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub(super) struct Moments {
    pub layer_600_c_s: Option<f64>,
    pub floor_20_kw_m2_s: Option<f64>,
    /// The fire has the heat that the highest correlation asks for.
    pub by_heat_s: Option<f64>,
}

impl Moments {
    /// The earliest of the three.
    pub fn earliest_s(&self) -> Option<f64> {
        [self.layer_600_c_s, self.floor_20_kw_m2_s, self.by_heat_s]
            .into_iter()
            .flatten()
            .min_by(f64::total_cmp)
    }
}

/// Factor on the rise for the place of the fire, at the worst of centre and corner: the corner, with the
/// span that measured rooms support. Typical is its middle.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct PlaceFactor {
    pub low: f64,
    pub typical: f64,
    pub high: f64,
}

pub(super) const CORNER: PlaceFactor = {
    let (low, high) = measured_position_factor(Position::Corner);
    PlaceFactor { low, typical: 0.5 * (low + high), high }
};

/// When flashover comes in a room that stands open.
pub(super) fn moments(
    inputs: &Inputs<'_>,
    state: &State,
    fire: DesignFire,
    surfaces: &[Surface],
    place_factor: f64,
) -> Moments {
    if !state.is_open() {
        return Moments {
            layer_600_c_s: shut_reaches_600_c_s(inputs, state, &fire, surfaces),
            ..Moments::default()
        };
    }
    let fire = state.admits(fire);
    let growing = GrowingVented { fire, opening: state.wall, surfaces, position_factor: place_factor };
    let clock = FireClock::of(&fire);
    let horizon_s = inputs.horizon.open_s;
    let on_the_clock = |curve_s: f64| Some(clock.at_s(curve_s)).filter(|&at_s| at_s <= horizon_s);
    // A search that does not settle counts as "never": the rating does not rest on it.
    let time_to_rise_s =
        |rise_k: f64| mccaffrey_time_to_rise_s(&growing, rise_k).ok().flatten().and_then(on_the_clock);
    let hottest_s = reached_by(&fire, horizon_s).1;
    let (_, highest_kw) = Required::of(enclosure(state, surfaces), surfaces, hottest_s).span_kw();
    Moments {
        layer_600_c_s: time_to_rise_s(LIMIT_600_C_GAS_K - inputs.ambient_k),
        floor_20_kw_m2_s: time_to_rise_s(floor_flux_rise_k(inputs, state)),
        by_heat_s: fire.time_to_kw_s(highest_kw).and_then(on_the_clock),
    }
}

/// When the gas of a shut room is at 600 °C, on the fire clock; hardly any shut room gets there.
fn shut_reaches_600_c_s(
    inputs: &Inputs<'_>,
    state: &State,
    fire: &DesignFire,
    surfaces: &[Surface],
) -> Option<f64> {
    let room = shut_room(inputs, state.leak_m2, surfaces);
    let until = |horizon_s: f64| burn_shut(fire, &room, horizon_s).state;
    let whole = until(inputs.horizon.shut_s);
    if whole.peak_temperature_k < LIMIT_600_C_GAS_K {
        return None;
    }
    // The peak until a time only grows with the time: halving finds the first at which it is there.
    let (mut from_s, mut to_s) = (0.0, whole.time_s);
    while to_s - from_s > 0.5 {
        let middle_s = 0.5 * (from_s + to_s);
        if until(middle_s).peak_temperature_k < LIMIT_600_C_GAS_K {
            from_s = middle_s
        } else {
            to_s = middle_s
        }
    }
    Some(FireClock::of(fire).at_s(to_s))
}

/// Rise of the layer at which it sends 20 kW/m² to the middle of the floor.
///
/// Thick smoke, its lower face half way up the opening, a floor at ambient temperature. What flames and hot
/// walls add is left out.
pub(super) fn floor_flux_rise_k(inputs: &Inputs<'_>, state: &State) -> f64 {
    let face_m = (0.5 * state.wall.height_m).min(0.9 * inputs.geometry.height_m);
    let layer = HotLayer {
        temperature_k: 0.0,
        emissivity: 1.0,
        view_factor: overhead_view_factor(inputs.geometry.length_m, inputs.geometry.width_m, face_m)
            .max(0.05),
        surface_temperature_k: inputs.ambient_k,
    };
    layer_temperature_for_flux_k(layer, LIMIT_20_KW_M2_FLOOR) - inputs.ambient_k
}

/// Turns times of a fire's curve into times of the fire clock, whose zero is established burning.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct FireClock {
    established_s: f64,
}

impl FireClock {
    pub fn of(fire: &DesignFire) -> Self {
        Self { established_s: fire.established_s().unwrap_or(0.0) }
    }

    /// A time of the curve on the fire clock; what comes before established burning counts as its zero.
    pub fn at_s(self, curve_s: f64) -> f64 {
        (curve_s - self.established_s).max(0.0)
    }

    /// A time of the fire clock on the curve.
    pub fn on_curve_s(self, fire_clock_s: f64) -> f64 {
        fire_clock_s + self.established_s
    }
}
