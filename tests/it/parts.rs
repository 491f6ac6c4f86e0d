//! Rooms and openings at their own addresses.

use serde_json::{Value, json};

use crate::fixtures::{door, room, set, two_rooms};
use crate::support::TestApp;

async fn entered(app: &TestApp) -> String {
    app.post("/v1/buildings", two_rooms()).await.header("location").to_owned()
}

#[tokio::test]
async fn a_part_is_read_with_the_revision_in_which_it_last_changed() {
    let app = TestApp::new().await;
    let building = entered(&app).await;

    for (part, key) in [("rooms/store", "store"), ("openings/d", "d")] {
        let reply = app.get(&format!("{building}/{part}")).await;

        assert_eq!((reply.status, reply.etag()), (200, "\"1\""), "{}", reply.text());
        assert_eq!(reply.value()["key"], key);
    }
    let whole = app.get(&building).await.value();
    assert_eq!(app.get(&format!("{building}/rooms/shop")).await.value(), whole["rooms"][1]);
    assert_eq!(app.get(&format!("{building}/openings/inner")).await.value(), whole["openings"][1]);
}

#[tokio::test]
async fn work_on_two_rooms_never_collides() {
    let app = TestApp::new().await;
    let building = entered(&app).await;
    let (store, shop) = (format!("{building}/rooms/store"), format!("{building}/rooms/shop"));

    let first = app.patch(&store, "\"1\"", json!({ "name": "A" })).await;
    let second = app.patch(&shop, "\"1\"", json!({ "name": "B" })).await;
    let stale = app.patch(&store, "\"1\"", json!({ "name": "C" })).await;

    assert_eq!((first.status, first.etag()), (200, "\"2\""), "{}", first.text());
    assert_eq!((second.status, second.etag()), (200, "\"3\""), "{}", second.text());
    stale.problem(412, "precondition-failed");
    assert_eq!(stale.etag(), "\"2\"");
    assert_eq!(app.get(&building).await.etag(), "\"3\"");
    assert_eq!(app.get(&store).await.etag(), "\"2\"");
}

#[tokio::test]
async fn what_get_gives_of_a_part_put_takes() {
    let app = TestApp::new().await;
    let building = entered(&app).await;

    for part in ["rooms/store", "openings/d"] {
        let path = format!("{building}/{part}");
        let read = app.get(&path).await;
        let put = app.put(&path, read.etag(), read.value()).await;

        assert_eq!(put.status, 200, "{}", put.text());
        assert_eq!(put.value(), read.value());
        assert_ne!(put.etag(), read.etag(), "of several with one tag one wins, also when they send the same");
    }
}

#[tokio::test]
async fn a_new_part_is_put_with_if_none_match() {
    let app = TestApp::new().await;
    let building = entered(&app).await;
    let (attic, hatch) = (format!("{building}/rooms/attic"), format!("{building}/openings/hatch"));
    let body = json!({ "key": "hatch", "kind": "hatch", "connects": ["store", "attic"], "width_m": 0.6, "height_m": 0.6 });

    app.put(&attic, "\"1\"", room("attic")).await.problem(412, "precondition-failed");
    let made = app.create(&attic, room("attic")).await;
    app.create(&attic, room("attic")).await.problem(412, "precondition-failed");
    let joined = app.create(&hatch, body).await;

    assert_eq!((made.status, made.etag()), (200, "\"2\""), "{}", made.text());
    assert_eq!((joined.status, joined.etag()), (200, "\"3\""), "{}", joined.text());
    let whole = app.get(&building).await.value();
    assert_eq!(whole["rooms"].as_array().unwrap().len(), 3);
    assert_eq!(whole["openings"][2]["connects"], json!(["store", "attic"]));
}

#[tokio::test]
async fn a_put_without_a_condition_is_428_for_old_and_new() {
    let app = TestApp::new().await;
    let building = entered(&app).await;

    for (path, body, header) in [
        (format!("{building}/rooms/store"), room("store"), "If-Match"),
        (format!("{building}/rooms/new"), room("new"), "If-None-Match"),
        (format!("{building}/openings/d"), door("d", "store", "outside"), "If-Match"),
        (format!("{building}/openings/new"), door("new", "shop", "outside"), "If-None-Match"),
    ] {
        let reply = app.json(axum::http::Method::PUT, &path, &[], body).await;

        assert_eq!(reply.problem(428, "precondition-required")["errors"][0]["header"], header);
    }
}

