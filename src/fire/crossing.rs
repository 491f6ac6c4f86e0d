//! Where a straight line between two samples passes a limit.

/// Shares of the way from `from` to `to` between which the line lies above `limit`; none where it never does.
///
/// What is not a number is never above anything.
pub(super) fn span_above(from: f64, to: f64, limit: f64) -> Option<(f64, f64)> {
    let passes = || (limit - from) / (to - from);
    match (from > limit, to > limit) {
        (true, true) => Some((0.0, 1.0)),
        (true, false) => Some((0.0, passes())),
        (false, true) => Some((passes(), 1.0)),
        (false, false) => None,
    }
}

/// Share of the way after which the line first lies above `limit`.
pub(super) fn share_above(from: f64, to: f64, limit: f64) -> Option<f64> {
    span_above(from, to, limit).map(|(start, _)| start)
}

/// Share of the way at which the line passes `limit`, upwards or downwards; none where it stays on one side.
pub(super) fn share_passing(from: f64, to: f64, limit: f64) -> Option<f64> {
    ((from > limit) != (to > limit)).then(|| (limit - from) / (to - from))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_share_is_that_of_a_straight_line() {
        // By hand: from 20 to 100, 60 lies half way.
        assert_eq!(share_above(20.0, 100.0, 60.0), Some(0.5));
        assert_eq!(share_passing(100.0, 20.0, 60.0), Some(0.5));
        assert_eq!(span_above(100.0, 20.0, 60.0), Some((0.0, 0.5)));
        assert_eq!(span_above(20.0, 100.0, 60.0), Some((0.5, 1.0)));
        assert_eq!(span_above(70.0, 100.0, 60.0), Some((0.0, 1.0)));
    }

    #[test]
    fn at_the_limit_is_not_above_it() {
        assert_eq!(share_above(20.0, 60.0, 60.0), None);
        assert_eq!(share_above(60.0, 61.0, 60.0), Some(0.0));
        assert_eq!(share_above(61.0, 20.0, 60.0), Some(0.0));
        assert_eq!(share_passing(61.0, 62.0, 60.0), None);
    }

    #[test]
    fn what_is_not_a_number_passes_nothing() {
        assert_eq!(share_above(f64::NAN, f64::NAN, 60.0), None);
        assert_eq!(share_passing(f64::NAN, f64::NAN, 60.0), None);
    }
}
