//! Findings made up by hand, for tests of how they are told. No number here was computed.

use std::borrow::Cow;
use std::collections::BTreeMap;

use crate::assessment::findings::*;
use crate::domain::assumptions::{Assumptions, GrowthClass, Level, Scenario};
use crate::domain::building::Building;
use crate::domain::ids::{AssessmentId, BuildingId};
use crate::domain::quantity::{RoomHeight, RoomLength, WaterFlow};
use crate::domain::room::{Ceiling, FloorPlan, Hazard, Linings, Place, Room, RoomKind};
use crate::domain::time::Timestamp;
use crate::domain::{Key, Named};

use super::head::Head;

pub const BAND: Band = Band { low: 250.4, typical: 311.96, high: 420.123 };

pub fn key(text: &str) -> Key {
    Key::new(text).unwrap()
}

pub fn reason(key: &'static str, text: &'static str) -> Option<Reason> {
    Some(Reason { key, text: Cow::Borrowed(text) })
}

fn figure(method: &'static str, quantity: &'static str, value: f64) -> Figure {
    Figure {
        method,
        quantity,
        value,
        in_range: false,
        exceeded: vec!["opening higher than 2 m"],
        unverified: true,
        scenario: Some(Scenario::DoorOpen),
    }
}

pub fn flashover() -> FlashoverFinding {
    FlashoverFinding {
        rating: FlashoverRating::Likely,
        probability: None,
        time_s: Some(BAND),
        time_to_600_c_s: Some(BAND),
        time_to_20_kw_m2_s: None,
        reason: None,
        required_heat_release_kw: Some(1909.376),
        required_lowest_kw: Some(1207.4),
        available_heat_release_kw: Some(2200.0),
        limited_by: Some(LimitedBy::Fuel),
        scenario: Some(Scenario::DoorOpen),
        before_water: Some(true),
        before_water_case: Some(BeforeWater::InEveryCase),
        provisional: true,
        provisional_because: vec![Cow::Borrowed("fuel_load_mj_m2")],
        holds_while: Vec::new(),
        not_covered: vec![NotCovered { key: "spread", text: Cow::Borrowed("Fire that comes from outside.") }],
        figures: vec![
            figure("babrauskas_flashover", "required_heat_release_kw", 1909.376),
            figure("thomas_flashover", "required_heat_release_kw", f64::NAN),
        ],
        clauses: vec!["2.2"],
    }
}

pub fn backdraft() -> BackdraftFinding {
    BackdraftFinding {
        rating: BackdraftRating::CannotBeExcluded,
        probability: None,
        outcome: BackdraftOutcome::NotAssessed,
        scenario: Some(Scenario::ShutLate),
        opening: Some(key("d")),
        dangerous_from_s: None,
        dangerous_until_s: None,
        beyond_horizon: false,
        ignition_delay_s: None,
        peak_overpressure_pa: None,
        pressure_band: None,
        elements_failing: Vec::new(),
        fireball_reach_m: None,
        limited_by: Some(LimitedBy::UnburnedFuel),
        excess_fuel_mj_kg: Some(Band { low: 2.1, typical: 3.456_78, high: 5.0 }),
        layer_temperature_c: Some(Band { low: 300.0, typical: 412.3456, high: 500.0 }),
        flame_out_s: Some(BAND),
        reason: reason("screen", "The gas holds more unburned fuel than the screen excludes."),
        provisional: true,
        provisional_because: vec![Cow::Borrowed("leakage_class")],
        holds_while: Vec::new(),
        not_covered: Vec::new(),
        figures: vec![figure("excess_fuel_gas", "excess_fuel_mj_kg", 3.456_78)],
        clauses: vec!["2.7"],
    }
}

fn entry() -> EntryFinding {
    EntryFinding {
        rating: FlashoverRating::NotAssessed,
        probability: None,
        scenario: None,
        opening: None,
        opened_at_s: None,
        time_to_flashover_s: None,
        time_to_260_c_s: None,
        time_to_10_kw_m2_s: None,
        state_at_opening: None,
        openings_tried: Vec::new(),
        reason: reason("needs_transient", "needs level transient"),
        provisional: true,
        holds_while: Vec::new(),
        not_covered: Vec::new(),
        figures: Vec::new(),
    }
}

