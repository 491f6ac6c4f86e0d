//! Every route of the service.

use axum::Router;
use axum::routing::get;
use utoipa_axum::router::OpenApiRouter;

use super::app::App;
use super::{docs, document, layers, metrics, pages, probes, problem};

/// The operations of the interface. What is registered here is in the OpenAPI document too.
pub(super) fn operations() -> OpenApiRouter<App> {
    OpenApiRouter::new()
}

/// The whole service.
pub fn router(app: App) -> Router {
    let (operations, _) = operations().split_for_parts();
    let routes = operations
        .route("/openapi.json", get(document::get_document))
        .route("/", get(docs::lead_to_docs))
        .route("/docs", get(docs::lead_to_docs))
        .route("/docs/", get(docs::get_docs))
        .route("/docs/{*file}", get(docs::get_docs))
        .route("/problems", get(pages::list_problems))
        .route("/problems/{slug}", get(pages::get_problem))
        .route("/healthz", get(probes::get_health))
        .route("/readyz", get(probes::get_readiness))
        .route("/metrics", get(metrics::get_metrics))
        .method_not_allowed_fallback(problem::not_this_method)
        .fallback(problem::nothing_here)
        .with_state(app.clone());
    layers::around(routes, &app)
}
