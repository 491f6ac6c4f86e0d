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
        .when(room.mass_flow_kg_s <= 0.0, "no forced flow: the closed-room form counts instead")
        .when(
            !(150.0..=490.0).contains(&room.heat_release_kw),
            "heat release outside the 150 to 490 kW of the tests",
        )
        .when(
            !(0.11..=0.325).contains(&room.mass_flow_kg_s),
            "air flow outside the 0.11 to 0.325 kg/s of the tests",
        )
        .when(rise_k > 300.0, "layer hotter than the 100 to 300 °C of the tests")
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
    room.heat_release_kw.max(0.0) / (room.mass_flow_kg_s * room.specific_heat_kj_kgk + room.conductance_kw_k)
}

/// What a time exceeds of the range of [`deal_beyler_rise_k`].
#[must_use]
pub fn deal_beyler_limits(time_s: f64) -> Exceeded {
    Exceeded::none().when(time_s > 2000.0, "later than about 2000 s, the end of the fitted tests")
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
    if k1 > 0.0 { 2.0 * k2 / (k1 * k1) * (x + (-x).exp_m1()) } else { k2 * room.time_s.max(0.0) }
}

/// What a state exceeds of the range of [`beyler_closed_rise_k`]: shut but leaky enough not to build up
/// pressure, and oxygen not yet short, which limits the heat to `air mass × 13.1 MJ/kg × 8 %`.
#[must_use]
pub fn beyler_closed_limits(room: Closed, rise_k: f64) -> Exceeded {
    let released_kj = room.heat_release_kw * room.time_s;
    Exceeded::none()
        .when(
            released_kj > super::oxygen::usable_heat_kj(room.air_mass_kg, super::oxygen::LIMIT_AT_AMBIENT),
            "more heat than the oxygen of the shut room yields",
        )
        .when(rise_k > 150.0, "rise above 150 K, where the lost gas mass begins to matter")
}
