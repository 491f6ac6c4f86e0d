//! Whether the room can flash over: the finding, from its screened scenarios.

use std::borrow::Cow;

use super::clocks::{Clock, before_water};
use super::findings::{
    Figure, FlashoverFinding, FlashoverRating, GrowthFinding, LimitedBy, Reason, ScenarioFinding,
};
use super::inputs::Inputs;
use super::judge::{CORNER, Judged, Limit, Required, enclosure, judge, moments, reached_by};
use super::methods::figure;
use super::scenarios::{Cap, Screened, governing, spread_of_leaks, spread_of_linings};
use super::{contents, hazards, holds_while, large_spaces, not_covered, rules};
use crate::domain::assumptions::{GrowthClass, Scenario};
use crate::fire::constants::{ICE_POINT_K, air_density_kg_m3};
use crate::fire::hot_layer::{Vented, mccaffrey_limits, mccaffrey_rise_k};
use crate::fire::linings::{conductance_limits, total_conductance_kw_k};
use crate::fire::oxygen::{self, burn_shut_limits};
use crate::fire::ventilation::{kawagoe_limit_kw, kawagoe_limits};
use crate::fire::{Exceeded, growth};

/// The finding, and which of the scenarios governs: by clause 2.5, unless the runs name one.
pub(super) fn finding(
    inputs: &Inputs<'_>,
    screened: &[Screened],
    clock: &Clock,
    cap: Cap,
    large: &[&'static str],
    governs: Option<Scenario>,
) -> (FlashoverFinding, Option<usize>) {
    let named = governs.and_then(|one| screened.iter().position(|found| found.scenario == one));
    let Some(place) = named.or_else(|| governing(screened)) else {
        let text = "no_scenario: none of the scenarios asked for can be screened for flashover";
        return (not_assessed(inputs, Reason { key: "no_scenario", text: text.into() }), None);
    };
    let found = &screened[place];
    let mut clauses = vec!["2.1", "2.2", if found.state.is_open() { "2.3" } else { "2.4" }, "2.5"];
    let mut rating = found.rating;
    let mut why = found.reason.clone();
    let mut time_s = found.time_s();
    let mut because = provisional_because(inputs, screened, found.rating, cap);

    if rating == FlashoverRating::NotIndicated
        && let Some((key, words)) = hazards::bar(inputs)
    {
        rating = FlashoverRating::Possible;
        why = Some(Reason { key, text: format!("{key}: {words}").into() });
        clauses.push("2.9");
    }
    if !large.is_empty() {
        rating = FlashoverRating::NotAssessed;
        why = Some(large_spaces::reason(large));
        time_s = None;
        because.retain(|input| input == "hazards");
        clauses = vec!["2.1", "2.8"];
    }
    let assessed = rating != FlashoverRating::NotAssessed;
    if time_s.is_none() && why.as_ref().is_none_or(|why| !tells_why_no_time(why)) && assessed {
        why = Some(no_time(found, rating));
    }
    if why.is_none() && time_s.is_some() && found.not_at_every_corner() {
        let text = "not_at_every_corner: with little fuel, slow growth and linings that take more heat no criterion is met; the \
                    band is of the corners where one is";
        why = Some(Reason { key: "not_at_every_corner", text: text.into() });
    }
    let holds_while = if rating == FlashoverRating::NotIndicated {
        holds_while::flashover(inputs, screened, cap)
    } else {
        Vec::new()
    };
    let required = found.typical.required_kw.filter(|(low, high)| low.is_finite() && high.is_finite());
    let order = time_s.map(|time_s| (time_s, clock.finding.water_on_fire_s));
    let criteria = |keep: bool, of: fn(&super::judge::Moments) -> Option<f64>| {
        if keep { found.band(of) } else { None }
    };
    let finding = FlashoverFinding {
        rating,
        probability: None,
        time_s,
        time_to_600_c_s: criteria(assessed, |m| m.layer_600_c_s),
        time_to_20_kw_m2_s: criteria(assessed, |m| m.floor_20_kw_m2_s),
        reason: why,
        required_heat_release_kw: required.map(|(_, high)| high),
        required_lowest_kw: required.map(|(low, _)| low),
        available_heat_release_kw: Some(found.typical.available_kw),
        limited_by: Some(limited_by(found.typical.limit)),
        scenario: Some(found.scenario),
        before_water: order.map(|(flashover_s, water_s)| flashover_s.typical < water_s.typical),
        before_water_case: order.map(|(flashover_s, water_s)| before_water(flashover_s, water_s)),
        provisional: !because.is_empty(),
        provisional_because: because,
        holds_while,
        not_covered: not_covered::flashover(inputs, found, rating, cap != Cap::NONE),
        figures: figures(inputs, found, cap),
        clauses,
    };
    (finding, Some(place))
}

/// A finding without figures.
pub(super) fn not_assessed(inputs: &Inputs<'_>, reason: Reason) -> FlashoverFinding {
    let because = if inputs.hazards_unrecorded() { vec![Cow::Borrowed("hazards")] } else { Vec::new() };
    FlashoverFinding { provisional: !because.is_empty(), provisional_because: because, ..bare(reason) }
}

/// A finding of which only the reason is known.
pub(super) fn bare(reason: Reason) -> FlashoverFinding {
    FlashoverFinding {
        rating: FlashoverRating::NotAssessed,
        probability: None,
        time_s: None,
        time_to_600_c_s: None,
        time_to_20_kw_m2_s: None,
        reason: Some(reason),
        required_heat_release_kw: None,
        required_lowest_kw: None,
        available_heat_release_kw: None,
        limited_by: None,
        scenario: None,
        before_water: None,
        before_water_case: None,
        provisional: true,
        provisional_because: Vec::new(),
        holds_while: Vec::new(),
        not_covered: Vec::new(),
        figures: Vec::new(),
        clauses: vec!["2.1"],
    }
}

pub(super) fn limited_by(limit: Limit) -> LimitedBy {
    match limit {
        Limit::Fuel => LimitedBy::Fuel,
        Limit::Air => LimitedBy::Ventilation,
        Limit::Oxygen => LimitedBy::Oxygen,
    }
}

fn tells_why_no_time(reason: &Reason) -> bool {
    matches!(reason.key, "horizontal_openings_only" | "large_space") || reason.key.starts_with("hazard_")
}

fn no_time(found: &Screened, rating: FlashoverRating) -> Reason {
    let (key, text): (_, Cow<'static, str>) = if rating == FlashoverRating::NotIndicated {
        ("not_reached", "not_reached: no criterion of flashover is met".into())
    } else if !found.state.is_open() {
        ("oxygen_budget", "oxygen_budget: a shut room is judged by its oxygen, which gives no time".into())
    } else if let Some(at_s) = found.moments[0].earliest_s() {
        let text = format!(
            "only_at_the_worst_corner: with typical inputs no criterion is met; with much fuel, fast growth, insulating \
             linings and the fire in a corner one is after about {at_s:.0} s"
        );
        ("only_at_the_worst_corner", text.into())
    } else {
        ("within_scatter", "within_scatter: no criterion is met, but the correlations scatter so far".into())
    };
    Reason { key, text }
}

/// Inputs that nobody recorded and that would change the rating between their low and high values.
///
/// Rated anew with one input at its corners, over the states in which the room stands open, or shut where
/// it never stands open.
fn provisional_because(
    inputs: &Inputs<'_>,
    screened: &[Screened],
    rating: FlashoverRating,
    cap: Cap,
) -> Vec<Cow<'static, str>> {
    let mut because = Vec::new();
    if inputs.hazards_unrecorded() {
        because.push(Cow::Borrowed("hazards"));
    }
    if inputs.plan.of_room[inputs.number].is_empty() {
        because.push(Cow::Borrowed("openings"));
    }
    let mut states: Vec<&Screened> = Vec::with_capacity(screened.len());
    for found in screened.iter().filter(|found| found.state.is_open()) {
        if states.iter().all(|other| other.state != found.state) {
            states.push(found);
        }
    }
    let never_open = states.is_empty();
    if never_open {
        states.extend(screened.first());
    }
    let contents = &inputs.contents;
    let load = contents.load;
    let grown = contents.growth;
    let with = |typical_load: f64, p95_load: f64, growth_kw_s2: f64, heat_share: f64, leak_share: f64| {
        states
            .iter()
            .map(|found| {
                let mut state = found.state;
                state.leak_m2 *= leak_share;
                let surfaces = inputs.lined.around(state.wall.area_m2).taking_heat(heat_share);
                let typical =
                    judge(inputs, &state, cap.on(contents.fire(typical_load, growth_kw_s2)), &surfaces);
                let p95 = if never_open {
                    typical
                } else {
                    judge(inputs, &state, cap.on(contents.fire(p95_load, growth_kw_s2)), &surfaces)
                };
                rules::flashover(typical.to_highest, p95.to_lowest)
            })
            .max_by_key(|rating| rules::flashover_severity(*rating))
            .unwrap_or(FlashoverRating::NotAssessed)
    };
    let mut changes = |name: &'static str, low: FlashoverRating, high: FlashoverRating| {
        if low != rating || high != rating {
            because.push(Cow::Borrowed(name));
        }
    };
    let (typical, alpha) = (load.typical_mj_m2, grown.typical_kw_s2);
    let shares = spread_of_linings(inputs);
    if never_open {
        // In a shut room the oxygen decides: fuel and growth hardly matter, the cracks do.
        if inputs.leak_assumed {
            let leaks = spread_of_leaks(inputs);
            changes(
                "leakage_area_m2",
                with(typical, load.p95_mj_m2, alpha, 1.0, leaks.low),
                with(typical, load.p95_mj_m2, alpha, 1.0, leaks.high),
            );
        }
        return because;
    }
    if !load.recorded {
        changes(
            "fuel_load_mj_m2",
            with(load.p50_mj_m2, load.p50_mj_m2, alpha, 1.0, 1.0),
            with(load.p95_mj_m2, load.p95_mj_m2, alpha, 1.0, 1.0),
        );
    }
    if grown.from != "assumption" {
        changes(
            "growth_kw_s2",
            with(typical, load.p95_mj_m2, grown.slow_kw_s2, 1.0, 1.0),
            with(typical, load.p95_mj_m2, grown.fast_kw_s2, 1.0, 1.0),
        );
    }
    if inputs.lined.unrecorded[0] || inputs.lined.unrecorded[1] {
        changes(
            "linings",
            with(typical, load.p95_mj_m2, alpha, shares.low, 1.0),
            with(typical, load.p95_mj_m2, alpha, shares.high, 1.0),
        );
    }
    because
}

