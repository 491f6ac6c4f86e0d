//! The documents page, the pages of problems, the OpenAPI document.

use crate::support::TestApp;

#[tokio::test]
async fn the_root_leads_to_the_documents() {
    let app = TestApp::new().await;

    for path in ["/", "/docs"] {
        let reply = app.get(path).await;

        assert_eq!((reply.status, reply.header("location")), (303, "/docs/"), "{path}");
    }
}

#[tokio::test]
async fn the_documents_page_needs_nothing_from_outside() {
    let app = TestApp::new().await;
    let page = app.get("/docs/").await;
    assert_eq!(page.status, 200);
    assert!(page.header("content-type").starts_with("text/html"));
    assert!(page.header("content-security-policy").contains("default-src 'self'"));
    let script = app.get("/docs/swagger-initializer.js").await;
    assert!(script.text().contains("/openapi.json"), "{}", script.text());
    assert!(script.text().contains(r#""validatorUrl": "none""#), "{}", script.text());

    let mut files = 0;
    for part in page.text().split(['"', '\'']).filter(|part| part.ends_with(".js") || part.ends_with(".css"))
    {
        assert!(!part.contains("//"), "{part} is elsewhere");
        let file = app.get(&format!("/docs/{}", part.trim_start_matches("./"))).await;
        assert_eq!(file.status, 200, "{part}");
        files += 1;
    }
    assert!(files >= 4, "the page loads its script and style, so there are some: {}", page.text());
}

#[tokio::test]
async fn every_kind_of_problem_has_its_page() {
    let app = TestApp::new().await;
    // The closed list of the wire contract.
    let slugs = [
        "unreadable",
        "invalid-parameter",
        "unauthenticated",
        "forbidden",
        "not-found",
        "method-not-allowed",
        "not-acceptable",
        "conflict",
        "precondition-failed",
        "too-large",
        "unsupported-media-type",
        "invalid",
        "over-budget",
        "precondition-required",
        "rate-limited",
        "internal",
        "overloaded",
    ];
    let list = app.get("/problems").await;

    for slug in slugs {
        let page = app.get(&format!("/problems/{slug}")).await;

        assert_eq!(page.status, 200, "{slug}");
        assert!(page.header("content-type").starts_with("text/html"));
        assert!(page.text().contains("<html lang=\"en\">") && page.text().contains("<h1>"));
        assert!(list.text().contains(&format!("\"/problems/{slug}\"")), "{slug} is not listed");
    }
    assert_eq!(list.text().matches("<li>").count(), slugs.len());
}

#[tokio::test]
async fn the_document_leaves_out_probes_metrics_and_pages() {
    let app = TestApp::new().await;

    let document = app.get("/openapi.json").await.expect(200);

    assert_eq!(document["openapi"], "3.1.0");
    for path in document["paths"].as_object().unwrap().keys() {
        assert!(path.starts_with("/v1/"), "{path}");
    }
}
