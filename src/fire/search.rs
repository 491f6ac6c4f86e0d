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