pub fn room(name: &str) -> RoomFindings {
    let milestone = |kind, at: f64, crew: Option<f64>| Milestone {
        kind,
        fire_clock_s: Band { low: at, typical: at, high: at },
        crew_clock_s: crew.map(|at| Band { low: at, typical: at, high: at }),
        scenario: None,
        subject: None,
    };
    let water = figure("royer_nelson_fire_flow", "water_l_min", 42.345_678);
    RoomFindings {
        key: key(name),
        name: format!("The {name}"),
        flashover: flashover(),
        backdraft: backdraft(),
        entry: entry(),
        transient: None,
        scenarios: vec![ScenarioFinding {
            scenario: Scenario::DoorOpen,
            rating: FlashoverRating::Likely,
            opening_area_m2: 1.8,
            opening_height_m: 2.0,
            available_kw: Some(2200.0),
            required_lowest_kw: Some(1207.4),
            required_highest_kw: Some(1909.376),
            limited_by: Some(LimitedBy::Fuel),
            time_s: Some(BAND),
            openings: vec![OpeningState {
                key: key("d"),
                open_fraction: 1.0,
                counted_area_m2: 1.8,
                because: "stands open: someone fled",
            }],
            starved: Some(StarvedFinding {
                rating: BackdraftRating::CannotBeExcluded,
                excess_fuel_mj_kg: Band { low: 2.1, typical: 3.456_78, high: 5.0 },
                threshold_mj_kg: 3.000_01,
                layer_temperature_c: Band { low: 300.0, typical: 412.3456, high: 500.0 },
                flame_out_s: BAND,
            }),
            reason: None,
        }],
        growth_strip: vec![GrowthFinding {
            growth: GrowthClass::UltraFast,
            growth_kw_s2: 0.187_555,
            rating: FlashoverRating::Expected,
            time_s: Some(101.0123),
            before_water: Some(true),
        }],
        fire: FireFinding {
            item_of_origin: Some(key("sofa")),
            place: Place::Corner,
            growth_kw_s2: 0.046_888,
            growth_from: "item",
            fuel_limit_kw: 2200.0,
            energy_p50_mj: 6000.0,
            energy_mj: 7905.6,
            fractile: 0.8,
            energy_p95_mj: 10_000.4,
            incubation_s: None,
            joined: vec![Joined { key: key("desk"), at_s: 120.055, distance_m: 0.5 }],
        },
        clock: ClockFinding {
            detected_by: DetectedBy::SeenOutside,
            detection_s: BAND,
            call_s: BAND,
            call_to_water_s: 500.0,
            water_on_fire_s: Band { low: 750.0, typical: 812.0, high: 920.0 },
            floor_setup_s: 60.0,
        },
        smoke: SmokeFinding {
            time_to_2_m_s: Some(BAND),
            time_to_1_m_s: None,
            next_door: vec![SmokeNextDoor {
                opening: key("d"),
                room: key("hall"),
                time_open_s: Some(120.0),
                time_shut_s: None,
            }],
            reason: reason("not_reached", "The layer does not come down to 1 m within the horizon."),
            figures: Vec::new(),
        },
        large_space: None,
        protection: vec![ProtectionFinding {
            kind: "self_closer",
            credited: false,
            acts_at_s: Some(BAND),
            heat_release_kw: Some(400.0),
            flashover_without: FlashoverRating::Likely,
            flashover_with: FlashoverRating::Possible,
            before_water_without: Some(true),
            before_water_with: Some(false),
            words: "Shuts the door on detection.".to_owned(),
            figures: Vec::new(),
        }],
        water: Some(WaterFinding {
            figures: vec![water],
            needed_l_min: 42.345_678,
            available_l_min: Some(4000.0),
            enough: Some(true),
        }),
        hazards: vec![HazardFinding {
            hazard: Hazard::NotRecorded,
            text: "Nobody recorded whether hazards are present.",
            bars_not_indicated: false,
        }],
        linings: vec![LiningFinding {
            surface: "walls",
            material: "gypsum_board".to_owned(),
            combustible: false,
            least_growth_kw_s2: None,
            penetration_s: 250.05,
            words: None,
        }],
        timeline: vec![
            milestone(MilestoneKind::EstablishedBurning, 0.0, None),
            milestone(MilestoneKind::Call, 312.0, Some(0.0)),
        ],
        assumptions: vec![
            Assumed {
                room: Some(key(name)),
                field: Cow::Borrowed("linings.walls.thickness_m"),
                value: AssumedValue::Number(0.012_700_1),
                source: Cow::Borrowed("a table of boards"),
                provenance: Provenance::Memory,
            },
            assumed_of_building(),
        ],
        wanted: vec![Wanted {
            key: "hazards",
            text: Cow::Borrowed("Record the hazards, or that there are none."),
        }],
        methods: vec![method("babrauskas_flashover"), method("royer_nelson_fire_flow")],
        cautions: vec![
            Caution {
                key: "wind",
                text: Cow::Borrowed("Wind is taken as still air; follow local procedures."),
            },
            Caution { key: "planning_only", text: Cow::Borrowed("A text that the building says already.") },
        ],
    }
}

