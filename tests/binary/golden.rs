//! No result of the demo district moves without a new engine version.
//!
//! This pins what the engine says, not whether it is right: the tests beside the formulas and
//! `tests/reference` do that. Words may change freely; ratings and figures may not.

use std::fmt::Write as _;
use std::fs;

use serde_json::Value;
use sha2::{Digest, Sha256};

use crate::server::sootline;

const BUILDINGS: &str = concat!(env!("CARGO_MANIFEST_DIR"), "/seed-data/demo/buildings");
const KEPT: &str = concat!(env!("CARGO_MANIFEST_DIR"), "/tests/binary/golden.txt");
const RENEW: &str = "SOOTLINE_RENEW";

/// Buildings that are run at level transient too: few rooms, so that a build without optimisation is quick.
const RUN: &[&str] = &["16-pump-house.json"];

/// What must not move: the ratings, and every number behind them.
const PINNED: &[&str] = &[
    "/flashover/rating",
    "/flashover/time_s",
    "/flashover/time_to_600_c_s",
    "/flashover/time_to_20_kw_m2_s",
    "/flashover/required_heat_release_kw",
    "/flashover/available_heat_release_kw",
    "/flashover/scenario",
    "/flashover/before_water",
    "/flashover/provisional",
    "/flashover/holds_while",
    "/flashover/figures",
    "/backdraft/rating",
    "/backdraft/scenario",
    "/backdraft/figures",
    "/entry/rating",
    "/transient",
    "/series",
];

/// The report of a building at a level.
fn assessed(file: &std::path::Path, level: &str) -> Value {
    let building: Value = serde_json::from_slice(&fs::read(file).unwrap()).unwrap();
    let asked = serde_json::json!({ "building": building, "assumptions": { "level": level } });
    let folder = tempfile::tempdir().unwrap();
    let asking = folder.path().join("asked.json");
    fs::write(&asking, asked.to_string()).unwrap();
    let out = sootline().args(["assess", "--json"]).arg(&asking).output().unwrap();
    assert!(out.status.success(), "{}: {}", file.display(), String::from_utf8_lossy(&out.stderr));
    serde_json::from_slice(&out.stdout).unwrap()
}

#[test]
fn results_of_the_district_move_only_with_the_engine_version() {
    let mut files: Vec<_> = fs::read_dir(BUILDINGS).unwrap().map(|entry| entry.unwrap().path()).collect();
    files.sort();
    let mut hash = Sha256::new();
    let mut engine = String::new();
    for file in &files {
        let name = file.file_name().unwrap().to_string_lossy();
        let levels: &[&str] =
            if RUN.contains(&&*name) { &["screening", "transient"] } else { &["screening"] };
        for level in levels {
            let report = assessed(file, level);
            engine = report["engine_version"].as_str().unwrap().to_owned();
            for room in report["rooms"].as_array().unwrap() {
                hash.update(room["key"].to_string());
                for pointer in PINNED {
                    hash.update(room.pointer(pointer).unwrap_or_else(|| panic!("no {pointer}")).to_string());
                }
            }
        }
    }
    let mut now = format!("engine {engine}\ndigest ");
    for byte in hash.finalize() {
        write!(now, "{byte:02x}").unwrap();
    }
    now.push('\n');

    if std::env::var_os(RENEW).is_some() {
        fs::write(KEPT, &now).unwrap();
    }
    let kept = fs::read_to_string(KEPT).unwrap_or_default();
    assert_eq!(
        now, kept,
        "results moved: raise ENGINE_VERSION if they were meant to, then run this test with {RENEW}=1"
    );
}
