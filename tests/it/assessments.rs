//! Assessments: made, kept, read again as they were served.

use std::num::NonZeroUsize;

use axum::body::Body;
use axum::http::Method;
use serde_json::{Value, json};
use sootline::compute::{Compute, Lane};

use crate::fixtures::{findings, full, room, set, small, two_rooms};
use crate::support::{NOW, TestApp, request};

async fn entered(app: &TestApp, building: Value) -> String {
    app.post("/v1/buildings", building).await.header("location").to_owned()
}

#[tokio::test]
async fn an_assessment_is_kept_as_it_was_served() {
    let app = TestApp::new().await;
    let building = entered(&app, two_rooms()).await;

    let reply = app.post(&format!("{building}/assessments"), json!({})).await;

    assert_eq!(reply.status, 201, "{}", reply.text());
    let path = reply.header("location").to_owned();
    assert_eq!(path, "/v1/assessments/019ac000-0000-7000-8000-000000000002");
    let report = reply.value();
    for (member, value) in [
        ("assessment_id", json!("019ac000-0000-7000-8000-000000000002")),
        ("building_id", json!("019ac000-0000-7000-8000-000000000001")),
        ("building_revision", json!(1)),
        ("level", json!("transient")),
        ("rating_rule", json!(2)),
        ("created_at", json!(NOW)),
    ] {
        assert_eq!(report[member], value, "{member}");
    }
    assert_eq!(report["rooms"].as_array().unwrap().len(), 2);
    for path in [path, format!("{building}/assessments/latest")] {
        let read = app.get(&path).await;
        assert_eq!(read.status, 200);
        assert_eq!(read.body, reply.body, "the very bytes");
        assert_eq!(read.etag(), reply.etag());
    }
}

#[tokio::test]
async fn the_body_may_be_left_out() {
    let app = TestApp::new().await;
    let path = format!("{}/assessments", entered(&app, small()).await);

    let without = app.send(request(Method::POST, &path).body(Body::empty()).unwrap()).await;
    let with = app.post(&path, json!({ "assumptions": {} })).await;

    assert_eq!(without.status, 201, "{}", without.text());
    assert_eq!(findings(without.value()), findings(with.value()));
    app.raw(Method::POST, &path, &[], b" ").await.problem(400, "unreadable");
}

#[tokio::test]
async fn the_same_inputs_give_the_same_findings() {
    let app = TestApp::new().await;
    let path = format!("{}/assessments", entered(&app, full()).await);

    let first = app.post(&path, json!({})).await.expect(201);
    let second = app.post(&path, json!({})).await.expect(201);

    assert_ne!(first["assessment_id"], second["assessment_id"]);
    assert_eq!(findings(first), findings(second));
}

#[tokio::test]
async fn nothing_is_kept_of_a_building_that_is_only_sent() {
    let app = TestApp::new().await;

    let reply =
        app.post("/v1/assess", json!({ "building": full(), "assumptions": { "level": "screening" } })).await;
    let report = reply.expect(200);

    assert_eq!((&report["assessment_id"], &report["building_id"]), (&Value::Null, &Value::Null));
    assert_eq!(report["rooms"][0]["key"], "store");
    assert_eq!(app.get("/v1/buildings").await.value()["items"], json!([]));
}

#[tokio::test]
async fn a_building_sent_and_a_building_kept_are_found_alike() {
    let app = TestApp::new().await;
    let building = entered(&app, full()).await;

    let kept = app.post(&format!("{building}/assessments"), json!({})).await.expect(201);
    let sent = app.post("/v1/assess", json!({ "building": full() })).await.expect(200);

    assert_eq!(findings(kept), findings(sent));
}

