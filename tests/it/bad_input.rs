//! Bad input: a problem that names the place, nothing half saved, never a 500.

use axum::body::Body;
use axum::http::Method;
use serde_json::{Value, json};

use crate::fixtures::{door, full, pointers, room, set, small};
use crate::support::{Reply, TestApp, request, with_headers};

/// Where bodies with a building go in, and how the building is wrapped there.
const WAYS_IN: [(&str, bool); 2] = [("/v1/buildings", false), ("/v1/assess", true)];

async fn sent(app: &TestApp, path: &str, wrapped: bool, building: &Value) -> Reply {
    let body = if wrapped { json!({ "building": building }) } else { building.clone() };
    app.post(path, body).await
}

#[tokio::test]
async fn each_fault_is_pointed_at() {
    let app = TestApp::new().await;
    let stored =
        json!({ "commodity": "cardboard_cartons", "height_m": 9, "footprint_m2": 99, "racks": true });
    for (what, pointer, value, faults) in [
        ("no length", "/rooms/0/length_m", json!(0), vec!["/rooms/0/length_m"]),
        ("a negative length", "/rooms/0/length_m", json!(-3.66), vec!["/rooms/0/length_m"]),
        ("an absurd length", "/rooms/0/length_m", json!(1e9), vec!["/rooms/0/length_m"]),
        ("the largest number there is", "/rooms/0/length_m", json!(1e308), vec!["/rooms/0/length_m"]),
        ("an absurd length with a unit", "/rooms/0/length_m", json!("1e9 m"), vec!["/rooms/0/length_m"]),
        ("not a number in words", "/rooms/0/length_m", json!("NaN"), vec!["/rooms/0/length_m"]),
        ("infinity in words", "/rooms/0/length_m", json!("inf m"), vec!["/rooms/0/length_m"]),
        ("a unit of something else", "/rooms/0/length_m", json!("3 kg"), vec!["/rooms/0/length_m"]),
        ("a length that is left out", "/rooms/0/length_m", Value::Null, vec!["/rooms/0/length_m"]),
        ("a flat room", "/rooms/0/height_m", json!(0.0), vec!["/rooms/0/height_m"]),
        ("a name of 201 characters", "/name", json!("x".repeat(201)), vec!["/name"]),
        ("no name", "/name", json!(""), vec!["/name"]),
        ("a key with a blank", "/rooms/0/key", json!("the store"), vec!["/rooms/0/key"]),
        ("an unknown use", "/rooms/0/use", json!("storrage"), vec!["/rooms/0/use"]),
        ("an unknown kind", "/openings/0/kind", json!("dor"), vec!["/openings/0/kind"]),
        ("an unknown member", "/colour", json!("red"), vec!["/colour"]),
        ("an unknown member of a room", "/rooms/0/length", json!(3), vec!["/rooms/0/length"]),
        ("an unknown member of an opening", "/openings/0/a~b/c", json!(3), vec!["/openings/0/a~0b~1c"]),
        ("a door wider than its wall", "/openings/0/width_m", json!(3.7), vec!["/openings/0/width_m"]),
        ("a door above the ceiling", "/openings/0/height_m", json!(2.5), vec!["/openings/0/height_m"]),
        ("a sill that lifts it above", "/openings/0/sill_m", json!(0.5), vec!["/openings/0/height_m"]),
        (
            "a room joined to itself",
            "/openings/0/connects",
            json!(["store", "store"]),
            vec!["/openings/0/connects"],
        ),
        (
            "outside to outside",
            "/openings/0/connects",
            json!(["outside", "outside"]),
            vec!["/openings/0/connects"],
        ),
        (
            "a room joined to none",
            "/openings/0/connects",
            json!(["store", "cellar"]),
            vec!["/openings/0/connects/1"],
        ),
        ("one end only", "/openings/0/connects", json!(["store"]), vec!["/openings/0/connects"]),
        (
            "three ends",
            "/openings/0/connects",
            json!(["store", "outside", "store"]),
            vec!["/openings/0/connects"],
        ),
        ("two rooms of one key", "/rooms/-", room("store"), vec!["/rooms/1/key"]),
        ("two openings of one key", "/openings/-", door("d", "store", "outside"), vec!["/openings/1/key"]),
        ("more open than open", "/openings/0/open_fraction", json!(1.01), vec!["/openings/0/open_fraction"]),
        (
            "an unknown material",
            "/rooms/0/linings",
            json!({ "walls": { "material": "gypsum_bord" } }),
            vec!["/rooms/0/linings/walls/material"],
        ),
        (
            "an unknown hazard",
            "/rooms/0/hazards",
            json!(["gas_cylinders", "ghosts"]),
            vec!["/rooms/0/hazards/1"],
        ),
        ("a day that is none", "/inspected_on", json!("2026-02-30"), vec!["/inspected_on"]),
        (
            "a place off the globe",
            "/location",
            json!({ "longitude_deg": 181, "latitude_deg": 91 }),
            vec!["/location/longitude_deg", "/location/latitude_deg"],
        ),
        (
            "goods that do not fit",
            "/rooms/0/storage",
            stored,
            vec!["/rooms/0/storage/height_m", "/rooms/0/storage/footprint_m2"],
        ),
        ("a room that is a number", "/rooms/0", json!(3), vec!["/rooms/0"]),
        ("rooms by key", "/rooms", json!({ "store": {} }), vec!["/rooms"]),
    ] {
        let building = if pointer.contains("a~b") {
            let mut building = small();
            building["openings"][0]["a~b/c"] = value;
            building
        } else {
            set(small(), pointer, value)
        };
        for (path, wrapped) in WAYS_IN {
            let reply = sent(&app, path, wrapped, &building).await;

            let problem = reply.problem(422, "invalid");
            let mut found = reply.pointers();
            found.sort_unstable();
            let prefix = if wrapped { "/building" } else { "" };
            let mut wanted: Vec<_> = faults.iter().map(|fault| format!("{prefix}{fault}")).collect();
            wanted.sort_unstable();
            assert_eq!(found, wanted, "{what}: {problem}");
            for error in problem["errors"].as_array().unwrap() {
                assert!(
                    !error["detail"].as_str().unwrap().is_empty()
                        && !error["code"].as_str().unwrap().is_empty()
                );
            }
        }
    }
    nothing_was_saved(&app).await;
}

