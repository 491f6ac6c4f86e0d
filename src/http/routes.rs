//! Every route of the service.

use axum::Router;
use axum::routing::get;
use utoipa_axum::router::OpenApiRouter;
use utoipa_axum::routes;

use super::app::App;
use super::{
    assessments, buildings, catalogue, docs, document, layers, methods, metrics, openings, pages, probes,
    problem, rooms, simulations,
};

/// The operations of the interface. What is registered here is in the OpenAPI document too.
pub(super) fn operations() -> OpenApiRouter<App> {
    OpenApiRouter::new()
        .routes(routes!(buildings::list_buildings, buildings::create_building))
        .routes(routes!(
            buildings::get_building,
            buildings::put_building,
            buildings::patch_building,
            buildings::delete_building
        ))
        .routes(routes!(rooms::get_room, rooms::put_room, rooms::patch_room, rooms::delete_room))
        .routes(routes!(
            openings::get_opening,
            openings::put_opening,
            openings::patch_opening,
            openings::delete_opening
        ))
        .routes(routes!(assessments::list_assessments, assessments::create_assessment))
        .routes(routes!(assessments::get_latest_assessment))
        .routes(routes!(assessments::get_assessment))
        .routes(routes!(assessments::get_room_report))
        .routes(routes!(assessments::assess))
        .routes(routes!(simulations::simulate))
        .routes(routes!(catalogue::list_uses))
        .routes(routes!(catalogue::list_items))
        .routes(routes!(catalogue::list_fuels))
        .routes(routes!(catalogue::list_materials))
        .routes(routes!(catalogue::list_leakage_classes))
        .routes(routes!(catalogue::list_detectors))
        .routes(routes!(catalogue::list_sprinklers))
        .routes(routes!(methods::list_methods))
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
