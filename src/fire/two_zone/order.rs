//! Order of convergence of the step, measured: halving it must shrink the error as the method promises.

use super::building::Building;
use super::controls::Controls;
use super::network::{
    Ambient, Fire, Fuel, GivesWay, HeatRelease, Ignition, Lie, Linings, Network, Opening, Position, Room,
    Side, Slab, Supply, Zoning,
};
use super::rates::Model;
use super::solver::Solver;

/// A lined room with an open door and a constant fire: nothing in it jumps.
fn room_with_door() -> Network {
    let board = vec![Slab {
        thickness_m: 0.016,
        conductivity_w_mk: 0.17,
        density_kg_m3: 790.0,
        specific_heat_j_kgk: 900.0,
    }];
    Network {
        rooms: vec![Room {
            length_m: 3.6,
            width_m: 2.4,
            height_m: 2.4,
            floor_elevation_m: 0.0,
            leakage_low_m2: 0.0,
            leakage_high_m2: 0.0,
            linings: Linings { ceiling: board.clone(), walls: board.clone(), floor: board },
            zoning: Zoning::TwoLayers,
        }],
        openings: vec![Opening {
            lie: Lie::Vertical,
            between: [Side::Room(0), Side::Outside],
            width_m: 0.8,
            height_m: 2.0,
            sill_m: 0.0,
            open_fraction: 1.0,
            leakage_area_m2: 0.0,
            discharge_coefficient: 0.7,
            azimuth_deg: None,
            gives_way: GivesWay::default(),
        }],
        fuels: vec![Fuel {
            carbon: 0.6,
            hydrogen: 0.08,
            oxygen: 0.27,
            nitrogen: 0.05,
            heat_of_combustion_kj_kg: 20_000.0,
            carbon_monoxide_yield: 0.02,
            soot_yield: 0.04,
            hydrogen_cyanide_yield: 0.01,
        }],
        fires: vec![Fire {
            room: 0,
            fuel: 0,
            heat_release: HeatRelease::Points(vec![(0.0, 200.0)]),
            base_height_m: 0.0,
            diameter_m: 0.5,
            position: Position::Centre,
            radiative_fraction: 0.3,
            oxygen_limited: true,
            supply: Supply::Fed,
            ignites: Ignition::At(0.0),
        }],
        ambient: Ambient::default(),
        ..Network::default()
    }
}

/// Takes steps of one length from a state, each with slopes of its own.
fn steps(model: Model<'_>, controls: &Controls, start: &[f64], length_s: f64, step_s: f64) -> Vec<f64> {
    let mut solver = Solver::new(model);
    solver.state.copy_from_slice(start);
    #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "a few hundred")]
    let count = (length_s / step_s).round() as u32;
    for step in 1..=count {
        solver.look(model, controls);
        solver.forget_slopes();
        solver.attempt(model, controls, step_s, 1e-3);
        solver.accept(f64::from(step) * step_s);
    }
    solver.state
}

#[test]
fn halving_the_step_shrinks_the_error_eightfold() {
    let network = room_with_door();
    let building = Building::new(&network).unwrap();
    let model = Model { network: &network, building: &building };
    let mut controls = Controls::new(&network);
    controls.fires[0].lit_s = Some(0.0);
    controls.fires[0].alight = true;
    // Well past the start, where the layer is there and the pressure has settled.
    let start = steps(model, &controls, &building.start(), 40.0, 0.05);

    let length_s = 16.0;
    let fine = steps(model, &controls, &start, length_s, 1.0 / 64.0);
    // Volume and mass of the hot layer, mass of the cool one, face of the ceiling: none in balance with another.
    let watched = [1, 2, 3, building.rooms[0].nodes[0]];
    let error = |step_s: f64| {
        let coarse = steps(model, &controls, &start, length_s, step_s);
        watched.map(|at| ((coarse[at] - fine[at]) / fine[at]).abs()).iter().sum::<f64>()
    };
    let errors = [2.0, 1.0, 0.5, 0.25].map(error);
    let orders: Vec<f64> = errors.windows(2).map(|two| (two[0] / two[1]).log2()).collect();
    println!("errors {errors:?}, orders {orders:?}");

    // Third order by its conditions; the stiff pressure may take a little of it.
    let last = orders[orders.len() - 1];
    assert!(last > 2.6 && last < 3.6, "errors {errors:?}, orders {orders:?}");
}
