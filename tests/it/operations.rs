//! Every operation of the OpenAPI document has its row here, and is exercised.

use std::collections::BTreeSet;

use axum::body::Body;
use axum::http::Method;
use serde_json::{Value, json};

use crate::fixtures::{door, room, simulation, small, two_rooms};
use crate::support::{Reply, TestApp, request, with_headers};

/// What to send for an operation, and what comes back.
struct Row {
    id: &'static str,
    method: Method,
    path: String,
    headers: &'static [(&'static str, &'static str)],
    body: Option<Value>,
    status: u16,
}

const ANY: &[(&str, &str)] = &[("If-Match", "*")];
const NEW: &[(&str, &str)] = &[("If-None-Match", "*")];

/// The table, in an order that can be run through: what is deleted is deleted last.
async fn rows(app: &TestApp) -> Vec<Row> {
    let building = app.post("/v1/buildings", two_rooms()).await.header("location").to_owned();
    let made = app.post(&format!("{building}/assessments"), json!({})).await;
    let assessment = made.header("location").to_owned();
    let row = |id, method, path: &str, headers, body, status| {
        let path = path.replace("{building}", &building).replace("{assessment}", &assessment);
        Row { id, method, path, headers, body, status }
    };
    let get = |id, path: &str| row(id, Method::GET, path, &[], None, 200);
    vec![
        get("list_buildings", "/v1/buildings"),
        row("create_building", Method::POST, "/v1/buildings", &[], Some(small()), 201),
        get("get_building", "{building}"),
        row("put_building", Method::PUT, "{building}", ANY, Some(two_rooms()), 200),
        row("patch_building", Method::PATCH, "{building}", ANY, Some(json!({ "notes": "n" })), 200),
        get("get_room", "{building}/rooms/store"),
        row("put_room", Method::PUT, "{building}/rooms/attic", NEW, Some(room("attic")), 200),
        row("patch_room", Method::PATCH, "{building}/rooms/store", ANY, Some(json!({ "name": "n" })), 200),
        row("delete_room", Method::DELETE, "{building}/rooms/attic", ANY, None, 204),
        get("get_opening", "{building}/openings/d"),
        row(
            "put_opening",
            Method::PUT,
            "{building}/openings/w",
            NEW,
            Some(door("w", "shop", "outside")),
            200,
        ),
        row(
            "patch_opening",
            Method::PATCH,
            "{building}/openings/d",
            ANY,
            Some(json!({ "entry": true })),
            200,
        ),
        row("delete_opening", Method::DELETE, "{building}/openings/w", ANY, None, 204),
        row("create_assessment", Method::POST, "{building}/assessments", &[], Some(json!({})), 201),
        get("list_assessments", "{building}/assessments"),
        get("get_latest_assessment", "{building}/assessments/latest"),
        get("get_assessment", "{assessment}"),
        get("get_room_report", "{assessment}/rooms/store"),
        row("assess", Method::POST, "/v1/assess", &[], Some(json!({ "building": small() })), 200),
        row("simulate", Method::POST, "/v1/simulations", &[], Some(simulation()), 200),
        get("list_uses", "/v1/catalogue/uses"),
        get("list_items", "/v1/catalogue/items"),
        get("list_fuels", "/v1/catalogue/fuels"),
        get("list_materials", "/v1/catalogue/materials"),
        get("list_leakage_classes", "/v1/catalogue/leakage"),
        get("list_detectors", "/v1/catalogue/detectors"),
        get("list_sprinklers", "/v1/catalogue/sprinklers"),
        get("list_methods", "/v1/methods"),
        row("delete_building", Method::DELETE, "{building}", ANY, None, 204),
    ]
}

impl Row {
    async fn send(&self, app: &TestApp) -> Reply {
        self.send_with(app, "", &[], None).await
    }

    async fn send_with(
        &self,
        app: &TestApp,
        query: &str,
        more: &[(&str, &str)],
        body: Option<&[u8]>,
    ) -> Reply {
        let plain = self.body.as_ref().map(|body| body.to_string().into_bytes());
        let body = body.map(<[u8]>::to_vec).or(plain).unwrap_or_default();
        let mut request =
            with_headers(request(self.method.clone(), &format!("{}{query}", self.path)), self.headers);
        if self.body.is_some() && !more.iter().any(|(name, _)| *name == "Content-Type") {
            request = request.header("Content-Type", "application/json");
        }
        app.send(with_headers(request, more).body(Body::from(body)).unwrap()).await
    }
}

