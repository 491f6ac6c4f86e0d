//! Which key a misspelt or half-remembered name was meant to be.

/// Keys are at most this long, and so is every name worth comparing with them. It also
/// bounds the work that a hostile name can cause.
const LONGEST_NAME: usize = 64;

/// Likeness, by Jaro and Winkler, below which a key is no help. Ours: tried on plausible slips.
const LEAST_LIKENESS: f64 = 0.78;

/// The key nearest to `name`: one that holds it as a whole word, else the most alike.
pub(super) fn nearest<'a>(keys: Vec<&'a str>, name: &str) -> Option<&'a str> {
    if name.is_empty() || name.chars().count() > LONGEST_NAME {
        return None;
    }
    let wanted: String = name
        .trim()
        .chars()
        .map(|c| if c.is_ascii_alphanumeric() { c.to_ascii_lowercase() } else { '_' })
        .collect();

    // Files put the usual rows first, so the first that holds the word is the likeliest.
    if let Some(key) = keys.iter().find(|key| key.split('_').any(|word| word == wanted)) {
        return Some(key);
    }
    keys.into_iter()
        .map(|key| (strsim::jaro_winkler(key, &wanted), key))
        .filter(|(likeness, _)| *likeness >= LEAST_LIKENESS)
        .max_by(|(a, _), (b, _)| a.total_cmp(b))
        .map(|(_, key)| key)
}
