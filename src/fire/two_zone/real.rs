//! Numbers that may carry their derivatives.
//!
//! The laws of a room and of a vent are written once over [`Real`]. With `f64` they give the rates
//! of change; with [`Dual`] the same code gives the rates and their exact derivatives, from which
//! the solver builds its matrix.

use std::ops::{Add, Div, Mul, Neg, Sub};

/// A number, with or without derivatives.
pub(super) trait Real:
    Copy
    + Add<Output = Self>
    + Sub<Output = Self>
    + Mul<Output = Self>
    + Div<Output = Self>
    + Neg<Output = Self>
    + Add<f64, Output = Self>
    + Sub<f64, Output = Self>
    + Mul<f64, Output = Self>
    + Div<f64, Output = Self>
{
    /// A constant.
    fn constant(value: f64) -> Self;
    /// The number itself.
    fn value(self) -> f64;
    /// The variable of a direction.
    fn variable(value: f64, direction: usize) -> Self;
    /// Derivatives along the first directions; none without derivatives.
    fn slopes<const N: usize>(self) -> [f64; N];
    /// A function of this number, by its value and its derivative there.
    fn chain(self, value: f64, derivative: f64) -> Self;

    /// Square root, of zero for what is below it.
    #[inline]
    fn sqrt(self) -> Self {
        let root = self.value().max(0.0).sqrt();
        self.chain(root, if root > 0.0 { 0.5 / root } else { 0.0 })
    }

    /// Cube root of the size, with its sign.
    #[inline]
    fn cbrt(self) -> Self {
        let root = cube_root(self.value());
        self.chain(root, if root == 0.0 { 0.0 } else { 1.0 / (3.0 * root * root) })
    }

    /// A positive number to a power; zero for what is not above zero.
    #[inline]
    fn powf(self, exponent: f64) -> Self {
        let base = self.value();
        if base <= 0.0 {
            return Self::constant(0.0);
        }
        let power = base.powf(exponent);
        self.chain(power, exponent * power / base)
    }

    /// e to this power.
    #[inline]
    fn exp(self) -> Self {
        let power = self.value().exp();
        self.chain(power, power)
    }

    /// This times itself.
    #[inline]
    fn squared(self) -> Self {
        self * self
    }

    /// The size.
    #[inline]
    fn abs(self) -> Self {
        if self.value() < 0.0 { -self } else { self }
    }

    /// The larger of this and a bound.
    #[inline]
    fn at_least(self, bound: f64) -> Self {
        if self.value() < bound { Self::constant(bound) } else { self }
    }

    /// The smaller of this and a bound.
    #[inline]
    fn at_most(self, bound: f64) -> Self {
        if self.value() > bound { Self::constant(bound) } else { self }
    }

    /// The smaller of two.
    #[inline]
    fn min(self, other: Self) -> Self {
        if other.value() < self.value() { other } else { self }
    }

    /// The larger of two.
    #[inline]
    fn max(self, other: Self) -> Self {
        if other.value() > self.value() { other } else { self }
    }

    /// 0 below `from`, 1 above `to`, a smooth curve (3x² - 2x³) between. A sharp switch makes the
    /// solver chatter.
    #[inline]
    fn smooth_step(self, from: f64, to: f64) -> Self {
        let x = ((self.value() - from) / (to - from)).clamp(0.0, 1.0);
        self.chain(x * x * (3.0 - 2.0 * x), 6.0 * x * (1.0 - x) / (to - from))
    }
}

/// Cube root to rounding, several times faster than the library's, and the same on every machine.
///
/// A first guess from the exponent, then Halley's rule, which triples the digits each time.
#[inline]
pub(super) fn cube_root(value: f64) -> f64 {
    let size = value.abs();
    if !(size > 1e-300 && size < f64::INFINITY) {
        return if size <= 1e-300 { 0.0 } else { value };
    }
    let mut root = f64::from_bits(size.to_bits() / 3 + 0x2A9F_7893_782D_A1CE);
    for _ in 0..3 {
        let cube = root * root * root;
        root *= (cube + 2.0 * size) / (2.0 * cube + size);
    }
    if value < 0.0 { -root } else { root }
}

impl Real for f64 {
    #[inline]
    fn constant(value: f64) -> Self {
        value
    }

    #[inline]
    fn value(self) -> f64 {
        self
    }

    #[inline]
    fn variable(value: f64, _direction: usize) -> Self {
        value
    }

    #[inline]
    fn slopes<const N: usize>(self) -> [f64; N] {
        [0.0; N]
    }

    #[inline]
    fn chain(self, value: f64, _derivative: f64) -> Self {
        value
    }
}

/// A number with its derivatives along `N` directions.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Dual<const N: usize> {
    /// The number.
    pub value: f64,
    /// Its derivatives.
    pub along: [f64; N],
}

impl<const N: usize> Dual<N> {
    #[inline]
    fn map(self, value: f64, factor: f64) -> Self {
        let mut along = self.along;
        for slope in &mut along {
            *slope *= factor;
        }
        Self { value, along }
    }

