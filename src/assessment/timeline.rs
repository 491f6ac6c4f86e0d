//! Every milestone on both clocks.

use super::clocks::{Clock, crew_clock_s};
use super::findings::{
    Band, FlashoverFinding, FlashoverRating, Milestone, MilestoneKind, SmokeFinding, TransientFinding,
};
use super::inputs::Inputs;
use super::judge::FireClock;
use super::scenarios::{Cap, Screened};
use crate::domain::Key;
use crate::domain::assumptions::Scenario;

/// What the milestones are taken from.
pub(super) struct Course<'c> {
    pub clock: &'c Clock,
    pub smoke: &'c SmokeFinding,
    /// The governing scenario, where flashover is assessed.
    pub governing: Option<&'c Screened>,
    /// When the flame of the shut room dies.
    pub flame_out_s: Option<(Scenario, Band)>,
    pub cap: Cap,
    /// What the runs gave, in place of the screen's governing scenario.
    pub transient: Option<(&'c FlashoverFinding, &'c TransientFinding)>,
}

/// The milestones in order of their typical time.
pub(super) fn timeline(inputs: &Inputs<'_>, course: &Course<'_>) -> Vec<Milestone> {
    let clock = course.clock;
    let finding = &clock.finding;
    let mut list = List { call_s: finding.call_s, milestones: Vec::with_capacity(16) };
    list.add(MilestoneKind::EstablishedBurning, exactly(0.0));
    list.add(MilestoneKind::Detection, finding.detection_s);
    list.add(MilestoneKind::Call, finding.call_s);
    let turned_out_s = clock.spans.processing_s + clock.spans.turnout_s;
    list.add(MilestoneKind::TurnedOut, finding.call_s.shifted(turned_out_s));
    list.add(MilestoneKind::Arrival, finding.call_s.shifted(turned_out_s + clock.spans.travel_s));
    list.add(MilestoneKind::WaterOnFire, finding.water_on_fire_s);

    if let Some(act) = clock.detector {
        let detector = inputs.watchers[act.watcher].key.clone();
        list.push(MilestoneKind::DetectorActs, act.at_s, None, detector);
    }
    if let Some(act) = clock.sprinkler {
        list.add(MilestoneKind::SprinklerOpens, act.at_s);
    }
    let shuts_itself = |&&number: &&usize| {
        let hole = &inputs.plan.openings[number];
        hole.shuts_itself && hole.open_fraction > 0.0
    };
    if let Some(&number) = inputs.plan.of_room[inputs.number].iter().find(shuts_itself) {
        let door = Some(inputs.plan.opening_key(number).clone());
        list.push(MilestoneKind::DoorsShut, finding.detection_s, None, door);
    }
    list.smoke(course.smoke);

    let typical = inputs.contents.typical_fire();
    for taken in &inputs.contents.takes_fire {
        let first = inputs
            .contents
            .origin
            .map_or(typical.growth_kw_s2, |origin| inputs.contents.packages[origin].growth_kw_s2);
        let of_origin = crate::fire::DesignFire { growth_kw_s2: first, ..typical };
        let at_s = exactly(FireClock::of(&of_origin).at_s(taken.at_s));
        let package = inputs.contents.packages[taken.package].key.clone();
        list.push(MilestoneKind::ItemIgnites, at_s, None, Some(package));
    }
    if let Some((flashover, found)) = course.transient {
        list.transient(flashover, found);
    } else {
        if let Some(found) = course.governing {
            list.governing(inputs, found, course.cap);
        }
        if let Some((scenario, at_s)) = course.flame_out_s {
            list.push(MilestoneKind::FlameOut, at_s, Some(scenario), None);
        }
    }
    list.milestones.sort_by(|a, b| a.fire_clock_s.typical.total_cmp(&b.fire_clock_s.typical));
    list.milestones
}

struct List {
    call_s: Band,
    milestones: Vec<Milestone>,
}

impl List {
    fn add(&mut self, kind: MilestoneKind, fire_clock_s: Band) {
        self.push(kind, fire_clock_s, None, None);
    }

