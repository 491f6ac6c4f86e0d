//! Which rate depends on which number of the state, and which numbers can be moved together to see it.

use crate::fire::two_zone::{Network, RightSide};

/// The pattern of the slopes of a network's laws, by columns.
pub struct Structure {
    /// Numbers that are solved for; the sums of what crossed the bounds come after them and change nothing.
    pub len: usize,
    /// Rates that each number changes.
    pub rows: Vec<Vec<usize>>,
    /// Numbers that share no rate, group by group.
    pub groups: Vec<Vec<usize>>,
    /// A size of each number: for tolerances and for moving it.
    pub scale: Vec<f64>,
}

/// Numbers of a room, and of the sums at the end, by the count of fuels.
fn room_len(fuels: usize) -> usize {
    4 + 2 * (6 + fuels)
}

fn sums_len(fuels: usize) -> usize {
    12 + 2 * fuels
}

impl Structure {
    /// Looks at how the rates answer at a dozen states in which everything is astir.
    pub fn new(laws: &mut RightSide<'_>, network: &Network, time_s: f64) -> Self {
        let (rooms, fuels) = (network.rooms.len(), network.fuels.len());
        let start = laws.start();
        let whole = start.len();
        let len = whole - sums_len(fuels);
        let of_room = room_len(fuels);
        let scale = scales(&start, rooms, of_room, len);

        let mut depends = vec![vec![false; len]; len];
        for index in 0..len {
            depends[index][index] = true;
        }
        for round in 0..12 {
            let mut state = stirred(&start, rooms, of_room, len, round);
            // The clocks of the fires come last; early, while they grow.
            state[len - network.fires.len()..len].fill(40.0);
            let mut before = vec![0.0; whole];
            let mut after = vec![0.0; whole];
            laws.rates(time_s, &state, &mut before);
            let mut moved = state.clone();
            for column in 0..len {
                moved[column] += 1e-3 * scale[column];
                laws.rates(time_s, &moved, &mut after);
                moved[column] = state[column];
                for row in 0..len {
                    if after[row] != before[row] {
                        depends[column][row] = true;
                    }
                }
            }
        }
        let rows: Vec<Vec<usize>> =
            depends.iter().map(|column| (0..len).filter(|&row| column[row]).collect()).collect();
        let groups = groups(&rows, len);
        Self { len, rows, groups, scale }
    }
}

/// Sizes: 10 Pa; a tenth of the volume and the air of a room; a hundredth of the air for a species; 100 K.
fn scales(start: &[f64], rooms: usize, of_room: usize, len: usize) -> Vec<f64> {
    let mut scale = vec![100.0; len];
    for room in 0..rooms {
        let at = room * of_room;
        let air_kg = start[at + 2] + start[at + 3];
        // The hot layer starts as a thousandth of the room, a mixed room as a half; either way the density is one.
        let volume_m3 = start[at + 1] * air_kg / start[at + 2];
        scale[at] = 10.0;
        scale[at + 1] = 0.1 * volume_m3;
        scale[at + 2] = 0.1 * air_kg;
        scale[at + 3] = 0.1 * air_kg;
        scale[at + 4..at + of_room].fill(0.01 * air_kg);
    }
    scale
}

/// A state with layers of all heights and warmths, no two alike.
fn stirred(start: &[f64], rooms: usize, of_room: usize, len: usize, round: u32) -> Vec<f64> {
    let mut seed = 0x2545_f491_4f6c_dd1d_u64.wrapping_mul(u64::from(round) + 1);
    let mut chance = move |low: f64, high: f64| {
        seed ^= seed << 13;
        seed ^= seed >> 7;
        seed ^= seed << 17;
        #[expect(clippy::cast_precision_loss, reason = "a chance")]
        let share = (seed >> 11) as f64 / 9_007_199_254_740_992.0;
        low + (high - low) * share
    };
    let mut state = start.to_vec();
    let species = (of_room - 4) / 2;
    for room in 0..rooms {
        let at = room * of_room;
        let air_kg = start[at + 2] + start[at + 3];
        let volume_m3 = start[at + 1] * air_kg / start[at + 2];
        let hot = chance(0.2, 0.8);
        state[at] = chance(-4.0, 4.0);
        state[at + 1] = hot * volume_m3;
        state[at + 2] = hot * air_kg * 293.0 / chance(750.0, 1100.0);
        state[at + 3] = (1.0 - hot) * air_kg * 293.0 / chance(300.0, 500.0);
        for layer in 0..2 {
            let mass_kg = state[at + 2 + layer];
            for of in 0..species {
                state[at + 4 + layer * species + of] = mass_kg * chance(0.01, 0.15);
            }
        }
    }
    for lining in &mut state[rooms * of_room..len] {
        *lining = chance(300.0, 700.0);
    }
    state
}

/// Puts each number in the first group with which it shares no rate.
fn groups(rows: &[Vec<usize>], len: usize) -> Vec<Vec<usize>> {
    let mut groups: Vec<Vec<usize>> = Vec::new();
    let mut taken: Vec<Vec<bool>> = Vec::new();
    for (column, its) in rows.iter().enumerate() {
        let free = taken.iter().position(|rows| its.iter().all(|&row| !rows[row]));
        let group = free.unwrap_or_else(|| {
            groups.push(Vec::new());
            taken.push(vec![false; len]);
            groups.len() - 1
        });
        groups[group].push(column);
        for &row in its {
            taken[group][row] = true;
        }
    }
    groups
}
