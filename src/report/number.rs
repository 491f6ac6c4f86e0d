//! Numbers as a report prints them: findings rounded, inputs as they came.

use serde::{Serialize, Serializer};
use utoipa::ToSchema;

/// Significant digits of every finding. More would claim what no method here can know.
pub const SIGNIFICANT_DIGITS: usize = 4;

/// Whole numbers up to here are exact in a double, so they can be printed without a fraction.
const LARGEST_WHOLE: f64 = 9_007_199_254_740_992.0;

/// A computed number, rounded to 4 significant digits.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd, ToSchema)]
#[schema(value_type = f64)]
pub struct Number(f64);

impl Number {
    /// Rounds; none where the number is not finite, so that a report can only hold lawful JSON.
    #[must_use]
    pub fn of(value: f64) -> Option<Self> {
        value.is_finite().then(|| Self(rounded(value)))
    }

    /// The rounded number.
    #[must_use]
    pub fn get(self) -> f64 {
        self.0
    }
}

impl Serialize for Number {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        print(self.0, serializer)
    }
}

/// A number that was given, echoed exactly.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd, ToSchema)]
#[schema(value_type = f64)]
pub struct Exact(f64);

impl Exact {
    /// None where the number is not finite.
    #[must_use]
    pub fn of(value: f64) -> Option<Self> {
        value.is_finite().then_some(Self(value))
    }

    /// The number.
    #[must_use]
    pub fn get(self) -> f64 {
        self.0
    }
}

impl Serialize for Exact {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        print(self.0, serializer)
    }
}

/// Prints `312`, not `312.0`.
fn print<S: Serializer>(value: f64, serializer: S) -> Result<S::Ok, S::Error> {
    if value.fract() == 0.0 && value.abs() <= LARGEST_WHOLE {
        #[expect(clippy::cast_possible_truncation, reason = "whole and within 2^53")]
        serializer.serialize_i64(value as i64)
    } else {
        serializer.serialize_f64(value)
    }
}

/// The number with [`SIGNIFICANT_DIGITS`], through its decimal form: scaling by a power of ten
/// would leave binary dust (0.30000000000000004).
fn rounded(value: f64) -> f64 {
    format!("{value:.*e}", SIGNIFICANT_DIGITS - 1).parse().unwrap_or(value)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn printed(value: f64) -> String {
        serde_json::to_string(&Number::of(value)).unwrap()
    }

    #[test]
    fn a_finding_keeps_four_significant_digits() {
        for (value, expected) in [
            (1909.37, "1909"),
            (311.96, "312"),
            (0.000_123_456, "0.0001235"),
            (12_345_678.0, "12350000"),
            (-0.3, "-0.3"),
            (0.1 + 0.2, "0.3"),
            (0.0, "0"),
            (99_999.0, "100000"),
        ] {
            assert_eq!(printed(value), expected);
        }
    }

    #[test]
    fn what_is_not_finite_is_null_and_never_a_number() {
        for value in [f64::NAN, f64::INFINITY, f64::NEG_INFINITY] {
            assert_eq!(printed(value), "null");
        }
    }

    #[test]
    fn an_input_is_echoed_exactly() {
        for (value, expected) in [(0.0127, "0.0127"), (3.6576, "3.6576"), (123_456.0, "123456"), (0.1, "0.1")]
        {
            assert_eq!(serde_json::to_string(&Exact::of(value)).unwrap(), expected);
        }
    }
}
