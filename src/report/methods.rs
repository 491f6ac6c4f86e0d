//! Every method, as `GET /v1/methods` prints it.

use std::sync::OnceLock;

use serde::Serialize;
use utoipa::ToSchema;

use crate::assessment::findings::Provenance;
use crate::fire::methods::{self, Method};
use crate::fire::sources::{self, Source};

use super::words::ProvenanceWord;

/// A publication that a method rests on.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Serialize, ToSchema)]
pub struct MethodSource {
    /// Stable word for programs.
    pub key: &'static str,
    /// Author, title, place and year.
    pub citation: &'static str,
    /// What was taken from it, and how much of it was seen.
    pub locator: &'static str,
    /// Whether it was read or recalled.
    pub provenance: ProvenanceWord,
}

/// A method.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, ToSchema)]
#[schema(as = Method)]
pub struct MethodEntry {
    /// Key, as in the figures of a report. Never changes.
    pub key: &'static str,
    /// What it gives, by whom.
    pub title: &'static str,
    /// The equation in words and plain letters.
    pub equation: &'static str,
    /// The quantity it gives.
    pub quantity: &'static str,
    /// The unit of that.
    pub unit: &'static str,
    /// What it rests on.
    pub sources: Vec<MethodSource>,
    /// Recalled where any of its sources is.
    pub provenance: ProvenanceWord,
    /// Its published range, one limit each.
    pub range: &'static [&'static str],
    /// What it was compared with, and how it did.
    pub validation: &'static str,
}

/// The answer of `GET /v1/methods`.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, ToSchema)]
pub struct Methods {
    /// Every method.
    pub items: Vec<MethodEntry>,
    /// Always null: the list is short and comes whole.
    #[schema(required)]
    pub next: Option<String>,
    /// Always null.
    #[schema(required)]
    pub next_cursor: Option<String>,
}

/// Every method, in the order of reports.
pub fn methods_document() -> &'static Methods {
    static DOCUMENT: OnceLock<Methods> = OnceLock::new();
    DOCUMENT.get_or_init(|| Methods {
        items: methods::ALL.iter().map(entry).collect(),
        next: None,
        next_cursor: None,
    })
}

fn entry(method: &Method) -> MethodEntry {
    MethodEntry {
        key: method.key,
        title: method.title,
        equation: method.equation,
        quantity: method.quantity,
        unit: method.unit,
        sources: method.sources.iter().map(|source| cited(source)).collect(),
        provenance: provenance(method.provenance()),
        range: method.range,
        validation: method.validation,
    }
}

fn cited(source: &Source) -> MethodSource {
    MethodSource {
        key: source.key,
        citation: source.citation,
        locator: source.locator,
        provenance: provenance(source.provenance),
    }
}

fn provenance(of: sources::Provenance) -> ProvenanceWord {
    match of {
        sources::Provenance::Seen => Provenance::Seen.into(),
        sources::Provenance::Memory => Provenance::Memory.into(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_method_says_what_it_is_where_it_comes_from_and_how_it_did() {
        let document = methods_document();

        assert_eq!(document.items.len(), methods::ALL.len());
        for method in &document.items {
            for text in [method.title, method.equation, method.quantity, method.unit, method.validation] {
                assert!(!text.is_empty(), "{}", method.key);
            }
            assert!(!method.sources.is_empty(), "{}", method.key);
            assert!(!method.range.is_empty(), "{}", method.key);
        }
    }

    #[test]
    fn a_method_with_a_recalled_source_is_recalled() {
        let recalled = Provenance::Memory.into();
        for method in &methods_document().items {
            let any = method.sources.iter().any(|source| source.provenance == recalled);
            assert_eq!(method.provenance == recalled, any, "{}", method.key);
        }
    }
}
