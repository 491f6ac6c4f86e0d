//! Rooms, openings and fans of a building as the engine takes them.

use super::super::inputs::Inputs;
use super::super::plan::Plan;
use super::super::scenarios::{spread_of_leaks, spread_of_linings};
use crate::domain::building::FloorLevel;
use crate::domain::opening::OpeningKind;
use crate::domain::room::RoomKind;
use crate::fire::door_burn_through::Build;
use crate::fire::give_way::Element;
use crate::fire::linings::Surface;
use crate::fire::two_zone::{GivesWay, Lie, Linings, Opening, Room, Side, Slab, Zoning};

use super::super::openings::fallout;

/// From floor to floor where no elevation is recorded, m. Common practice.
const STOREY_M: f64 = 3.0;
/// Discharge coefficient of an open door or window. Common practice: 0.68 to 0.73 were measured in doorways.
const DISCHARGE_COEFFICIENT: f64 = 0.7;
/// A sheet of walls or ceiling thinner than this is a board on studs with its like on the other side, m. Ours.
const BOARD_M: f64 = 0.03;

/// Which end of an uncertain input.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(in crate::assessment) enum Lean {
    Low,
    Typical,
    High,
}

impl Lean {
    pub fn of(self, band: super::super::findings::Band) -> f64 {
        match self {
            Self::Low => band.low,
            Self::Typical => band.typical,
            Self::High => band.high,
        }
    }
}

/// Height of a floor above the entrance level, m: recorded, else storeys of 3 m from the nearest that is.
pub(in crate::assessment) fn elevation_m(floors: &[FloorLevel], floor: i32) -> f64 {
    let nearest = floors
        .iter()
        .filter_map(|level| Some((level.floor, level.elevation_m?.get())))
        .min_by_key(|(number, _)| (number.abs_diff(floor), *number));
    let (from, from_m) = nearest.unwrap_or((0, 0.0));
    from_m + STOREY_M * f64::from(floor - from)
}

/// Whether the air of a room counts as one mixed zone.
pub(in crate::assessment) fn is_mixed(kind: RoomKind) -> bool {
    matches!(kind, RoomKind::Stair | RoomKind::Shaft)
}

/// Floor and height of a room, m. A stair or shaft reaches as high and as low as the rooms that it opens to, however
/// few of its storeys were entered.
fn levels(plan: &Plan<'_>, number: usize) -> (f64, f64) {
    let floors = &plan.building.floors;
    let room = &plan.building.rooms[number];
    let mut bottom_m = elevation_m(floors, room.floor);
    let mut top_m = bottom_m + plan.rooms[number].geometry.height_m;
    if is_mixed(room.kind) {
        for &opening in &plan.of_room[number] {
            if let Some(next) = plan.openings[opening].behind(number) {
                let other = &plan.building.rooms[next];
                if !is_mixed(other.kind) && !plan.openings[opening].kind.is_horizontal() {
                    let floor_m = elevation_m(floors, other.floor);
                    bottom_m = bottom_m.min(floor_m);
                    top_m = top_m.max(floor_m + plan.rooms[next].geometry.height_m);
                }
            }
        }
    }
    (bottom_m, top_m - bottom_m)
}

/// A room.
pub(in crate::assessment) fn room(plan: &Plan<'_>, inputs: &Inputs<'_>, lean: Lean) -> Room {
    let geometry = &inputs.geometry;
    let (floor_elevation_m, height_m) = levels(plan, inputs.number);
    let leak_m2 = inputs.envelope_leak_m2 * lean.of(spread_of_leaks(inputs));
    let heat = lean.of(spread_of_linings(inputs));
    let [walls, ceiling, floor] = &inputs.lined.surfaces;
    Room {
        length_m: geometry.length_m,
        width_m: geometry.width_m,
        height_m,
        floor_elevation_m,
        leakage_low_m2: 0.5 * leak_m2,
        leakage_high_m2: 0.5 * leak_m2,
        linings: Linings {
            ceiling: sheets(ceiling, heat, true),
            walls: sheets(walls, heat, true),
            floor: sheets(floor, heat, false),
        },
        zoning: if is_mixed(inputs.room.kind) { Zoning::Mixed } else { Zoning::TwoLayers },
    }
}

/// The sheets of a lining that takes a share of the heat: conductivity and density go together, as at screening.
fn sheets(surface: &Surface, heat: f64, on_studs: bool) -> Vec<Slab> {
    let slab = Slab {
        thickness_m: surface.thickness_m,
        conductivity_w_mk: surface.conductivity_w_mk * heat,
        density_kg_m3: surface.density_kg_m3 * heat,
        specific_heat_j_kgk: surface.specific_heat_j_kgk,
    };
    if on_studs && surface.thickness_m < BOARD_M { vec![slab, slab] } else { vec![slab] }
}

