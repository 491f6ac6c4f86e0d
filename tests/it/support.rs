//! A service on a file of its own, with a clock that stands still and ids that are counted.

use std::num::NonZeroUsize;
use std::sync::atomic::{AtomicU64, Ordering};

use axum::Router;
use axum::body::{Body, Bytes};
use axum::http::header::{CONTENT_TYPE, ETAG};
use axum::http::{HeaderMap, Method, Request};
use http_body_util::BodyExt as _;
use serde_json::Value;
use sootline::catalogue::Catalogue;
use sootline::compute::Compute;
use sootline::domain::time::Timestamp;
use sootline::http::{App, Clock, Ids, Metrics, Parts, router};
use sootline::store::Store;
use tower::ServiceExt as _;

/// 2026-12-01T09:15:00.123Z, in microseconds since 1970.
pub const NOW_US: i64 = 1_796_116_500_123_000;
/// The same as it stands on the wire.
pub const NOW: &str = "2026-12-01T09:15:00.123Z";

struct StandingClock;

impl Clock for StandingClock {
    fn now(&self) -> Timestamp {
        Timestamp(NOW_US)
    }
}

/// Counts up from 019ac000-0000-7000-8000-000000000001.
struct CountedIds(AtomicU64);

impl Ids for CountedIds {
    fn record(&self) -> uuid::Uuid {
        let number = u128::from(self.0.fetch_add(1, Ordering::Relaxed));
        uuid::Uuid::from_u128(0x019a_c000_0000_7000_8000_0000_0000_0001 + number)
    }

    fn request(&self) -> uuid::Uuid {
        uuid::Uuid::nil()
    }
}

/// The service under test.
pub struct TestApp {
    pub store: Store,
    pub router: Router,
    _folder: tempfile::TempDir,
}

impl TestApp {
    pub async fn new() -> Self {
        Self::with(|_| ()).await
    }

    /// With parts changed before the service starts.
    pub async fn with(change: impl FnOnce(&mut Parts)) -> Self {
        let folder = tempfile::tempdir().unwrap();
        let url = format!("sqlite://{}", folder.path().join("test.db").display());
        let store = Store::open(&url).await.unwrap();
        let mut parts = Parts {
            store: store.clone(),
            catalogue: Catalogue::embedded(),
            compute: Compute::with(NonZeroUsize::new(2).unwrap(), 8).unwrap(),
            clock: Box::new(StandingClock),
            ids: Box::new(CountedIds(AtomicU64::new(0))),
            interactive_steps: sootline::http::app::INTERACTIVE_STEPS,
            simulation_room_steps: sootline::http::app::SIMULATION_ROOM_STEPS,
            metrics: Metrics::default(),
        };
        change(&mut parts);
        Self { store, router: router(App::of(parts)), _folder: folder }
    }

    /// Sends a request as it is.
    pub async fn send(&self, request: Request<Body>) -> Reply {
        let response = self.router.clone().oneshot(request).await.unwrap();
        let (parts, body) = response.into_parts();
        let body = body.collect().await.unwrap().to_bytes();
        Reply { status: parts.status.as_u16(), headers: parts.headers, body }
    }

    pub async fn get(&self, path: &str) -> Reply {
        self.send(request(Method::GET, path).body(Body::empty()).unwrap()).await
    }

    pub async fn get_with(&self, path: &str, headers: &[(&str, &str)]) -> Reply {
        self.send(with_headers(request(Method::GET, path), headers).body(Body::empty()).unwrap()).await
    }

    pub async fn post(&self, path: &str, body: Value) -> Reply {
        self.json(Method::POST, path, &[], body).await
    }

    pub async fn put(&self, path: &str, if_match: &str, body: Value) -> Reply {
        self.json(Method::PUT, path, &[("If-Match", if_match)], body).await
    }

    /// Puts what is not there yet.
    pub async fn create(&self, path: &str, body: Value) -> Reply {
        self.json(Method::PUT, path, &[("If-None-Match", "*")], body).await
    }

