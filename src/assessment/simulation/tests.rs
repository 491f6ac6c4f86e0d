//! Runs as the engine takes them, and what comes of them.

use std::ops::ControlFlow;

use super::*;
use crate::domain::Named;
use crate::domain::opening::{OpeningKind, Space};
use crate::domain::properties::{DetectorKind, DetectorProperties};
use crate::domain::quantity::{
    AirFlow, AirTemperature, Angle, Distance, FireDiameter, Fraction, LeakageArea, OpeningSide,
    OutputInterval, RoomHeight, RoomLength, RunTime, Sill, Span, WindSpeed,
};
use crate::domain::room::Place;
use crate::domain::simulation::{
    Ambient, Detector, Fan, Fire, HeatRelease, Ignition, LeakageSplit, Linings, Move, Opening, Room, Sheet,
    Sprinkler, Supply, Zoning,
};
use crate::fire::two_zone as engine;

fn key(text: &str) -> Key {
    Key::new(text).unwrap()
}

fn room(name: &str) -> Room {
    let gypsum = || vec![Sheet { material: Named::Catalogue("gypsum_board".to_owned()), thickness_m: None }];
    Room {
        key: key(name),
        length_m: RoomLength::new(4.0).unwrap(),
        width_m: RoomLength::new(3.0).unwrap(),
        height_m: RoomHeight::new(2.4).unwrap(),
        floor_elevation_m: crate::domain::quantity::Elevation::new(0.0).unwrap(),
        leakage_area_m2: LeakageArea::new(0.01).unwrap(),
        leakage_split: LeakageSplit { low: Fraction::new(0.25).unwrap(), high: Fraction::new(0.75).unwrap() },
        linings: Linings { walls: gypsum(), ceiling: gypsum(), floor: gypsum() },
        zoning: Zoning::TwoLayers,
    }
}

fn door(name: &str, connects: [Space; 2]) -> Opening {
    Opening {
        key: key(name),
        kind: OpeningKind::Door,
        connects,
        width_m: OpeningSide::new(0.8).unwrap(),
        height_m: OpeningSide::new(2.0).unwrap(),
        sill_m: Sill::new(0.0).unwrap(),
        open_fraction: Fraction::new(1.0).unwrap(),
        leakage_area_m2: LeakageArea::new(0.0).unwrap(),
        azimuth_deg: None,
        discharge_coefficient: None,
        gives_way: None,
    }
}

fn fire(name: &str, fuel: &str, points: &[(f64, f64)]) -> Fire {
    Fire {
        key: key(name),
        room: key("burn"),
        heat_release: HeatRelease::Points(points.to_vec()),
        base_height_m: Distance::new(0.0).unwrap(),
        diameter_m: FireDiameter::new(0.5).unwrap(),
        position: Place::Corner,
        radiative_fraction: None,
        fuel: Named::Catalogue(fuel.to_owned()),
        oxygen_limited: true,
        supply: Supply::Fed,
        ignites: Ignition::At(Span::new(0.0).unwrap()),
    }
}

fn run() -> Simulation {
    Simulation {
        rooms: vec![room("burn"), room("next")],
        openings: vec![
            door("inner", [Space::Room(key("burn")), Space::Room(key("next"))]),
            door("front", [Space::Room(key("next")), Space::Outside]),
        ],
        ambient: Ambient::default(),
        fires: vec![fire("first", "wood", &[(0.0, 100.0)])],
        schedule: Vec::new(),
        fans: Vec::new(),
        detectors: Vec::new(),
        sprinklers: Vec::new(),
        duration_s: RunTime::new(60.0).unwrap(),
        output_interval_s: OutputInterval::new(10.0).unwrap(),
        tolerance: None,
    }
}

fn prepared(run: &Simulation) -> Prepared {
    Prepared::of(run, Catalogue::embedded()).unwrap()
}

fn faults(run: &Simulation) -> Vec<(String, &'static str)> {
    let faults = Prepared::of(run, Catalogue::embedded()).unwrap_err();
    faults.into_iter().map(|fault| (fault.pointer.to_string(), fault.code)).collect()
}

fn notes(run: &Simulation) -> Vec<(&'static str, String)> {
    prepared(run).notes.iter().map(|note| (note.key, note.pointer.to_string())).collect()
}

