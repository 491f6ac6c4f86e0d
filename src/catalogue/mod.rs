//! Uses, items, fuels, materials, leakage classes, detectors and sprinklers, inside the binary.
//!
//! The files stand in `seed-data/catalogue`, one per subject; each row keeps its source, says
//! whether that source was seen or its numbers recalled, and names the members that are this
//! project's own estimates. A key never changes once released, because buildings hold it.

mod nearest;
mod rows;
#[cfg(test)]
mod tests;

use std::{collections::HashMap, sync::OnceLock};

use serde::de::DeserializeOwned;
use sha2::{Digest, Sha256};

use crate::domain::properties::{
    DetectorProperties, FuelProperties, ItemProperties, LeakageProperties, MaterialProperties,
    SprinklerProperties, UseProperties,
};

/// The embedded files, in the order in which the digest reads them.
const FILES: [&str; 7] = [
    include_str!("../../seed-data/catalogue/uses.json"),
    include_str!("../../seed-data/catalogue/items.json"),
    include_str!("../../seed-data/catalogue/fuels.json"),
    include_str!("../../seed-data/catalogue/materials.json"),
    include_str!("../../seed-data/catalogue/leakage.json"),
    include_str!("../../seed-data/catalogue/detectors.json"),
    include_str!("../../seed-data/catalogue/sprinklers.json"),
];

/// The subjects of the catalogue, named as in its routes and files.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Kind {
    /// What rooms are used for.
    Uses,
    /// What stands in a room.
    Items,
    /// What burns.
    Fuels,
    /// What rooms are lined with.
    Materials,
    /// How much rooms leak.
    Leakage,
    /// What raises the alarm.
    Detectors,
    /// What gives water.
    Sprinklers,
}

impl Kind {
    /// Every subject, in the order of the files.
    pub const ALL: [Self; 7] = [
        Self::Uses,
        Self::Items,
        Self::Fuels,
        Self::Materials,
        Self::Leakage,
        Self::Detectors,
        Self::Sprinklers,
    ];

    /// The name used in routes and files: `uses`, `items` and so on.
    pub const fn name(self) -> &'static str {
        match self {
            Self::Uses => "uses",
            Self::Items => "items",
            Self::Fuels => "fuels",
            Self::Materials => "materials",
            Self::Leakage => "leakage",
            Self::Detectors => "detectors",
            Self::Sprinklers => "sprinklers",
        }
    }
}

/// Whether the source of a row was read, or its numbers recalled without it.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Provenance {
    /// The numbers that are not estimated were seen in a published text.
    Seen,
    /// The numbers were recalled: check them before relying on one.
    Memory,
}

impl Provenance {
    /// Name on the wire and in the files.
    pub const fn name(self) -> &'static str {
        match self {
            Self::Seen => "seen",
            Self::Memory => "memory",
        }
    }
}

/// One row: a name, what it stands for, and where that comes from.
#[derive(Debug, Clone, PartialEq)]
pub struct Row<T> {
    /// Name by which buildings refer to it; never changes.
    pub key: String,
    /// Name for people.
    pub title: String,
    /// What it stands for.
    pub properties: T,
    /// Publication or practice the numbers come from.
    pub source: String,
    /// Whether that was seen.
    pub provenance: Provenance,
    /// What a reader should know; empty when there is nothing.
    pub note: String,
    /// Members that are this project's estimates, not the source's.
    pub estimated: Vec<String>,
}

impl<T> Row<T> {
    /// Whether a member is this project's own estimate.
    pub fn is_estimated(&self, member: &str) -> bool {
        self.estimated.iter().any(|name| name == member)
    }
}

/// The rows of one subject in the order of its file, found by key.
#[derive(Debug)]
struct Table<T> {
    rows: Vec<Row<T>>,
    by_key: HashMap<String, usize>,
}

impl<T> Table<T> {
    fn read<R: DeserializeOwned + Into<Row<T>>>(text: &str) -> Result<Self, serde_json::Error> {
        let rows: Vec<Row<T>> = serde_json::from_str::<Vec<R>>(text)?.into_iter().map(Into::into).collect();
        let by_key = rows.iter().enumerate().map(|(at, row)| (row.key.clone(), at)).collect();
        Ok(Self { rows, by_key })
    }

    fn get(&self, key: &str) -> Option<&Row<T>> {
        self.rows.get(*self.by_key.get(key)?)
    }

    fn keys(&self) -> impl Iterator<Item = &str> {
        self.rows.iter().map(|row| row.key.as_str())
    }
}

/// The catalogue.
#[derive(Debug)]
pub struct Catalogue {
    uses: Table<UseProperties>,
    items: Table<ItemProperties>,
    fuels: Table<FuelProperties>,
    materials: Table<MaterialProperties>,
    leakage: Table<LeakageProperties>,
    detectors: Table<DetectorProperties>,
    sprinklers: Table<SprinklerProperties>,
    digest: String,
}

