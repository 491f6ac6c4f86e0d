//! What holds everywhere: unknown addresses, methods, media, request ids, panics.

use axum::body::Body;
use axum::http::Method;
use axum::http::header::ALLOW;

use crate::support::{TestApp, request, with_headers};

#[tokio::test]
async fn an_unknown_address_is_a_problem() {
    let app = TestApp::new().await;

    for path in ["/nothing", "/v1", "/v2/buildings", "/docs/no-such-file.js", "/problems/no-such"] {
        app.get(path).await.problem(404, "not-found");
    }
}

#[tokio::test]
async fn a_problem_names_the_path_and_the_request() {
    let app = TestApp::new().await;

    let reply = app.get_with("/nothing?x=1", &[("X-Request-Id", "abc-1")]).await;

    assert_eq!(reply.problem(404, "not-found")["instance"], "/nothing#abc-1");
    assert_eq!(reply.header("x-request-id"), "abc-1");
}

#[tokio::test]
async fn an_id_that_does_not_belong_in_a_log_is_replaced() {
    let app = TestApp::new().await;

    for id in ["", "a b", "<script>", &"x".repeat(129)] {
        let reply = app.get_with("/nothing", &[("X-Request-Id", id)]).await;

        assert_eq!(reply.header("x-request-id"), uuid::Uuid::nil().to_string(), "{id:?}");
    }
}

#[tokio::test]
async fn a_method_not_taken_is_answered_with_those_that_are() {
    let app = TestApp::new().await;

    let reply = app.send(request(Method::POST, "/healthz").body(Body::empty()).unwrap()).await;

    reply.problem(405, "method-not-allowed");
    assert_eq!(reply.header(ALLOW), "GET,HEAD");
}

#[tokio::test]
async fn options_lists_the_methods() {
    let app = TestApp::new().await;

    let reply = app.send(request(Method::OPTIONS, "/openapi.json").body(Body::empty()).unwrap()).await;

    assert_eq!((reply.status, reply.header(ALLOW)), (204, "GET,HEAD"));
}

#[tokio::test]
async fn head_is_get_without_the_body() {
    let app = TestApp::new().await;

    for (path, status) in [("/openapi.json", 200), ("/nothing", 404), ("/problems/invalid", 200)] {
        let get = app.get(path).await;
        let head = app.send(request(Method::HEAD, path).body(Body::empty()).unwrap()).await;

        assert_eq!((head.status, head.body.len()), (status, 0), "{path}");
        assert_eq!(head.header("content-type"), get.header("content-type"));
        assert_eq!(head.header("content-length"), get.body.len().to_string());
    }
}

#[tokio::test]
async fn the_probes_answer() {
    let app = TestApp::new().await;

    for path in ["/healthz", "/readyz"] {
        let reply = app.get(path).await;

        assert_eq!((reply.status, reply.text()), (200, "ok\n"));
    }
}

#[tokio::test]
async fn an_inventory_that_is_closed_is_not_ready_but_lives() {
    let app = TestApp::new().await;
    app.store.close().await.unwrap();

    app.get("/readyz").await.problem(503, "overloaded");

    assert_eq!(app.get("/healthz").await.status, 200);
}

#[tokio::test]
async fn requests_are_counted_by_template() {
    let app = TestApp::new().await;
    app.get("/problems/invalid").await;
    app.get("/problems/conflict").await;
    app.get("/nothing").await;

    let reply = app.get("/metrics").await;

    assert_eq!(reply.header("content-type"), "text/plain; version=0.0.4; charset=utf-8");
    for line in [
        r#"sootline_http_requests_total{route="/problems/{slug}",method="GET",status="200"} 2"#,
        r#"sootline_http_requests_total{route="none",method="GET",status="404"} 1"#,
        r#"sootline_compute_waiting{lane="interactive"} 0"#,
        "sootline_store_writes_waiting 0",
    ] {
        assert!(reply.text().lines().any(|l| l == line), "{line}\nnot in\n{}", reply.text());
    }
}

#[tokio::test]
async fn answers_are_compressed_for_those_who_take_it() {
    let app = TestApp::new().await;

    let request = with_headers(request(Method::GET, "/openapi.json"), &[("Accept-Encoding", "gzip")]);
    let reply = app.send(request.body(Body::empty()).unwrap()).await;

    assert_eq!(reply.header("content-encoding"), "gzip");
    assert!(reply.header("vary").to_ascii_lowercase().contains("accept-encoding"));
}