    pub async fn patch(&self, path: &str, if_match: &str, body: Value) -> Reply {
        let headers = [("If-Match", if_match), ("Content-Type", "application/merge-patch+json")];
        let request = with_headers(request(Method::PATCH, path), &headers);
        self.send(request.body(Body::from(body.to_string())).unwrap()).await
    }

    pub async fn delete(&self, path: &str, if_match: &str) -> Reply {
        let request = with_headers(request(Method::DELETE, path), &[("If-Match", if_match)]);
        self.send(request.body(Body::empty()).unwrap()).await
    }

    /// Sends a JSON body with these headers.
    pub async fn json(&self, method: Method, path: &str, headers: &[(&str, &str)], body: Value) -> Reply {
        let request = with_headers(request(method, path), headers).header(CONTENT_TYPE, "application/json");
        self.send(request.body(Body::from(body.to_string())).unwrap()).await
    }

    /// Sends bytes that call themselves JSON.
    pub async fn raw(&self, method: Method, path: &str, headers: &[(&str, &str)], body: &[u8]) -> Reply {
        let request = with_headers(request(method, path), headers).header(CONTENT_TYPE, "application/json");
        self.send(request.body(Body::from(body.to_vec())).unwrap()).await
    }

    /// Serves on a free port, where a real connection matters.
    pub async fn serve(&self) -> String {
        let listener = tokio::net::TcpListener::bind("127.0.0.1:0").await.unwrap();
        let address = listener.local_addr().unwrap();
        let router = self.router.clone();
        tokio::spawn(async move { axum::serve(listener, router).await.unwrap() });
        format!("http://{address}")
    }
}

pub fn request(method: Method, path: &str) -> axum::http::request::Builder {
    Request::builder().method(method).uri(path)
}

pub fn with_headers(
    builder: axum::http::request::Builder,
    headers: &[(&str, &str)],
) -> axum::http::request::Builder {
    headers.iter().fold(builder, |builder, (name, value)| builder.header(*name, *value))
}

/// What came back.
#[derive(Debug)]
pub struct Reply {
    pub status: u16,
    pub headers: HeaderMap,
    pub body: Bytes,
}

impl Reply {
    pub fn header(&self, name: impl axum::http::header::AsHeaderName) -> &str {
        self.headers.get(name).map_or("", |value| value.to_str().unwrap())
    }

    pub fn etag(&self) -> &str {
        self.header(ETAG)
    }

    pub fn text(&self) -> &str {
        std::str::from_utf8(&self.body).unwrap()
    }

    #[track_caller]
    pub fn value(&self) -> Value {
        serde_json::from_slice(&self.body).unwrap_or_else(|_| panic!("no JSON: {}", self.text()))
    }

    /// The body, after a look at the status.
    #[track_caller]
    pub fn expect(self, status: u16) -> Value {
        assert_eq!(self.status, status, "{}", self.text());
        self.value()
    }

    /// The problem of this slug, after a look at everything that holds for all of them.
    #[track_caller]
    pub fn problem(&self, status: u16, slug: &str) -> Value {
        assert_eq!(self.status, status, "{}", self.text());
        assert_eq!(self.header(CONTENT_TYPE), "application/problem+json");
        let problem = self.value();
        assert_eq!(problem["type"], format!("/problems/{slug}"));
        assert_eq!(problem["status"], status);
        for member in ["title", "detail", "instance"] {
            assert!(problem[member].as_str().is_some_and(|text| !text.is_empty()), "{member}: {problem}");
        }
        assert!(problem["errors"].is_array(), "{problem}");
        problem
    }

    /// The pointers of a problem's faults, in order.
    pub fn pointers(&self) -> Vec<String> {
        let problem = self.value();
        let errors = problem["errors"].as_array().cloned().unwrap_or_default();
        errors.iter().filter_map(|error| Some(error["pointer"].as_str()?.to_owned())).collect()
    }
}
