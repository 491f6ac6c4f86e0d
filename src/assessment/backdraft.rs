//! Whether a shut room can hide a backdraft: the first screen, by excess fuel gas.

use std::borrow::Cow;

use super::findings::{
    BackdraftFinding, BackdraftOutcome, BackdraftRating, Band, Figure, LimitedBy, Reason, StarvedFinding,
};
use super::inputs::Inputs;
use super::judge::{FireClock, Limit, aftergas, excess_in, shut_room};
use super::methods::figure;
use super::openings::{State, way_out};
use super::scenarios::{Cap, Screened, hottest_k, spread_of_leaks, spread_of_linings};
use super::{hazards, holds_while, not_covered, rules};
use crate::domain::Key;
use crate::domain::assumptions::Scenario;
use crate::fire::constants::{
    HEAT_PER_AIR_KJ_KG, HEAT_PER_OXYGEN_KJ_KG, ICE_POINT_K, OXYGEN_IN_AIR_MASS_FRACTION, air_density_kg_m3,
};
use crate::fire::excess_fuel::{ExcessFuel, Outcome, screen_limits, threshold_kj_kg};
use crate::fire::flashover::LIMIT_600_C_GAS_K;
use crate::fire::hot_layer::{GrowingVented, mccaffrey_time_to_rise_s};
use crate::fire::oxygen::{LimitingOxygen, extinction_mass_fraction, usable_heat_kj};
use crate::fire::ventilation::kawagoe_inflow_kg_s;
use crate::fire::{DesignFire, Exceeded};

/// Unburned gas of one scenario.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Starved {
    pub scenario: Scenario,
    pub outcome: Outcome,
    /// Of the worst corner over the threshold there.
    pub to_threshold: f64,
    pub excess_kj_kg: Band,
    pub threshold_kj_kg: f64,
    pub layer_k: Band,
    pub flame_out_s: Band,
    pub exceeded: Exceeded,
    /// The flame went out, or was cut down, for lack of oxygen.
    pub starved: bool,
    /// The room is shut.
    pub shut: bool,
}

impl Starved {
    fn rating(&self) -> BackdraftRating {
        match self.outcome {
            Outcome::NotIndicated => BackdraftRating::NotIndicated,
            Outcome::CannotBeExcluded => BackdraftRating::CannotBeExcluded,
        }
    }

    /// Whether the flame dies for lack of oxygen, and is not only cut down.
    pub fn dies(&self) -> bool {
        self.starved && self.shut
    }

    /// What the scenario's finding says.
    pub fn finding(&self) -> StarvedFinding {
        StarvedFinding {
            rating: self.rating(),
            excess_fuel_mj_kg: self.excess_kj_kg.scaled(1e-3),
            threshold_mj_kg: self.threshold_kj_kg * 1e-3,
            layer_temperature_c: self.layer_k.shifted(-ICE_POINT_K),
            flame_out_s: self.flame_out_s,
        }
    }
}

/// Screens every scenario in which the room can starve, in the order of the scenarios.
pub(super) fn starve_all(inputs: &Inputs<'_>, screened: &[Screened], cap: Cap) -> Vec<Starved> {
    let mut starved: Vec<(State, Starved)> = Vec::with_capacity(3);
    for found in screened {
        let one = match found.scenario {
            Scenario::Shut | Scenario::AsFound => {
                let same = starved.iter().find(|(state, _)| *state == found.state);
                match same {
                    Some((_, other)) => Some(Starved { scenario: found.scenario, ..*other }),
                    None if found.state.is_open() => starve_open(inputs, found, cap),
                    None => Some(starve_shut(inputs, found, cap)),
                }
            }
            Scenario::ShutLate => starve_shut_late(inputs, found, cap),
            Scenario::DoorOpen | Scenario::WindowFails | Scenario::Entry => None,
        };
        starved.extend(one.map(|one| (found.state, one)));
    }
    starved.into_iter().map(|(_, one)| one).collect()
}

