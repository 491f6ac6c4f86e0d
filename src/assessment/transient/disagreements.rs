//! Where the screen and the runs differ by more than hand methods are known to scatter.

use super::super::findings::Disagreement;
use super::super::inputs::Inputs;
use super::super::rules::{EXPECTED_RATIO, NOT_INDICATED_RATIO};
use super::super::scenarios::{Cap, Screened, hottest_k};
use super::study::Study;
use crate::fire::constants::ICE_POINT_K;

/// Rise of the layer by hand over measured: 1.44 to 1.56 with a scatter of 0.25 to 0.32 (from memory). Two of it either
/// way of the middle.
const RISE: (f64, f64) = (1.5 - 2.0 * 0.3 * 1.5, 1.5 + 2.0 * 0.3 * 1.5);

/// The governing scenario's screen beside its run.
pub(super) fn of(inputs: &Inputs<'_>, study: &Study, screened: &[Screened]) -> Vec<Disagreement> {
    let mut found = Vec::new();
    let ran = &study.ran[study.governing];
    let Some(screen) = screened.iter().find(|screen| screen.scenario == ran.standing.scenario) else {
        return found;
    };
    let cap = Cap::NONE;
    let surfaces = inputs.lined.around(screen.state.wall.area_m2);
    let by_hand_k = hottest_k(inputs, screen, &surfaces, cap) - inputs.ambient_k;
    let by_run_k = ran.course.hottest_k - inputs.ambient_k;
    // Past flashover neither says how hot.
    let grown = ran.course.flashover_s().is_some();
    if !grown && by_run_k > 0.0 && by_hand_k.is_finite() {
        let ratio = by_hand_k / by_run_k;
        if !(RISE.0..=RISE.1).contains(&ratio) {
            found.push(Disagreement {
                quantity: "layer_temperature_c",
                screening: Some(by_hand_k + inputs.ambient_k - ICE_POINT_K),
                transient: Some(by_run_k + inputs.ambient_k - ICE_POINT_K),
                words: format!(
                    "The screen makes the layer {ratio:.1} times as warm as the run; hand methods lie between {:.1} and {:.1}.",
                    RISE.0, RISE.1
                ),
            });
        }
    }
    let share = screen.typical.to_highest;
    let words = match ran.course.flashover_s() {
        Some(_) if screen.p95.to_lowest < NOT_INDICATED_RATIO => {
            Some("The run flashes over; by the screen the room has less than 0.6 times the heat that takes.")
        }
        None if share >= EXPECTED_RATIO => Some(
            "The run does not flash over; by the screen the room has more than 1.4 times the heat that takes.",
        ),
        _ => None,
    };
    if let Some(words) = words {
        found.push(Disagreement {
            quantity: "flashover_time_s",
            screening: screen.time_s().map(|band| band.typical),
            transient: ran.course.flashover_s(),
            words: words.to_owned(),
        });
    }
    found
}
