//! What the transient runs gave.

use std::borrow::Cow;

use serde::Serialize;
use utoipa::ToSchema;

use super::figure::{NotCovered, Range, each, number, range};
use super::number::Number;
use super::words::{PlaceWord, ScenarioWord};
use crate::assessment::findings;

/// Time series of the room of origin in the governing scenario, at no more than 121 times; every list is as long as
/// `time_s`.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = RoomSeries)]
pub struct Series {
    /// The scenario.
    pub scenario: ScenarioWord,
    /// On the fire clock.
    pub time_s: Vec<Option<Number>>,
    /// Hot layer.
    pub upper_temperature_c: Vec<Option<Number>>,
    /// Cool layer.
    pub lower_temperature_c: Vec<Option<Number>>,
    /// Lower face of the hot layer above the floor.
    pub interface_height_m: Vec<Option<Number>>,
    /// Radiation on the floor.
    pub floor_heat_flux_kw_m2: Vec<Option<Number>>,
    /// Oxygen of the hot layer, share by volume of wet gas.
    pub upper_oxygen_mole_fraction: Vec<Option<Number>>,
    /// Carbon monoxide of the hot layer, share by volume of wet gas.
    pub upper_carbon_monoxide_mole_fraction: Vec<Option<Number>>,
    /// At the floor, against outside air.
    pub pressure_pa: Vec<Option<Number>>,
    /// In the room.
    pub heat_release_kw: Vec<Option<Number>>,
}

impl Series {
    /// None where no run is kept.
    pub(super) fn of(found: &findings::TransientFinding) -> Option<Self> {
        let points = &found.series;
        let list =
            |of: fn(&findings::Point) -> f64| points.iter().map(|point| Number::of(of(point))).collect();
        (!points.is_empty()).then(|| Self {
            scenario: found.scenario.into(),
            time_s: list(|point| point.at_s),
            upper_temperature_c: list(|point| point.upper_temperature_c),
            lower_temperature_c: list(|point| point.lower_temperature_c),
            interface_height_m: list(|point| point.layer_height_m),
            floor_heat_flux_kw_m2: list(|point| point.floor_flux_kw_m2),
            upper_oxygen_mole_fraction: list(|point| point.oxygen_percent * 1e-2),
            upper_carbon_monoxide_mole_fraction: list(|point| point.carbon_monoxide_ppm * 1e-6),
            pressure_pa: list(|point| point.pressure_pa),
            heat_release_kw: list(|point| point.heat_release_kw),
        })
    }
}

/// A run of a scenario with typical inputs.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = ScenarioRun)]
pub struct Run {
    /// The scenario; `shut_late` may stand twice, by when the door was shut.
    pub scenario: ScenarioWord,
    /// What there is to say of it.
    #[schema(required)]
    pub reason: Option<Cow<'static, str>>,
    /// Where the fire burned.
    pub place: PlaceWord,
    /// When everything that can be shut was shut.
    #[schema(required)]
    pub shut_at_s: Option<Number>,
    /// The earlier of both criteria, on the fire clock; null where neither is met.
    #[schema(required)]
    pub flashover_s: Option<Number>,
    /// Hot layer 600 °C for 10 s.
    #[schema(required)]
    pub time_to_600_c_s: Option<Number>,
    /// 20 kW/m² on the floor for 10 s.
    #[schema(required)]
    pub time_to_20_kw_m2_s: Option<Number>,
    /// When the first flame went out for want of oxygen.
    #[schema(required)]
    pub flame_out_s: Option<Number>,
    /// Hottest layer, until flashover by both criteria or the end of the run.
    #[schema(required)]
    pub peak_layer_temperature_c: Option<Number>,
    /// Most on the floor.
    #[schema(required)]
    pub peak_floor_heat_flux_kw_m2: Option<Number>,
    /// Least oxygen in the hot layer, share by volume.
    #[schema(required)]
    pub least_oxygen_mole_fraction: Option<Number>,
    /// Most carbon monoxide in the hot layer, share by volume.
    #[schema(required)]
    pub peak_carbon_monoxide_mole_fraction: Option<Number>,
    /// Most heat release in the room.
    #[schema(required)]
    pub peak_heat_release_kw: Option<Number>,
    /// Most above outside air, at the floor.
    #[schema(required)]
    pub peak_pressure_pa: Option<Number>,
    /// Most below it, as a negative number.
    #[schema(required)]
    pub suction_pa: Option<Number>,
}

impl From<&findings::RunFinding> for Run {
    fn from(run: &findings::RunFinding) -> Self {
        Self {
            scenario: run.scenario.into(),
            reason: run.reason.as_ref().map(|reason| reason.text.clone()),
            place: run.place.into(),
            shut_at_s: number(run.shut_at_s),
            flashover_s: number(run.flashover_s),
            time_to_600_c_s: number(run.time_to_600_c_s),
            time_to_20_kw_m2_s: number(run.time_to_20_kw_m2_s),
            flame_out_s: number(run.flame_out_s),
            peak_layer_temperature_c: Number::of(run.peak_layer_temperature_c),
            peak_floor_heat_flux_kw_m2: Number::of(run.peak_floor_flux_kw_m2),
            least_oxygen_mole_fraction: Number::of(run.least_oxygen_percent * 1e-2),
            peak_carbon_monoxide_mole_fraction: Number::of(run.peak_carbon_monoxide_ppm * 1e-6),
            peak_heat_release_kw: Number::of(run.peak_heat_release_kw),
            peak_pressure_pa: Number::of(run.peak_pressure_pa),
            suction_pa: Number::of(run.suction_pa),
        }
    }
}