fn assumed_of_building() -> Assumed {
    Assumed {
        room: None,
        field: Cow::Borrowed("response.travel_s"),
        value: AssumedValue::Number(240.0),
        source: Cow::Borrowed("common practice"),
        provenance: Provenance::Estimated,
    }
}

fn method(key: &'static str) -> MethodUsed {
    MethodUsed { key, title: "A method", source: "A publication", provenance: Provenance::Seen }
}

pub fn findings(rooms: Vec<RoomFindings>) -> BuildingFindings {
    BuildingFindings {
        engine_version: "1.0.0",
        rating_rule: 1,
        catalogue_digest: "c0ffee".to_owned(),
        input_digest: "beef".to_owned(),
        level: Level::Screening,
        seed: 0,
        ranking: rooms
            .iter()
            .enumerate()
            .map(|(at, room)| Ranked {
                place: at + 1,
                room: room.key.clone(),
                flashover: room.flashover.rating,
                flashover_time_s: room.flashover.time_s.map(|band| band.typical),
                before_water: room.flashover.before_water,
                backdraft: room.backdraft.rating,
                entry: room.entry.rating,
            })
            .collect(),
        rooms,
        assumptions: vec![assumed_of_building()],
        methods: vec![
            method("babrauskas_flashover"),
            method("nobody_uses_this_here"),
            method("royer_nelson_fire_flow"),
        ],
        cautions: Vec::new(),
    }
}

pub fn building(rooms: &[RoomFindings]) -> Building {
    let rooms = rooms
        .iter()
        .map(|found| Room {
            key: found.key.clone(),
            name: found.name.clone(),
            kind: RoomKind::Room,
            room_use: Named::Catalogue("storage".to_owned()),
            floor: -1,
            plan: FloorPlan::Rectangle {
                length_m: RoomLength::new(3.6576).unwrap(),
                width_m: RoomLength::new(3.6).unwrap(),
            },
            height_m: RoomHeight::new(2.43845).unwrap(),
            position: None,
            ceiling: Ceiling::default(),
            leakage_class: None,
            leakage_area_m2: None,
            mechanical: None,
            linings: Linings::default(),
            fuel_load_mj_m2: None,
            fuel_packages: Vec::new(),
            storage: None,
            hazards: vec![Hazard::NotRecorded],
            detectors: Vec::new(),
            sprinkler_heads: None,
            basis: BTreeMap::new(),
        })
        .collect();
    Building {
        name: "Harbour Row 12".to_owned(),
        reference: Some("417-B".to_owned()),
        address: Default::default(),
        location: None,
        occupancy_group: None,
        construction_type: None,
        inspected_on: None,
        notes: String::new(),
        floors: Vec::new(),
        response: Default::default(),
        water_available_l_min: WaterFlow::new(4000.0),
        alarm_monitored: None,
        sprinklers: Default::default(),
        occupants: Default::default(),
        preplan: Default::default(),
        rooms,
        openings: Vec::new(),
        boundaries: Vec::new(),
    }
}

pub fn head<'a>(building: &'a Building, assumptions: &'a Assumptions) -> Head<'a> {
    Head {
        building,
        assumptions,
        assessment_id: Some(AssessmentId(uuid::Uuid::from_u128(0x0190_0000_0000_7000_8000_0000_0000_0001))),
        building_id: Some(BuildingId(uuid::Uuid::from_u128(0x0190_0000_0000_7000_8000_0000_0000_0002))),
        building_revision: Some(7),
        created_at: Some(Timestamp(1_796_116_500_123_000)),
    }
}
