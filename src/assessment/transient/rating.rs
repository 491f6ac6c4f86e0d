//! The flashover finding by the runs, in place of the screen's.

use std::borrow::Cow;

use super::super::clocks::{Clock, before_water};
use super::super::findings::{Band, FlashoverFinding, FlashoverRating, NotCovered, Reason, TransientFinding};
use super::super::inputs::Inputs;
use super::super::{hazards, large_spaces};
use super::course::Course;
use super::network::Corner;
use super::shell::Lean;
use super::study::{NoStudy, Study};
use crate::domain::room::CeilingForm;
use crate::fire::two_zone::{Failed, FailureReason};

/// The finding by the runs. `screened` is the screen's for the same scenario: what the correlations ask for stays beside.
pub(super) fn finding(
    inputs: &Inputs<'_>,
    study: &Study,
    found: &TransientFinding,
    clock: &Clock,
    large: &[&'static str],
    screened: FlashoverFinding,
) -> FlashoverFinding {
    let mut clauses = vec!["2.1", "2.13", "2.14"];
    let mut rating = study.rating;
    let mut time_s = study.band(Course::flashover_s);
    let mut why = reason(study, time_s);
    let mut because = provisional_because(inputs, study);
    if rating == FlashoverRating::NotIndicated
        && let Some((key, words)) = hazards::bar(inputs)
    {
        rating = FlashoverRating::Possible;
        why = Some(Reason { key, text: format!("{key}: {words}").into() });
        clauses.push("2.9");
    }
    let lifted = study.ran[study.governing].course.layer_600_c_s.is_some();
    if !large.is_empty() {
        clauses.push("2.8");
        if !lifted {
            rating = FlashoverRating::NotAssessed;
            why = Some(large_spaces::reason(large));
            time_s = None;
            because.retain(|input| input == "hazards");
        }
    }
    let assessed = rating != FlashoverRating::NotAssessed;
    let criterion = |of: fn(&Course) -> Option<f64>| if assessed { study.band(of) } else { None };
    let order = time_s.map(|time_s| (time_s, clock.finding.water_on_fire_s));
    let mut not_covered = not_covered(inputs, rating);
    not_covered.extend(found.not_covered.iter().cloned());
    let mut figures = screened.figures;
    figures.extend(found.figures.iter().cloned());
    FlashoverFinding {
        rating,
        probability: None,
        time_s,
        time_to_600_c_s: criterion(|course| course.layer_600_c_s),
        time_to_20_kw_m2_s: criterion(|course| course.floor_20_kw_m2_s),
        reason: why,
        scenario: Some(study.scenario()),
        before_water: order.map(|(flashover_s, water_s)| flashover_s.typical < water_s.typical),
        before_water_case: order.map(|(flashover_s, water_s)| before_water(flashover_s, water_s)),
        provisional: !because.is_empty(),
        provisional_because: because,
        holds_while: if rating == FlashoverRating::NotIndicated { study.holds.clone() } else { Vec::new() },
        not_covered,
        figures,
        clauses,
        required_heat_release_kw: screened.required_heat_release_kw,
        required_lowest_kw: screened.required_lowest_kw,
        available_heat_release_kw: screened.available_heat_release_kw,
        limited_by: screened.limited_by,
    }
}

/// The reason of a room without a study.
pub(super) fn no_study(none: &NoStudy) -> Reason {
    match none {
        NoStudy::Stopped => Reason { key: "stopped", text: "stopped: nobody waits for the answer".into() },
        NoStudy::NoScenario => Reason {
            key: "no_scenario",
            text: "no_scenario: none of the scenarios asked for can be run for flashover".into(),
        },
        NoStudy::Unfit(what) => Reason { key: "unfit", text: format!("unfit: {what}").into() },
        NoStudy::Failed(scenario, Failed { at_s, reason, .. }) => {
            let why = match reason {
                FailureReason::StepTooSmall => "its steps became too small",
                FailureReason::OutOfSteps => "it took more steps than a run may",
                FailureReason::Stopped => "it was stopped",
                FailureReason::Malformed(what) => what,
            };
            let scenario = crate::domain::word::Word::word(*scenario);
            Reason {
                key: "no_convergence",
                text: format!(
                    "no_convergence: the run of {scenario} came to no end; after {at_s:.0} s {why}"
                )
                .into(),
            }
        }
    }
}

fn reason(study: &Study, time_s: Option<Band>) -> Option<Reason> {
    let flashed = study.corners.iter().filter(|course| course.flashover_s().is_some()).count();
    let earliest_s = study.corners.iter().filter_map(Course::flashover_s).min_by(f64::total_cmp);
    match (time_s, earliest_s, study.elsewhere) {
        (Some(_), _, _) if flashed < 4 => Some(Reason {
            key: "not_at_every_corner",
            text: format!(
                "not_at_every_corner: {flashed} of 4 corners of fuel, growth, linings and leakage flash over; the band is of \
                 those that do and the typical case"
            )
            .into(),
        }),
        (Some(_), _, _) => None,
        (None, Some(at_s), _) => Some(Reason {
            key: "only_at_the_worst_corner",
            text: format!(
                "only_at_the_worst_corner: with typical inputs no criterion is met; at {flashed} of 4 corners one is, first \
                 after about {at_s:.0} s"
            )
            .into(),
        }),
        (None, None, Some(scenario)) => Some(Reason {
            key: "only_at_the_worst_corner",
            text: format!(
                "only_at_the_worst_corner: with typical inputs no criterion is met; with much fuel one is in {}",
                crate::domain::word::Word::word(scenario)
            )
            .into(),
        }),
        (None, None, None) => {
            let text = "not_reached: no run meets a criterion of flashover";
            Some(Reason { key: "not_reached", text: text.into() })
        }
    }
}

/// Inputs that nobody recorded and whose ends the corners tell apart.
fn provisional_because(inputs: &Inputs<'_>, study: &Study) -> Vec<Cow<'static, str>> {
    let mut because = Vec::new();
    if inputs.hazards_unrecorded() {
        because.push(Cow::Borrowed("hazards"));
    }
    if inputs.plan.of_room[inputs.number].is_empty() {
        because.push(Cow::Borrowed("openings"));
    }
    let flashes = |fire, shell| {
        let place = Corner::FOUR.iter().position(|corner| *corner == Corner { fire, shell });
        place.and_then(|place| study.corners.get(place)).is_some_and(|course| course.flashover_s().is_some())
    };
    let ends = [Lean::Low, Lean::High];
    let by_fire = ends.iter().any(|&shell| flashes(Lean::Low, shell) != flashes(Lean::High, shell))
        || study.elsewhere.is_some();
    let by_shell = ends.iter().any(|&fire| flashes(fire, Lean::Low) != flashes(fire, Lean::High));
    if by_fire && !inputs.contents.load.recorded {
        because.push(Cow::Borrowed("fuel_load_mj_m2"));
    }
    if by_fire && inputs.contents.growth.from != "assumption" {
        because.push(Cow::Borrowed("growth_kw_s2"));
    }
    if by_shell && (inputs.lined.unrecorded[0] || inputs.lined.unrecorded[1]) {
        because.push(Cow::Borrowed("linings"));
    }
    if by_shell && inputs.leak_assumed {
        because.push(Cow::Borrowed("leakage_area_m2"));
    }
    because
}

/// What the runs leave out of flashover.
fn not_covered(inputs: &Inputs<'_>, rating: FlashoverRating) -> Vec<NotCovered> {
    let item = |key, text: &'static str| NotCovered { key, text: text.into() };
    let mut left_out = vec![
        item("smouldering", "Smouldering before flames: the clock begins at established burning."),
        item("fire_from_outside", "Fire that comes from outside."),
        item("gusts", "Gusts, and wind beyond what was asked for."),
    ];
    if inputs.room.ceiling.form != CeilingForm::Flat {
        left_out.push(item(
            "ceiling_form",
            "The form of the ceiling: the room counts as a box of its mean height.",
        ));
    }
    if super::super::protection::sprinkler_credited(inputs) {
        left_out.push(item(
            "sprinkler_failure",
            "Sprinklers that fail, are shut off or do not reach the fire: the rating counts on them.",
        ));
    }
    if inputs.lined.combustible {
        left_out.push(item(
            "burning_linings",
            "Flame over burning linings, surface by surface: they join as one fire when the ceiling is hot.",
        ));
    }
    if rating == FlashoverRating::NotIndicated {
        left_out.push(item(
            "other_scenarios",
            "Anything that opens, breaks or adds fuel beyond the scenarios named.",
        ));
    }
    left_out
}
