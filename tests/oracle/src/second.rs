//! A run by the second solver, from event to event of ours.

use std::time::Duration;

use diffsol::matrix::MatrixRef;
use diffsol::vector::VectorRef;
use diffsol::{
    DefaultDenseMatrix, FaerSparseLU, FaerSparseMat, LinearSolver, Matrix, NalgebraLU, NalgebraMat,
    OdeBuilder, OdeSolverMethod, OdeSolverStopReason, Vector,
};

use crate::cases::Case;
use crate::clock::cpu_time;
use crate::fire::two_zone::{Event, RightSide, Sample};
use crate::laws::Laws;
use crate::structure::Structure;

/// Which linear algebra.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Algebra {
    /// Dense, for few rooms.
    Dense,
    /// Sparse, for many.
    Sparse,
}

/// What a run by the second solver gave.
pub struct Second {
    pub samples: Vec<Sample>,
    pub steps: usize,
    /// Time spent on finding the pattern of the slopes: needed once for a building, so not a part of a run.
    pub pattern_time: Duration,
    /// Time spent on slopes by differences: a solver with its slopes given would not spend it.
    pub slopes_time: Duration,
}

/// Follows a case, events told. With `between`, samples are read between steps; without, every step ends on them.
///
/// # Panics
///
/// Where the second solver fails.
pub fn follow(case: &Case, events: &[Event], tolerance: f64, algebra: Algebra, between: bool) -> Second {
    match algebra {
        Algebra::Dense => follow_by::<NalgebraMat<f64>, NalgebraLU<f64>>(case, events, tolerance, between),
        Algebra::Sparse => {
            follow_by::<FaerSparseMat<f64>, FaerSparseLU<f64>>(case, events, tolerance, between)
        }
    }
}

/// Moving leaves take a second to open: their end is a corner too.
const LEAF_MOVES_S: f64 = 1.0;

fn follow_by<M, L>(case: &Case, events: &[Event], tolerance: f64, between: bool) -> Second
where
    M: Matrix<T = f64, V: DefaultDenseMatrix>,
    for<'b> &'b M: MatrixRef<M>,
    for<'b> &'b M::V: VectorRef<M::V>,
    L: LinearSolver<M>,
{
    let network = &case.network;
    let plan = case.plan(tolerance);
    let mut right = RightSide::new(network).expect("a case is a network");
    let mut state = right.start();
    let first = right.sample(0.0, &state);
    for event in events.iter().filter(|event| event.at_s <= 0.0) {
        right.happen(event, &first);
    }
    let begun = cpu_time();
    let structure = Structure::new(&mut right, network, 60.0);
    let pattern_time = cpu_time() - begun;

    let mut corners: Vec<f64> = events
        .iter()
        .flat_map(|event| [event.at_s, event.at_s + LEAF_MOVES_S])
        .chain([case.duration_s])
        .filter(|at| *at > 0.0 && *at <= case.duration_s)
        .collect();
    corners.sort_by(f64::total_cmp);
    corners.dedup();

    let mut second = Second { samples: Vec::new(), steps: 0, pattern_time, slopes_time: Duration::ZERO };
    let mut samples = plan.samples_s.iter().copied().peekable();
    let mut from_s = 0.0;
    for to_s in corners {
        // Samples at the start of a stretch: the state itself.
        while samples.next_if(|at| *at <= from_s).is_some() {
            second.samples.push(right.sample(from_s, &state));
        }
        let stretch = Stretch { from_s, to_s, tolerance, between };
        let mut read: Vec<(f64, Vec<f64>)> = Vec::new();
        // A borrow for this stretch only.
        let mut one = RightSide::new(network).expect("a case is a network");
        for event in events.iter().filter(|event| event.at_s <= from_s) {
            one.happen(event, &first);
        }
        let (end, steps, slopes_time) = run_stretch::<M, L>(
            &mut one,
            &structure,
            &state,
            &stretch,
            &mut || samples.next_if(|at| *at < to_s),
            &mut read,
        );
        for (at_s, at) in read {
            second.samples.push(right.sample(at_s, &at));
        }
        second.steps += steps;
        second.slopes_time += slopes_time;
        let kept = structure.len;
        state[..kept].copy_from_slice(&end[..kept]);
        let sample = right.sample(to_s, &state);
        for event in events.iter().filter(|event| event.at_s > from_s && event.at_s <= to_s) {
            right.happen(event, &sample);
        }
        from_s = to_s;
    }
    while samples.next().is_some() {
        second.samples.push(right.sample(from_s, &state));
    }
    second
}

struct Stretch {
    from_s: f64,
    to_s: f64,
    tolerance: f64,
    between: bool,
}

fn run_stretch<'a, M, L>(
    right: &'a mut RightSide<'a>,
    structure: &'a Structure,
    state: &[f64],
    stretch: &Stretch,
    next: &mut dyn FnMut() -> Option<f64>,
    read: &mut Vec<(f64, Vec<f64>)>,
) -> (Vec<f64>, usize, Duration)
where
    M: Matrix<T = f64, V: DefaultDenseMatrix>,
    for<'b> &'b M: MatrixRef<M>,
    for<'b> &'b M::V: VectorRef<M::V>,
    L: LinearSolver<M>,
{
    let laws = Laws::<M>::new(right, structure, state.to_vec());
    let whole = |kept: &M::V| {
        let mut all = state.to_vec();
        all[..structure.len].copy_from_slice(&kept.clone_as_vec());
        all
    };
    let mut problem = OdeBuilder::<M>::new()
        .t0(stretch.from_s)
        .h0(1e-3_f64.min(0.1 * (stretch.to_s - stretch.from_s)))
        .rtol(stretch.tolerance)
        .atol(structure.scale.iter().map(|scale| stretch.tolerance * scale).collect::<Vec<f64>>())
        .build_from_eqn(laws)
        .expect("the second solver takes the problem");
    problem.ode_options.max_number_timesteps = 1_000_000;
    problem.ode_options.max_error_test_failures = 200;
    problem.ode_options.max_nonlinear_solver_failures = 200;
    let mut solver = problem.esdirk34::<L>().expect("the second solver starts");
    let mut steps = 0;
    let mut wanted = next();
    loop {
        let stop_s = if stretch.between { stretch.to_s } else { wanted.unwrap_or(stretch.to_s) };
        solver.set_stop_time(stop_s).expect("the stop lies ahead");
        loop {
            let reason = solver.step().expect("the second solver steps");
            steps += 1;
            if stretch.between {
                while let Some(at_s) = wanted.filter(|at| *at <= solver.state().t) {
                    read.push((at_s, whole(&solver.interpolate(at_s).expect("it lies in the step"))));
                    wanted = next();
                }
            }
            if matches!(reason, OdeSolverStopReason::TstopReached) {
                break;
            }
        }
        if stop_s >= stretch.to_s {
            break;
        }
        read.push((stop_s, whole(solver.state().y)));
        wanted = next();
    }
    let end = whole(solver.state().y);
    drop(solver);
    (end, steps, problem.eqn.slopes_time.get())
}
