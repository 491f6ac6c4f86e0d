//! Assessments: kept as they were served.

use std::io::{Read, Write};

use flate2::Compression;
use flate2::read::GzDecoder;
use flate2::write::GzEncoder;
use sqlx::SqliteConnection;

use super::buildings::{page, worst_rating};
use super::changes::{self, Change};
use super::error::{Conflict, Missing, StoreError};
use super::records::{
    AssessmentCursor, AssessmentMeta, AssessmentSummary, Effects, NewAssessment, Page, WorstRating,
};
use super::{Store, findings, heads, rows};
use crate::domain::Caller;
use crate::domain::ids::{AgencyId, AssessmentId, BuildingId};
use crate::domain::time::Timestamp;

macro_rules! meta_columns {
    () => {
        "a.assessment_id, a.building_id, a.building_revision, a.level, a.engine_version, a.rating_rule,
        a.catalogue_digest, a.input_digest, a.seed, a.assumptions, a.created_at_us"
    };
}

const GET: &str = concat!(
    "
    select ",
    meta_columns!(),
    ", a.report_bytes, a.report_gz
    from assessments a
    where a.agency_id = $1 and a.assessment_id = $2"
);

const EXISTS: &str = "select 1 from assessments where agency_id = $1 and assessment_id = $2";

const LIST: &str = concat!(
    "
    select ",
    meta_columns!(),
    ", a.flashover_worst_rating, a.flashover_worst_room_key,
        a.backdraft_worst_rating, a.backdraft_worst_room_key,
        a.entry_worst_rating, a.entry_worst_room_key
    from assessments a
    where a.agency_id = $1 and a.building_id = $2 and (a.created_at_us, a.assessment_id) < ($3, $4)
    order by a.created_at_us desc, a.assessment_id desc limit $5"
);

const INSERT: &str = "
    insert into assessments (
        agency_id, assessment_id, building_id, building_revision, level, engine_version, rating_rule,
        catalogue_digest, input_digest, seed, assumptions, created_at_us, created_by,
        flashover_worst_rating, flashover_worst_room_key, backdraft_worst_rating,
        backdraft_worst_room_key, entry_worst_rating, entry_worst_room_key, report_bytes, report_gz
    ) values (
        $1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13, $14, $15, $16, $17, $18, $19, $20, $21
    )";

#[cfg(test)]
pub(super) const ALL: &[&str] = &[GET, EXISTS, LIST, INSERT];

/// Kept small enough to answer at once: a report is packed while its caller waits.
const LEVEL: Compression = Compression::fast();

/// An assessment with its report as it was served.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct StoredReport {
    /// What is known of the assessment.
    pub meta: AssessmentMeta,
    /// The report, compressed by gzip: fit for `Content-Encoding: gzip`.
    pub gz: Vec<u8>,
    bytes: u64,
}

impl StoredReport {
    /// The report's bytes, as they were given to be kept.
    pub fn unpack(&self) -> Result<Vec<u8>, StoreError> {
        let mut report = Vec::with_capacity(usize::try_from(self.bytes).unwrap_or(0));
        GzDecoder::new(self.gz.as_slice()).read_to_end(&mut report).map_err(|error| {
            StoreError::Corrupt(format!("report of assessment {}: {error}", self.meta.id))
        })?;
        Ok(report)
    }
}

impl Store {
    /// Keeps an assessment of a building that is there, at a revision that was saved.
    pub async fn insert_assessment(
        &self,
        caller: &Caller,
        assessment: NewAssessment,
        effects: Effects,
    ) -> Result<(), StoreError> {
        let NewAssessment { meta, report, findings } = assessment;
        let bytes = report.len() as u64;
        let gz = tokio::task::spawn_blocking(move || pack(&report))
            .await
            .map_err(|error| StoreError::Database(error.into()))?
            .map_err(|error| StoreError::Database(error.into()))?;
        let by = caller.clone();
        self.writer
            .write(move |tx| {
                Box::pin(async move {
                    if heads::get(tx, &by.agency, meta.building).await?.is_none() {
                        return Err(StoreError::NotFound(Missing::Building));
                    }
                    if exists(tx, &by.agency, meta.id).await? {
                        return Err(Conflict::IdTaken { id: meta.id.0 }.into());
                    }
                    insert(tx, &by, &meta, &findings, (bytes, gz)).await?;
                    for finding in &findings {
                        findings::insert(tx, &by.agency, &meta, finding).await?;
                    }
                    let change = Change::Assessed(meta.id);
                    changes::insert(tx, &by, meta.building, meta.building_revision, &change, &effects).await
                })
            })
            .await
    }

    /// An assessment with its report. It can be had after its building was deleted: it is a record of its own.
    pub async fn get_assessment(
        &self,
        caller: &Caller,
        id: AssessmentId,
    ) -> Result<StoredReport, StoreError> {
        let mut reader = self.readers.acquire().await?;
        let row: Option<ReportRow> = sqlx::query_as(GET)
            .bind(caller.agency.0.clone())
            .bind(id.to_string())
            .fetch_optional(&mut *reader)
            .await?;
        let row = row.ok_or(StoreError::NotFound(Missing::Assessment))?;
        Ok(StoredReport { meta: row.meta.meta()?, gz: row.report_gz, bytes: rows::count(row.report_bytes)? })
    }

    /// The latest assessment of a building, of whatever revision; `None` before the first.
    pub async fn latest_assessment(
        &self,
        caller: &Caller,
        building: BuildingId,
    ) -> Result<Option<StoredReport>, StoreError> {
        let mut reader = self.readers.acquire().await?;
        let head = heads::get(&mut reader, &caller.agency, building).await?;
        drop(reader);
        match head.ok_or(StoreError::NotFound(Missing::Building))?.latest_assessment {
            None => Ok(None),
            Some(id) => self.get_assessment(caller, id).await.map(Some),
        }
    }