#[test]
fn keys_become_places_and_degrees_kelvin() {
    let network = prepared(&run()).network;

    assert_eq!(network.openings[0].between, [engine::Side::Room(0), engine::Side::Room(1)]);
    assert_eq!(network.openings[1].between, [engine::Side::Room(1), engine::Side::Outside]);
    assert_eq!((network.fires[0].room, network.fires[0].fuel), (0, 0));
    assert_eq!(network.fires[0].position, engine::Position::Corner);
    assert_eq!((network.ambient.temperature_k, network.ambient.indoor_temperature_k), (293.15, 293.15));
    let room = &network.rooms[0];
    assert_eq!((room.leakage_low_m2, room.leakage_high_m2), (0.0025, 0.0075));
    // The catalogue's gypsum board: 12.5 mm, 0.17 W/(m K), 960 kg/m³.
    let slab = room.linings.ceiling[0];
    assert_eq!((slab.thickness_m, slab.conductivity_w_mk, slab.density_kg_m3), (0.0125, 0.17, 960.0));
    // Red oak radiates 37.1 %.
    assert_eq!(network.fires[0].radiative_fraction, 0.371);
}

#[test]
fn fires_of_one_fuel_share_it_and_a_fifth_fuel_is_too_many() {
    let mut run = run();
    run.fires = ["wood", "heptane", "wood"].map(|fuel| fire(fuel, fuel, &[(0.0, 10.0)])).to_vec();
    let network = prepared(&run).network;
    assert_eq!(network.fires.iter().map(|fire| fire.fuel).collect::<Vec<_>>(), [0, 1, 0]);

    run.fires = ["wood", "heptane", "methane", "propane", "polystyrene"]
        .map(|fuel| fire(fuel, fuel, &[(0.0, 10.0)]))
        .to_vec();

    assert_eq!(faults(&run), [("/fires/4/fuel".to_owned(), "too_many_fuels")]);
}

#[test]
fn nothing_burns_before_the_first_point() {
    let mut run = run();
    run.fires[0].heat_release = HeatRelease::Points(vec![(30.0, 100.0), (60.0, 200.0)]);

    let network = prepared(&run).network;

    let points = vec![(0.0, 0.0), (30.0, 0.0), (30.0, 100.0), (60.0, 200.0)];
    assert_eq!(network.fires[0].heat_release, engine::HeatRelease::Points(points));
}

#[test]
fn moves_are_sorted_by_time_and_keep_their_order_within_one() {
    let moved = |at_s, opening: &str, open_fraction| Move {
        at_s: Span::new(at_s).unwrap(),
        opening: key(opening),
        open_fraction: Fraction::new(open_fraction).unwrap(),
    };
    let mut run = run();
    run.schedule = vec![moved(30.0, "front", 0.0), moved(10.0, "inner", 0.5), moved(10.0, "inner", 0.25)];

    let schedule = prepared(&run).network.schedule;

    let told: Vec<_> = schedule.iter().map(|m| (m.at_s, m.opening, m.open_fraction)).collect();
    assert_eq!(told, [(10.0, 0, 0.5), (10.0, 0, 0.25), (30.0, 1, 0.0)]);
}

#[test]
fn a_fan_without_limits_has_limits_that_no_run_meets() {
    let mut run = run();
    run.fans = vec![Fan {
        key: key("extract"),
        from: Space::Room(key("burn")),
        to: Space::Outside,
        volume_flow_m3_s: AirFlow::new(0.5).unwrap(),
        inlet_height_m: None,
        outlet_height_m: None,
        stall_pa: None,
        starts_s: Span::new(0.0).unwrap(),
        stops_s: None,
    }];

    let fan = prepared(&run).network.fans[0];

    assert_eq!((fan.from, fan.to), (engine::Side::Room(0), engine::Side::Outside));
    assert_eq!((fan.inlet_height_m, fan.outlet_height_m), (1.2, 0.0));
    assert!(fan.stops_s > 86_400.0 && fan.stall_pa > 100_000.0);
}

fn detector(class: Named<DetectorProperties>) -> Detector {
    Detector { key: key("d"), room: key("burn"), class, from_fire_m: None }
}

#[test]
fn a_detector_answers_at_the_first_of_its_temperatures() {
    let none = DetectorProperties {
        kind: DetectorKind::HeatFixed,
        response_time_index_sqrt_ms: None,
        activation_c: None,
        activation_rise_k: None,
        activation_rate_k_min: None,
        activation_optical_density_1_m: Some(0.1),
    };
    let with = |rti, fixed_c, rise_k| DetectorProperties {
        response_time_index_sqrt_ms: rti,
        activation_c: fixed_c,
        activation_rise_k: rise_k,
        ..none.clone()
    };
    let mut run = run();
    run.ambient.indoor_temperature_c = AirTemperature::new(25.0);
    for (class, element) in [
        (with(None, None, Some(13.0)), engine::Element::Rise(13.0)),
        (with(None, Some(57.0), None), engine::Element::Rise(32.0)),
        (with(None, Some(57.0), Some(40.0)), engine::Element::Rise(32.0)),
        (with(Some(60.0), Some(57.0), None), engine::Element::Heat { rti_m05s05: 60.0, answers_k: 330.15 }),
        (
            with(Some(60.0), Some(90.0), Some(10.0)),
            engine::Element::Heat { rti_m05s05: 60.0, answers_k: 308.15 },
        ),
    ] {
        run.detectors = vec![detector(Named::Given(class))];

        let made = prepared(&run).network.detectors[0];

        assert_eq!(made.element, element);
        // Half of the diagonal of 4 m by 3 m.
        assert_eq!(made.from_fire_m, 2.5);
    }
    run.detectors = vec![detector(Named::Given(none))];
    assert_eq!(faults(&run), [("/detectors/0/class".to_owned(), "not_computed")]);
}

