//! One step of the method.
//!
//! ROS34PW2 of Rang and Angermann: four stages, third order with any matrix (a W-method), stiffly
//! accurate, an embedded second order for the error. No iteration: a step always ends. The
//! coefficients are checked against their order conditions by a test.
//!
//! Source: [`RANG_ANGERMANN_2005`](crate::fire::sources::RANG_ANGERMANN_2005).

use super::building::{Building, SURFACES};
use super::controls::Controls;
use super::matrix::Matrix;
use super::rates::{Look, Model};

/// Coefficients in the form that needs no product with the matrix.
mod coefficients {
    pub const GAMMA: f64 = 4.358_665_215_084_59e-1;
    /// Places of the stages in the step.
    pub const TIMES: [f64; 4] = [0.0, 8.717_330_430_169_18e-1, 7.315_799_577_888_524e-1, 1.0];
    /// What earlier stages add to a stage.
    pub const STAGES: [[f64; 3]; 4] = [
        [0.0, 0.0, 0.0],
        [2.0, 0.0, 0.0],
        [1.419_217_317_455_765, -0.259_232_211_672_969_8, 0.0],
        [4.184_760_482_319_161, -0.285_192_017_355_496, 2.294_280_360_279_042],
    ];
    /// What earlier stages add to the right side of a stage, over the step.
    pub const RIGHTS: [[f64; 3]; 4] = [
        [0.0, 0.0, 0.0],
        [-4.588_560_720_558_084, 0.0, 0.0],
        [-4.184_760_482_319_161, 0.285_192_017_355_496, 0.0],
        [-6.368_179_200_128_36, -6.795_620_944_466_837, 2.870_098_604_331_056],
    ];
    /// The step less the embedded step.
    pub const ERROR: [f64; 4] = [
        4.184_760_482_319_162 - 3.907_010_534_671_193,
        -0.285_192_017_355_495_6 - 1.118_047_877_820_503_2,
        2.294_280_360_279_042 - 0.521_650_232_611_491,
        0.5,
    ];
}

/// A running solution and what a step needs; nothing is allocated once it stands.
#[derive(Debug)]
pub(super) struct Solver {
    pub time_s: f64,
    pub state: Vec<f64>,
    /// Rates at the state; there once [`Solver::look`] has been taken.
    pub rates: Vec<f64>,
    /// The look at the state.
    pub look: Look,
    /// The look whose slopes the matrix holds.
    slopes: Look,
    slopes_state: Vec<f64>,
    slopes_rates: Vec<f64>,
    matrix: Matrix,
    stage_look: Look,
    stage: Vec<f64>,
    stage_rates: Vec<f64>,
    increments: [Vec<f64>; 4],
    /// The state the last try reached.
    pub reached: Vec<f64>,
    /// Steps since the slopes were taken.
    age: usize,
    factored: f64,
    pub evaluations: usize,
    pub jacobians: usize,
}

/// How a try went.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Tried {
    /// Error against the tolerance: up to 1 is good.
    pub error: f64,
    /// Room with the largest error.
    pub room: usize,
}

/// Steps for which one set of slopes serves.
const SLOPES_SERVE: usize = 2;

impl Solver {
    pub(super) fn new(model: Model<'_>) -> Self {
        let state = model.building.start();
        let zeros = vec![0.0; state.len()];
        Self {
            time_s: 0.0,
            rates: zeros.clone(),
            look: Look::new(model),
            slopes: Look::new(model),
            slopes_state: zeros.clone(),
            slopes_rates: zeros.clone(),
            matrix: Matrix::new(model),
            stage_look: Look::new(model),
            stage: zeros.clone(),
            stage_rates: zeros.clone(),
            increments: std::array::from_fn(|_| zeros.clone()),
            reached: zeros,
            age: usize::MAX,
            factored: 0.0,
            evaluations: 0,
            jacobians: 0,
            state,
        }
    }

    /// Looks at the state: fills the rates.
    pub(super) fn look(&mut self, model: Model<'_>, controls: &Controls) {
        self.look.rates(model, controls, self.time_s, &self.state, false, &mut self.rates);
        self.evaluations += 1;
    }

    /// Makes the next try take new slopes.
    pub(super) fn forget_slopes(&mut self) {
        self.age = usize::MAX;
    }

