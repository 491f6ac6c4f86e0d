//! `import`: building documents into the inventory, by reference.

use super::documents::{self, Document};
use super::{Failure, runtime};
use crate::catalogue::Catalogue;
use crate::config::Import;
use crate::domain::time::Timestamp;
use crate::domain::{Building, BuildingId, Caller};
use crate::store::{Condition, Effects, Store};
use crate::wire::{self, BuildingInput};

/// Reads every document, saves those without a fault, and tells of each.
pub fn run(flags: &Import) -> Result<(), Failure> {
    let documents = documents::all(&flags.from)?;
    runtime()?.block_on(async {
        let store = Store::open(flags.database.url()).await?;
        let (mut added, mut replaced, mut refused) = (0_u32, 0_u32, 0_u32);
        for document in &documents {
            match save(&store, document).await {
                Ok((Outcome::Added, name)) => {
                    added += 1;
                    println!("added     {name}");
                }
                Ok((Outcome::Replaced, name)) => {
                    replaced += 1;
                    println!("replaced  {name}");
                }
                Err(failure) => {
                    refused += 1;
                    eprintln!("{}", super::chain(failure.as_ref()));
                }
            }
        }
        store.close().await?;
        println!("{added} added, {replaced} replaced, {refused} refused");
        if refused > 0 {
            Err(format!("{refused} of {} documents were refused", documents.len()).into())
        } else {
            Ok(())
        }
    })
}

enum Outcome {
    Added,
    Replaced,
}

async fn save(store: &Store, document: &Document) -> Result<(Outcome, String), Failure> {
    let building: Building = wire::read::<BuildingInput>(&document.text, Catalogue::embedded())
        .map_err(|refused| documents::faults(&document.place, &refused))?;
    let caller = Caller::local();
    let effects = Effects { at: Timestamp(jiff::Timestamp::now().as_microsecond()) };
    let name = building.name.clone();
    let known = match &building.reference {
        Some(reference) => store.find_building(&caller, reference).await?,
        None => None,
    };
    match known {
        Some(found) => {
            store.put_building(&caller, found.head.id, building, Condition::Any, effects).await?;
            Ok((Outcome::Replaced, name))
        }
        None => {
            store.create_building(&caller, BuildingId(uuid::Uuid::now_v7()), building, effects).await?;
            Ok((Outcome::Added, name))
        }
    }
}
