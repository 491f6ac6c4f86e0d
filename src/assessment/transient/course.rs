//! One run, and what is kept of it.

use std::ops::ControlFlow;

use super::super::findings::{Point, Stop};
use super::network::Made;
use super::people::People;
use crate::fire::constants::ICE_POINT_K;
use crate::fire::flashover::{LIMIT_20_KW_M2_FLOOR, LIMIT_600_C_GAS_K};
use crate::fire::tenability::TwoLayers;
use crate::fire::two_zone::{EventKind, Failed, FailureReason, Note, Plan, RoomState, Sample, Side, run};

/// Samples of a run; every [`KEPT_EVERY`]th is kept where the run's series is.
const SAMPLES: u32 = 720;
const KEPT_EVERY: u32 = 6;
/// How long a criterion of flashover must hold, s.
const HELD_S: f64 = 10.0;
/// Steps before a run counts as failed: some ten times what one takes.
const STEP_BUDGET: usize = 6_000;
/// Tolerances that a run is tried with, one after the other, until it comes to its end: another step often passes where one
/// got stuck.
const TOLERANCES: [f64; 3] = [Plan::TOLERANCE, 0.3 * Plan::TOLERANCE, 3.0 * Plan::TOLERANCE];
/// A run that shows nothing more ends when no flame has burned for so long, s, and the layer has cooled to this, K: what is
/// out and cold stays so.
const OUT_S: f64 = 900.0;
const COLD_K: f64 = 423.15;
/// Far rooms count as at rest up to this rise, K, and this extinction of light, 1/m: a third of what smoke that one sees
/// 10 m through has.
const REST_K: f64 = 3.0;
const REST_EXTINCTION_1_M: f64 = 0.1;

/// How much of a run is wanted.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(in crate::assessment) enum Depth {
    /// Until flashover by both criteria, or the horizon.
    Flashover,
    /// To the horizon.
    Whole,
    /// To the horizon, with the people of every room.
    People,
    /// With the series too.
    Series,
}

impl Depth {
    fn follows_people(self) -> bool {
        matches!(self, Self::People | Self::Series)
    }
}

/// A criterion that must hold a while.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
struct Held {
    above_since_s: Option<f64>,
    /// When it came to hold; it has held since.
    met_s: Option<f64>,
}

impl Held {
    /// Along a straight line from one value to the next.
    fn follow(&mut self, from: (f64, f64), to: (f64, f64), limit: f64) {
        if self.met_s.is_some() {
            return;
        }
        if to.1 < limit {
            self.above_since_s = None;
            return;
        }
        let since_s = *self.above_since_s.get_or_insert_with(|| crossing_s(from, to, limit));
        if to.0 - since_s >= HELD_S {
            self.met_s = Some(since_s);
        }
    }
}

/// When a straight line passes a limit on its way up.
fn crossing_s(from: (f64, f64), to: (f64, f64), limit: f64) -> f64 {
    if from.1 >= limit || to.1 <= from.1 {
        return from.0;
    }
    from.0 + (to.0 - from.0) * (limit - from.1) / (to.1 - from.1)
}

/// Pressures over a run, Pa; positive against outside or against what lies behind.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub(in crate::assessment) struct Pressures {
    pub peak_pa: f64,
    pub suction_pa: f64,
}

impl Pressures {
    fn see(&mut self, pa: f64) {
        self.peak_pa = self.peak_pa.max(pa);
        self.suction_pa = self.suction_pa.min(pa);
    }
}

/// What became of a room.
#[derive(Debug, Clone, PartialEq)]
pub(in crate::assessment) struct RoomCourse {
    /// Number in the building.
    pub number: usize,
    /// Smoke that one sees less than 10 m through hangs below its ceiling.
    pub smoke_s: Option<f64>,
    /// Its contents take fire.
    pub fire_s: Option<f64>,
    pub hottest_k: f64,
    pub lowest_layer_m: f64,
    /// Where they were followed.
    pub people: Option<People>,
}

