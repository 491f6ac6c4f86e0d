//! The runs of one room of origin: every scenario with typical inputs, the worst at its four corners.

use std::ops::ControlFlow;

use super::super::clocks::Clock;
use super::super::findings::{Band, FlashoverRating, HoldsWhile, Stop};
use super::super::inputs::Inputs;
use super::course::{Course, Depth, Pressures, follow};
use super::network::{Corner, Made, Whole};
use super::stand::{SHUT_LATE_AFTER_S, Standing};
use super::wing::Reach;
use crate::domain::assumptions::Scenario;
use crate::fire::two_zone::{Failed, Position};

/// A scenario as it was run with typical inputs.
#[derive(Debug, Clone, PartialEq)]
pub(in crate::assessment) struct Ran {
    pub standing: Standing,
    pub made: Made,
    pub course: Course,
}

/// All runs of a room of origin.
#[derive(Debug, Clone, PartialEq)]
pub(in crate::assessment) struct Study {
    pub ran: Vec<Ran>,
    /// Place of the scenario that governs.
    pub governing: usize,
    /// The scenario that governs, once more with series and people, its wing as wide as need be.
    pub whole: Ran,
    /// Its corners, in the order of [`Corner::FOUR`].
    pub corners: Vec<Course>,
    /// The corners of the room shut, where that was asked for.
    pub shut_corners: Vec<Course>,
    pub rating: FlashoverRating,
    /// Flashover came in another scenario at a corner only.
    pub elsewhere: Option<Scenario>,
    /// What a rating `not_indicated` hangs on.
    pub holds: Vec<HoldsWhile>,
    pub runs: usize,
    pub steps: usize,
}

/// Why a room has no study.
#[derive(Debug, Clone, PartialEq)]
pub(in crate::assessment) enum NoStudy {
    Stopped,
    /// No scenario that was asked for can be run.
    NoScenario,
    /// The building cannot be put as a network.
    Unfit(&'static str),
    /// The engine came to no end in a run that decides.
    Failed(Scenario, Failed),
}

impl From<Stop> for NoStudy {
    fn from(_: Stop) -> Self {
        Self::Stopped
    }
}

/// Runs of one room, none of them twice.
struct Runner<'r, 'a> {
    whole: &'r Whole<'a>,
    origin: &'r Inputs<'a>,
    clock: &'r Clock,
    watch: &'r mut dyn FnMut() -> ControlFlow<Stop>,
    done: Vec<(Made, Depth, Course)>,
    position: Position,
    runs: usize,
    steps: usize,
}

impl Runner<'_, '_> {
    fn run(
        &mut self,
        standing: &Standing,
        corner: Corner,
        reach: Reach,
        depth: Depth,
    ) -> Result<(Made, Course), NoStudy> {
        self.run_of(self.origin, standing, corner, reach, depth)
    }

    /// With the room of origin as it might be.
    fn run_of(
        &mut self,
        origin: &Inputs<'_>,
        standing: &Standing,
        corner: Corner,
        reach: Reach,
        depth: Depth,
    ) -> Result<(Made, Course), NoStudy> {
        let made = self.whole.network(origin, standing, corner, self.clock, reach).map_err(NoStudy::Unfit)?;
        if let Some((_, _, course)) =
            self.done.iter().find(|(other, deep, _)| *deep == depth && *other == made)
        {
            return Ok((made, course.clone()));
        }
        let horizon = self.origin.horizon;
        let open = self.whole.plan.of_room[self.origin.number]
            .iter()
            .any(|&number| standing.share(self.whole.plan, number) > 0.0);
        let horizon_s = if open && standing.shut_at_s.is_none() { horizon.open_s } else { horizon.shut_s };
        let course = follow(&made, horizon_s, depth, self.watch)?;
        self.runs += 1;
        self.steps += course.steps;
        self.done.push((made.clone(), depth, course.clone()));
        Ok((made, course))
    }

    /// With typical inputs.
    fn typical(&mut self, standing: Standing) -> Result<Ran, NoStudy> {
        // How a shut room breathes is asked for to its end.
        let shut = matches!(standing.scenario, Scenario::Shut | Scenario::ShutLate);
        let depth = if shut { Depth::Whole } else { Depth::Flashover };
        let standing = Standing { position: self.position, ..standing };
        let (made, course) = self.run(&standing, Corner::TYPICAL, Reach::FIRST, depth)?;
        Ok(Ran { standing, made, course })
    }

