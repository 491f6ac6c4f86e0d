//! The transient level: the whole building as a network of two-layer rooms.

mod course;
mod fires;
mod network;
mod people;
mod shell;
mod stand;
mod study;
mod wing;

/// For trials.
pub fn trial(
    building: &crate::domain::Building,
    catalogue: &crate::catalogue::Catalogue,
    wide: bool,
) {
    use std::ops::ControlFlow;
    use course::Course;
    let assumptions = crate::domain::Assumptions::default();
    let plan = super::plan::Plan::of(building, catalogue);
    let (spans, _) = super::clocks::Spans::of(building, &assumptions);
    let inputs: Vec<_> = (0..building.rooms.len())
        .map(|n| super::inputs::Inputs::of(n, &plan, catalogue, &assumptions, &mut super::assumed::Account::default()).ok())
        .collect();
    let whole = network::Whole { plan: &plan, rooms: &inputs, catalogue, assumptions: &assumptions };
    for origin in inputs.iter().flatten() {
        let clock = super::clocks::Clock::of(origin, spans);
        let started = std::time::Instant::now();
        let _ = wide;
        match study::Study::of(&whole, origin, None, &clock, &mut || ControlFlow::Continue(())) {
            Ok(study) => println!("{:12} {:?} by {:?} {:?} corners {:?} elsewhere {:?} whole {}+{} stirred {} runs {} steps {} {:.0} ms",
                origin.key, study.rating, study.scenario(), study.band(Course::flashover_s), study.corners.iter().map(|c| c.flashover_s().map(f64::round)).collect::<Vec<_>>(),
                study.elsewhere, study.whole.made.rooms.len(), study.whole.made.far.len(), study.whole.course.far_stirred, study.runs, study.steps, started.elapsed().as_secs_f64() * 1e3),
            Err(no) => println!("{:12} {no:?}", origin.key),
        }
    }
}
