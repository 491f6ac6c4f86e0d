//! Buildings: entered, read, replaced, changed, deleted, listed.

use axum::http::Method;
use serde_json::{Value, json};

use crate::fixtures::{self, full, set, small, with_reference};
use crate::support::{NOW, TestApp};

#[tokio::test]
async fn an_entered_building_is_there_under_its_location() {
    let app = TestApp::new().await;

    let reply = app.post("/v1/buildings", small()).await;

    assert_eq!(reply.status, 201, "{}", reply.text());
    assert_eq!(reply.header("location"), "/v1/buildings/019ac000-0000-7000-8000-000000000001");
    assert_eq!(reply.etag(), "\"1\"");
    let building = reply.value();
    for (member, value) in [
        ("id", json!("019ac000-0000-7000-8000-000000000001")),
        ("revision", json!(1)),
        ("schema", json!(1)),
        ("name", json!("Harbour Row 12")),
        ("created_at", json!(NOW)),
        ("updated_at", json!(NOW)),
        ("updated_by", json!("local")),
        ("reference", Value::Null),
    ] {
        assert_eq!(building[member], value, "{member}");
    }
    let read = app.get(reply.header("location")).await;
    assert_eq!((read.status, read.etag()), (200, "\"1\""));
    assert_eq!(read.value(), building);
    assert_eq!(read.header("cache-control"), "private, no-cache");
    assert_eq!(building["links"]["self"], reply.header("location"));
}

#[tokio::test]
async fn what_was_sent_is_echoed_exactly() {
    let app = TestApp::new().await;

    let building = app.post("/v1/buildings", full()).await.expect(201);

    assert_contains(&building, &full(), "");
}

/// Everything in `part` is in `whole`, with the same values.
#[track_caller]
fn assert_contains(whole: &Value, part: &Value, at: &str) {
    match (whole, part) {
        (Value::Object(members), Value::Object(wanted)) => {
            for (name, value) in wanted {
                let found = members.get(name).unwrap_or_else(|| panic!("no {at}/{name}"));
                assert_contains(found, value, &format!("{at}/{name}"));
            }
        }
        (Value::Array(items), Value::Array(wanted)) => {
            assert_eq!(items.len(), wanted.len(), "{at}");
            for (index, (found, value)) in items.iter().zip(wanted).enumerate() {
                assert_contains(found, value, &format!("{at}/{index}"));
            }
        }
        (Value::Number(found), Value::Number(wanted)) => {
            assert_eq!(found.as_f64(), wanted.as_f64(), "{at}");
        }
        (found, wanted) => assert_eq!(found, wanted, "{at}"),
    }
}

#[tokio::test]
async fn what_get_gives_put_takes_and_nothing_changes_but_the_revision() {
    let app = TestApp::new().await;
    for building in [small(), full()] {
        let building = set(building, "/reference", Value::Null);
        let path = app.post("/v1/buildings", building).await.header("location").to_owned();
        let read = app.get(&path).await;

        let put = app.put(&path, read.etag(), read.value()).await;

        assert_eq!((put.status, put.etag()), (200, "\"2\""), "{}", put.text());
        assert_eq!(put.value(), set(read.value(), "/revision", json!(2)));
        assert_eq!(app.get(&path).await.value(), put.value());
    }
}

#[tokio::test]
async fn quantities_may_be_written_with_a_unit() {
    let app = TestApp::new().await;
    let building = set(small(), "/rooms/0/length_m", json!("12 ft 6 in"));
    let building = set(building, "/openings/0/width_m", json!("36 in"));

    let saved = app.post("/v1/buildings", building).await.expect(201);

    // An inch is 0.0254 m by definition: 150 in and 36 in.
    assert_eq!(saved["rooms"][0]["length_m"], json!(3.81));
    assert_eq!(saved["openings"][0]["width_m"], json!(0.9144));
}

#[tokio::test]
async fn a_put_replaces_and_a_patch_changes() {
    let app = TestApp::new().await;
    let path = app.post("/v1/buildings", with_reference("417-B")).await.header("location").to_owned();

    let patched = app.patch(&path, "\"1\"", json!({ "name": "New name", "notes": "n" })).await;
    let put = app.put(&path, "\"2\"", small()).await;

    assert_eq!((patched.status, patched.etag()), (200, "\"2\""), "{}", patched.text());
    assert_eq!(patched.value()["name"], "New name");
    assert_eq!(patched.value()["reference"], "417-B");
    assert_eq!((put.status, put.etag()), (200, "\"3\""));
    assert_eq!(put.value()["reference"], Value::Null);
    assert_eq!(put.value()["notes"], "");
}