async fn nothing_was_saved(app: &TestApp) {
    assert_eq!(app.get("/v1/buildings").await.value()["items"], json!([]));
}

#[tokio::test]
async fn an_unknown_name_comes_back_with_the_nearest() {
    let app = TestApp::new().await;

    for (pointer, name, nearest) in [
        ("/rooms/0/use", "storrage", "storage"),
        ("/rooms/0/use", "Office", "office"),
        ("/rooms/0/leakage_class", "averge", "average"),
        ("/openings/0/kind", "dor", "door"),
    ] {
        let reply = app.post("/v1/buildings", set(small(), pointer, json!(name))).await;

        assert_eq!(reply.problem(422, "invalid")["errors"][0]["suggestion"], nearest, "{name}");
    }
}

#[tokio::test]
async fn all_faults_come_at_once() {
    let app = TestApp::new().await;
    let mut building = small();
    building["name"] = json!(7);
    building["colour"] = json!("red");
    building["rooms"][0]["height_m"] = json!(-1);
    building["rooms"][0]["use"] = json!("storrage");
    building["openings"][0]["connects"][1] = json!("cellar");
    building["openings"][0].as_object_mut().unwrap().remove("width_m");

    let reply = app.post("/v1/buildings", building).await;

    reply.problem(422, "invalid");
    let mut found = reply.pointers();
    found.sort_unstable();
    assert_eq!(
        found,
        [
            "/colour",
            "/name",
            "/openings/0/connects/1",
            "/openings/0/width_m",
            "/rooms/0/height_m",
            "/rooms/0/use"
        ]
    );
}

