//! What counts as an opening of a room in each scenario.
//!
//! Open area to outside counts. An open inner door counts with the air behind it: what the rooms
//! reached through open doors hold, and what they draw from outside in turn. Shut doors leak only;
//! glass is wall until its criterion. Openings in ceilings and roofs stand apart: the
//! correlations know wall openings only.

use std::collections::VecDeque;

use super::findings::OpeningState;
use super::plan::{Hole, Plan};
use crate::domain::assumptions::Scenario;
use crate::domain::opening::{Glazing, OpeningKind};
use crate::fire::constants::air_density_kg_m3;
use crate::fire::ventilation::{WallOpening, combine, kawagoe_limit_kw};
use crate::fire::{DesignFire, glazing, oxygen};

/// Open area per volume of the room up to which openings count as cracks, m²/m³: the range of the
/// method for shut rooms.
pub(super) const CRACK_SHARE_M2_M3: f64 = 0.001;

/// How a room stands in a scenario.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct State {
    /// All that counts, as one.
    pub wall: WallOpening,
    /// Of it, what leads straight outside.
    pub outside: WallOpening,
    /// Air behind open inner doors, m³.
    pub behind_m3: f64,
    /// Open area between that air and outside, m².
    pub behind_outside_m2: f64,
    /// Cracks, with the openings that are too small to count, m².
    pub leak_m2: f64,
    /// Open area in ceiling, roof or floor, m².
    pub horizontal_m2: f64,
    /// Ambient temperature, K.
    pub ambient_k: f64,
}

impl State {
    /// Whether the room stands open, so that the correlations for open rooms apply.
    pub fn is_open(&self) -> bool {
        self.wall.area_m2 > 0.0
    }

    /// The fire that the air can sustain of one with all the air it wants.
    ///
    /// No higher than the limit of all openings; but through inner doors no higher than the air behind them
    /// gives: the heat release at which the growing fire has used its oxygen, or the limit of inner door and
    /// outer opening in a row, whichever is more. Where nothing joins that air to outside, the fire ends with it.
    pub fn admits(&self, fire: DesignFire) -> DesignFire {
        let (limit_kw, air_heat_kj) = self.air_limit(fire.growth_kw_s2);
        let fire = fire.capped_kw(limit_kw);
        match air_heat_kj {
            Some(heat_kj) if heat_kj < fire.decay_from_share * fire.energy_kj => {
                DesignFire { energy_kj: heat_kj, decay_from_share: 1.0, ..fire }
            }
            _ => fire,
        }
    }

    /// Heat release that the air can sustain for a growth coefficient, kW.
    pub fn air_limit_kw(&self, growth_kw_s2: f64) -> f64 {
        self.air_limit(growth_kw_s2).0
    }

    /// The limit, and the heat of the air where there is no more than that, kJ.
    fn air_limit(&self, growth_kw_s2: f64) -> (f64, Option<f64>) {
        let all_kw = kawagoe_limit_kw(self.wall);
        let inner_m2 = self.wall.area_m2 - self.outside.area_m2;
        if inner_m2 <= 1e-9 {
            return (all_kw, None);
        }
        let air_kg = self.behind_m3 * air_density_kg_m3(self.ambient_k);
        let heat_kj = oxygen::usable_heat_kj(air_kg, oxygen::LIMIT_AT_AMBIENT);
        let used_up_s = (3.0 * heat_kj / growth_kw_s2.max(f64::MIN_POSITIVE)).cbrt();
        let by_air_kw = growth_kw_s2 * used_up_s * used_up_s;
        let in_a_row_m2 = if self.behind_outside_m2 > 0.0 {
            1.0 / (1.0 / (inner_m2 * inner_m2) + 1.0 / (self.behind_outside_m2 * self.behind_outside_m2))
                .sqrt()
        } else {
            0.0
        };
        let in_a_row_kw =
            kawagoe_limit_kw(WallOpening { area_m2: in_a_row_m2, height_m: self.wall.height_m });
        let limit_kw = all_kw.min(kawagoe_limit_kw(self.outside) + by_air_kw.max(in_a_row_kw));
        let cut_off = self.outside.area_m2 <= 0.0 && self.behind_outside_m2 <= 0.0;
        (limit_kw, cut_off.then_some(heat_kj))
    }
}

/// What a scenario does to the openings of the room of origin.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Stand {
    pub scenario: Scenario,
    /// Stands open whatever was recorded, and with it every door from the room behind it to outside.
    pub opened: Option<usize>,
    /// Doors that shut themselves are shut.
    pub self_closed: bool,
    /// Glass up to this gas temperature has fallen, K.
    pub glass_fallen_at_k: Option<f64>,
}

