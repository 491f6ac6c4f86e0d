//! The service over a socket, with its inventory on disk: each beside the bare answer of `/healthz` in the same run.

use std::hint::black_box;

use criterion::{Criterion, criterion_group, criterion_main};
use serde_json::{Value, json};
use sootline::compute::Compute;
use sootline::http::{App, router};
use sootline::store::Store;
use tokio::runtime::Runtime;

/// Twenty rooms off one corridor, each with a door and a window: the building of the speed goal.
fn twenty_rooms() -> Value {
    let mut rooms =
        vec![json!({ "key": "corridor", "kind": "corridor", "use": "corridor", "length_m": 30, "width_m": 2,
        "height_m": 2.6 })];
    let mut openings =
        vec![json!({ "key": "exit", "kind": "double_door", "connects": ["corridor", "outside"],
        "width_m": 1.8, "height_m": 2.1, "open_fraction": 0, "entry": true })];
    let uses = ["office", "storage", "living", "bedroom", "classroom"];
    for number in 1..20 {
        let key = format!("r{number}");
        rooms.push(json!({ "key": key, "use": uses[number % uses.len()], "length_m": 4.2, "width_m": 3.6, "height_m": 2.6,
            "fuel_packages": [ { "key": "sofa", "item": "upholstered_sofa", "count": 1 } ],
            "detectors": [ { "key": "s1", "class": "smoke_point" } ] }));
        openings.push(json!({ "key": format!("d{number}"), "kind": "door", "connects": [key, "corridor"], "width_m": 0.9,
            "height_m": 2.0, "open_fraction": 0, "self_closing": number % 2 == 0 }));
        openings.push(json!({ "key": format!("w{number}"), "kind": "window", "connects": [key, "outside"], "width_m": 1.2,
            "height_m": 1.2, "sill_m": 0.9, "open_fraction": 0, "glazing": "double_glazed" }));
    }
    json!({ "name": "Twenty rooms", "rooms": rooms, "openings": openings })
}

fn service(criterion: &mut Criterion) {
    let runtime = Runtime::new().expect("a runtime");
    let folder = tempfile::tempdir().expect("a folder");
    let url = format!("sqlite://{}", folder.path().join("bench.db").display());
    let client = reqwest::Client::new();

    let base = runtime.block_on(async {
        let store = Store::open(&url).await.expect("an inventory");
        let app = App::new(store, Compute::on_this_machine().expect("threads"));
        let listener = tokio::net::TcpListener::bind("127.0.0.1:0").await.expect("a port");
        let base = format!("http://{}", listener.local_addr().expect("an address"));
        tokio::spawn(async move { axum::serve(listener, router(app)).await });
        base
    });
    let get = |path: String| {
        let request = client.get(&path).build().expect("a request");
        runtime.block_on(async {
            client.execute(request).await.expect("an answer").bytes().await.expect("a body")
        })
    };
    let post = |path: String, body: &Value| {
        let request = client.post(&path).json(body).build().expect("a request");
        runtime.block_on(async {
            let answer = client.execute(request).await.expect("an answer");
            assert!(answer.status().is_success(), "{}", answer.status());
            answer.bytes().await.expect("a body")
        })
    };

    let made: Value =
        serde_json::from_slice(&post(format!("{base}/v1/buildings"), &twenty_rooms())).expect("JSON");
    let id = made["id"].as_str().expect("an id").to_owned();
    let screening = json!({ "assumptions": { "level": "screening" } });
    let report: Value =
        serde_json::from_slice(&post(format!("{base}/v1/buildings/{id}/assessments"), &screening))
            .expect("JSON");
    let assessment = report["assessment_id"].as_str().expect("an id").to_owned();

    let mut group = criterion.benchmark_group("service");
    group.bench_function("bare_answer", |b| b.iter(|| black_box(get(format!("{base}/healthz")))));
    group.bench_function("read_a_building", |b| {
        b.iter(|| black_box(get(format!("{base}/v1/buildings/{id}"))))
    });
    group.bench_function("read_a_room_report", |b| {
        b.iter(|| black_box(get(format!("{base}/v1/assessments/{assessment}/rooms/r1"))));
    });
    group.bench_function("assess_twenty_rooms_and_keep", |b| {
        b.iter(|| black_box(post(format!("{base}/v1/buildings/{id}/assessments"), &screening)));
    });
    group.finish();
}

criterion_group!(benches, service);
criterion_main!(benches);