#[tokio::test]
async fn what_cannot_be_read_is_400_with_the_first_fault() {
    let app = TestApp::new().await;
    let deep = format!("{}{}", "[".repeat(33), "]".repeat(33));
    let deeper = "[".repeat(100_000);
    let deep_objects = r#"{"a":"#.repeat(10_000);
    for (what, body) in [
        ("nothing", b"".as_slice()),
        ("blanks", b" \n "),
        ("half a body", br#"{"name": "Harb"#),
        ("two bodies", br#"{"name": "a"} {"name": "b"}"#),
        ("a member twice", br#"{"name": "a", "name": "a"}"#),
        ("a member of a room twice", br#"{"name": "a", "rooms": [{"key": "k", "key": "k"}]}"#),
        ("a member twice by escape", br#"{"name": "a", "n\u0061me": "a"}"#),
        ("NaN", br#"{"name": "a", "rooms": [{"key": "k", "length_m": NaN}]}"#),
        ("Infinity", br#"{"name": "a", "rooms": [{"key": "k", "length_m": Infinity}]}"#),
        ("a number beyond all", br#"{"name": "a", "rooms": [{"key": "k", "length_m": 1e309}]}"#),
        ("a comment", br#"{"name": "a" /* b */}"#),
        ("a comma too many", br#"{"name": "a",}"#),
        ("broken UTF-8", b"{\"name\": \"\xff\xfe\"}"),
        ("an overlong encoding", b"{\"name\": \"\xc0\xaf\"}"),
        ("half a surrogate", br#"{"name": "\ud800"}"#),
        ("a byte order mark", b"\xef\xbb\xbf{\"name\": \"a\"}"),
        ("UTF-16", b"\xff\xfe{\x00}\x00"),
        ("deep nesting", deep.as_bytes()),
        ("deep nesting without end", deeper.as_bytes()),
        ("deep objects", deep_objects.as_bytes()),
        ("XML", b"<building/>"),
    ] {
        for (path, _) in WAYS_IN {
            let reply = app.raw(Method::POST, path, &[], body).await;

            let problem = reply.problem(400, "unreadable");
            assert!(problem["errors"].as_array().unwrap().len() <= 1, "{what}: the first fault only");
        }
    }
    nothing_was_saved(&app).await;
}

#[tokio::test]
async fn what_is_no_object_is_422_at_the_root() {
    let app = TestApp::new().await;

    for body in ["null", "true", "7", "\"x\"", "[]", "[{}]"] {
        for (path, _) in WAYS_IN {
            let reply = app.raw(Method::POST, path, &[], body.as_bytes()).await;

            reply.problem(422, "invalid");
            assert_eq!(reply.pointers(), [""], "{body}");
        }
    }
}

#[tokio::test]
async fn limits_of_number_hold_on_both_sides() {
    let app = TestApp::new().await;
    let rooms = |count: usize| (0..count).map(|n| room(&format!("r{n}"))).collect::<Vec<_>>();
    let doors =
        |count: usize| (0..count).map(|n| door(&format!("d{n}"), "r0", "outside")).collect::<Vec<_>>();

    let most = json!({ "name": "most", "rooms": rooms(500), "openings": doors(2000) });
    let reply = app.post("/v1/buildings", most).await;
    assert_eq!(reply.status, 201, "{}", reply.text());
    let path = reply.header("location").to_owned();

    let reply = app.post("/v1/buildings", json!({ "name": "rooms", "rooms": rooms(501) })).await;
    reply.problem(422, "invalid");
    assert_eq!(reply.pointers(), ["/rooms"]);
    let reply = app
        .post("/v1/buildings", json!({ "name": "doors", "rooms": rooms(1), "openings": doors(2001) }))
        .await;
    reply.problem(422, "invalid");
    assert_eq!(reply.pointers(), ["/openings"]);
    app.create(&format!("{path}/rooms/one-more"), room("one-more")).await.problem(422, "invalid");
    app.create(&format!("{path}/openings/one-more"), door("one-more", "r0", "outside"))
        .await
        .problem(422, "invalid");
    assert_eq!(app.get(&path).await.etag(), "\"1\"");
}

#[tokio::test]
async fn four_mebibytes_are_read_and_one_byte_more_is_not() {
    const MOST: usize = 4 * 1024 * 1024;
    let app = TestApp::new().await;
    let padded = |bytes: usize| {
        let mut body = small().to_string().into_bytes();
        body.resize(bytes, b' ');
        body
    };

    let fits = app.raw(Method::POST, "/v1/buildings", &[], &padded(MOST)).await;
    let too_large = app.raw(Method::POST, "/v1/buildings", &[], &padded(MOST + 1)).await;

    assert_eq!(fits.status, 201);
    too_large.problem(413, "too-large");
}

#[tokio::test]
async fn fifty_megabytes_get_their_answer_over_a_real_connection() {
    let app = TestApp::new().await;
    let base = app.serve().await;
    let client = reqwest::Client::new();

    let body = vec![b' '; 50_000_000];
    let request = client.post(format!("{base}/v1/buildings")).header("Content-Type", "application/json");
    let reply = request.body(body).send().await.unwrap();

    assert_eq!(reply.status(), 413);
    assert_eq!(reply.headers()["content-type"], "application/problem+json");
    assert_eq!(client.get(format!("{base}/healthz")).send().await.unwrap().status(), 200);
}

#[tokio::test(flavor = "multi_thread")]
async fn fifty_megabytes_in_chunks_of_unknown_number_get_their_answer_too() {
    let app = TestApp::new().await;
    let base = app.serve().await;

    let answer = tokio::task::spawn_blocking(move || post_in_chunks(&base, 50)).await.unwrap();

    assert!(answer.starts_with("HTTP/1.1 413 "), "{answer}");
    assert!(answer.contains("content-type: application/problem+json"), "{answer}");
}

/// Posts so many megabytes without saying beforehand how many, and reads the answer.
fn post_in_chunks(base: &str, megabytes: usize) -> String {
    use std::io::{Read as _, Write as _};
    let address = base.strip_prefix("http://").unwrap();
    let mut connection = std::net::TcpStream::connect(address).unwrap();
    let head = "POST /v1/buildings HTTP/1.1\r\nHost: test\r\nConnection: close\r\n\
                Content-Type: application/json\r\nTransfer-Encoding: chunked\r\n\r\n";
    connection.write_all(head.as_bytes()).unwrap();
    let chunk = vec![b' '; 1_000_000];
    for _ in 0..megabytes {
        connection.write_all(b"f4240\r\n").unwrap();
        connection.write_all(&chunk).unwrap();
        connection.write_all(b"\r\n").unwrap();
    }
    connection.write_all(b"0\r\n\r\n").unwrap();
    let mut answer = String::new();
    connection.read_to_string(&mut answer).unwrap();
    answer
}

#[tokio::test]
async fn any_value_of_the_wrong_type_anywhere_is_told_and_never_a_500() {
    let app = TestApp::new().await;
    let building = set(full(), "/reference", Value::Null);
    let wrong = [
        Value::Null,
        json!(true),
        json!(-1),
        json!(1e300),
        json!(0.5),
        json!("x"),
        json!(""),
        json!([]),
        json!([[]]),
        json!({}),
        json!({ "x": 1 }),
    ];
    let mut refused = 0;
    for pointer in pointers(&building).into_iter().filter(|pointer| !pointer.is_empty()) {
        for value in &wrong {
            let reply = app.post("/v1/buildings", set(building.clone(), &pointer, value.clone())).await;
            if reply.status == 201 {
                continue;
            }
            reply.problem(422, "invalid");
            let found = reply.pointers();
            assert!(!found.is_empty(), "{pointer} = {value}: {}", reply.text());
            // A rule that compares members may point at the one beside it.
            let beside = |found: &str| parent(found) == parent(&pointer);
            let near = |found: &String| {
                found.starts_with(&pointer) || pointer.starts_with(found.as_str()) || beside(found)
            };
            // A room that cannot be read or shrinks brings its openings down with it.
            let room = pointer == "/rooms" || pointer.starts_with("/rooms/0");
            let of_opening = |found: &String| found.starts_with("/openings/0");
            assert!(
                found.iter().any(near) || (room && found.iter().all(of_opening)),
                "{pointer} = {value} is not pointed at: {}",
                reply.text()
            );
            refused += 1;
        }
    }
    assert!(refused > 500, "most wrong values are refused, {refused} were");
}

fn parent(pointer: &str) -> &str {
    pointer.rsplit_once('/').map_or("", |(parent, _)| parent)
}

#[tokio::test]
async fn a_refused_change_leaves_everything_as_it_was() {
    let app = TestApp::new().await;
    let path = app.post("/v1/buildings", full()).await.header("location").to_owned();
    let before = app.get(&path).await;

    let bad = set(full(), "/rooms/0/height_m", json!(-1));
    app.put(&path, "*", bad).await.problem(422, "invalid");
    app.patch(&path, "*", json!({ "name": "changed", "water": { "available_l_min": -1 } }))
        .await
        .problem(422, "invalid");
    app.patch(&path, "*", json!([])).await.problem(422, "invalid");
    app.raw(Method::PUT, &path, &[("If-Match", "*")], b"{").await.problem(400, "unreadable");
    let twice = br#"{"name": "a", "name": "b"}"#;
    app.raw(Method::PATCH, &path, &[("If-Match", "*")], twice).await.problem(400, "unreadable");

    let after = app.get(&path).await;
    assert_eq!((after.etag(), after.value()), ("\"1\"", before.value()));
}

#[tokio::test]
async fn the_form_of_a_body_is_judged_before_its_meaning() {
    let app = TestApp::new().await;
    let path = app.post("/v1/buildings", small()).await.header("location").to_owned();

    for (method, path, content_type, help) in [
        (Method::POST, "/v1/buildings", "text/plain", ("accept-post", "application/json")),
        (Method::POST, "/v1/buildings", "application/merge-patch+json", ("accept-post", "application/json")),
        (Method::POST, "/v1/buildings", "", ("accept-post", "application/json")),
        (Method::POST, "/v1/assess", "application/xml", ("accept-post", "application/json")),
        (Method::PUT, &path, "application/jsonp", ("accept-post", "application/json")),
        (
            Method::PATCH,
            &path,
            "application/json-patch+json",
            ("accept-patch", "application/merge-patch+json"),
        ),
    ] {
        let headers = [("Content-Type", content_type), ("If-Match", "*")];
        let request = with_headers(request(method.clone(), path), &headers).body(Body::from("{")).unwrap();
        let reply = app.send(request).await;

        reply.problem(415, "unsupported-media-type");
        assert_eq!(reply.header(help.0), help.1, "{method} {path} {content_type}");
    }
    let gzip = [("Content-Encoding", "gzip")];
    let reply = app.raw(Method::POST, "/v1/buildings", &gzip, b"{}").await;
    reply.problem(415, "unsupported-media-type");
    assert_eq!(reply.header("accept-encoding"), "identity");
}

#[tokio::test]
async fn judgement_goes_in_the_order_of_the_contract() {
    let app = TestApp::new().await;
    let path = app.post("/v1/buildings", small()).await.header("location").to_owned();
    let missing = path.replace("0001", "9999");
    let large = vec![b' '; 4 * 1024 * 1024 + 1];

    // Each request mends one fault more than the one before; the first that is left decides.
    let worst = Faulty {
        method: Method::PUT,
        path: &missing,
        accept: "text/html",
        content_type: "text/plain",
        if_match: None,
        query: "?x=1",
        body: &large,
    };
    let not_there = worst.clone();
    let no_method = Faulty { method: Method::POST, path: &path, ..not_there.clone() };
    let no_form = Faulty { method: Method::PUT, ..no_method.clone() };
    let too_large = Faulty { accept: "*/*", ..no_form.clone() };
    let no_json = Faulty { body: b"{", ..too_large.clone() };
    let no_condition = Faulty { content_type: "application/json", ..no_json.clone() };
    let stale = Faulty { if_match: Some("\"9\""), ..no_condition.clone() };
    let odd_parameter = Faulty { if_match: Some("\"1\""), ..stale.clone() };
    let broken = Faulty { query: "", ..odd_parameter.clone() };
    let meaningless = Faulty { body: b"{}", ..broken.clone() };
    for (request, status, slug) in [
        (not_there, 404, "not-found"),
        (no_method, 405, "method-not-allowed"),
        (no_form, 406, "not-acceptable"),
        (too_large, 413, "too-large"),
        (no_json, 415, "unsupported-media-type"),
        (no_condition, 428, "precondition-required"),
        (stale, 412, "precondition-failed"),
        (odd_parameter, 400, "invalid-parameter"),
        (broken, 400, "unreadable"),
        (meaningless, 422, "invalid"),
    ] {
        request.send(&app).await.problem(status, slug);
    }
}

/// A request with faults of several kinds at once.
#[derive(Clone)]
struct Faulty<'a> {
    method: Method,
    path: &'a str,
    accept: &'a str,
    content_type: &'a str,
    if_match: Option<&'a str>,
    query: &'a str,
    body: &'a [u8],
}

impl Faulty<'_> {
    async fn send(self, app: &TestApp) -> Reply {
        let mut headers = vec![("Accept", self.accept), ("Content-Type", self.content_type)];
        headers.extend(self.if_match.map(|tags| ("If-Match", tags)));
        let path = format!("{}{}", self.path, self.query);
        let request = with_headers(request(self.method, &path), &headers);
        app.send(request.body(Body::from(self.body.to_vec())).unwrap()).await
    }
}
