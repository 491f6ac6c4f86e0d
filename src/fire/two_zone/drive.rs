//! A run from start to end: steps, events, samples, the check at the end.

use std::ops::ControlFlow;

use super::balance::Account;
use super::building::Building;
use super::controls::Controls;
use super::events::Pending;
use super::network::Network;
use super::outcome::{Ended, Event, Failed, FailureReason, Note, Plan, Sample, Work};
use super::rates::Model;
use super::sampling::Between;
use super::snapshot;
use super::solver::Solver;

/// Longest step, s: longer ones read badly between.
const LONGEST_S: f64 = 20.0;
/// First step after a jump, s.
const FIRST_S: f64 = 0.05;
/// Shortest step against the time reached.
const SHORTEST: f64 = 1e-11;
/// Steps within which an event is pinned down.
const PIN_TRIES: usize = 4;

/// Runs a network: calls `sample` at each time the plan asks for, and `watch` at each step.
///
/// # Errors
///
/// [`Failed`], with the time, the room and the reason.
pub fn run(
    network: &Network,
    plan: &Plan,
    sample: &mut dyn FnMut(&Sample),
    watch: &mut dyn FnMut() -> ControlFlow<()>,
) -> Result<Ended, Failed> {
    check(network, plan)?;
    let building = Building::new(network)?;
    Run::new(Model { network, building: &building }, plan).through(sample, watch)
}

fn check(network: &Network, plan: &Plan) -> Result<(), Failed> {
    let malformed = |what| Err(Failed { at_s: 0.0, room: None, reason: FailureReason::Malformed(what) });
    let rooms = network.rooms.len();
    if !(plan.duration_s.is_finite() && plan.duration_s >= 0.0) {
        return malformed("duration");
    }
    if !(plan.tolerance.is_finite() && plan.tolerance > 0.0) {
        return malformed("tolerance");
    }
    if plan.samples_s.windows(2).any(|two| two[0].is_nan() || two[1].is_nan() || two[0] > two[1]) {
        return malformed("sample times must rise");
    }
    for fire in &network.fires {
        if fire.room >= rooms {
            return malformed("fire in a room that is not there");
        }
        if fire.fuel >= network.fuels.len() {
            return malformed("fire of a fuel that is not there");
        }
        let sizes = [fire.base_height_m, fire.diameter_m, fire.radiative_fraction];
        if sizes.iter().any(|size| !(size.is_finite() && *size >= 0.0)) || fire.radiative_fraction > 1.0 {
            return malformed("size of a fire");
        }
        let lights_at = match fire.ignites {
            super::network::Ignition::At(value)
            | super::network::Ignition::Flux(value)
            | super::network::Ignition::SurfaceTemperature(value) => value,
        };
        if lights_at.is_nan() {
            return malformed("ignition of a fire");
        }
        if let super::network::HeatRelease::Points(points) = &fire.heat_release {
            if points.iter().any(|p| !(p.0.is_finite() && p.1.is_finite())) {
                return malformed("heat release of a fire");
            }
            if points.windows(2).any(|two| two[1].0 < two[0].0) {
                return malformed("heat release that goes back in time");
            }
        }
    }
    if network
        .schedule
        .iter()
        .any(|m| m.opening >= network.openings.len() || !m.at_s.is_finite() || !m.open_fraction.is_finite())
    {
        return malformed("move of an opening that is not there");
    }
    let heads = network.sprinklers.iter().map(|s| &s.head);
    if network.detectors.iter().chain(heads).any(|d| d.room >= rooms) {
        return malformed("detector in a room that is not there");
    }
    for fan in &network.fans {
        for side in [fan.from, fan.to] {
            if let super::network::Side::Room(room) = side
                && room >= rooms
            {
                return malformed("fan to a room that is not there");
            }
        }
        let heights = [fan.inlet_height_m, fan.outlet_height_m, fan.volume_flow_m3_s];
        let times = [fan.starts_s, fan.stops_s];
        if fan.from == fan.to
            || fan.stall_pa.is_nan()
            || fan.stall_pa <= 0.0
            || heights.iter().any(|value| !value.is_finite())
            || times.iter().any(|value| value.is_nan())
        {
            return malformed("fan");
        }
    }
    Ok(())
}

