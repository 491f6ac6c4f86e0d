//! The schemas say what the reader does and what the answers hold.

use std::collections::BTreeMap;

use serde_json::{Value, json};
use utoipa::ToSchema;

use super::contract::{example, meta};
use crate::catalogue::Catalogue;
use crate::domain::quantity::{self, Kind};
use crate::wire::{self, BuildingInput, RoomInput};

/// Every component that requests and answers refer to, by name.
fn components() -> BTreeMap<String, Value> {
    fn add<T: ToSchema>(into: &mut Vec<(String, utoipa::openapi::RefOr<utoipa::openapi::Schema>)>) {
        into.push((T::name().into_owned(), T::schema()));
        T::schemas(into);
    }

    let mut all = Vec::new();
    add::<wire::BuildingInput>(&mut all);
    add::<wire::RoomInput>(&mut all);
    add::<wire::OpeningInput>(&mut all);
    add::<wire::AssumptionsInput>(&mut all);
    add::<wire::AssessInput>(&mut all);
    add::<wire::AssessmentRequest>(&mut all);
    add::<wire::SimulationInput>(&mut all);
    add::<wire::Building>(&mut all);
    add::<wire::Room>(&mut all);
    add::<wire::Opening>(&mut all);
    add::<wire::AssumptionsEcho>(&mut all);
    add::<wire::LocationEcho>(&mut all);
    add::<wire::Problem>(&mut all);
    let mut components = BTreeMap::new();
    for (name, schema) in all {
        let schema = serde_json::to_value(schema).unwrap();
        if let Some(known) = components.insert(name.clone(), schema.clone()) {
            assert_eq!(known, schema, "two schemas are called {name}");
        }
    }
    components
}

fn visit(value: &Value, look: &mut impl FnMut(&serde_json::Map<String, Value>)) {
    match value {
        Value::Object(members) => {
            look(members);
            members.values().for_each(|member| visit(member, look));
        }
        Value::Array(items) => items.iter().for_each(|item| visit(item, look)),
        _ => {}
    }
}

#[test]
fn every_reference_leads_to_a_component() {
    let components = components();
    let mut seen = 0;
    for schema in components.values() {
        visit(schema, &mut |members| {
            if let Some(Value::String(reference)) = members.get("$ref") {
                let name = reference.strip_prefix("#/components/schemas/").unwrap();
                assert!(components.contains_key(name), "{reference}");
                seen += 1;
            }
        });
    }
    assert!(seen > 40, "only {seen} references");
}

#[test]
fn answers_promise_every_member_and_requests_refuse_others() {
    for (name, schema) in components() {
        let Some(properties) = schema["properties"].as_object() else { panic!("{name} has no members") };
        let required: Vec<&str> =
            schema["required"].as_array().into_iter().flatten().filter_map(Value::as_str).collect();
        let request = name.ends_with("Input") || name == "AssessmentRequest";
        assert_eq!(schema["additionalProperties"] == json!(false), request, "{name}");
        if !request && name != "ProblemItem" {
            for member in properties.keys() {
                assert!(required.contains(&member.as_str()), "{name} does not promise {member}");
            }
        }
        assert!(schema["description"].is_string(), "{name} is not described");
    }
}

#[test]
fn an_answer_has_exactly_the_members_of_its_schema() {
    let components = components();
    let building = wire::read_value::<BuildingInput>(&example(), Catalogue::embedded()).unwrap();
    let answer = serde_json::to_value(wire::Building::of(&building, &meta())).unwrap();

    for (schema, object) in [
        ("Building", &answer),
        ("Address", &answer["address"]),
        ("Location", &answer["location"]),
        ("FloorLevel", &answer["floors"][0]),
        ("Response", &answer["response"]),
        ("Preplan", &answer["preplan"]),
        ("Room", &answer["rooms"][0]),
        ("Linings", &answer["rooms"][0]["linings"]),
        ("Lining", &answer["rooms"][0]["linings"]["walls"]),
        ("FuelPackage", &answer["rooms"][0]["fuel_packages"][0]),
        ("Detector", &answer["rooms"][0]["detectors"][0]),
        ("Opening", &answer["openings"][0]),
        ("BuildingLinks", &answer["links"]),
    ] {
        let promised: Vec<&String> = components[schema]["properties"].as_object().unwrap().keys().collect();
        let mut given: Vec<&String> = object.as_object().unwrap().keys().collect();
        given.sort();
        assert_eq!(given, promised, "{schema}");
    }
}

