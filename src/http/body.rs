//! Bodies of requests: size, media type, and only then their meaning.

use std::convert::Infallible;
use std::future::poll_fn;
use std::pin::Pin;

use axum::body::{Body, Bytes, HttpBody};
use axum::extract::{FromRequest, Request};
use axum::http::header::{ACCEPT_ENCODING, CONTENT_ENCODING, CONTENT_LENGTH, CONTENT_TYPE, HeaderMap};
use axum::http::{HeaderName, HeaderValue};

use super::media;
use super::problem::ApiError;
use crate::wire::problem::{ProblemItem, Slug};

/// Largest body taken.
pub const MAX_BYTES: usize = 4 * 1024 * 1024;

/// So much of a body that is too large is read and thrown away, because most clients only look
/// for an answer after they have sent everything; beyond it the connection is closed on them.
const DRAINED_BYTES: usize = 128 * 1024 * 1024;

/// Tells which patches an address takes (RFC 5789).
const ACCEPT_PATCH: HeaderName = HeaderName::from_static("accept-patch");
/// Tells which bodies an address takes on POST.
const ACCEPT_POST: HeaderName = HeaderName::from_static("accept-post");

/// What sort of body an address takes.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Takes {
    /// JSON.
    Json,
    /// JSON or nothing at all.
    JsonOrNothing,
    /// A merge patch, which may call itself plain JSON.
    MergePatch,
}

/// A body that has not been read yet.
#[derive(Debug)]
pub struct Unread {
    headers: HeaderMap,
    body: Body,
}

impl<S: Sync> FromRequest<S> for Unread {
    type Rejection = Infallible;

    async fn from_request(request: Request, _state: &S) -> Result<Self, Infallible> {
        let (parts, body) = request.into_parts();
        Ok(Self { headers: parts.headers, body })
    }
}

impl Unread {
    /// The bytes, once size (413) and media type (415) are right.
    pub async fn take(self, takes: Takes) -> Result<Bytes, ApiError> {
        let Self { headers, mut body } = self;
        let bytes = collect(&headers, &mut body).await?;
        if bytes.is_empty() && takes == Takes::JsonOrNothing {
            return Ok(bytes);
        }
        right_type(&headers, takes)?;
        Ok(bytes)
    }
}

async fn collect(headers: &HeaderMap, body: &mut Body) -> Result<Bytes, ApiError> {
    let declared = headers.get(CONTENT_LENGTH).and_then(|v| v.to_str().ok()).and_then(|v| v.parse().ok());
    let mut fits = declared.is_none_or(|length: u64| length <= MAX_BYTES as u64);
    let mut kept = Vec::new();
    let mut seen = 0_usize;
    while let Some(frame) = poll_fn(|cx| Pin::new(&mut *body).poll_frame(cx)).await {
        let frame = frame.map_err(|_| ApiError::new(Slug::Unreadable, "The body broke off."))?;
        let Some(data) = frame.data_ref() else { continue };
        seen = seen.saturating_add(data.len());
        fits &= seen <= MAX_BYTES;
        if fits {
            kept.extend_from_slice(data);
        } else {
            kept = Vec::new();
        }
        if seen > DRAINED_BYTES {
            break;
        }
    }
    if fits { Ok(kept.into()) } else { Err(too_large()) }
}

fn too_large() -> ApiError {
    ApiError::new(Slug::TooLarge, format!("The body is larger than {MAX_BYTES} bytes (4 MiB)."))
}

fn right_type(headers: &HeaderMap, takes: Takes) -> Result<(), ApiError> {
    if let Some(coding) = headers.get(CONTENT_ENCODING)
        && !coding.as_bytes().eq_ignore_ascii_case(b"identity")
    {
        return Err(wrong_type("Content-Encoding", "Bodies are taken as they are, not compressed.")
            .with_header(ACCEPT_ENCODING, HeaderValue::from_static("identity")));
    }
    let given = headers.get(CONTENT_TYPE).and_then(|value| value.to_str().ok()).unwrap_or_default();
    let patch = takes == Takes::MergePatch;
    if media::is(given, media::JSON) || (patch && media::is(given, media::MERGE_PATCH)) {
        return Ok(());
    }
    Err(if patch {
        wrong_type("Content-Type", "A change of parts is sent as application/merge-patch+json.")
            .with_header(ACCEPT_PATCH, HeaderValue::from_static(media::MERGE_PATCH))
    } else {
        wrong_type("Content-Type", "The body is sent as application/json.")
            .with_header(ACCEPT_POST, HeaderValue::from_static(media::JSON))
    })
}

fn wrong_type(name: &'static str, detail: &'static str) -> ApiError {
    ApiError::new(Slug::UnsupportedMediaType, detail).with_faults(vec![ProblemItem::header(
        name,
        "unsupported_media_type",
        "this is not taken here",
        None,
    )])
}
