//! The reference cases: one room with its door open (A) or shut at first (B), rooms in a row (Cn), rooms on a
//! corridor (Dn), and a grid of rooms with loops (for growth).

use sootline::fire::two_zone::{Fire, Move, Network, Opening, Plan, Room, Side, Supply};

use super::support::{OUTSIDE, board_room, grown, hole, room, told, wood};

/// A network and how long it is followed.
pub struct Case {
    pub name: String,
    pub network: Network,
    pub duration_s: f64,
}

impl Case {
    /// Samples every ten seconds.
    pub fn plan(&self, tolerance: f64) -> Plan {
        Plan { tolerance, ..Plan::every(10.0, self.duration_s) }
    }
}

/// Leakage of a room: a slot over its whole height, 0.001 of its walls and floor.
fn slot(index: usize, of: &Room) -> Opening {
    let area_m2 = 0.001 * (2.0 * (of.length_m + of.width_m) * of.height_m + of.length_m * of.width_m);
    Opening { discharge_coefficient: 0.6, ..hole([room(index), OUTSIDE], area_m2 / of.height_m, of.height_m) }
}

/// 0.0469 kW/s² to 1 MW at the middle of the floor of the first room.
fn fire() -> Fire {
    Fire {
        diameter_m: 1.0,
        radiative_fraction: 0.35,
        oxygen_limited: true,
        supply: Supply::Fed,
        ..told(grown(1000.0))
    }
}

fn case(name: String, rooms: Vec<Room>, mut openings: Vec<Opening>, duration_s: f64) -> Case {
    openings.extend(rooms.iter().enumerate().map(|(index, of)| slot(index, of)));
    let network = Network { rooms, openings, fuels: vec![wood()], fires: vec![fire()], ..Network::default() };
    Case { name, network, duration_s }
}

fn door(between: [Side; 2]) -> Opening {
    hole(between, 0.8, 2.0)
}

/// One room, its door open.
pub fn a() -> Case {
    case("A".to_owned(), vec![board_room(3.6, 2.4, 2.4)], vec![door([room(0), OUTSIDE])], 1800.0)
}

/// One room, its door shut until 600 s.
pub fn b() -> Case {
    let shut = Opening { open_fraction: 0.0, ..door([room(0), OUTSIDE]) };
    let mut case = case("B".to_owned(), vec![board_room(3.6, 2.4, 2.4)], vec![shut], 1200.0);
    case.network.schedule = vec![Move { at_s: 600.0, opening: 0, open_fraction: 1.0 }];
    case
}

/// Rooms in a row, doors open between them and from the last to outside.
pub fn c(rooms: usize) -> Case {
    let doors = (0..rooms)
        .map(|index| door([room(index), if index + 1 < rooms { room(index + 1) } else { OUTSIDE }]))
        .collect();
    case(format!("C{rooms}"), vec![board_room(3.6, 2.4, 2.4); rooms], doors, 1800.0)
}

/// A corridor with rooms on it, doors open.
pub fn d(rooms: u32) -> Case {
    let count = rooms as usize;
    let mut all = vec![board_room(3.6, 4.0, 2.6); count];
    all.push(board_room(1.8 * f64::from(rooms), 2.0, 2.6));
    let mut doors: Vec<Opening> = (0..count).map(|index| door([room(index), room(count)])).collect();
    doors.push(hole([room(count), OUTSIDE], 1.6, 2.0));
    case(format!("D{rooms}"), all, doors, 1800.0)
}

/// A grid of rooms, a door in every wall between two of them: loops everywhere; one door to outside.
pub fn grid(long: usize, wide: usize) -> Case {
    let at = |x: usize, y: usize| room(y * long + x);
    let mut doors = Vec::new();
    for y in 0..wide {
        for x in 0..long {
            if x + 1 < long {
                doors.push(door([at(x, y), at(x + 1, y)]));
            }
            if y + 1 < wide {
                doors.push(door([at(x, y), at(x, y + 1)]));
            }
        }
    }
    doors.push(door([at(long - 1, wide - 1), OUTSIDE]));
    case(format!("grid {long}x{wide}"), vec![board_room(3.6, 3.6, 2.6); long * wide], doors, 1800.0)
}
