//! The OpenAPI document: what the routes say of themselves, and what holds for all of them.

use std::sync::LazyLock;

use axum::http::Method;
use axum::http::header::{CACHE_CONTROL, CONTENT_TYPE};
use axum::response::{IntoResponse, Response};
use utoipa::openapi::header::Header;
use utoipa::openapi::path::{Operation, PathItem};
use utoipa::openapi::response::Response as ApiResponse;
use utoipa::openapi::schema::{Object, Type};
use utoipa::openapi::{Content, OpenApi, Ref, RefOr, Required, ResponseBuilder};
use utoipa::{OpenApi as _, ToSchema as _};

use super::problem::PROBLEM_JSON;
use super::routes::operations;
use crate::wire::problem::Problem;

/// What the document says of the service as a whole.
#[derive(utoipa::OpenApi)]
#[openapi(
    info(
        title = "Sootline",
        description = "Rates the fire risk of buildings, room by room, before anything burns.\n\n\
            Figures are for planning. They do not replace size-up, local codes, procedures or a licensed \
            engineer.\n\n\
            Numbers are SI and the unit stands last in a member's name. In a request a quantity may also be a \
            string with its unit (`\"12 ft 6 in\"`). A change names the version it was made from: send `If-Match` \
            with the ETag last read. Whatever goes wrong is answered as `application/problem+json`.",
        license(name = "MIT", identifier = "MIT"),
    ),
    servers((url = "/", description = "The service that gave you this document")),
    tags(
        (name = "buildings", description = "The inventory: buildings, saved whole or by parts."),
        (name = "rooms", description = "Single rooms of a building. Work on two rooms never collides."),
        (name = "openings", description = "Single openings of a building: doors, windows, vents, hatches, gaps."),
        (name = "assessments", description = "Ratings of every room of a building; kept, never changed."),
        (name = "simulations", description = "One fire in one set of rooms, minute by minute; nothing is kept."),
        (name = "catalogue", description = "What the names in a building stand for, each row with its source."),
        (name = "methods", description = "How the figures come about: equations, sources, ranges."),
    ),
    components(schemas(Problem)),
)]
struct Service;

static DOCUMENT: LazyLock<OpenApi> = LazyLock::new(write);
static TEXT: LazyLock<String> = LazyLock::new(|| {
    let json = DOCUMENT.to_pretty_json().expect("the document is made of strings and numbers");
    format!("{json}\n")
});

/// The one operation whose body may be left out; utoipa knows only bodies that may be null.
const BODY_LEFT_OUT: &str = "create_assessment";

/// The document.
pub fn openapi() -> &'static OpenApi {
    &DOCUMENT
}

/// The document as it is committed and served.
pub fn openapi_text() -> &'static str {
    &TEXT
}

/// `GET /openapi.json`.
pub async fn get_document() -> Response {
    ([(CONTENT_TYPE, "application/json"), (CACHE_CONTROL, "no-cache")], openapi_text()).into_response()
}

fn write() -> OpenApi {
    let (_, described) = operations().split_for_parts();
    let mut document = Service::openapi();
    document.merge(described);
    // Nobody needs a key yet; saying so keeps it apart from having forgotten.
    document.security = Some(Vec::new());
    let components = document.components.get_or_insert_default();
    for (path, item) in &mut document.paths.paths {
        for (method, operation) in operations_of(item) {
            if operation.operation_id.as_deref() == Some(BODY_LEFT_OUT)
                && let Some(RefOr::T(body)) = &mut operation.request_body
            {
                body.required = Some(Required::False);
            }
            for refusal in Refusal::ALL {
                if refusal.fits(path, &method, operation) {
                    components
                        .responses
                        .entry(refusal.name.to_owned())
                        .or_insert_with(|| refusal.response().into());
                    let reference = RefOr::Ref(Ref::from_response_name(refusal.name));
                    operation.responses.responses.insert(refusal.status.to_string(), reference);
                }
            }
        }
    }
    prune(&mut document);
    document
}

/// Takes out schemas that nothing refers to: those of generic pages are written in place, and
/// their parts are left over.
fn prune(document: &mut OpenApi) {
    loop {
        let text = document.to_json().expect("the document is made of strings and numbers");
        let Some(components) = &mut document.components else { return };
        let before = components.schemas.len();
        components.schemas.retain(|name, _| text.contains(&format!("\"#/components/schemas/{name}\"")));
        if components.schemas.len() == before {
            return;
        }
    }
}

fn operations_of(item: &mut PathItem) -> impl Iterator<Item = (Method, &mut Operation)> {
    [
        (Method::GET, &mut item.get),
        (Method::POST, &mut item.post),
        (Method::PUT, &mut item.put),
        (Method::PATCH, &mut item.patch),
        (Method::DELETE, &mut item.delete),
    ]
    .into_iter()
    .filter_map(|(method, operation)| Some((method, operation.as_mut()?)))
}

