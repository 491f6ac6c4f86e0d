//! What the store promises, on real files.

mod agencies;
mod assessments;
mod caching;
mod conditions;
mod files;
mod lists;
mod projections;
mod saving;
mod statements;
mod writing;

use std::path::PathBuf;

use sqlx::sqlite::SqliteRow;
use sqlx::{AssertSqlSafe, Connection, SqliteConnection};

use super::*;
use crate::domain::building::{Address, Location, Occupants, Preplan, Response, Sprinklers};
use crate::domain::ids::AgencyId;
use crate::domain::opening::{OpeningKind, Space};
use crate::domain::quantity::Quantity;
use crate::domain::quantity::{
    Distance, Fraction, Latitude, Longitude, OpeningSide, RoomHeight, RoomLength, Sill,
};
use crate::domain::room::{Ceiling, FloorPlan, FuelPackage, Linings, Place, RoomKind};
use crate::domain::time::Timestamp;
use crate::domain::{Building, BuildingId, Caller, Key, Named, Opening, Room};

/// A store in a folder of its own.
struct Kept {
    store: Store,
    folder: tempfile::TempDir,
}

impl std::ops::Deref for Kept {
    type Target = Store;

    fn deref(&self) -> &Store {
        &self.store
    }
}

impl Kept {
    async fn new() -> Self {
        let folder = tempfile::tempdir().unwrap();
        let store = Store::open(&url(&folder.path().join("kept.db"))).await.unwrap();
        Self { store, folder }
    }

    fn path(&self) -> PathBuf {
        self.folder.path().join("kept.db")
    }

    /// A connection of somebody else to the file: an officer with a database shell.
    async fn officer(&self) -> SqliteConnection {
        SqliteConnection::connect(&url(&self.path())).await.unwrap()
    }

    async fn sql(&self, statement: &str) {
        sqlx::query(AssertSqlSafe(statement)).execute(&mut self.officer().await).await.unwrap();
    }

    async fn rows(&self, statement: &str) -> Vec<SqliteRow> {
        sqlx::query(AssertSqlSafe(statement)).fetch_all(&mut self.officer().await).await.unwrap()
    }

    async fn number(&self, statement: &str) -> i64 {
        sqlx::query_scalar(AssertSqlSafe(statement)).fetch_one(&mut self.officer().await).await.unwrap()
    }

    /// Enters a building as the first of `id`.
    async fn enter(&self, id: u128, building: Building) -> SavedBuilding {
        self.create_building(&local(), building_id(id), building, at(1)).await.unwrap()
    }
}

fn url(path: &std::path::Path) -> String {
    format!("sqlite://{}", path.display())
}

fn local() -> Caller {
    Caller::local()
}

fn other() -> Caller {
    Caller { agency: AgencyId("other".to_owned()), ..Caller::local() }
}

fn at(us: i64) -> Effects {
    Effects { at: Timestamp(us) }
}

fn building_id(id: u128) -> BuildingId {
    BuildingId(uuid::Uuid::from_u128(id))
}

fn key(text: &str) -> Key {
    Key::new(text).unwrap()
}

fn quantity<K: crate::domain::quantity::Kind>(value: f64) -> Quantity<K> {
    Quantity::new(value).unwrap()
}

fn accept(_: &Building) -> Result<(), StoreError> {
    Ok(())
}

fn room(text: &str) -> Room {
    let (length_m, width_m): (RoomLength, RoomLength) = (quantity(3.66), quantity(3.6));
    Room {
        key: key(text),
        name: text.to_uppercase(),
        kind: RoomKind::Room,
        room_use: Named::Catalogue("storage".to_owned()),
        floor: -1,
        plan: FloorPlan::Rectangle { length_m, width_m },
        height_m: quantity(2.4),
        position: None,
        ceiling: Ceiling::default(),
        leakage_class: None,
        leakage_area_m2: None,
        mechanical: None,
        linings: Linings::default(),
        fuel_load_mj_m2: Some(quantity(600.0)),
        fuel_packages: Vec::new(),
        storage: None,
        hazards: Vec::new(),
        detectors: Vec::new(),
        sprinkler_heads: None,
        basis: Default::default(),
    }
}

fn package(text: &str) -> FuelPackage {
    FuelPackage {
        key: key(text),
        item: Named::Catalogue("upholstered_sofa".to_owned()),
        count: 2,
        mass_kg: Some(quantity(45.0)),
        base_height_m: quantity::<crate::domain::quantity::DistanceKind>(0.1),
        place: Place::Corner,
        spacing_m: None::<Distance>,
    }
}

fn door(text: &str, connects: [&str; 2]) -> Opening {
    let (width_m, height_m): (OpeningSide, OpeningSide) = (quantity(0.9), quantity(2.0));
    let space = |name: &str| if name == Key::OUTSIDE { Space::Outside } else { Space::Room(key(name)) };
    Opening {
        key: key(text),
        name: text.to_uppercase(),
        kind: OpeningKind::Door,
        connects: connects.map(space),
        width_m,
        height_m,
        sill_m: Sill::new(0.0).unwrap(),
        open_fraction: Fraction::new(0.0).unwrap(),
        held_open: false,
        self_closing: true,
        fire_rating_min: None,
        leakage_area_m2: None,
        swing: None,
        entry: true,
        side: None,
        azimuth_deg: None,
        glazing: None,
        basis: Default::default(),
    }
}

/// A building with the rooms `store` and `shop`, a door `inner` between, a door `front` to outside.
fn shop(name: &str) -> Building {
    Building {
        name: name.to_owned(),
        reference: None,
        address: Address { line: "Harbour Row 12".to_owned(), ..Address::default() },
        location: Some(Location {
            longitude_deg: Longitude::new(0.1).unwrap(),
            latitude_deg: Latitude::new(51.2).unwrap(),
        }),
        occupancy_group: Some("M".to_owned()),
        construction_type: None,
        inspected_on: None,
        notes: String::new(),
        floors: Vec::new(),
        response: Response::default(),
        water_available_l_min: None,
        alarm_monitored: None,
        sprinklers: Sprinklers::default(),
        occupants: Occupants::default(),
        preplan: Preplan::default(),
        rooms: vec![room("store"), room("shop")],
        openings: vec![door("inner", ["store", "shop"]), door("front", ["shop", "outside"])],
        boundaries: Vec::new(),
    }
}

fn with_reference(name: &str, reference: &str) -> Building {
    Building { reference: Some(reference.to_owned()), ..shop(name) }
}

fn taller(mut room: Room, height_m: f64) -> Room {
    room.height_m = RoomHeight::new(height_m).unwrap();
    room
}
