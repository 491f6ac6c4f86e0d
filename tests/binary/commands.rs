//! The commands, run as people run them.

use std::fs;
use std::io::Write;
use std::process::{Output, Stdio};

use serde_json::Value;

use crate::server::{Server, sootline};

const SHOP: &str = concat!(env!("CARGO_MANIFEST_DIR"), "/seed-data/demo/buildings/01-corner-shop.json");
const DISTRICT: &str = concat!(env!("CARGO_MANIFEST_DIR"), "/seed-data/demo/buildings");

fn run(arguments: &[&str]) -> Output {
    sootline().args(arguments).output().unwrap()
}

fn text(bytes: &[u8]) -> String {
    String::from_utf8(bytes.to_vec()).unwrap()
}

#[test]
fn help_teaches_and_every_command_has_its_own() {
    let help = text(&run(&["--help"]).stdout);
    for command in ["serve", "assess", "openapi", "import", "export"] {
        assert!(help.contains(command), "{command} is not in the help");
        let own = run(&[command, "--help"]);
        assert!(own.status.success());
        assert!(text(&own.stdout).len() > 100, "{command} --help says hardly anything");
    }
    assert!(help.contains("serve --demo") && help.contains("planning"));
}

#[test]
fn the_version_names_build_schema_and_engine() {
    let version = text(&run(&["--version"]).stdout);

    for what in ["build", "schema", "engine", "rating rule", "catalogue"] {
        assert!(version.contains(what), "no {what} in: {version}");
    }
    assert!(version.contains(env!("CARGO_PKG_VERSION")));
}

#[test]
fn a_document_is_assessed_without_a_database() {
    let table = run(&["assess", SHOP]);
    let report = run(&["assess", SHOP, "--json"]);

    let printed = text(&table.stdout);
    assert!(table.status.success());
    assert!(printed.contains("Store room") && printed.to_lowercase().contains("planning"), "{printed}");
    let report: Value = serde_json::from_slice(&report.stdout).unwrap();
    assert_eq!(report["rooms"].as_array().unwrap().len(), 4);
    assert_eq!(report["assessment_id"], Value::Null);
}

#[test]
fn a_document_with_faults_is_refused_with_every_fault_and_its_place() {
    let mut child = sootline()
        .args(["assess", "-"])
        .stdin(Stdio::piped())
        .stdout(Stdio::piped())
        .stderr(Stdio::piped())
        .spawn()
        .unwrap();
    let document = r#"{ "name": "x", "rooms": [ { "key": "a", "use": "ofice", "length_m": -1, "width_m": 3, "height_m": 2.4 } ] }"#;
    child.stdin.take().unwrap().write_all(document.as_bytes()).unwrap();

    let out = child.wait_with_output().unwrap();

    let said = text(&out.stderr);
    assert_eq!(out.status.code(), Some(1));
    assert!(out.stdout.is_empty());
    assert!(
        said.contains("/rooms/0/length_m") && said.contains("/rooms/0/use") && said.contains("office"),
        "{said}"
    );
}

#[test]
fn what_is_exported_is_imported_again_and_replaced_by_reference() {
    let folder = tempfile::tempdir().unwrap();
    let url = |name: &str| format!("sqlite://{}", folder.path().join(name).display());

    let first = run(&["import", DISTRICT, "--database", &url("a.db")]);
    let exported = run(&["export", "--database", &url("a.db")]);
    let lines = folder.path().join("district.ndjson");
    fs::write(&lines, &exported.stdout).unwrap();
    let path = lines.to_str().unwrap();
    let second = run(&["import", path, "--database", &url("b.db")]);
    let again = run(&["import", path, "--database", &url("b.db")]);

    assert!(first.status.success(), "{}", text(&first.stderr));
    let count = text(&exported.stdout).lines().count();
    assert!(count >= 15);
    assert!(
        text(&second.stdout).contains(&format!("{count} added, 0 replaced, 0 refused")),
        "{}",
        text(&second.stdout)
    );
    assert!(
        text(&again.stdout).contains(&format!("0 added, {count} replaced, 0 refused")),
        "{}",
        text(&again.stdout)
    );
    assert_eq!(bare(&exported.stdout), bare(&run(&["export", "--database", &url("b.db")]).stdout));
}

/// The documents without what the service sets.
fn bare(lines: &[u8]) -> Vec<Value> {
    let mut documents: Vec<Value> = text(lines)
        .lines()
        .map(|line| {
            let mut document: Value = serde_json::from_str(line).unwrap();
            let members = document.as_object_mut().unwrap();
            for set in ["id", "revision", "created_at", "updated_at", "links"] {
                members.remove(set);
            }
            document
        })
        .collect();
    documents.sort_by_key(|document| document["reference"].to_string());
    documents
}

#[test]
fn an_import_with_a_broken_document_saves_the_others_and_says_so() {
    let folder = tempfile::tempdir().unwrap();
    let url = format!("sqlite://{}", folder.path().join("a.db").display());
    let lines = folder.path().join("two.ndjson");
    fs::write(&lines, "{\"name\": \"good\", \"rooms\": []}\n{\"name\": 3}\n").unwrap();

    let out = run(&["import", lines.to_str().unwrap(), "--database", &url]);

    assert_eq!(out.status.code(), Some(1));
    assert!(text(&out.stdout).contains("1 added, 0 replaced, 1 refused"));
    assert!(text(&out.stderr).contains("line 2: /name"), "{}", text(&out.stderr));
}

#[test]
fn the_printed_description_is_the_committed_one() {
    let committed = include_str!("../../openapi/sootline.json");

    assert_eq!(text(&run(&["openapi"]).stdout), committed);
}

#[test]
fn a_demo_leaves_an_inventory_with_buildings_alone_and_the_server_ends_at_a_signal() {
    let folder = tempfile::tempdir().unwrap();
    let url = format!("sqlite://{}", folder.path().join("own.db").display());
    let only = folder.path().join("one.json");
    fs::write(&only, "{\"name\": \"own\", \"rooms\": []}").unwrap();
    assert!(run(&["import", only.to_str().unwrap(), "--database", &url]).status.success());

    let server = Server::start(&["--demo", "--database", &url]);
    assert!(server.greeting.iter().any(|line| line.contains("left out")), "{:?}", server.greeting);
    assert_eq!(server.stop(), 0);

    let exported = run(&["export", "--database", &url]);
    assert_eq!(text(&exported.stdout).lines().count(), 1);
}
