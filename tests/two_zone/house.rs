//! A small house: living room, hall, kitchen, stair well, bedroom above.

use sootline::fire::DesignFire;
use sootline::fire::two_zone::{Fire, HeatRelease, Network, Opening, Room, Sample, Supply, Zoning};

use super::support::{OUTSIDE, air, board, board_room, hole, lined, room, told, wood};

pub const LIVING: usize = 0;
pub const HALL: usize = 1;
pub const KITCHEN: usize = 2;
pub const STAIRS: usize = 3;
pub const BEDROOM: usize = 4;

pub const LIVING_DOOR: usize = 0;
pub const FRONT_DOOR: usize = 1;
pub const WINDOW: usize = 5;
/// Cracks of the living room, near the floor and near the ceiling.
pub const LOW_CRACK: usize = 6;
pub const HIGH_CRACK: usize = 7;

const BEDROOM_FLOOR_M: f64 = 2.8;

/// The sofa in the living room: fast growth to 3 MW, 500 MJ.
pub fn sofa() -> Fire {
    Fire {
        base_height_m: 0.3,
        diameter_m: 1.0,
        radiative_fraction: 0.35,
        oxygen_limited: true,
        supply: Supply::HeatFed { without_flame: 0.2, fades_s: 60.0 },
        ..told(HeatRelease::Grown(DesignFire {
            growth_kw_s2: 0.0469,
            peak_kw: 3000.0,
            energy_kj: 5e5,
            decay_from_share: 0.7,
        }))
    }
}

/// The house, a sofa on fire, every leaf shut but those of hall, stairs and bedroom.
pub fn house() -> Network {
    let leaky = |of: Room| Room { leakage_low_m2: 0.002, leakage_high_m2: 0.002, ..of };
    let rooms = vec![
        board_room(5.0, 4.0, 2.5),
        leaky(board_room(4.0, 1.8, 2.5)),
        leaky(board_room(3.5, 3.0, 2.5)),
        Room { zoning: Zoning::Mixed, ..leaky(board_room(2.0, 1.0, 5.3)) },
        Room { floor_elevation_m: BEDROOM_FLOOR_M, ..leaky(board_room(4.0, 3.5, 2.5)) },
    ];
    let shut = |of: Opening| Opening { open_fraction: 0.0, leakage_area_m2: 0.005, ..of };
    let door = |from, to| hole([room(from), to], 0.8, 2.0);
    let crack = |sill_m| Opening { sill_m, ..hole([room(LIVING), OUTSIDE], 0.05, 0.1) };
    let openings = vec![
        shut(door(LIVING, room(HALL))),
        shut(door(HALL, OUTSIDE)),
        door(HALL, room(KITCHEN)),
        door(HALL, room(STAIRS)),
        Opening { sill_m: BEDROOM_FLOOR_M, ..door(STAIRS, room(BEDROOM)) },
        Opening { leakage_area_m2: 0.0, sill_m: 0.9, ..shut(hole([room(LIVING), OUTSIDE], 1.5, 1.2)) },
        crack(0.0),
        crack(2.4),
    ];
    Network {
        rooms,
        openings,
        fuels: vec![wood()],
        fires: vec![sofa()],
        ambient: air(293.15),
        ..Network::default()
    }
}

/// The same, stripped to the living room in walls of brick: nothing gives way, nothing leaks but the cracks.
pub fn living_alone() -> Network {
    let mut house = house();
    house.rooms.truncate(1);
    house.rooms[0].linings = lined(board(0.1));
    house.openings = [LIVING_DOOR, WINDOW, LOW_CRACK, HIGH_CRACK]
        .map(|index| {
            let mut opening = house.openings[index].clone();
            opening.between = [room(LIVING), OUTSIDE];
            opening
        })
        .to_vec();
    house
}

/// The sample at a time.
pub fn at(samples: &[Sample], time_s: f64) -> &Sample {
    samples.iter().find(|sample| sample.time_s >= time_s).expect("the run is long enough")
}
