//! Every run ends: in a result, or in a fault that says where and why.

use std::ops::ControlFlow;

use sootline::fire::two_zone::{
    Ambient, Detector, Element, Ended, Failed, FailureReason, Fan, HeatRelease, Move, Network, Note, Plan,
    Sample, run,
};

use super::cases;
use super::support::{
    OUTSIDE, bare_room, board, board_room, constant, grown, hole, is_finite, lined, one_room, room, told,
    try_run, wood,
};

/// A room with a burning item and a door.
fn plain() -> Network {
    let mut network = one_room(board_room(4.0, 3.0, 2.5), vec![hole([room(0), OUTSIDE], 0.8, 2.0)], 0.0);
    network.fuels = vec![wood()];
    network.fires = vec![cases::a().network.fires[0].clone()];
    network
}

/// Ends well, all numbers numbers, balances kept.
#[track_caller]
fn ends_well(network: &Network, plan: &Plan) -> (Vec<Sample>, Ended) {
    let (samples, ended) = try_run(network, plan).unwrap_or_else(|failed| panic!("{failed:?}"));
    assert_eq!(samples.len(), plan.samples_s.len());
    assert!(samples.iter().all(is_finite));
    let balance = ended.balance;
    assert!(balance.mass_error_relative < 1e-8, "{balance:?}");
    assert!(balance.energy_error_relative < 1e-8, "{balance:?}");
    assert!(balance.element_error_relative < 1e-8, "{balance:?}");
    (samples, ended)
}

#[track_caller]
fn is_malformed(network: &Network, plan: &Plan) {
    let mut sampled = 0;
    let got = run(network, plan, &mut |_| sampled += 1, &mut || ControlFlow::Continue(()));
    match got {
        Err(Failed { at_s, reason: FailureReason::Malformed(why), .. }) => {
            assert!(at_s == 0.0 && !why.is_empty() && sampled == 0);
        }
        other => panic!("{other:?}"),
    }
}

#[test]
fn a_fire_larger_than_its_room_can_hold_ends() {
    let mut network = plain();
    network.fires[0].heat_release = grown(50_000.0);

    let (_, ended) = ends_well(&network, &Plan::every(30.0, 1800.0));

    assert!(ended.notes.contains(&Note::FlameBeyondCeiling(0)), "{:?}", ended.notes);
}

#[test]
fn a_fire_larger_than_its_room_whatever_the_oxygen_ends() {
    let mut network = plain();
    network.fires[0].heat_release = grown(50_000.0);
    network.fires[0].oxygen_limited = false;

    // No oxygen stops it: what cannot be is said, in a result or in a fault.
    match try_run(&network, &Plan::every(30.0, 1800.0)) {
        Ok((samples, ended)) => {
            assert!(samples.iter().all(is_finite));
            assert!(ended.notes.contains(&Note::HotterThanTried(0)), "{:?}", ended.notes);
        }
        Err(failed) => assert!(failed.at_s > 0.0 && failed.room == Some(0), "{failed:?}"),
    }
}

#[test]
fn a_sealed_room_with_a_fire_that_needs_no_oxygen_runs_away_in_pressure_and_says_so() {
    let mut network = plain();
    network.openings[0].open_fraction = 0.0;
    network.fires[0].oxygen_limited = false;
    network.fires[0].heat_release = constant(300.0);

    let (samples, ended) = ends_well(&network, &Plan::every(10.0, 600.0));

    assert!(ended.notes.contains(&Note::PressureBeyondBuildings(0)), "{:?}", ended.notes);
    assert!(samples.last().unwrap().rooms[0].pressure_pa > 10_000.0);
}

#[test]
fn a_sealed_room_with_a_growing_fire_that_needs_no_oxygen_ends() {
    let mut network = plain();
    network.openings[0].open_fraction = 0.0;
    network.fires[0].oxygen_limited = false;

    let (_, ended) = ends_well(&network, &Plan::every(10.0, 1800.0));

    assert!(ended.notes.contains(&Note::PressureBeyondBuildings(0)), "{:?}", ended.notes);
}

#[test]
fn a_sealed_room_with_a_fire_that_starves_ends() {
    let mut network = plain();
    network.openings[0].open_fraction = 0.0;

    ends_well(&network, &Plan::every(30.0, 3600.0));
}

#[test]
fn a_door_of_ten_square_metres_in_a_closet_of_two_ends() {
    let mut network = plain();
    network.rooms = vec![board_room(1.0, 2.0, 2.4)];
    network.openings = vec![hole([room(0), OUTSIDE], 5.0, 2.0)];

    let (samples, _) = ends_well(&network, &Plan::every(30.0, 1800.0));

    // As good as outside: below the layer the air of outside.
    assert!(samples.last().unwrap().rooms[0].lower.temperature_k < 400.0);
}