/// What is kept of a run. Times are on the fire clock.
#[derive(Debug, Clone, PartialEq)]
pub(in crate::assessment) struct Course {
    pub layer_600_c_s: Option<f64>,
    pub floor_20_kw_m2_s: Option<f64>,
    pub layer_400_c_s: Option<f64>,
    pub hottest_k: f64,
    pub floor_kw_m2: f64,
    pub oxygen_percent: f64,
    pub carbon_monoxide_ppm: f64,
    pub peak_kw: f64,
    pub flame_height_m: f64,
    pub equivalence_ratio: f64,
    /// Of the room of origin at its floor against outside.
    pub pressures: Pressures,
    /// Across each opening of the network, outwards from the room of origin where that is one side.
    pub across: Vec<Pressures>,
    pub rooms: Vec<RoomCourse>,
    /// When the first fire went out for want of oxygen, and when it burned again.
    pub flame_out_s: Option<f64>,
    pub relit_s: Option<f64>,
    /// Openings that gave way, by place in the network.
    pub gave_way: Vec<(f64, usize, GaveWay)>,
    /// Fires that joined, by place in the network.
    pub joined: Vec<(f64, usize)>,
    pub sprinkler_s: Option<f64>,
    pub series: Vec<Point>,
    pub far_stirred: bool,
    pub notes: Vec<Note>,
    pub steps: usize,
    /// The run did not come to its end.
    pub failed: Option<Failed>,
}

/// How an opening gave way.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(in crate::assessment) enum GaveWay {
    Glass,
    BurnedThrough,
    Pressure,
}

impl Course {
    /// The earlier of both criteria.
    pub fn flashover_s(&self) -> Option<f64> {
        [self.layer_600_c_s, self.floor_20_kw_m2_s].into_iter().flatten().min_by(f64::total_cmp)
    }

    /// How near it came: 1 at flashover, by the nearer criterion.
    pub fn nearness(&self, ambient_k: f64) -> f64 {
        let by_gas = (self.hottest_k - ambient_k) / (LIMIT_600_C_GAS_K - ambient_k);
        by_gas.max(self.floor_kw_m2 / LIMIT_20_KW_M2_FLOOR)
    }
}

/// Listens to a run.
struct Recorder<'m> {
    made: &'m Made,
    depth: Depth,
    ambient_k: f64,
    gas: Held,
    floor: Held,
    hot: Held,
    before: Option<(f64, f64, f64)>,
    /// When a flame last burned, s, and how warm the layer is, K.
    burned_s: f64,
    gas_k: f64,
    /// When the first flame was first seen out though its fuel went on: a run that is ended early tells no events.
    seen_out_s: Option<f64>,
    index: u32,
    course: Course,
}

impl<'m> Recorder<'m> {
    fn new(made: &'m Made, depth: Depth) -> Self {
        let rooms = made
            .rooms
            .iter()
            .map(|&number| RoomCourse {
                number,
                smoke_s: None,
                fire_s: None,
                hottest_k: 0.0,
                lowest_layer_m: f64::INFINITY,
                people: None,
            })
            .collect();
        Self {
            made,
            depth,
            ambient_k: made.network.ambient.indoor_temperature_k,
            gas: Held::default(),
            floor: Held::default(),
            hot: Held::default(),
            before: None,
            burned_s: 0.0,
            gas_k: 0.0,
            seen_out_s: None,
            index: 0,
            course: Course {
                layer_600_c_s: None,
                floor_20_kw_m2_s: None,
                layer_400_c_s: None,
                hottest_k: 0.0,
                floor_kw_m2: 0.0,
                oxygen_percent: f64::INFINITY,
                carbon_monoxide_ppm: 0.0,
                peak_kw: 0.0,
                flame_height_m: 0.0,
                equivalence_ratio: 0.0,
                pressures: Pressures::default(),
                across: vec![Pressures::default(); made.network.openings.len()],
                rooms,
                flame_out_s: None,
                relit_s: None,
                gave_way: Vec::new(),
                joined: Vec::new(),
                sprinkler_s: None,
                series: Vec::new(),
                far_stirred: false,
                notes: Vec::new(),
                steps: 0,
                failed: None,
            },
        }
    }

