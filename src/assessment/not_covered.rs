//! What was not computed: travels with every rating, above all with `not_indicated`.

use super::findings::{FlashoverRating, NotCovered};
use super::inputs::Inputs;
use super::scenarios::Screened;
use crate::domain::room::CeilingForm;

const fn item(key: &'static str, text: &'static str) -> NotCovered {
    NotCovered { key, text: std::borrow::Cow::Borrowed(text) }
}

/// What the flashover screen leaves out.
pub(super) fn flashover(
    inputs: &Inputs<'_>,
    found: &Screened,
    rating: FlashoverRating,
    sprinkler_credited: bool,
) -> Vec<NotCovered> {
    let mut left_out = vec![
        item("smouldering", "Smouldering before flames: the clock begins at established burning."),
        item("fire_from_outside", "Fire that comes from another room or from outside."),
        item("wind", "Wind on the openings."),
    ];
    if found.state.horizontal_m2 > 0.0 {
        left_out.push(item(
            "horizontal_openings",
            "Open hatches and roof vents: the correlations know wall openings only.",
        ));
    }
    if inputs.room.mechanical.is_some_and(|fans| fans.supply_m3_s.get() + fans.extract_m3_s.get() > 0.0) {
        left_out
            .push(item("mechanical_ventilation", "Air that fans move: the screen knows natural flow only."));
    }
    if inputs.room.ceiling.form != CeilingForm::Flat {
        left_out.push(item(
            "ceiling_form",
            "The form of the ceiling: the room counts as a box of its mean height.",
        ));
    }
    if found.state.behind_m3 > 0.0 {
        left_out.push(item(
            "rooms_behind",
            "Fire and heat in the rooms behind an open inner door: they count as air only.",
        ));
    }
    if sprinkler_credited {
        left_out.push(item(
            "sprinkler_failure",
            "Sprinklers that fail, are shut off or do not reach the fire: the rating counts on them.",
        ));
    }
    if inputs.lined.combustible {
        left_out
            .push(item("burning_linings", "Flame over burning linings, beyond the growth that they set."));
    }
    if rating == FlashoverRating::NotIndicated {
        left_out.push(item(
            "other_scenarios",
            "Anything that opens, breaks or adds fuel beyond the scenarios named.",
        ));
    }
    left_out
}

/// What the backdraft screen leaves out.
pub(super) fn backdraft(inputs: &Inputs<'_>) -> Vec<NotCovered> {
    let mut left_out = vec![
        item("chain", "Inflow, mixing, ignition, pressure and fireball after a door is opened."),
        item("smouldering", "Gas from smouldering before or instead of flames."),
        item("smoke_explosion", "Smoke that mixes with air in rooms next door before it ignites."),
        item("glass", "Glass that falls while the room is shut and lets air in."),
    ];
    if inputs.room.mechanical.is_some_and(|fans| fans.supply_m3_s.get() + fans.extract_m3_s.get() > 0.0) {
        left_out.push(item("mechanical_ventilation", "Air that fans move into or out of the shut room."));
    }
    left_out
}

/// What the entry finding leaves out at screening.
pub(super) fn entry() -> Vec<NotCovered> {
    vec![item("entry", "The course of the room after a crew opens it.")]
}