/// Every method's figure in a scenario.
fn figures(inputs: &Inputs<'_>, found: &Screened, cap: Cap) -> Vec<Figure> {
    let scenario = Some(found.scenario);
    let surfaces = inputs.lined.around(found.state.wall.area_m2);
    let fire = cap.on(inputs.contents.typical_fire());
    let by_fuel = inputs.contents.recalled;
    let by_lining = inputs.lined.recalled;
    let none = Exceeded::none();
    let growth_limits = growth::t_squared_limits(fire.growth_kw_s2);
    let mut figures = vec![
        figure("t_squared_growth", "growth_kw_s2", fire.growth_kw_s2, &growth_limits, by_fuel, scenario),
        figure("design_fire_decay", "fuel_limit_kw", fire.reached_kw(), &none, by_fuel, scenario),
    ];
    if let Some(burn) = found.typical.burn() {
        let room = super::judge::shut_room(inputs, found.state.leak_m2, &surfaces);
        let limits = burn_shut_limits(&room);
        let air_kg = inputs.geometry.volume_m3 * air_density_kg_m3(inputs.ambient_k);
        let usable_mj = oxygen::usable_heat_kj(air_kg, oxygen::LIMIT_AT_AMBIENT) * 1e-3;
        let peak_c = burn.state.peak_temperature_k - ICE_POINT_K;
        figures.push(figure("oxygen_budget", "usable_heat_mj", usable_mj, &none, false, scenario));
        figures.push(figure(
            "shut_room_burn",
            "peak_temperature_c",
            peak_c,
            &limits,
            by_fuel || by_lining,
            scenario,
        ));
        return figures;
    }
    let state = &found.state;
    let (reached_kw, hottest_s) = reached_by(&state.admits(fire), inputs.horizon.open_s);
    let required = Required::of(enclosure(state, &surfaces), &surfaces, hottest_s);
    for (method, (kw, exceeded), recalled) in [
        ("babrauskas_flashover", required.babrauskas, false),
        ("thomas_flashover", required.thomas, false),
        ("mccaffrey_flashover", required.mccaffrey, by_lining),
    ] {
        if kw.is_finite() {
            figures.push(figure(method, "required_heat_release_kw", kw, &exceeded, recalled, scenario));
        }
    }
    let ventilation_kw = kawagoe_limit_kw(state.wall);
    let limits = kawagoe_limits(state.wall);
    figures.push(figure(
        "kawagoe_ventilation_limit",
        "ventilation_limit_kw",
        ventilation_kw,
        &limits,
        false,
        scenario,
    ));
    let air_kw = state.air_limit_kw(fire.growth_kw_s2);
    if air_kw < ventilation_kw {
        figures.push(figure("oxygen_budget", "air_behind_limit_kw", air_kw, &none, false, scenario));
    }
    let vented = Vented {
        heat_release_kw: reached_kw,
        opening: state.wall,
        conductance_kw_k: total_conductance_kw_k(&surfaces, hottest_s),
    };
    let rise_k = CORNER.typical * mccaffrey_rise_k(vented);
    if rise_k.is_finite() {
        let limits = mccaffrey_limits(vented, rise_k).and(conductance_limits(&surfaces));
        figures.push(figure(
            "mccaffrey_hot_layer",
            "hot_layer_rise_k",
            rise_k,
            &limits,
            by_fuel || by_lining,
            scenario,
        ));
    }
    figures
}