struct Run<'a> {
    model: Model<'a>,
    plan: &'a Plan,
    solver: Solver,
    controls: Controls,
    pending: Pending,
    events: Vec<Event>,
    notes: Vec<Note>,
    work: Work,
    before: Sample,
    after: Sample,
    between: Between,
    start: Vec<f64>,
    samples_done: usize,
}

impl<'a> Run<'a> {
    fn new(model: Model<'a>, plan: &'a Plan) -> Self {
        let solver = Solver::new(model);
        Self {
            controls: Controls::new(model.network),
            pending: Pending::new(model.network),
            events: Vec::new(),
            notes: Vec::new(),
            work: Work::default(),
            before: Sample::default(),
            after: Sample::default(),
            between: Between::default(),
            start: solver.state.clone(),
            samples_done: 0,
            solver,
            model,
            plan,
        }
    }

    fn through(
        mut self,
        sample: &mut dyn FnMut(&Sample),
        watch: &mut dyn FnMut() -> ControlFlow<()>,
    ) -> Result<Ended, Failed> {
        let end_s = self.plan.duration_s;
        let mut step_s = FIRST_S;
        let mut retry = false;
        self.settle();
        while self.solver.time_s < end_s {
            if watch().is_break() {
                return Err(self.failed(FailureReason::Stopped, None));
            }
            if self.work.steps + self.work.rejected >= self.plan.step_budget {
                return Err(self.failed(FailureReason::OutOfSteps, None));
            }
            let from_s = self.solver.time_s;
            let network = self.model.network;
            let stop_s = self.pending.next_s(network, &self.controls, from_s).min(end_s);
            // No sliver is left before a stop.
            let left_s = stop_s - from_s;
            let mut tried_s = step_s.min(LONGEST_S).min(left_s);
            if tried_s > 0.6 * left_s && tried_s < left_s {
                tried_s = 0.5 * left_s;
            }
            if tried_s < SHORTEST * (1.0 + from_s) && tried_s < left_s {
                return Err(self.failed(FailureReason::StepTooSmall, None));
            }
            let tried = self.solver.attempt(self.model, &self.controls, tried_s, self.plan.tolerance);
            let factor = (0.9 * tried.error.max(1e-6).powf(-1.0 / 3.0)).clamp(0.2, 4.0);
            if tried.error > 1.0 {
                self.work.rejected += 1;
                self.solver.forget_slopes();
                step_s = tried_s * if tried.error.is_finite() { factor.min(0.7) } else { 0.2 };
                retry = true;
                if step_s < SHORTEST * (1.0 + from_s) {
                    return Err(self.failed(FailureReason::StepTooSmall, Some(tried.room)));
                }
                continue;
            }
            let reached_s = if tried_s == left_s { stop_s } else { from_s + tried_s };
            self.take(reached_s);
            let happened = self.pin_event(from_s)?;
            let grow = if retry { factor.min(1.0) } else { factor };
            retry = false;
            if !happened {
                step_s = tried_s.max(if tried_s < step_s && tried_s == left_s { step_s } else { 0.0 })
                    * if tried_s == left_s && tried_s < step_s { 1.0 } else { grow };
            }
            self.report(sample);
            let clocked =
                self.pending.by_the_clock(network, &mut self.controls, self.solver.time_s, &mut self.events);
            if happened || clocked {
                step_s = FIRST_S;
                self.settle();
            } else {
                std::mem::swap(&mut self.before, &mut self.after);
            }
            self.work.steps += 1;
        }
        // What is asked for at the end itself, or where nothing was to be done.
        self.after.clone_from(&self.before);
        self.report_last(sample);
        Ok(self.ended())
    }

    /// Looks again after a jump: what was before is no guide to what comes.
    fn settle(&mut self) {
        let network = self.model.network;
        let time_s = self.solver.time_s;
        self.pending.by_the_clock(network, &mut self.controls, time_s, &mut self.events);
        self.solver.look(self.model, &self.controls);
        self.solver.forget_slopes();
        snapshot::fill(
            self.model,
            &self.controls,
            &self.solver.look,
            &self.solver.state,
            time_s,
            &mut self.before,
        );
    }

