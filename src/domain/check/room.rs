//! Rules of one room.

use std::f64::consts::PI;

use super::{Invalid, Pointer, RoomOutline, exceeds};
use crate::domain::room::{FloorPlan, Hazard};
use crate::domain::word::Word;

pub(super) fn alone(room: &RoomOutline, faults: &mut Vec<Invalid>) {
    perimeter_encloses_the_area(room, faults);
    ceiling_is_no_lower_than_the_walls(room, faults);
    contents_fit(room, faults);
    hazards_agree(room, faults);
}

fn fault(pointer: Pointer, code: &'static str, detail: String, suggestion: Option<String>) -> Invalid {
    Invalid { pointer, code, detail, suggestion }
}

/// The circle has the shortest perimeter of all shapes of an area.
fn perimeter_encloses_the_area(room: &RoomOutline, faults: &mut Vec<Invalid>) {
    if let Some(FloorPlan::Shape { area_m2, perimeter_m }) = room.plan {
        let least_m = 2.0 * (PI * area_m2.get()).sqrt();
        if exceeds(least_m, perimeter_m.get()) {
            let detail = format!(
                "no shape of {area_m2} has a perimeter of {perimeter_m}: even a circle needs {least_m:.2} m"
            );
            faults.push(fault(room.at.member("perimeter_m"), "contradiction", detail, None));
        }
    }
}

fn ceiling_is_no_lower_than_the_walls(room: &RoomOutline, faults: &mut Vec<Invalid>) {
    let high_m = room.ceiling.and_then(|ceiling| ceiling.high_m);
    if let (Some(height_m), Some(high_m)) = (room.height_m, high_m)
        && exceeds(height_m.get(), high_m.get())
    {
        let detail = format!(
            "the highest point of the ceiling, {high_m}, lies below `height_m`, {height_m}, which is its lowest point"
        );
        faults.push(fault(room.at.member("ceiling").member("high_m"), "contradiction", detail, None));
    }
}

fn contents_fit(room: &RoomOutline, faults: &mut Vec<Invalid>) {
    if let Some(highest_m) = room.highest_m() {
        for (pointer, height_m) in &room.heights_m {
            if exceeds(*height_m, highest_m) {
                let detail = format!("{height_m} m is more than the room is high, {highest_m} m");
                faults.push(fault(pointer.clone(), "above_ceiling", detail, None));
            }
        }
    }
    if let (Some(footprint_m2), Some(plan)) = (room.footprint_m2, room.plan)
        && exceeds(footprint_m2.get(), plan.area_m2())
    {
        let area_m2 = plan.area_m2();
        let detail = format!("the goods cover {footprint_m2}, more than the floor, {area_m2} m2");
        faults.push(fault(
            room.at.member("storage").member("footprint_m2"),
            "larger_than_floor",
            detail,
            None,
        ));
    }
}

fn hazards_agree(room: &RoomOutline, faults: &mut Vec<Invalid>) {
    let Some(hazards) = &room.hazards else { return };
    for (index, hazard) in hazards.iter().enumerate() {
        let pointer = room.at.member("hazards").element(index);
        let word = hazard.word();
        if hazards.iter().take(index).any(|earlier| earlier == hazard) {
            faults.push(fault(pointer, "duplicate", format!("`{word}` stands twice in this list"), None));
        } else if matches!(hazard, Hazard::None | Hazard::NotRecorded) && hazards.len() > 1 {
            let detail = format!("`{word}` cannot stand beside other hazards");
            let mend = "keep either this word alone or the hazards".to_owned();
            faults.push(fault(pointer, "contradiction", detail, Some(mend)));
        }
    }
}