/// What the report says of each scenario.
pub(super) fn scenario_findings(inputs: &Inputs<'_>, screened: &[Screened]) -> Vec<ScenarioFinding> {
    screened
        .iter()
        .map(|found| {
            let Judged { available_kw, required_kw, limit, .. } = found.typical;
            let required_kw = required_kw.filter(|(low, high)| low.is_finite() && high.is_finite());
            ScenarioFinding {
                scenario: found.scenario,
                rating: found.rating,
                opening_area_m2: found.state.wall.area_m2,
                opening_height_m: found.state.wall.height_m,
                available_kw: Some(available_kw),
                required_lowest_kw: required_kw.map(|(low, _)| low),
                required_highest_kw: required_kw.map(|(_, high)| high),
                limited_by: Some(limited_by(limit)),
                time_s: found.time_s(),
                openings: found.stand.opening_states(inputs.plan, inputs.number),
                starved: None,
                reason: found.reason.clone(),
            }
        })
        .collect()
}

const CLASSES: [GrowthClass; 4] =
    [GrowthClass::Slow, GrowthClass::Medium, GrowthClass::Fast, GrowthClass::UltraFast];

/// The strip of a room that is not assessed.
pub(super) fn strip_not_assessed() -> Vec<GrowthFinding> {
    let step = |class| GrowthFinding {
        growth: class,
        growth_kw_s2: contents::coefficient_kw_s2(class),
        rating: FlashoverRating::NotAssessed,
        time_s: None,
        before_water: None,
    };
    CLASSES.map(step).to_vec()
}