#[test]
fn every_detector_and_head_of_the_catalogue_can_be_run() {
    let mut run = run();
    for row in Catalogue::embedded().detectors() {
        run.detectors = vec![detector(Named::Catalogue(row.key.clone()))];
        prepared(&run);
    }
    for row in Catalogue::embedded().sprinklers() {
        let class = Named::Catalogue(row.key.clone());
        let head = Sprinkler {
            key: key("s"),
            room: key("burn"),
            class,
            from_fire_m: None,
            spray_density_mm_s: None,
        };
        run.sprinklers = vec![head];

        let made = prepared(&run).network.sprinklers[0];

        assert_eq!(made.density_mm_s, row.properties.spray_density_mm_s, "{}", row.key);
    }
}

#[test]
fn what_cannot_be_told_from_the_series_is_noted() {
    let quiet = run();
    // Hydrogen cyanide of oak is not in its row.
    assert_eq!(notes(&quiet), [("yield_not_known", "/fires/0/fuel".to_owned())]);

    let mut noted = run();
    noted.rooms[0].linings.floor = Vec::new();
    noted.rooms[0].leakage_area_m2 = LeakageArea::new(0.0).unwrap();
    noted.openings[0].open_fraction = Fraction::new(0.0).unwrap();
    noted.fires = vec![fire("cable", "pvc", &[(0.0, 10.0)])];
    noted.ambient.wind_m_s = WindSpeed::new(5.0).unwrap();

    assert_eq!(
        notes(&noted),
        [
            ("hydrogen_chloride_not_followed", "/fires/0/fuel".to_owned()),
            ("no_heat_through", "/rooms/0/linings".to_owned()),
            ("sealed", "/rooms/0".to_owned()),
            ("wind_meets_no_opening", "/ambient/wind_m_s".to_owned()),
        ]
    );
    noted.openings[1].azimuth_deg = Angle::new(90.0);
    assert!(!notes(&noted).iter().any(|(key, _)| *key == "wind_meets_no_opening"));
}

#[test]
fn a_room_is_sealed_only_if_no_way_out_leads_through_any_other() {
    let shut = Fraction::new(0.0).unwrap();
    let mut chain = run();
    for room in &mut chain.rooms {
        room.leakage_area_m2 = LeakageArea::new(0.0).unwrap();
    }
    let sealed = |run: &Simulation| notes(run).iter().filter(|(key, _)| *key == "sealed").count();
    assert_eq!(sealed(&chain), 0, "the inner room breathes through the outer one");

    chain.openings[1].open_fraction = shut;
    assert_eq!(sealed(&chain), 2);

    chain.openings[1].leakage_area_m2 = LeakageArea::new(0.01).unwrap();
    assert_eq!(sealed(&chain), 0);
}

#[test]
fn a_run_gives_every_room_and_opening_at_every_time() {
    let found = prepared(&run()).run(&mut || ControlFlow::Continue(())).unwrap();

    assert_eq!(found.time_s, [0.0, 10.0, 20.0, 30.0, 40.0, 50.0, 60.0]);
    let (burn, series) = &found.rooms[0];
    assert_eq!(burn, &key("burn"));
    for length in [series.upper_temperature_c.len(), series.heat_release_kw.len()] {
        assert_eq!(length, 7);
    }
    assert!((series.upper_temperature_c[0] - 20.0).abs() < 1e-6);
    assert!(series.upper_temperature_c[6] > 60.0, "100 kW warm a small room: {series:?}");
    // Dry air of 23.2 % by mass: 20.9 % by volume, as `gas` finds by hand.
    assert!((series.lower_oxygen_mole_fraction[0] - 0.2092).abs() < 1e-3);
    assert_eq!(found.openings[0].1.inflow_kg_s.len(), 7);
}

#[test]
fn a_run_that_is_told_to_stop_says_how_far_it_came() {
    let mut steps = 0;
    let mut watch = || {
        steps += 1;
        if steps > 3 { ControlFlow::Break(Stop) } else { ControlFlow::Continue(()) }
    };

    let broken = prepared(&run()).run(&mut watch).unwrap_err();

    assert!(matches!(broken, Broken::Stopped { at_s } if (0.0..60.0).contains(&at_s)), "{broken:?}");
}
