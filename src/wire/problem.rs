//! Problem documents (RFC 9457) and the closed list of their types.

use serde::Serialize;
use utoipa::ToSchema;

use crate::domain::Invalid;

/// The types of problems. Each has a page at `/problems/<slug>`.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
#[expect(missing_docs, reason = "each has its page in words")]
pub enum Slug {
    Unreadable,
    InvalidParameter,
    Unauthenticated,
    Forbidden,
    NotFound,
    MethodNotAllowed,
    NotAcceptable,
    Conflict,
    PreconditionFailed,
    TooLarge,
    UnsupportedMediaType,
    Invalid,
    OverBudget,
    PreconditionRequired,
    RateLimited,
    Internal,
    Overloaded,
}

/// Every type.
pub const ALL: [Slug; 17] = [
    Slug::Unreadable,
    Slug::InvalidParameter,
    Slug::Unauthenticated,
    Slug::Forbidden,
    Slug::NotFound,
    Slug::MethodNotAllowed,
    Slug::NotAcceptable,
    Slug::Conflict,
    Slug::PreconditionFailed,
    Slug::TooLarge,
    Slug::UnsupportedMediaType,
    Slug::Invalid,
    Slug::OverBudget,
    Slug::PreconditionRequired,
    Slug::RateLimited,
    Slug::Internal,
    Slug::Overloaded,
];

impl Slug {
    /// The type of this name.
    pub fn of(name: &str) -> Option<Self> {
        ALL.into_iter().find(|slug| slug.name() == name)
    }

    /// Name, status, title, and the text of the page.
    const fn row(self) -> (&'static str, u16, &'static str, &'static str) {
        match self {
            Self::Unreadable => (
                "unreadable",
                400,
                "The body cannot be read",
                "The body is not JSON as this service reads it: its syntax, its encoding (UTF-8 without a byte order mark), its depth (at most 32 levels) or a member that stands twice. The first fault is listed, with its line and column. Mend it and send the request again.",
            ),
            Self::InvalidParameter => (
                "invalid-parameter",
                400,
                "A parameter is not lawful",
                "A query parameter or header is unknown here or has an unlawful value. Each is listed with what would be lawful.",
            ),
            Self::Unauthenticated => (
                "unauthenticated",
                401,
                "Who asks is not known",
                "The request carries no key, or one that is not valid here. Send a valid key.",
            ),
            Self::Forbidden => (
                "forbidden",
                403,
                "The caller may not do this",
                "The key is valid, and its role does not allow this request. Ask the bureau's officer.",
            ),
            Self::NotFound => (
                "not-found",
                404,
                "There is no such thing",
                "Nothing is kept under this address: it was never there, was deleted, or the id is not written as this service writes ids (a lower-case UUID).",
            ),
            Self::MethodNotAllowed => (
                "method-not-allowed",
                405,
                "This cannot be done here",
                "The address exists and does not know this method. The header Allow lists those it knows.",
            ),
            Self::NotAcceptable => (
                "not-acceptable",
                406,
                "The wanted form is not served",
                "The header Accept asks only for forms that are not served at this address.",
            ),
            Self::Conflict => (
                "conflict",
                409,
                "The change conflicts with what is kept",
                "The change is lawful by itself and contradicts something that is kept: a reference that another building has, or a room that openings still join. What stands against it is named.",
            ),
            Self::PreconditionFailed => (
                "precondition-failed",
                412,
                "Someone else changed it first",
                "The tag in If-Match is not that of the present revision, or If-None-Match: * met something that exists. Read it again, apply the change to what is there now, and send it with the new tag.",
            ),
            Self::TooLarge => (
                "too-large",
                413,
                "The body is too large",
                "A body may have at most 4 MiB. Send the building in parts: first without rooms, then room by room.",
            ),
            Self::UnsupportedMediaType => (
                "unsupported-media-type",
                415,
                "The body has an unknown form",
                "The header Content-Type is missing or names a form that is not read at this address: application/json, and application/merge-patch+json for PATCH.",
            ),
            Self::Invalid => (
                "invalid",
                422,
                "The body has faults",
                "The body is JSON, and what it says is not lawful: a wrong type, an unknown or missing member, a value outside its limits, or two members that contradict each other. All faults are listed, each with a JSON Pointer to its place and, where there is one, its mend. Nothing was saved.",
            ),
            Self::OverBudget => (
                "over-budget",
                422,
                "The work is too large for one request",
                "The request asks for more computing than is done while a client waits. Ask for fewer rooms, scenarios or output times.",
            ),
            Self::PreconditionRequired => (
                "precondition-required",
                428,
                "The tag is missing",
                "A change must say which revision it changes: If-Match with the tag from reading it, or If-None-Match: * for something new. So nobody overwrites another's work unseen.",
            ),
            Self::RateLimited => (
                "rate-limited",
                429,
                "Too many requests",
                "This caller has sent more than its share for now. The header Retry-After says when to try again.",
            ),
            Self::Internal => (
                "internal",
                500,
                "The service failed",
                "Something went wrong that the request is not to blame for. Nothing was half saved. Tell whoever runs the service, with the id of the request.",
            ),
            Self::Overloaded => (
                "overloaded",
                503,
                "The service is busy",
                "The service has as much work as it can hold. The header Retry-After says when to try again.",
            ),
        }
    }

