//! Reading a report as a test does: its texts, its numbers.

use serde_json::Value;

/// Words that must not be used of a rating, nor anywhere near one.
const BANNED: [&str; 8] = ["safe", "safely", "no risk", "low risk", "clear", "pass", "passes", "green"];

/// The banned word that a text holds, as a whole word.
pub fn banned(text: &str) -> Option<&'static str> {
    let words: Vec<String> =
        text.to_lowercase().split(|c: char| !c.is_alphanumeric()).map(ToOwned::to_owned).collect();
    BANNED.into_iter().find(|banned| {
        let banned: Vec<&str> = banned.split(' ').collect();
        words.windows(banned.len()).any(|window| window == banned.as_slice())
    })
}

/// Every text of a document, with its path.
pub fn texts(value: &Value, path: &str, each: &mut impl FnMut(&str, &str)) {
    match value {
        Value::String(text) => each(path, text),
        Value::Array(list) => list.iter().for_each(|value| texts(value, path, each)),
        Value::Object(members) => {
            members.iter().for_each(|(name, value)| texts(value, &format!("{path}/{name}"), each));
        }
        _ => {}
    }
}

/// Significant digits of a finding, by the wire contract.
const DIGITS: usize = 4;

/// Members that echo what was given; nor is a count, or a version's number, a finding.
const ECHOED: [&str; 7] = [
    "/height_m",
    "/available_l_min",
    "/fractile",
    "/building_revision",
    "/assumptions/value",
    "/run_count",
    "/step_count",
];

/// Every number that has more digits than a finding may have, with its path.
pub fn not_rounded(value: &Value, path: &str, each: &mut impl FnMut(&str, f64)) {
    match value {
        Value::Number(number) => {
            let number = number.as_f64().unwrap();
            let rounded = format!("{number:.*e}", DIGITS - 1).parse::<f64>().unwrap();
            if number != rounded && !ECHOED.iter().any(|member| path.ends_with(member)) {
                each(path, number);
            }
        }
        Value::Array(list) => list.iter().for_each(|value| not_rounded(value, path, each)),
        Value::Object(members) => members
            .iter()
            .filter(|(name, _)| *name != "requested")
            .for_each(|(name, value)| not_rounded(value, &format!("{path}/{name}"), each)),
        _ => {}
    }
}
