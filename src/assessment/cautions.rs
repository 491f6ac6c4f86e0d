//! Cautions that travel with the findings.

use super::findings::{Caution, FlashoverFinding, FlashoverRating, TransientFinding, Wanted};
use super::hazards;
use super::inputs::Inputs;
use crate::domain::Building;
use crate::domain::assumptions::{Assumptions, Level};
use crate::domain::building::SprinklerState;
use crate::domain::opening::{OpeningKind, Space};

const fn caution(key: &'static str, text: &'static str) -> Caution {
    Caution { key, text: std::borrow::Cow::Borrowed(text) }
}

const PLANNING_ONLY: Caution = caution(
    "planning_only",
    "For planning only. These figures do not replace size-up, local codes, procedures or a licensed engineer.",
);
const CONDITIONAL: Caution = caution(
    "conditional",
    "Every rating is conditional on an established flaming fire in the room that nobody fights. It is never the chance of a \
     fire.",
);

/// Cautions for the building as a whole.
pub(super) fn of_building(building: &Building, assumptions: &Assumptions, level: Level) -> Vec<Caution> {
    let mut cautions = vec![PLANNING_ONLY, CONDITIONAL];
    if collapses_early(building) {
        cautions.push(COLLAPSE);
    }
    if assumptions.ambient.wind_m_s.is_some_and(|wind| wind > 0.0) {
        cautions.push(if level == Level::Screening { WIND_NOT_COMPUTED } else { WIND_COMPUTED });
    }
    if level != Level::Screening {
        cautions.push(BY_SCREENING);
    }
    if building.sprinklers.state == SprinklerState::OutOfService {
        cautions.push(caution(
            "sprinklers_out_of_service",
            "The sprinklers are recorded as out of service: no credit is given to them.",
        ));
    }
    if building.water_available_l_min.is_none() {
        cautions.push(caution(
            "water_not_recorded",
            "The water available is not recorded: it cannot be set against the water asked for.",
        ));
    }
    cautions
}

const COLLAPSE: Caution = caution(
    "collapse",
    "Floors and roof are lightweight or of unknown construction: they may come down early over or under a fire. Collapse is \
     not computed.",
);
const WIND_NOT_COMPUTED: Caution = caution(
    "wind",
    "Wind is given but not computed at screening: it can drive fire through a room that stands open.",
);
const WIND_COMPUTED: Caution = caution(
    "wind",
    "Wind is computed as given, steady, on openings whose direction is recorded: gusts and openings of unknown direction can \
     do worse.",
);
const BY_SCREENING: Caution = caution(
    "by_screening",
    "Backdraft, the filling with smoke, the strip of growth classes and what protection changes are by screening: they can \
     differ from the runs.",
);
const WIND_EXPOSED: Caution = caution(
    "wind",
    "The room has windows or doors to outside: wind, taken as zero, can drive its fire inwards once they are open or broken.",
);

/// Whether floors and roof may come down early: building code types I, II and IV do not, by what is recorded; type III and
/// V are combustible; what is not recorded is unknown.
///
/// Types as in the International Building Code, Chapter 6 (from memory). Type II-B is unprotected steel, which sags early.
fn collapses_early(building: &Building) -> bool {
    let Some(construction) = &building.construction_type else { return true };
    let kind = construction.0.to_ascii_uppercase();
    let kind = kind.trim().trim_start_matches("TYPE").trim();
    let type_one = matches!(kind, "I" | "I-A" | "I-B" | "IA" | "IB");
    let type_two_a = matches!(kind, "II-A" | "IIA");
    !(type_one || type_two_a || kind.starts_with("IV"))
}

/// Cautions for one room, beside those of the building.
pub(super) fn of_room(
    inputs: &Inputs<'_>,
    building: &[Caution],
    flashover: &FlashoverFinding,
    transient: Option<&TransientFinding>,
) -> Vec<Caution> {
    let mut cautions = building.to_vec();
    let plan = inputs.plan;
    let exposed = plan.of_room[inputs.number].iter().any(|&number| {
        let opening = &plan.building.openings[number];
        let outer = opening.connects.contains(&Space::Outside);
        outer && matches!(opening.kind, OpeningKind::Window | OpeningKind::Door | OpeningKind::DoubleDoor)
    });
    if exposed && cautions.iter().all(|caution| caution.key != "wind") {
        cautions.push(WIND_EXPOSED);
    }
    if super::protection::sprinkler_credited(inputs) {
        cautions.push(caution(
            "sprinkler_credit",
            "The ratings count on sprinklers that are recorded as working and tested. Without them the room is worse: see its \
             protection.",
        ));
    }
    if inputs.lined.combustible {
        cautions.push(caution(
            "combustible_lining",
            "Walls or ceiling burn: the lining joins the fire and sets its growth.",
        ));
    }
    if flashover.rating == FlashoverRating::NotIndicated {
        cautions.push(caution(
            "not_indicated",
            "Not indicated holds only while the inputs named beside it stay so, and says nothing of what was not computed.",
        ));
    }
    if let Some(found) = transient {
        if !found.disagreements.is_empty() {
            cautions.push(caution(
                "screening_disagrees",
                "The screen and the runs differ by more than hand methods scatter: see the disagreements.",
            ));
        }
        if found.place.iter().any(|number| !number.inside) {
            cautions.push(caution(
                "beyond_validation",
                "The room and its fire lie outside the experiments that the runs were compared with: see its place.",
            ));
        }
    }
    cautions.extend(hazards::cautions(inputs));
    cautions
}

/// What the bureau is asked to record.
pub(super) fn wanted(inputs: &Inputs<'_>) -> Vec<Wanted> {
    let mut wanted = Vec::new();
    let mut ask = |key, text: &'static str| wanted.push(Wanted { key, text: text.into() });
    if inputs.plan.of_room[inputs.number].is_empty() {
        ask(
            "openings",
            "No opening is recorded for this room: it was assessed shut. Record its doors, windows, hatches and gaps.",
        );
    }
    if inputs.hazards_unrecorded() {
        ask("hazards", "Record the hazards of this room, or `none`.");
    }
    if !inputs.contents.load.recorded && inputs.contents.packages.is_empty() {
        ask("contents", "Record the fire load or what stands in this room: its use stands for it now.");
    }
    if inputs.lined.unrecorded.contains(&true) {
        ask("linings", "Record the linings of walls, ceiling and floor.");
    }
    wanted
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::domain::building::ConstructionType;

    #[test]
    fn only_types_recorded_as_holding_spare_the_collapse_caution() {
        for (kind, expected) in [
            ("I-A", false),
            ("IB", false),
            ("II-A", false),
            ("II-B", true),
            ("III-A", true),
            ("III-B", true),
            ("IV", false),
            ("IV-HT", false),
            ("V-A", true),
            ("V-B", true),
            ("lightweight", true),
        ] {
            let building = Building {
                construction_type: Some(ConstructionType(kind.to_owned())),
                ..super::super::testing::building(Vec::new(), Vec::new())
            };
            assert_eq!(collapses_early(&building), expected, "{kind}");
        }
    }
}
