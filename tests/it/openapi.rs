//! The committed OpenAPI document.

use std::path::Path;

/// Set it to write the document anew.
const RENEW: &str = "SOOTLINE_RENEW_OPENAPI";

#[test]
fn the_committed_document_is_the_present_one() {
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("openapi/sootline.json");
    let present = sootline::http::openapi_text();
    if std::env::var_os(RENEW).is_some() {
        std::fs::write(&path, present).unwrap();
    }

    let committed = std::fs::read_to_string(&path).unwrap_or_default();

    assert!(
        committed == present,
        "openapi/sootline.json is stale; read the difference after renewing it with\n    \
         {RENEW}=1 cargo test --test it openapi"
    );
}

#[test]
fn every_component_is_used() {
    let document = serde_json::to_value(sootline::http::openapi()).unwrap();
    let text = document.to_string();

    for (kind, components) in document["components"].as_object().unwrap() {
        for name in components.as_object().unwrap().keys() {
            let reference = format!("\"#/components/{kind}/{name}\"");
            assert!(text.contains(&reference), "{kind} {name} is used nowhere");
        }
    }
}
