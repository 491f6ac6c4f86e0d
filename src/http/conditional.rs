//! Conditional requests: entity tags, If-Match and If-None-Match (RFC 9110, section 13).

use axum::http::HeaderMap;
use axum::http::header::{ETAG, HeaderName, HeaderValue, IF_MATCH, IF_NONE_MATCH};

use super::problem::ApiError;
use crate::store::Condition;
use crate::wire::problem::{ProblemItem, Slug};

/// The tag of a revision: strong, from the number and not from the bytes, so that it is the
/// same whether or not the body travels compressed.
pub fn tag(revision: u64) -> HeaderValue {
    HeaderValue::try_from(format!("\"{revision}\"")).expect("digits and quotes are lawful in a header")
}

/// The header line that carries the tag.
pub fn etag(revision: u64) -> (HeaderName, HeaderValue) {
    (ETAG, tag(revision))
}

/// What a caller knows of the resource.
#[derive(Debug, Clone, PartialEq, Eq)]
enum Tags {
    /// `*`: that it exists.
    Any,
    /// One of these versions.
    These(Vec<String>),
}

impl Tags {
    /// Several headers count as one list. A tag that is not written in quotes matches nothing.
    fn read(headers: &HeaderMap, name: &HeaderName) -> Option<Self> {
        let mut lines = headers.get_all(name).iter().map(|line| line.to_str().unwrap_or_default()).peekable();
        lines.peek()?;
        let list = lines.collect::<Vec<_>>().join(",");
        if list.trim() == "*" {
            return Some(Self::Any);
        }
        Some(Self::These(list.split(',').filter_map(opaque).collect()))
    }

    fn hold(&self, current: &str) -> bool {
        match self {
            Self::Any => true,
            Self::These(tags) => tags.iter().any(|tag| tag == current),
        }
    }
}

/// What stands between the quotes. Weak marks are dropped: a proxy that compresses weakens the
/// tag, some add `-gzip` to it, and the version meant is still the same.
fn opaque(written: &str) -> Option<String> {
    let written = written.trim();
    let strong = written.strip_prefix("W/").unwrap_or(written);
    let inner = strong.strip_prefix('"')?.strip_suffix('"')?;
    Some(inner.strip_suffix("-gzip").unwrap_or(inner).to_owned())
}

/// Both conditions of a request.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Conditions {
    if_match: Option<Tags>,
    if_none_match: Option<Tags>,
}

impl Conditions {
    /// Reads both headers.
    pub fn of(headers: &HeaderMap) -> Self {
        Self { if_match: Tags::read(headers, &IF_MATCH), if_none_match: Tags::read(headers, &IF_NONE_MATCH) }
    }

    /// Whether the caller has this version already.
    pub fn has(&self, current: &str) -> bool {
        self.if_none_match.as_ref().is_some_and(|tags| tags.hold(current))
    }

    /// Judges a change of what is there in this revision: 428 without If-Match, 412 if it is stale.
    pub fn for_change(&self, current: u64) -> Result<Condition, ApiError> {
        let Some(tags) = &self.if_match else {
            return Err(if self.if_none_match.is_some() { exists(current) } else { required(IF_MATCH) });
        };
        if !tags.hold(&current.to_string()) {
            return Err(stale(current));
        }
        if self.has(&current.to_string()) {
            return Err(exists(current));
        }
        Ok(match tags {
            Tags::Any => Condition::Any,
            Tags::These(_) => Condition::Match(vec![current]),
        })
    }

    /// Judges a PUT of what may not be there yet: then it wants `If-None-Match: *`.
    pub fn for_put(&self, current: Option<u64>) -> Result<Condition, ApiError> {
        match (current, &self.if_match, &self.if_none_match) {
            (Some(current), ..) => self.for_change(current),
            (None, Some(_), _) => Err(gone()),
            (None, None, Some(Tags::Any)) => Ok(Condition::NoneMatch),
            (None, None, _) => Err(required(IF_NONE_MATCH)),
        }
    }
}

fn required(wanted: HeaderName) -> ApiError {
    let (name, detail) = if wanted == IF_MATCH {
        ("If-Match", "A change names the version it was made from: send `If-Match` with the ETag last read.")
    } else {
        ("If-None-Match", "It does not exist yet: to create it send `If-None-Match: *`.")
    };
    ApiError::new(Slug::PreconditionRequired, detail).with_faults(vec![ProblemItem::header(
        name,
        "missing",
        "the header is missing",
        None,
    )])
}

/// Somebody else changed it first.
pub fn stale(current: u64) -> ApiError {
    let detail = format!(
        "It has changed since: its tag is now \"{current}\". Read it again and repeat the change. A tag is \
         written with its quotes."
    );
    ApiError::new(Slug::PreconditionFailed, detail)
        .with_faults(vec![ProblemItem::header("If-Match", "stale", "the tag is not the present one", None)])
        .with_header(ETAG, tag(current))
}

/// There is nothing there to match.
pub fn gone() -> ApiError {
    let detail = "It does not exist, so If-Match cannot hold; a new one is put with `If-None-Match: *`.";
    ApiError::new(Slug::PreconditionFailed, detail).with_faults(vec![ProblemItem::header(
        "If-Match",
        "stale",
        "there is nothing to match",
        None,
    )])
}

fn exists(current: u64) -> ApiError {
    let detail =
        format!("It exists already, in revision {current}; to change it send `If-Match` with its ETag.");
    ApiError::new(Slug::PreconditionFailed, detail)
        .with_faults(vec![ProblemItem::header("If-None-Match", "exists", "it exists already", None)])
        .with_header(ETAG, tag(current))
}
