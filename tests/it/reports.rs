//! Claims about the reports of the whole demo district.

use std::fs;
use std::ops::ControlFlow;
use std::path::{Path, PathBuf};
use std::sync::OnceLock;

use serde_json::Value;

use sootline::assessment::assess;
use sootline::catalogue::Catalogue;
use sootline::domain::assumptions::Level;
use sootline::domain::{Assumptions, Building};
use sootline::fire::methods;
use sootline::report::table::COLUMNS;
use sootline::report::{BuildingReport, Head, building_report, room_report, room_report_bytes, table};
use sootline::wire::{BuildingInput, read};

use super::reading::{banned, not_rounded, texts};

/// Publications, and what the bureau itself wrote (a kitchen has its `pass`), are quoted as they are.
const QUOTED: [&str; 7] = ["/source", "/name", "/key", "/opening", "/openings_tried", "/room", "/subject"];

fn files() -> Vec<PathBuf> {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("seed-data/demo/buildings");
    let mut files: Vec<PathBuf> = fs::read_dir(folder).unwrap().map(|entry| entry.unwrap().path()).collect();
    files.sort();
    files
}

fn building(file: &Path) -> Building {
    let bytes = fs::read(file).unwrap();
    match read::<BuildingInput>(&bytes, Catalogue::embedded()) {
        Ok(building) => building,
        Err(fault) => panic!("{}: {fault:?}", file.display()),
    }
}

/// By screening, but for those that are quickly run.
fn report(building: &Building) -> BuildingReport {
    let level = if building.rooms.len() <= 4 { Level::Transient } else { Level::Screening };
    let assumptions = Assumptions { level: Some(level), ..Assumptions::default() };
    let found =
        assess(building, Catalogue::embedded(), &assumptions, &mut || ControlFlow::Continue(())).unwrap();
    building_report(&found, &Head::unsaved(building, &assumptions))
}

fn district() -> &'static [BuildingReport] {
    static DISTRICT: OnceLock<Vec<BuildingReport>> = OnceLock::new();
    DISTRICT.get_or_init(|| {
        let reports: Vec<BuildingReport> = files().iter().map(|file| report(&building(file))).collect();
        assert!(reports.len() >= 15, "only {} buildings", reports.len());
        reports
    })
}

fn value(report: &BuildingReport) -> Value {
    serde_json::from_slice(&report.to_json()).unwrap()
}

#[test]
fn nothing_that_is_said_in_the_district_reassures() {
    for report in district() {
        texts(&value(report), "", &mut |path, text| {
            if !QUOTED.iter().any(|member| path.ends_with(member)) {
                assert_eq!(banned(text), None, "{}{path}: {text}", report.name);
            }
        });
    }
}

#[test]
fn every_number_of_the_district_is_rounded_or_echoed() {
    for report in district() {
        not_rounded(&value(report), "", &mut |path, number| panic!("{}{path}: {number}", report.name));
    }
}

#[test]
fn a_time_that_is_missing_has_its_reason() {
    for room in district().iter().flat_map(|report| &report.rooms) {
        let room = &room.body;
        if room.flashover.time_s.is_none() {
            assert!(room.flashover.reason.is_some(), "{}", room.key);
        }
        assert!(room.backdraft.reason.is_some(), "{}", room.key);
        assert!(room.entry.reason.is_some(), "{}", room.key);
        if room.smoke.time_to_2_m_s.is_none() || room.smoke.time_to_1_m_s.is_none() {
            assert!(room.smoke.reason.is_some(), "{}", room.key);
        }
    }
}