    /// A page of a building's assessments, newest first.
    pub async fn list_assessments(
        &self,
        caller: &Caller,
        building: BuildingId,
        after: Option<AssessmentCursor>,
        limit: u32,
    ) -> Result<Page<AssessmentSummary, AssessmentCursor>, StoreError> {
        // After everything: no id begins with this letter.
        let (at, id) = after.map_or_else(
            || (i64::MAX, "g".to_owned()),
            |cursor| (cursor.created_at.0, cursor.id.to_string()),
        );
        let mut reader = self.readers.acquire().await?;
        let head = heads::get(&mut reader, &caller.agency, building).await?;
        let head = head.ok_or(StoreError::NotFound(Missing::Building))?;
        let found: Vec<SummaryRow> = sqlx::query_as(LIST)
            .bind(caller.agency.0.clone())
            .bind(building.to_string())
            .bind(at)
            .bind(id)
            .bind(i64::from(limit) + 1)
            .fetch_all(&mut *reader)
            .await?;
        drop(reader);
        let items = found.into_iter().map(|row| row.summary(head.revision)).collect::<Result<Vec<_>, _>>()?;
        Ok(page(items, limit, |last| AssessmentCursor { created_at: last.meta.created_at, id: last.meta.id }))
    }
}

async fn exists(db: &mut SqliteConnection, agency: &AgencyId, id: AssessmentId) -> Result<bool, StoreError> {
    let row = sqlx::query(EXISTS).bind(agency.0.clone()).bind(id.to_string()).fetch_optional(db).await?;
    Ok(row.is_some())
}

async fn insert(
    db: &mut SqliteConnection,
    caller: &Caller,
    meta: &AssessmentMeta,
    findings: &[super::records::RoomFinding],
    (bytes, gz): (u64, Vec<u8>),
) -> Result<(), StoreError> {
    let flashover = findings::worst(findings, |finding| &finding.flashover);
    let backdraft = findings::worst(findings, |finding| &finding.backdraft);
    let entry = findings::worst(findings, |finding| &finding.entry);
    let rating = |worst: &Option<WorstRating>| worst.as_ref().map(|worst| worst.rating.clone());
    let room = |worst: &Option<WorstRating>| worst.as_ref().map(|worst| worst.room.to_string());
    sqlx::query(INSERT)
        .bind(caller.agency.0.clone())
        .bind(meta.id.to_string())
        .bind(meta.building.to_string())
        .bind(rows::stored_count(meta.building_revision))
        .bind(meta.level.clone())
        .bind(meta.engine_version.clone())
        .bind(meta.rating_rule)
        .bind(meta.catalogue_digest.clone())
        .bind(meta.input_digest.clone())
        .bind(meta.seed.cast_signed())
        .bind(meta.assumptions.clone())
        .bind(meta.created_at.0)
        .bind(caller.actor.clone())
        .bind(rating(&flashover))
        .bind(room(&flashover))
        .bind(rating(&backdraft))
        .bind(room(&backdraft))
        .bind(rating(&entry))
        .bind(room(&entry))
        .bind(rows::stored_count(bytes))
        .bind(gz)
        .execute(db)
        .await?;
    Ok(())
}

fn pack(report: &[u8]) -> std::io::Result<Vec<u8>> {
    let mut packer = GzEncoder::new(Vec::with_capacity(report.len() / 4), LEVEL);
    packer.write_all(report)?;
    packer.finish()
}

#[derive(sqlx::FromRow)]
struct MetaRow {
    assessment_id: String,
    building_id: String,
    building_revision: i64,
    level: String,
    engine_version: String,
    rating_rule: u32,
    catalogue_digest: String,
    input_digest: String,
    seed: i64,
    assumptions: String,
    created_at_us: i64,
}

impl MetaRow {
    fn meta(self) -> Result<AssessmentMeta, StoreError> {
        Ok(AssessmentMeta {
            id: rows::assessment_id(&self.assessment_id)?,
            building: rows::building_id(&self.building_id)?,
            building_revision: rows::count(self.building_revision)?,
            level: self.level,
            engine_version: self.engine_version,
            rating_rule: self.rating_rule,
            catalogue_digest: self.catalogue_digest,
            input_digest: self.input_digest,
            seed: self.seed.cast_unsigned(),
            assumptions: self.assumptions,
            created_at: Timestamp(self.created_at_us),
        })
    }
}

#[derive(sqlx::FromRow)]
struct ReportRow {
    #[sqlx(flatten)]
    meta: MetaRow,
    report_bytes: i64,
    report_gz: Vec<u8>,
}

#[derive(sqlx::FromRow)]
struct SummaryRow {
    #[sqlx(flatten)]
    meta: MetaRow,
    flashover_worst_rating: Option<String>,
    flashover_worst_room_key: Option<String>,
    backdraft_worst_rating: Option<String>,
    backdraft_worst_room_key: Option<String>,
    entry_worst_rating: Option<String>,
    entry_worst_room_key: Option<String>,
}

impl SummaryRow {
    fn summary(self, revision: u64) -> Result<AssessmentSummary, StoreError> {
        let meta = self.meta.meta()?;
        Ok(AssessmentSummary {
            stale: meta.building_revision != revision,
            meta,
            flashover: worst_rating(self.flashover_worst_rating, self.flashover_worst_room_key.as_deref())?,
            backdraft: worst_rating(self.backdraft_worst_rating, self.backdraft_worst_room_key.as_deref())?,
            entry: worst_rating(self.entry_worst_rating, self.entry_worst_room_key.as_deref())?,
        })
    }
}
