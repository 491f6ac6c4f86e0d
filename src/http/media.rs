//! Media types of requests and answers.

/// JSON.
pub const JSON: &str = "application/json";
/// A merge patch (RFC 7396).
pub const MERGE_PATCH: &str = "application/merge-patch+json";
/// A table (RFC 4180) whose first line names its columns.
pub const CSV: &str = "text/csv; charset=utf-8; header=present";

/// Whether a Content-Type names this media type; parameters such as `charset` are ignored.
pub fn is(content_type: &str, media_type: &str) -> bool {
    let essence = content_type.split(';').next().unwrap_or_default().trim();
    essence.eq_ignore_ascii_case(media_type)
}

/// Whether Accept lines take `kind/sub`.
pub fn accepts<'a>(lines: impl Iterator<Item = &'a str>, kind: &str, sub: &str) -> bool {
    quality(lines, kind, sub) > 0.0
}

/// How much Accept lines want `kind/sub`, from 0, not at all, to 1. The most specific range that
/// matches decides (RFC 9110, section 12.5.1). No line at all takes everything.
pub fn quality<'a>(lines: impl Iterator<Item = &'a str>, kind: &str, sub: &str) -> f32 {
    let mut nothing_said = true;
    let mut best: Option<(u8, f32)> = None;
    for range in lines.flat_map(|line| line.split(',')).map(str::trim).filter(|range| !range.is_empty()) {
        nothing_said = false;
        let mut parts = range.split(';').map(str::trim);
        let essence = parts.next().unwrap_or_default();
        let Some((range_kind, range_sub)) = essence.split_once('/') else { continue };
        let specific = match (range_kind.eq_ignore_ascii_case(kind), range_sub.eq_ignore_ascii_case(sub)) {
            (true, true) => 2,
            (true, false) if range_sub == "*" => 1,
            _ if range_kind == "*" && range_sub == "*" => 0,
            _ => continue,
        };
        let wanted = parts.find_map(quality_of).unwrap_or(1.0);
        // Of two ranges as specific as each other the one that wants it more wins.
        if best.is_none_or(|best| (specific, wanted) > best) {
            best = Some((specific, wanted));
        }
    }
    match best {
        Some((_, wanted)) => wanted,
        None => f32::from(u8::from(nothing_said)),
    }
}

/// The quality that a parameter states; one that cannot be read states none.
fn quality_of(parameter: &str) -> Option<f32> {
    let (name, value) = parameter.split_once('=')?;
    let quality = value.trim().parse::<f32>().ok().filter(|quality| quality.is_finite())?;
    name.trim().eq_ignore_ascii_case("q").then_some(quality.clamp(0.0, 1.0))
}

#[cfg(test)]
mod tests {
    use super::{accepts, is, quality};

    #[test]
    fn the_most_specific_range_decides() {
        for (accept, taken) in [
            ("", true),
            ("*/*", true),
            ("application/*", true),
            ("application/json", true),
            ("APPLICATION/JSON;charset=utf-8", true),
            ("text/html, application/json;q=0.1", true),
            ("text/html", false),
            ("text/html;q=1.0, */*;q=0.1", true),
            ("application/json;q=0, */*", false),
            ("application/*;q=0, application/json", true),
            ("*/*;q=0", false),
            ("application/problem+json", false),
            ("nonsense", false),
        ] {
            assert_eq!(accepts([accept].into_iter(), "application", "json"), taken, "{accept:?}");
        }
    }

    #[test]
    fn no_line_takes_everything() {
        assert!(accepts(std::iter::empty(), "application", "json"));
    }

    #[test]
    fn what_is_wanted_more_has_the_higher_quality() {
        let of = |accept: &str, kind, sub| quality([accept].into_iter(), kind, sub);
        for (accept, json, csv) in [
            ("", 1.0, 1.0),
            ("*/*", 1.0, 1.0),
            ("text/csv", 0.0, 1.0),
            ("application/json;q=0.5, text/csv", 0.5, 1.0),
            ("text/*;q=0.3, */*;q=0.2", 0.2, 0.3),
            ("text/csv;q=nonsense", 0.0, 1.0),
            ("text/csv;q=7", 0.0, 1.0),
            ("text/csv;q=NaN", 0.0, 1.0),
        ] {
            assert_eq!(of(accept, "application", "json"), json, "{accept}");
            assert_eq!(of(accept, "text", "csv"), csv, "{accept}");
        }
    }

    #[test]
    fn parameters_of_a_content_type_are_ignored() {
        assert!(is("application/json; charset=latin1", "application/json"));
        assert!(is("Application/JSON", "application/json"));
        assert!(!is("application/jsonp", "application/json"));
    }
}
