//! Water asked for by two published formulas, against the water recorded.

use super::findings::WaterFinding;
use super::inputs::Inputs;
use super::methods::figure;
use crate::fire::Exceeded;
use crate::fire::fire_flow::{compare, nfa_l_min, nfa_limits, royer_nelson_l_min};

/// Knock-down of the shut room by its volume, and the rate of an interior attack with the whole room involved.
pub(super) fn finding(inputs: &Inputs<'_>) -> WaterFinding {
    /// After flashover the whole floor burns.
    const INVOLVED_SHARE: f64 = 1.0;

    let knock_down = royer_nelson_l_min(inputs.geometry.volume_m3);
    let attack = nfa_l_min(inputs.geometry.floor_area_m2, INVOLVED_SHARE);
    let needed_l_min = knock_down.max(attack);
    let available_l_min = inputs.plan.building.water_available_l_min.map(|flow| flow.get());
    WaterFinding {
        figures: vec![
            figure(
                "royer_nelson_fire_flow",
                "knock_down_rate_l_min",
                knock_down,
                &Exceeded::none(),
                false,
                None,
            ),
            figure(
                "nfa_fire_flow",
                "interior_attack_rate_l_min",
                attack,
                &nfa_limits(INVOLVED_SHARE),
                false,
                None,
            ),
        ],
        needed_l_min,
        available_l_min,
        enough: available_l_min
            .map(|available_l_min| compare(needed_l_min, available_l_min).shortfall_l_min <= 0.0),
    }
}