/// The number that a request may send, out of the schema of a member.
fn number(schema: &Value) -> &Value {
    let choices = schema["oneOf"].as_array().into_iter().flatten();
    choices.chain([schema]).find(|choice| choice["type"] == "number").unwrap()
}

#[test]
fn the_limits_of_quantities_are_those_of_the_domain() {
    fn check<K: Kind>(components: &BTreeMap<String, Value>, component: &str, member: &str) {
        let request = &components[&format!("{component}Input")]["properties"][member];
        let text = request["oneOf"].as_array().unwrap().iter().find(|choice| choice["type"] == "string");
        assert!(text.is_some(), "{component}.{member} takes no text");
        let limits = number(request);
        assert_eq!((limits["minimum"].as_f64(), limits["maximum"].as_f64()), (Some(K::MIN), Some(K::MAX)));
        let answer = &components[component]["properties"][member];
        assert_eq!((answer["minimum"].as_f64(), answer["maximum"].as_f64()), (Some(K::MIN), Some(K::MAX)));
    }

    let components = components();
    check::<quantity::RoomLengthKind>(&components, "Room", "length_m");
    check::<quantity::RoomHeightKind>(&components, "Room", "height_m");
    check::<quantity::FloorAreaKind>(&components, "Room", "area_m2");
    check::<quantity::PerimeterKind>(&components, "Room", "perimeter_m");
    check::<quantity::LeakageAreaKind>(&components, "Room", "leakage_area_m2");
    check::<quantity::FireLoadDensityKind>(&components, "Room", "fuel_load_mj_m2");
    check::<quantity::OpeningSideKind>(&components, "Opening", "width_m");
    check::<quantity::SillKind>(&components, "Opening", "sill_m");
    check::<quantity::FractionKind>(&components, "Opening", "open_fraction");
    check::<quantity::FireRatingKind>(&components, "Opening", "fire_rating_min");
    check::<quantity::AngleKind>(&components, "Opening", "azimuth_deg");
    check::<quantity::LatitudeKind>(&components, "Location", "latitude_deg");
    check::<quantity::LongitudeKind>(&components, "Location", "longitude_deg");
    check::<quantity::SpanKind>(&components, "Response", "travel_s");
    check::<quantity::WaterFlowKind>(&components, "Water", "available_l_min");
    check::<quantity::MassKind>(&components, "FuelPackage", "mass_kg");
    check::<quantity::DistanceKind>(&components, "FuelPackage", "base_height_m");
    check::<quantity::ThicknessKind>(&components, "Lining", "thickness_m");
    check::<quantity::AirFlowKind>(&components, "Mechanical", "supply_m3_s");
    check::<quantity::ElevationKind>(&components, "FloorLevel", "elevation_m");
    check::<quantity::PlanOffsetKind>(&components, "PlanPosition", "x_m");
    check::<quantity::TemperatureKind>(&components, "Ambient", "temperature_c");
    check::<quantity::WindSpeedKind>(&components, "Ambient", "wind_m_s");
}

