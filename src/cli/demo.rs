//! The demo district: invented buildings with fixed ids, inside the binary.

use std::sync::Arc;

use serde::Deserialize;

use super::{Failure, documents};
use crate::domain::assumptions::Level;
use crate::domain::ids::{AssessmentId, BuildingId};
use crate::domain::time::Timestamp;
use crate::domain::{Assumptions, Caller};
use crate::http::App;
use crate::http::assessing::{Order, Record, make};
use crate::store::Effects;
use crate::wire::{self, BuildingInput};

const DISTRICT: &str = include_str!("../../seed-data/demo/district.json");

macro_rules! files {
    ($($name:literal),* $(,)?) => { &[$(($name, include_str!(concat!("../../seed-data/demo/", $name)))),*] };
}

/// Every building of the district, by the name that `district.json` gives it.
const BUILDINGS: &[(&str, &str)] = files![
    "buildings/01-corner-shop.json",
    "buildings/02-terraced-house.json",
    "buildings/03-flats.json",
    "buildings/04-care-home.json",
    "buildings/05-school.json",
    "buildings/06-restaurant.json",
    "buildings/07-joinery.json",
    "buildings/08-warehouse.json",
    "buildings/09-archive.json",
    "buildings/10-theatre.json",
    "buildings/11-hotel.json",
    "buildings/12-garage.json",
    "buildings/13-basement-bar.json",
    "buildings/14-clinic.json",
    "buildings/15-laboratory.json",
    "buildings/16-pump-house.json",
    "buildings/17-boat-yard.json",
    "buildings/18-offices.json",
    "buildings/19-bungalow.json",
    "buildings/20-chapel-hall.json",
];

/// The room that the request at start asks for, in the first building.
const EXAMPLE_ROOM: &str = "store";

#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct District {
    #[serde(rename = "town")]
    _town: String,
    #[serde(rename = "note")]
    _note: String,
    list: Vec<Entry>,
}

#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct Entry {
    file: String,
    id: String,
    created_at: String,
    assessment_id: String,
    assessed_at: String,
    #[cfg_attr(not(test), expect(dead_code, reason = "the document holds it; a test compares them"))]
    reference: String,
    #[serde(rename = "shows")]
    _shows: String,
}

/// What became of the demo.
pub enum Loaded {
    /// The inventory was empty and holds the district now.
    Filled {
        /// How many buildings.
        buildings: usize,
        /// How many rooms.
        rooms: usize,
        /// Path of a room report to try.
        example: String,
    },
    /// The inventory holds buildings; nothing was changed.
    LeftAlone,
}

/// Fills an empty inventory and screens every building of it.
pub async fn load(app: &App) -> Result<Loaded, Failure> {
    let caller = Caller::local();
    if !app.store.is_empty(&caller).await? {
        return Ok(Loaded::LeftAlone);
    }
    let district: District = serde_json::from_str(DISTRICT)?;
    let mut rooms = 0;
    for entry in &district.list {
        rooms += add(app, &caller, entry).await.map_err(|error| format!("{}: {error}", entry.file))?;
    }
    let example = district.list.first().map(|entry| example(&entry.assessment_id)).unwrap_or_default();
    Ok(Loaded::Filled { buildings: district.list.len(), rooms, example })
}

fn example(assessment_id: &str) -> String {
    format!("/v1/assessments/{assessment_id}/rooms/{EXAMPLE_ROOM}")
}

async fn add(app: &App, caller: &Caller, entry: &Entry) -> Result<usize, Failure> {
    let (_, text) = BUILDINGS.iter().find(|(name, _)| *name == entry.file).ok_or("is not in the binary")?;
    let building = wire::read::<BuildingInput>(text.as_bytes(), app.catalogue)
        .map_err(|refused| documents::faults(&entry.file, &refused))?;
    let id = BuildingId::parse(&entry.id).ok_or("its id is no id")?;
    let rooms = building.rooms.len();

    let saved =
        app.store.create_building(caller, id, building, Effects { at: moment(&entry.created_at)? }).await?;

    let at = moment(&entry.assessed_at)?;
    let assessment = AssessmentId::parse(&entry.assessment_id).ok_or("its assessment's id is no id")?;
    let record = Record { id: assessment, building: id, revision: saved.head.revision };
    let order = Order {
        building: Arc::clone(&saved.building),
        // By screening, so that the service answers at once: anyone may ask for more.
        assumptions: Assumptions { level: Some(Level::Screening), ..Assumptions::default() },
        record: Some(record),
        at,
    };
    let made = make(app, order).await.map_err(|error| format!("cannot be assessed: {error}"))?;
    let kept = made.kept.ok_or("its assessment was not kept")?;
    app.store.insert_assessment(caller, kept, Effects { at }).await?;
    Ok(rooms)
}

fn moment(text: &str) -> Result<Timestamp, Failure> {
    Timestamp::parse(text).ok_or_else(|| format!("{text} is no moment").into())
}

#[cfg(test)]
mod tests {
    use std::collections::BTreeSet;
    use std::fs;

    use super::*;
    use crate::catalogue::Catalogue;

    fn district() -> District {
        serde_json::from_str(DISTRICT).unwrap()
    }

    #[test]
    fn every_file_of_the_district_is_in_the_binary_and_in_the_list() {
        let folder = concat!(env!("CARGO_MANIFEST_DIR"), "/seed-data/demo/buildings");
        let on_disk: BTreeSet<String> = fs::read_dir(folder)
            .unwrap()
            .map(|file| format!("buildings/{}", file.unwrap().file_name().to_string_lossy()))
            .collect();

        let in_binary: BTreeSet<String> = BUILDINGS.iter().map(|(name, _)| (*name).to_owned()).collect();
        let listed: BTreeSet<String> = district().list.into_iter().map(|entry| entry.file).collect();

        assert_eq!(on_disk, in_binary);
        assert_eq!(on_disk, listed);
    }

    #[test]
    fn the_district_has_fifteen_buildings_and_a_hundred_rooms_at_least() {
        let mut rooms = 0;
        for entry in district().list {
            let (_, text) = BUILDINGS.iter().find(|(name, _)| *name == entry.file).unwrap();
            let read = wire::read::<BuildingInput>(text.as_bytes(), Catalogue::embedded());
            let building =
                read.unwrap_or_else(|refused| panic!("{}", documents::faults(&entry.file, &refused)));
            assert_eq!(building.reference.as_deref(), Some(entry.reference.as_str()), "{}", entry.file);
            rooms += building.rooms.len();
        }

        assert!(BUILDINGS.len() >= 15 && rooms >= 100, "{} buildings, {rooms} rooms", BUILDINGS.len());
    }

    #[test]
    fn ids_and_moments_are_lawful_and_each_its_own() {
        let mut seen = BTreeSet::new();
        for entry in district().list {
            let id = BuildingId::parse(&entry.id).unwrap();
            let assessment = AssessmentId::parse(&entry.assessment_id).unwrap();
            assert_eq!((id.0.get_version_num(), assessment.0.get_version_num()), (7, 7));
            assert!(moment(&entry.created_at).unwrap() < moment(&entry.assessed_at).unwrap());
            assert!(
                seen.insert(entry.id) && seen.insert(entry.assessment_id) && seen.insert(entry.reference)
            );
        }
    }
}