    #[inline]
    fn combine(self, other: Self, value: f64, mine: f64, theirs: f64) -> Self {
        let mut along = [0.0; N];
        for (index, slope) in along.iter_mut().enumerate() {
            *slope = self.along[index] * mine + other.along[index] * theirs;
        }
        Self { value, along }
    }
}

impl<const N: usize> Real for Dual<N> {
    #[inline]
    fn constant(value: f64) -> Self {
        Self { value, along: [0.0; N] }
    }

    #[inline]
    fn value(self) -> f64 {
        self.value
    }

    #[inline]
    fn variable(value: f64, direction: usize) -> Self {
        let mut along = [0.0; N];
        along[direction] = 1.0;
        Self { value, along }
    }

    #[inline]
    fn slopes<const M: usize>(self) -> [f64; M] {
        let mut slopes = [0.0; M];
        slopes.copy_from_slice(&self.along[..M]);
        slopes
    }

    #[inline]
    fn chain(self, value: f64, derivative: f64) -> Self {
        self.map(value, derivative)
    }
}

impl<const N: usize> Add for Dual<N> {
    type Output = Self;
    #[inline]
    fn add(self, other: Self) -> Self {
        self.combine(other, self.value + other.value, 1.0, 1.0)
    }
}

impl<const N: usize> Sub for Dual<N> {
    type Output = Self;
    #[inline]
    fn sub(self, other: Self) -> Self {
        self.combine(other, self.value - other.value, 1.0, -1.0)
    }
}

impl<const N: usize> Mul for Dual<N> {
    type Output = Self;
    #[inline]
    fn mul(self, other: Self) -> Self {
        self.combine(other, self.value * other.value, other.value, self.value)
    }
}

impl<const N: usize> Div for Dual<N> {
    type Output = Self;
    #[inline]
    fn div(self, other: Self) -> Self {
        let inverse = 1.0 / other.value;
        let value = self.value * inverse;
        self.combine(other, value, inverse, -value * inverse)
    }
}

impl<const N: usize> Neg for Dual<N> {
    type Output = Self;
    #[inline]
    fn neg(self) -> Self {
        self.map(-self.value, -1.0)
    }
}

impl<const N: usize> Add<f64> for Dual<N> {
    type Output = Self;
    #[inline]
    fn add(self, other: f64) -> Self {
        Self { value: self.value + other, along: self.along }
    }
}

impl<const N: usize> Sub<f64> for Dual<N> {
    type Output = Self;
    #[inline]
    fn sub(self, other: f64) -> Self {
        Self { value: self.value - other, along: self.along }
    }
}

impl<const N: usize> Mul<f64> for Dual<N> {
    type Output = Self;
    #[inline]
    fn mul(self, other: f64) -> Self {
        self.map(self.value * other, other)
    }
}

impl<const N: usize> Div<f64> for Dual<N> {
    type Output = Self;
    #[inline]
    fn div(self, other: f64) -> Self {
        self.map(self.value / other, 1.0 / other)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    /// A made-up law that uses every operation.
    fn law<R: Real>(x: R, y: R) -> R {
        let a = (x * y + 1.0).sqrt() - x / y;
        let b = (x - y).cbrt() + x.powf(1.7) * 0.3 - 2.0;
        let c = (-(y / 3.0)).exp() * x.smooth_step(0.5, 4.0) + y.squared().at_most(90.0);
        a * b + c + (x - y).abs() + x.at_least(0.1).max(y * 0.2).min(x * 2.0)
    }

    #[test]
    fn duals_give_the_derivatives_that_differences_give() {
        for (x, y) in [(1.3, 2.9), (2.2, 0.7), (3.7, 3.1), (0.2, 5.0)] {
            let got = law(Dual::<2>::variable(x, 0), Dual::<2>::variable(y, 1));
            let step = 1e-6;

            assert_relative_eq!(got.value, law(x, y), max_relative = 1e-14);
            let dx = (law(x + step, y) - law(x - step, y)) / (2.0 * step);
            let dy = (law(x, y + step) - law(x, y - step)) / (2.0 * step);
            assert_relative_eq!(got.along[0], dx, max_relative = 1e-6, epsilon = 1e-8);
            assert_relative_eq!(got.along[1], dy, max_relative = 1e-6, epsilon = 1e-8);
        }
    }

    #[test]
    fn the_cube_root_is_the_librarys() {
        for exponent in -290..290 {
            for mantissa in [1.0, 1.7, 3.3, 7.9, 9.999] {
                let value = mantissa * 10_f64.powi(exponent);
                assert_relative_eq!(cube_root(value), value.cbrt(), max_relative = 1e-15);
                assert_relative_eq!(cube_root(-value), -value.cbrt(), max_relative = 1e-15);
            }
        }
        assert_eq!(cube_root(0.0), 0.0);
    }

    #[test]
    fn roots_and_powers_of_nothing_stay_finite() {
        let nothing = Dual::<1>::variable(0.0, 0);

        for dual in [nothing.sqrt(), nothing.cbrt(), nothing.powf(0.4)] {
            assert_eq!(dual.value, 0.0);
            assert!(dual.along[0].is_finite());
        }
    }
}