    /// Where the first fire is worse: in a corner, where a plume draws least air and the layer gets hottest; or free, where
    /// it draws more, which takes a starved fire further. Tried in the scenario with most air, and kept for all.
    fn place(&mut self) -> Result<(), NoStudy> {
        let standing = Standing::of(self.whole.plan, self.origin.number, Scenario::DoorOpen);
        let (made, corner) = self.run(&standing, Corner::TYPICAL, Reach::FIRST, Depth::Flashover)?;
        if corner.flashover_s().is_none() {
            let free = Standing { position: Position::Centre, ..standing };
            let (_, centre) = self.run(&free, Corner::TYPICAL, Reach::FIRST, Depth::Flashover)?;
            let ambient_k = made.network.ambient.indoor_temperature_k;
            let nearer = centre.nearness(ambient_k) > corner.nearness(ambient_k);
            if centre.failed.is_none() && (centre.flashover_s().is_some() || nearer) {
                self.position = Position::Centre;
            }
        }
        Ok(())
    }

    /// `shut_late`: the room as with the door open, shut at 400 °C; and once more, shut a minute after flashover.
    fn shut_late(&mut self, ran: &mut Vec<Ran>) -> Result<(), NoStudy> {
        use super::super::scenarios::reason;

        let plan = self.whole.plan;
        let standing = Standing {
            position: self.position,
            ..Standing::of(plan, self.origin.number, Scenario::ShutLate)
        };
        let can_be_shut = plan.of_room[self.origin.number]
            .iter()
            .any(|&number| standing.share(plan, number) > 0.0 && !plan.openings[number].stays_open());
        if !can_be_shut {
            let reason = reason("never_open", "nothing stands open that could be shut late: as shut");
            ran.push(self.typical(Standing {
                reason: Some(reason),
                ..Standing::of(plan, self.origin.number, Scenario::Shut).named(Scenario::ShutLate)
            })?);
            return Ok(());
        }
        let (_, open) = self.run(&standing, Corner::TYPICAL, Reach::FIRST, Depth::Flashover)?;
        let hot = open.layer_400_c_s.map(|at_s| (at_s, reason("at_400_c", "shut when the layer has 400 °C")));
        let flashed = open
            .flashover_s()
            .map(|at_s| (at_s + SHUT_LATE_AFTER_S, reason("after_flashover", "shut 60 s after flashover")));
        let moments: Vec<_> = hot.into_iter().chain(flashed).collect();
        if moments.is_empty() {
            let reason = reason("never_hot", "the layer never has 400 °C: as with the door open");
            ran.push(self.typical(Standing { reason: Some(reason), ..standing })?);
            return Ok(());
        }
        for (at_s, reason) in moments {
            let late = Standing { shut_at_s: Some(at_s), reason: Some(reason), ..standing.clone() };
            ran.push(self.typical(late)?);
        }
        Ok(())
    }
}

/// Which run is worse: the one with the earlier flashover, or that comes nearer to it; of equals the first. What flashes
/// over before it is shut does so as with the door open, which stands for both.
fn worst(ran: &[Ran]) -> Option<usize> {
    let open_still = |ran: &Ran| {
        let shut_s = ran.standing.shut_at_s.unwrap_or(f64::NEG_INFINITY);
        ran.course.flashover_s().is_some_and(|at_s| at_s < shut_s)
    };
    let alone = ran.iter().all(|ran| ran.standing.scenario == Scenario::ShutLate);
    let time_s = |ran: &Ran| ran.course.flashover_s().unwrap_or(f64::INFINITY);
    let near = |ran: &Ran| ran.course.nearness(ran.made.network.ambient.indoor_temperature_k);
    (0..ran.len()).filter(|&place| alone || !open_still(&ran[place])).min_by(|&a, &b| {
        let (x, y) = (&ran[a], &ran[b]);
        time_s(x).total_cmp(&time_s(y)).then(near(y).total_cmp(&near(x))).then(a.cmp(&b))
    })
}

/// Clause 2.13 as a function: corners of the worst scenario that flash over, and whether any other run does.
pub(in crate::assessment) fn rate(corners: usize, any: bool) -> FlashoverRating {
    match corners {
        4 => FlashoverRating::Expected,
        3 => FlashoverRating::Likely,
        0 if !any => FlashoverRating::NotIndicated,
        _ => FlashoverRating::Possible,
    }
}

impl Study {
    /// Makes every run that the room asks for.
    pub fn of<'a>(
        whole: &Whole<'a>,
        origin: &Inputs<'a>,
        asked: Option<&[Scenario]>,
        clock: &Clock,
        watch: &mut dyn FnMut() -> ControlFlow<Stop>,
    ) -> Result<Self, NoStudy> {
        let mut runner = Runner {
            whole,
            origin,
            clock,
            watch,
            done: Vec::new(),
            position: Position::Corner,
            runs: 0,
            steps: 0,
        };
        runner.place()?;
        let wanted = |scenario: Scenario| asked.is_none_or(|asked| asked.contains(&scenario));
        let plan = whole.plan;
        let mut ran = Vec::new();
        for scenario in [Scenario::AsFound, Scenario::DoorOpen, Scenario::Shut] {
            if wanted(scenario) {
                ran.push(runner.typical(Standing::of(plan, origin.number, scenario))?);
            }
        }
        if wanted(Scenario::ShutLate) {
            runner.shut_late(&mut ran)?;
        }
        if wanted(Scenario::WindowFails) {
            ran.push(runner.typical(Standing::of(plan, origin.number, Scenario::WindowFails))?);
        }
        if let Some(failed) = ran.iter().find_map(|ran| Some((ran.standing.scenario, ran.course.failed?))) {
            return Err(NoStudy::Failed(failed.0, failed.1));
        }
        let governing = worst(&ran).ok_or(NoStudy::NoScenario)?;
        let standing = ran[governing].standing.clone();
        let corners = corners(&mut runner, &standing, Depth::People)?;
        let shut = ran.iter().find(|ran| ran.standing.scenario == Scenario::Shut);
        let shut_corners = match shut.map(|shut| shut.standing.clone()) {
            Some(shut) => corners_of_shut(&mut runner, &shut)?,
            None => Vec::new(),
        };
        let flashed = corners.iter().filter(|course| course.flashover_s().is_some()).count();
        let typically = ran[governing].course.flashover_s().is_some();
        let mut elsewhere = None;
        if flashed == 0 && !typically {
            elsewhere = flashes_elsewhere(&mut runner, &ran, governing)?;
        }
        let rating = rate(flashed, typically || elsewhere.is_some());
        let holds = if rating == FlashoverRating::NotIndicated {
            vec![holds(&mut runner, &standing, &corners)?]
        } else {
            Vec::new()
        };
        let whole = series(&mut runner, &standing)?;
        let (runs, steps) = (runner.runs, runner.steps);
        Ok(Self { ran, governing, whole, corners, shut_corners, rating, elsewhere, holds, runs, steps })
    }