/// How an operation can be refused mostly follows from its shape, so that no handler has to
/// say it, and none can forget to.
struct Refusal {
    status: u16,
    name: &'static str,
    description: &'static str,
    header: Option<(&'static str, &'static str)>,
    where_from: Shape,
}

enum Shape {
    Every,
    WithPathParameter,
    WithBody,
    Change,
    /// Only where the handler says so.
    Said,
}

impl Refusal {
    const ALL: &[Self] = &[
        Self::of(
            400,
            "BadRequest",
            Shape::Every,
            "A parameter is wrong, or the body is no JSON that can be read.",
        ),
        Self::of(404, "NotFound", Shape::WithPathParameter, "There is no such record."),
        Self::of(406, "NotAcceptable", Shape::Every, "The header `Accept` leaves out application/json."),
        Self::of(409, "Conflict", Shape::Said, "The records as they are forbid it."),
        Self::of(
            412,
            "PreconditionFailed",
            Shape::Change,
            "The record is not in the state that the condition names.",
        )
        .with("ETag", "The tag it has now, where it exists."),
        Self::of(413, "TooLarge", Shape::WithBody, "The body is larger than 4 MiB."),
        Self::of(415, "UnsupportedMediaType", Shape::WithBody, "The body is of a form not taken here."),
        Self::of(
            422,
            "Invalid",
            Shape::WithBody,
            "Every fault of the body, each with its place. Nothing was saved.",
        ),
        Self::of(
            428,
            "PreconditionRequired",
            Shape::Change,
            "The change does not say which version it was made from.",
        ),
        Self::of(500, "Internal", Shape::Every, "The service failed; its log says why."),
        Self::of(503, "Overloaded", Shape::Every, "The service has more to do than it can take.")
            .with("Retry-After", "Seconds after which it is worth asking again."),
    ];

    const fn of(status: u16, name: &'static str, where_from: Shape, description: &'static str) -> Self {
        Self { status, name, description, header: None, where_from }
    }

    const fn with(mut self, header: &'static str, description: &'static str) -> Self {
        self.header = Some((header, description));
        self
    }

    fn fits(&self, path: &str, method: &Method, operation: &Operation) -> bool {
        match self.where_from {
            Shape::Every => true,
            Shape::WithPathParameter => path.contains('{'),
            Shape::WithBody => operation.request_body.is_some(),
            Shape::Change => matches!(*method, Method::PUT | Method::PATCH | Method::DELETE),
            Shape::Said => operation.responses.responses.contains_key(&self.status.to_string()),
        }
    }

    fn response(&self) -> ApiResponse {
        let schema = Ref::from_schema_name(Problem::name());
        let content = Content::builder().schema(Some(schema)).build();
        let mut response =
            ResponseBuilder::new().description(self.description).content(PROBLEM_JSON, content);
        if let Some((name, description)) = self.header {
            response = response.header(name, text_header(description));
        }
        response.build()
    }
}

fn text_header(description: &str) -> Header {
    let mut header = Header::new(Object::with_type(Type::String));
    header.description = Some(description.to_owned());
    header
}

#[cfg(test)]
mod tests {
    use std::collections::BTreeMap;

    use utoipa::ToSchema;
    use utoipa::openapi::{RefOr, Schema};

    use super::super::summary::{AssessmentSummary, BuildingSummary};
    use crate::report::simulation::SimulationResult;
    use crate::report::{BuildingReport, Methods, RoomReport};
    use crate::wire;

    fn schemas_of<T: ToSchema>() -> Vec<(String, RefOr<Schema>)> {
        let mut schemas = vec![(T::name().into_owned(), T::schema())];
        T::schemas(&mut schemas);
        schemas
    }

    /// Schemas are gathered by name and the last one wins, so two of one name would pass unseen.
    #[test]
    fn no_two_schemas_share_a_name() {
        let mut known = BTreeMap::new();
        let mut read = 0;
        for (name, schema) in [
            schemas_of::<wire::Building>(),
            schemas_of::<wire::BuildingInput>(),
            schemas_of::<wire::Room>(),
            schemas_of::<wire::RoomInput>(),
            schemas_of::<wire::Opening>(),
            schemas_of::<wire::OpeningInput>(),
            schemas_of::<wire::AssessInput>(),
            schemas_of::<wire::AssessmentRequest>(),
            schemas_of::<wire::SimulationInput>(),
            schemas_of::<SimulationResult>(),
            schemas_of::<wire::Problem>(),
            schemas_of::<BuildingSummary>(),
            schemas_of::<AssessmentSummary>(),
            schemas_of::<BuildingReport>(),
            schemas_of::<RoomReport>(),
            schemas_of::<Methods>(),
        ]
        .into_iter()
        .flatten()
        {
            let text = serde_json::to_string(&schema).unwrap();
            let first = known.entry(name.clone()).or_insert_with(|| text.clone());
            assert_eq!(*first, text, "{name} means two things");
            read += 1;
        }
        assert!(read > 100, "only {read} schemas were read");
    }
}
