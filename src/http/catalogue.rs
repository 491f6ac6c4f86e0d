//! `/v1/catalogue`: what the names in a building stand for.

use axum::extract::State;
use axum::response::Response;

use super::app::App;
use super::ask::Ask;
use super::catalogue_rows::{
    CatalogueDetector, CatalogueFuel, CatalogueItem, CatalogueLeakage, CatalogueMaterial, CatalogueSprinkler,
    CatalogueUse,
};
use super::methods::AN_HOUR;
use super::paging::{self, PageQuery};
use super::problem::ApiError;
use crate::wire::Page;

/// The list of one subject: all that differs is the name and the row.
macro_rules! lists {
    ($($(#[doc = $doc:literal])* $list:ident $path:literal $rows:ident $row:ident;)*) => {$(
        $(#[doc = $doc])*
        #[utoipa::path(
            get,
            path = $path,
            tag = "catalogue",
            params(
                PageQuery,
                ("cursor" = Option<String>, Query, description = paging::CURSOR, pattern = "^[0-9]{1,4}$"),
            ),
            responses((
                status = 200, description = "A page of the list.", body = Page<$row>,
                headers(("Link" = String, description = "The next page, `rel=\"next\"`; left out on the last.")),
            )),
        )]
        pub async fn $list(State(app): State<App>, ask: Ask) -> Result<Response, ApiError> {
            ask.accepts_json()?;
            let query = ask.query(&["limit", "cursor"])?;
            let limit = usize::try_from(paging::limit(&query)?).unwrap_or(usize::MAX);
            // Rows keep their places as long as the program runs, so the place is the cursor.
            let from = paging::cursor(&query, place)?.unwrap_or(0);
            let rows = app.catalogue.$rows();
            let more = rows.len() > from.saturating_add(limit);
            let items = rows.skip(from).take(limit).map($row::of).collect::<Result<Vec<_>, _>>()?;
            let after = more.then(|| (from + limit).to_string());
            paging::answer(&paging::page($path, &query, items, after.as_deref()), AN_HOUR)
        }
    )*};
}

fn place(text: &str) -> Option<usize> {
    let lawful = text.len() <= 4 && text.bytes().all(|c| c.is_ascii_digit());
    if lawful { text.parse().ok() } else { None }
}

lists! {
    /// List what rooms are used for.
    ///
    /// How much there is to burn in such a room, with fractiles, and how fast it gets going.
    list_uses "/v1/catalogue/uses" uses CatalogueUse;
    /// List what stands in rooms.
    ///
    /// Things that burn as one: sofas, pallets, cars.
    list_items "/v1/catalogue/items" items CatalogueItem;
    /// List what burns.
    ///
    /// Heat of combustion, composition, yields and radiative share of fuels.
    list_fuels "/v1/catalogue/fuels" fuels CatalogueFuel;
    /// List what rooms are lined with.
    ///
    /// Conductivity, density and specific heat, and whether the material burns.
    list_materials "/v1/catalogue/materials" materials CatalogueMaterial;
    /// List how much rooms leak.
    ///
    /// Classes of construction by the area of their leaks.
    list_leakage_classes "/v1/catalogue/leakage" leakages CatalogueLeakage;
    /// List what raises the alarm.
    ///
    /// Detectors by what they act on.
    list_detectors "/v1/catalogue/detectors" detectors CatalogueDetector;
    /// List what gives water.
    ///
    /// Sprinkler heads by what opens them.
    list_sprinklers "/v1/catalogue/sprinklers" sprinklers CatalogueSprinkler;
}