    /// Tries one step from the state; [`Solver::look`] comes first.
    pub(super) fn attempt(
        &mut self,
        model: Model<'_>,
        controls: &Controls,
        step_s: f64,
        tolerance: f64,
    ) -> Tried {
        use coefficients::{ERROR, GAMMA, RIGHTS, STAGES, TIMES};
        if self.age >= SLOPES_SERVE {
            self.slopes_state.copy_from_slice(&self.state);
            self.slopes.rates(model, controls, self.time_s, &self.state, true, &mut self.slopes_rates);
            self.matrix.take(model, &self.slopes, &self.slopes_state, &self.slopes_rates);
            self.jacobians += 1;
            self.age = 0;
            self.factored = 0.0;
        }
        let d = 1.0 / (step_s * GAMMA);
        if self.factored != d {
            self.matrix.factor(model, &self.slopes, &self.slopes_state, d);
            self.factored = d;
        }
        for stage in 0..4 {
            let (before, rest) = self.increments.split_at_mut(stage);
            let increment = &mut rest[0];
            if stage == 0 {
                increment.copy_from_slice(&self.rates);
            } else {
                self.stage.copy_from_slice(&self.state);
                for (earlier, weight) in before.iter().zip(&STAGES[stage]) {
                    if *weight != 0.0 {
                        add(&mut self.stage, *weight, earlier);
                    }
                }
                self.stage_look.rates(
                    model,
                    controls,
                    self.time_s + TIMES[stage] * step_s,
                    &self.stage,
                    false,
                    &mut self.stage_rates,
                );
                self.evaluations += 1;
                increment.copy_from_slice(&self.stage_rates);
                for (earlier, weight) in before.iter().zip(&RIGHTS[stage]) {
                    add(increment, weight / step_s, earlier);
                }
            }
            self.matrix.solve(model, &self.slopes, &self.slopes_state, increment);
        }
        self.reached.copy_from_slice(&self.stage);
        add(&mut self.reached, 1.0, &self.increments[3]);
        // The error takes the place of the last stage: it is not needed any more.
        let [one, two, three, four] = &mut self.increments;
        four.iter_mut().for_each(|value| *value *= ERROR[3]);
        for (earlier, weight) in [(one, ERROR[0]), (two, ERROR[1]), (three, ERROR[2])] {
            add(four, weight, earlier);
        }
        measure(model.building, &self.state, &self.reached, four, tolerance)
    }

    /// Takes the step that was tried.
    pub(super) fn accept(&mut self, time_s: f64) {
        self.time_s = time_s;
        std::mem::swap(&mut self.state, &mut self.reached);
        self.age = self.age.saturating_add(1);
    }

    /// Goes back to what [`Solver::accept`] left.
    pub(super) fn go_back(&mut self, time_s: f64) {
        self.time_s = time_s;
        std::mem::swap(&mut self.state, &mut self.reached);
        self.age = usize::MAX;
    }
}

/// `target += weight · from`.
#[inline]
fn add(target: &mut [f64], weight: f64, from: &[f64]) {
    for (value, more) in target.iter_mut().zip(from) {
        *value += weight * more;
    }
}

/// Error of a step against the tolerance: the worst room, each by the mean square of its numbers, so that a
/// fire in one of many rooms is not averaged away.
fn measure(building: &Building, from: &[f64], to: &[f64], error: &[f64], tolerance: f64) -> Tried {
    let layout = &building.layout;
    let mut worst = Tried { error: 0.0, room: 0 };
    for (index, room) in building.rooms.iter().enumerate() {
        let at = layout.pressure(index);
        let volume = room.volume_m3;
        let mut sum = 0.0;
        let mut count = 0_u32;
        let mut add = |at: usize, scale: f64| {
            let size = from[at].abs().max(to[at].abs());
            let part = error[at] / (tolerance * (scale + size));
            sum += part * part;
            count += 1;
        };
        add(at, 10.0);
        add(at + 1, 0.1 * volume);
        add(at + 2, 0.1 * room.air_kg);
        add(at + 3, 0.1 * room.air_kg);
        for species in 0..2 * layout.species {
            add(at + 4 + species, 0.01 * room.air_kg);
        }
        for face in 0..SURFACES {
            if room.chains[face].is_some() {
                add(room.nodes[face], 100.0);
            }
        }
        let of_room = (sum / f64::from(count)).sqrt();
        if of_room > worst.error {
            worst = Tried { error: of_room, room: index };
        }
        // A layer of less than nothing is no solution.
        let least = -1e-3 * room.air_kg;
        let bad = to[at + 2] < least
            || to[at + 3] < least
            || to[at + 1] < -1e-2 * volume
            || to[at + 1] > volume * (1.0 + 1e-2)
            || building.ambient.pressure_pa + to[at] <= 0.0;
        if bad || !of_room.is_finite() {
            return Tried { error: f64::INFINITY, room: index };
        }
    }
    worst
}

