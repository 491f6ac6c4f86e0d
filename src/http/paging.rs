//! Lists in pages: an opaque cursor, a limit, the way to the next page.

use axum::http::header::{CACHE_CONTROL, LINK};
use axum::http::{HeaderName, HeaderValue, StatusCode};
use axum::response::Response;
use serde::Serialize;
use utoipa::{IntoParams, ToSchema};

use super::answer::{json, with};
use super::ask::{Query, bad_parameter};
use super::problem::ApiError;
use crate::wire::Page;

/// Items on a page unless asked otherwise.
const DEFAULT_LIMIT: u32 = 50;
/// Most items on a page.
const MAX_LIMIT: u32 = 500;

/// How much of a list is wanted.
#[derive(Debug, IntoParams)]
#[into_params(parameter_in = Query)]
#[expect(dead_code, reason = "describes the query in the OpenAPI document")]
pub struct PageQuery {
    /// Items on the page.
    #[param(minimum = 1, maximum = 500, default = 50)]
    limit: Option<u32>,
}

/// What the OpenAPI document says of `cursor`. Every text of a list's pattern is a place in that
/// list, so the pattern tells a client all there is to know.
pub const CURSOR: &str = "Where the page begins: `next_cursor` of the page before.";

/// Reads `limit`.
pub fn limit(query: &Query) -> Result<u32, ApiError> {
    let Some(text) = query.get("limit") else { return Ok(DEFAULT_LIMIT) };
    match text.parse() {
        Ok(limit) if (1..=MAX_LIMIT).contains(&limit) => Ok(limit),
        _ => Err(bad_parameter("limit", "out_of_range", format!("a whole number from 1 to {MAX_LIMIT}"))),
    }
}

/// Reads `cursor`: where the page begins.
pub fn cursor<T>(query: &Query, read: impl FnOnce(&str) -> Option<T>) -> Result<Option<T>, ApiError> {
    let Some(text) = query.get("cursor") else { return Ok(None) };
    read(text).map(Some).ok_or_else(|| {
        bad_parameter("cursor", "unknown_cursor", "this is no cursor that the list gave; begin without one")
    })
}

/// Answers with a page.
pub fn answer<T: Serialize + ToSchema>(page: &Page<T>, keep: HeaderValue) -> Result<Response, ApiError> {
    let link = page.next.as_deref().and_then(link);
    Ok(with(json(StatusCode::OK, page)?, link.into_iter().chain([(CACHE_CONTROL, keep)])))
}

/// A page of the list at `path`; `after` says where the next one begins, if there is one.
pub fn page<T: ToSchema>(path: &str, query: &Query, items: Vec<T>, after: Option<&str>) -> Page<T> {
    let next_cursor = after.map(str::to_owned);
    let next = next_cursor.as_ref().map(|cursor| {
        let kept = query.pairs().filter(|(name, _)| *name != "cursor");
        let kept = kept.map(|(name, value)| format!("{name}={}&", escape(value))).collect::<String>();
        format!("{path}?{kept}cursor={cursor}")
    });
    Page { items, next, next_cursor }
}

/// The header that leads to the next page, too.
fn link(next: &str) -> Option<(HeaderName, HeaderValue)> {
    Some((LINK, HeaderValue::try_from(format!("<{next}>; rel=\"next\"")).ok()?))
}

/// Reads an id in a cursor: 32 hexadecimal digits in lower case.
pub fn id_in(text: &str) -> Option<uuid::Uuid> {
    if text.len() == 32 && is_hexadecimal(text) { uuid::Uuid::try_parse(text).ok() } else { None }
}

/// Reads a number in a cursor: 16 hexadecimal digits in lower case.
pub fn number_in(text: &str) -> Option<u64> {
    if text.len() == 16 && is_hexadecimal(text) { u64::from_str_radix(text, 16).ok() } else { None }
}

fn is_hexadecimal(text: &str) -> bool {
    text.bytes().all(|c| c.is_ascii_digit() || (b'a'..=b'f').contains(&c))
}

/// Percent-encodes a value of a query.
pub(super) fn escape(value: &str) -> String {
    value.bytes().fold(String::new(), |mut out, byte| {
        if byte.is_ascii_alphanumeric() || b"-._~".contains(&byte) {
            out.push(char::from(byte));
        } else {
            out.push_str(&format!("%{byte:02X}"));
        }
        out
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn an_id_in_a_cursor_is_read_as_it_is_written() {
        let id = uuid::Uuid::from_u128(0x019a_c000_0000_7000_8000_0000_0000_0001);

        assert_eq!(id_in(&id.simple().to_string()), Some(id));
        for text in ["", "0", &id.to_string(), &id.simple().to_string().to_uppercase(), "zz"] {
            assert_eq!(id_in(text), None, "{text}");
        }
    }

    #[test]
    fn values_are_escaped() {
        assert_eq!(escape("417 B&C=ü"), "417%20B%26C%3D%C3%BC");
    }
}