impl Stand {
    /// As recorded.
    pub const fn as_recorded(scenario: Scenario) -> Self {
        Self { scenario, opened: None, self_closed: false, glass_fallen_at_k: None }
    }

    /// Share of an opening that stands open, and why.
    pub fn of(&self, plan: &Plan<'_>, number: usize) -> (f64, &'static str) {
        let hole = &plan.openings[number];
        if self.scenario == Scenario::Shut {
            return if hole.stays_open() && hole.open_fraction > 0.0 {
                (hole.open_fraction, "nobody can shut it")
            } else {
                (0.0, "shut: leaks only")
            };
        }
        if self.opened == Some(number) {
            return (1.0, "the door to the way out stands open");
        }
        if let Some(gas_k) = self.glass_fallen_at_k
            && falls_by(plan, number, gas_k)
        {
            return (1.0, "its glass has fallen");
        }
        if self.self_closed && hole.shuts_itself {
            return (0.0, "shut itself on detection");
        }
        if hole.open_fraction > 0.0 {
            (hole.open_fraction, "recorded as open")
        } else if hole.kind == OpeningKind::Window {
            (0.0, "glass is wall until it falls")
        } else {
            (0.0, "shut: leaks only")
        }
    }

    /// How a room stands.
    pub fn state(&self, plan: &Plan<'_>, room: usize, envelope_leak_m2: f64, ambient_k: f64) -> State {
        let mut leak_m2 = envelope_leak_m2;
        let mut horizontal_m2 = 0.0;
        let mut outside = Wall::default();
        let mut inner = Wall::default();
        let mut inner_rooms = Vec::new();
        for &number in &plan.of_room[room] {
            let hole = &plan.openings[number];
            let (share, _) = self.of(plan, number);
            let open_m2 = share * hole.area_m2();
            leak_m2 += (1.0 - share) * hole.crack_m2;
            if open_m2 <= 0.0 {
                continue;
            }
            if hole.kind.is_horizontal() {
                horizontal_m2 += open_m2;
                continue;
            }
            match hole.behind(room) {
                None => outside.add(open_m2, hole),
                Some(behind) => {
                    inner.add(open_m2, hole);
                    inner_rooms.push(behind);
                }
            }
        }
        let volume_m3 = plan.rooms[room].geometry.volume_m3;
        if outside.area_m2 + inner.area_m2 <= CRACK_SHARE_M2_M3 * volume_m3 {
            leak_m2 += outside.area_m2 + inner.area_m2;
            (outside, inner) = (Wall::default(), Wall::default());
            inner_rooms.clear();
        }
        let way = self.opened.map_or_else(Vec::new, |door| way_to_outside(plan, room, door));
        let (behind_m3, behind_outside_m2) = air_behind(plan, room, &inner_rooms, &way);
        State {
            wall: combine([outside.opening(), inner.opening()]),
            outside: outside.opening(),
            behind_m3,
            behind_outside_m2,
            leak_m2,
            horizontal_m2,
            ambient_k,
        }
    }

    /// What the report says of each opening.
    pub fn opening_states(&self, plan: &Plan<'_>, room: usize) -> Vec<OpeningState> {
        plan.of_room[room]
            .iter()
            .map(|&number| {
                let hole = &plan.openings[number];
                let (open_fraction, mut because) = self.of(plan, number);
                let mut counted_area_m2 = open_fraction * hole.area_m2();
                if open_fraction > 0.0 && hole.kind.is_horizontal() {
                    counted_area_m2 = 0.0;
                    because = "open, but in ceiling, roof or floor: not counted by the correlations";
                }
                OpeningState {
                    key: plan.opening_key(number).clone(),
                    open_fraction,
                    counted_area_m2,
                    because,
                }
            })
            .collect()
    }
}

/// Area and first moment of several openings.
#[derive(Debug, Clone, Copy, Default)]
struct Wall {
    area_m2: f64,
    moment_m3: f64,
}

impl Wall {
    fn add(&mut self, open_m2: f64, hole: &Hole) {
        self.area_m2 += open_m2;
        self.moment_m3 += open_m2 * hole.height_m;
    }

    fn opening(self) -> WallOpening {
        if self.area_m2 > 0.0 {
            WallOpening { area_m2: self.area_m2, height_m: self.moment_m3 / self.area_m2 }
        } else {
            WallOpening::default()
        }
    }
}