/// The fire of a shut room, which starves from the beginning.
///
/// Three runs: typical, and the two corners at which all inputs lean the same way. Cracks feed the fire, so the one
/// with much fuel and fast growth is run with the most leakage; a test holds that no other leakage leaves more.
fn starve_shut(inputs: &Inputs<'_>, found: &Screened, cap: Cap) -> Starved {
    let leak_m2 = found.state.leak_m2;
    let contents = &inputs.contents;
    let surfaces = inputs.lined.around(0.0);
    let (heat, leaks) = (spread_of_linings(inputs), spread_of_leaks(inputs));
    let fires =
        [contents.mildest_fire(), contents.typical_fire(), contents.worst_fire()].map(|fire| cap.on(fire));
    let [mildest, middle, worst] = [
        excess_in(inputs, fires[0], &surfaces.taking_heat(heat.high), leak_m2 * leaks.low),
        found.typical.excess.unwrap_or_else(|| excess_in(inputs, fires[1], &surfaces, leak_m2)),
        excess_in(inputs, fires[2], &surfaces.taking_heat(heat.low), leak_m2 * leaks.high),
    ];
    let all = [mildest, middle, worst];
    let ratio = |of: &ExcessFuel| of.high_kj_kg / of.threshold_kj_kg;
    let nearest = all.iter().fold(&middle, |most, next| if ratio(next) > ratio(most) { next } else { most });
    let over = |of: &dyn Fn(usize) -> f64| Band {
        low: of(0).min(of(1)).min(of(2)),
        typical: of(1),
        high: of(0).max(of(1)).max(of(2)),
    };
    let excess_kj_kg = Band {
        low: over(&|place| all[place].low_kj_kg).low.min(middle.typical_kj_kg),
        typical: middle.typical_kj_kg,
        high: over(&|place| all[place].high_kj_kg).high.max(middle.typical_kj_kg),
    };
    Starved {
        scenario: found.scenario,
        outcome: if ratio(nearest) < 1.0 { Outcome::NotIndicated } else { Outcome::CannotBeExcluded },
        to_threshold: ratio(nearest),
        excess_kj_kg,
        threshold_kj_kg: nearest.threshold_kj_kg,
        layer_k: over(&|place| all[place].layer_temperature_k),
        flame_out_s: over(&|place| FireClock::of(&fires[place]).at_s(all[place].burn.state.time_s)),
        exceeded: screen_limits(&shut_room(inputs, leak_m2, &surfaces), middle.layer_temperature_k),
        starved: middle.burn.starved,
        shut: true,
    }
}

/// The fire of a room that stands open so little, or to so little air, that it runs short and does not flash over.
///
/// A steady balance: what the fuel gives off beyond what the air burns, per kg of air drawn in and of that fuel gas.
/// The fuel is taken to give off as much as with all the air it wants, which a starved fire does not: an upper bound.
fn starve_open(inputs: &Inputs<'_>, found: &Screened, cap: Cap) -> Option<Starved> {
    let short_of_air = found.typical.limit == Limit::Air;
    if !short_of_air || found.typical.to_highest >= rules::LIKELY_RATIO {
        return None;
    }
    let contents = &inputs.contents;
    let surfaces = inputs.lined.around(found.state.wall.area_m2);
    let excess = |fire: DesignFire| {
        let allowed_kw = found.state.air_limit_kw(fire.growth_kw_s2);
        let unburned_kw = (fire.reached_kw() - allowed_kw).max(0.0);
        let fuel_gas_kg_s = unburned_kw / contents.heat_of_combustion_kj_kg;
        unburned_kw / (allowed_kw / HEAT_PER_AIR_KJ_KG + fuel_gas_kg_s).max(f64::MIN_POSITIVE)
    };
    let short_s = |fire: DesignFire| {
        let admitted = found.state.admits(fire);
        FireClock::of(&admitted).at_s(admitted.phases().growth_end_s)
    };
    let [mildest, typical, worst] =
        [contents.mildest_fire(), contents.typical_fire(), contents.worst_fire()].map(|fire| cap.on(fire));
    let over = |of: &dyn Fn(DesignFire) -> f64| {
        let (low, middle, high) = (of(mildest), of(typical), of(worst));
        Band { low: low.min(middle).min(high), typical: middle, high: low.max(middle).max(high) }
    };
    let excess_kj_kg = over(&excess);
    let layer_k = hottest_k(inputs, found, &surfaces, cap);
    let threshold_kj_kg = threshold_kj_kg(layer_k);
    let to_threshold = excess_kj_kg.high / threshold_kj_kg;
    Some(Starved {
        scenario: found.scenario,
        outcome: if to_threshold < 1.0 { Outcome::NotIndicated } else { Outcome::CannotBeExcluded },
        to_threshold,
        excess_kj_kg,
        threshold_kj_kg,
        layer_k: Band { low: layer_k, typical: layer_k, high: layer_k },
        flame_out_s: over(&short_s),
        exceeded: Exceeded::none()
            .when(true, "the room stands open: a steady balance instead of the shut room"),
        starved: true,
        shut: false,
    })
}