#[tokio::test]
async fn null_in_a_patch_removes_and_what_is_required_cannot_be_removed() {
    let app = TestApp::new().await;
    let path = app.post("/v1/buildings", full()).await.header("location").to_owned();

    let removed = app.patch(&path, "*", json!({ "reference": null, "location": null })).await.expect(200);
    let refused = app.patch(&path, "*", json!({ "name": null })).await;

    assert_eq!((&removed["reference"], &removed["location"]), (&Value::Null, &Value::Null));
    assert_eq!(removed["rooms"], app.get(&path).await.value()["rooms"]);
    refused.problem(422, "invalid");
    assert_eq!(refused.pointers(), ["/name"]);
}

#[tokio::test]
async fn a_deleted_building_is_gone_and_frees_its_reference() {
    let app = TestApp::new().await;
    let path = app.post("/v1/buildings", with_reference("417-B")).await.header("location").to_owned();

    let reply = app.delete(&path, "\"1\"").await;

    assert_eq!((reply.status, reply.body.len()), (204, 0));
    app.get(&path).await.problem(404, "not-found");
    app.delete(&path, "*").await.problem(404, "not-found");
    assert_eq!(app.get("/v1/buildings").await.value()["items"], json!([]));
    app.post("/v1/buildings", with_reference("417-B")).await.expect(201);
}

#[tokio::test]
async fn a_reference_belongs_to_one_building() {
    let app = TestApp::new().await;
    app.post("/v1/buildings", with_reference("417-B")).await.expect(201);
    let other = app.post("/v1/buildings", small()).await.header("location").to_owned();

    for reply in [
        app.post("/v1/buildings", with_reference("417-B")).await,
        app.put(&other, "*", with_reference("417-B")).await,
        app.patch(&other, "*", json!({ "reference": "417-B" })).await,
    ] {
        reply.problem(409, "conflict");
        assert_eq!(reply.pointers(), ["/reference"]);
    }
    assert_eq!(app.get(&other).await.etag(), "\"1\"");
}

#[tokio::test]
async fn a_building_is_found_by_its_reference() {
    let app = TestApp::new().await;
    app.post("/v1/buildings", with_reference("417 B&C")).await.expect(201);
    app.post("/v1/buildings", with_reference("418")).await.expect(201);

    let found = app.get("/v1/buildings?reference=417%20B%26C").await.expect(200);
    let none = app.get("/v1/buildings?reference=9").await.expect(200);

    assert_eq!(found["items"].as_array().unwrap().len(), 1);
    assert_eq!(found["items"][0]["reference"], "417 B&C");
    assert_eq!(none["items"], json!([]));
}

#[tokio::test]
async fn items_of_the_list_are_summaries() {
    let app = TestApp::new().await;
    app.post("/v1/buildings", full()).await.expect(201);

    let list = app.get("/v1/buildings").await.expect(200);

    let item = list["items"][0].as_object().unwrap();
    let mut members: Vec<_> = item.keys().map(String::as_str).collect();
    members.sort_unstable();
    // As the wire contract lists them.
    let mut wanted = vec![
        "id",
        "reference",
        "name",
        "location",
        "occupancy_group",
        "rooms",
        "revision",
        "updated_at",
        "worst",
        "links",
    ];
    wanted.sort_unstable();
    assert_eq!(members, wanted);
    assert_eq!((&item["rooms"], &item["worst"]), (&json!(1), &Value::Null));
    assert_eq!((&list["next"], &list["next_cursor"]), (&Value::Null, &Value::Null));
}

#[tokio::test]
async fn a_list_is_walked_page_by_page_by_either_link() {
    let app = TestApp::new().await;
    for number in 0..5 {
        app.post("/v1/buildings", with_reference(&number.to_string())).await.expect(201);
    }

    let mut seen = Vec::new();
    let mut next = Some("/v1/buildings?limit=2".to_owned());
    while let Some(path) = next {
        let reply = app.get(&path).await;
        let link = reply.header("link").to_owned();
        let page = reply.expect(200);
        let items = page["items"].as_array().unwrap();
        assert!(items.len() <= 2);
        seen.extend(items.iter().map(|item| item["reference"].as_str().unwrap().to_owned()));
        next = page["next"].as_str().map(str::to_owned);
        match &next {
            Some(next) => {
                assert_eq!(link, format!("<{next}>; rel=\"next\""));
                assert_eq!(
                    *next,
                    format!("/v1/buildings?limit=2&cursor={}", page["next_cursor"].as_str().unwrap())
                );
            }
            None => assert_eq!(link, ""),
        }
    }
    assert_eq!(seen, ["0", "1", "2", "3", "4"]);
}

