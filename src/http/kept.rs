//! What the store keeps of an assessment beside its report: the head, and a row for each room.

use super::assessing::Record;
use crate::assessment::findings::{BackdraftRating, Band, BuildingFindings, FlashoverRating, RoomFindings};
use crate::domain::time::Timestamp;
use crate::domain::word::Word as _;
use crate::store::{AssessmentMeta, NewAssessment, Rated, RoomFinding, Spread};

/// An assessment as the store takes it.
pub fn assessment(
    record: Record,
    found: &BuildingFindings,
    requested: String,
    report: Vec<u8>,
    at: Timestamp,
) -> NewAssessment {
    NewAssessment {
        meta: AssessmentMeta {
            id: record.id,
            building: record.building,
            building_revision: record.revision,
            level: found.level.word().to_owned(),
            engine_version: found.engine_version.to_owned(),
            rating_rule: found.rating_rule,
            catalogue_digest: found.catalogue_digest.clone(),
            input_digest: found.input_digest.clone(),
            seed: found.seed,
            assumptions: requested,
            created_at: at,
        },
        report,
        findings: found.rooms.iter().map(|room| row(room, found)).collect(),
    }
}

fn row(room: &RoomFindings, found: &BuildingFindings) -> RoomFinding {
    let place = found.ranking.iter().find(|ranked| ranked.room == room.key);
    let RoomFindings { flashover, backdraft, entry, .. } = room;
    RoomFinding {
        room: room.key.clone(),
        sort_rank: place.and_then(|ranked| u32::try_from(ranked.place).ok()).unwrap_or(u32::MAX),
        flashover: Rated {
            rating: flashover.rating.word().to_owned(),
            severity: flashover_severity(flashover.rating),
            scenario: flashover.scenario.map(|scenario| scenario.word().to_owned()),
            provisional: flashover.provisional,
        },
        flashover_before_water: flashover.before_water,
        flashover_s: flashover.time_s.map(spread),
        required_heat_release_kw: flashover.required_heat_release_kw,
        available_heat_release_kw: flashover.available_heat_release_kw,
        backdraft: Rated {
            rating: backdraft.rating.word().to_owned(),
            severity: backdraft_severity(backdraft.rating),
            scenario: backdraft.scenario.map(|scenario| scenario.word().to_owned()),
            provisional: backdraft.provisional,
        },
        backdraft_outcome: backdraft.outcome.word().to_owned(),
        // Ranking wants the widest window that the corners allow.
        dangerous_from_s: backdraft.dangerous_from_s.map(|band| band.low),
        dangerous_until_s: backdraft.dangerous_until_s.map(|band| band.high),
        entry: Rated {
            rating: entry.rating.word().to_owned(),
            severity: flashover_severity(entry.rating),
            scenario: entry.scenario.map(|scenario| scenario.word().to_owned()),
            provisional: entry.provisional,
        },
        entry_s: entry.time_to_flashover_s.map(spread),
    }
}

fn spread(band: Band) -> Spread {
    Spread { low: band.low, typical: band.typical, high: band.high }
}

/// What was not assessed may be as bad as the worst, and sorts with it.
fn flashover_severity(rating: FlashoverRating) -> u8 {
    match rating {
        FlashoverRating::NotIndicated => 0,
        FlashoverRating::Possible => 1,
        FlashoverRating::Likely => 2,
        FlashoverRating::Expected | FlashoverRating::NotAssessed => 3,
    }
}

fn backdraft_severity(rating: BackdraftRating) -> u8 {
    match rating {
        BackdraftRating::NotIndicated => 0,
        BackdraftRating::CannotBeExcluded => 1,
        BackdraftRating::Credible => 2,
        BackdraftRating::CredibleViolent | BackdraftRating::NotAssessed => 3,
    }
}
