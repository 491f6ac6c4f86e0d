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

/// How much of a list is wanted, and from where.
#[derive(Debug, IntoParams)]
#[into_params(parameter_in = Query)]
#[expect(dead_code, reason = "describes the query in the OpenAPI document")]
pub struct PageQuery {
    /// Items on the page.
    #[param(minimum = 1, maximum = 500, default = 50)]
    limit: Option<u32>,
    /// Where the page begins: `next_cursor` of the page before.
    cursor: Option<String>,
}

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
    let begins = decode(text).and_then(|text| read(&text));
    begins.map(Some).ok_or_else(|| {
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
    let next_cursor = after.map(encode);
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

/// Hexadecimal: opaque enough to keep people from making their own, and lawful in a URL.
fn encode(text: &str) -> String {
    text.bytes().map(|byte| format!("{byte:02x}")).collect()
}

fn decode(text: &str) -> Option<String> {
    let digit = |c: u8| char::from(c).to_digit(16).filter(|_| !c.is_ascii_uppercase());
    let pairs = text.as_bytes().chunks(2).map(|pair| match pair {
        [high, low] => u8::try_from(digit(*high)? * 16 + digit(*low)?).ok(),
        _ => None,
    });
    String::from_utf8(pairs.collect::<Option<_>>()?).ok()
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
    fn a_cursor_comes_back_as_it_went() {
        for text in ["", "019ac000-0000-7000-8000-000000000001", "Zoë|7"] {
            assert_eq!(decode(&encode(text)).as_deref(), Some(text));
        }
    }

    #[test]
    fn what_is_no_cursor_is_refused() {
        for text in ["z", "0", "0g", "ff", "AB", "é", "%"] {
            assert_eq!(decode(text), None, "{text}");
        }
    }

    #[test]
    fn values_are_escaped() {
        assert_eq!(escape("417 B&C=ü"), "417%20B%26C%3D%C3%BC");
    }
}
