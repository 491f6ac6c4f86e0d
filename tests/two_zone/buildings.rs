//! Random buildings: several floors, doors in loops, hatches, fans, several fires of several fuels, leaves that
//! move.

use proptest::collection::vec;
use proptest::prelude::*;
use sootline::fire::DesignFire;
use sootline::fire::two_zone::{
    Fan, Fire, Fuel, HeatRelease, Ignition, Linings, Move, Network, Opening, Position, Room, Slab, Supply,
    Zoning,
};

use super::support::{OUTSIDE, air, bare_room, constant, hatch, hole, lined, room, told, wood};

/// Floors lie this far apart, m.
const STOREY_M: f64 = 3.2;

fn any_linings() -> impl Strategy<Value = Linings> {
    let slab = (0.003..0.2_f64, 0.04..2.0_f64, 100.0..2400.0_f64).prop_map(
        |(thickness_m, conductivity_w_mk, density_kg_m3)| Slab {
            thickness_m,
            conductivity_w_mk,
            density_kg_m3,
            specific_heat_j_kgk: 900.0,
        },
    );
    prop_oneof![1 => Just(Linings::default()), 6 => vec(slab, 1..3).prop_map(lined)]
}

fn any_room() -> impl Strategy<Value = Room> {
    (2.0..9.0_f64, 2.0..6.0_f64, 2.2..3.1_f64, 0.0..0.01_f64, 0.0..0.01_f64, any_linings(), 0..8).prop_map(
        |(length_m, width_m, height_m, leakage_low_m2, leakage_high_m2, linings, kind)| Room {
            leakage_low_m2,
            leakage_high_m2,
            linings,
            zoning: if kind == 0 { Zoning::Mixed } else { Zoning::TwoLayers },
            ..bare_room(length_m, width_m, height_m)
        },
    )
}

fn any_fuel() -> impl Strategy<Value = Fuel> {
    (0.4..0.8_f64, 0.05..0.14_f64, 0.0..0.05_f64, 0.0..0.1_f64, 0.0..0.1_f64).prop_map(
        |(carbon, hydrogen, nitrogen, carbon_monoxide_yield, soot_yield)| Fuel {
            carbon,
            hydrogen,
            oxygen: 1.0 - carbon - hydrogen - nitrogen,
            nitrogen,
            heat_of_combustion_kj_kg: 13_000.0 * (2.6 * carbon + 8.0 * hydrogen),
            carbon_monoxide_yield,
            soot_yield,
            ..wood()
        },
    )
}

fn any_fire() -> impl Strategy<Value = Fire> {
    let curve = prop_oneof![
        (0.003..0.2_f64, 100.0..3000.0_f64, 1e4..1e6_f64).prop_map(|(growth_kw_s2, peak_kw, energy_kj)| {
            HeatRelease::Grown(DesignFire { growth_kw_s2, peak_kw, energy_kj, decay_from_share: 0.7 })
        }),
        (20.0..800.0_f64).prop_map(constant),
    ];
    let supply = prop_oneof![Just(Supply::Fed), Just(Supply::HeatFed { without_flame: 0.2, fades_s: 60.0 })];
    let ignites = prop_oneof![3 => (0.0..100.0_f64).prop_map(Ignition::At), 1 => Just(Ignition::Flux(15.0))];
    let position = prop_oneof![Just(Position::Centre), Just(Position::Wall), Just(Position::Corner)];
    (
        curve,
        supply,
        ignites,
        position,
        0.0..1.0_f64,
        0.2..1.5_f64,
        0.0..0.5_f64,
        any::<prop::sample::Index>(),
        0..2_usize,
    )
        .prop_map(
            |(heat_release, supply, ignites, position, base_height_m, diameter_m, radiative, at, fuel)| {
                Fire {
                    // Any room; made to fit when the rooms are known.
                    room: at.index(1000),
                    fuel,
                    base_height_m,
                    diameter_m,
                    position,
                    radiative_fraction: radiative,
                    oxygen_limited: true,
                    supply,
                    ignites,
                    ..told(heat_release)
                }
            },
        )
}