#[test]
fn linings_of_a_tenth_of_a_millimetre_end() {
    let mut network = plain();
    network.rooms[0].linings = lined(board(0.0001));

    ends_well(&network, &Plan::every(30.0, 1800.0));
}

#[test]
fn runs_of_a_second_and_of_a_day_end() {
    ends_well(&plain(), &Plan::every(0.1, 1.0));
    let (_, ended) = ends_well(&plain(), &Plan::every(600.0, 86_400.0));
    assert!(ended.work.steps < Plan::STEP_BUDGET / 10, "{:?}", ended.work);
}

#[test]
fn a_run_of_no_time_samples_the_start() {
    let (samples, _) = ends_well(&plain(), &Plan::every(1.0, 0.0));

    assert_eq!(samples.len(), 1);
    assert_eq!(samples[0].time_s, 0.0);
}

#[test]
fn cold_heat_and_height_end() {
    for outside_c in [-40.0, 50.0] {
        for (indoor_c, pressure_pa) in [(20.0, 101_325.0), (outside_c, 101_325.0), (20.0, 61_640.0)] {
            // 61.64 kPa: the standard atmosphere at 4000 m, from memory.
            let mut network = plain();
            network.ambient = Ambient {
                temperature_k: outside_c + 273.15,
                indoor_temperature_k: indoor_c + 273.15,
                pressure_pa,
                wind_m_s: 20.0,
                ..Ambient::default()
            };
            network.openings[0].azimuth_deg = Some(0.0);
            ends_well(&network, &Plan::every(30.0, 1800.0));
            network.openings[0].open_fraction = 0.0;
            network.rooms[0].leakage_low_m2 = 0.003;
            network.rooms[0].leakage_high_m2 = 0.003;
            ends_well(&network, &Plan::every(30.0, 1800.0));
        }
    }
}

#[test]
fn a_fan_far_too_strong_for_its_room_ends() {
    let mut network = plain();
    network.fans = vec![fan()];

    ends_well(&network, &Plan::every(30.0, 900.0));
}

fn fan() -> Fan {
    Fan {
        from: room(0),
        to: OUTSIDE,
        volume_flow_m3_s: 50.0,
        inlet_height_m: 2.4,
        outlet_height_m: 0.0,
        stall_pa: 5000.0,
        starts_s: 30.0,
        stops_s: 600.0,
    }
}

#[test]
fn a_megawatt_in_a_box_of_a_foot_beside_a_hall_ends_or_says_where_it_stopped() {
    let mut network = plain();
    network.rooms = vec![board_room(0.3, 0.3, 0.3), board_room(60.0, 40.0, 15.0)];
    network.openings = vec![hole([room(0), room(1)], 0.25, 0.25), hole([room(1), OUTSIDE], 4.0, 4.0)];
    // The box holds a tenth of a gram of air for every kilowatt: a run that stops must say when, where and why.
    if let Err(failed) = try_run(&network, &Plan::every(30.0, 900.0)) {
        assert_eq!((failed.room, failed.reason), (Some(0), FailureReason::StepTooSmall), "{failed:?}");
        assert!(failed.at_s > 0.0);
    }
    network.fires[0].room = 1;
    ends_well(&network, &Plan::every(30.0, 900.0));
}

#[test]
fn curves_that_go_back_in_time_are_refused() {
    let mut network = plain();
    network.fires[0].heat_release = HeatRelease::Points(vec![(0.0, 0.0), (100.0, 500.0), (50.0, 100.0)]);

    is_malformed(&network, &Plan::every(10.0, 600.0));
}