    fn push(
        &mut self,
        kind: MilestoneKind,
        fire_clock_s: Band,
        scenario: Option<Scenario>,
        subject: Option<Key>,
    ) {
        let crew_clock_s = match kind {
            // The crew clock runs in step with these, whenever the call comes.
            MilestoneKind::Call
            | MilestoneKind::TurnedOut
            | MilestoneKind::Arrival
            | MilestoneKind::WaterOnFire => Some(exactly(fire_clock_s.typical - self.call_s.typical)),
            _ => crew_clock_s(fire_clock_s, self.call_s),
        };
        self.milestones.push(Milestone { kind, fire_clock_s, crew_clock_s, scenario, subject });
    }

    fn smoke(&mut self, smoke: &SmokeFinding) {
        if let Some(at_s) = smoke.time_to_2_m_s {
            self.add(MilestoneKind::SmokeAt2M, at_s);
        }
        if let Some(at_s) = smoke.time_to_1_m_s {
            self.add(MilestoneKind::SmokeAt1M, at_s);
        }
        for next in &smoke.next_door {
            if let Some(at_s) = next.time_open_s {
                self.push(
                    MilestoneKind::SmokeNextDoor,
                    exactly(at_s),
                    Some(Scenario::DoorOpen),
                    Some(next.opening.clone()),
                );
            }
        }
    }

    fn transient(&mut self, flashover: &FlashoverFinding, found: &TransientFinding) {
        let scenario = Some(found.scenario);
        let moments = [
            (MilestoneKind::Layer600C, flashover.time_to_600_c_s),
            (MilestoneKind::Floor20KwM2, flashover.time_to_20_kw_m2_s),
            (MilestoneKind::Flashover, flashover.time_s),
        ];
        for (kind, at_s) in moments {
            if let Some(at_s) = at_s {
                self.push(kind, at_s, scenario, None);
            }
        }
        for gave_way in &found.gave_way {
            let kind = match gave_way.how {
                "glass_fell" => MilestoneKind::GlassFalls,
                "burned_through" => MilestoneKind::DoorBurnsThrough,
                _ => MilestoneKind::GivesWay,
            };
            self.push(kind, exactly(gave_way.at_s), scenario, Some(gave_way.opening.clone()));
        }
        let lost = found.way_out.iter().find(|way| way.posture == "standing");
        if let Some(at_s) = lost.and_then(|way| way.lost_s) {
            self.push(MilestoneKind::WayOutLost, at_s, scenario, None);
        }
        for reached in &found.reached {
            if let Some(at_s) = reached.fire_s {
                self.push(MilestoneKind::FireNextDoor, at_s, scenario, Some(reached.room.clone()));
            }
        }
        let run = found.runs.iter().find(|run| run.scenario == found.scenario);
        if let Some(at_s) = run.and_then(|run| run.flame_out_s) {
            self.push(MilestoneKind::FlameOut, exactly(at_s), scenario, None);
        }
    }

    fn governing(&mut self, inputs: &Inputs<'_>, found: &Screened, cap: Cap) {
        let scenario = Some(found.scenario);
        if found.not_before_s.typical > 0.0 {
            self.push(MilestoneKind::GlassFalls, found.not_before_s, scenario, None);
        }
        if found.rating != FlashoverRating::NotAssessed {
            let moments = [
                (MilestoneKind::Layer600C, found.band(|m| m.layer_600_c_s)),
                (MilestoneKind::Floor20KwM2, found.band(|m| m.floor_20_kw_m2_s)),
                (MilestoneKind::Flashover, found.time_s()),
            ];
            for (kind, at_s) in moments {
                if let Some(at_s) = at_s {
                    self.push(kind, at_s, scenario, None);
                }
            }
        }
        if found.typical.excess.is_some() {
            return;
        }
        let fire = found.state.admits(cap.on(inputs.contents.typical_fire()));
        let (clock, phases) = (FireClock::of(&fire), fire.phases());
        if phases.reached_kw > 0.0 && phases.reached_kw.is_finite() {
            self.push(MilestoneKind::Decay, exactly(clock.at_s(phases.decay_start_s)), scenario, None);
            self.push(MilestoneKind::BurntOut, exactly(clock.at_s(phases.end_s)), scenario, None);
        }
    }
}

const fn exactly(at_s: f64) -> Band {
    Band { low: at_s, typical: at_s, high: at_s }
}