    /// Takes the step that was tried and looks at its end.
    fn take(&mut self, reached_s: f64) {
        self.solver.accept(reached_s);
        self.solver.look(self.model, &self.controls);
        snapshot::fill(
            self.model,
            &self.controls,
            &self.solver.look,
            &self.solver.state,
            reached_s,
            &mut self.after,
        );
    }

    /// Finds the first event within the step and cuts the step to end there.
    fn pin_event(&mut self, from_s: f64) -> Result<bool, Failed> {
        let network = self.model.network;
        let clocks = self.model.building.layout.clocks;
        for attempt in 0..PIN_TRIES {
            let of_fires = clocks..clocks + network.fires.len();
            let found = self.pending.first(
                network,
                &self.controls,
                &self.solver.state[of_fires],
                &self.before,
                &self.after,
            );
            let Some((reached, share)) = found else { break };
            let step_s = self.solver.time_s - from_s;
            let late_s = (1.0 - share) * step_s;
            // Within a hundredth of a second is on time.
            if attempt + 1 == PIN_TRIES || late_s <= 0.01 || share <= 0.0 || reached.from >= 0.0 {
                self.pending.follow(network, &self.before, &self.after);
                self.pending.happen(network, &mut self.controls, reached.kind, &self.after);
                self.events.push(Event { at_s: self.solver.time_s, kind: reached.kind });
                return Ok(true);
            }
            // Back, and again just past the event.
            let cut_s = (share * step_s + 0.004).min(step_s);
            self.solver.go_back(from_s);
            self.solver.look(self.model, &self.controls);
            let tried = self.solver.attempt(self.model, &self.controls, cut_s, self.plan.tolerance);
            if tried.error > 1.0 {
                // A shorter step from the same place can only fail where slopes changed: take it as it is, if finite.
                if !tried.error.is_finite() {
                    return Err(self.failed(FailureReason::StepTooSmall, Some(tried.room)));
                }
            }
            self.take(from_s + cut_s);
        }
        self.pending.follow(network, &self.before, &self.after);
        Ok(false)
    }

    /// Gives the samples that lie within the last step.
    fn report(&mut self, sample: &mut dyn FnMut(&Sample)) {
        self.note();
        while let Some(&at_s) = self.plan.samples_s.get(self.samples_done)
            && at_s < self.solver.time_s
        {
            self.samples_done += 1;
            sample(self.between.at(at_s, &self.before, &self.after));
        }
    }

    fn report_last(&mut self, sample: &mut dyn FnMut(&Sample)) {
        while let Some(&at_s) = self.plan.samples_s.get(self.samples_done)
            && at_s <= self.plan.duration_s
        {
            self.samples_done += 1;
            sample(self.between.at(at_s, &self.before, &self.after));
        }
    }

    fn note(&mut self) {
        let notes = &mut self.notes;
        let mut once = |note: Note| {
            if !notes.contains(&note) {
                notes.push(note);
            }
        };
        for (index, room) in self.after.rooms.iter().enumerate() {
            if room.pressure_pa.abs() > 10_000.0 {
                once(Note::PressureBeyondBuildings(index));
            }
            if room.upper.temperature_k > 1500.0 {
                once(Note::HotterThanTried(index));
            }
        }
        for (index, fire) in self.after.fires.iter().enumerate() {
            let data = &self.model.network.fires[index];
            if data.base_height_m + fire.flame_height_m > self.model.network.rooms[data.room].height_m {
                once(Note::FlameBeyondCeiling(index));
            }
        }
    }

    fn failed(&self, reason: FailureReason, room: Option<usize>) -> Failed {
        Failed { at_s: self.solver.time_s, room, reason }
    }

    fn ended(mut self) -> Ended {
        for (index, room) in self.model.network.rooms.iter().enumerate() {
            let longest = room.length_m.max(room.width_m);
            if longest > 5.0 * room.length_m.min(room.width_m) || room.length_m * room.width_m > 300.0 {
                self.notes.push(Note::TooLongForOneLayer(index));
            }
        }
        self.work.evaluations = self.solver.evaluations;
        self.work.jacobians = self.solver.jacobians;
        let account = Account::new(self.model.building);
        Ended {
            balance: account.balance(&self.start, &self.solver.state),
            events: self.events,
            work: self.work,
            notes: self.notes,
        }
    }
}