#[test]
fn every_figure_names_a_method_that_the_report_explains() {
    let mut figures = 0;
    for report in district() {
        let known: Vec<&str> = report.methods.iter().map(|method| method.key).collect();
        assert!(known.iter().all(|key| methods::find(key).is_some()));
        for (room, json) in report.rooms.iter().zip(value(report)["rooms"].as_array().unwrap()) {
            each_figure(json, &mut |figure| {
                let method = figure["method"].as_str().unwrap();
                assert!(known.contains(&method), "{method}");
                assert!(room.body.method_keys.contains(&method), "{}: {method}", room.body.key);
                let in_range = figure["in_range"].as_bool().unwrap();
                assert_eq!(in_range, figure["exceeded"].as_array().unwrap().is_empty(), "{method}");
                figures += 1;
            });
        }
    }
    assert!(figures > 500, "only {figures}");
}

fn each_figure(value: &Value, each: &mut impl FnMut(&Value)) {
    match value {
        Value::Array(list) => list.iter().for_each(|value| each_figure(value, each)),
        Value::Object(members) => {
            for (name, value) in members {
                match value {
                    Value::Array(figures) if name == "figures" => figures.iter().for_each(&mut *each),
                    other => each_figure(other, each),
                }
            }
        }
        _ => {}
    }
}

#[test]
fn every_clause_that_a_rating_names_is_printed() {
    for report in district() {
        let printed: Vec<&str> = report.rules.iter().map(|rule| rule.number).collect();
        for room in &report.rooms {
            let named = room.body.flashover.clauses.iter().chain(&room.body.backdraft.clauses);
            for clause in named {
                assert!(printed.contains(clause), "{clause}");
            }
        }
    }
}

#[test]
fn not_indicated_travels_with_what_it_hangs_on_and_what_it_leaves_out() {
    let mut seen = 0;
    for report in district() {
        for room in value(report)["rooms"].as_array().unwrap() {
            for finding in ["flashover", "backdraft"] {
                let finding = &room[finding];
                if finding["rating"] == "not_indicated" {
                    assert!(!finding["not_covered"].as_array().unwrap().is_empty(), "{}", room["key"]);
                    assert!(
                        !finding["holds_while"].is_null() || !finding["reason"].is_null(),
                        "{}",
                        room["key"]
                    );
                    seen += 1;
                } else {
                    assert!(finding["holds_while"].is_null(), "{}", room["key"]);
                }
            }
        }
    }
    assert!(seen > 0, "the district shows no such room");
}

#[test]
fn every_headline_of_the_district_is_one_sentence_of_a_length_that_can_be_read() {
    for room in district().iter().flat_map(|report| &report.rooms) {
        let headline = &room.body.headline;
        assert!(headline.ends_with('.') && !headline.contains(". "), "{headline}");
        assert!(headline.chars().count() <= 220, "{headline}");
        assert!(!headline.contains('_'), "{headline}");
    }
}

#[test]
fn the_stored_bytes_give_every_room_as_its_findings_did() {
    for report in district() {
        let stored = report.to_json();
        for room in &report.rooms {
            let key = &room.body.key;
            let from_bytes = room_report_bytes(&stored, key).unwrap().unwrap();
            let from_report = serde_json::to_vec(&room_report(report, key).unwrap()).unwrap();
            assert!(from_bytes == from_report, "{key}");
        }
    }
}

#[test]
fn the_table_of_every_building_fits_a_terminal() {
    for report in district() {
        let text = table(report);
        for line in text.lines() {
            assert!(line.chars().count() <= COLUMNS, "{line}");
        }
        for room in &report.rooms {
            assert!(text.contains(room.body.headline.split(' ').next().unwrap()));
        }
        assert_eq!(banned(&text), None, "{}", report.name);
    }
}

#[test]
fn the_ranking_holds_every_room_once_and_its_ranks_rise() {
    for report in district() {
        let mut keys: Vec<&str> = report.ranking.iter().map(|place| place.room.as_str()).collect();
        keys.sort_unstable();
        let mut rooms: Vec<&str> = report.rooms.iter().map(|room| room.body.key.as_str()).collect();
        rooms.sort_unstable();
        assert_eq!(keys, rooms);
        assert!(report.ranking.is_sorted_by_key(|place| place.rank));
    }
}
