//! Sprinkler, self-closer and alarm: what each would change, and which of them is given credit.

use super::clocks::Clock;
use super::findings::{Band, FlashoverRating, ProtectionFinding};
use super::inputs::Inputs;
use super::judge::FireClock;
use super::methods::figure;
use super::openings::Stand;
use super::scenarios::{Cap, Screened, governing, screen_all, screen_stand, window_fails};
use crate::domain::assumptions::Scenario;
use crate::domain::building::{Coverage, SprinklerState};
use crate::fire::sprinkler::{Spray, evans_kw, evans_limits};

/// Whether the building's sprinklers cover this room and are recorded as working and tested.
pub(super) fn sprinkler_credited(inputs: &Inputs<'_>) -> bool {
    let sprinklers = inputs.plan.building.sprinklers;
    let here = inputs.room.sprinkler_heads.is_some() || sprinklers.coverage == Some(Coverage::Full);
    sprinklers.state == SprinklerState::WorkingTested && here
}

/// Heat release at which a working head stops the growth: the most over the corners of growth.
pub(super) fn sprinkler_cap(inputs: &Inputs<'_>) -> Option<Cap> {
    let head = inputs.sprinkler.as_ref()?;
    let contents = &inputs.contents;
    [contents.typical_fire(), contents.worst_fire(), contents.mildest_fire()]
        .into_iter()
        .filter_map(|fire| {
            let at_s = head.acts_s(&fire, inputs.ambient_k, inputs.horizon.open_s, false)?;
            Some(fire.heat_release_kw(at_s))
        })
        .max_by(f64::total_cmp)
        .map(|heat_release_kw| Cap { heat_release_kw, fades_in_s: fades_in_s(head.density_mm_s) })
}

/// Time in which the heat release falls by e under a spray: `3 w^-1.85`, from [`evans_kw`] itself.
fn fades_in_s(density_mm_s: f64) -> f64 {
    let after_a_second = evans_kw(Spray { heat_release_kw: 1.0, since_activation_s: 1.0, density_mm_s });
    // Hardly any water hardly fades the fire: an hour is as good as never.
    (-1.0 / after_a_second.ln()).clamp(1.0, 3600.0)
}

/// What flashover findings say, reduced to what protection compares.
struct Outcome {
    rating: FlashoverRating,
    time_s: Option<f64>,
}

impl Outcome {
    fn of(screened: &[Screened], large: bool) -> Self {
        match governing(screened) {
            Some(place) if !large => Self {
                rating: screened[place].rating,
                time_s: screened[place].time_s().map(|band| band.typical),
            },
            _ => Self { rating: FlashoverRating::NotAssessed, time_s: None },
        }
    }

    fn before(&self, water_s: f64) -> Option<bool> {
        self.time_s.map(|time_s| time_s < water_s)
    }
}

/// The findings; `uncredited` are the scenarios without any credit.
pub(super) fn findings(
    inputs: &Inputs<'_>,
    uncredited: &[Screened],
    asked: Option<&[Scenario]>,
    clock: &Clock,
    large: bool,
) -> Vec<ProtectionFinding> {
    let mut found = Vec::with_capacity(3);
    let without = Outcome::of(uncredited, large);
    found.extend(sprinkler(inputs, &without, asked, clock, large));
    found.extend(self_closer(inputs, uncredited, &without, clock, large));
    found.extend(alarm(inputs, &without, clock));
    found
}

fn sprinkler(
    inputs: &Inputs<'_>,
    without: &Outcome,
    asked: Option<&[Scenario]>,
    clock: &Clock,
    large: bool,
) -> Option<ProtectionFinding> {
    let head = inputs.sprinkler.as_ref()?;
    let water_s = clock.finding.water_on_fire_s.typical;
    let credited = sprinkler_credited(inputs);
    let Some(cap) = sprinkler_cap(inputs) else {
        return Some(ProtectionFinding {
            kind: "sprinkler",
            credited,
            acts_at_s: None,
            heat_release_kw: None,
            flashover_without: without.rating,
            flashover_with: without.rating,
            before_water_without: without.before(water_s),
            before_water_with: without.before(water_s),
            words: "No head opens within the horizon.".to_owned(),
            figures: Vec::new(),
        });
    };
    let with = Outcome::of(&screen_all(inputs, asked, cap), large);
    let acts_at_s = clock.sprinkler.map(|act| act.at_s);
    let mut figures = Vec::new();
    if let Some(at_s) = acts_at_s {
        let limits = head.exceeded(cap.heat_release_kw);
        figures.push(figure(head.method, "activation_s", at_s.typical, &limits, head.recalled, None));
    }
    // Five minutes under water, as the correlation has it.
    let spray = Spray {
        heat_release_kw: cap.heat_release_kw,
        since_activation_s: 300.0,
        density_mm_s: head.density_mm_s,
    };
    let after = evans_kw(spray);
    figures.push(figure(
        "evans_sprinkler",
        "heat_release_300_s_later_kw",
        after,
        &evans_limits(spray),
        head.recalled,
        None,
    ));
    let credit = if credited {
        "Recorded as working and tested: the rating counts on it."
    } else {
        "Not recorded as working and tested: the rating does not count on it."
    };
    Some(ProtectionFinding {
        kind: "sprinkler",
        credited,
        acts_at_s,
        heat_release_kw: Some(cap.heat_release_kw),
        flashover_without: without.rating,
        flashover_with: with.rating,
        before_water_without: without.before(water_s),
        before_water_with: with.before(water_s),
        words: format!(
            "The first head opens at about {:.0} kW; working, it holds the fire there. {credit}",
            cap.heat_release_kw
        ),
        figures,
    })
}