/// The operations of the document: id and response codes.
async fn document() -> Value {
    TestApp::new().await.get("/openapi.json").await.expect(200)
}

fn operations(document: &Value) -> Vec<(&str, &str, &Value)> {
    let paths = document["paths"].as_object().unwrap();
    let methods = paths.iter().flat_map(|(path, item)| {
        item.as_object()
            .unwrap()
            .iter()
            .map(move |(method, operation)| (path.as_str(), method.as_str(), operation))
    });
    methods.collect()
}

#[tokio::test]
async fn every_operation_answers_as_the_document_says() {
    let app = TestApp::new().await;
    let document = document().await;
    let mut exercised = BTreeSet::new();

    for row in rows(&app).await {
        let reply = row.send(&app).await;

        assert_eq!(reply.status, row.status, "{}: {}", row.id, reply.text());
        let described = operations(&document);
        let (_, _, operation) = described
            .iter()
            .find(|(_, _, operation)| operation["operationId"] == row.id)
            .unwrap_or_else(|| panic!("{} is not in the document", row.id));
        let response = &operation["responses"][row.status.to_string()];
        assert!(response.is_object(), "{} does not tell of {}", row.id, row.status);
        let described = response["content"].as_object().and_then(|content| content.keys().next());
        assert_eq!(reply.header("content-type"), described.map_or("", String::as_str), "{}", row.id);
        exercised.insert(row.id);
    }
    let all: BTreeSet<_> = operations(&document)
        .iter()
        .map(|(_, _, operation)| operation["operationId"].as_str().unwrap())
        .collect();
    assert_eq!(exercised, all, "the table and the document have the same operations");
}

