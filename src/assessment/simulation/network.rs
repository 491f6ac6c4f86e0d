//! A run as the engine takes it: kelvin, indices in place of keys, numbers in place of names.

use super::Note;
use crate::catalogue::Catalogue;
use crate::domain::opening::Space;
use crate::domain::properties::MaterialProperties;
use crate::domain::simulation::{self as asked, Sheet, Simulation, Zoning};
use crate::domain::{Invalid, Key, Named, Pointer};
use crate::fire::constants::ICE_POINT_K;
use crate::fire::two_zone as engine;

/// Discharge coefficient of an open door or window, where none is given. Common practice: 0.68 to
/// 0.73 were measured in doorways.
const USUAL_DISCHARGE_COEFFICIENT: f64 = 0.7;

pub(super) fn kelvin(celsius: f64) -> f64 {
    celsius + ICE_POINT_K
}

/// What is gathered on the way.
pub(super) struct Making<'a> {
    pub(super) run: &'a Simulation,
    catalogue: &'a Catalogue,
    faults: Vec<Invalid>,
    pub(super) notes: Vec<Note>,
}

/// The network of a run, and what is to be said of it.
pub(super) fn of(
    run: &Simulation,
    catalogue: &Catalogue,
) -> Result<(engine::Network, Vec<Note>), Vec<Invalid>> {
    let mut making = Making { run, catalogue, faults: Vec::new(), notes: Vec::new() };
    let mut network = engine::Network {
        rooms: each(&run.rooms, "rooms", |room, at| making.room(room, at)),
        openings: each(&run.openings, "openings", |opening, at| making.opening(opening, at)),
        fans: each(&run.fans, "fans", |fan, at| making.fan(fan, at)),
        detectors: each(&run.detectors, "detectors", |detector, at| making.detector(detector, at)),
        sprinklers: each(&run.sprinklers, "sprinklers", |head, at| making.sprinkler(head, at)),
        ambient: ambient(&run.ambient),
        schedule: each(&run.schedule, "schedule", |given, at| making.moved(given, at)),
        ..engine::Network::default()
    };
    // Moves may come in any order; those of one moment keep theirs.
    network.schedule.sort_by(|a, b| a.at_s.total_cmp(&b.at_s));
    let fires = each(&run.fires, "fires", |fire, at| making.fire(fire, at, &mut network.fuels));
    network.fires = fires;
    if making.faults.is_empty() { Ok((network, making.notes)) } else { Err(making.faults) }
}

/// Converts a list; what cannot be converted has left its fault.
fn each<T, U>(list: &[T], name: &str, mut convert: impl FnMut(&T, &Pointer) -> Option<U>) -> Vec<U> {
    let at = Pointer::root().member(name);
    list.iter().enumerate().filter_map(|(index, part)| convert(part, &at.element(index))).collect()
}

fn ambient(air: &asked::Ambient) -> engine::Ambient {
    let outside_c = air.temperature_c.get();
    engine::Ambient {
        temperature_k: kelvin(outside_c),
        indoor_temperature_k: kelvin(air.indoor_temperature_c.map_or(outside_c, |indoors| indoors.get())),
        pressure_pa: air.pressure_pa.get(),
        oxygen_mass_fraction: air.oxygen_mass_fraction.get(),
        water_mass_fraction: air.water_mass_fraction.get(),
        wind_m_s: air.wind_m_s.get(),
        wind_from_deg: air.wind_from_deg.get(),
    }
}

impl<'a> Making<'a> {
    pub(super) fn fault(&mut self, pointer: Pointer, code: &'static str, detail: impl Into<String>) {
        self.faults.push(Invalid { pointer, code, detail: detail.into(), suggestion: None });
    }

    /// The properties that a name stands for. The form has looked the name up, so a miss is a fault of
    /// the request only if the catalogue has changed in between.
    pub(super) fn named<'n, P>(
        &mut self,
        named: &'n Named<P>,
        at: &Pointer,
        find: impl FnOnce(&'n Catalogue, &str) -> Option<&'n P>,
    ) -> Option<&'n P>
    where
        'a: 'n,
    {
        let found = match named {
            Named::Given(properties) => Some(properties),
            Named::Catalogue(key) => find(self.catalogue, key),
        };
        if found.is_none() {
            self.fault(at.clone(), "unknown_name", "the catalogue has no such row");
        }
        found
    }

