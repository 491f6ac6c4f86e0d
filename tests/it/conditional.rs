//! Conditional requests: 304, 412, 428, tags that survive compression, one winner of eight.

use axum::body::Body;
use axum::http::Method;
use serde_json::json;

use crate::fixtures::small;
use crate::support::{TestApp, request, with_headers};

async fn entered(app: &TestApp) -> String {
    app.post("/v1/buildings", small()).await.header("location").to_owned()
}

#[tokio::test]
async fn if_none_match_gives_304_with_the_tag_and_no_body() {
    let app = TestApp::new().await;
    let path = entered(&app).await;

    for (tags, status) in [
        ("\"1\"", 304),
        ("W/\"1\"", 304),
        ("\"0\", \"1\"", 304),
        ("*", 304),
        ("\"1-gzip\"", 304),
        ("\"2\"", 200),
        ("1", 200),
        ("\"\"", 200),
    ] {
        for path in [path.clone(), format!("{path}/rooms/store"), format!("{path}/openings/d")] {
            let reply = app.get_with(&path, &[("If-None-Match", tags)]).await;

            assert_eq!((reply.status, reply.etag()), (status, "\"1\""), "{tags}");
            assert_eq!(reply.body.is_empty(), status == 304, "{tags}");
        }
    }
}

#[tokio::test]
async fn a_change_without_if_match_is_428() {
    let app = TestApp::new().await;
    let path = entered(&app).await;

    for reply in [
        app.json(Method::PUT, &path, &[], small()).await,
        app.json(Method::PATCH, &path, &[], json!({})).await,
        app.send(request(Method::DELETE, &path).body(Body::empty()).unwrap()).await,
    ] {
        let problem = reply.problem(428, "precondition-required");
        assert_eq!(problem["errors"][0]["header"], "If-Match");
    }
    assert_eq!(app.get(&path).await.etag(), "\"1\"");
}

#[tokio::test]
async fn a_stale_tag_is_412_and_the_answer_has_the_present_one() {
    let app = TestApp::new().await;
    let path = entered(&app).await;
    app.patch(&path, "\"1\"", json!({ "notes": "x" })).await.expect(200);

    for tags in ["\"1\"", "\"3\"", "\"\"", "2", "nonsense", "\"2", "W/2", ""] {
        for reply in [
            app.put(&path, tags, small()).await,
            app.patch(&path, tags, json!({})).await,
            app.delete(&path, tags).await,
        ] {
            reply.problem(412, "precondition-failed");
            assert_eq!(reply.etag(), "\"2\"", "{tags}");
        }
    }
    assert_eq!(app.get(&path).await.etag(), "\"2\"");
}

#[tokio::test]
async fn if_match_takes_a_list_a_weakened_tag_and_a_star() {
    let app = TestApp::new().await;
    let path = entered(&app).await;

    for (revision, tags) in
        ["\"1\"", "W/\"2\"", "\"9\", \"3\"", "*", "\"5-gzip\"", "\"x,y\",\"6\""].iter().enumerate()
    {
        let reply = app.patch(&path, tags, json!({ "notes": tags })).await;

        assert_eq!((reply.status, reply.etag()), (200, format!("\"{}\"", revision + 2).as_str()), "{tags}");
    }
}

#[tokio::test]
async fn several_headers_count_as_one_list() {
    let app = TestApp::new().await;
    let path = entered(&app).await;

    let headers = [("If-Match", "\"9\""), ("If-Match", "\"1\""), ("Content-Type", "application/json")];
    let request = with_headers(request(Method::PATCH, &path), &headers);
    let reply = app.send(request.body(Body::from("{}")).unwrap()).await;

    assert_eq!(reply.status, 200, "{}", reply.text());
}

#[tokio::test]
async fn a_put_that_wants_to_create_what_is_there_is_412() {
    let app = TestApp::new().await;
    let path = entered(&app).await;

    app.create(&path, small()).await.problem(412, "precondition-failed");
}

#[tokio::test]
async fn compression_keeps_the_tag_and_if_match_takes_it() {
    let app = TestApp::new().await;
    let base = app.serve().await;
    let client = reqwest::Client::new();
    let path = format!("{base}{}", entered(&app).await);

    let read = client.get(&path).header("Accept-Encoding", "gzip").send().await.unwrap();
    assert_eq!(read.headers()["content-encoding"], "gzip");
    let tag = read.headers()["etag"].to_str().unwrap().to_owned();
    let weakened = format!("W/{tag}");
    let patch = |tag: String| {
        let body = json!({ "notes": tag }).to_string();
        let request = client.patch(&path).header("If-Match", &tag);
        request.header("Content-Type", "application/merge-patch+json").body(body).send()
    };
    let changed = patch(tag.clone()).await.unwrap();

    assert_eq!(tag, "\"1\"");
    assert_eq!(changed.status(), 200);
    assert_eq!(patch(weakened).await.unwrap().status(), 412, "stale now");
    assert_eq!(patch("W/\"2\"".to_owned()).await.unwrap().status(), 200);
    let fresh = client.get(&path).header("Accept-Encoding", "gzip").header("If-None-Match", "\"3\"");
    assert_eq!(fresh.send().await.unwrap().status(), 304);
}

#[tokio::test(flavor = "multi_thread", worker_threads = 4)]
async fn of_eight_with_one_tag_exactly_one_wins() {
    let app = TestApp::new().await;
    let path = entered(&app).await;
    let room = format!("{path}/rooms/store");
    let base = app.serve().await;

    for (path, method) in [(&path, Method::PUT), (&path, Method::PATCH), (&room, Method::PATCH)] {
        let tag = app.get(path).await.etag().to_owned();
        let barrier = std::sync::Arc::new(tokio::sync::Barrier::new(8));
        let mut threads = Vec::new();
        for number in 0..8 {
            let (url, barrier, tag, method) =
                (format!("{base}{path}"), barrier.clone(), tag.clone(), method.clone());
            threads.push(tokio::spawn(async move {
                let name = format!("writer {number}");
                let body = match method {
                    Method::PUT => crate::fixtures::set(small(), "/name", json!(name)),
                    _ => json!({ "name": name }),
                };
                let request = reqwest::Client::new().request(method, url).header("If-Match", tag).json(&body);
                barrier.wait().await;
                (request.send().await.unwrap().status().as_u16(), name)
            }));
        }
        let mut winners = Vec::new();
        for thread in threads {
            match thread.await.unwrap() {
                (200, name) => winners.push(name),
                (status, _) => assert_eq!(status, 412),
            }
        }
        assert_eq!(winners.len(), 1, "{winners:?}");
        assert_eq!(app.get(path).await.value()["name"], json!(winners[0]));
    }
}
