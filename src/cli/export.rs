//! `export`: every document of the inventory, one a line.

use std::io::{BufWriter, Write};

use super::{Failure, runtime};
use crate::config::Export;
use crate::domain::Caller;
use crate::store::{ListBuildings, Store};

/// Buildings read at a time.
const PAGE: u32 = 200;

/// Writes the documents to standard output.
pub fn run(flags: &Export) -> Result<(), Failure> {
    runtime()?.block_on(async {
        let store = Store::open(flags.database.url()).await?;
        let written = write_all(&store, &mut BufWriter::new(std::io::stdout().lock())).await?;
        store.close().await?;
        eprintln!("{written} buildings written");
        Ok(())
    })
}

async fn write_all(store: &Store, to: &mut impl Write) -> Result<u64, Failure> {
    let caller = Caller::local();
    let mut written = 0;
    let mut after = None;
    loop {
        let page =
            store.list_buildings(&caller, &ListBuildings { reference: None, after, limit: PAGE }).await?;
        for summary in &page.items {
            let saved = store.get_building(&caller, summary.id).await?;
            serde_json::to_writer(&mut *to, &crate::http::building_document(&saved))?;
            writeln!(to)?;
            written += 1;
        }
        after = page.next;
        if after.is_none() {
            to.flush()?;
            return Ok(written);
        }
    }
}