    /// Name, as in `/problems/<slug>`.
    pub const fn name(self) -> &'static str {
        self.row().0
    }

    /// Status of the answer.
    pub const fn status(self) -> u16 {
        self.row().1
    }

    /// Title.
    pub const fn title(self) -> &'static str {
        self.row().2
    }

    /// Text of its page.
    pub const fn page(self) -> &'static str {
        self.row().3
    }

    /// The `type` of its documents.
    pub fn uri(self) -> String {
        format!("/problems/{}", self.name())
    }
}

/// One fault: where, what kind, in words, and how to mend it. One of `pointer`, `parameter` and
/// `header` says where.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, ToSchema)]
pub struct ProblemItem {
    /// JSON Pointer into the body.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub pointer: Option<String>,
    /// Name of a query parameter.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub parameter: Option<String>,
    /// Name of a header.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub header: Option<String>,
    /// A stable word for programs.
    pub code: String,
    /// One sentence for people.
    pub detail: String,
    /// How to mend it; null where there is nothing to say.
    #[schema(required)]
    pub suggestion: Option<String>,
}

impl ProblemItem {
    fn new(code: &str, detail: impl Into<String>, suggestion: Option<String>) -> Self {
        let (pointer, parameter, header) = (None, None, None);
        Self { pointer, parameter, header, code: code.to_owned(), detail: detail.into(), suggestion }
    }

    /// A fault of a query parameter.
    pub fn parameter(name: &str, code: &str, detail: impl Into<String>, suggestion: Option<String>) -> Self {
        Self { parameter: Some(name.to_owned()), ..Self::new(code, detail, suggestion) }
    }

    /// A fault of a header.
    pub fn header(name: &str, code: &str, detail: impl Into<String>, suggestion: Option<String>) -> Self {
        Self { header: Some(name.to_owned()), ..Self::new(code, detail, suggestion) }
    }
}

impl From<Invalid> for ProblemItem {
    fn from(fault: Invalid) -> Self {
        let pointer = Some(fault.pointer.as_str().to_owned());
        Self { pointer, ..Self::new(fault.code, fault.detail, fault.suggestion) }
    }
}

/// What every refusal answers, as `application/problem+json`.
#[derive(Debug, Clone, PartialEq, Eq, Serialize, ToSchema)]
pub struct Problem {
    /// The type: `/problems/<slug>`, a page of this service.
    #[serde(rename = "type")]
    pub problem_type: String,
    /// Title of the type.
    pub title: String,
    /// Status of the answer.
    pub status: u16,
    /// What happened here, in one sentence.
    pub detail: String,
    /// The address that was asked.
    pub instance: String,
    /// The faults, where there are several or a place to point at.
    pub errors: Vec<ProblemItem>,
}

impl Problem {
    /// A problem without places to point at.
    pub fn new(slug: Slug, detail: impl Into<String>, instance: impl Into<String>) -> Self {
        Self {
            problem_type: slug.uri(),
            title: slug.title().to_owned(),
            status: slug.status(),
            detail: detail.into(),
            instance: instance.into(),
            errors: Vec::new(),
        }
    }

    /// The same with its faults.
    #[must_use]
    pub fn with_errors(self, errors: impl IntoIterator<Item = impl Into<ProblemItem>>) -> Self {
        Self { errors: errors.into_iter().map(Into::into).collect(), ..self }
    }
}
