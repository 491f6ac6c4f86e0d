//! Small parts that the cases are built of, and ways to run them.

use std::ops::ControlFlow;

use sootline::fire::DesignFire;
use sootline::fire::two_zone::{
    Ambient, Ended, Failed, Fire, Fuel, GivesWay, HeatRelease, Ignition, Lie, Linings, Network, Opening,
    Plan, Position, Room, Sample, Side, Slab, Supply, Zoning, run,
};

/// Gas constant of air and its specific heat at constant pressure for a ratio of heats of 1.4, J/(kg K):
/// 1.4 · 287.05/0.4. The closed forms are worked with these; 1.005 kJ/(kg K), as tables print it, is the
/// same to three digits.
pub const GAS_J_KGK: f64 = 287.05;
pub const CP_J_KGK: f64 = 3.5 * GAS_J_KGK;
/// Still air at 293 K and 101 325 Pa, kg/m³.
pub const AIR_293_KG_M3: f64 = 101_325.0 / (GAS_J_KGK * 293.0);

/// Gypsum board of a thickness: the lining of the reference cases.
pub fn board(thickness_m: f64) -> Vec<Slab> {
    vec![Slab { thickness_m, conductivity_w_mk: 0.17, density_kg_m3: 790.0, specific_heat_j_kgk: 900.0 }]
}

/// The same sheets on every side.
pub fn lined(sheets: Vec<Slab>) -> Linings {
    Linings { ceiling: sheets.clone(), walls: sheets.clone(), floor: sheets }
}

/// A room without leaks whose faces pass no heat.
pub fn bare_room(length_m: f64, width_m: f64, height_m: f64) -> Room {
    Room {
        length_m,
        width_m,
        height_m,
        floor_elevation_m: 0.0,
        leakage_low_m2: 0.0,
        leakage_high_m2: 0.0,
        linings: Linings::default(),
        zoning: Zoning::TwoLayers,
    }
}

/// A room without leaks, lined with 16 mm gypsum.
pub fn board_room(length_m: f64, width_m: f64, height_m: f64) -> Room {
    Room { linings: lined(board(0.016)), ..bare_room(length_m, width_m, height_m) }
}

/// An open hole in a wall, from the floor up.
pub fn hole(between: [Side; 2], width_m: f64, height_m: f64) -> Opening {
    Opening {
        lie: Lie::Vertical,
        between,
        width_m,
        height_m,
        sill_m: 0.0,
        open_fraction: 1.0,
        leakage_area_m2: 0.0,
        discharge_coefficient: 0.7,
        azimuth_deg: None,
        gives_way: GivesWay::default(),
    }
}

/// An open hole in the ceiling of the first.
pub fn hatch(between: [Side; 2], side_m: f64) -> Opening {
    Opening { lie: Lie::Horizontal, ..hole(between, side_m, side_m) }
}

pub const OUTSIDE: Side = Side::Outside;

pub const fn room(index: usize) -> Side {
    Side::Room(index)
}

/// Wood-like fuel of the reference cases.
pub const fn wood() -> Fuel {
    Fuel {
        carbon: 0.6,
        hydrogen: 0.08,
        oxygen: 0.27,
        nitrogen: 0.05,
        heat_of_combustion_kj_kg: 20_000.0,
        carbon_monoxide_yield: 0.02,
        soot_yield: 0.04,
        hydrogen_cyanide_yield: 0.01,
    }
}

/// A fuel of next to no mass, for closed forms that leave the mass of the fuel out.
pub const fn weightless() -> Fuel {
    Fuel { heat_of_combustion_kj_kg: 1e9, ..wood() }
}

/// A fire that gives what it is told, from the start on, and radiates nothing.
pub fn told(heat_release: HeatRelease) -> Fire {
    Fire {
        room: 0,
        fuel: 0,
        heat_release,
        base_height_m: 0.0,
        diameter_m: 0.5,
        position: Position::Centre,
        radiative_fraction: 0.0,
        oxygen_limited: false,
        supply: Supply::Fed,
        ignites: Ignition::At(0.0),
    }
}

/// A constant heat release, kW.
pub fn constant(kw: f64) -> HeatRelease {
    HeatRelease::Points(vec![(0.0, kw)])
}

/// The fire of the reference cases: 0.0469 kW/s² to 1 MW, more fuel than can burn.
pub fn grown(peak_kw: f64) -> HeatRelease {
    HeatRelease::Grown(DesignFire { growth_kw_s2: 0.0469, peak_kw, energy_kj: 1e9, decay_from_share: 0.7 })
}

/// Air of one temperature everywhere.
pub fn air(temperature_k: f64) -> Ambient {
    Ambient { temperature_k, indoor_temperature_k: temperature_k, ..Ambient::default() }
}

/// One room, its openings, one constant fire of next to no mass; air at 293 K.
pub fn one_room(room: Room, openings: Vec<Opening>, kw: f64) -> Network {
    Network {
        rooms: vec![room],
        openings,
        fuels: vec![weightless()],
        fires: vec![told(constant(kw))],
        ambient: air(293.0),
        ..Network::default()
    }
}

/// Samples and end of a run.
pub fn try_run(network: &Network, plan: &Plan) -> Result<(Vec<Sample>, Ended), Failed> {
    let mut samples = Vec::new();
    let ended = run(network, plan, &mut |s| samples.push(s.clone()), &mut || ControlFlow::Continue(()))?;
    Ok((samples, ended))
}

/// The same, where it must end.
pub fn run_all(network: &Network, plan: &Plan) -> (Vec<Sample>, Ended) {
    try_run(network, plan).unwrap_or_else(|failed| panic!("{failed:?}"))
}

/// The state at the end of a run of a tolerance.
pub fn at_end(network: &Network, duration_s: f64, tolerance: f64) -> Sample {
    let plan = Plan { tolerance, ..Plan::every(duration_s, duration_s) };
    run_all(network, &plan).0.pop().expect("a plan samples its end")
}

/// Is every number of a sample a number?
pub fn is_finite(sample: &Sample) -> bool {
    let layer = |l: &sootline::fire::two_zone::Layer| {
        let g = &l.gas;
        [
            l.temperature_k,
            l.mass_kg,
            g.oxygen,
            g.carbon_dioxide,
            g.water,
            g.carbon_monoxide,
            g.hydrogen_cyanide,
            g.soot,
            g.unburned_fuel,
        ]
        .iter()
        .all(|x| x.is_finite())
    };
    sample.rooms.iter().all(|r| {
        layer(&r.upper)
            && layer(&r.lower)
            && [
                r.interface_height_m,
                r.pressure_pa,
                r.ceiling_k,
                r.upper_wall_k,
                r.lower_wall_k,
                r.floor_k,
                r.floor_flux_kw_m2,
                r.heat_release_kw,
                r.layer_heat_release_kw,
                r.upper_extinction_1_m,
                r.lower_extinction_1_m,
                r.ceiling_jet_k,
                r.equivalence_ratio,
            ]
            .iter()
            .all(|x| x.is_finite())
    }) && sample.openings.iter().all(|o| {
        [o.inflow_kg_s, o.outflow_kg_s, o.flame_heat_release_kw, o.pressure_pa, o.open_fraction]
            .iter()
            .all(|x| x.is_finite())
            && o.neutral_plane_m.is_none_or(f64::is_finite)
    }) && sample.fires.iter().all(|f| {
        [f.heat_release_kw, f.fuel_kg_s, f.drawn_oxygen, f.flame_height_m, f.flame_share]
            .iter()
            .all(|x| x.is_finite())
    })
}
