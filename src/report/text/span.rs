//! Spans of time as people say them.

/// "about 5 minutes": tens of seconds up to a minute and a quarter, half minutes up to five, then
/// whole minutes, then fives, then half hours. Coarser as it grows: nobody can tell 41 minutes from
/// 42 beforehand. What lies between two steps is told as the earlier one.
pub fn about(span_s: f64) -> String {
    let minutes = span_s / 60.0;
    if span_s < 10.0 {
        "a few seconds".to_owned()
    } else if span_s < 75.0 {
        format!("about {:.0} seconds", nearest(span_s, 10.0))
    } else if minutes < 4.75 {
        in_halves(nearest(minutes, 0.5), "minute")
    } else if minutes < 30.0 {
        format!("about {:.0} minutes", nearest(minutes, 1.0))
    } else if minutes < 57.5 {
        format!("about {:.0} minutes", nearest(minutes, 5.0))
    } else {
        in_halves(nearest(minutes / 60.0, 0.5), "hour")
    }
}

/// The nearest multiple of a step; of two the lesser.
fn nearest(value: f64, step: f64) -> f64 {
    (value / step - 0.5).ceil() * step
}

fn in_halves(count: f64, unit: &str) -> String {
    let article = if unit.starts_with('h') { "an" } else { "a" };
    let half = if count.fract() > 0.25 { " and a half" } else { "" };
    let whole = count.trunc();
    if whole <= 1.0 {
        format!("about {article} {unit}{half}")
    } else {
        format!("about {whole:.0}{half} {unit}s")
    }
}

/// For a table: minutes and seconds (`5:12`), from 100 minutes on hours and minutes (`1h45`).
pub fn clock(span_s: f64) -> String {
    if !span_s.is_finite() {
        return "-".to_owned();
    }
    let seconds = span_s.round();
    if seconds < 6000.0 {
        format!("{:.0}:{:02.0}", (seconds / 60.0).trunc(), seconds % 60.0)
    } else {
        let minutes = (span_s / 60.0).round();
        format!("{:.0}h{:02.0}", (minutes / 60.0).trunc(), minutes % 60.0)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_span_is_told_as_people_tell_it() {
        for (span_s, expected) in [
            (4.0, "a few seconds"),
            (48.0, "about 50 seconds"),
            (74.0, "about 70 seconds"),
            (90.0, "about a minute and a half"),
            (120.0, "about 2 minutes"),
            (150.0, "about 2 and a half minutes"),
            (165.0, "about 2 and a half minutes"),
            (206.0, "about 3 and a half minutes"),
            (312.0, "about 5 minutes"),
            (352.0, "about 6 minutes"),
            (1790.0, "about 30 minutes"),
            (2500.0, "about 40 minutes"),
            (330.0, "about 5 minutes"),
            (3500.0, "about an hour"),
            (5400.0, "about an hour and a half"),
            (7200.0, "about 2 hours"),
        ] {
            assert_eq!(about(span_s), expected, "{span_s} s");
        }
    }

    #[test]
    fn a_table_counts_minutes_and_seconds() {
        for (span_s, expected) in
            [(0.0, "0:00"), (312.4, "5:12"), (59.6, "1:00"), (3725.0, "62:05"), (6310.0, "1h45")]
        {
            assert_eq!(clock(span_s), expected);
        }
        assert_eq!(clock(f64::NAN), "-");
    }
}