#[test]
fn numbers_that_cannot_be_are_refused() {
    let plan = Plan::every(10.0, 600.0);
    for bad in [f64::NAN, f64::INFINITY, -1.0] {
        let spoil: [fn(&mut Network, f64); 16] = [
            |n, x| n.rooms[0].length_m = x,
            |n, x| n.rooms[0].height_m = x,
            |n, x| n.rooms[0].leakage_low_m2 = x,
            |n, x| n.rooms[0].linings.walls[0].thickness_m = x,
            |n, x| n.rooms[0].linings.floor[0].conductivity_w_mk = x,
            |n, x| n.openings[0].width_m = x,
            |n, x| n.openings[0].height_m = x,
            |n, x| n.openings[0].sill_m = x,
            |n, x| n.openings[0].discharge_coefficient = x,
            |n, x| n.fires[0].diameter_m = x,
            |n, x| n.fires[0].base_height_m = x,
            |n, x| n.fuels[0].heat_of_combustion_kj_kg = x,
            |n, x| n.fuels[0].carbon = x,
            |n, x| n.ambient.temperature_k = x,
            |n, x| n.ambient.pressure_pa = x,
            |n, x| n.ambient.wind_m_s = x,
        ];
        for one in spoil {
            let mut network = plain();
            one(&mut network, bad);
            is_malformed(&network, &plan);
        }
    }
    // These may be below nothing or beyond all bounds, but must be numbers.
    let spoil: [fn(&mut Network, f64); 10] = [
        |n, x| n.rooms[0].floor_elevation_m = x,
        |n, x| n.openings[0].open_fraction = x,
        |n, x| n.openings[0].azimuth_deg = Some(x),
        |n, x| n.openings[0].gives_way.gas_k = Some(x),
        |n, x| n.ambient.wind_from_deg = x,
        |n, x| n.fires[0].heat_release = HeatRelease::Points(vec![(0.0, x)]),
        |n, x| n.fires[0].ignites = sootline::fire::two_zone::Ignition::At(x),
        |n, x| n.fans = vec![Fan { inlet_height_m: x, ..fan() }],
        |n, x| n.fans = vec![Fan { starts_s: x, ..fan() }],
        |n, x| n.schedule = vec![Move { at_s: 10.0, opening: 0, open_fraction: x }],
    ];
    for (number, one) in spoil.into_iter().enumerate() {
        let mut network = plain();
        one(&mut network, f64::NAN);
        let got = try_run(&network, &plan);
        assert!(
            matches!(got, Err(Failed { reason: FailureReason::Malformed(_), .. })),
            "number {number}: {:?}",
            got.map(|(samples, ended)| (samples.iter().all(is_finite), ended))
        );
    }
}

#[test]
fn what_is_not_there_is_refused() {
    let plan = Plan::every(10.0, 600.0);
    let detector = Detector { room: 7, from_fire_m: 1.0, element: Element::Rise(10.0) };
    let spoil: [&dyn Fn(&mut Network); 11] = [
        &|n| n.fires[0].room = 7,
        &|n| n.fires[0].fuel = 7,
        &|n| n.openings[0].between = [room(7), OUTSIDE],
        &|n| n.openings[0].between = [room(0), room(0)],
        &|n| n.openings[0].between = [OUTSIDE, OUTSIDE],
        &|n| n.detectors = vec![detector],
        &|n| n.fans = vec![Fan { from: room(7), ..fan() }],
        &|n| n.fans = vec![Fan { from: OUTSIDE, ..fan() }],
        &|n| n.schedule = vec![Move { at_s: 1.0, opening: 7, open_fraction: 1.0 }],
        &|n| n.rooms.clear(),
        &|n| n.fuels = vec![wood(); 9],
    ];
    for one in spoil {
        let mut network = plain();
        one(&mut network);
        is_malformed(&network, &plan);
    }
}

#[test]
fn plans_that_cannot_be_are_refused() {
    let good = Plan::every(10.0, 60.0);
    for plan in [
        Plan { duration_s: f64::NAN, ..good.clone() },
        Plan { duration_s: -1.0, ..good.clone() },
        Plan { tolerance: 0.0, ..good.clone() },
        Plan { tolerance: f64::NAN, ..good.clone() },
        Plan { samples_s: vec![0.0, 20.0, 10.0], ..good.clone() },
        Plan { samples_s: vec![0.0, f64::NAN], ..good },
    ] {
        is_malformed(&plain(), &plan);
    }
}

#[test]
fn a_caller_that_goes_away_stops_the_run() {
    let mut looks = 0;
    let got = run(&plain(), &Plan::every(10.0, 1800.0), &mut |_| {}, &mut || {
        looks += 1;
        if looks > 20 { ControlFlow::Break(()) } else { ControlFlow::Continue(()) }
    });

    let failed = got.unwrap_err();
    assert_eq!(failed.reason, FailureReason::Stopped);
    assert!(failed.at_s > 0.0 && failed.at_s < 1800.0);
}

#[test]
fn a_budget_of_steps_ends_the_run_at_the_same_place_every_time() {
    let plan = Plan { step_budget: 40, ..Plan::every(10.0, 1800.0) };

    let failures: Vec<Failed> = (0..2).map(|_| try_run(&plain(), &plan).unwrap_err()).collect();

    assert_eq!(failures[0].reason, FailureReason::OutOfSteps);
    assert_eq!(failures[0], failures[1]);
    assert!(failures[0].at_s > 0.0);
}

#[test]
fn a_room_of_linings_that_pass_nothing_ends() {
    let mut network = plain();
    network.rooms = vec![bare_room(4.0, 3.0, 2.5)];
    network.fires = vec![told(constant(2000.0))];
    network.fires[0].oxygen_limited = true;

    ends_well(&network, &Plan::every(30.0, 1800.0));
}
