//! What stands in a path; whatever is malformed there names nothing, so it is 404.

use axum::extract::{FromRequestParts, RawPathParams};
use axum::http::request::Parts;
use utoipa::IntoParams;

use super::problem::ApiError;
use crate::domain::ids::{AssessmentId, BuildingId, Key};

/// A building's address.
#[derive(Debug, IntoParams)]
#[into_params(parameter_in = Path)]
#[expect(dead_code, reason = "describes the path in the OpenAPI document")]
pub struct BuildingPath {
    /// The building's id: UUID version 7, lower case.
    #[param(format = "uuid", example = "019ac000-0000-7000-8000-000000000001")]
    id: String,
}

/// A room's address.
#[derive(Debug, IntoParams)]
#[into_params(parameter_in = Path)]
#[expect(dead_code, reason = "describes the path in the OpenAPI document")]
pub struct RoomPath {
    /// The building's id: UUID version 7, lower case.
    #[param(format = "uuid", example = "019ac000-0000-7000-8000-000000000001")]
    id: String,
    /// The room's key.
    #[param(pattern = "^[a-z0-9][a-z0-9_-]{0,63}$", example = "store")]
    room: String,
}

/// An opening's address.
#[derive(Debug, IntoParams)]
#[into_params(parameter_in = Path)]
#[expect(dead_code, reason = "describes the path in the OpenAPI document")]
pub struct OpeningPath {
    /// The building's id: UUID version 7, lower case.
    #[param(format = "uuid", example = "019ac000-0000-7000-8000-000000000001")]
    id: String,
    /// The opening's key.
    #[param(pattern = "^[a-z0-9][a-z0-9_-]{0,63}$", example = "d")]
    opening: String,
}

/// An assessment's address.
#[derive(Debug, IntoParams)]
#[into_params(parameter_in = Path)]
#[expect(dead_code, reason = "describes the path in the OpenAPI document")]
pub struct AssessmentPath {
    /// The assessment's id: UUID version 7, lower case.
    #[param(format = "uuid", example = "019ac000-0000-7000-8000-0000000000a1")]
    id: String,
}

/// The address of a room's report.
#[derive(Debug, IntoParams)]
#[into_params(parameter_in = Path)]
#[expect(dead_code, reason = "describes the path in the OpenAPI document")]
pub struct RoomReportPath {
    /// The assessment's id: UUID version 7, lower case.
    #[param(format = "uuid", example = "019ac000-0000-7000-8000-0000000000a1")]
    id: String,
    /// The room's key.
    #[param(pattern = "^[a-z0-9][a-z0-9_-]{0,63}$", example = "store")]
    room: String,
}

/// The ids and keys of a path, read.
#[derive(Debug)]
pub struct At<T>(pub T);

/// What can be read from the parameters of a path.
pub trait Named: Sized {
    /// Reads it; the error says what there is none of.
    fn named(of: &dyn Fn(&str) -> Option<String>) -> Result<Self, ApiError>;
}

impl<T: Named, S: Send + Sync> FromRequestParts<S> for At<T> {
    type Rejection = ApiError;

    async fn from_request_parts(parts: &mut Parts, state: &S) -> Result<Self, ApiError> {
        // Percent-encoded bytes that are no UTF-8 name nothing either.
        let params = RawPathParams::from_request_parts(parts, state)
            .await
            .map_err(|_| ApiError::not_found("record with such an id"))?;
        let of = |name: &str| params.iter().find(|(key, _)| *key == name).map(|(_, value)| value.to_owned());
        T::named(&of).map(Self)
    }
}

impl Named for BuildingId {
    fn named(of: &dyn Fn(&str) -> Option<String>) -> Result<Self, ApiError> {
        of("id")
            .and_then(|text| Self::parse(&text))
            .ok_or_else(|| ApiError::not_found("building with such an id"))
    }
}

impl Named for AssessmentId {
    fn named(of: &dyn Fn(&str) -> Option<String>) -> Result<Self, ApiError> {
        of("id")
            .and_then(|text| Self::parse(&text))
            .ok_or_else(|| ApiError::not_found("assessment with such an id"))
    }
}

/// A room's key after an id.
#[derive(Debug)]
pub struct RoomAt<Id>(pub Id, pub Key);

impl<Id: Named> Named for RoomAt<Id> {
    fn named(of: &dyn Fn(&str) -> Option<String>) -> Result<Self, ApiError> {
        Ok(Self(Id::named(of)?, key_named(of, "room")?))
    }
}

/// An opening's key after an id.
#[derive(Debug)]
pub struct OpeningAt(pub BuildingId, pub Key);

impl Named for OpeningAt {
    fn named(of: &dyn Fn(&str) -> Option<String>) -> Result<Self, ApiError> {
        Ok(Self(BuildingId::named(of)?, key_named(of, "opening")?))
    }
}

fn key_named(of: &dyn Fn(&str) -> Option<String>, part: &str) -> Result<Key, ApiError> {
    let key = of(part).and_then(|text| Key::new(&text).ok());
    key.ok_or_else(|| ApiError::not_found(format!("{part} with such a key; keys are like {}", Key::PATTERN)))
}
