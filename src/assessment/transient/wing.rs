//! The part of a building that a fire's answer rests on: near rooms one by one, the rest as one.

use std::collections::BTreeMap;

use super::super::plan::Plan;

/// What it costs to get through an opening: half as much where it stands open.
const OPEN_COST: u32 = 1;
const SHUT_COST: u32 = 2;

/// Rooms near a room of origin, nearest first, and what is left.
///
/// Far rooms are one mixed volume with the sum of their air and cracks. They count as at rest: a run in which they do
/// not stay so is made again with a wider wing.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(in crate::assessment) struct Wing {
    /// Rooms one by one, by number; the room of origin first.
    pub near: Vec<usize>,
    /// Rooms that count as one.
    pub far: Vec<usize>,
}

/// How far the near rooms reach.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(in crate::assessment) struct Reach {
    /// Sum of costs on the way.
    pub cost: u32,
    /// Most rooms.
    pub rooms: usize,
}

impl Reach {
    /// Where every study begins: through one open and one shut opening.
    pub const FIRST: Self = Self { cost: OPEN_COST + SHUT_COST, rooms: 8 };
    /// As far as a study goes.
    pub const WIDEST: Self = Self { cost: 8, rooms: 16 };
}

impl Wing {
    /// The rooms within reach of one, where `open` tells which openings stand open. Of equally near rooms the first by
    /// key, so that the answer does not depend on how rooms are numbered.
    pub fn of(plan: &Plan<'_>, origin: usize, open: &dyn Fn(usize) -> bool, reach: Reach) -> Self {
        let mut cost = vec![u32::MAX; plan.rooms.len()];
        let mut near = Vec::new();
        let mut waiting = BTreeMap::new();
        cost[origin] = 0;
        waiting.insert((0, &plan.building.rooms[origin].key), origin);
        while let Some(((so_far, _), room)) = waiting.pop_first() {
            if so_far > cost[room] || near.contains(&room) {
                continue;
            }
            if so_far > reach.cost || near.len() >= reach.rooms {
                break;
            }
            near.push(room);
            for &number in &plan.of_room[room] {
                let Some(next) = plan.openings[number].behind(room) else { continue };
                let there = so_far + if open(number) { OPEN_COST } else { SHUT_COST };
                if there < cost[next] {
                    cost[next] = there;
                    waiting.insert((there, &plan.building.rooms[next].key), next);
                }
            }
        }
        // Only what air can get to: another house on the same record is no part of it.
        let mut far: Vec<usize> = Vec::new();
        let mut seen = vec![false; plan.rooms.len()];
        let mut waiting = near.clone();
        for &room in &near {
            seen[room] = true;
        }
        while let Some(room) = waiting.pop() {
            for &number in &plan.of_room[room] {
                if let Some(next) = plan.openings[number].behind(room)
                    && !std::mem::replace(&mut seen[next], true)
                {
                    far.push(next);
                    waiting.push(next);
                }
            }
        }
        far.sort_by(|&a, &b| plan.building.rooms[a].key.cmp(&plan.building.rooms[b].key));
        Self { near, far }
    }
}