/// The governing scenario at one corner.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = CornerRun)]
pub struct Corner {
    /// Fire load and growth: `low` or `high`.
    pub fire: &'static str,
    /// Heat into linings, and leakage: `low` or `high`.
    pub shell: &'static str,
    /// Flashover, on the fire clock; null where it does not come.
    #[schema(required)]
    pub flashover_s: Option<Number>,
    /// Hottest layer.
    #[schema(required)]
    pub peak_layer_temperature_c: Option<Number>,
}

impl From<&findings::CornerFinding> for Corner {
    fn from(corner: &findings::CornerFinding) -> Self {
        Self {
            fire: corner.fire,
            shell: corner.shell,
            flashover_s: number(corner.flashover_s),
            peak_layer_temperature_c: Number::of(corner.peak_layer_temperature_c),
        }
    }
}

/// A door of the shut room, pressed by the fire. Friction is not counted, nor a closer where none is recorded.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct DoorForce {
    /// The door.
    pub opening: String,
    /// `in`, `out` or `both`, seen from this room; null where it is not recorded: then as it moves worst.
    #[schema(required)]
    pub swing: Option<&'static str>,
    /// Most out of the room.
    #[schema(required)]
    pub peak_pressure_pa: Option<Range>,
    /// Most into it, as a negative number.
    #[schema(required)]
    pub suction_pa: Option<Range>,
    /// Force at the handle that opens it while the pressure is highest; negative: the pressure throws it open.
    #[schema(required)]
    pub force_at_peak_n: Option<Range>,
    /// The same while the suction is strongest.
    #[schema(required)]
    pub force_at_suction_n: Option<Range>,
    /// One of both is above the 133 N that practice allows.
    pub over_limit: bool,
}

impl From<&findings::DoorForceFinding> for DoorForce {
    fn from(door: &findings::DoorForceFinding) -> Self {
        Self {
            opening: door.opening.to_string(),
            swing: door.swing,
            peak_pressure_pa: range(Some(door.peak_pressure_pa)),
            suction_pa: range(Some(door.suction_pa)),
            force_at_peak_n: range(Some(door.force_at_peak_n)),
            force_at_suction_n: range(Some(door.force_at_suction_n)),
            over_limit: door.over_limit,
        }
    }
}

/// When a place of the way out is lost to somebody who stays in it.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct WayOutLost {
    /// The room.
    pub room: String,
    /// `standing`, head at 1.5 m, or `crawling`, at 0.9 m.
    pub posture: &'static str,
    /// Dose of gas or heat that counts, each alone: 0.3, or 0.1 where people sleep or need help.
    #[schema(required)]
    pub dose: Option<Number>,
    /// When it is lost, on the fire clock; null where it is not within the horizon.
    #[schema(required)]
    pub lost_s: Option<Range>,
    /// `gas`, `heat`, `visibility` or `layer`.
    #[schema(required)]
    pub cause: Option<&'static str>,
}

impl From<&findings::WayOutFinding> for WayOutLost {
    fn from(way: &findings::WayOutFinding) -> Self {
        Self {
            room: way.room.to_string(),
            posture: way.posture,
            dose: Number::of(way.dose),
            lost_s: range(way.lost_s),
            cause: way.cause,
        }
    }
}

/// When a published thermal class is reached 1 m above the floor of the room of origin.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct CrewClass {
    /// Whose classes: `donnelly`, `foster_roberts` or `utech`.
    pub scheme: &'static str,
    /// The class.
    pub class: &'static str,
    /// When it is reached, on the fire clock; null where it is not within the horizon.
    #[schema(required)]
    pub reached_s: Option<Range>,
    /// Shortest stay in it that is published.
    #[schema(required)]
    pub stay_from_s: Option<Number>,
    /// Longest.
    #[schema(required)]
    pub stay_to_s: Option<Number>,
}

impl From<&findings::CrewFinding> for CrewClass {
    fn from(crew: &findings::CrewFinding) -> Self {
        Self {
            scheme: crew.scheme,
            class: crew.class,
            reached_s: range(crew.reached_s),
            stay_from_s: Number::of(crew.stay_from_s),
            stay_to_s: Number::of(crew.stay_to_s),
        }
    }
}

/// A room that smoke or fire reaches through openings.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct RoomReached {
    /// The room.
    pub room: String,
    /// Smoke that one sees less than 10 m through hangs below its ceiling.
    #[schema(required)]
    pub smoke_s: Option<Range>,
    /// Its contents take fire.
    #[schema(required)]
    pub fire_s: Option<Range>,
    /// Hottest layer.
    #[schema(required)]
    pub peak_layer_temperature_c: Option<Number>,
    /// Lowest that the layer hangs.
    #[schema(required)]
    pub lowest_interface_height_m: Option<Number>,
}

