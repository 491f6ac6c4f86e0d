//! Variants of a room, drawn very wide.

use sootline::fire::DesignFire;
use sootline::fire::two_zone::{HeatRelease, Room, Slab};

use super::cases::{self, Case};
use super::support::{bare_room, lined};

/// Numbers from 0 to 1, by `splitmix64`: the same everywhere.
struct Chance(u64);

impl Chance {
    fn next(&mut self) -> f64 {
        self.0 = self.0.wrapping_add(0x9e37_79b9_7f4a_7c15);
        let mut z = self.0;
        z = (z ^ (z >> 30)).wrapping_mul(0xbf58_476d_1ce4_e5b9);
        z = (z ^ (z >> 27)).wrapping_mul(0x94d0_49bb_1331_11eb);
        #[expect(clippy::cast_precision_loss, reason = "53 bits fit")]
        let share = ((z ^ (z >> 31)) >> 11) as f64;
        share / 9_007_199_254_740_992.0
    }

    fn between(&mut self, low: f64, high: f64) -> f64 {
        low + (high - low) * self.next()
    }

    /// Evenly in the logarithm.
    fn scale(&mut self, low: f64, high: f64) -> f64 {
        low * (high / low).powf(self.next())
    }
}

/// Case B with everything drawn anew: size, growth from slow to ultra-fast, 0.2 to 5 MW, leakage from 0.0001 to 0.01
/// of walls and floor, linings from wool to steel, when the door opens.
pub fn variant(number: u64) -> Case {
    let mut chance = Chance(number.wrapping_mul(0x1234_5678_9abc_def1));
    let mut case = cases::b();
    let (length_m, width_m, height_m) =
        (chance.between(2.0, 9.0), chance.between(2.0, 6.0), chance.between(2.2, 4.0));
    let slab = Slab {
        thickness_m: chance.scale(0.002, 0.2),
        conductivity_w_mk: chance.scale(0.03, 50.0),
        density_kg_m3: chance.scale(50.0, 7800.0),
        specific_heat_j_kgk: 900.0,
    };
    let room = &mut case.network.rooms[0];
    *room = Room { linings: lined(vec![slab]), ..bare_room(length_m, width_m, height_m) };
    let leaks_m2 = chance.scale(1e-4, 1e-2) * (2.0 * (length_m + width_m) * height_m + length_m * width_m);
    let slot = &mut case.network.openings[1];
    slot.height_m = height_m;
    slot.width_m = leaks_m2 / height_m;
    case.network.fires[0].heat_release = HeatRelease::Grown(DesignFire {
        growth_kw_s2: chance.scale(0.00293, 0.1876),
        peak_kw: chance.scale(200.0, 5000.0),
        energy_kj: chance.scale(1e4, 1e7),
        decay_from_share: 0.7,
    });
    case.network.fires[0].diameter_m = chance.between(0.3, 2.0);
    case.network.schedule[0].at_s = chance.between(60.0, 1100.0);
    case
}
