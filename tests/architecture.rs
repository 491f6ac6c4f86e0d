//! The arrows between the folders of `src`, kept by reading every `crate::` path.

use std::collections::{BTreeMap, BTreeSet};
use std::fs;
use std::path::{Path, PathBuf};

/// Who may use whom. A folder may always use itself; `fire::sources` alone is open to `report`.
const ARROWS: &[(&str, &[&str])] = &[
    ("main", &["cli"]),
    ("cli", &["http", "compute", "store", "report", "wire", "assessment", "catalogue", "domain", "config"]),
    ("http", &["compute", "store", "report", "wire", "assessment", "catalogue", "domain"]),
    ("report", &["wire", "assessment", "domain", "fire::sources", "fire::methods"]),
    ("store", &["wire", "assessment", "catalogue", "domain"]),
    ("wire", &["catalogue", "domain"]),
    ("compute", &["assessment"]),
    ("assessment", &["catalogue", "domain", "fire"]),
    ("catalogue", &["domain"]),
    ("domain", &[]),
    ("fire", &[]),
    ("config", &[]),
];

/// Crates that only some folders may name.
const KEPT_IN: &[(&str, &[&str])] = &[
    ("sqlx", &["store"]),
    ("axum", &["http", "cli"]),
    ("tower_http", &["http"]),
    ("utoipa_axum", &["http"]),
    ("utoipa", &["http", "wire", "report", "cli"]),
    ("serde_json", &["http", "wire", "report", "catalogue", "cli", "store"]),
    ("serde", &["http", "wire", "report", "catalogue", "cli"]),
    ("tracing", &["http", "cli", "store", "compute"]),
    ("clap", &["cli", "config"]),
];

fn sources() -> Vec<(String, PathBuf, String)> {
    fn walk(folder: &Path, found: &mut Vec<PathBuf>) {
        for entry in fs::read_dir(folder).unwrap() {
            let path = entry.unwrap().path();
            if path.is_dir() {
                walk(&path, found);
            } else if path.extension().is_some_and(|ending| ending == "rs") {
                found.push(path);
            }
        }
    }
    let root = Path::new(env!("CARGO_MANIFEST_DIR")).join("src");
    let mut files = Vec::new();
    walk(&root, &mut files);
    files.sort();
    files
        .into_iter()
        .map(|path| {
            let below = path.strip_prefix(&root).unwrap();
            let first = below.components().next().unwrap().as_os_str().to_string_lossy().into_owned();
            let folder = first.trim_end_matches(".rs").to_owned();
            let text = fs::read_to_string(&path).unwrap();
            (folder, path, text)
        })
        .collect()
}

/// The paths that follow `start` in the code of a file, comments and doctests left out.
fn paths_after(text: &str, start: &str) -> BTreeSet<String> {
    let mut found = BTreeSet::new();
    let code: String =
        text.lines().filter(|line| !line.trim_start().starts_with("//")).collect::<Vec<_>>().join("\n");
    for (at, _) in code.match_indices(start) {
        let before = code[..at].chars().next_back();
        if before.is_some_and(|c| c.is_alphanumeric() || c == '_' || c == ':') {
            continue;
        }
        let rest = &code[at + start.len()..];
        if let Some(group) = rest.strip_prefix('{') {
            // `use crate::{a, b::c}`: each name that opens an element of the outermost group.
            let mut depth = 1;
            let mut element = String::new();
            for c in group.chars() {
                match c {
                    '{' => depth += 1,
                    '}' => depth -= 1,
                    _ => {}
                }
                if depth == 0 || (depth == 1 && c == ',') {
                    found.insert(element.trim().to_owned());
                    element.clear();
                    if depth == 0 {
                        break;
                    }
                } else {
                    element.push(c);
                }
            }
        } else {
            let path: String =
                rest.chars().take_while(|c| c.is_alphanumeric() || *c == '_' || *c == ':').collect();
            found.insert(path);
        }
    }
    found.retain(|path| !path.is_empty());
    found
}

#[test]
fn every_crate_path_follows_an_arrow() {
    let arrows: BTreeMap<_, _> = ARROWS.iter().copied().collect();
    let mut faults = Vec::new();
    let mut read = 0;

    for (folder, path, text) in sources() {
        if folder == "lib" {
            continue;
        }
        let Some(allowed) = arrows.get(folder.as_str()) else {
            faults.push(format!("{}: no arrows are drawn for `{folder}`", path.display()));
            continue;
        };
        let start = if folder == "main" { "sootline::" } else { "crate::" };
        for target in paths_after(&text, start) {
            read += 1;
            let first = target.split("::").next().unwrap_or_default();
            let lawful = first == folder
                || allowed.iter().any(|arrow| target == *arrow || target.starts_with(&format!("{arrow}::")));
            if !lawful {
                faults.push(format!("{}: `{folder}` may not use `{target}`", path.display()));
            }
        }
    }

    assert!(read > 100, "only {read} paths were read: the reader is broken");
    assert!(faults.is_empty(), "{}", faults.join("\n"));
}

#[test]
fn only_the_folders_named_here_know_a_framework() {
    let mut faults = Vec::new();

    for (folder, path, text) in sources() {
        for (name, folders) in KEPT_IN {
            if !folders.contains(&folder.as_str()) && !paths_after(&text, &format!("{name}::")).is_empty() {
                faults.push(format!("{}: `{folder}` names {name}", path.display()));
            }
        }
    }

    assert!(faults.is_empty(), "{}", faults.join("\n"));
}

#[test]
fn the_top_level_holds_only_what_is_listed() {
    let listed = [
        "Cargo.toml",
        "Cargo.lock",
        "README.md",
        "DEVELOPERS.md",
        "LICENSE",
        "src",
        "migrations",
        "openapi",
        "tests",
        "seed-data",
        "benches",
        "target",
    ];
    let found: Vec<String> = fs::read_dir(env!("CARGO_MANIFEST_DIR"))
        .unwrap()
        .map(|entry| entry.unwrap().file_name().to_string_lossy().into_owned())
        .filter(|name| !name.starts_with('.') && !listed.contains(&name.as_str()))
        .collect();

    assert!(found.is_empty(), "not listed: {found:?}");
}

#[test]
fn the_reader_sees_groups_and_single_paths() {
    let text =
        "use crate::{fire::growth, domain::{Room, Key}};\nlet a = crate::wire::read();\n// crate::store::x\n";

    let found = paths_after(text, "crate::");

    assert!(found.contains("fire::growth") && found.iter().any(|p| p.starts_with("domain::")));
    assert!(found.contains("wire::read") && !found.iter().any(|p| p.starts_with("store")));
}
