//! What a request asks beside its body: media it accepts, parameters, conditions.

use std::collections::BTreeMap;
use std::collections::btree_map::Entry;
use std::convert::Infallible;

use axum::extract::FromRequestParts;
use axum::http::header::{ACCEPT, HeaderMap};
use axum::http::request::Parts;
use axum::http::{StatusCode, Uri};
use axum::response::{IntoResponse, Response};

use super::conditional::{Conditions, etag};
use super::media;
use super::problem::ApiError;
use crate::wire::problem::{ProblemItem, Slug};

/// The head of a request. Each judgement is its own method, because their order is part of the
/// contract: a handler first finds what is named (404), then asks [`Ask::accepts_json`] (406),
/// takes the body (413, 415), judges conditions (428, 412) and parameters (400), and only then
/// reads the body (400, 422).
#[derive(Debug, Clone)]
pub struct Ask {
    headers: HeaderMap,
    uri: Uri,
}

impl<S: Sync> FromRequestParts<S> for Ask {
    type Rejection = Infallible;

    async fn from_request_parts(parts: &mut Parts, _state: &S) -> Result<Self, Infallible> {
        Ok(Self { headers: parts.headers.clone(), uri: parts.uri.clone() })
    }
}

impl Ask {
    /// Refuses a caller who wants no JSON: 406.
    pub fn accepts_json(&self) -> Result<(), ApiError> {
        let accepted = self.headers.get_all(ACCEPT);
        if media::accepts(
            accepted.iter().map(|line| line.to_str().unwrap_or_default()),
            "application",
            "json",
        ) {
            return Ok(());
        }
        Err(ApiError::new(Slug::NotAcceptable, "This address answers in application/json.").with_faults(
            vec![ProblemItem::header("Accept", "not_acceptable", "it leaves out application/json", None)],
        ))
    }

    /// Whether a table is wanted more than JSON; refuses a caller who wants neither: 406.
    pub fn prefers_csv(&self) -> Result<bool, ApiError> {
        let wanted = |kind, sub| {
            let lines = self.headers.get_all(ACCEPT);
            media::quality(lines.iter().map(|line| line.to_str().unwrap_or_default()), kind, sub)
        };
        let (json, csv) = (wanted("application", "json"), wanted("text", "csv"));
        if json > 0.0 || csv > 0.0 {
            return Ok(csv > json);
        }
        let detail = "This address answers in application/json or text/csv.";
        let left_out = "it leaves out application/json and text/csv";
        Err(ApiError::new(Slug::NotAcceptable, detail).with_faults(vec![ProblemItem::header(
            "Accept",
            "not_acceptable",
            left_out,
            None,
        )]))
    }

    /// The conditions of the request.
    pub fn conditions(&self) -> Conditions {
        Conditions::of(&self.headers)
    }

    /// 304 where the caller has this revision already.
    pub fn not_modified(&self, revision: u64) -> Option<Response> {
        let has = self.conditions().has(&revision.to_string());
        has.then(|| (StatusCode::NOT_MODIFIED, [etag(revision)]).into_response())
    }

    /// The parameters behind the question mark; any but the known ones is refused by name.
    pub fn query(&self, known: &[&str]) -> Result<Query, ApiError> {
        Query::read(&self.uri, known)
    }
}

/// Parameters, each at most once.
#[derive(Debug, Clone, Default)]
pub struct Query(BTreeMap<String, String>);

impl Query {
    fn read(uri: &Uri, known: &[&str]) -> Result<Self, ApiError> {
        let pairs = axum::extract::Query::<Vec<(String, String)>>::try_from_uri(uri)
            .map_err(|_| bad_parameter("", "unreadable", "the parameters cannot be read"))?;
        let mut values = BTreeMap::new();
        let mut faults = Vec::new();
        for (name, value) in pairs.0 {
            if !known.contains(&name.as_str()) {
                faults.push(unknown(&name, known));
                continue;
            }
            match values.entry(name) {
                Entry::Vacant(free) => {
                    free.insert(value);
                }
                Entry::Occupied(taken) => {
                    let detail = "the parameter is given twice";
                    faults.push(ProblemItem::parameter(taken.key(), "duplicate", detail, None));
                }
            }
        }
        if faults.is_empty() { Ok(Self(values)) } else { Err(bad_parameters(faults)) }
    }

    /// The parameter, if it is given.
    pub fn get(&self, name: &str) -> Option<&str> {
        self.0.get(name).map(String::as_str)
    }

    /// All that are given, by name.
    pub fn pairs(&self) -> impl Iterator<Item = (&str, &str)> {
        self.0.iter().map(|(name, value)| (name.as_str(), value.as_str()))
    }
}

fn unknown(name: &str, known: &[&str]) -> ProblemItem {
    // Likeness by Jaro and Winkler from which a name is offered. Ours.
    const LEAST: f64 = 0.78;
    let likeness = |known: &&str| (strsim::jaro_winkler(known, name), (*known).to_owned());
    let nearest = known.iter().map(likeness).filter(|(likeness, _)| *likeness >= LEAST);
    let nearest = nearest.max_by(|(a, _), (b, _)| a.total_cmp(b)).map(|(_, known)| known);
    ProblemItem::parameter(name, "unknown_parameter", "this address has no such parameter", nearest)
}

/// Refuses one parameter.
pub fn bad_parameter(name: &str, code: &'static str, detail: impl Into<String>) -> ApiError {
    bad_parameters(vec![ProblemItem::parameter(name, code, detail, None)])
}

fn bad_parameters(faults: Vec<ProblemItem>) -> ApiError {
    ApiError::new(Slug::InvalidParameter, "A parameter behind the question mark is wrong.")
        .with_faults(faults)
}