#[tokio::test]
async fn a_room_that_openings_join_is_not_deleted() {
    let app = TestApp::new().await;
    let building = entered(&app).await;

    let reply = app.delete(&format!("{building}/rooms/store"), "\"1\"").await;

    let problem = reply.problem(409, "conflict");
    let named = problem["detail"].as_str().unwrap();
    assert!(named.contains('d') && named.contains("inner"), "{named}");
    assert_eq!(problem["errors"].as_array().unwrap().len(), 2);
    assert_eq!(app.get(&building).await.etag(), "\"1\"");
}

#[tokio::test]
async fn parts_are_deleted_one_after_the_other() {
    let app = TestApp::new().await;
    let building = entered(&app).await;

    assert_eq!(app.delete(&format!("{building}/openings/inner"), "\"1\"").await.status, 204);
    assert_eq!(app.delete(&format!("{building}/rooms/shop"), "\"1\"").await.status, 204);

    app.get(&format!("{building}/rooms/shop")).await.problem(404, "not-found");
    app.get(&format!("{building}/openings/inner")).await.problem(404, "not-found");
    app.delete(&format!("{building}/openings/inner"), "*").await.problem(404, "not-found");
    assert_eq!(app.get(&building).await.value()["rooms"].as_array().unwrap().len(), 1);
}

#[tokio::test]
async fn a_room_is_checked_with_the_openings_that_join_it() {
    let app = TestApp::new().await;
    let building = entered(&app).await;
    let path = format!("{building}/rooms/store");

    // Two doors of 2.0 m join it.
    let put = app.put(&path, "*", set(room("store"), "/height_m", json!(1.9))).await;
    let patched = app.patch(&path, "*", json!({ "height_m": 1.9 })).await;

    for reply in [put, patched] {
        let problem = reply.problem(422, "invalid");
        let errors = problem["errors"].as_array().unwrap();
        assert_eq!(errors.len(), 2, "{problem}");
        for (error, opening) in errors.iter().zip(["d", "inner"]) {
            assert!(error["detail"].as_str().unwrap().contains(&format!("`{opening}`")), "{error}");
        }
    }
    assert_eq!(app.get(&path).await.etag(), "\"1\"");
}

#[tokio::test]
async fn faults_of_a_part_are_pointed_at_in_its_own_body() {
    let app = TestApp::new().await;
    let building = entered(&app).await;
    let shop = format!("{building}/rooms/shop");
    let inner = format!("{building}/openings/inner");

    for (reply, pointer) in [
        (app.put(&shop, "*", set(room("shop"), "/length_m", json!(1e9))).await, "/length_m"),
        (app.patch(&shop, "*", json!({ "length_m": -1 })).await, "/length_m"),
        (app.put(&shop, "*", room("other")).await, "/key"),
        (app.patch(&shop, "*", json!({ "key": "other" })).await, "/key"),
        (app.put(&inner, "*", door("inner", "store", "nowhere")).await, "/connects/1"),
        (app.put(&inner, "*", set(door("inner", "store", "shop"), "/width_m", json!(4))).await, "/width_m"),
        (app.patch(&inner, "*", json!({ "connects": ["shop", "shop"] })).await, "/connects"),
        (app.patch(&inner, "*", json!({ "colour": "red" })).await, "/colour"),
    ] {
        reply.problem(422, "invalid");
        assert_eq!(reply.pointers().first().map(String::as_str), Some(pointer), "{}", reply.text());
    }
    assert_eq!(app.get(&building).await.etag(), "\"1\"");
}

#[tokio::test]
async fn a_key_that_is_none_is_not_found() {
    let app = TestApp::new().await;
    let building = entered(&app).await;

    for key in ["Store", "a%20b", "%FF", "-a", &"x".repeat(65)] {
        for part in ["rooms", "openings"] {
            let path = format!("{building}/{part}/{key}");
            app.get(&path).await.problem(404, "not-found");
            app.create(&path, room("store")).await.problem(404, "not-found");
        }
    }
}

#[tokio::test]
async fn the_outside_is_no_room() {
    let app = TestApp::new().await;
    let building = entered(&app).await;
    let path = format!("{building}/rooms/outside");

    app.get(&path).await.problem(404, "not-found");
    let reply = app.create(&path, room("outside")).await;

    reply.problem(422, "invalid");
    assert_eq!(reply.pointers(), ["/key"]);
}

#[tokio::test]
async fn a_room_without_any_way_in_is_no_error() {
    let app = TestApp::new().await;

    let building = json!({ "name": "Vault", "rooms": [room("vault")] });
    let saved = app.post("/v1/buildings", building).await.expect(201);

    assert_eq!(saved["openings"], Value::Array(Vec::new()));
}