    fn hear(&mut self, sample: &Sample) {
        let at_s = sample.time_s - self.made.established_s;
        let origin = &sample.rooms[0];
        let (gas_k, flux_kw_m2) = (origin.upper.temperature_k, origin.floor_flux_kw_m2);
        let (from_s, from_k, from_kw_m2) = self.before.unwrap_or((at_s, gas_k, flux_kw_m2));
        self.gas.follow((from_s, from_k), (at_s, gas_k), LIMIT_600_C_GAS_K);
        self.floor.follow((from_s, from_kw_m2), (at_s, flux_kw_m2), LIMIT_20_KW_M2_FLOOR);
        self.hot.follow((from_s, from_k), (at_s, gas_k), super::stand::SHUT_LATE_K);
        self.before = Some((at_s, gas_k, flux_kw_m2));
        self.gas_k = gas_k;
        if sample.fires.iter().any(|fire| fire.alight) {
            self.burned_s = at_s;
        }

        if let Some(first) = sample.fires.first()
            && !first.alight
            && first.fuel_kg_s > 0.0
        {
            self.seen_out_s = self.seen_out_s.or(Some(at_s));
        }

        let air = TwoLayers::from(origin);
        let course = &mut self.course;
        course.hottest_k = course.hottest_k.max(gas_k);
        course.floor_kw_m2 = course.floor_kw_m2.max(flux_kw_m2);
        course.oxygen_percent = course.oxygen_percent.min(air.upper.gas.oxygen_percent);
        course.carbon_monoxide_ppm = course.carbon_monoxide_ppm.max(air.upper.gas.carbon_monoxide_ppm);
        course.peak_kw = course.peak_kw.max(origin.heat_release_kw);
        course.equivalence_ratio = course.equivalence_ratio.max(origin.equivalence_ratio);
        course.pressures.see(origin.pressure_pa);
        if let Some(first) = sample.fires.first() {
            course.flame_height_m = course.flame_height_m.max(first.flame_height_m);
        }
        for (index, opening) in sample.openings.iter().enumerate() {
            let outwards = match self.made.network.openings[index].between {
                [_, Side::Room(0)] => -1.0,
                _ => 1.0,
            };
            course.across[index].see(outwards * opening.pressure_pa);
        }
        for (index, room) in course.rooms.iter_mut().enumerate() {
            let state = &sample.rooms[index];
            let height_m = self.made.network.rooms[index].height_m;
            room.hottest_k = room.hottest_k.max(state.upper.temperature_k);
            room.lowest_layer_m = room.lowest_layer_m.min(state.interface_height_m);
            // 10 m through a sign that reflects: 3/10 per metre, in a layer that is more than a film.
            if state.upper_extinction_1_m > 0.3 && state.interface_height_m < 0.95 * height_m {
                room.smoke_s = room.smoke_s.or(Some(at_s));
            }
            if self.depth.follows_people() {
                follow_people(&mut room.people, at_s, state, self.ambient_k, index == 0);
            }
        }
        if let Some(rest) = self.made.rest() {
            let far = &sample.rooms[rest];
            let warm = far.upper.temperature_k > self.ambient_k + REST_K;
            course.far_stirred |= warm || far.upper_extinction_1_m > REST_EXTINCTION_1_M;
        }
        if self.depth == Depth::Series && self.index.is_multiple_of(KEPT_EVERY) {
            course.series.push(Point {
                at_s,
                upper_temperature_c: gas_k - ICE_POINT_K,
                lower_temperature_c: origin.lower.temperature_k - ICE_POINT_K,
                layer_height_m: origin.interface_height_m,
                floor_flux_kw_m2: flux_kw_m2,
                oxygen_percent: air.upper.gas.oxygen_percent,
                carbon_monoxide_ppm: air.upper.gas.carbon_monoxide_ppm,
                pressure_pa: origin.pressure_pa,
                heat_release_kw: origin.heat_release_kw,
            });
        }
        self.index += 1;
    }

    fn enough(&self) -> bool {
        let known = self.depth == Depth::Flashover && self.gas.met_s.is_some() && self.floor.met_s.is_some();
        let now_s = self.before.map_or(0.0, |before| before.0);
        let over = now_s - self.burned_s > OUT_S && self.gas_k < COLD_K;
        known || (over && !self.depth.follows_people())
    }
}

/// A room that nothing has come to yet changes nobody.
fn follow_people(people: &mut Option<People>, at_s: f64, state: &RoomState, ambient_k: f64, origin: bool) {
    let stirred = state.upper.temperature_k > ambient_k + 1.0 || state.upper_extinction_1_m > 1e-3;
    match people {
        Some(people) => people.follow(at_s, state),
        None if stirred => *people = Some(People::starting(at_s, state, origin)),
        None => {}
    }
}

/// Runs a network to its horizon on the fire clock. Asks `watch` at every step.
pub(in crate::assessment) fn follow(
    made: &Made,
    horizon_s: f64,
    depth: Depth,
    watch: &mut dyn FnMut() -> ControlFlow<Stop>,
) -> Result<Course, Stop> {
    let mut steps = 0;
    let mut first = None;
    for tolerance in TOLERANCES {
        let mut course = once(made, horizon_s, depth, tolerance, watch)?;
        steps += course.steps;
        course.steps = steps;
        if course.failed.is_none() {
            return Ok(course);
        }
        first.get_or_insert(course);
    }
    let mut course = first.unwrap_or_else(|| Recorder::new(made, depth).course);
    course.steps = steps;
    Ok(course)
}