/// Doors that shut themselves or are released on detection, shut in the room as found.
fn self_closer(
    inputs: &Inputs<'_>,
    uncredited: &[Screened],
    without: &Outcome,
    clock: &Clock,
    large: bool,
) -> Option<ProtectionFinding> {
    let plan = inputs.plan;
    let any = plan.of_room[inputs.number].iter().any(|&number| plan.openings[number].shuts_itself);
    if !any {
        return None;
    }
    let held_open = plan.of_room[inputs.number]
        .iter()
        .any(|&number| plan.openings[number].shuts_itself && plan.openings[number].open_fraction > 0.0);
    let water_s = clock.finding.water_on_fire_s.typical;
    // The credit is that the door is shut when the fire is on: neither left as recorded nor opened by who fled.
    let stand = Stand { self_closed: true, ..Stand::as_recorded(Scenario::AsFound) };
    let shut = screen_stand(inputs, stand, Cap::NONE, uncredited);
    let asked = |scenario| uncredited.iter().any(|found| found.scenario == scenario);
    let failed = asked(Scenario::WindowFails).then(|| window_fails(inputs, &shut, Cap::NONE));
    let with: Vec<Screened> = std::iter::once(shut).chain(failed).collect();
    let acts_at_s =
        if held_open { clock.finding.detection_s } else { Band { low: 0.0, typical: 0.0, high: 0.0 } };
    // A door that is released after flashover changes nothing of it.
    let too_late = without.time_s.is_some_and(|time_s| time_s <= acts_at_s.typical);
    let with = Outcome::of(if too_late { uncredited } else { &with }, large);
    Some(ProtectionFinding {
        kind: "self_closer",
        credited: false,
        acts_at_s: Some(acts_at_s),
        heat_release_kw: Some(heat_release_at(inputs, acts_at_s.typical)),
        flashover_without: without.rating,
        flashover_with: with.rating,
        before_water_without: without.before(water_s),
        before_water_with: with.before(water_s),
        words: "Doors that shut themselves keep smoke and fire in this room; a starved fire behind a shut door has its own \
                finding. No test of them is recorded: the rating does not count on them."
            .to_owned(),
        figures: Vec::new(),
    })
}

/// Detectors, by when they bring water.
fn alarm(inputs: &Inputs<'_>, without: &Outcome, clock: &Clock) -> Option<ProtectionFinding> {
    let act = clock.detector?;
    let watcher = &inputs.watchers[act.watcher];
    let with_s = clock.water_with_alarm_s?.typical;
    let without_s = clock.water_without_alarm_s.typical;
    let heat_release_kw = heat_release_at(inputs, act.at_s.typical);
    let saved_s = (without_s - with_s).max(0.0);
    Some(ProtectionFinding {
        kind: "alarm",
        credited: false,
        acts_at_s: Some(act.at_s),
        heat_release_kw: Some(heat_release_kw),
        flashover_without: without.rating,
        flashover_with: without.rating,
        before_water_without: without.before(without_s),
        before_water_with: without.before(with_s),
        words: format!(
            "An alarm that is heard or calls by itself brings water about {saved_s:.0} s sooner; it does not change what \
             the fire does."
        ),
        figures: vec![figure(
            watcher.method,
            "activation_s",
            act.at_s.typical,
            &watcher.exceeded(heat_release_kw),
            watcher.recalled,
            None,
        )],
    })
}

fn heat_release_at(inputs: &Inputs<'_>, fire_clock_s: f64) -> f64 {
    let fire = inputs.contents.typical_fire();
    fire.heat_release_kw(FireClock::of(&fire).on_curve_s(fire_clock_s))
}
