//! `/v1/methods`: how the figures come about.

use axum::http::StatusCode;
use axum::http::header::{CACHE_CONTROL, HeaderValue};
use axum::response::Response;

use super::answer::{json, with};
use super::ask::Ask;
use super::problem::ApiError;
use crate::report::{Methods, methods_document};

/// Changes with the program only, but nobody should have to wait long for a mended word.
pub const AN_HOUR: HeaderValue = HeaderValue::from_static("public, max-age=3600");

/// List the methods.
///
/// Every method by which a figure comes about: its equation in words, its source, its published
/// range, and what it was compared with. The list is short and comes whole.
#[utoipa::path(
    get,
    path = "/v1/methods",
    tag = "methods",
    responses((status = 200, description = "Every method.", body = Methods)),
)]
pub async fn list_methods(ask: Ask) -> Result<Response, ApiError> {
    ask.accepts_json()?;
    ask.query(&[])?;
    Ok(with(json(StatusCode::OK, methods_document())?, [(CACHE_CONTROL, AN_HOUR)]))
}
