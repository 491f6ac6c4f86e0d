//! Media types of requests and answers.

/// JSON.
pub const JSON: &str = "application/json";
/// A merge patch (RFC 7396).
pub const MERGE_PATCH: &str = "application/merge-patch+json";

/// Whether a Content-Type names this media type; parameters such as `charset` are ignored.
pub fn is(content_type: &str, media_type: &str) -> bool {
    let essence = content_type.split(';').next().unwrap_or_default().trim();
    essence.eq_ignore_ascii_case(media_type)
}

/// Whether Accept lines take `kind/sub`. The most specific range that matches decides, and a
/// quality of zero refuses (RFC 9110, section 12.5.1). No line at all takes everything.
pub fn accepts<'a>(lines: impl Iterator<Item = &'a str>, kind: &str, sub: &str) -> bool {
    let mut nothing_said = true;
    let mut best: Option<(u8, bool)> = None;
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
        let wanted = parts.all(|parameter| !is_zero_quality(parameter));
        // Of two ranges as specific as each other the one that takes it wins.
        best = best.max(Some((specific, wanted)));
    }
    nothing_said || best.is_some_and(|(_, wanted)| wanted)
}

fn is_zero_quality(parameter: &str) -> bool {
    parameter.split_once('=').is_some_and(|(name, value)| {
        name.trim().eq_ignore_ascii_case("q") && value.trim().parse::<f32>().is_ok_and(|q| q <= 0.0)
    })
}

#[cfg(test)]
mod tests {
    use super::{accepts, is};

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
    fn parameters_of_a_content_type_are_ignored() {
        assert!(is("application/json; charset=latin1", "application/json"));
        assert!(is("Application/JSON", "application/json"));
        assert!(!is("application/jsonp", "application/json"));
    }
}