#[cfg(test)]
mod tests {
    use super::coefficients::{ERROR, GAMMA, RIGHTS, STAGES, TIMES};
    use approx::assert_abs_diff_eq;

    type Square = [[f64; 4]; 4];

    /// The method in its usual form: sums `a`, matrix `g` with the implicit part, weights `b` and embedded `e`.
    fn usual_form() -> (Square, Square, [f64; 4], [f64; 4]) {
        // c = 1/γ - G⁻¹, stages = a G⁻¹: so G⁻¹ from c, then G by forward substitution.
        let mut inverse = [[0.0; 4]; 4];
        for row in 0..4 {
            inverse[row][row] = 1.0 / GAMMA;
            for column in 0..row {
                inverse[row][column] = -RIGHTS[row][column];
            }
        }
        let mut g = [[0.0; 4]; 4];
        for column in 0..4 {
            for row in column..4 {
                let unit = if row == column { 1.0 } else { 0.0 };
                let sum: f64 = (column..row).map(|k| inverse[row][k] * g[k][column]).sum();
                g[row][column] = (unit - sum) / inverse[row][row];
            }
        }
        let through = |weights: [f64; 4]| -> [f64; 4] {
            std::array::from_fn(|column| (0..4).map(|k| weights[k] * g[k][column]).sum())
        };
        let a = std::array::from_fn(|row| {
            let stage = STAGES[row];
            through([stage[0], stage[1], stage[2], 0.0])
        });
        let last = STAGES[3];
        let b = through([last[0], last[1], last[2], 1.0]);
        let less = through(ERROR);
        (a, g, b, std::array::from_fn(|k| b[k] - less[k]))
    }

    #[test]
    fn the_coefficients_meet_the_conditions_of_third_order_with_any_matrix() {
        let (a, g, b, embedded) = usual_form();
        let sums = |matrix: &[[f64; 4]; 4]| -> [f64; 4] { matrix.map(|row| row.iter().sum()) };
        let (at, of) = (sums(&a), sums(&g));
        let dot = |weights: &[f64; 4], values: &[f64; 4]| -> f64 {
            weights.iter().zip(values).map(|(w, v)| w * v).sum()
        };
        let times = |matrix: &[[f64; 4]; 4], values: &[f64; 4]| matrix.map(|row| dot(&row, values));

        // Conditions as Hairer and Wanner, Solving ODE II, chapter IV.7, print them for W-methods; from memory.
        assert_abs_diff_eq!(b.iter().sum::<f64>(), 1.0, epsilon = 1e-13);
        assert_abs_diff_eq!(dot(&b, &at), 0.5, epsilon = 1e-13);
        assert_abs_diff_eq!(dot(&b, &of), 0.0, epsilon = 1e-13);
        assert_abs_diff_eq!(dot(&b, &at.map(|x| x * x)), 1.0 / 3.0, epsilon = 1e-13);
        assert_abs_diff_eq!(dot(&b, &times(&a, &at)), 1.0 / 6.0, epsilon = 1e-13);
        assert_abs_diff_eq!(dot(&b, &times(&a, &of)), 0.0, epsilon = 1e-13);
        assert_abs_diff_eq!(dot(&b, &times(&g, &at)), 0.0, epsilon = 1e-13);
        assert_abs_diff_eq!(dot(&b, &times(&g, &of)), 0.0, epsilon = 1e-13);
        // The embedded method: second order.
        assert_abs_diff_eq!(embedded.iter().sum::<f64>(), 1.0, epsilon = 1e-13);
        assert_abs_diff_eq!(dot(&embedded, &at), 0.5, epsilon = 1e-13);
        assert_abs_diff_eq!(dot(&embedded, &of), 0.0, epsilon = 1e-13);
        // Stages stand where they say; the last stage is the step.
        for (got, said) in at.iter().zip(TIMES) {
            assert_abs_diff_eq!(*got, said, epsilon = 1e-13);
        }
    }
}
