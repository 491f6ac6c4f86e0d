//! The nearest value of an input that would change a rating `not_indicated`: searched for, not told.

use super::backdraft::Starved;
use super::findings::{Direction, HoldsWhile};
use super::inputs::Inputs;
use super::judge::{excess_in, judge};
use super::openings::{CRACK_SHARE_M2_M3, State};
use super::rules::NOT_INDICATED_RATIO;
use super::scenarios::{Cap, Screened, spread_of_linings};
use crate::domain::assumptions::Scenario;
use crate::fire::ventilation::WallOpening;

/// How finely a search steps: factor from one trial to the next, and halvings after the first that flips.
#[derive(Clone, Copy)]
struct Steps {
    factor: f64,
    most: u32,
    halvings: u32,
}

const FINE: Steps = Steps { factor: 1.3, most: 18, halvings: 8 };
/// For shut rooms, where each trial follows a whole fire.
const COARSE: Steps = Steps { factor: 2.0, most: 3, halvings: 4 };

impl Steps {
    /// The last value that holds before the nearest one above `from` (or below it) that flips, within a limit.
    fn search(self, from: f64, limit: f64, flips: impl Fn(f64) -> bool) -> Option<f64> {
        let up = limit > from;
        let (mut holds, mut trial) = (from, from);
        for _ in 0..self.most {
            trial = if up { (trial * self.factor).min(limit) } else { (trial / self.factor).max(limit) };
            if flips(trial) {
                let mut flipped = trial;
                for _ in 0..self.halvings {
                    let middle = (holds * flipped).sqrt();
                    if flips(middle) { flipped = middle } else { holds = middle }
                }
                return Some(holds);
            }
            if trial == limit {
                return None;
            }
            holds = trial;
        }
        None
    }
}

/// What would make flashover possible: more fire load, faster growth, another opening, better insulation.
pub(super) fn flashover(inputs: &Inputs<'_>, screened: &[Screened], cap: Cap) -> Vec<HoldsWhile> {
    let contents = &inputs.contents;
    // Open states flip long before shut ones do; only where there is none do those count.
    let mut states: Vec<State> = Vec::with_capacity(screened.len());
    let any_open = screened.iter().any(|found| found.state.is_open());
    for found in screened.iter().filter(|found| found.state.is_open() == any_open) {
        if !states.contains(&found.state) {
            states.push(found.state);
        }
    }
    let steps = if any_open { FINE } else { COARSE };
    let load = contents.load;
    let alpha = contents.growth.typical_kw_s2;
    let flips_in = |state: &State, p95_mj_m2: f64, growth_kw_s2: f64, heat_share: f64| {
        let surfaces = inputs.lined.around(state.wall.area_m2).taking_heat(heat_share);
        let fire = cap.on(contents.fire(p95_mj_m2, growth_kw_s2));
        judge(inputs, state, fire, &surfaces).to_lowest >= NOT_INDICATED_RATIO
    };
    let flips = |p95_mj_m2: f64, growth_kw_s2: f64, heat_share: f64| {
        states.iter().any(|state| flips_in(state, p95_mj_m2, growth_kw_s2, heat_share))
    };
    let mut found = Vec::with_capacity(5);

    // Where the oxygen of a shut room decides, neither fire load nor growth does.
    let starved = screened.iter().any(|found| found.typical.burn().is_some_and(|burn| burn.starved));
    if any_open || !starved {
        let now = load.typical_mj_m2;
        if now > 0.0 {
            let value = steps.search(now, 100_000.0, |x| flips(load.p95_mj_m2 * x / now, alpha, 1.0));
            found.extend(value.map(|value| flip("fuel_load_mj_m2", now, value, "the fire load", "MJ/m²")));
        }
        let value = steps.search(alpha, 20.0, |x| flips(load.p95_mj_m2, x, 1.0));
        found.extend(value.map(|value| flip("growth_kw_s2", alpha, value, "growth", "kW/s²")));
    }
    // The scenario that stands most open to outside is the one whose opening is varied.
    let most_open = states
        .iter()
        .copied()
        .reduce(|most, next| if next.outside.area_m2 > most.outside.area_m2 { next } else { most });
    found.extend(
        most_open.and_then(|state| {
            opening_flip(inputs, &state, |state| flips_in(state, load.p95_mj_m2, alpha, 1.0))
        }),
    );
    if any_open {
        let now = inputs.lined.surfaces[0].conductivity_w_mk;
        let value = FINE.search(now, 0.05 * now, |x| flips(load.p95_mj_m2, alpha, x / now));
        found.extend(value.map(|value| {
            flip("linings.walls.conductivity_w_mk", now, value, "the conductivity of the linings", "W/(m K)")
        }));
    } else if let Some(state) = states.first().filter(|state| state.leak_m2 > 0.0) {
        let now = state.leak_m2;
        let value = COARSE.search(now, CRACK_SHARE_M2_M3 * inputs.geometry.volume_m3, |x| {
            flips_in(&State { leak_m2: x, ..*state }, load.p95_mj_m2, alpha, 1.0)
        });
        found.extend(value.map(|value| flip("leakage_area_m2", now, value, "the leakage", "m²")));
    }
    let mut found = nearest_first(found);
    if cap != Cap::NONE {
        found.insert(
            0,
            HoldsWhile {
                field: "sprinklers.state",
                value: None,
                now: cap.heat_release_kw,
                direction: Direction::Below,
                words: format!(
                    "Holds while the sprinklers work as recorded and keep the fire below {} kW.",
                    short(cap.heat_release_kw)
                ),
            },
        );
    }
    found
}