/// The far rooms as one mixed volume: their air, their cracks, and the cracks of their shut openings to outside.
pub(in crate::assessment) fn rest(plan: &Plan<'_>, far: &[usize], leaks_m2: impl Fn(usize) -> f64) -> Room {
    let mut bottom_m = f64::INFINITY;
    let mut top_m = f64::NEG_INFINITY;
    let (mut volume_m3, mut leak_m2) = (0.0, 0.0);
    for &number in far {
        let (floor_m, height_m) = levels(plan, number);
        bottom_m = bottom_m.min(floor_m);
        top_m = top_m.max(floor_m + height_m);
        volume_m3 += plan.rooms[number].geometry.volume_m3;
        leak_m2 += leaks_m2(number);
    }
    let height_m = (top_m - bottom_m).max(1.0);
    let side_m = (volume_m3 / height_m).max(0.01).sqrt();
    Room {
        length_m: side_m,
        width_m: side_m,
        height_m,
        floor_elevation_m: bottom_m,
        leakage_low_m2: 0.5 * leak_m2,
        leakage_high_m2: 0.5 * leak_m2,
        // It stays at rest, so that nothing passes into its linings.
        linings: Linings::default(),
        zoning: Zoning::Mixed,
    }
}

/// How an opening is to stand in the network.
#[derive(Debug, Clone, Copy)]
pub(in crate::assessment) struct Hung {
    pub number: usize,
    pub between: [Side; 2],
    /// Floors of the first of what it joins in the building and in the network, m.
    pub floors_m: [f64; 2],
    pub share: f64,
    pub glass_falls: bool,
    /// Share of its cracks.
    pub leaks: f64,
}

/// An opening.
pub(in crate::assessment) fn opening(plan: &Plan<'_>, hung: Hung) -> Opening {
    let recorded = &plan.building.openings[hung.number];
    let hole = &plan.openings[hung.number];
    let sill_m = recorded.sill_m.get() + hung.floors_m[0] - hung.floors_m[1];
    Opening {
        lie: if hole.kind.is_horizontal() { Lie::Horizontal } else { Lie::Vertical },
        between: hung.between,
        width_m: hole.width_m,
        height_m: hole.height_m,
        sill_m: sill_m.max(0.0),
        open_fraction: hung.share,
        leakage_area_m2: hole.crack_m2 * hung.leaks,
        discharge_coefficient: DISCHARGE_COEFFICIENT,
        azimuth_deg: recorded.azimuth_deg.map(|azimuth| azimuth.get()),
        gives_way: gives_way(plan, hung.number, hung.glass_falls),
    }
}

/// When an opening gives way: glass by heat where the scenario has it so and by pressure, doors by burning through and
/// by pressure, each at its usual figure. A door whose build nobody recorded is hollow.
fn gives_way(plan: &Plan<'_>, number: usize, glass_falls: bool) -> GivesWay {
    let recorded = &plan.building.openings[number];
    let glass = fallout(plan, number);
    let none = GivesWay { open_fraction: 1.0, ..GivesWay::default() };
    match recorded.kind {
        OpeningKind::Door | OpeningKind::DoubleDoor => {
            let build = match recorded.fire_rating_min {
                Some(rating) if rating.get() > 0.0 => Build::Rated { minutes: rating.get() },
                _ => Build::HollowCore,
            };
            GivesWay {
                gas_k: glass.filter(|_| glass_falls).map(|glass| glass.typical_k),
                exposed_s: Some(build.holds().typical_s),
                pressure_pa: Some(Element::RoomDoor.gives_at().typical_pa),
                ..none
            }
        }
        OpeningKind::Window => GivesWay {
            gas_k: glass.filter(|_| glass_falls).map(|glass| glass.typical_k),
            pressure_pa: glass.map(|_| Element::Glass.gives_at().typical_pa),
            ..none
        },
        OpeningKind::Vent | OpeningKind::Hatch | OpeningKind::RoofVent | OpeningKind::Gap => {
            GivesWay { gas_k: glass.filter(|_| glass_falls).map(|glass| glass.typical_k), ..none }
        }
    }
}

#[cfg(test)]
mod tests {
    use super::elevation_m;
    use crate::domain::building::FloorLevel;
    use crate::domain::quantity::Elevation;

    #[test]
    fn floors_that_nobody_measured_lie_three_metres_apart_from_the_nearest_that_is() {
        let level =
            |floor, metres| FloorLevel { floor, name: String::new(), elevation_m: Elevation::new(metres) };
        let recorded = [level(-1, -2.8), level(2, 7.5)];

        // By hand: 7.5 + 3; -2.8 - 3; with none recorded 3 each.
        assert_eq!(elevation_m(&recorded, 3), 10.5);
        assert_eq!(elevation_m(&recorded, -2), -5.8);
        assert_eq!(elevation_m(&recorded, 2), 7.5);
        assert_eq!(elevation_m(&[], 2), 6.0);
    }
}