/// The room shut late: when its layer has reached 400 °C, or 60 s after flashover, whichever leaves more unburned gas.
///
/// Closed form. The gas is as hot as the layer was; its oxygen is what the inflow brought less what the fire used. The
/// flame uses that up and dies. What the fuel gives off afterwards is a share of what a fire of this size has given off
/// while it grew, and of what it burns until it dies; never more than there is.
fn starve_shut_late(inputs: &Inputs<'_>, found: &Screened, cap: Cap) -> Option<Starved> {
    const SHUT_AT_K: f64 = 400.0 + ICE_POINT_K;
    const AFTER_FLASHOVER_S: f64 = 60.0;

    if !found.state.is_open() {
        return None;
    }
    let surfaces = inputs.lined.around(found.state.wall.area_m2);
    let fire = cap.on(inputs.contents.typical_fire());
    let open = found.state.admits(fire);
    let clock = FireClock::of(&open);
    let growing = GrowingVented {
        fire: open,
        opening: found.state.wall,
        surfaces: &surfaces,
        position_factor: super::judge::CORNER.typical,
    };
    let hot_s = mccaffrey_time_to_rise_s(&growing, SHUT_AT_K - inputs.ambient_k).ok().flatten();
    let flashed_s = found.moments[1].earliest_s().map(|at_s| clock.on_curve_s(at_s) + AFTER_FLASHOVER_S);
    let at_400_c = hot_s.map(|at_s| shut_at(inputs, found, &fire, &open, at_s, SHUT_AT_K));
    let at_flashover = flashed_s.map(|at_s| shut_at(inputs, found, &fire, &open, at_s, LIMIT_600_C_GAS_K));
    at_400_c.into_iter().chain(at_flashover).max_by(|a, b| a.to_threshold.total_cmp(&b.to_threshold))
}

fn shut_at(
    inputs: &Inputs<'_>,
    found: &Screened,
    fire: &DesignFire,
    open: &DesignFire,
    at_s: f64,
    layer_k: f64,
) -> Starved {
    let heat_release_kw = open.heat_release_kw(at_s);
    let gas_kg = inputs.geometry.volume_m3 * air_density_kg_m3(layer_k);
    let inflow_kg_s = kawagoe_inflow_kg_s(found.state.wall).max(1e-6);
    let oxygen =
        (OXYGEN_IN_AIR_MASS_FRACTION - heat_release_kw / (HEAT_PER_OXYGEN_KJ_KG * inflow_kg_s)).max(0.0);
    let used_up = OXYGEN_IN_AIR_MASS_FRACTION - oxygen;
    let limit = extinction_mass_fraction(LimitingOxygen::TYPICAL, layer_k);
    // As if from fresh air, less the heat that the missing oxygen would have given.
    let burns_on_kj = (usable_heat_kj(gas_kg, limit) - gas_kg * used_up * HEAT_PER_OXYGEN_KJ_KG).max(0.0);
    let released_kj = open.energy_released_kj(at_s);
    let grown_kj =
        heat_release_kw * (heat_release_kw / fire.growth_kw_s2.max(f64::MIN_POSITIVE)).sqrt() / 3.0;
    let left_kj = (fire.energy_kj - released_kj - burns_on_kj).max(0.0);
    let share = aftergas(inputs);
    // The fuel gas is itself part of the layer: no layer holds more per kilogram than fuel does.
    let after = |share: f64| {
        let unburned_kj = (share * (released_kj.min(grown_kj) + burns_on_kj)).min(left_kj);
        unburned_kj / (gas_kg + unburned_kj / inputs.contents.heat_of_combustion_kj_kg)
    };
    let excess_kj_kg = Band { low: after(share.low), typical: after(share.typical), high: after(share.high) };
    let threshold_kj_kg = threshold_kj_kg(layer_k);
    let to_threshold = excess_kj_kg.high / threshold_kj_kg;
    let out_s = FireClock::of(open).at_s(at_s) + burns_on_kj / heat_release_kw.max(1.0);
    let surfaces = inputs.lined.around(0.0);
    Starved {
        scenario: Scenario::ShutLate,
        outcome: if to_threshold < 1.0 { Outcome::NotIndicated } else { Outcome::CannotBeExcluded },
        to_threshold,
        excess_kj_kg,
        threshold_kj_kg,
        layer_k: Band { low: layer_k, typical: layer_k, high: layer_k },
        flame_out_s: Band { low: out_s, typical: out_s, high: out_s },
        exceeded: screen_limits(&shut_room(inputs, found.state.leak_m2, &surfaces), layer_k),
        starved: true,
        shut: true,
    }
}

