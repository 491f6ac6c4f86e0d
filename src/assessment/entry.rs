//! How long a crew that opens up has got: not assessed yet.

use super::findings::{EntryFinding, FlashoverRating, Reason};
use super::inputs::Inputs;
use super::not_covered;
use crate::domain::assumptions::Scenario;

/// The finding: which openings a crew could use, and why there is no rating.
pub(super) fn finding(inputs: &Inputs<'_>, transient: bool) -> EntryFinding {
    let plan = inputs.plan;
    let usable = plan.of_room[inputs.number]
        .iter()
        .filter(|&&number| plan.building.openings[number].entry)
        .map(|&number| plan.opening_key(number).clone())
        .collect();
    let reason = if transient { not_run() } else { needs_transient() };
    EntryFinding { openings_tried: usable, scenario: Some(Scenario::Entry), ..bare(reason) }
}

fn needs_transient() -> Reason {
    Reason { key: "needs_level_transient", text: "needs level transient".into() }
}

fn not_run() -> Reason {
    let text = "not_run: no run is made yet in which a crew opens the room";
    Reason { key: "not_run", text: text.into() }
}

/// A finding of which only the reason is known.
pub(super) fn bare(reason: Reason) -> EntryFinding {
    EntryFinding {
        rating: FlashoverRating::NotAssessed,
        probability: None,
        scenario: None,
        opening: None,
        opened_at_s: None,
        time_to_flashover_s: None,
        time_to_260_c_s: None,
        time_to_10_kw_m2_s: None,
        state_at_opening: None,
        openings_tried: Vec::new(),
        reason: Some(reason),
        provisional: true,
        holds_while: Vec::new(),
        not_covered: not_covered::entry(),
        figures: Vec::new(),
    }
}