fn once(
    made: &Made,
    horizon_s: f64,
    depth: Depth,
    tolerance: f64,
    watch: &mut dyn FnMut() -> ControlFlow<Stop>,
) -> Result<Course, Stop> {
    let interval_s = horizon_s / f64::from(SAMPLES);
    let plan = Plan {
        duration_s: made.established_s + horizon_s,
        samples_s: (0..=SAMPLES).map(|k| made.established_s + f64::from(k) * interval_s).collect(),
        tolerance,
        step_budget: STEP_BUDGET,
    };
    let recorder = std::cell::RefCell::new(Recorder::new(made, depth));
    let mut stopped = false;
    let mut steps = 0;
    let ended = run(&made.network, &plan, &mut |sample| recorder.borrow_mut().hear(sample), &mut || {
        steps += 1;
        if watch().is_break() {
            stopped = true;
            return ControlFlow::Break(());
        }
        if recorder.borrow().enough() { ControlFlow::Break(()) } else { ControlFlow::Continue(()) }
    });
    if stopped {
        return Err(Stop);
    }
    let Recorder { gas, floor, hot, seen_out_s, mut course, .. } = recorder.into_inner();
    course.layer_600_c_s = gas.met_s;
    course.floor_20_kw_m2_s = floor.met_s;
    course.layer_400_c_s = hot.met_s;
    course.steps = steps;
    match ended {
        Ok(ended) => {
            course.notes = ended.notes;
            for event in ended.events {
                happened(&mut course, made, event.at_s - made.established_s, event.kind);
            }
        }
        // Ours: enough was known.
        Err(Failed { reason: FailureReason::Stopped, .. }) => {}
        // What breaks off after flashover has answered what decides.
        Err(failed) if course.flashover_s().is_none() => course.failed = Some(failed),
        Err(_) => {}
    }
    course.flame_out_s = course.flame_out_s.or(seen_out_s);
    Ok(course)
}

fn happened(course: &mut Course, made: &Made, at_s: f64, kind: EventKind) {
    match kind {
        EventKind::Ignited(fire) => {
            let room = made.network.fires[fire].room;
            if room == 0 && fire > 0 {
                course.joined.push((at_s, fire));
            }
            let taken = &mut course.rooms[room].fire_s;
            *taken = taken.or(Some(at_s.max(0.0)));
        }
        EventKind::WentOut(0) => course.flame_out_s = course.flame_out_s.or(Some(at_s)),
        EventKind::Relit(0) => course.relit_s = course.relit_s.or(Some(at_s)),
        EventKind::GlassFell(opening) => course.gave_way.push((at_s, opening, GaveWay::Glass)),
        EventKind::BurnedThrough(opening) => course.gave_way.push((at_s, opening, GaveWay::BurnedThrough)),
        EventKind::GaveWay(opening) => course.gave_way.push((at_s, opening, GaveWay::Pressure)),
        EventKind::SprinklerOpened(_) => course.sprinkler_s = course.sprinkler_s.or(Some(at_s)),
        EventKind::WentOut(_)
        | EventKind::Relit(_)
        | EventKind::BurntOut(_)
        | EventKind::Moved(_)
        | EventKind::Detected(_) => {}
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn held(values: &[(f64, f64)]) -> Option<f64> {
        let mut held = Held::default();
        for two in values.windows(2) {
            held.follow(two[0], two[1], 20.0);
        }
        held.met_s
    }

    #[test]
    fn a_criterion_counts_from_when_it_was_passed_once_it_has_held_ten_seconds() {
        // By hand: from 10 at 0 s to 30 at 5 s the line passes 20 at 2.5 s.
        assert_eq!(held(&[(0.0, 10.0), (5.0, 30.0), (10.0, 30.0), (15.0, 30.0)]), Some(2.5));
    }

    #[test]
    fn a_peak_of_less_than_ten_seconds_is_no_flashover() {
        assert_eq!(held(&[(0.0, 10.0), (5.0, 30.0), (10.0, 30.0), (15.0, 10.0), (20.0, 10.0)]), None);
    }

    #[test]
    fn what_falls_back_begins_anew() {
        // By hand: the second time 20 is passed half way from 10 to 15 s.
        let values = [(0.0, 30.0), (5.0, 30.0), (10.0, 10.0), (15.0, 30.0), (20.0, 30.0), (25.0, 30.0)];

        assert_eq!(held(&values), Some(12.5));
    }
}