/// Doors from the room behind a door to outside, by the fewest: those that somebody who fled has opened.
/// None where no doors lead out.
pub(super) fn way_to_outside(plan: &Plan<'_>, origin: usize, door: usize) -> Vec<usize> {
    let Some(behind) = plan.openings[door].behind(origin) else { return Vec::new() };
    // For each room reached, the door and the room it was reached from.
    let mut reached_by: Vec<Option<(usize, usize)>> = vec![None; plan.rooms.len()];
    reached_by[behind] = Some((door, origin));
    let mut waiting = VecDeque::from([behind]);
    while let Some(room) = waiting.pop_front() {
        for &number in plan.of_room[room].iter().filter(|&&number| plan.openings[number].is_door()) {
            match plan.openings[number].behind(room) {
                None => {
                    let mut way = vec![number];
                    let mut at = room;
                    while let Some((through, from)) = reached_by[at].filter(|&(_, from)| from != origin) {
                        way.push(through);
                        at = from;
                    }
                    return way;
                }
                Some(next) => {
                    if next != origin && reached_by[next].is_none() {
                        reached_by[next] = Some((number, room));
                        waiting.push_back(next);
                    }
                }
            }
        }
    }
    Vec::new()
}

/// Air of the rooms reached through open doors without passing the room of origin, m³, and the open area
/// that joins them to outside, m². Other rooms' openings stand as recorded, but for the doors of the way out.
fn air_behind(plan: &Plan<'_>, origin: usize, first: &[usize], way: &[usize]) -> (f64, f64) {
    if first.is_empty() {
        return (0.0, 0.0);
    }
    let mut reached = vec![false; plan.rooms.len()];
    reached[origin] = true;
    let mut waiting = Vec::with_capacity(first.len());
    for &room in first {
        if !std::mem::replace(&mut reached[room], true) {
            waiting.push(room);
        }
    }
    let mut inside = Vec::new();
    let mut outside_m2 = Vec::new();
    while let Some(room) = waiting.pop() {
        inside.push(plan.rooms[room].geometry.volume_m3);
        for &number in &plan.of_room[room] {
            let hole = &plan.openings[number];
            let share = if way.contains(&number) { 1.0 } else { hole.open_fraction };
            let open_m2 = share * hole.area_m2();
            if open_m2 <= 0.0 {
                continue;
            }
            match hole.behind(room) {
                None => outside_m2.push(open_m2),
                Some(next) => {
                    if !std::mem::replace(&mut reached[next], true) {
                        waiting.push(next);
                    }
                }
            }
        }
    }
    // Added in order of size, so that the sum does not depend on how the rooms are numbered.
    inside.sort_by(f64::total_cmp);
    outside_m2.sort_by(f64::total_cmp);
    (inside.iter().sum(), outside_m2.iter().sum())
}

/// The door on the way out: of the room's doors one to outside or to a room that the way out leads
/// through, else any; of several the largest, then the tallest, then by key.
pub(super) fn way_out(plan: &Plan<'_>, room: usize) -> Option<usize> {
    let leads_out = |hole: &Hole| hole.behind(room).is_none_or(|behind| plan.rooms[behind].way_out);
    plan.of_room[room].iter().copied().filter(|&number| plan.openings[number].is_door()).max_by(|&a, &b| {
        let (x, y) = (&plan.openings[a], &plan.openings[b]);
        leads_out(x)
            .cmp(&leads_out(y))
            .then(x.area_m2().total_cmp(&y.area_m2()))
            .then(x.height_m.total_cmp(&y.height_m))
            .then_with(|| plan.opening_key(b).cmp(plan.opening_key(a)))
    })
}

/// When the glass of a window falls; none where it holds or where there is none.
///
/// A pane that nobody described counts as 3 mm float glass, which falls first; laminated panes as 4 to
/// 6 mm; plastic as 3 mm, though it softens sooner. All three are this project's choice.
pub(super) fn fallout(plan: &Plan<'_>, number: usize) -> Option<glazing::Fallout> {
    let opening = &plan.building.openings[number];
    let glazed = opening.kind == OpeningKind::Window || opening.glazing.is_some();
    if !glazed || opening.open_fraction.get() >= 1.0 {
        return None;
    }
    glazing::fallout(match opening.glazing {
        None | Some(Glazing::Float3Mm | Glazing::Plastic) => glazing::Glazing::Float3Mm,
        Some(Glazing::Float6Mm | Glazing::Laminated) => glazing::Glazing::Float4To6Mm,
        Some(Glazing::DoubleGlazed) => glazing::Glazing::DoubleGlazed,
        Some(Glazing::Tempered) => glazing::Glazing::Tempered,
        Some(Glazing::Wired) => glazing::Glazing::Wired,
        Some(Glazing::FireResisting) => glazing::Glazing::FireRated,
    })
}

fn falls_by(plan: &Plan<'_>, number: usize, gas_k: f64) -> bool {
    fallout(plan, number).is_some_and(|fallout| fallout.low_k <= gas_k)
}