#[tokio::test]
async fn a_walk_neither_skips_nor_repeats_what_is_there_all_along() {
    let app = TestApp::new().await;
    let mut paths = Vec::new();
    for number in 0..4 {
        let reply = app.post("/v1/buildings", with_reference(&number.to_string())).await;
        paths.push(reply.header("location").to_owned());
    }
    let first = app.get("/v1/buildings?limit=2").await.expect(200);

    app.delete(&paths[0], "*").await;
    app.post("/v1/buildings", with_reference("new")).await.expect(201);
    app.patch(&paths[3], "*", json!({ "notes": "changed" })).await.expect(200);
    let second = app.get(first["next"].as_str().unwrap()).await.expect(200);

    let references = |page: &Value| -> Vec<String> {
        let items = page["items"].as_array().unwrap();
        items.iter().map(|item| item["reference"].as_str().unwrap().to_owned()).collect()
    };
    assert_eq!(references(&first), ["0", "1"]);
    assert_eq!(references(&second), ["2", "3"]);
}

#[tokio::test]
async fn parameters_are_judged_by_name() {
    let app = TestApp::new().await;

    for (query, parameter, code) in [
        ("colour=red", "colour", "unknown_parameter"),
        ("limit=0", "limit", "out_of_range"),
        ("limit=501", "limit", "out_of_range"),
        ("limit=-1", "limit", "out_of_range"),
        ("limit=ten", "limit", "out_of_range"),
        ("limit=", "limit", "out_of_range"),
        ("limit=5&limit=6", "limit", "duplicate"),
        ("cursor=nonsense", "cursor", "unknown_cursor"),
        ("cursor=6162", "cursor", "unknown_cursor"),
        ("cursor=019AC000000070008000000000000001", "cursor", "unknown_cursor"),
        ("limits=5", "limits", "unknown_parameter"),
    ] {
        let problem = app.get(&format!("/v1/buildings?{query}")).await.problem(400, "invalid-parameter");

        assert_eq!(problem["errors"][0]["parameter"], parameter, "{query}");
        assert_eq!(problem["errors"][0]["code"], code, "{query}");
    }
    let nearest = app.get("/v1/buildings?limits=5").await.value()["errors"][0]["suggestion"].clone();
    assert_eq!(nearest, "limit");
    for limit in [1, 500] {
        app.get(&format!("/v1/buildings?limit={limit}")).await.expect(200);
    }
}

#[tokio::test]
async fn members_that_the_service_sets_are_accepted_and_ignored() {
    let app = TestApp::new().await;
    let path = app.post("/v1/buildings", small()).await.header("location").to_owned();
    let mut building = small();
    for (member, value) in [
        ("id", json!("0")),
        ("revision", json!(99)),
        ("schema", json!(99)),
        ("created_at", json!("never")),
        ("updated_at", json!(null)),
        ("updated_by", json!("somebody else")),
        ("links", json!([])),
    ] {
        building[member] = value;
    }

    let saved = app.put(&path, "\"1\"", building).await.expect(200);

    assert_eq!(saved["id"], "019ac000-0000-7000-8000-000000000001");
    assert_eq!((&saved["revision"], &saved["updated_by"]), (&json!(2), &json!("local")));
}

#[tokio::test]
async fn a_malformed_id_is_not_found() {
    let app = TestApp::new().await;
    app.post("/v1/buildings", small()).await.expect(201);

    for id in [
        "417-B",
        "019AC000-0000-7000-8000-000000000001",
        "019ac00000007000800000000000000%201",
        "019ac000000070008000000000000001",
        "%7B019ac000-0000-7000-8000-000000000001%7D",
        "%FF",
        "%00",
    ] {
        app.get(&format!("/v1/buildings/{id}")).await.problem(404, "not-found");
        app.put(&format!("/v1/buildings/{id}"), "*", small()).await.problem(404, "not-found");
    }
}

#[tokio::test]
async fn json_of_any_charset_label_is_read() {
    let app = TestApp::new().await;
    let headers = [("Content-Type", "Application/JSON; charset=latin1")];

    let request =
        crate::support::with_headers(crate::support::request(Method::POST, "/v1/buildings"), &headers);
    let reply = app.send(request.body(axum::body::Body::from(fixtures::small().to_string())).unwrap()).await;

    assert_eq!(reply.status, 201, "{}", reply.text());
}