/// The reader takes both ends that the schema prints, and nothing beyond them.
#[test]
fn the_reader_keeps_the_limits_that_the_schema_prints() {
    let components = components();
    let base = json!({
        "key": "r", "use": "office", "length_m": 900, "width_m": 900, "height_m": 100,
        "mechanical": {}, "linings": { "walls": { "material": "brick" } },
        "fuel_packages": [{ "key": "p", "item": "bed" }],
        "plan": {},
    });
    let mut tried = 0;
    for (component, parent) in [
        ("RoomInput", ""),
        ("MechanicalInput", "/mechanical"),
        ("LiningInput", "/linings/walls"),
        ("FuelPackageInput", "/fuel_packages/0"),
        ("PlanPositionInput", "/plan"),
    ] {
        for (member, schema) in components[component]["properties"].as_object().unwrap() {
            let (Some(min), Some(max)) = (find(schema, "minimum"), find(schema, "maximum")) else { continue };
            if ["area_m2", "perimeter_m"].contains(&member.as_str()) {
                continue; // They take the place of length and width.
            }
            let step = (max - min) * 1e-6;
            let whole = schema["type"].to_string().contains("integer");
            let beyond = if whole { 1.0 } else { step };
            for (value, lawful) in [(min, true), (max, true), (min - beyond, false), (max + beyond, false)] {
                let mut room = base.clone();
                let sent = if whole { json!(value.round()) } else { json!(value) };
                room.pointer_mut(parent).unwrap().as_object_mut().unwrap().insert(member.clone(), sent);
                let out_of_range = match wire::read_value::<RoomInput>(&room, Catalogue::embedded()) {
                    Ok(_) => false,
                    Err(wire::Refused::Invalid(faults)) => {
                        faults.iter().any(|fault| fault.code == "out_of_range")
                    }
                    Err(wire::Refused::Unreadable(fault)) => panic!("{fault:?}"),
                };
                assert_eq!(out_of_range, !lawful, "{component}.{member} = {value}");
                tried += 1;
            }
        }
    }
    assert!(tried >= 4 * 14, "only {tried} values were tried");
}

fn find(schema: &Value, limit: &str) -> Option<f64> {
    let choices = schema["oneOf"].as_array().into_iter().flatten();
    choices.chain([schema]).find_map(|choice| choice[limit].as_f64())
}

/// Saying a default aloud changes nothing.
#[test]
fn defaults_are_those_that_the_schema_prints() {
    let components = components();
    let bare = json!({ "key": "r", "use": "office", "length_m": 4, "width_m": 3, "height_m": 2.4 });
    let absent = wire::read_value::<RoomInput>(&bare, Catalogue::embedded()).unwrap();

    let mut spoken = bare.clone();
    let mut told = Vec::new();
    for (member, schema) in components["RoomInput"]["properties"].as_object().unwrap() {
        if let Some(default) = schema.get("default") {
            spoken[member] = default.clone();
            told.push(member.as_str());
        }
    }

    assert_eq!(told, ["floor", "kind"]);
    assert_eq!(wire::read_value::<RoomInput>(&spoken, Catalogue::embedded()).unwrap(), absent);
}

#[test]
fn the_document_takes_every_form_that_a_request_may_have() {
    // For generated clients: what an answer holds must be lawful in a request.
    let components = components();
    let request = components["BuildingInput"]["properties"].as_object().unwrap();
    for member in components["Building"]["properties"].as_object().unwrap().keys() {
        assert!(request.contains_key(member), "a client could not send `{member}` back");
    }
}

#[test]
fn each_problem_has_a_page_and_a_status_of_its_kind() {
    let mut names = std::collections::HashSet::new();
    for slug in wire::problem::ALL {
        assert!(names.insert(slug.name()));
        assert!((400..600).contains(&slug.status()), "{}", slug.name());
        assert!(slug.page().len() > 40, "{}", slug.name());
        assert_eq!(wire::Slug::of(slug.name()), Some(slug));
    }
    // The closed list of the contract.
    for (name, status) in [
        ("unreadable", 400),
        ("invalid-parameter", 400),
        ("unauthenticated", 401),
        ("forbidden", 403),
        ("not-found", 404),
        ("method-not-allowed", 405),
        ("not-acceptable", 406),
        ("conflict", 409),
        ("precondition-failed", 412),
        ("too-large", 413),
        ("unsupported-media-type", 415),
        ("invalid", 422),
        ("over-budget", 422),
        ("precondition-required", 428),
        ("rate-limited", 429),
        ("internal", 500),
        ("overloaded", 503),
    ] {
        assert_eq!(wire::Slug::of(name).map(wire::Slug::status), Some(status), "{name}");
    }
    assert_eq!(names.len(), 17);
}