/// A door or window by what it is told: its wall is found when the rooms are known.
fn any_hole() -> impl Strategy<Value = Opening> {
    (0.2..2.5_f64, 0.3..2.0_f64, 0.0..1.0_f64, 0..3_usize).prop_map(|(width_m, height_m, sill_m, stands)| {
        Opening {
            sill_m: if height_m > 1.2 { 0.0 } else { sill_m },
            open_fraction: [0.0, 0.4, 1.0][stands],
            leakage_area_m2: 0.01,
            ..hole([OUTSIDE, OUTSIDE], width_m, height_m)
        }
    })
}

/// A building.
pub fn any_building() -> impl Strategy<Value = Network> {
    let floors = vec(vec(any_room(), 1..4), 1..4);
    let fans = vec(
        (any::<prop::sample::Index>(), any::<bool>(), 0.02..0.8_f64, 0.2..2.0_f64, 20.0..400.0_f64),
        0..3,
    );
    let fires = (vec(any_fire(), 1..4), [any_fuel(), any_fuel()]);
    let moves = vec((any::<prop::sample::Index>(), 5.0..200.0_f64, 0..2_usize), 0..4);
    let outside = (263.0..308.0_f64, 0.0..8.0_f64);
    (floors, vec(any_hole(), 24), vec(0.3..1.3_f64, 3), fires, fans, moves, outside).prop_map(
        |(floors, holes, hatches, (fires, fuels), fans, moves, (outside_k, wind_m_s))| {
            let mut network = rooms_and_openings(floors, holes, &hatches);
            network.fuels = fuels.to_vec();
            network.ambient = air(293.0);
            network.ambient.temperature_k = outside_k;
            network.ambient.wind_m_s = wind_m_s;
            burn_and_blow(&mut network, fires, &fans, &moves);
            network
        },
    )
}

type AnyFan = (prop::sample::Index, bool, f64, f64, f64);
type AnyMove = (prop::sample::Index, f64, usize);

fn rooms_and_openings(floors: Vec<Vec<Room>>, holes: Vec<Opening>, hatches: &[f64]) -> Network {
    let mut holes = holes.into_iter().cycle();
    let mut rooms: Vec<Room> = Vec::new();
    let mut openings = Vec::new();
    let mut first_of_floor = Vec::new();
    let mut elevation_m = 0.0;
    for floor in floors {
        let first = rooms.len();
        first_of_floor.push(first);
        for mut of in floor {
            of.floor_elevation_m = elevation_m;
            rooms.push(of);
        }
        let last = rooms.len() - 1;
        // A row of rooms, the last joined to the first: a loop from three rooms on. Each has a hole to outside.
        for (index, of) in rooms.iter().enumerate().skip(first) {
            let mut join = |between| {
                let fits = holes.next().expect("a cycle never ends");
                let top_m = of.height_m;
                openings.push(Opening { between, height_m: fits.height_m.min(top_m - fits.sill_m), ..fits });
            };
            if index < last {
                join([room(index), room(index + 1)]);
            } else if last > first + 1 {
                join([room(index), room(first)]);
            }
            join([room(index), OUTSIDE]);
        }
        elevation_m += STOREY_M;
    }
    for (two, side_m) in first_of_floor.windows(2).zip(hatches) {
        openings.push(hatch([room(two[0]), room(two[1])], *side_m));
    }
    Network { rooms, openings, ..Network::default() }
}

fn burn_and_blow(network: &mut Network, mut fires: Vec<Fire>, fans: &[AnyFan], moves: &[AnyMove]) {
    let count = network.rooms.len();
    for fire in &mut fires {
        fire.room %= count;
    }
    // One burns from the start, so that every building has a fire.
    fires[0].ignites = Ignition::At(0.0);
    network.fires = fires;
    network.fans = fans
        .iter()
        .map(|(at, blows_in, volume_flow_m3_s, height_m, stall_pa)| {
            let (inside, outside) = (room(at.index(count)), OUTSIDE);
            Fan {
                from: if *blows_in { outside } else { inside },
                to: if *blows_in { inside } else { outside },
                volume_flow_m3_s: *volume_flow_m3_s,
                inlet_height_m: *height_m,
                outlet_height_m: *height_m,
                stall_pa: *stall_pa,
                starts_s: 10.0,
                stops_s: 250.0,
            }
        })
        .collect();
    let openings = network.openings.len();
    network.schedule = moves
        .iter()
        .map(|(which, at_s, to)| Move {
            at_s: *at_s,
            opening: which.index(openings),
            open_fraction: [0.0, 1.0][*to],
        })
        .collect();
}
