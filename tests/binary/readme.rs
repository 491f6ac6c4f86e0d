//! The README's requests, run as they are printed, give the README's answer.

use std::process::Command;

use serde_json::Value;

use crate::server::Server;

const README: &str = include_str!("../../README.md");
/// Where the README's server listens; the test's own listens elsewhere.
const PRINTED: &str = "http://127.0.0.1:8080";

/// The fenced blocks of a language, in order.
fn blocks(language: &str) -> Vec<String> {
    let mut found = Vec::new();
    let mut open: Option<String> = None;
    for line in README.lines() {
        match (&mut open, line.strip_prefix("```")) {
            (None, Some(rest)) => open = Some(if rest == language { String::new() } else { "\0".to_owned() }),
            (Some(_), Some("")) => found.extend(open.take().filter(|block| !block.starts_with('\0'))),
            (Some(block), _) => {
                block.push_str(line);
                block.push('\n');
            }
            (None, None) => {}
        }
    }
    found
}

/// Runs a printed command in a shell, at the test's own server.
fn run(command: &str, server: &Server) -> Value {
    assert!(command.contains(PRINTED), "no address of the service in: {command}");
    let out = Command::new("sh").args(["-c", &command.replace(PRINTED, &server.base)]).output().unwrap();
    assert!(out.status.success(), "{command}: {}", String::from_utf8_lossy(&out.stderr));
    serde_json::from_slice(&out.stdout).unwrap()
}

/// Whether all that is printed stands in the answer; where a list is printed, the answer's list begins with it.
fn stands_in(printed: &Value, answer: &Value, at: &str) {
    match (printed, answer) {
        (Value::Object(printed), Value::Object(answer)) => {
            for (name, value) in printed {
                let found = answer.get(name).unwrap_or_else(|| panic!("{at}/{name} is not in the answer"));
                stands_in(value, found, &format!("{at}/{name}"));
            }
        }
        (Value::Array(printed), Value::Array(answer)) => {
            assert!(printed.len() <= answer.len(), "{at} has {} elements in the answer", answer.len());
            for (index, value) in printed.iter().enumerate() {
                stands_in(value, &answer[index], &format!("{at}/{index}"));
            }
        }
        _ => assert_eq!(printed, answer, "{at}"),
    }
}

#[test]
fn the_printed_request_gives_the_printed_answer() {
    let commands = blocks("sh");
    let request = commands.iter().find(|block| block.contains("/rooms/")).unwrap();
    let printed: Value = serde_json::from_str(&blocks("json")[0]).unwrap();
    let server = Server::start(&["--demo"]);

    let answer = run(request, &server);

    assert!(printed.as_object().unwrap().len() >= 4, "the README prints hardly an answer");
    stands_in(&printed, &answer, "");
}

#[test]
fn the_printed_trial_building_is_rated() {
    let commands = blocks("sh");
    let request = commands.iter().find(|block| block.contains("/v1/assess ")).unwrap();
    let server = Server::start(&["--demo"]);

    let answer = run(request, &server);

    assert_eq!(answer["rooms"][0]["key"], "den");
    assert!(answer["rooms"][0]["headline"].as_str().unwrap().len() > 20);
}

#[test]
fn the_printed_simulation_is_run() {
    let commands = blocks("sh");
    let request = commands.iter().find(|block| block.contains("/v1/simulations ")).unwrap();
    let server = Server::start(&["--demo"]);

    let answer = run(request, &server);

    let upper_c = answer["rooms"]["den"]["upper_temperature_c"].as_array().unwrap();
    assert_eq!(upper_c.len(), 61, "{answer}");
    assert!(upper_c.iter().any(|c| c.as_f64().unwrap() > 100.0), "{upper_c:?}");
    assert!(answer["events"].as_array().unwrap().iter().any(|event| event["kind"] == "opening_moved"));
}

#[test]
fn the_greeting_names_address_documents_and_a_request_that_works() {
    let server = Server::start(&["--demo"]);
    let line = |word: &str| {
        let line = server.greeting.iter().find(|line| line.trim_start().starts_with(word)).unwrap();
        line.trim_start().strip_prefix(word).unwrap().trim().to_owned()
    };

    assert_eq!(line("documents"), format!("{}/docs", server.base));
    let request = line("try");
    let out = Command::new("sh").args(["-c", &request]).output().unwrap();
    let answer: Value = serde_json::from_slice(&out.stdout).unwrap();
    assert!(answer["headline"].is_string(), "{request} gave {answer}");
}
