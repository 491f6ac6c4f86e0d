//! The catalogue and the methods, as they can be read.

use serde_json::Value;

use crate::support::TestApp;

/// Routes and the fewest rows that each has.
const SUBJECTS: [(&str, usize); 7] = [
    ("uses", 20),
    ("items", 40),
    ("fuels", 25),
    ("materials", 25),
    ("leakage", 1),
    ("detectors", 1),
    ("sprinklers", 1),
];

#[tokio::test]
async fn every_row_has_its_source() {
    let app = TestApp::new().await;
    for (subject, least) in SUBJECTS {
        let list = app.get(&format!("/v1/catalogue/{subject}?limit=500")).await.expect(200);

        let items = list["items"].as_array().unwrap();
        assert!(items.len() >= least, "{subject}: {}", items.len());
        assert_eq!((&list["next"], &list["next_cursor"]), (&Value::Null, &Value::Null));
        for row in items {
            for member in ["key", "title", "source", "provenance"] {
                assert!(
                    row[member].as_str().is_some_and(|text| !text.is_empty()),
                    "{subject} {member}: {row}"
                );
            }
            assert!(row["properties"].is_object() && row["note"].is_string(), "{row}");
            assert!(["seen", "memory"].contains(&row["provenance"].as_str().unwrap()));
        }
    }
}

#[tokio::test]
async fn fixed_keys_are_there() {
    let app = TestApp::new().await;
    // The wire contract's list.
    for (subject, keys) in [
        (
            "uses",
            "storage office sales living bedroom kitchen corridor stair assembly dining classroom ward workshop \
             garage plant archive laboratory hotel_room stage lobby",
        ),
        (
            "materials",
            "gypsum_board concrete brick plaster timber plywood steel glass mineral_wool ceramic_fibre",
        ),
        ("fuels", "methane propane heptane wood polyurethane polystyrene pvc"),
        (
            "items",
            "upholstered_sofa upholstered_chair mattress bed wardrobe bookshelf desk workstation television curtains \
             clothing_rack wood_pallet_stack cardboard_cartons refuse_pile christmas_tree rack_storage car",
        ),
    ] {
        let list = app.get(&format!("/v1/catalogue/{subject}?limit=500")).await.expect(200);
        let items = list["items"].as_array().unwrap();
        let found: Vec<_> = items.iter().map(|row| row["key"].as_str().unwrap()).collect();
        for key in keys.split_whitespace() {
            assert!(found.contains(&key), "{subject}: {key}");
        }
    }
}

#[tokio::test]
async fn the_catalogue_is_paged_like_every_list() {
    let app = TestApp::new().await;
    let whole = app.get("/v1/catalogue/items?limit=500").await.expect(200);

    let mut walked = Vec::new();
    let mut next = Some("/v1/catalogue/items?limit=7".to_owned());
    while let Some(path) = next {
        let page = app.get(&path).await.expect(200);
        walked.extend(page["items"].as_array().unwrap().clone());
        next = page["next"].as_str().map(str::to_owned);
    }

    assert_eq!(whole["items"], Value::Array(walked));
    app.get("/v1/catalogue/items?cursor=x").await.problem(400, "invalid-parameter");
    app.get("/v1/catalogue/items?name=sofa").await.problem(400, "invalid-parameter");
    app.get("/v1/catalogue/furniture").await.problem(404, "not-found");
}

#[tokio::test]
async fn properties_of_a_row_may_stand_for_its_name() {
    let app = TestApp::new().await;
    let row = |list: &Value, key: &str| -> Value {
        let items = list["items"].as_array().unwrap();
        items.iter().find(|row| row["key"] == key).unwrap()["properties"].clone()
    };
    let uses = app.get("/v1/catalogue/uses?limit=500").await.expect(200);
    let materials = app.get("/v1/catalogue/materials?limit=500").await.expect(200);
    let items = app.get("/v1/catalogue/items?limit=500").await.expect(200);
    let mut building = crate::fixtures::full();
    building["rooms"][0]["use"] = row(&uses, "storage");
    building["rooms"][0]["linings"]["walls"]["material"] = row(&materials, "gypsum_board");
    building["rooms"][0]["fuel_packages"][0]["item"] = row(&items, "upholstered_sofa");

    let saved = app.post("/v1/buildings", building.clone()).await.expect(201);

    assert_eq!(saved["rooms"][0]["use"], building["rooms"][0]["use"]);
    let materials = [&saved, &building].map(|of| of["rooms"][0]["linings"]["walls"]["material"].clone());
    assert_eq!(materials[0], materials[1]);
}

#[tokio::test]
async fn every_method_says_where_it_comes_from() {
    let app = TestApp::new().await;

    let list = app.get("/v1/methods").await.expect(200);

    let items = list["items"].as_array().unwrap();
    assert!(items.len() >= 10, "{}", items.len());
    for method in items {
        for member in ["key", "title", "equation"] {
            assert!(method[member].as_str().is_some_and(|text| !text.is_empty()), "{member}: {method}");
        }
    }
}

#[tokio::test]
async fn every_figure_of_a_report_names_a_method_that_is_listed() {
    let app = TestApp::new().await;
    let list = app.get("/v1/methods").await.expect(200);
    let items = list["items"].as_array().unwrap();
    let known: Vec<_> = items.iter().map(|method| method["key"].as_str().unwrap()).collect();

    let body = serde_json::json!({ "building": crate::fixtures::full() });
    let report = app.post("/v1/assess", body).await.expect(200);

    let mut named = 0;
    for pointer in crate::fixtures::pointers(&report) {
        if pointer.ends_with("/method") {
            let key = report.pointer(&pointer).and_then(Value::as_str).unwrap();
            assert!(known.contains(&key), "{pointer}: {key}");
            named += 1;
        }
    }
    assert!(named > 3, "a report has figures, {named} were found");
}
