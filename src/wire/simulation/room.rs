//! The form of a room of a run.

use serde::Serializer;
use serde::ser::SerializeMap;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::Schema;

use crate::domain::check::{FloorOutline, RoomOutline};
use crate::domain::quantity::{Elevation, Fraction, LeakageArea, RoomHeight, RoomLength};
use crate::domain::room::{Ceiling, FloorPlan};
use crate::domain::simulation::{LeakageSplit, Linings, Room, Zoning};
use crate::domain::{Key, Pointer};
use crate::wire::form::{Components, Form, Way};
use crate::wire::json::Json;
use crate::wire::object::{self, default_of, doc_of, name_of, object, parts};
use crate::wire::reader::Reader;
use crate::wire::room::zero;
use crate::wire::scalar::OneWord;

/// How far the two shares of a leakage may miss one.
const SHARES_MISS: f64 = 1e-6;

fn half_and_half() -> LeakageSplit {
    let half = Fraction::new(0.5).expect("a half lies within the limits of a share");
    LeakageSplit { low: half, high: half }
}

object! {
    /// Where a room's leakage lies. The two shares add up to one.
    LeakageSplit as "SimulationLeakageSplit" {
        /// Share near the floor.
        low: Fraction,
        /// Share near the ceiling.
        high: Fraction,
    }
}

parts! {
    /// A room: a box. Nothing is assumed from its use.
    RoomParts as "SimulationRoom" ignoring &[]; {
        /// Unique among the rooms.
        key: Key,
        /// Length.
        length_m: RoomLength,
        /// Width.
        width_m: RoomLength,
        /// Height.
        height_m: RoomHeight,
        /// Height of its floor above the datum of the run.
        floor_elevation_m: Elevation = zero!(Elevation),
        /// Leakage to outside.
        leakage_area_m2: LeakageArea = zero!(LeakageArea),
        /// Where that leakage lies; half near the floor and half near the ceiling where absent.
        leakage_split: LeakageSplit = half_and_half(),
        /// What bounds it.
        linings: Linings = Linings::default(),
        /// `mixed` for a shaft or a stair, where no layer forms.
        zoning: OneWord<Zoning> = Zoning::TwoLayers,
    }
}

impl RoomParts {
    fn of(room: &Room) -> Self {
        let room = room.clone();
        Self {
            key: Some(room.key),
            length_m: Some(room.length_m),
            width_m: Some(room.width_m),
            height_m: Some(room.height_m),
            floor_elevation_m: Some(room.floor_elevation_m),
            leakage_area_m2: Some(room.leakage_area_m2),
            leakage_split: Some(room.leakage_split),
            linings: Some(room.linings),
            zoning: Some(room.zoning),
        }
    }

    fn plan(&self) -> Option<FloorPlan> {
        Some(FloorPlan::Rectangle { length_m: self.length_m?, width_m: self.width_m? })
    }

    fn whole(self) -> Option<Room> {
        Some(Room {
            key: self.key?,
            length_m: self.length_m?,
            width_m: self.width_m?,
            height_m: self.height_m?,
            floor_elevation_m: self.floor_elevation_m?,
            leakage_area_m2: self.leakage_area_m2?,
            leakage_split: self.leakage_split?,
            linings: self.linings?,
            zoning: self.zoning?,
        })
    }
}

/// Leaves what other parts are held against. The rules of buildings find a room's elevation by the
/// number of its floor; here each room is a floor of its own.
fn outline(parts: &RoomParts, at: &Pointer, reader: &mut Reader<'_>) {
    let outline = &mut reader.outline;
    let floor = i32::try_from(outline.rooms.len()).ok();
    if let Some(floor) = floor {
        outline.floors.push(FloorOutline { floor, elevation_m: parts.floor_elevation_m });
    }
    outline.rooms.push(RoomOutline {
        at: at.clone(),
        key: parts.key.clone(),
        floor,
        plan: parts.plan(),
        height_m: parts.height_m,
        ceiling: Some(Ceiling::default()),
        ..RoomOutline::default()
    });
}

impl Form for Room {
    type Value = Self;

    const IDENTITY: Option<&'static str> = Some("key");

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        let Some(parts) = RoomParts::read(json, at, reader) else {
            reader.outline.rooms.push(RoomOutline { at: at.clone(), ..RoomOutline::default() });
            return None;
        };
        outline(&parts, at, reader);
        if let Some(split) = parts.leakage_split {
            let sum = split.low.get() + split.high.get();
            if (sum - 1.0).abs() > SHARES_MISS {
                let detail = format!("`low` and `high` are shares of one leakage and add up to {sum}, not 1");
                reader.fault(&at.member("leakage_split"), "contradiction", detail);
                return None;
            }
        }
        parts.whole()
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut map = serializer.serialize_map(None)?;
        RoomParts::of(value).write(&mut map)?;
        map.end()
    }

    fn schema(way: Way) -> RefOr<Schema> {
        object::reference("SimulationRoom", way)
    }

    fn components(way: Way, into: &mut Components) {
        let schema = RoomParts::object(way);
        let name = object::component_name("SimulationRoom", way);
        object::add_component(into, name, schema.into(), |into| {
            RoomParts::components_of_members(way, into);
        });
    }
}
