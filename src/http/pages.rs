//! The page behind the `type` of each problem.

use axum::extract::RawPathParams;
use axum::http::header::{CACHE_CONTROL, CONTENT_SECURITY_POLICY};
use axum::response::{Html, IntoResponse, Response};

use super::problem::ApiError;
use crate::wire::problem::Slug;

/// `GET /problems`.
pub async fn list_problems() -> Response {
    let mut list = String::new();
    for slug in Slug::ALL {
        let (word, title) = (slug.word(), slug.title());
        list.push_str(&format!("<li><a href=\"/problems/{word}\">{word}</a>: {title}</li>\n"));
    }
    page("Problems", &format!("<p>Whatever goes wrong is told as one of these.</p>\n<ul>\n{list}</ul>"))
}

/// `GET /problems/{slug}`.
pub async fn get_problem(path: RawPathParams) -> Result<Response, ApiError> {
    let asked = path.iter().next().map_or("", |(_, value)| value);
    let slug = Slug::ALL.iter().copied().find(|slug| slug.word() == asked);
    let slug = slug.ok_or_else(|| ApiError::not_found("such problem"))?;
    let body = format!(
        "<p>Status {status}, <code>/problems/{word}</code>.</p>\n<h2>What it means</h2>\n<p>{meaning}</p>\n\
         <h2>What to do</h2>\n<p>{mend}</p>\n\
         <p><a href=\"/problems\">All problems</a>, <a href=\"/docs/\">documents</a></p>",
        status = slug.status(),
        word = slug.word(),
        meaning = meaning(slug),
        mend = mend(slug),
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

fn meaning(slug: Slug) -> &'static str {
    match slug {
        Slug::Unreadable => {
            "The body is no JSON that can be read: broken syntax or encoding, a number that is none, a member \
             given twice, or nesting deeper than 32. The first fault is named."
        }
        Slug::InvalidParameter => {
            "A parameter behind the question mark is unknown, given twice, or has a value that it cannot have."
        }
        Slug::Unauthenticated => "The request does not say who asks, and this address wants to know.",
        Slug::Forbidden => "Whoever asks may not do this.",
        Slug::NotFound => "There is nothing at this address: never was, or it has been deleted.",
        Slug::MethodNotAllowed => "The address exists, but not for this method.",
        Slug::NotAcceptable => "The header Accept leaves out every form in which this address can answer.",
        Slug::Conflict => {
            "The records as they are forbid the change: a reference that another building has, or a room that \
             openings still join."
        }
        Slug::PreconditionFailed => "The record is not in the state that If-Match or If-None-Match names.",
        Slug::TooLarge => "The body is larger than 4 MiB.",
        Slug::UnsupportedMediaType => "The body is of a form that this address does not take.",
        Slug::Invalid => {
            "The body was read and what it says cannot be. Every fault is listed with its place, a code and, \
             where there is one, a suggestion. Nothing was saved."
        }
        Slug::OverBudget => "The assessment is more work than can be done while somebody waits.",
        Slug::PreconditionRequired => {
            "A change must say which version it was made from, so that nobody's work is overwritten unseen."
        }
        Slug::RateLimited => "Too many requests came from the same caller.",
        Slug::Internal => "The service failed. The fault is in the service, not in the request.",
        Slug::Overloaded => "The service has more to do than it can take.",
    }
}

fn mend(slug: Slug) -> &'static str {
    match slug {
        Slug::Unreadable => "Mend the place that the pointer or the detail names, and send it again.",
        Slug::InvalidParameter => "Mend or leave out the parameter named.",
        Slug::Unauthenticated => "Send the key you were given.",
        Slug::Forbidden => "Ask the officer of your agency.",
        Slug::NotFound => "Check the id. Ids are lower case.",
        Slug::MethodNotAllowed => "Use a method that the header Allow lists.",
        Slug::NotAcceptable => "Send Accept: application/json, or no such header.",
        Slug::Conflict => "Resolve what the detail names, then repeat the change.",
        Slug::PreconditionFailed => "Read the record again, repeat the change on it, and send its new ETag.",
        Slug::TooLarge => "Send less; change single rooms and openings at their own addresses.",
        Slug::UnsupportedMediaType => {
            "Send application/json; for PATCH, application/merge-patch+json. Do not compress the body."
        }
        Slug::Invalid => "Mend every place listed, and send it again.",
        Slug::OverBudget => "Ask for fewer scenarios or a lower level.",
        Slug::PreconditionRequired => {
            "Send If-Match with the ETag last read; for something new, If-None-Match: *."
        }
        Slug::RateLimited | Slug::Overloaded => "Wait as long as Retry-After says, then send it again.",
        Slug::Internal => "Tell whoever runs the service the id at the end of `instance`; the log has it too.",
    }
}
