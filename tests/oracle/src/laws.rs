//! The laws of a network in the form the second solver takes.

use std::cell::{Cell, RefCell};
use std::time::Duration;

use diffsol::{
    ConstantOp, Matrix, NonLinearOp, NonLinearOpJacobian, OdeEquations, OdeEquationsRef, Op, UnitCallable,
    Vector,
};

use diffsol::matrix::sparsity::MatrixSparsity;

use crate::clock::cpu_time;
use crate::fire::two_zone::RightSide;
use crate::structure::Structure;

/// What moves over a stretch: the laws, where it starts, room to work.
pub struct Laws<'a, M: Matrix<T = f64>> {
    right: RefCell<&'a mut RightSide<'a>>,
    structure: &'a Structure,
    /// The whole state at the start of the stretch; its sums stay as they are.
    start: Vec<f64>,
    work: RefCell<Work>,
    /// Time spent on slopes.
    pub slopes_time: Cell<Duration>,
    ctx: M::C,
}

struct Work {
    state: Vec<f64>,
    rates: Vec<f64>,
    moved: Vec<f64>,
    column: Vec<f64>,
}

impl<'a, M: Matrix<T = f64>> Laws<'a, M> {
    pub fn new(right: &'a mut RightSide<'a>, structure: &'a Structure, start: Vec<f64>) -> Self {
        let zeros = vec![0.0; start.len()];
        let work = Work {
            state: start.clone(),
            rates: zeros.clone(),
            moved: zeros,
            column: vec![0.0; structure.len],
        };
        Self {
            right: RefCell::new(right),
            structure,
            start,
            work: RefCell::new(work),
            slopes_time: Cell::new(Duration::ZERO),
            ctx: M::C::default(),
        }
    }
}

macro_rules! op {
    ($($name:ty),*) => {$(
        impl<M: Matrix<T = f64>> Op for $name {
            type T = f64;
            type V = M::V;
            type M = M;
            type C = M::C;
            fn context(&self) -> &M::C { self.laws().ctx_of() }
            fn nstates(&self) -> usize { self.laws().structure.len }
            fn nout(&self) -> usize { self.laws().structure.len }
            fn nparams(&self) -> usize { 0 }
        }
    )*};
}

/// The rates.
pub struct Rates<'b, 'a, M: Matrix<T = f64>>(&'b Laws<'a, M>);
/// The start.
pub struct Start<'b, 'a, M: Matrix<T = f64>>(&'b Laws<'a, M>);

impl<'a, M: Matrix<T = f64>> Laws<'a, M> {
    fn laws(&self) -> &Self {
        self
    }
    fn ctx_of(&self) -> &M::C {
        &self.ctx
    }
}
impl<'a, M: Matrix<T = f64>> Rates<'_, 'a, M> {
    fn laws(&self) -> &Laws<'a, M> {
        self.0
    }
}
impl<'a, M: Matrix<T = f64>> Start<'_, 'a, M> {
    fn laws(&self) -> &Laws<'a, M> {
        self.0
    }
}

op!(Laws<'_, M>, Rates<'_, '_, M>, Start<'_, '_, M>);

impl<M: Matrix<T = f64>> ConstantOp for Start<'_, '_, M> {
    fn call_inplace(&self, _t: f64, y: &mut M::V) {
        let laws = self.0;
        y.copy_from(&M::V::from_slice(&laws.start[..laws.structure.len], laws.ctx.clone()));
    }
}

impl<M: Matrix<T = f64>> NonLinearOp for Rates<'_, '_, M> {
    fn call_inplace(&self, x: &M::V, t: f64, y: &mut M::V) {
        let laws = self.0;
        let len = laws.structure.len;
        let work = &mut *laws.work.borrow_mut();
        let mut right = laws.right.borrow_mut();
        y.for_each_batch_host([x], |y, [x], _| {
            work.state[..len].copy_from_slice(x);
            right.rates(t, &work.state, &mut work.rates);
            y.copy_from_slice(&work.rates[..len]);
        });
    }
}

impl<M: Matrix<T = f64>> NonLinearOpJacobian for Rates<'_, '_, M> {
    fn jac_mul_inplace(&self, x: &M::V, t: f64, v: &M::V, y: &mut M::V) {
        let laws = self.0;
        let len = laws.structure.len;
        let work = &mut *laws.work.borrow_mut();
        let mut right = laws.right.borrow_mut();
        y.for_each_batch_host([x, v], |y, [x, v], _| {
            work.state[..len].copy_from_slice(x);
            right.rates(t, &work.state, &mut work.rates);
            let size = v.iter().zip(&laws.structure.scale).fold(0.0_f64, |m, (v, s)| m.max((v / s).abs()));
            let step = if size > 0.0 { 1e-7 / size } else { 1.0 };
            for at in 0..len {
                work.state[at] += step * v[at];
            }
            right.rates(t, &work.state, &mut work.moved);
            for at in 0..len {
                y[at] = (work.moved[at] - work.rates[at]) / step;
            }
        });
    }

    fn jacobian_sparsity(&self) -> Option<M::Sparsity> {
        let structure = self.0.structure;
        let places = structure
            .rows
            .iter()
            .enumerate()
            .flat_map(|(column, rows)| rows.iter().map(move |&row| (row, column)))
            .collect();
        M::is_sparse().then(|| {
            M::Sparsity::try_from_indices(structure.len, structure.len, places).expect("places lie within")
        })
    }

    /// By differences, numbers that share no rate moved together.
    fn jacobian_inplace(&self, x: &M::V, t: f64, y: &mut M) {
        let begun = cpu_time();
        let laws = self.0;
        let structure = laws.structure;
        let len = structure.len;
        let work = &mut *laws.work.borrow_mut();
        let mut right = laws.right.borrow_mut();
        work.state[..len].copy_from_slice(&x.clone_as_vec());
        right.rates(t, &work.state, &mut work.rates);
        for group in &structure.groups {
            let step = |at: usize, state: &[f64]| 1e-7 * structure.scale[at].max(state[at].abs());
            for &at in group {
                let by = step(at, &work.state);
                work.state[at] += by;
            }
            right.rates(t, &work.state, &mut work.moved);
            work.state[..len].copy_from_slice(&x.clone_as_vec());
            for &at in group {
                let by = (work.state[at] + step(at, &work.state)) - work.state[at];
                work.column.fill(0.0);
                for &row in &structure.rows[at] {
                    work.column[row] = (work.moved[row] - work.rates[row]) / by;
                }
                y.set_column(at, &M::V::from_slice(&work.column, laws.ctx.clone()));
            }
        }
        laws.slopes_time.set(laws.slopes_time.get() + (cpu_time() - begun));
    }
}

impl<'b, 'a, M: Matrix<T = f64>> OdeEquationsRef<'b> for Laws<'a, M> {
    type Mass = UnitCallable<M>;
    type Rhs = Rates<'b, 'a, M>;
    type Root = UnitCallable<M>;
    type Init = Start<'b, 'a, M>;
    type Out = UnitCallable<M>;
    type Reset = UnitCallable<M>;
}

impl<'a, M: Matrix<T = f64>> OdeEquations for Laws<'a, M> {
    fn rhs(&self) -> Rates<'_, 'a, M> {
        Rates(self)
    }
    fn mass(&self) -> Option<UnitCallable<M>> {
        None
    }
    fn init(&self) -> Start<'_, 'a, M> {
        Start(self)
    }
    fn set_params(&mut self, _p: &M::V) {}
    fn get_params(&self, _p: &mut M::V) {}
}
