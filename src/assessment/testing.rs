//! Small buildings made by hand, for tests.

use crate::domain::opening::{Opening, OpeningKind, Space};
use crate::domain::properties::MaterialProperties;
use crate::domain::quantity::{Kind, Quantity};
use crate::domain::room::{Ceiling, FloorPlan, Hazard, Lining, Linings, RoomKind};
use crate::domain::{Building, Key, Named, Room};

pub(super) fn key(text: &str) -> Key {
    Key::new(text).unwrap()
}

pub(super) fn q<K: Kind>(value: f64) -> Quantity<K> {
    Quantity::new(value).unwrap()
}

pub(super) fn building(rooms: Vec<Room>, openings: Vec<Opening>) -> Building {
    Building {
        name: "Test house".to_owned(),
        reference: None,
        address: Default::default(),
        location: None,
        occupancy_group: None,
        construction_type: None,
        inspected_on: None,
        notes: String::new(),
        floors: Vec::new(),
        response: Default::default(),
        water_available_l_min: None,
        alarm_monitored: None,
        sprinklers: Default::default(),
        occupants: Default::default(),
        preplan: Default::default(),
        rooms,
        openings,
        boundaries: Vec::new(),
    }
}

pub(super) fn room(name: &str, room_use: &str, [length_m, width_m, height_m]: [f64; 3]) -> Room {
    Room {
        key: key(name),
        name: String::new(),
        kind: RoomKind::Room,
        room_use: Named::Catalogue(room_use.to_owned()),
        floor: 0,
        plan: FloorPlan::Rectangle { length_m: q(length_m), width_m: q(width_m) },
        height_m: q(height_m),
        position: None,
        ceiling: Ceiling::default(),
        leakage_class: None,
        leakage_area_m2: None,
        mechanical: None,
        linings: Linings::default(),
        fuel_load_mj_m2: None,
        fuel_packages: Vec::new(),
        storage: None,
        hazards: vec![Hazard::None],
        detectors: Vec::new(),
        sprinkler_heads: None,
        basis: Default::default(),
    }
}

pub(super) fn opening(
    name: &str,
    kind: OpeningKind,
    sides: [&str; 2],
    [width_m, height_m]: [f64; 2],
    open: f64,
) -> Opening {
    let side = |name: &str| if name == Key::OUTSIDE { Space::Outside } else { Space::Room(key(name)) };
    Opening {
        key: key(name),
        name: String::new(),
        kind,
        connects: sides.map(side),
        width_m: q(width_m),
        height_m: q(height_m),
        sill_m: q(0.0),
        open_fraction: q(open),
        held_open: false,
        self_closing: false,
        fire_rating_min: None,
        leakage_area_m2: None,
        swing: None,
        entry: kind == OpeningKind::Door,
        side: None,
        azimuth_deg: None,
        glazing: None,
        basis: Default::default(),
    }
}

pub(super) fn lined(material: &str) -> Linings {
    let lining = || {
        Some(Lining {
            material: Named::Catalogue(material.to_owned()),
            thickness_m: None,
            reaction_to_fire: None,
        })
    };
    Linings { walls: lining(), ceiling: lining(), floor: lining() }
}

/// A made-up board whose conductivity and density go together.
pub(super) fn board(share: f64) -> Linings {
    let lining = || {
        Some(Lining {
            material: Named::Given(MaterialProperties {
                conductivity_w_mk: 0.2 * share,
                density_kg_m3: 800.0 * share,
                specific_heat_j_kgk: 900.0,
                thickness_m: 0.016,
                combustible: false,
                exposed_growth: None,
            }),
            thickness_m: None,
            reaction_to_fire: None,
        })
    };
    Linings { walls: lining(), ceiling: lining(), floor: lining() }
}