impl Catalogue {
    /// The catalogue inside the binary, read at the first call.
    pub fn embedded() -> &'static Self {
        static EMBEDDED: OnceLock<Catalogue> = OnceLock::new();
        EMBEDDED.get_or_init(|| {
            Self::read(&FILES).expect("the embedded files are fixed at build and read by a test")
        })
    }

    fn read(files: &[&str; 7]) -> Result<Self, serde_json::Error> {
        let [uses, items, fuels, materials, leakage, detectors, sprinklers] = files;
        Ok(Self {
            uses: Table::read::<rows::UseRow>(uses)?,
            items: Table::read::<rows::ItemRow>(items)?,
            fuels: Table::read::<rows::FuelRow>(fuels)?,
            materials: Table::read::<rows::MaterialRow>(materials)?,
            leakage: Table::read::<rows::LeakageRow>(leakage)?,
            detectors: Table::read::<rows::DetectorRow>(detectors)?,
            sprinklers: Table::read::<rows::SprinklerRow>(sprinklers)?,
            digest: digest_of(files),
        })
    }

    /// What a room is used for.
    pub fn use_of(&self, key: &str) -> Option<&Row<UseProperties>> {
        self.uses.get(key)
    }

    /// A thing that stands in a room.
    pub fn item(&self, key: &str) -> Option<&Row<ItemProperties>> {
        self.items.get(key)
    }

    /// A fuel.
    pub fn fuel(&self, key: &str) -> Option<&Row<FuelProperties>> {
        self.fuels.get(key)
    }

    /// A lining.
    pub fn material(&self, key: &str) -> Option<&Row<MaterialProperties>> {
        self.materials.get(key)
    }

    /// A class of leakage.
    pub fn leakage(&self, key: &str) -> Option<&Row<LeakageProperties>> {
        self.leakage.get(key)
    }

    /// A class of detector.
    pub fn detector(&self, key: &str) -> Option<&Row<DetectorProperties>> {
        self.detectors.get(key)
    }

    /// A class of sprinkler.
    pub fn sprinkler(&self, key: &str) -> Option<&Row<SprinklerProperties>> {
        self.sprinklers.get(key)
    }

    /// Every use, in the order of the file.
    pub fn uses(&self) -> impl ExactSizeIterator<Item = &Row<UseProperties>> {
        self.uses.rows.iter()
    }

    /// Every item, in the order of the file.
    pub fn items(&self) -> impl ExactSizeIterator<Item = &Row<ItemProperties>> {
        self.items.rows.iter()
    }

    /// Every fuel, in the order of the file.
    pub fn fuels(&self) -> impl ExactSizeIterator<Item = &Row<FuelProperties>> {
        self.fuels.rows.iter()
    }

    /// Every lining, in the order of the file.
    pub fn materials(&self) -> impl ExactSizeIterator<Item = &Row<MaterialProperties>> {
        self.materials.rows.iter()
    }

    /// Every class of leakage, in the order of the file.
    pub fn leakages(&self) -> impl ExactSizeIterator<Item = &Row<LeakageProperties>> {
        self.leakage.rows.iter()
    }

    /// Every class of detector, in the order of the file.
    pub fn detectors(&self) -> impl ExactSizeIterator<Item = &Row<DetectorProperties>> {
        self.detectors.rows.iter()
    }

    /// Every class of sprinkler, in the order of the file.
    pub fn sprinklers(&self) -> impl ExactSizeIterator<Item = &Row<SprinklerProperties>> {
        self.sprinklers.rows.iter()
    }

    /// Every key of a subject, in the order of its file.
    pub fn keys(&self, kind: Kind) -> Vec<&str> {
        match kind {
            Kind::Uses => self.uses.keys().collect(),
            Kind::Items => self.items.keys().collect(),
            Kind::Fuels => self.fuels.keys().collect(),
            Kind::Materials => self.materials.keys().collect(),
            Kind::Leakage => self.leakage.keys().collect(),
            Kind::Detectors => self.detectors.keys().collect(),
            Kind::Sprinklers => self.sprinklers.keys().collect(),
        }
    }

    /// The key that somebody who wrote `name` most likely meant, if any is near.
    pub fn nearest(&self, kind: Kind, name: &str) -> Option<&str> {
        nearest::nearest(self.keys(kind), name)
    }

    /// SHA-256 of the embedded files one after the other, in hexadecimal.
    pub fn digest(&self) -> &str {
        &self.digest
    }
}

fn digest_of(files: &[&str]) -> String {
    let mut hasher = Sha256::new();
    for file in files {
        hasher.update(file.as_bytes());
    }
    hasher.finalize().iter().map(|byte| format!("{byte:02x}")).collect()
}
