//! The forms of what moves, detects and sprinkles: schedule, fans, detectors, sprinkler heads.

use serde::Serializer;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::Schema;

use super::mention::{OpeningName, RoomName, SpaceName};
use crate::domain::opening::Space;
use crate::domain::properties::{DetectorProperties, SprinklerProperties};
use crate::domain::quantity::{AirFlow, Distance, Fraction, PressureDifference, Span, SprayDensity};
use crate::domain::simulation::check::{Along, Within};
use crate::domain::simulation::{Detector, Fan, Move, Sprinkler};
use crate::domain::{Key, Pointer};
use crate::wire::form::{Components, Form, Way};
use crate::wire::json::Json;
use crate::wire::named::NameOr;
use crate::wire::object::{Maybe, default_of, doc_of, name_of, object};
use crate::wire::reader::Reader;
use crate::wire::room::zero;

/// What a fan is given, before it is held against its rooms.
struct FanMembers {
    key: Key,
    from: Space,
    to: Space,
    volume_flow_m3_s: AirFlow,
    inlet_height_m: Option<Distance>,
    outlet_height_m: Option<Distance>,
    stall_pa: Option<PressureDifference>,
    starts_s: Span,
    stops_s: Option<Span>,
}

object! {
    /// An opening moved at a time.
    Move as "SimulationMove" {
        /// When.
        at_s: Span,
        /// Key of the opening.
        opening: OpeningName,
        /// Share that then stands open.
        open_fraction: Fraction,
    }

    /// A fan: it moves a volume of air from one space to another.
    FanMembers as "SimulationFan" by "key" {
        /// Unique among the fans.
        key: Key,
        /// What it draws from: key of a room, or `outside`.
        from: SpaceName,
        /// What it blows to: key of a room, or `outside`.
        to: SpaceName,
        /// Volume it moves.
        volume_flow_m3_s: AirFlow,
        /// Inlet above the floor of the room it draws from; null: half the room's height.
        inlet_height_m: Maybe<Distance> = None,
        /// Outlet above the floor of the room it blows to; null: half the room's height.
        outlet_height_m: Maybe<Distance> = None,
        /// Pressure against it that stops it; null: none does.
        stall_pa: Maybe<PressureDifference> = None,
        /// When it starts.
        starts_s: Span = zero!(Span),
        /// When it stops; null: never.
        stops_s: Maybe<Span> = None,
    }

    /// A detector below the ceiling.
    Detector as "SimulationDetector" by "key" {
        /// Unique among the detectors.
        key: Key,
        /// Key of its room.
        room: RoomName,
        /// Class: a name of `/v1/catalogue/detectors`, or its properties. A rate of rise and an optical
        /// density are not followed in a run.
        class: NameOr<DetectorProperties>,
        /// Distance from the axis of the fire, seen from above; null: half the room's diagonal.
        from_fire_m: Maybe<Distance> = None,
    }

    /// A sprinkler head below the ceiling. Once it is hot enough its water slows the fires of its room.
    Sprinkler as "SimulationSprinkler" by "key" {
        /// Unique among the heads.
        key: Key,
        /// Key of its room.
        room: RoomName,
        /// Class: a name of `/v1/catalogue/sprinklers`, or its properties.
        class: NameOr<SprinklerProperties>,
        /// Distance from the axis of the fire, seen from above; null: half the room's diagonal.
        from_fire_m: Maybe<Distance> = None,
        /// Water on the floor; null: the class's.
        spray_density_mm_s: Maybe<SprayDensity> = None,
    }
}

impl From<FanMembers> for Fan {
    fn from(fan: FanMembers) -> Self {
        let FanMembers { key, from, to, volume_flow_m3_s, inlet_height_m, outlet_height_m, .. } = fan;
        let FanMembers { stall_pa, starts_s, stops_s, .. } = fan;
        Self { key, from, to, volume_flow_m3_s, inlet_height_m, outlet_height_m, stall_pa, starts_s, stops_s }
    }
}

impl From<&Fan> for FanMembers {
    fn from(fan: &Fan) -> Self {
        let Fan { key, from, to, volume_flow_m3_s, inlet_height_m, outlet_height_m, .. } = fan.clone();
        let Fan { stall_pa, starts_s, stops_s, .. } = *fan;
        Self { key, from, to, volume_flow_m3_s, inlet_height_m, outlet_height_m, stall_pa, starts_s, stops_s }
    }
}

impl Form for Fan {
    type Value = Self;

    const IDENTITY: Option<&'static str> = FanMembers::IDENTITY;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        let fan = Self::from(FanMembers::read(json, at, reader)?);
        if fan.from == fan.to {
            let detail = "a fan blows from one space into another, and both are the same here";
            reader.fault(&at.member("to"), "joins_itself", detail);
            return None;
        }
        if fan.stops_s.is_some_and(|stops| stops < fan.starts_s) {
            reader.fault(&at.member("stops_s"), "contradiction", "the fan stops before it starts");
            return None;
        }
        for (space, height_m, member) in [
            (&fan.from, fan.inlet_height_m, "inlet_height_m"),
            (&fan.to, fan.outlet_height_m, "outlet_height_m"),
        ] {
            if let (Space::Room(room), Some(height_m)) = (space, height_m) {
                let (at, room) = (at.member(member), room.clone());
                let length_m = height_m.get();
                reader.cross.within.push(Within { at, room, length_m, along: Along::Height });
            }
        }
        Some(fan)
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        FanMembers::write(&value.into(), serializer)
    }

    fn schema(way: Way) -> RefOr<Schema> {
        FanMembers::schema(way)
    }

    fn components(way: Way, into: &mut Components) {
        FanMembers::components(way, into);
    }
}