    /// The scenario that governs.
    pub fn scenario(&self) -> Scenario {
        self.ran[self.governing].standing.scenario
    }

    /// A value of the governing scenario over its corners; none where it does not come with typical inputs.
    pub fn band(&self, of: impl Fn(&Course) -> Option<f64>) -> Option<Band> {
        over(of(&self.ran[self.governing].course)?, &self.corners, of)
    }

    /// The same of what only the whole run follows.
    pub fn band_of_whole(&self, of: impl Fn(&Course) -> Option<f64>) -> Option<Band> {
        over(of(&self.whole.course)?, &self.corners, of)
    }

    /// The run of the room shut, and a pressure of it over its corners.
    pub fn shut(&self) -> Option<&Ran> {
        self.ran.iter().find(|ran| ran.standing.scenario == Scenario::Shut)
    }

    pub fn shut_band(&self, of: impl Fn(&Pressures) -> f64) -> Option<Band> {
        let typical = of(&self.shut()?.course.pressures);
        over(typical, &self.shut_corners, |course| Some(of(&course.pressures)))
    }
}

fn over(typical: f64, corners: &[Course], of: impl Fn(&Course) -> Option<f64>) -> Option<Band> {
    let at_corners = corners.iter().filter_map(of);
    let (low, high) =
        at_corners.fold((typical, typical), |(low, high), value| (low.min(value), high.max(value)));
    Some(Band { low, typical, high })
}

