//! What surrounds every route.

use std::any::Any;
use std::time::Duration;

use axum::Router;
use axum::extract::Request;
use axum::http::{HeaderName, HeaderValue, StatusCode};
use axum::middleware::{from_fn, from_fn_with_state};
use axum::response::{IntoResponse, Response};
use tower_http::catch_panic::CatchPanicLayer;
use tower_http::compression::CompressionLayer;
use tower_http::request_id::{MakeRequestId, PropagateRequestIdLayer, RequestId, SetRequestIdLayer};
use tower_http::timeout::TimeoutLayer;
use tower_http::trace::TraceLayer;

use super::app::App;
use super::problem::ApiError;
use super::{metrics, problem};
use crate::wire::problem::Slug;

/// The longest any request may take, body and answer together.
const TIMEOUT: Duration = Duration::from_secs(60);

const X_REQUEST_ID: HeaderName = HeaderName::from_static("x-request-id");

/// Longest id of a request taken over from a caller.
const MAX_REQUEST_ID: usize = 128;

/// Puts the layers around the routes; the last stands outermost.
pub fn around(routes: Router, app: &App) -> Router {
    let ids = NewRequestId(app.clone());
    routes
        .layer(CatchPanicLayer::custom(after_panic))
        .layer(TimeoutLayer::with_status_code(StatusCode::SERVICE_UNAVAILABLE, TIMEOUT))
        .layer(from_fn(problem::complete))
        .layer(CompressionLayer::new())
        .layer(from_fn_with_state(app.clone(), metrics::measure))
        .layer(TraceLayer::new_for_http().make_span_with(span))
        .layer(PropagateRequestIdLayer::new(X_REQUEST_ID))
        .layer(SetRequestIdLayer::new(X_REQUEST_ID, ids))
        .layer(from_fn(only_plain_request_ids))
}

/// The id of a request, as logs and answers carry it.
pub fn request_id(request: &Request) -> Option<String> {
    let id = request.extensions().get::<RequestId>()?;
    id.header_value().to_str().ok().map(str::to_owned)
}

#[derive(Clone)]
struct NewRequestId(App);

impl MakeRequestId for NewRequestId {
    fn make_request_id<B>(&mut self, _request: &axum::http::Request<B>) -> Option<RequestId> {
        HeaderValue::try_from(self.0.ids.request().to_string()).ok().map(RequestId::new)
    }
}

/// An id that a caller brings goes into logs and answers, so only plain ones are taken over.
async fn only_plain_request_ids(mut request: Request, next: axum::middleware::Next) -> Response {
    let plain = |id: &HeaderValue| {
        let bytes = id.as_bytes();
        let lawful = |c: &u8| c.is_ascii_alphanumeric() || b"-_.:".contains(c);
        !bytes.is_empty() && bytes.len() <= MAX_REQUEST_ID && bytes.iter().all(lawful)
    };
    if request.headers().get(X_REQUEST_ID).is_some_and(|id| !plain(id)) {
        request.headers_mut().remove(X_REQUEST_ID);
    }
    next.run(request).await
}

fn span<B>(request: &axum::http::Request<B>) -> tracing::Span {
    let id = request.extensions().get::<RequestId>();
    let id = id.and_then(|id| id.header_value().to_str().ok()).unwrap_or_default();
    tracing::info_span!("request", method = %request.method(), path = request.uri().path(), id)
}

fn after_panic(panic: Box<dyn Any + Send>) -> Response {
    let said = panic.downcast_ref::<String>().map(String::as_str);
    let said = said.or_else(|| panic.downcast_ref::<&str>().copied()).unwrap_or("no words");
    tracing::error!(panic = said, "a handler panicked");
    ApiError::new(Slug::Internal, "The service failed; its log says why.").into_response()
}
