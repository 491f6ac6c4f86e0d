//! The schema of the reports.

use std::collections::BTreeSet;

use serde_json::Value;
use utoipa::OpenApi;

use super::super::{BuildingReport, Methods, RoomReport};

#[derive(OpenApi)]
#[openapi(components(schemas(BuildingReport, RoomReport, Methods)))]
struct Document;

#[test]
fn every_member_of_a_report_is_required_and_the_unknown_is_null() {
    let document: Value = serde_json::to_value(Document::openapi()).unwrap();
    let schemas = document["components"]["schemas"].as_object().unwrap();

    assert!(schemas.len() > 30, "only {} schemas", schemas.len());
    for (name, schema) in schemas {
        every_member_is_required(name, schema);
    }
}

fn every_member_is_required(name: &str, schema: &Value) {
    if let Some(parts) = schema.get("allOf").and_then(Value::as_array) {
        parts.iter().for_each(|part| every_member_is_required(name, part));
    }
    let Some(properties) = schema.get("properties").and_then(Value::as_object) else { return };
    let properties: BTreeSet<&str> = properties.keys().map(String::as_str).collect();
    let required: BTreeSet<&str> = schema["required"]
        .as_array()
        .map(|names| names.iter().filter_map(Value::as_str).collect())
        .unwrap_or_default();
    assert_eq!(properties, required, "{name}");
}

#[test]
fn every_reference_leads_to_a_schema() {
    let document: Value = serde_json::to_value(Document::openapi()).unwrap();
    let schemas = document["components"]["schemas"].as_object().unwrap();

    let mut seen = 0;
    references(&document, &mut |reference| {
        let name = reference.strip_prefix("#/components/schemas/").unwrap();
        assert!(schemas.contains_key(name), "{reference}");
        seen += 1;
    });
    assert!(seen > 50);
}

fn references(value: &Value, each: &mut impl FnMut(&str)) {
    match value {
        Value::Object(members) => {
            for (name, value) in members {
                match value {
                    Value::String(reference) if name == "$ref" => each(reference),
                    other => references(other, each),
                }
            }
        }
        Value::Array(list) => list.iter().for_each(|value| references(value, each)),
        _ => {}
    }
}
