//! Spans of time as people say them.

/// "about 5 minutes": tens of seconds up to a minute and a half, then whole minutes, then fives,
/// then half hours. Coarser as it grows: nobody can tell 41 minutes from 42 beforehand.
pub fn about(span_s: f64) -> String {
    let minutes = span_s / 60.0;
    if span_s < 10.0 {
        "a few seconds".to_owned()
    } else if span_s < 85.0 {
        format!("about {:.0} seconds", (span_s / 10.0).round() * 10.0)
    } else if minutes < 1.75 {
        "about a minute and a half".to_owned()
    } else if minutes < 30.0 {
        format!("about {:.0} minutes", minutes.round())
    } else if minutes < 57.5 {
        format!("about {:.0} minutes", (minutes / 5.0).round() * 5.0)
    } else if minutes < 75.0 {
        "about an hour".to_owned()
    } else if minutes < 105.0 {
        "about an hour and a half".to_owned()
    } else {
        format!("about {:.0} hours", (minutes / 60.0).round())
    }
}

/// Minutes and seconds for a table: `5:12`.
pub fn clock(span_s: f64) -> String {
    if !span_s.is_finite() {
        return "-".to_owned();
    }
    let seconds = span_s.round();
    format!("{:.0}:{:02.0}", (seconds / 60.0).trunc(), seconds % 60.0)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_span_is_told_as_people_tell_it() {
        for (span_s, expected) in [
            (4.0, "a few seconds"),
            (48.0, "about 50 seconds"),
            (84.0, "about 80 seconds"),
            (90.0, "about a minute and a half"),
            (120.0, "about 2 minutes"),
            (312.0, "about 5 minutes"),
            (352.0, "about 6 minutes"),
            (1790.0, "about 30 minutes"),
            (2500.0, "about 40 minutes"),
            (3500.0, "about an hour"),
            (5400.0, "about an hour and a half"),
            (7200.0, "about 2 hours"),
        ] {
            assert_eq!(about(span_s), expected, "{span_s} s");
        }
    }

    #[test]
    fn a_table_counts_minutes_and_seconds() {
        for (span_s, expected) in [(0.0, "0:00"), (312.4, "5:12"), (59.6, "1:00"), (3725.0, "62:05")] {
            assert_eq!(clock(span_s), expected);
        }
        assert_eq!(clock(f64::NAN), "-");
    }
}
