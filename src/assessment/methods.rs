//! The methods that figures name, and how a figure is made.

use std::collections::{BTreeMap, HashMap};
use std::sync::LazyLock;

use super::findings::{Figure, MethodUsed, Provenance};
use crate::domain::assumptions::Scenario;
use crate::fire::{Exceeded, methods, sources};

/// The citations of every method in one line, in the order of the registry.
static CITATIONS: LazyLock<Vec<String>> = LazyLock::new(|| {
    let line = |method: &methods::Method| {
        let citations: Vec<String> =
            method.sources.iter().map(|source| format!("{} ({})", source.citation, source.locator)).collect();
        citations.join("; ")
    };
    methods::ALL.iter().map(line).collect()
});

/// Every method once, by key.
static USABLE: LazyLock<HashMap<&'static str, (usize, MethodUsed)>> = LazyLock::new(|| {
    methods::ALL
        .iter()
        .zip(CITATIONS.iter())
        .enumerate()
        .map(|(place, (method, citations))| {
            let provenance = match method.provenance() {
                sources::Provenance::Seen => Provenance::Seen,
                sources::Provenance::Memory => Provenance::Memory,
            };
            let used =
                MethodUsed { key: method.key, title: method.title, source: citations.as_str(), provenance };
            (method.key, (place, used))
        })
        .collect()
});

/// A figure of a method; `recalled` says that an input of it rests on a recalled value.
pub(super) fn figure(
    method: &'static str,
    quantity: &'static str,
    value: f64,
    exceeded: &Exceeded,
    recalled: bool,
    scenario: Option<Scenario>,
) -> Figure {
    let by_memory = USABLE.get(method).is_none_or(|(_, used)| used.provenance == Provenance::Memory);
    Figure {
        method,
        quantity,
        value,
        in_range: exceeded.is_empty(),
        exceeded: exceeded.iter().collect(),
        unverified: by_memory || recalled,
        scenario,
    }
}

/// The methods that figures name, each once, in the order of the registry.
pub(super) fn used<'a>(figures: impl Iterator<Item = &'a Figure>) -> Vec<MethodUsed> {
    let mut found = BTreeMap::new();
    for figure in figures {
        if let Some((place, used)) = USABLE.get(figure.method) {
            found.entry(*place).or_insert(used);
        }
    }
    found.into_values().cloned().collect()
}

/// Methods that several rooms name, each once, in the order of the registry.
pub(super) fn union<'a>(methods: impl Iterator<Item = &'a MethodUsed>) -> Vec<MethodUsed> {
    let mut found = BTreeMap::new();
    for method in methods {
        if let Some((place, used)) = USABLE.get(method.key) {
            found.entry(*place).or_insert(used);
        }
    }
    found.into_values().cloned().collect()
}