#[tokio::test]
async fn a_room_report_comes_out_of_the_stored_document() {
    let app = TestApp::new().await;
    let building = entered(&app, two_rooms()).await;
    let reply = app.post(&format!("{building}/assessments"), json!({})).await;
    let (path, whole) = (reply.header("location").to_owned(), reply.value());

    // The building is gone by then: the assessment is a record of its own.
    assert_eq!(app.delete(&building, "*").await.status, 204);
    let report = app.get(&format!("{path}/rooms/shop")).await.expect(200);

    assert_eq!((&report["key"], &report["assessment_id"]), (&json!("shop"), &whole["assessment_id"]));
    assert_eq!(report["flashover"], whole["rooms"][1]["flashover"]);
    for member in
        ["backdraft", "entry", "timeline", "assumptions", "methods", "cautions", "headline", "series"]
    {
        assert!(report.get(member).is_some(), "{member}");
    }
    app.get(&format!("{path}/rooms/cellar")).await.problem(404, "not-found");
    app.get(&format!("{path}/rooms/No%20Key")).await.problem(404, "not-found");
}

#[tokio::test]
async fn an_assessment_never_changes_and_says_so() {
    let app = TestApp::new().await;
    let building = entered(&app, small()).await;
    let reply = app.post(&format!("{building}/assessments"), json!({})).await;
    let (path, tag) = (reply.header("location").to_owned(), reply.etag().to_owned());

    for (path, cache) in [
        (path.clone(), "private, max-age=31536000, immutable"),
        (format!("{path}/rooms/store"), "private, max-age=31536000, immutable"),
        (format!("{building}/assessments/latest"), "private, no-cache"),
    ] {
        assert_eq!(app.get(&path).await.header("cache-control"), cache);
        let again = app.get_with(&path, &[("If-None-Match", &tag)]).await;
        assert_eq!((again.status, again.body.len(), again.etag()), (304, 0, tag.as_str()), "{path}");
    }
    for method in [Method::PUT, Method::PATCH, Method::DELETE] {
        let reply = app.send(request(method, &path).body(Body::empty()).unwrap()).await;
        reply.problem(405, "method-not-allowed");
        assert_eq!(reply.header("allow"), "GET,HEAD");
    }
}

#[tokio::test]
async fn lists_say_what_is_stale_and_the_newest_comes_first() {
    let app = TestApp::new().await;
    let building = entered(&app, small()).await;
    let path = format!("{building}/assessments");
    app.get(&format!("{path}/latest")).await.problem(404, "not-found");
    app.post(&path, json!({})).await.expect(201);
    app.patch(&building, "*", json!({ "notes": "changed" })).await.expect(200);
    app.post(&path, json!({})).await.expect(201);

    let list = app.get(&path).await.expect(200);

    let items = list["items"].as_array().unwrap();
    let seen: Vec<_> = items.iter().map(|item| (&item["building_revision"], &item["stale"])).collect();
    assert_eq!(seen, [(&json!(2), &json!(false)), (&json!(1), &json!(true))]);
    let first = app.get(&format!("{path}?limit=1")).await.expect(200);
    assert_eq!(first["items"][0], items[0]);
    let second = app.get(first["next"].as_str().unwrap()).await.expect(200);
    assert_eq!(second["items"][0], items[1]);
    assert_eq!(second["next"], Value::Null);
    app.get(&format!("{path}?cursor=31")).await.problem(400, "invalid-parameter");
    let summary = app.get("/v1/buildings").await.value()["items"][0].clone();
    assert_eq!(summary["worst"]["stale"], json!(false));
    assert_eq!(summary["worst"]["flashover"]["room"], "store");
    let latest = app.get(&building).await.value()["links"]["latest_assessment"].clone();
    assert_eq!(latest, format!("{path}/latest"));
    assert_eq!(app.get(latest.as_str().unwrap()).await.value()["assessment_id"], items[0]["id"]);
}