fn corners(runner: &mut Runner<'_, '_>, standing: &Standing, depth: Depth) -> Result<Vec<Course>, NoStudy> {
    let mut courses = Vec::with_capacity(4);
    for corner in Corner::FOUR {
        let (_, course) = runner.run(standing, corner, Reach::FIRST, depth)?;
        if let Some(failed) = course.failed {
            return Err(NoStudy::Failed(standing.scenario, failed));
        }
        courses.push(course);
    }
    Ok(courses)
}

/// Pressures only: a corner that fails leaves the others.
fn corners_of_shut(runner: &mut Runner<'_, '_>, standing: &Standing) -> Result<Vec<Course>, NoStudy> {
    let mut courses = Vec::with_capacity(4);
    for corner in Corner::FOUR {
        let (_, course) = runner.run(standing, corner, Reach::FIRST, Depth::Whole)?;
        if course.failed.is_none() {
            courses.push(course);
        }
    }
    Ok(courses)
}

/// With much fuel, does any of the other scenarios flash over? Little fuel never does where much does not.
fn flashes_elsewhere(
    runner: &mut Runner<'_, '_>,
    ran: &[Ran],
    governing: usize,
) -> Result<Option<Scenario>, NoStudy> {
    for (place, other) in ran.iter().enumerate() {
        // A room that is shut late was open until then, and that is looked at.
        if place == governing || other.standing.shut_at_s.is_some() {
            continue;
        }
        for corner in &Corner::FOUR[..2] {
            let (_, course) = runner.run(&other.standing, *corner, Reach::FIRST, Depth::Flashover)?;
            if let Some(failed) = course.failed {
                return Err(NoStudy::Failed(other.standing.scenario, failed));
            }
            if course.flashover_s().is_some() {
                return Ok(Some(other.standing.scenario));
            }
        }
    }
    Ok(None)
}

/// More fire load in the governing scenario, at the corner of much fuel that comes nearest.
fn holds(
    runner: &mut Runner<'_, '_>,
    standing: &Standing,
    corners: &[Course],
) -> Result<HoldsWhile, NoStudy> {
    let ambient_k = runner.origin.ambient_k;
    let near = |place: usize| corners.get(place).map_or(0.0, |course| course.nearness(ambient_k));
    let corner = Corner::FOUR[usize::from(near(1) > near(0))];
    super::holds::fire_load(runner.origin.contents.load.typical_mj_m2, |factor| {
        let fuller = runner.origin.with_load(factor);
        let (_, course) = runner.run_of(&fuller, standing, corner, Reach::FIRST, Depth::Flashover)?;
        // What comes to no end does not hold.
        Ok(course.flashover_s().is_some() || course.failed.is_some())
    })
}

/// The run that is shown: once more as wide as it may be where the far rooms do not stay at rest.
fn series(runner: &mut Runner<'_, '_>, standing: &Standing) -> Result<Ran, NoStudy> {
    let (made, course) = runner.run(standing, Corner::TYPICAL, Reach::FIRST, Depth::Series)?;
    if course.far_stirred {
        let (made, course) = runner.run(standing, Corner::TYPICAL, Reach::WIDEST, Depth::Series)?;
        if course.failed.is_none() {
            return Ok(Ran { standing: standing.clone(), made, course });
        }
    }
    Ok(Ran { standing: standing.clone(), made, course })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn four_corners_three_corners_none_and_what_lies_between() {
        for (corners, any, expected) in [
            (4, true, FlashoverRating::Expected),
            (3, true, FlashoverRating::Likely),
            (2, true, FlashoverRating::Possible),
            (1, false, FlashoverRating::Possible),
            (0, true, FlashoverRating::Possible),
            (0, false, FlashoverRating::NotIndicated),
        ] {
            assert_eq!(rate(corners, any), expected, "{corners} {any}");
        }
    }
}