    pub(super) fn room_index(&mut self, key: &Key, at: Pointer) -> Option<usize> {
        let index = self.run.rooms.iter().position(|room| room.key == *key);
        if index.is_none() {
            self.fault(at, "unknown_room", format!("`{key}` is no room of this run"));
        }
        index
    }

    pub(super) fn side(&mut self, space: &Space, at: Pointer) -> Option<engine::Side> {
        match space {
            Space::Outside => Some(engine::Side::Outside),
            Space::Room(key) => self.room_index(key, at).map(engine::Side::Room),
        }
    }

    fn room(&mut self, room: &asked::Room, at: &Pointer) -> Option<engine::Room> {
        let (leakage_m2, split) = (room.leakage_area_m2.get(), room.leakage_split);
        let linings = at.member("linings");
        Some(engine::Room {
            length_m: room.length_m.get(),
            width_m: room.width_m.get(),
            height_m: room.height_m.get(),
            floor_elevation_m: room.floor_elevation_m.get(),
            leakage_low_m2: leakage_m2 * split.low.get(),
            leakage_high_m2: leakage_m2 * split.high.get(),
            linings: engine::Linings {
                ceiling: self.slabs(&room.linings.ceiling, &linings.member("ceiling"))?,
                walls: self.slabs(&room.linings.walls, &linings.member("walls"))?,
                floor: self.slabs(&room.linings.floor, &linings.member("floor"))?,
            },
            zoning: match room.zoning {
                Zoning::TwoLayers => engine::Zoning::TwoLayers,
                Zoning::Mixed => engine::Zoning::Mixed,
            },
        })
    }

    fn slabs(&mut self, sheets: &[Sheet], at: &Pointer) -> Option<Vec<engine::Slab>> {
        let slab = |sheet: &Sheet| {
            let material: &MaterialProperties = self.named(&sheet.material, at, |catalogue, key| {
                catalogue.material(key).map(|row| &row.properties)
            })?;
            Some(engine::Slab {
                thickness_m: sheet.thickness_m.map_or(material.thickness_m, |thickness| thickness.get()),
                conductivity_w_mk: material.conductivity_w_mk,
                density_kg_m3: material.density_kg_m3,
                specific_heat_j_kgk: material.specific_heat_j_kgk,
            })
        };
        sheets.iter().map(slab).collect()
    }

    fn opening(&mut self, opening: &asked::Opening, at: &Pointer) -> Option<engine::Opening> {
        let connects = at.member("connects");
        let first = self.side(&opening.connects[0], connects.element(0));
        let second = self.side(&opening.connects[1], connects.element(1));
        let gives_way = opening.gives_way.map(|when| engine::GivesWay {
            gas_k: when.gas_temperature_c.map(|temperature| kelvin(temperature.get())),
            exposed_s: when.exposed_s.map(|span| span.get()),
            pressure_pa: when.pressure_pa.map(|pressure| pressure.get()),
            open_fraction: when.open_fraction.get(),
        });
        Some(engine::Opening {
            lie: if opening.kind.is_horizontal() { engine::Lie::Horizontal } else { engine::Lie::Vertical },
            between: [first?, second?],
            width_m: opening.width_m.get(),
            height_m: opening.height_m.get(),
            sill_m: opening.sill_m.get(),
            open_fraction: opening.open_fraction.get(),
            leakage_area_m2: opening.leakage_area_m2.get(),
            discharge_coefficient: opening
                .discharge_coefficient
                .map_or(USUAL_DISCHARGE_COEFFICIENT, |coefficient| coefficient.get()),
            azimuth_deg: opening.azimuth_deg.map(|azimuth| azimuth.get()),
            gives_way: gives_way.unwrap_or_default(),
        })
    }
}
