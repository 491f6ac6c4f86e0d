//! Rules that compare the parts of a run with each other, beside those of any building.

use std::collections::HashMap;

use super::super::check::{Outline, RoomOutline, exceeds};
use super::super::room::FloorPlan;
use super::super::{Invalid, Key, Pointer};

/// Likeness, by Jaro and Winkler, from which a key is offered in place of an unknown one. Ours.
const LEAST_LIKENESS: f64 = 0.78;

/// What a key names.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Mentioned {
    /// A room.
    Room,
    /// An opening.
    Opening,
}

/// A place where a key is named that stands elsewhere.
#[derive(Debug, Clone)]
pub struct Mention {
    /// The place.
    pub at: Pointer,
    /// What the key names.
    pub of: Mentioned,
    /// The key.
    pub key: Key,
}

/// What a length within a room is measured along.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Along {
    /// Upwards.
    Height,
    /// The longer side of the floor.
    Floor,
}

/// A length that must fit into a room.
#[derive(Debug, Clone)]
pub struct Within {
    /// Where it stands.
    pub at: Pointer,
    /// The room.
    pub room: Key,
    /// The length.
    pub length_m: f64,
    /// Along what.
    pub along: Along,
}

/// What a run names and measures within its rooms.
#[derive(Debug, Clone, Default)]
pub struct Cross {
    /// Keys named.
    pub mentions: Vec<Mention>,
    /// Lengths that must fit.
    pub within: Vec<Within>,
    /// Whether every opening's key is known; else a name cannot be called unknown.
    pub all_openings_known: bool,
}

impl Cross {
    /// Every rule, against the rooms and openings of the run.
    pub fn faults(&self, outline: &Outline) -> Vec<Invalid> {
        let rooms: HashMap<&Key, &RoomOutline> =
            outline.rooms.iter().filter_map(|room| Some((room.key.as_ref()?, room))).collect();
        let openings: Vec<&Key> =
            outline.openings.iter().filter_map(|opening| opening.key.as_ref()).collect();

        let mut faults = Vec::new();
        for mention in &self.mentions {
            let unknown = match mention.of {
                Mentioned::Room => outline.all_rooms_known && !rooms.contains_key(&mention.key),
                Mentioned::Opening => self.all_openings_known && !openings.contains(&&mention.key),
            };
            if unknown {
                faults.push(match mention.of {
                    Mentioned::Room => {
                        let keys = outline.rooms.iter().filter_map(|room| room.key.as_ref());
                        not_there(mention, "unknown_room", "room", keys)
                    }
                    Mentioned::Opening => {
                        not_there(mention, "unknown_opening", "opening", openings.iter().copied())
                    }
                });
            }
        }
        let fitted = self.within.iter().filter_map(|within| fits(within, rooms.get(&within.room)?));
        faults.extend(fitted);
        faults
    }
}

fn not_there<'k>(
    mention: &Mention,
    code: &'static str,
    what: &str,
    keys: impl Iterator<Item = &'k Key>,
) -> Invalid {
    let key = mention.key.as_str();
    let nearest = keys
        .map(|known| (strsim::jaro_winkler(known.as_str(), key), known))
        .filter(|(likeness, _)| *likeness >= LEAST_LIKENESS)
        .max_by(|(a, _), (b, _)| a.total_cmp(b))
        .map(|(_, known)| known.to_string());
    let detail = format!("`{key}` is no {what} of this run");
    Invalid { pointer: mention.at.clone(), code, detail, suggestion: nearest }
}

/// The fault of a length that does not fit, if it does not.
fn fits(within: &Within, room: &RoomOutline) -> Option<Invalid> {
    let (limit_m, code, limit) = match within.along {
        Along::Height => (room.height_m?.get(), "above_ceiling", "height"),
        Along::Floor => {
            let Some(FloorPlan::Rectangle { length_m, width_m }) = room.plan else { return None };
            (length_m.get().max(width_m.get()), "larger_than_floor", "longer side")
        }
    };
    exceeds(within.length_m, limit_m).then(|| Invalid {
        pointer: within.at.clone(),
        code,
        detail: format!(
            "{} m does not fit room `{}`, whose {limit} is {limit_m} m",
            within.length_m, within.room
        ),
        suggestion: None,
    })
}
