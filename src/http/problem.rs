//! Errors to statuses: the one place that knows them.
//!
//! Whatever goes wrong leaves as `application/problem+json`. An [`ApiError`] travels inside its
//! response; [`complete`] writes the body at the edge, where the path and the request's id are
//! known, and turns any other error response that a layer made into a problem too.

use std::fmt;
use std::sync::Arc;

use axum::body::Body;
use axum::extract::Request;
use axum::http::header::{ALLOW, CONTENT_LENGTH, CONTENT_TYPE, HeaderName, HeaderValue, RETRY_AFTER};
use axum::http::{StatusCode, Uri};
use axum::middleware::Next;
use axum::response::{IntoResponse, Response};

use super::layers::request_id;
use crate::compute::NoAnswer;
use crate::wire::problem::{Problem, ProblemItem, Slug};

/// Media type of every error.
pub const PROBLEM_JSON: &str = "application/problem+json";

/// Seconds after which it is worth asking an overloaded service again.
const RETRY_AFTER_S: &str = "2";

/// Why a request is not answered as asked.
#[derive(Debug, Clone)]
pub struct ApiError {
    slug: Slug,
    detail: String,
    faults: Vec<ProblemItem>,
    headers: Vec<(HeaderName, HeaderValue)>,
}

impl ApiError {
    /// A problem of this kind, in words.
    pub fn new(slug: Slug, detail: impl Into<String>) -> Self {
        Self { slug, detail: detail.into(), faults: Vec::new(), headers: Vec::new() }
    }

    /// With its single faults.
    #[must_use]
    pub fn with_faults(mut self, faults: Vec<ProblemItem>) -> Self {
        self.faults = faults;
        self
    }

    /// With a header that helps the caller.
    #[must_use]
    pub fn with_header(mut self, name: HeaderName, value: HeaderValue) -> Self {
        self.headers.push((name, value));
        self
    }

    /// There is no such thing.
    pub fn not_found(what: impl std::fmt::Display) -> Self {
        Self::new(Slug::NotFound, format!("There is no {what}."))
    }

    /// What went wrong inside; the log has the cause, the caller does not get it.
    pub fn internal(cause: &(dyn std::error::Error + 'static)) -> Self {
        let mut chain = cause.to_string();
        let mut next = cause.source();
        while let Some(error) = next {
            chain.push_str(": ");
            chain.push_str(&error.to_string());
            next = error.source();
        }
        tracing::error!(cause = chain, "a request failed");
        Self::new(Slug::Internal, "The service failed; its log says why.")
    }

    /// The service cannot take this now.
    pub fn overloaded(detail: impl Into<String>) -> Self {
        Self::new(Slug::Overloaded, detail).with_header(RETRY_AFTER, HeaderValue::from_static(RETRY_AFTER_S))
    }

    /// What a bare status means, where a layer or a router made the response.
    fn of_status(status: StatusCode) -> Self {
        match status {
            StatusCode::NOT_FOUND => Self::new(Slug::NotFound, "There is nothing at this address."),
            StatusCode::METHOD_NOT_ALLOWED => Self::method_not_allowed(),
            StatusCode::PAYLOAD_TOO_LARGE => Self::new(Slug::TooLarge, "The body is too large."),
            StatusCode::SERVICE_UNAVAILABLE => Self::overloaded("The answer took too long."),
            status if status.is_client_error() => {
                Self::new(Slug::Unreadable, "The request could not be understood.")
            }
            _ => Self::new(Slug::Internal, "The service failed; its log says why."),
        }
    }

    /// The address exists, not for this method.
    pub fn method_not_allowed() -> Self {
        let detail = "This address does not take this method; the header `Allow` lists those it takes.";
        Self::new(Slug::MethodNotAllowed, detail)
    }

    fn body(self, uri: &Uri, request_id: Option<&str>) -> Vec<u8> {
        // A path is always a lawful reference; the fragment ties the answer to the log.
        let instance = match request_id {
            Some(id) => format!("{}#{id}", uri.path()),
            None => uri.path().to_owned(),
        };
        let problem = Problem::new(self.slug, self.detail, instance).with_errors(self.faults);
        serde_json::to_vec(&problem).expect("a problem is made of strings and numbers")
    }
}

/// In words, for whoever is not answered over HTTP.
impl fmt::Display for ApiError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.detail)?;
        for fault in &self.faults {
            write!(f, " {}: {}", fault.pointer.as_deref().unwrap_or_default(), fault.detail)?;
        }
        Ok(())
    }
}

impl std::error::Error for ApiError {}

impl From<NoAnswer> for ApiError {
    fn from(none: NoAnswer) -> Self {
        match none {
            NoAnswer::Full => {
                Self::overloaded("Too many assessments are waiting already; ask again shortly.")
            }
            NoAnswer::BrokeOff => Self::internal(&none),
        }
    }
}

impl IntoResponse for ApiError {
    fn into_response(self) -> Response {
        let mut response = status_of(self.slug).into_response();
        for (name, value) in &self.headers {
            response.headers_mut().append(name.clone(), value.clone());
        }
        response.extensions_mut().insert(Arc::new(self));
        response
    }
}

/// The status of a kind of problem.
pub fn status_of(slug: Slug) -> StatusCode {
    StatusCode::from_u16(slug.status()).unwrap_or(StatusCode::INTERNAL_SERVER_ERROR)
}

/// Writes the body of every error, whoever made it.
pub async fn complete(request: Request, next: Next) -> Response {
    let uri = request.uri().clone();
    let id = request_id(&request);
    let mut response = next.run(request).await;

    let status = response.status();
    if !status.is_client_error() && !status.is_server_error() {
        return response;
    }
    let carried = response.extensions_mut().remove::<Arc<ApiError>>();
    let error = carried.map_or_else(|| ApiError::of_status(status), Arc::unwrap_or_clone);
    let (mut parts, _) = response.into_parts();
    parts.status = status_of(error.slug);
    // Of a response made elsewhere only what belongs to the refusal is kept.
    parts.headers.remove(CONTENT_LENGTH);
    if parts.status != StatusCode::METHOD_NOT_ALLOWED {
        parts.headers.remove(ALLOW);
    }
    parts.headers.insert(CONTENT_TYPE, HeaderValue::from_static(PROBLEM_JSON));
    for (name, value) in &error.headers {
        parts.headers.insert(name.clone(), value.clone());
    }
    let body = error.body(&uri, id.as_deref());
    Response::from_parts(parts, Body::from(body))
}

/// Answers whatever has no route.
pub async fn nothing_here() -> ApiError {
    ApiError::new(Slug::NotFound, "There is nothing at this address; /docs lists what there is.")
}

/// Answers a method that a route does not take; the router adds `Allow`.
pub async fn not_this_method(request: Request) -> Response {
    if request.method() == axum::http::Method::OPTIONS {
        return StatusCode::NO_CONTENT.into_response();
    }
    ApiError::method_not_allowed().into_response()
}
