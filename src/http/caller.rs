//! Who asks: the one place that turns a request into a [`Caller`].

use std::convert::Infallible;

use axum::extract::FromRequestParts;
use axum::http::request::Parts;

use crate::domain::Caller;

impl<S: Sync> FromRequestParts<S> for Caller {
    type Rejection = Infallible;

    /// There are no keys yet: whoever reaches the service is its only user.
    async fn from_request_parts(_parts: &mut Parts, _state: &S) -> Result<Self, Infallible> {
        Ok(Self::local())
    }
}