/// The strip slow / medium / fast / ultra-fast in the governing scenario.
pub(super) fn strip(inputs: &Inputs<'_>, found: &Screened, clock: &Clock, cap: Cap) -> Vec<GrowthFinding> {
    let contents = &inputs.contents;
    let surfaces = inputs.lined.around(found.state.wall.area_m2);
    let water_s = clock.finding.water_on_fire_s.typical;
    CLASSES
        .iter()
        .map(|&class| {
            let alpha = contents::coefficient_kw_s2(class);
            let fire = cap.on(contents.fire(contents.load.typical_mj_m2, alpha));
            let typical = judge(inputs, &found.state, fire, &surfaces);
            let p95 = if found.state.is_open() {
                let fire = cap.on(contents.fire(contents.load.p95_mj_m2, alpha));
                judge(inputs, &found.state, fire, &surfaces)
            } else {
                typical
            };
            let rating = rules::flashover(typical.to_highest, p95.to_lowest);
            let time_s = moments(inputs, &found.state, fire, &surfaces, CORNER.typical)
                .earliest_s()
                .filter(|_| rating != FlashoverRating::NotIndicated)
                .map(|time_s| time_s.max(found.not_before_s.typical));
            GrowthFinding {
                growth: class,
                growth_kw_s2: alpha,
                rating,
                time_s,
                before_water: time_s.map(|time_s| time_s < water_s),
            }
        })
        .collect()
}