#[tokio::test]
async fn every_operation_refuses_bad_requests_with_a_problem() {
    let app = TestApp::new().await;
    let deep = "[".repeat(1000);

    for mut row in rows(&app).await {
        let id = row.id;
        if row.method == Method::DELETE {
            // Nothing was put here, so what is there already is not deleted.
            row.path = row.path.replace("rooms/attic", "rooms/store").replace("openings/w", "openings/d");
            row.send_with(&app, "?x=1", &[], None).await.problem(400, "invalid-parameter");
            row.send_with(&app, "", &[("Accept", "image/png")], None).await.problem(406, "not-acceptable");
            continue;
        }
        row.send_with(&app, "?x=1", &[], None).await.problem(400, "invalid-parameter");
        row.send_with(&app, "", &[("Accept", "text/html")], None).await.problem(406, "not-acceptable");
        if row.body.is_some() {
            let text = [("Content-Type", "text/plain")];
            row.send_with(&app, "", &text, None).await.problem(415, "unsupported-media-type");
            for broken in
                [b"{".as_slice(), b"\xff", br#"{"a": 1, "a": 2}"#, b"{\"name\": NaN}", deep.as_bytes()]
            {
                let reply = row.send_with(&app, "", &[], Some(broken)).await;
                assert_eq!(reply.problem(400, "unreadable")["status"], 400, "{id}");
            }
            for wrong in [b"[]".as_slice(), b"7", br#"{"no_such_member": 1}"#] {
                let reply = row.send_with(&app, "", &[], Some(wrong)).await;
                assert_eq!(reply.problem(422, "invalid")["status"], 422, "{id}");
            }
            let large = vec![b' '; 4 * 1024 * 1024 + 1];
            row.send_with(&app, "", &[], Some(&large)).await.problem(413, "too-large");
        }
    }
}

#[tokio::test]
async fn every_address_with_an_id_is_404_for_another_or_a_broken_one() {
    let app = TestApp::new().await;

    for mut row in rows(&app).await {
        let Some(at) = row.path.find("019ac000") else { continue };
        let sound = row.path.clone();
        for id in ["019ac000-0000-7000-8000-00000000ffff", "019AC000-0000-7000-8000-000000000001", "x", "%FF"]
        {
            row.path = format!("{}{id}{}", &sound[..at], &sound[at + 36..]);
            row.send(&app).await.problem(404, "not-found");
        }
    }
}

#[tokio::test]
async fn every_address_lists_its_methods_and_refuses_the_others() {
    let app = TestApp::new().await;
    let rows = rows(&app).await;
    let paths: BTreeSet<_> = rows.iter().map(|row| row.path.as_str()).collect();

    for path in paths {
        let options = app.send(request(Method::OPTIONS, path).body(Body::empty()).unwrap()).await;
        assert_eq!(options.status, 204, "{path}");
        let allowed: BTreeSet<_> = options.header("allow").split(',').map(str::to_owned).collect();
        for row in rows.iter().filter(|row| row.path == path) {
            assert!(allowed.contains(row.method.as_str()), "{path}: {allowed:?}");
        }
        for method in ["GET", "POST", "PUT", "PATCH", "DELETE", "TRACE", "BREW"] {
            if !allowed.contains(method) {
                let method = Method::from_bytes(method.as_bytes()).unwrap();
                let reply = app.send(request(method, path).body(Body::empty()).unwrap()).await;
                reply.problem(405, "method-not-allowed");
                assert_eq!(reply.header("allow"), options.header("allow"), "{path}");
            }
        }
    }
}

#[tokio::test]
async fn every_operation_is_described_in_full() {
    let document = document().await;
    let tags: Vec<_> = document["tags"].as_array().unwrap().iter().map(|tag| tag["name"].clone()).collect();

    for (path, method, operation) in operations(&document) {
        let named = format!("{method} {path}");
        for member in ["operationId", "summary", "description"] {
            assert!(operation[member].as_str().is_some_and(|text| !text.is_empty()), "{named}: {member}");
        }
        assert_eq!(operation["tags"].as_array().map(Vec::len), Some(1), "{named}");
        assert!(tags.contains(&operation["tags"][0]), "{named}");
        for parameter in operation["parameters"].as_array().into_iter().flatten() {
            assert!(parameter["description"].is_string(), "{named}: {parameter}");
        }
        let mut refusals = 0;
        for (status, response) in operation["responses"].as_object().unwrap() {
            let reference = response["$ref"].as_str();
            let response = match reference.and_then(|reference| reference.strip_prefix('#')) {
                Some(pointer) => document.pointer(pointer).unwrap(),
                None => response,
            };
            assert!(
                response["description"].as_str().is_some_and(|text| !text.is_empty()),
                "{named} {status}"
            );
            if status.starts_with('4') || status.starts_with('5') {
                refusals += 1;
                let content = response["content"].as_object().unwrap();
                assert_eq!(
                    content.keys().collect::<Vec<_>>(),
                    ["application/problem+json"],
                    "{named} {status}"
                );
            }
        }
        assert!(refusals >= 3, "{named} can fail in more ways than {refusals}");
        if !operation["requestBody"].is_null() {
            let content = operation["requestBody"]["content"].as_object().unwrap();
            assert!(content.values().all(|media| !media["example"].is_null()), "{named} has no example");
        }
    }
}

#[tokio::test]
async fn the_examples_of_the_document_are_accepted() {
    let app = TestApp::new().await;
    let document = document().await;
    let example = |id: &str| -> Value {
        let described = operations(&document);
        let (_, _, operation) =
            described.iter().find(|(_, _, operation)| operation["operationId"] == id).unwrap();
        let content = operation["requestBody"]["content"].as_object().unwrap();
        content.values().next().unwrap()["example"].clone()
    };

    let building = app.post("/v1/buildings", example("create_building")).await;
    assert_eq!(building.status, 201, "{}", building.text());
    let path = building.header("location").to_owned();
    app.put(&path, "*", example("put_building")).await.expect(200);
    app.patch(&path, "*", example("patch_building")).await.expect(200);
    let (room, opening) = (example("put_room"), example("put_opening"));
    let room_path = format!("{path}/rooms/{}", room["key"].as_str().unwrap());
    let opening_path = format!("{path}/openings/{}", opening["key"].as_str().unwrap());
    app.put(&room_path, "*", room).await.expect(200);
    app.patch(&room_path, "*", example("patch_room")).await.expect(200);
    app.put(&opening_path, "*", opening).await.expect(200);
    app.patch(&opening_path, "*", example("patch_opening")).await.expect(200);
    app.post(&format!("{path}/assessments"), example("create_assessment")).await.expect(201);
    app.post("/v1/assess", example("assess")).await.expect(200);
    app.post("/v1/simulations", example("simulate")).await.expect(200);
}
