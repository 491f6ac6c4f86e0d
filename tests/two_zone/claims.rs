//! What is known to happen when a room burns, each a test on the house.
//!
//! Sources of the claims: common knowledge of enclosure fire as textbooks tell it (common practice); figures are by hand
//! from the laws named beside them.

use sootline::fire::two_zone::{
    Detector, Element, EventKind, Fire, Ignition, Move, Network, Plan, RoomState, Sample, Side,
};

use super::house::{
    BEDROOM, FRONT_DOOR, HALL, HIGH_CRACK, LIVING, LIVING_DOOR, LOW_CRACK, STAIRS, WINDOW, at, house,
    living_alone, sofa,
};
use super::support::{constant, run_all, told};

fn follow(network: &Network, duration_s: f64) -> Vec<Sample> {
    run_all(network, &Plan::every(1.0, duration_s)).0
}

fn opened(mut network: Network, opening: usize, at_s: f64) -> Network {
    network.schedule.push(Move { at_s, opening, open_fraction: 1.0 });
    network
}

fn stands_open(mut network: Network, opening: usize) -> Network {
    network.openings[opening].open_fraction = 1.0;
    network
}

/// Pressure in a room above outside, at a height above its floor, Pa: by hand from the weights of the layers.
fn pressure_at_pa(sample: &Sample, room: usize, height_m: f64) -> f64 {
    let state = &sample.rooms[room];
    let density = |kelvin: f64| 101_325.0 / (287.05 * kelvin);
    let outside = density(293.15);
    let cool_m = height_m.min(state.interface_height_m);
    state.pressure_pa
        + 9.806_65
            * ((outside - density(state.lower.temperature_k)) * cool_m
                + (outside - density(state.upper.temperature_k)) * (height_m - cool_m))
}

#[test]
fn the_plume_rises_and_draws_air_in() {
    // A constant 200 kW: the hot layer gains what the plume brings. Heskestad 1984 by hand for 130 kW convective, 1 m
    // across, at 2 m: L = 0.94 m, z₀ = -0.33 m, 0.071 · 5.07 · 2.33^(5/3) + 0.24 = 1.71 kg/s; the fuel is 0.01.
    let mut network = stands_open(house(), LIVING_DOOR);
    network.fires[0] = Fire { base_height_m: 0.0, heat_release: constant(200.0), ..sofa() };
    let samples = follow(&network, 20.0);
    let (one, two) = (at(&samples, 2.0), at(&samples, 4.0));
    let gained_kg_s = (two.rooms[LIVING].upper.mass_kg - one.rooms[LIVING].upper.mass_kg) / 2.0;
    let clear_m = 0.5 * (one.rooms[LIVING].interface_height_m + two.rooms[LIVING].interface_height_m);
    let expected_kg_s = 0.071 * 130.0_f64.cbrt() * (clear_m + 0.33).powf(5.0 / 3.0) + 1.85e-3 * 130.0;
    assert!((gained_kg_s / expected_kg_s - 1.0).abs() < 0.1, "{gained_kg_s} for {expected_kg_s}");
    assert!(gained_kg_s > 50.0 * one.fires[0].fuel_kg_s);

    // Nearer the ceiling it draws less and comes hotter.
    network.fires[0].base_height_m = 1.0;
    let raised = follow(&network, 20.0);
    let mass = |samples: &[Sample]| at(samples, 10.0).rooms[LIVING].upper.mass_kg;
    let kelvin = |samples: &[Sample]| at(samples, 10.0).rooms[LIVING].upper.temperature_k;
    assert!(mass(&raised) < 0.8 * mass(&samples));
    assert!(kelvin(&raised) > kelvin(&samples) + 10.0);
}

#[test]
fn the_ceiling_jet_comes_before_the_layer() {
    let mut network = house();
    network.detectors = vec![Detector { room: LIVING, from_fire_m: 1.0, element: Element::Rise(13.0) }];
    let (samples, ended) = run_all(&network, &Plan::every(1.0, 300.0));

    let answered = ended.events.iter().find(|e| e.kind == EventKind::Detected(0)).expect("it answers").at_s;
    let layer_m = |fraction: f64| {
        samples
            .iter()
            .find(|s| s.rooms[LIVING].interface_height_m < fraction * 2.5)
            .expect("it comes down")
            .time_s
    };

    assert!(answered < layer_m(0.8), "answers at {answered}, layer at {}", layer_m(0.8));
    let early = at(&samples, answered).rooms[LIVING];
    assert!(early.ceiling_jet_k > early.lower.temperature_k + 13.0, "{early:?}");
    assert!(early.upper.temperature_k < early.lower.temperature_k + 13.0, "{early:?}");
    assert!(early.interface_height_m > 2.0, "{early:?}");
}

