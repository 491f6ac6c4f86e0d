//! What the service counts, as Prometheus text.
//!
//! Labels hold the template of a route, never its ids, so that their number stays bounded.

use std::collections::BTreeMap;
use std::fmt::Write;
use std::sync::{Mutex, MutexGuard, PoisonError};
use std::time::{Duration, Instant};

use axum::extract::{MatchedPath, Request, State};
use axum::http::header::CONTENT_TYPE;
use axum::http::{Method, StatusCode};
use axum::middleware::Next;
use axum::response::{IntoResponse, Response};

use super::app::App;

/// Upper bounds of the histogram, in seconds: from an index read to the timeout.
const BOUNDS_S: [f64; 11] = [0.001, 0.0025, 0.005, 0.01, 0.025, 0.05, 0.1, 0.5, 1.0, 5.0, 30.0];

/// Counters of requests.
#[derive(Debug, Default)]
pub struct Metrics {
    answered: Mutex<BTreeMap<Series, u64>>,
    durations: Mutex<BTreeMap<(String, &'static str), Histogram>>,
}

#[derive(Debug, Clone, PartialEq, Eq, PartialOrd, Ord)]
struct Series {
    route: String,
    method: &'static str,
    status: u16,
}

#[derive(Debug, Clone, Default)]
struct Histogram {
    below: [u64; BOUNDS_S.len()],
    count: u64,
    sum_s: f64,
}

impl Metrics {
    fn record(&self, route: &str, method: &Method, status: StatusCode, took: Duration) {
        let method = label(method);
        let series = Series { route: route.to_owned(), method, status: status.as_u16() };
        *lock(&self.answered).entry(series).or_default() += 1;
        let mut durations = lock(&self.durations);
        let histogram = durations.entry((route.to_owned(), method)).or_default();
        let seconds = took.as_secs_f64();
        for (below, bound) in histogram.below.iter_mut().zip(BOUNDS_S) {
            *below += u64::from(seconds <= bound);
        }
        histogram.count += 1;
        histogram.sum_s += seconds;
    }

    fn write(&self, out: &mut String) -> std::fmt::Result {
        heading(out, "sootline_http_requests_total", "counter", "Requests answered.")?;
        for (Series { route, method, status }, count) in lock(&self.answered).iter() {
            writeln!(
                out,
                "sootline_http_requests_total{{route=\"{route}\",method=\"{method}\",status=\"{status}\"}} {count}"
            )?;
        }
        const DURATION: &str = "sootline_http_request_duration_seconds";
        heading(out, DURATION, "histogram", "Time from a request's head to its answer's head.")?;
        for ((route, method), histogram) in lock(&self.durations).iter() {
            let labels = format!("route=\"{route}\",method=\"{method}\"");
            for (below, bound) in histogram.below.iter().zip(BOUNDS_S) {
                writeln!(out, "{DURATION}_bucket{{{labels},le=\"{bound}\"}} {below}")?;
            }
            writeln!(out, "{DURATION}_bucket{{{labels},le=\"+Inf\"}} {}", histogram.count)?;
            writeln!(out, "{DURATION}_sum{{{labels}}} {}", histogram.sum_s)?;
            writeln!(out, "{DURATION}_count{{{labels}}} {}", histogram.count)?;
        }
        Ok(())
    }
}

/// Methods that the service does not know share one label.
fn label(method: &Method) -> &'static str {
    match method.as_str() {
        "GET" => "GET",
        "HEAD" => "HEAD",
        "POST" => "POST",
        "PUT" => "PUT",
        "PATCH" => "PATCH",
        "DELETE" => "DELETE",
        "OPTIONS" => "OPTIONS",
        _ => "other",
    }
}

/// Nothing that can panic runs under these locks.
fn lock<T>(of: &Mutex<T>) -> MutexGuard<'_, T> {
    of.lock().unwrap_or_else(PoisonError::into_inner)
}

fn heading(out: &mut String, name: &str, kind: &str, help: &str) -> std::fmt::Result {
    writeln!(out, "# HELP {name} {help}\n# TYPE {name} {kind}")
}

/// Counts a request.
pub async fn measure(State(app): State<App>, request: Request, next: Next) -> Response {
    let begun = Instant::now();
    let matched = request.extensions().get::<MatchedPath>();
    let route = matched.map_or("none", MatchedPath::as_str).to_owned();
    let method = request.method().clone();
    let response = next.run(request).await;
    app.metrics.record(&route, &method, response.status(), begun.elapsed());
    response
}

/// `GET /metrics`.
pub async fn get_metrics(State(app): State<App>) -> Response {
    let mut text = String::new();
    if write_all(&app, &mut text).is_err() {
        return StatusCode::INTERNAL_SERVER_ERROR.into_response();
    }
    ([(CONTENT_TYPE, "text/plain; version=0.0.4; charset=utf-8")], text).into_response()
}

fn write_all(app: &App, out: &mut String) -> std::fmt::Result {
    app.metrics.write(out)?;
    let load = app.compute.load();
    heading(out, "sootline_compute_waiting", "gauge", "Assessments waiting for a thread, by lane.")?;
    writeln!(out, "sootline_compute_waiting{{lane=\"interactive\"}} {}", load.interactive_waiting)?;
    writeln!(out, "sootline_compute_waiting{{lane=\"background\"}} {}", load.background_waiting)?;
    for (name, help, value) in [
        ("sootline_compute_running", "Assessments running.", load.running),
        ("sootline_compute_threads", "Threads that assessments run on.", load.threads),
        ("sootline_store_writes_waiting", "Changes waiting for their turn.", app.store.writes_waiting()),
    ] {
        heading(out, name, "gauge", help)?;
        writeln!(out, "{name} {value}")?;
    }
    heading(out, "sootline_build_info", "gauge", "The running program.")?;
    writeln!(out, "sootline_build_info{{version=\"{}\"}} 1", env!("CARGO_PKG_VERSION"))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn buckets_are_cumulative_and_end_at_the_count() {
        let metrics = Metrics::default();
        for ms in [1, 3, 40_000] {
            let took = Duration::from_millis(ms);
            metrics.record("/v1/buildings", &Method::GET, StatusCode::OK, took);
        }
        let mut text = String::new();

        metrics.write(&mut text).unwrap();

        let labels = r#"route="/v1/buildings",method="GET""#;
        for line in [
            format!(r#"sootline_http_requests_total{{{labels},status="200"}} 3"#),
            format!(r#"sootline_http_request_duration_seconds_bucket{{{labels},le="0.001"}} 1"#),
            format!(r#"sootline_http_request_duration_seconds_bucket{{{labels},le="0.005"}} 2"#),
            format!(r#"sootline_http_request_duration_seconds_bucket{{{labels},le="30"}} 2"#),
            format!(r#"sootline_http_request_duration_seconds_bucket{{{labels},le="+Inf"}} 3"#),
            format!(r#"sootline_http_request_duration_seconds_count{{{labels}}} 3"#),
        ] {
            assert!(text.lines().any(|l| l == line), "{line}\nnot in\n{text}");
        }
    }

    #[test]
    fn unknown_methods_share_a_label() {
        assert_eq!(label(&Method::from_bytes(b"BREW").unwrap()), "other");
    }
}
