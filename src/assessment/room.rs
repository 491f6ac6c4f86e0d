//! All findings of one room.

use super::assumed::Account;
use super::backdraft::{self, starve_all};
use super::clocks::{Clock, INCUBATION_S};
use super::findings::{
    Assumed, Band, Caution, ClockFinding, DetectedBy, FireFinding, FlashoverRating, Joined, Reason,
    RoomFindings, SmokeFinding,
};
use super::inputs::Inputs;
use super::judge::FireClock;
use super::openings::Stand;
use super::protection::{self, sprinkler_cap, sprinkler_credited};
use super::scenarios::{Cap, Screened, screen_all};
use super::timeline::{Course, timeline};
use super::transient::{self, Studied, Study};
use super::{cautions, entry, flashover, hazards, large_spaces, methods, smoke, water};
use crate::domain::assumptions::{Assumptions, Scenario};
use crate::domain::room::Place;
use crate::domain::{Key, Room};

/// What is the same for every room of a building.
pub(super) struct Common<'c> {
    pub assumptions: &'c Assumptions,
    pub assumed: &'c [Assumed],
    pub cautions: &'c [Caution],
}

/// Assesses one room.
pub(super) fn assess(
    inputs: &Inputs<'_>,
    common: &Common<'_>,
    account: Account,
    clock: Clock,
    studied: &Studied,
) -> RoomFindings {
    let asked = common.assumptions.scenarios.as_deref();
    let large = large_spaces::because(inputs);

    let uncredited = screen_all(inputs, asked, Cap::NONE);
    let credit = sprinkler_cap(inputs).filter(|_| sprinkler_credited(inputs));
    let cap = credit.unwrap_or(Cap::NONE);
    let credited: Option<Vec<Screened>> = credit.map(|cap| screen_all(inputs, asked, cap));
    let screened = credited.as_deref().unwrap_or(&uncredited);

    let starved = starve_all(inputs, screened, cap);
    let shut = Stand::as_recorded(Scenario::Shut).state(
        inputs.plan,
        inputs.number,
        inputs.envelope_leak_m2,
        inputs.ambient_k,
    );
    let smoke = smoke::finding(inputs, &shut);
    let protection = protection::findings(inputs, &uncredited, asked, &clock, !large.is_empty());
    let governs = studied.done().map(Study::scenario);
    let (flashover, place) = flashover::finding(inputs, screened, &clock, cap, &large, governs);
    let (mut flashover, transient) =
        transient::findings(inputs, studied, screened, &clock, &large, flashover);
    if credit.is_some() {
        flashover.clauses.push("2.10");
    }
    let backdraft = backdraft::finding(inputs, &starved, cap, shut.is_open());
    let mut scenarios = flashover::scenario_findings(inputs, screened);
    for scenario in &mut scenarios {
        scenario.starved =
            starved.iter().find(|one| one.scenario == scenario.scenario).map(backdraft::Starved::finding);
    }
    let governing = place.map(|place| &screened[place]);
    let assessed = flashover.rating != FlashoverRating::NotAssessed;
    let flame_out_s = starved.iter().find(|one| one.dies()).map(|one| (one.scenario, one.flame_out_s));
    let course = Course {
        clock: &clock,
        smoke: &smoke,
        governing: governing.filter(|_| assessed),
        flame_out_s,
        cap,
        transient: transient.as_ref().map(|found| (&flashover, found)),
    };
    let timeline = timeline(inputs, &course);
    let large_space = (!large.is_empty()).then(|| {
        large_spaces::finding(inputs, large, clock.finding.water_on_fire_s.typical, smoke.time_to_2_m_s)
    });
    let growth_strip = match governing {
        Some(found) if assessed => flashover::strip(inputs, found, &clock, cap),
        _ => flashover::strip_not_assessed(),
    };
    let water = water::finding(inputs);
    let entry = entry::finding(inputs, transient.is_some());

    let methods = methods::used(
        flashover
            .figures
            .iter()
            .chain(&backdraft.figures)
            .chain(&smoke.figures)
            .chain(&water.figures)
            .chain(large_space.iter().flat_map(|large| &large.figures))
            .chain(protection.iter().flat_map(|protection| &protection.figures)),
    );
    let mut assumptions = account.into_entries();
    assumptions.extend_from_slice(common.assumed);
    RoomFindings {
        key: inputs.key.clone(),
        name: name_of(inputs.room),
        cautions: cautions::of_room(inputs, common.cautions, &flashover, transient.as_ref()),
        flashover,
        backdraft,
        entry,
        transient,
        scenarios,
        growth_strip,
        fire: fire_finding(inputs),
        clock: clock.finding,
        smoke,
        large_space,
        protection,
        water: Some(water),
        hazards: hazards::findings(inputs),
        linings: inputs.lined.findings(),
        timeline,
        assumptions,
        wanted: cautions::wanted(inputs),
        methods,
    }
}