#[test]
fn a_layer_forms_and_descends() {
    let samples = follow(&house(), 120.0);

    let heights: Vec<f64> = [0.0, 15.0, 30.0, 60.0, 90.0, 120.0]
        .map(|t| at(&samples, t).rooms[LIVING].interface_height_m)
        .to_vec();
    assert!(heights[0] > 2.48, "{heights:?}");
    assert!(heights.windows(2).all(|two| two[1] < two[0]), "{heights:?}");
    assert!(heights[5] < 1.0, "{heights:?}");
    // It is hot, and the air below stays cool for long.
    let state = &at(&samples, 60.0).rooms[LIVING];
    assert!(state.upper.temperature_k > state.lower.temperature_k + 50.0, "{state:?}");
    assert!(state.lower.temperature_k < 320.0, "{state:?}");
}

#[test]
fn shut_the_room_presses_outwards_while_the_fire_grows_more_so_higher_up_and_sucks_when_it_starves_and_cools()
{
    let samples = follow(&house(), 1800.0);

    let grows = [20.0, 40.0, 60.0, 80.0].map(|t| at(&samples, t).rooms[LIVING].pressure_pa);
    assert!(grows[0] > 0.0 && grows.windows(2).all(|two| two[1] > two[0]), "{grows:?}");
    let sample = at(&samples, 80.0);
    let (low_pa, high_pa) = (sample.openings[LOW_CRACK].pressure_pa, sample.openings[HIGH_CRACK].pressure_pa);
    // By hand: the air of the room is lighter by up to 0.5 kg/m³, 2.4 m of it: up to 12 Pa.
    assert!(high_pa > low_pa + 1.0 && high_pa < low_pa + 20.0, "{low_pa} {high_pa}");

    let peak = samples.iter().map(|s| s.rooms[LIVING].pressure_pa).fold(0.0, f64::max);
    let starved = samples
        .iter()
        .find(|s| s.time_s > 60.0 && s.fires[0].heat_release_kw < 0.2 * 0.0469 * s.time_s.powi(2));
    let starved_s = starved.expect("it starves").time_s;
    let least = samples
        .iter()
        .filter(|s| s.time_s > starved_s)
        .map(|s| s.rooms[LIVING].pressure_pa)
        .fold(f64::INFINITY, f64::min);
    assert!(peak > 20.0, "{peak}");
    assert!(least < -5.0, "{least} after {starved_s}");
}

#[test]
fn open_a_few_pascals_in_below_the_neutral_plane_and_out_above() {
    let samples = follow(&stands_open(living_alone(), 0), 300.0);

    let sample = at(&samples, 150.0);
    let door = &sample.openings[0];
    let neutral_m = door.neutral_plane_m.expect("the flow turns within the door");
    assert!(neutral_m > 0.3 && neutral_m < 1.8, "{neutral_m}");
    assert!(door.inflow_kg_s > 0.1 && door.outflow_kg_s > 0.1, "{door:?}");
    assert!(pressure_at_pa(sample, LIVING, 0.0) < 0.0 && pressure_at_pa(sample, LIVING, 2.0) > 0.0);
    assert!(pressure_at_pa(sample, LIVING, neutral_m).abs() < 0.1);
    for later in samples.iter().filter(|s| s.time_s > 30.0) {
        assert!(later.rooms[LIVING].pressure_pa.abs() < 15.0, "{}", later.rooms[LIVING].pressure_pa);
    }
}

#[test]
fn the_layer_reaches_the_flame_and_the_burning_falls() {
    let samples = follow(&living_alone(), 900.0);

    let wanted_kw = |s: &Sample| (0.0469 * s.time_s.powi(2)).min(3000.0);
    let reached = samples
        .iter()
        .find(|s| s.rooms[LIVING].interface_height_m < 0.3 + 0.2 * s.fires[0].flame_height_m)
        .expect("the layer reaches the flame");
    for before in samples.iter().filter(|s| s.time_s > 2.0 && s.time_s < 0.5 * reached.time_s) {
        let kw = before.fires[0].heat_release_kw;
        assert!(kw > 0.9 * wanted_kw(before), "{kw} at {}", before.time_s);
    }
    let peak = samples
        .iter()
        .max_by(|a, b| a.fires[0].heat_release_kw.total_cmp(&b.fires[0].heat_release_kw))
        .unwrap();
    assert!(peak.time_s > 0.5 * reached.time_s, "{} {}", peak.time_s, reached.time_s);
    let later = at(&samples, peak.time_s + 120.0);
    assert!(later.fires[0].heat_release_kw < 0.3 * peak.fires[0].heat_release_kw, "{later:?}");
}

