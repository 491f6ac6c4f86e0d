//! Rules of openings: what they join, and whether they fit there.

use std::collections::HashMap;

use super::{Invalid, Key, OpeningOutline, Outline, Pointer, RoomOutline, exceeds};
use crate::domain::opening::{OpeningKind, Space};
use crate::domain::quantity::OpeningSide;
use crate::domain::room::FloorPlan;

type Rooms<'a> = HashMap<&'a Key, &'a RoomOutline>;

/// Likeness, by Jaro and Winkler, from which a key is offered in place of an unknown one. Ours.
const LEAST_LIKENESS: f64 = 0.78;

fn fault(pointer: Pointer, code: &'static str, detail: String, suggestion: Option<String>) -> Invalid {
    Invalid { pointer, code, detail, suggestion }
}

/// What can be told without the rooms.
pub(super) fn alone(opening: &OpeningOutline, faults: &mut Vec<Invalid>) {
    let Some(connects) = &opening.connects else { return };
    let at = opening.at.member("connects");
    joins_two_spaces(connects, &at, "an opening", faults);
    if opening.kind == Some(OpeningKind::RoofVent) && connects[0] == Space::Outside {
        let detail = "the first space is the lower one, and outside is not below a roof".to_owned();
        faults.push(fault(at.element(0), "contradiction", detail, Some("name the room first".to_owned())));
    }
}

fn joins_two_spaces(spaces: &[Space; 2], at: &Pointer, what: &str, faults: &mut Vec<Invalid>) {
    let [first, second] = spaces;
    if first == second {
        let name = match first {
            Space::Room(key) => key.as_str(),
            Space::Outside => Key::OUTSIDE,
        };
        let detail = format!("{what} joins two different spaces, and both are `{name}` here");
        let mend = format!("name the other space, or `{}`", Key::OUTSIDE);
        faults.push(fault(at.clone(), "joins_itself", detail, Some(mend)));
    }
}

/// Whether both spaces exist and differ.
pub(super) fn spaces(
    spaces: &[Space; 2],
    at: &Pointer,
    what: &str,
    rooms: &Rooms<'_>,
    outline: &Outline,
    faults: &mut Vec<Invalid>,
) {
    joins_two_spaces(spaces, at, what, faults);
    spaces_exist(spaces, at, rooms, outline, faults);
}

fn spaces_exist(
    spaces: &[Space; 2],
    at: &Pointer,
    rooms: &Rooms<'_>,
    outline: &Outline,
    faults: &mut Vec<Invalid>,
) {
    for (index, space) in spaces.iter().enumerate() {
        let Space::Room(key) = space else { continue };
        if outline.all_rooms_known && !rooms.contains_key(key) {
            let keys = outline.rooms.iter().filter_map(|room| room.key.as_ref()).map(Key::as_str);
            let nearest = keys
                .chain([Key::OUTSIDE])
                .map(|known| (strsim::jaro_winkler(known, key.as_str()), known))
                .filter(|(likeness, _)| *likeness >= LEAST_LIKENESS)
                .max_by(|(a, _), (b, _)| a.total_cmp(b))
                .map(|(_, known)| known.to_owned());
            let detail = format!("`{key}` is no room of this building");
            faults.push(fault(at.element(index), "unknown_room", detail, nearest));
        }
    }
}

/// What can be told from the rooms on both sides.
pub(super) fn with_rooms(
    opening: &OpeningOutline,
    rooms: &Rooms<'_>,
    outline: &Outline,
    faults: &mut Vec<Invalid>,
) {
    let Some(connects) = &opening.connects else { return };
    spaces_exist(connects, &opening.at.member("connects"), rooms, outline, faults);
    let Some(kind) = opening.kind else { return };
    let [first, second] = connects;
    if first == second {
        return;
    }

    let first = room_of(first, rooms);
    for (index, room) in [first, room_of(second, rooms)].into_iter().enumerate() {
        let Some(room) = room else { continue };
        if kind.is_horizontal() {
            fits_the_floor(opening, room, faults);
        } else {
            is_no_wider_than_the_wall(opening, room, faults);
            let rise_m = if index == 0 {
                Some(0.0)
            } else {
                first.map_or(Some(0.0), |first| rise(first, room, outline))
            };
            is_no_taller_than_the_room(opening, room, rise_m, faults);
        }
    }
}

