//! Moments and days.

/// A moment in UTC, in microseconds since 1970; milliseconds on the wire.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Timestamp(pub i64);

/// A day of the calendar (`2026-11-03`).
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Day {
    /// Year, 1900 to 2200.
    pub year: i16,
    /// Month, 1 to 12.
    pub month: i8,
    /// Day of the month, 1 to 31.
    pub day: i8,
}