/// The finding.
pub(super) fn finding(
    inputs: &Inputs<'_>,
    starved: &[Starved],
    cap: Cap,
    stays_open: bool,
) -> BackdraftFinding {
    let mut because: Vec<Cow<'static, str>> = Vec::new();
    if inputs.hazards_unrecorded() {
        because.push("hazards".into());
    }
    if inputs.plan.of_room[inputs.number].is_empty() {
        because.push("openings".into());
    }
    let opening = door_of(inputs);
    if inputs.geometry.volume_m3 > rules::WELL_MIXED_M3 {
        let text = "large_space: the gas of a room of more than 500 m³ is hardly well mixed, which the screen takes it to be";
        let reason = Reason { key: "large_space", text: text.into() };
        return BackdraftFinding {
            provisional: !because.is_empty(),
            provisional_because: because,
            opening,
            not_covered: not_covered::backdraft(inputs),
            ..bare(reason)
        };
    }
    // The worst; of equals the first in the order of scenarios.
    let worst = starved.iter().reduce(|worst, next| {
        if next.outcome > worst.outcome
            || (next.outcome == worst.outcome && next.to_threshold > worst.to_threshold)
        {
            next
        } else {
            worst
        }
    });
    let Some(worst) = worst else {
        let (rating, reason) = if stays_open {
            let text = "stays_open: openings that nobody can shut feed the fire as long as it burns";
            (BackdraftRating::NotIndicated, Reason { key: "stays_open", text: text.into() })
        } else {
            let text = "no_scenario: none of the scenarios asked for starves the room";
            (BackdraftRating::NotAssessed, Reason { key: "no_scenario", text: text.into() })
        };
        return hazard_barred(
            inputs,
            BackdraftFinding {
                rating,
                provisional: !because.is_empty(),
                provisional_because: because,
                opening,
                not_covered: not_covered::backdraft(inputs),
                ..bare(reason)
            },
        );
    };
    let rating = worst.rating();
    // Not indicated holds at every corner already; the other rating may rest on the assumed corner of the leakage.
    if rating == BackdraftRating::CannotBeExcluded
        && inputs.leak_assumed
        && worst.excess_kj_kg.typical < worst.threshold_kj_kg
    {
        because.push("leakage_area_m2".into());
    }
    let holds_while = if rating == BackdraftRating::NotIndicated {
        holds_while::backdraft(inputs, worst, cap)
    } else {
        Vec::new()
    };
    let text = match worst.outcome {
        Outcome::CannotBeExcluded => format!(
            "excess_fuel: up to {:.1} MJ of unburned gas per kg of layer gas against {:.1}",
            worst.excess_kj_kg.high * 1e-3,
            worst.threshold_kj_kg * 1e-3
        ),
        Outcome::NotIndicated => format!(
            "excess_fuel: at most {:.1} MJ of unburned gas per kg of layer gas, below {:.1}",
            worst.excess_kj_kg.high * 1e-3,
            worst.threshold_kj_kg * 1e-3
        ),
    };
    hazard_barred(
        inputs,
        BackdraftFinding {
            rating,
            scenario: Some(worst.scenario),
            opening,
            limited_by: Some(if worst.starved { LimitedBy::UnburnedFuel } else { LimitedBy::Fuel }),
            excess_fuel_mj_kg: Some(worst.excess_kj_kg.scaled(1e-3)),
            layer_temperature_c: Some(worst.layer_k.shifted(-ICE_POINT_K)),
            flame_out_s: Some(worst.flame_out_s),
            provisional: !because.is_empty(),
            provisional_because: because,
            holds_while,
            not_covered: not_covered::backdraft(inputs),
            figures: figures(inputs, worst),
            ..bare(Reason { key: "excess_fuel", text: text.into() })
        },
    )
}

