//! What `--version` prints: three numbers that rise apart from each other.

use std::fmt::Write as _;

/// Build, schema of the stored documents, engine, rating rule, catalogue.
pub fn text() -> String {
    let mut text = String::new();
    for (what, number) in [
        ("build", env!("CARGO_PKG_VERSION").to_owned()),
        ("schema", crate::wire::stored::SCHEMA.to_string()),
        ("engine", crate::assessment::ENGINE_VERSION.to_owned()),
        ("rating rule", crate::assessment::RATING_RULE.to_string()),
        ("catalogue", crate::catalogue::Catalogue::embedded().digest().to_owned()),
    ] {
        writeln!(text, "{what:<12} {number}").expect("a String takes all text");
    }
    format!("sootline\n{text}")
}
