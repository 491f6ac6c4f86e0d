//! The rooms of a building, worst first: clause 2.12.

use std::cmp::{Ordering, Reverse};

use super::findings::{Ranked, RoomFindings};
use super::rules::{backdraft_weight, flashover_weight};

/// What rooms are compared by; less is worse.
///
/// The worst of flashover and backdraft leads, then flashover before water, then both ratings together, then
/// the time. Entry counts once it is assessed: while no room has it, it says nothing about any.
fn order(a: &RoomFindings, b: &RoomFindings, entry_counts: bool) -> Ordering {
    let weights = |room: &RoomFindings| {
        let flashover = flashover_weight(room.flashover.rating);
        let backdraft = backdraft_weight(room.backdraft.rating);
        let entry = if entry_counts { flashover_weight(room.entry.rating) } else { 0 };
        (
            Reverse(flashover.max(backdraft).max(entry)),
            Reverse(room.flashover.before_water == Some(true)),
            Reverse(flashover + backdraft + entry),
        )
    };
    let time_s = |room: &RoomFindings| room.flashover.time_s.map_or(f64::INFINITY, |band| band.typical);
    weights(a).cmp(&weights(b)).then(time_s(a).total_cmp(&time_s(b)))
}

/// The ranking; rooms that tie share the place and stand in the order of their keys.
pub(super) fn ranking(rooms: &[RoomFindings]) -> Vec<Ranked> {
    use super::findings::FlashoverRating;

    let entry_counts = rooms.iter().any(|room| room.entry.rating != FlashoverRating::NotAssessed);
    let mut sorted: Vec<&RoomFindings> = rooms.iter().collect();
    sorted.sort_by(|a, b| order(a, b, entry_counts).then_with(|| a.key.cmp(&b.key)));
    let mut ranked: Vec<Ranked> = Vec::with_capacity(sorted.len());
    for (number, room) in sorted.iter().enumerate() {
        let place = match number.checked_sub(1) {
            Some(before) if order(sorted[before], room, entry_counts) == Ordering::Equal => {
                ranked[before].place
            }
            _ => number + 1,
        };
        ranked.push(Ranked {
            place,
            room: room.key.clone(),
            flashover: room.flashover.rating,
            flashover_time_s: room.flashover.time_s.map(|band| band.typical),
            before_water: room.flashover.before_water,
            backdraft: room.backdraft.rating,
            entry: room.entry.rating,
        });
    }
    ranked
}
