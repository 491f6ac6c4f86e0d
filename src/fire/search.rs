//! Bisection with a bounded number of steps, shared by the searches for a time.

use super::NotConverged;

/// Where a condition that stays true once it is true becomes true, between `from` and `to`.
///
/// The caller has checked that it is false at `from` and true at `to`. 64 halvings pass any
/// `f64` interval, so this ends; it fails only where an end is not finite.
pub(super) fn first_time_s(
    what: &'static str,
    mut from_s: f64,
    mut to_s: f64,
    mut reached: impl FnMut(f64) -> bool,
) -> Result<f64, NotConverged> {
    /// A hundredth of a second: far below the scatter of any correlation.
    const TOLERANCE_S: f64 = 0.01;
    const MAX_STEPS: u32 = 64;

    if !(from_s.is_finite() && to_s.is_finite()) {
        return Err(NotConverged { what, after: 0 });
    }
    for _ in 0..MAX_STEPS {
        if to_s - from_s <= TOLERANCE_S {
            return Ok(to_s);
        }
        let middle_s = 0.5 * (from_s + to_s);
        if reached(middle_s) {
            to_s = middle_s;
        } else {
            from_s = middle_s;
        }
    }
    // An interval so long that its ends are further apart than the tolerance in the last bit.
    if to_s - from_s <= 1e-9 * to_s { Ok(to_s) } else { Err(NotConverged { what, after: MAX_STEPS }) }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_moment_is_found_to_a_hundredth_of_a_second() {
        for moment_s in [0.3, 17.0, 5000.0, 7.2e6] {
            let found_s = first_time_s("test", 0.0, 1e7, |time_s| time_s >= moment_s).unwrap();

            assert!((0.0..=0.01).contains(&(found_s - moment_s)), "{moment_s} {found_s}");
        }
    }

    #[test]
    fn an_end_that_is_not_finite_is_told_and_not_looped_over() {
        let answer = first_time_s("test", 0.0, f64::INFINITY, |_| true);

        assert_eq!(answer, Err(NotConverged { what: "test", after: 0 }));
    }
}