#[test]
fn starved_oxygen_falls_and_carbon_monoxide_and_unburned_fuel_rise() {
    let samples = follow(&living_alone(), 600.0);

    let upper = |t: f64| at(&samples, t).rooms[LIVING].upper.gas;
    let (early, late) = (upper(60.0), upper(400.0));
    assert!(early.oxygen < 0.2315 && late.oxygen < early.oxygen && late.oxygen < 0.17, "{early:?} {late:?}");
    assert!(late.carbon_monoxide > 2.0 * early.carbon_monoxide && late.carbon_monoxide > 1e-3, "{late:?}");
    assert!(late.unburned_fuel > early.unburned_fuel && late.unburned_fuel > 1e-3, "{late:?}");
    assert!(late.carbon_dioxide > early.carbon_dioxide && late.soot > early.soot);
}

#[test]
fn more_items_join() {
    let mut network = stands_open(living_alone(), 0);
    let item = |ignites| Fire { ignites, ..sofa() };
    network.fires.push(item(Ignition::Flux(15.0)));
    network.fires.push(item(Ignition::SurfaceTemperature(600.0)));
    let (samples, ended) = run_all(&network, &Plan::every(1.0, 600.0));

    let lit = |index: usize| {
        ended.events.iter().find(|e| e.kind == EventKind::Ignited(index)).expect("it catches fire").at_s
    };
    assert_eq!(lit(0), 0.0);
    let flux = |t: f64| at(&samples, t).rooms[LIVING].floor_flux_kw_m2;
    assert!(
        flux(lit(1) - 3.0) < 15.0 && flux(lit(1) + 3.0) > 14.0,
        "{} {}",
        flux(lit(1) - 3.0),
        flux(lit(1) + 3.0)
    );
    assert!(at(&samples, lit(2) - 3.0).rooms[LIVING].ceiling_k < 600.0);
    assert!(at(&samples, lit(2) + 3.0).rooms[LIVING].ceiling_k > 595.0);
    // A fire that nothing reaches stays unlit.
    let mut cold = living_alone();
    cold.fires = vec![Fire { heat_release: constant(20.0), ..sofa() }, item(Ignition::Flux(15.0))];
    let (_, ended) = run_all(&cold, &Plan::every(10.0, 600.0));
    assert!(!ended.events.iter().any(|e| e.kind == EventKind::Ignited(1)), "{:?}", ended.events);
}

#[test]
fn the_door_opens_cold_air_in_low_hot_gas_out_high() {
    let samples = follow(&opened(living_alone(), 0, 400.0), 500.0);

    let before = at(&samples, 395.0);
    let after = at(&samples, 410.0);
    assert!(
        before.openings[0].inflow_kg_s + before.openings[0].outflow_kg_s < 0.05,
        "{:?}",
        before.openings[0]
    );
    let door = &after.openings[0];
    let neutral_m = door.neutral_plane_m.expect("the flow turns within the door");
    assert!(door.inflow_kg_s > 0.2 && door.outflow_kg_s > 0.2, "{door:?}");
    assert!(neutral_m > 0.2 && neutral_m < 1.8, "{neutral_m}");
    let (was, is) = (&before.rooms[LIVING], &after.rooms[LIVING]);
    assert!(is.lower.temperature_k < was.lower.temperature_k - 10.0, "{was:?} {is:?}");
    assert!(is.lower.gas.oxygen > was.lower.gas.oxygen, "{was:?} {is:?}");
    assert!(is.interface_height_m > was.interface_height_m, "{was:?} {is:?}");
}

#[test]
fn through_a_window_air_comes_in_by_its_lower_part() {
    let samples = follow(&opened(living_alone(), 1, 400.0), 500.0);

    let window = &at(&samples, 430.0).openings[1];
    let neutral_m = window.neutral_plane_m.expect("the flow turns within the window");
    assert!(neutral_m > 0.9 && neutral_m < 2.1, "{neutral_m}");
    assert!(window.inflow_kg_s > 0.1 && window.outflow_kg_s > 0.1, "{window:?}");
    // In what comes in, oxygen reaches the floor: the lower layer is fresher than the upper.
    let state = &at(&samples, 430.0).rooms[LIVING];
    assert!(state.lower.gas.oxygen > state.upper.gas.oxygen + 0.02, "{state:?}");
}

