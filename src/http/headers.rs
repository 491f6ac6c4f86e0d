//! Headers of requests, as the OpenAPI document describes them.

use utoipa::IntoParams;

/// Headers of a read.
#[derive(Debug, IntoParams)]
#[into_params(parameter_in = Header)]
#[expect(dead_code, reason = "describes headers in the OpenAPI document")]
pub struct ReadHeaders {
    /// Tags that the caller has; if the present one is among them the answer is 304.
    #[param(rename = "If-None-Match", example = "\"7\"")]
    if_none_match: Option<String>,
}

/// Headers of a change of what is there.
#[derive(Debug, IntoParams)]
#[into_params(parameter_in = Header)]
#[expect(dead_code, reason = "describes headers in the OpenAPI document")]
pub struct ChangeHeaders {
    /// The tag that the change was made from; a list of them, or `*` for whatever is there.
    #[param(rename = "If-Match", example = "\"7\"")]
    if_match: String,
}

/// Headers of a put that may create. One of the two is required.
#[derive(Debug, IntoParams)]
#[into_params(parameter_in = Header)]
#[expect(dead_code, reason = "describes headers in the OpenAPI document")]
pub struct PutHeaders {
    /// To change what is there: the tag that the change was made from.
    #[param(rename = "If-Match", example = "\"7\"")]
    if_match: Option<String>,
    /// To create: `*`.
    #[param(rename = "If-None-Match", example = "*")]
    if_none_match: Option<String>,
}
