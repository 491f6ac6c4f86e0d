//! Answers that succeed.

use axum::http::StatusCode;
use axum::http::header::{CACHE_CONTROL, CONTENT_TYPE, ETAG, HeaderName, HeaderValue, LOCATION};
use axum::response::{IntoResponse, Response};
use serde::Serialize;

use super::conditional::tag;
use super::media;
use super::problem::ApiError;

/// Kept by nobody but the caller, and asked for again each time.
pub const REVALIDATE: HeaderValue = HeaderValue::from_static("private, no-cache");
/// Never changes again.
pub const FOR_EVER: HeaderValue = HeaderValue::from_static("private, max-age=31536000, immutable");

/// JSON.
pub fn json(status: StatusCode, body: &impl Serialize) -> Result<Response, ApiError> {
    let bytes = serde_json::to_vec(body).map_err(|error| ApiError::internal(&error))?;
    Ok(json_bytes(status, bytes))
}

/// JSON that is written already.
pub fn json_bytes(status: StatusCode, bytes: Vec<u8>) -> Response {
    (status, [(CONTENT_TYPE, HeaderValue::from_static(media::JSON))], bytes).into_response()
}

/// One record in its present revision.
pub fn versioned(revision: u64, body: &impl Serialize) -> Result<Response, ApiError> {
    Ok(with(json(StatusCode::OK, body)?, [(ETAG, tag(revision)), (CACHE_CONTROL, REVALIDATE)]))
}

/// A record that was made just now, and where it is.
pub fn created(location: &str, mut made: Response) -> Result<Response, ApiError> {
    *made.status_mut() = StatusCode::CREATED;
    let location = HeaderValue::try_from(location).map_err(|error| ApiError::internal(&error))?;
    Ok(with(made, [(LOCATION, location)]))
}

/// The same answer with more headers.
pub fn with(
    mut response: Response,
    headers: impl IntoIterator<Item = (HeaderName, HeaderValue)>,
) -> Response {
    response.headers_mut().extend(headers);
    response
}
