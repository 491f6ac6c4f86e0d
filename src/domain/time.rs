//! Moments and days.

use std::fmt;

/// A moment in UTC, in microseconds since 1970; milliseconds on the wire.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Timestamp(pub i64);

impl Timestamp {
    /// Reads a moment of RFC 3339; one with another offset is brought to UTC.
    pub fn parse(text: &str) -> Option<Self> {
        let moment: jiff::Timestamp = text.parse().ok()?;
        Some(Self(moment.as_microsecond()))
    }
}

/// RFC 3339 in UTC with milliseconds and `Z`.
impl fmt::Display for Timestamp {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        // Beyond the calendar (years -9999 to 9999) the nearest moment is printed.
        let nearest = if self.0 < 0 { jiff::Timestamp::MIN } else { jiff::Timestamp::MAX };
        let moment = jiff::Timestamp::from_microsecond(self.0).unwrap_or(nearest);
        let civil = jiff::tz::TimeZone::UTC.to_datetime(moment);
        write!(
            f,
            "{:04}-{:02}-{:02}T{:02}:{:02}:{:02}.{:03}Z",
            civil.year(),
            civil.month(),
            civil.day(),
            civil.hour(),
            civil.minute(),
            civil.second(),
            civil.millisecond()
        )
    }
}

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

impl Day {
    /// The pattern of a day, as the OpenAPI document prints it.
    pub const PATTERN: &str = "^(19|20|21)[0-9]{2}-(0[1-9]|1[0-2])-(0[1-9]|[12][0-9]|3[01])$|^2200-(0[1-9]|1[0-2])-(0[1-9]|[12][0-9]|3[01])$";

    /// Checks the calendar.
    pub fn new(year: i16, month: i8, day: i8) -> Option<Self> {
        let in_range = (1900..=2200).contains(&year);
        (in_range && jiff::civil::Date::new(year, month, day).is_ok()).then_some(Self { year, month, day })
    }

    /// Reads `YYYY-MM-DD`.
    pub fn parse(text: &str) -> Option<Self> {
        let digits = |range| {
            let part: &str = text.get(range)?;
            part.bytes().all(|c| c.is_ascii_digit()).then(|| part.parse::<i16>().ok()).flatten()
        };
        let bytes = text.as_bytes();
        if bytes.len() != 10 || bytes.get(4) != Some(&b'-') || bytes.get(7) != Some(&b'-') {
            return None;
        }
        let (month, day) = (i8::try_from(digits(5..7)?).ok()?, i8::try_from(digits(8..10)?).ok()?);
        Self::new(digits(0..4)?, month, day)
    }
}

impl fmt::Display for Day {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{:04}-{:02}-{:02}", self.year, self.month, self.day)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_moment_is_printed_in_utc_with_milliseconds() {
        // By hand: 2026-12-01 is 20 788 days after 1970-01-01 (56 years with 14 leap days
        // make 20 454; January to November add 334).
        let moment = Timestamp(20_788 * 86_400_000_000 + 9 * 3_600_000_000 + 15 * 60_000_000 + 123_999);

        assert_eq!(moment.to_string(), "2026-12-01T09:15:00.123Z");
        assert_eq!(Timestamp::parse("2026-12-01T10:15:00.123999+01:00"), Some(moment));
        assert_eq!(Timestamp::parse("2026-12-01"), None);
    }

    #[test]
    fn a_moment_beyond_the_calendar_prints_without_panic() {
        assert!(Timestamp(i64::MAX).to_string().starts_with("9999-12-"));
        assert!(Timestamp(i64::MIN).to_string().ends_with('Z'));
    }

    #[test]
    fn a_day_must_stand_in_the_calendar() {
        for (text, lawful) in [
            ("2026-11-03", true),
            ("2024-02-29", true),
            ("2026-02-29", false),
            ("2026-11-31", false),
            ("1899-12-31", false),
            ("2026-1-03", false),
            ("2026-11-03 ", false),
            ("+026-11-03", false),
        ] {
            let day = Day::parse(text);
            assert_eq!(day.is_some(), lawful, "{text}");
            if let Some(day) = day {
                assert_eq!(day.to_string(), text);
            }
        }
    }
}