fn name_of(room: &Room) -> String {
    if room.name.is_empty() { room.key.as_str().to_owned() } else { room.name.clone() }
}

fn fire_finding(inputs: &Inputs<'_>) -> FireFinding {
    let contents = &inputs.contents;
    let fire = contents.typical_fire();
    let origin = contents.origin.map(|origin| &contents.packages[origin]);
    let clock = FireClock::of(&crate::fire::DesignFire {
        growth_kw_s2: origin.map_or(fire.growth_kw_s2, |origin| origin.growth_kw_s2),
        ..fire
    });
    let energy_mj = |load_mj_m2: f64| contents.fire(load_mj_m2, fire.growth_kw_s2).energy_kj * 1e-3;
    FireFinding {
        item_of_origin: origin.map(|origin| origin.key.clone()),
        place: Place::Corner,
        growth_kw_s2: fire.growth_kw_s2,
        growth_from: contents.growth.from,
        fuel_limit_kw: fire.reached_kw(),
        energy_p50_mj: energy_mj(contents.load.p50_mj_m2),
        energy_mj: energy_mj(contents.load.typical_mj_m2),
        fractile: contents.load.fractile,
        energy_p95_mj: energy_mj(contents.load.p95_mj_m2),
        incubation_s: Some(INCUBATION_S),
        joined: contents
            .takes_fire
            .iter()
            .map(|taken| Joined {
                key: contents.packages[taken.package].key.clone(),
                at_s: clock.at_s(taken.at_s),
                distance_m: taken.distance_m,
            })
            .collect(),
    }
}

/// The findings of a room that names a row which the catalogue does not have: the wire form lets none through.
pub(super) fn unresolved(room: &Room, key: &Key, missing: &str, common: &Common<'_>) -> RoomFindings {
    let reason = Reason {
        key: "unknown_catalogue_name",
        text: format!("unknown_catalogue_name: the catalogue has no {missing}").into(),
    };
    let never = Band { low: 0.0, typical: 0.0, high: 0.0 };
    RoomFindings {
        key: key.clone(),
        name: name_of(room),
        flashover: flashover::bare(reason.clone()),
        backdraft: backdraft::bare(reason.clone()),
        entry: entry::bare(reason.clone()),
        transient: None,
        scenarios: Vec::new(),
        growth_strip: flashover::strip_not_assessed(),
        fire: FireFinding {
            item_of_origin: None,
            place: Place::Corner,
            growth_kw_s2: 0.0,
            growth_from: "use",
            fuel_limit_kw: 0.0,
            energy_p50_mj: 0.0,
            energy_mj: 0.0,
            fractile: 0.8,
            energy_p95_mj: 0.0,
            incubation_s: None,
            joined: Vec::new(),
        },
        clock: ClockFinding {
            detected_by: DetectedBy::SeenOutside,
            detection_s: never,
            call_s: never,
            call_to_water_s: 0.0,
            water_on_fire_s: never,
            floor_setup_s: 0.0,
        },
        smoke: SmokeFinding {
            time_to_2_m_s: None,
            time_to_1_m_s: None,
            next_door: Vec::new(),
            reason: Some(reason),
            figures: Vec::new(),
        },
        large_space: None,
        protection: Vec::new(),
        water: None,
        hazards: Vec::new(),
        linings: Vec::new(),
        timeline: Vec::new(),
        assumptions: common.assumed.to_vec(),
        wanted: Vec::new(),
        methods: Vec::new(),
        cautions: common.cautions.to_vec(),
    }
}
