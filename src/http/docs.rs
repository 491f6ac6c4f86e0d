//! The documents page; its files are inside the binary and name no outside address.

use std::sync::{Arc, LazyLock};

use axum::extract::RawPathParams;
use axum::http::header::{CACHE_CONTROL, CONTENT_ENCODING, CONTENT_SECURITY_POLICY, CONTENT_TYPE};
use axum::http::{HeaderName, HeaderValue};
use axum::response::{IntoResponse, Redirect, Response};
use utoipa_swagger_ui::Config;

use super::problem::{ApiError, nothing_here};

/// The page draws its icons from `data:` and styles its elements from its script.
const POLICY: &str = "default-src 'self'; img-src 'self' data:; style-src 'self' 'unsafe-inline'; \
                      frame-ancestors 'none'; base-uri 'none'; form-action 'self'";

/// `validator_url`: without it the page would send the document to a validator elsewhere.
static CONFIG: LazyLock<Arc<Config<'static>>> = LazyLock::new(|| {
    let config = Config::new(["/openapi.json"]);
    Arc::new(config.validator_url("none").try_it_out_enabled(true).deep_linking(true))
});

/// `GET /` and `GET /docs`.
pub async fn lead_to_docs() -> Redirect {
    Redirect::to("/docs/")
}

/// `GET /docs/` and its files.
pub async fn get_docs(params: RawPathParams) -> Result<Response, ApiError> {
    let path = params.iter().next();
    let file = utoipa_swagger_ui::serve(path.map_or("", |(_, value)| value), CONFIG.clone());
    let file = file.map_err(|error| ApiError::internal(error.as_ref()))?;
    let Some(file) = file else { return Err(nothing_here().await) };

    let mut response = file.bytes.into_owned().into_response();
    let headers = response.headers_mut();
    let content_type = HeaderValue::try_from(file.content_type);
    headers
        .insert(CONTENT_TYPE, content_type.unwrap_or(HeaderValue::from_static("application/octet-stream")));
    if file.gzpipped {
        headers.insert(CONTENT_ENCODING, HeaderValue::from_static("gzip"));
    }
    headers.insert(CONTENT_SECURITY_POLICY, HeaderValue::from_static(POLICY));
    headers.insert(CACHE_CONTROL, HeaderValue::from_static("no-cache"));
    headers.insert(HeaderName::from_static("x-content-type-options"), HeaderValue::from_static("nosniff"));
    Ok(response)
}