impl From<&findings::ReachedFinding> for RoomReached {
    fn from(reached: &findings::ReachedFinding) -> Self {
        Self {
            room: reached.room.to_string(),
            smoke_s: range(reached.smoke_s),
            fire_s: range(reached.fire_s),
            peak_layer_temperature_c: Number::of(reached.peak_layer_temperature_c),
            lowest_interface_height_m: Number::of(reached.lowest_layer_m),
        }
    }
}

/// An opening that gave way in the governing scenario.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct OpeningGaveWay {
    /// The opening.
    pub opening: String,
    /// When, on the fire clock.
    #[schema(required)]
    pub at_s: Option<Number>,
    /// `glass_fell`, `burned_through` or `pressure`.
    pub how: &'static str,
}

impl From<&findings::GaveWayFinding> for OpeningGaveWay {
    fn from(gave_way: &findings::GaveWayFinding) -> Self {
        Self { opening: gave_way.opening.to_string(), at_s: Number::of(gave_way.at_s), how: gave_way.how }
    }
}

/// A number of the room and its fire beside those of the experiments.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct ValidationPlace {
    /// Which.
    pub number: &'static str,
    /// Here; null where it has no meaning.
    #[schema(required)]
    pub value: Option<Number>,
    /// Least of the experiments.
    #[schema(required)]
    pub lowest: Option<Number>,
    /// Greatest.
    #[schema(required)]
    pub highest: Option<Number>,
    /// It lies within.
    pub inside: bool,
}

impl From<&findings::PlaceNumber> for ValidationPlace {
    fn from(place: &findings::PlaceNumber) -> Self {
        Self {
            number: place.number,
            value: number(place.value),
            lowest: number(place.lowest),
            highest: number(place.highest),
            inside: place.inside,
        }
    }
}

/// A figure of the screen that differs from the run by more than the published scatter.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
pub struct ScreenDisagrees {
    /// What differs.
    pub quantity: &'static str,
    /// By screening.
    #[schema(required)]
    pub screening: Option<Number>,
    /// By the run.
    #[schema(required)]
    pub transient: Option<Number>,
    /// In a sentence.
    pub text: String,
}

impl From<&findings::Disagreement> for ScreenDisagrees {
    fn from(differs: &findings::Disagreement) -> Self {
        Self {
            quantity: differs.quantity,
            screening: number(differs.screening),
            transient: number(differs.transient),
            text: differs.words.clone(),
        }
    }
}

/// What the transient runs of this room's fire gave, through the whole building.
#[derive(Debug, Clone, PartialEq, Serialize, ToSchema)]
#[schema(as = TransientFindings)]
pub struct Transient {
    /// The scenario that governs.
    pub scenario: ScenarioWord,
    /// Every scenario with typical inputs.
    pub runs: Vec<Run>,
    /// The governing scenario at its four corners.
    pub corners: Vec<Corner>,
    /// Most above outside air in the room shut, at its floor.
    #[schema(required)]
    pub peak_pressure_pa: Option<Range>,
    /// Most below it, as a negative number.
    #[schema(required)]
    pub suction_pa: Option<Range>,
    /// Doors of the room shut.
    pub doors: Vec<DoorForce>,
    /// The way out in the governing scenario: the room of origin, then every room that is lost.
    pub way_out: Vec<WayOutLost>,
    /// Crews in the room of origin.
    pub crew: Vec<CrewClass>,
    /// Rooms that smoke or fire reaches through openings, in order of time. Never a list of rooms that it leaves alone.
    pub rooms_reached: Vec<RoomReached>,
    /// Openings that gave way in the governing scenario.
    pub gave_way: Vec<OpeningGaveWay>,
    /// The room's place beside the experiments that the runs were compared with.
    pub validation_place: Vec<ValidationPlace>,
    /// Where the screen disagrees.
    pub disagreements: Vec<ScreenDisagrees>,
    /// What was not computed.
    pub not_covered: Vec<NotCovered>,
    /// What a reader should know of the runs.
    pub notes: Vec<&'static str>,
    /// Runs made.
    pub run_count: usize,
    /// Steps that they took.
    pub step_count: usize,
}

impl From<&findings::TransientFinding> for Transient {
    fn from(found: &findings::TransientFinding) -> Self {
        Self {
            scenario: found.scenario.into(),
            runs: each(&found.runs),
            corners: each(&found.corners),
            peak_pressure_pa: range(found.peak_pressure_pa),
            suction_pa: range(found.suction_pa),
            doors: each(&found.doors),
            way_out: each(&found.way_out),
            crew: each(&found.crew),
            rooms_reached: each(&found.reached),
            gave_way: each(&found.gave_way),
            validation_place: each(&found.place),
            disagreements: each(&found.disagreements),
            not_covered: each(&found.not_covered),
            notes: found.notes.clone(),
            run_count: found.run_count,
            step_count: found.step_count,
        }
    }
}