#[test]
fn gas_mixes_where_hot_meets_cold() {
    // Behind a door the jet of hot gas draws cool air along on its way to the layer: that is cooler and fresher there
    // than where it came from, and its smoke is thinner by a tenth at least.
    let samples = follow(&stands_open(house(), LIVING_DOOR), 120.0);
    let (living, hall) = (&at(&samples, 90.0).rooms[LIVING], &at(&samples, 90.0).rooms[HALL]);
    assert!(hall.upper.temperature_k < living.upper.temperature_k - 20.0, "{hall:?}");
    assert!(hall.upper.gas.oxygen > living.upper.gas.oxygen, "{hall:?}");
    let smoke = |room: &RoomState| room.upper.gas.carbon_dioxide;
    assert!(smoke(hall) < 0.9 * smoke(living), "{hall:?} {living:?}");
}

#[test]
fn cold_air_that_falls_through_hot_gas_takes_some_of_it_down() {
    // In at a window whose sill lies above the interface: the lower layer gets smoke with the air.
    let samples = follow(&opened(living_alone(), 1, 400.0), 460.0);

    let lower = &at(&samples, 450.0).rooms[LIVING].lower.gas;
    assert!(lower.carbon_dioxide > 1e-3 && lower.oxygen < 0.23, "{lower:?}");
}

#[test]
fn burning_flares_up_again_when_air_comes() {
    // Embers glow on: a few kilowatts that need little air, enough to light what the air reaches.
    let mut network = opened(living_alone(), 0, 400.0);
    network.fires.push(Fire {
        heat_release: constant(2.0),
        oxygen_limited: false,
        diameter_m: 0.2,
        ..sofa()
    });
    let samples = follow(&network, 700.0);

    let before = at(&samples, 395.0).rooms[LIVING];
    let after = samples
        .iter()
        .filter(|s| s.time_s > 401.0)
        .map(|s| s.rooms[LIVING].heat_release_kw)
        .fold(0.0, f64::max);
    assert!(before.heat_release_kw < 500.0, "{before:?}");
    assert!(
        after > 800.0 && after > 3.0 * before.heat_release_kw,
        "{after} after {}",
        before.heat_release_kw
    );
}

#[test]
fn a_second_room_changes_it() {
    // Doors shut to outside: with the hall the fire has more air and burns more; the hall gets its layer later, cooler.
    let alone = follow(&living_alone(), 600.0);
    let mut with_hall = house();
    with_hall.openings[LIVING_DOOR].open_fraction = 1.0;
    let both = follow(&with_hall, 600.0);

    let burnt_kj = |samples: &[Sample]| samples.iter().map(|s| s.rooms[LIVING].heat_release_kw).sum::<f64>();
    assert!(burnt_kj(&both) > 1.3 * burnt_kj(&alone), "{} {}", burnt_kj(&both), burnt_kj(&alone));
    let down_s = |room: usize| {
        both.iter().find(|s| s.rooms[room].interface_height_m < 1.5).map_or(f64::INFINITY, |s| s.time_s)
    };
    assert!(down_s(LIVING) < down_s(HALL), "{} {}", down_s(LIVING), down_s(HALL));
    let peak_k = |room: usize| both.iter().map(|s| s.rooms[room].upper.temperature_k).fold(0.0, f64::max);
    assert!(peak_k(HALL) < peak_k(LIVING) && peak_k(HALL) > 330.0, "{} {}", peak_k(HALL), peak_k(LIVING));
    // Smoke rises: it reaches the bedroom above through the stairs.
    let last = both.last().unwrap();
    assert!(last.rooms[STAIRS].upper.gas.carbon_monoxide > 1e-5);
    assert!(last.rooms[BEDROOM].upper.gas.carbon_monoxide > 1e-5, "{:?}", last.rooms[BEDROOM]);
    // An open front door changes it again: the hall breathes.
    with_hall.openings[FRONT_DOOR].open_fraction = 1.0;
    let open = follow(&with_hall, 600.0);
    assert!(burnt_kj(&open) > burnt_kj(&both));
}

#[test]
fn the_openings_of_the_house_are_where_the_tests_take_them_to_be() {
    let network = house();
    assert_eq!(network.openings[LIVING_DOOR].between, [Side::Room(LIVING), Side::Room(HALL)]);
    assert_eq!(network.openings[FRONT_DOOR].between, [Side::Room(HALL), Side::Outside]);
    assert_eq!(network.openings[WINDOW].sill_m, 0.9);
    assert_eq!(told(constant(1.0)).room, LIVING);
}