fn figures(inputs: &Inputs<'_>, worst: &Starved) -> Vec<Figure> {
    let recalled = inputs.contents.recalled || inputs.lined.recalled;
    let scenario = Some(worst.scenario);
    let excess = |quantity, value_kj_kg: f64| {
        figure("excess_fuel_gas", quantity, value_kj_kg * 1e-3, &worst.exceeded, recalled, scenario)
    };
    vec![
        excess("excess_fuel_mj_kg", worst.excess_kj_kg.typical),
        excess("excess_fuel_high_mj_kg", worst.excess_kj_kg.high),
        excess("threshold_mj_kg", worst.threshold_kj_kg),
        figure(
            "shut_room_burn",
            "flame_out_s",
            worst.flame_out_s.typical,
            &worst.exceeded,
            recalled,
            scenario,
        ),
        figure(
            "shut_room_burn",
            "layer_temperature_c",
            worst.layer_k.typical - ICE_POINT_K,
            &worst.exceeded,
            recalled,
            scenario,
        ),
    ]
}

/// Clause 2.9.
fn hazard_barred(inputs: &Inputs<'_>, found: BackdraftFinding) -> BackdraftFinding {
    match hazards::bar(inputs) {
        Some((key, words)) if found.rating == BackdraftRating::NotIndicated => BackdraftFinding {
            rating: BackdraftRating::CannotBeExcluded,
            reason: Some(Reason { key, text: format!("{key}: {words}").into() }),
            holds_while: Vec::new(),
            clauses: vec!["2.1", "2.6", "2.9"],
            ..found
        },
        _ => found,
    }
}

/// The opening that a crew would use: one marked so, else the door on the way out.
fn door_of(inputs: &Inputs<'_>) -> Option<Key> {
    let plan = inputs.plan;
    let marked =
        plan.of_room[inputs.number].iter().copied().find(|&number| plan.building.openings[number].entry);
    marked.or_else(|| way_out(plan, inputs.number)).map(|number| plan.opening_key(number).clone())
}

/// A finding of which only the reason is known.
pub(super) fn bare(reason: Reason) -> BackdraftFinding {
    BackdraftFinding {
        rating: BackdraftRating::NotAssessed,
        probability: None,
        outcome: BackdraftOutcome::NotAssessed,
        scenario: None,
        opening: None,
        dangerous_from_s: None,
        dangerous_until_s: None,
        beyond_horizon: false,
        ignition_delay_s: None,
        peak_overpressure_pa: None,
        pressure_band: None,
        elements_failing: Vec::new(),
        fireball_reach_m: None,
        limited_by: None,
        excess_fuel_mj_kg: None,
        layer_temperature_c: None,
        flame_out_s: None,
        reason: Some(reason),
        provisional: true,
        provisional_because: Vec::new(),
        holds_while: Vec::new(),
        not_covered: Vec::new(),
        figures: Vec::new(),
        clauses: vec!["2.1", "2.6"],
    }
}

#[cfg(test)]
mod tests {
    use super::super::assumed::Account;
    use super::super::plan::Plan;
    use super::super::testing::{building, lined, room};
    use super::*;
    use crate::catalogue::{Catalogue, Kind};
    use crate::domain::Assumptions;

    #[test]
    fn more_leakage_never_leaves_less_unburned_gas_over_its_threshold() {
        let catalogue = Catalogue::embedded();
        for room_use in catalogue.keys(Kind::Uses) {
            for (linings, size) in [
                ("gypsum_board", [3.0, 3.0, 2.4]),
                ("concrete", [6.0, 5.0, 3.0]),
                ("timber", [4.0, 3.0, 2.4]),
            ] {
                let mut origin = room("origin", room_use, size);
                origin.linings = lined(linings);
                let house = building(vec![origin], Vec::new());
                let plan = Plan::of(&house, catalogue);
                let mut account = Account::default();
                let inputs = Inputs::of(0, &plan, catalogue, &Assumptions::default(), &mut account).unwrap();
                let surfaces = inputs.lined.around(0.0);

                let over = |share: f64| {
                    let fire = inputs.contents.worst_fire();
                    let found = excess_in(&inputs, fire, &surfaces, inputs.envelope_leak_m2 * share);
                    found.high_kj_kg / found.threshold_kj_kg
                };
                let ratios = [0.5, 1.0, 2.0].map(over);

                // 2 %: the steps of the run.
                assert!(ratios.is_sorted_by(|a, b| *b > 0.98 * a), "{room_use} {linings} {ratios:?}");
            }
        }
    }
}