#[tokio::test]
async fn a_level_that_is_not_there_yet_is_refused_and_not_replaced() {
    let app = TestApp::new().await;
    let building = entered(&app, small()).await;

    {
        let body = json!({ "assumptions": { "level": "sampled" } });
        let kept = app.post(&format!("{building}/assessments"), body.clone()).await;
        let sent = app.post("/v1/assess", set(body, "/building", small())).await;

        for reply in [kept, sent] {
            let problem = reply.problem(422, "invalid");
            assert_eq!(reply.pointers(), ["/assumptions/level"]);
            assert!(
                problem["errors"][0]["detail"].as_str().unwrap().contains("not available in this version")
            );
            assert_eq!(problem["errors"][0]["suggestion"], "transient");
        }
    }
}

#[tokio::test]
async fn assumptions_are_checked_and_echoed() {
    let app = TestApp::new().await;
    let path = format!("{}/assessments", entered(&app, small()).await);
    let assumptions = json!({ "level": "screening", "growth": "fast", "fuel_load_fractile": 0.95, "scenarios": ["as_found", "shut"], "seed": 7 });

    let report = app.post(&path, json!({ "assumptions": assumptions })).await.expect(201);
    let echoed = &report["requested"];
    for (member, value) in assumptions.as_object().unwrap() {
        assert_eq!(&echoed[member], value, "{member}");
    }
    for (member, value) in [
        ("level", json!("deep")),
        ("growth", json!("furious")),
        ("fuel_load_fractile", json!(1.5)),
        ("scenarios", json!(["as_found", "arson"])),
        ("horizon_s", json!(-1)),
        ("seed", json!(-1)),
        ("colour", json!("red")),
        ("response", json!({ "travel_s": "three" })),
    ] {
        let reply = app.post(&path, json!({ "assumptions": { member: value } })).await;
        reply.problem(422, "invalid");
        assert!(reply.pointers()[0].starts_with(&format!("/assumptions/{member}")), "{}", reply.text());
    }
}

#[tokio::test]
async fn the_largest_building_fits_the_interactive_budget_by_screening() {
    let app = TestApp::new().await;
    let rooms: Vec<_> = (0..500).map(|number| room(&format!("r{number}"))).collect();

    let assumptions = json!({ "level": "screening" });
    let asked = json!({ "building": { "name": "All", "rooms": rooms }, "assumptions": assumptions });
    let reply = app.post("/v1/assess", asked).await;

    assert_eq!(reply.status, 200, "{}", &reply.text()[..reply.text().len().min(500)]);
    assert_eq!(reply.value()["rooms"].as_array().unwrap().len(), 500);
}

#[tokio::test]
async fn work_above_the_budget_is_refused() {
    let app = TestApp::with(|parts| parts.interactive_steps = 1).await;
    let building = entered(&app, two_rooms()).await;

    app.post(&format!("{building}/assessments"), json!({})).await.problem(422, "over-budget");

    assert_eq!(app.get(&format!("{building}/assessments")).await.value()["items"], json!([]));
}

#[tokio::test]
async fn a_full_lane_is_503_with_a_time_to_come_back() {
    let compute = Compute::with(NonZeroUsize::MIN, 1).unwrap();
    let (held, queued) = (compute.clone(), compute.clone());
    let app = TestApp::with(|parts| parts.compute = compute.clone()).await;
    let (release, wait) = std::sync::mpsc::channel::<()>();
    let first =
        tokio::spawn(
            async move { held.run(Lane::Interactive, move |_| wait.recv().unwrap_or_default()).await },
        );
    while compute.load().running == 0 {
        tokio::task::yield_now().await;
    }
    let second = tokio::spawn(async move { queued.run(Lane::Interactive, |_| ()).await });
    while compute.load().interactive_waiting == 0 {
        tokio::task::yield_now().await;
    }

    let reply = app.post("/v1/assess", json!({ "building": small() })).await;
    release.send(()).unwrap();

    reply.problem(503, "overloaded");
    assert!(reply.header("retry-after").parse::<u32>().is_ok_and(|seconds| seconds > 0));
    first.await.unwrap().unwrap();
    second.await.unwrap().unwrap();
}
