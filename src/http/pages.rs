//! The page behind the `type` of each problem.

use axum::extract::RawPathParams;
use axum::http::header::{CACHE_CONTROL, CONTENT_SECURITY_POLICY};
use axum::response::{Html, IntoResponse, Response};

use super::problem::ApiError;
use crate::wire::problem::{self, Slug};

/// `GET /problems`.
pub async fn list_problems() -> Response {
    let mut list = String::new();
    for slug in problem::ALL {
        let (name, title) = (slug.name(), slug.title());
        list.push_str(&format!("<li><a href=\"/problems/{name}\">{name}</a>: {title}</li>\n"));
    }
    page("Problems", &format!("<p>Whatever goes wrong is told as one of these.</p>\n<ul>\n{list}</ul>"))
}

/// `GET /problems/{slug}`.
pub async fn get_problem(path: RawPathParams) -> Result<Response, ApiError> {
    let asked = path.iter().next().map_or("", |(_, value)| value);
    let slug = Slug::of(asked).ok_or_else(|| ApiError::not_found("such problem"))?;
    let body = format!(
        "<p>{words}</p>\n<p>Status {status}, type <code>{uri}</code>.</p>\n\
         <p><a href=\"/problems\">All problems</a>, <a href=\"/docs/\">documents</a></p>",
        words = slug.page(),
        status = slug.status(),
        uri = slug.uri(),
    );
    Ok(page(slug.title(), &body))
}

/// The words are ours and constant: nothing a caller sent stands on a page.
fn page(title: &str, body: &str) -> Response {
    let html = format!(
        "<!doctype html>\n<html lang=\"en\">\n<head>\n<meta charset=\"utf-8\">\n\
         <meta name=\"viewport\" content=\"width=device-width, initial-scale=1\">\n\
         <title>{title} - Sootline</title>\n</head>\n<body>\n<main>\n<h1>{title}</h1>\n{body}\n</main>\n</body>\n</html>\n"
    );
    let headers = [
        (CONTENT_SECURITY_POLICY, "default-src 'none'; frame-ancestors 'none'; base-uri 'none'"),
        (CACHE_CONTROL, "public, max-age=3600"),
    ];
    (headers, Html(html)).into_response()
}
