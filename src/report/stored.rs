//! The report of a room out of the stored bytes of its building's report.
//!
//! Nothing is computed or printed anew: every value is copied as the bytes it was served in, so
//! that a report once issued reads the same for ever, whatever the engine has become since.

use std::fmt;

use serde::Deserialize;
use serde::de::{Deserializer, MapAccess, Visitor};
use serde_json::value::RawValue;

/// The members of an object in their order, their values untouched.
struct Members<'a>(Vec<(&'a str, &'a RawValue)>);

impl<'a> Members<'a> {
    fn get(&self, name: &str) -> Option<&'a RawValue> {
        self.0.iter().find(|(known, _)| *known == name).map(|(_, value)| *value)
    }
}

impl<'de: 'a, 'a> Deserialize<'de> for Members<'a> {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        struct InOrder;

        impl<'de> Visitor<'de> for InOrder {
            type Value = Members<'de>;

            fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
                f.write_str("an object")
            }

            fn visit_map<A: MapAccess<'de>>(self, mut map: A) -> Result<Self::Value, A::Error> {
                let mut members = Vec::new();
                while let Some(member) = map.next_entry()? {
                    members.push(member);
                }
                Ok(Members(members))
            }
        }

        deserializer.deserialize_map(InOrder)
    }
}

/// A room's or a method's key, the rest of it unread.
#[derive(Deserialize)]
struct Keyed<'a> {
    key: &'a str,
}

/// Members of the building's report that its rooms do not carry into theirs.
const OF_THE_BUILDING: [&str; 12] = [
    "name",
    "reference",
    "headline",
    "rating_is",
    "requested",
    "rooms",
    "ranking",
    "water",
    "assumptions",
    "methods",
    "cautions",
    "links",
];

/// The report of the room `key`, as bytes; none where the building has no such room.
///
/// # Errors
///
/// Where the bytes are no report.
pub fn room_report_bytes(stored: &[u8], key: &str) -> Result<Option<Vec<u8>>, serde_json::Error> {
    let building: Members<'_> = serde_json::from_slice(stored)?;
    let rooms: Vec<&RawValue> = array(building.get("rooms"))?;
    let Some(room) = find(&rooms, key)? else { return Ok(None) };
    let room: Members<'_> = serde_json::from_str(room.get())?;

    let mut out = Object::new();
    for (name, value) in &building.0 {
        if !OF_THE_BUILDING.contains(name) && *name != "rules" {
            out.member(name, value.get());
        }
    }
    for (name, value) in &room.0 {
        if !matches!(*name, "assumptions" | "cautions") {
            out.member(name, value.get());
        }
    }
    out.list("assumptions", &joined(&room, &building, "assumptions")?);
    out.list("methods", &used(&room, &building)?);
    out.list("cautions", &joined(&room, &building, "cautions")?);
    if let Some(rules) = building.get("rules") {
        out.member("rules", rules.get());
    }
    Ok(Some(out.close()))
}

fn array(value: Option<&RawValue>) -> Result<Vec<&RawValue>, serde_json::Error> {
    value.map_or_else(|| Ok(Vec::new()), |value| serde_json::from_str(value.get()))
}

fn find<'a>(rooms: &[&'a RawValue], key: &str) -> Result<Option<&'a RawValue>, serde_json::Error> {
    for room in rooms {
        let keyed: Keyed<'_> = serde_json::from_str(room.get())?;
        if keyed.key == key {
            return Ok(Some(room));
        }
    }
    Ok(None)
}

/// The room's elements, then the building's.
fn joined<'a>(
    room: &Members<'a>,
    building: &Members<'a>,
    name: &str,
) -> Result<Vec<&'a RawValue>, serde_json::Error> {
    let mut elements = array(room.get(name))?;
    elements.extend(array(building.get(name))?);
    Ok(elements)
}

/// Those of the building's methods that the room's figures name.
fn used<'a>(room: &Members<'a>, building: &Members<'a>) -> Result<Vec<&'a RawValue>, serde_json::Error> {
    let keys: Vec<&str> =
        room.get("method_keys").map_or_else(|| Ok(Vec::new()), |value| serde_json::from_str(value.get()))?;
    let mut methods = array(building.get("methods"))?;
    let mut fault = None;
    methods.retain(|method| match serde_json::from_str::<Keyed<'_>>(method.get()) {
        Ok(keyed) => keys.contains(&keyed.key),
        Err(e) => {
            fault.get_or_insert(e);
            false
        }
    });
    fault.map_or(Ok(methods), Err)
}

/// An object in the making.
struct Object(Vec<u8>);

impl Object {
    fn new() -> Self {
        Self(vec![b'{'])
    }

    /// The names are members of our own reports, borrowed from JSON without escapes.
    fn member(&mut self, name: &str, value: &str) {
        if self.0.len() > 1 {
            self.0.push(b',');
        }
        self.0.push(b'"');
        self.0.extend_from_slice(name.as_bytes());
        self.0.extend_from_slice(b"\":");
        self.0.extend_from_slice(value.as_bytes());
    }

    fn list(&mut self, name: &str, elements: &[&RawValue]) {
        let mut list = String::from("[");
        for (at, element) in elements.iter().enumerate() {
            if at > 0 {
                list.push(',');
            }
            list.push_str(element.get());
        }
        list.push(']');
        self.member(name, &list);
    }

    fn close(mut self) -> Vec<u8> {
        self.0.push(b'}');
        self.0
    }
}
