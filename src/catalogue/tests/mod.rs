mod names;
mod physics;
mod rows;
mod sources;

use super::*;
use crate::domain::properties::Properties;

/// What the tests ask of any row, whatever its properties.
struct Plain {
    kind: Kind,
    key: String,
    title: String,
    source: String,
    note: String,
    estimated: Vec<String>,
    numbers: Vec<(&'static str, f64)>,
    limits: Vec<&'static str>,
    faults: Vec<String>,
    fuel: Option<String>,
}

fn plain<T: Properties>(kind: Kind, row: &Row<T>, fuel: Option<&str>) -> Plain {
    Plain {
        kind,
        key: row.key.clone(),
        title: row.title.clone(),
        source: row.source.clone(),
        note: row.note.clone(),
        estimated: row.estimated.clone(),
        numbers: row.properties.numbers(),
        limits: T::LIMITS.iter().map(|limit| limit.member).collect(),
        faults: row.properties.faults().into_iter().map(|f| format!("{}: {}", f.member, f.reason)).collect(),
        fuel: fuel.map(str::to_owned),
    }
}

fn every_row() -> Vec<Plain> {
    let all = Catalogue::embedded();
    let mut rows = Vec::new();
    rows.extend(all.uses().map(|row| plain(Kind::Uses, row, row.properties.fuel.key())));
    rows.extend(all.items().map(|row| plain(Kind::Items, row, row.properties.fuel.key())));
    rows.extend(all.fuels().map(|row| plain(Kind::Fuels, row, None)));
    rows.extend(all.materials().map(|row| plain(Kind::Materials, row, None)));
    rows.extend(all.leakages().map(|row| plain(Kind::Leakage, row, None)));
    rows.extend(all.detectors().map(|row| plain(Kind::Detectors, row, None)));
    rows.extend(all.sprinklers().map(|row| plain(Kind::Sprinklers, row, None)));
    rows
}
