//! Changes of one part of a building; the whole is checked each time.

use super::building::Building;
use super::check;
use super::ids::Key;
use super::invalid::{Invalid, Pointer};
use super::opening::{Opening, Space};
use super::room::Room;

/// Why a part cannot be taken away.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum CannotRemove {
    /// There is none of that key.
    Missing,
    /// These openings, and after them these boundaries, join the room.
    Joined {
        /// Keys of openings.
        openings: Vec<Key>,
        /// Keys of boundaries.
        boundaries: Vec<Key>,
    },
}

impl Building {
    /// The building with this room in place of the one of its key, or added. Faults point into
    /// the room; those that it brings to other parts point at the whole room and name the part.
    pub fn with_room(&self, room: Room) -> Result<Self, Vec<Invalid>> {
        let mut next = self.clone();
        let at = place(&mut next.rooms, room, |room| &room.key);
        checked(next, &Pointer::root().member("rooms").element(at))
    }

    /// The building with this opening in place of the one of its key, or added. Faults as in
    /// [`Building::with_room`].
    pub fn with_opening(&self, opening: Opening) -> Result<Self, Vec<Invalid>> {
        let mut next = self.clone();
        let at = place(&mut next.openings, opening, |opening| &opening.key);
        checked(next, &Pointer::root().member("openings").element(at))
    }

    /// The building without this room, which nothing may join any more.
    pub fn without_room(&self, key: &Key) -> Result<Self, CannotRemove> {
        if self.room(key).is_none() {
            return Err(CannotRemove::Missing);
        }
        let openings: Vec<Key> = self.openings_of(key).map(|opening| opening.key.clone()).collect();
        let touches = |between: &[Space; 2]| between.contains(&Space::Room(key.clone()));
        let boundaries: Vec<Key> = (self.boundaries.iter())
            .filter(|boundary| touches(&boundary.between))
            .map(|boundary| boundary.key.clone())
            .collect();
        if !openings.is_empty() || !boundaries.is_empty() {
            return Err(CannotRemove::Joined { openings, boundaries });
        }
        let mut next = self.clone();
        next.rooms.retain(|room| room.key != *key);
        Ok(next)
    }

    /// The building without this opening.
    pub fn without_opening(&self, key: &Key) -> Result<Self, CannotRemove> {
        if self.opening(key).is_none() {
            return Err(CannotRemove::Missing);
        }
        let mut next = self.clone();
        next.openings.retain(|opening| opening.key != *key);
        Ok(next)
    }
}

fn place<T>(parts: &mut Vec<T>, part: T, key: impl Fn(&T) -> &Key) -> usize {
    match parts.iter().position(|known| key(known) == key(&part)) {
        Some(at) => {
            if let Some(known) = parts.get_mut(at) {
                *known = part;
            }
            at
        }
        None => {
            parts.push(part);
            parts.len() - 1
        }
    }
}

fn checked(next: Building, part: &Pointer) -> Result<Building, Vec<Invalid>> {
    let faults = check::faults(&next);
    if faults.is_empty() {
        return Ok(next);
    }
    Err(faults.into_iter().map(|fault| seen_from(part, fault, &next)).collect())
}

/// A fault of the building as somebody sees it who sent only one part of it.
fn seen_from(part: &Pointer, fault: Invalid, building: &Building) -> Invalid {
    if let Some(pointer) = fault.pointer.below(part) {
        return Invalid { pointer, ..fault };
    }
    let detail = match named(&fault.pointer, building) {
        Some(name) => format!("{name}: {}", fault.detail),
        None => fault.detail,
    };
    Invalid { pointer: Pointer::root(), detail, ..fault }
}

/// The part that a pointer leads into, in words.
fn named(pointer: &Pointer, building: &Building) -> Option<String> {
    let mut steps = pointer.as_str().split('/').skip(1);
    let list = steps.next()?;
    let at: usize = steps.next()?.parse().ok()?;
    match list {
        "rooms" => building.rooms.get(at).map(|room| format!("room `{}`", room.key)),
        "openings" => building.openings.get(at).map(|opening| format!("opening `{}`", opening.key)),
        "boundaries" => building.boundaries.get(at).map(|boundary| format!("boundary `{}`", boundary.key)),
        _ => None,
    }
}