fn room_of<'a>(space: &Space, rooms: &Rooms<'a>) -> Option<&'a RoomOutline> {
    match space {
        Space::Room(key) => rooms.get(key).copied(),
        Space::Outside => None,
    }
}

/// How far the floor of `first` lies above that of `second`, in m, where the record tells.
fn rise(first: &RoomOutline, second: &RoomOutline, outline: &Outline) -> Option<f64> {
    let (a, b) = (first.floor?, second.floor?);
    if a == b {
        return Some(0.0);
    }
    let elevation_m = |number| {
        let floor = outline.floors.iter().find(|floor| floor.floor == number)?;
        floor.elevation_m.map(|elevation| elevation.get())
    };
    Some(elevation_m(a)? - elevation_m(b)?)
}

fn name(room: &RoomOutline) -> &str {
    room.key.as_ref().map_or("?", Key::as_str)
}

/// The longest straight wall a room can have, in m. Of a free shape only the perimeter is
/// known: one wall is shorter than all the others together.
fn longest_wall_m(plan: FloorPlan) -> f64 {
    match plan {
        FloorPlan::Rectangle { length_m, width_m } => length_m.get().max(width_m.get()),
        FloorPlan::Shape { perimeter_m, .. } => perimeter_m.get() / 2.0,
    }
}

fn is_no_wider_than_the_wall(opening: &OpeningOutline, room: &RoomOutline, faults: &mut Vec<Invalid>) {
    let (Some(width_m), Some(plan)) = (opening.width_m, room.plan) else { return };
    let wall_m = longest_wall_m(plan);
    if exceeds(width_m.get(), wall_m) {
        let detail = format!("{width_m} is wider than the longest wall of room `{}`, {wall_m} m", name(room));
        faults.push(fault(opening.at.member("width_m"), "wider_than_wall", detail, None));
    }
}

fn is_no_taller_than_the_room(
    opening: &OpeningOutline,
    room: &RoomOutline,
    rise_m: Option<f64>,
    faults: &mut Vec<Invalid>,
) {
    let (Some(height_m), Some(highest_m)) = (opening.height_m, room.highest_m()) else { return };
    // On another level, and nothing says how high: the opening must still fit somewhere.
    let sill_m = match (opening.sill_m, rise_m) {
        (Some(sill_m), Some(rise_m)) => (sill_m.get() + rise_m).max(0.0),
        _ => 0.0,
    };
    let top_m = sill_m + height_m.get();
    if exceeds(top_m, highest_m) {
        let detail = format!(
            "its upper edge, {top_m} m above the floor of room `{}`, is above the ceiling there, {highest_m} m",
            name(room)
        );
        faults.push(fault(opening.at.member("height_m"), "above_ceiling", detail, None));
    }
}

fn fits_the_floor(opening: &OpeningOutline, room: &RoomOutline, faults: &mut Vec<Invalid>) {
    let (Some(width_m), Some(height_m), Some(plan)) = (opening.width_m, opening.height_m, room.plan) else {
        return;
    };
    let fits = match plan {
        FloorPlan::Rectangle { length_m, width_m: other_m } => {
            let [long, short] = longer_first(length_m.get(), other_m.get());
            let [a, b] = sides(width_m, height_m);
            !exceeds(a, long) && !exceeds(b, short)
        }
        FloorPlan::Shape { area_m2, .. } => {
            let [a, b] = sides(width_m, height_m);
            !exceeds(a, longest_wall_m(plan)) && !exceeds(a * b, area_m2.get())
        }
    };
    if !fits {
        let detail = format!("{width_m} by {height_m} does not fit the floor of room `{}`", name(room));
        faults.push(fault(opening.at.member("width_m"), "larger_than_floor", detail, None));
    }
}

fn sides(width_m: OpeningSide, height_m: OpeningSide) -> [f64; 2] {
    longer_first(width_m.get(), height_m.get())
}

fn longer_first(a: f64, b: f64) -> [f64; 2] {
    if a >= b { [a, b] } else { [b, a] }
}
