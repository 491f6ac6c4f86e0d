//! Whether the service lives, and whether it can work.

use axum::extract::State;
use axum::http::header::{CACHE_CONTROL, CONTENT_TYPE};
use axum::response::{IntoResponse, Response};

use super::app::App;
use super::problem::ApiError;

/// `GET /healthz`: the process answers.
pub async fn get_health() -> Response {
    alive()
}

/// `GET /readyz`: the records can be read.
pub async fn get_readiness(State(app): State<App>) -> Result<Response, ApiError> {
    app.store.ready().await.map_err(|error| {
        tracing::warn!(error = &error as &dyn std::error::Error, "not ready");
        ApiError::overloaded("The records cannot be read.")
    })?;
    Ok(alive())
}

fn alive() -> Response {
    ([(CONTENT_TYPE, "text/plain; charset=utf-8"), (CACHE_CONTROL, "no-store")], "ok\n").into_response()
}