/// The area open to outside at which it flips: more than now, or less; where nothing stands open to outside,
/// of an opening 2 m high. Air behind inner doors is left out: it is not what an opening to outside adds.
fn opening_flip(inputs: &Inputs<'_>, state: &State, flips: impl Fn(&State) -> bool) -> Option<HoldsWhile> {
    const DOOR_HEIGHT_M: f64 = 2.0;

    let now = state.outside.area_m2;
    let height_m =
        if now > 0.0 { state.outside.height_m } else { DOOR_HEIGHT_M.min(0.9 * inputs.geometry.height_m) };
    let with = |area_m2: f64| {
        let wall = WallOpening { area_m2, height_m };
        State { wall, outside: wall, behind_m3: 0.0, behind_outside_m2: 0.0, ..*state }
    };
    // Smaller openings count as cracks.
    let least_m2 = CRACK_SHARE_M2_M3 * inputs.geometry.volume_m3;
    let most_m2 = 0.5 * inputs.geometry.wall_area_m2();
    let value = if now > least_m2 {
        let up = FINE.search(now, most_m2, |x| flips(&with(x)));
        let down = FINE.search(now, least_m2, |x| flips(&with(x)));
        let far = |value: Option<f64>| value.map_or(f64::INFINITY, |value| (value / now).ln().abs());
        if far(down) < far(up) { down } else { up }
    } else if flips(&with(least_m2)) {
        Some(least_m2)
    } else {
        FINE.search(least_m2, most_m2, |x| flips(&with(x)))
    }?;
    Some(flip("openings.open_area_m2", now, value, "the area open to outside", "m²"))
}

/// What would make the backdraft screen fail: more or less leakage, more fire load.
pub(super) fn backdraft(inputs: &Inputs<'_>, worst: &Starved, cap: Cap) -> Vec<HoldsWhile> {
    let contents = &inputs.contents;
    let share = spread_of_linings(inputs);
    let surfaces = inputs.lined.around(0.0).taking_heat(share.low);
    let stand = super::openings::Stand::as_recorded(Scenario::Shut);
    let leak_m2 = stand.state(inputs.plan, inputs.number, inputs.envelope_leak_m2, inputs.ambient_k).leak_m2;
    let flips = |load_mj_m2: f64, leak_m2: f64| {
        let fire = cap.on(contents.fire(load_mj_m2, contents.growth.fast_kw_s2));
        let found = excess_in(inputs, fire, &surfaces, leak_m2);
        found.high_kj_kg >= found.threshold_kj_kg
    };
    let mut found = Vec::with_capacity(2);
    // A starved fire wants air, one that burns out wants fuel.
    let now = contents.load.typical_mj_m2;
    if worst.starved && leak_m2 > 0.0 {
        let most_m2 = (0.002 * inputs.geometry.volume_m3).max(2.0 * leak_m2);
        let value = COARSE.search(leak_m2, most_m2, |x| flips(contents.load.p95_mj_m2, x));
        found.extend(value.map(|value| flip("leakage_area_m2", leak_m2, value, "the leakage", "m²")));
    } else if now > 0.0 {
        // Fire loads differ by more than leakages do: wider steps.
        let steps = Steps { factor: 4.0, ..COARSE };
        let value = steps.search(now, 100_000.0, |x| flips(contents.load.p95_mj_m2 * x / now, leak_m2));
        found.extend(value.map(|value| flip("fuel_load_mj_m2", now, value, "the fire load", "MJ/m²")));
    }
    nearest_first(found)
}

fn flip(field: &'static str, now: f64, value: f64, name: &str, unit: &str) -> HoldsWhile {
    let (direction, word) =
        if value > now { (Direction::Below, "below") } else { (Direction::Above, "above") };
    HoldsWhile {
        field,
        value: Some(value),
        now,
        direction,
        words: format!("Holds while {name} stays {word} {} {unit}; now {}.", short(value), short(now)),
    }
}

/// Three significant digits.
fn short(value: f64) -> String {
    if value == 0.0 {
        return "0".to_owned();
    }
    let whole = value.abs().log10().floor();
    if whole >= 2.0 {
        format!("{value:.0}")
    } else if whole >= 1.0 {
        format!("{value:.1}")
    } else if whole >= 0.0 {
        format!("{value:.2}")
    } else if whole >= -1.0 {
        format!("{value:.3}")
    } else {
        format!("{value:.4}")
    }
}

/// By the factor between the value and that of now; an opening that is not there yet comes first: it takes
/// the least to make one.
fn nearest_first(mut found: Vec<HoldsWhile>) -> Vec<HoldsWhile> {
    let far = |holds: &HoldsWhile| match holds.value {
        Some(value) if holds.now > 0.0 => (value / holds.now).ln().abs(),
        _ => 0.0,
    };
    found.sort_by(|a, b| far(a).total_cmp(&far(b)));
    if found.is_empty() {
        found.push(HoldsWhile {
            field: "inputs",
            value: None,
            now: 0.0,
            direction: Direction::Below,
            words: "No single input, changed alone within its limits, changes the rating.".to_owned(),
        });
    }
    found
}

#[cfg(test)]
mod tests {
    use super::FINE;

    #[test]
    fn the_search_finds_the_turning_point_from_either_side() {
        let up = FINE.search(1.0, 100.0, |x| x >= 7.0).unwrap();
        let down = FINE.search(100.0, 1.0, |x| x <= 7.0).unwrap();

        assert!((up / 7.0 - 1.0).abs() < 0.01 && up < 7.0, "{up}");
        assert!((down / 7.0 - 1.0).abs() < 0.01 && down > 7.0, "{down}");
    }

    #[test]
    fn the_search_says_so_where_nothing_flips() {
        assert_eq!(FINE.search(1.0, 100.0, |_| false), None);
    }
}
