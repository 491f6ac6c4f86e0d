use sqlx::Row as _;

use super::*;
use crate::domain::AssessmentId;

pub(super) fn assessment_id(id: u128) -> AssessmentId {
    AssessmentId(uuid::Uuid::from_u128(id))
}

fn rated(rating: &str, severity: u8) -> Rated {
    Rated { rating: rating.to_owned(), severity, scenario: Some("door_open".to_owned()), provisional: true }
}

fn finding(name: &str, sort_rank: u32, flashover: Rated, backdraft: Rated) -> RoomFinding {
    RoomFinding {
        room: key(name),
        sort_rank,
        flashover,
        flashover_before_water: Some(true),
        flashover_s: Some(Spread { low: 250.0, typical: 312.0, high: 420.0 }),
        required_heat_release_kw: Some(1909.0),
        available_heat_release_kw: Some(2200.0),
        backdraft,
        backdraft_outcome: "not_assessed".to_owned(),
        dangerous_from_s: None,
        dangerous_until_s: None,
        entry: Rated { scenario: None, ..rated("not_assessed", 3) },
        entry_s: None,
    }
}

pub(super) fn assessment(id: u128, building: u128, revision: u64, at_us: i64) -> NewAssessment {
    NewAssessment {
        meta: AssessmentMeta {
            id: assessment_id(id),
            building: building_id(building),
            building_revision: revision,
            level: "screening".to_owned(),
            engine_version: "1.0.0".to_owned(),
            rating_rule: 1,
            catalogue_digest: "c".repeat(64),
            input_digest: "i".repeat(64),
            seed: u64::MAX - 6,
            assumptions: "{}".to_owned(),
            created_at: Timestamp(at_us),
        },
        report: format!(r#"{{"assessment_id":{id},"text":"{}"}}"#, "öde ".repeat(2000)).into_bytes(),
        findings: vec![
            finding("store", 2, rated("possible", 1), rated("cannot_be_excluded", 1)),
            finding("shop", 1, rated("likely", 2), rated("not_indicated", 0)),
        ],
    }
}

#[tokio::test]
async fn a_report_comes_back_byte_for_byte() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let kept_one = assessment(5, 1, 1, 10);

    kept.insert_assessment(&local(), kept_one.clone(), at(10)).await.unwrap();

    let read = kept.get_assessment(&local(), assessment_id(5)).await.unwrap();
    assert_eq!(read.meta, kept_one.meta);
    assert_eq!(read.unpack().unwrap(), kept_one.report);
    assert!(
        read.gz.len() < kept_one.report.len() / 10 && read.gz.starts_with(&[0x1f, 0x8b]),
        "gzip, RFC 1952"
    );
    assert_eq!(kept.latest_assessment(&local(), building_id(1)).await.unwrap(), Some(read));
    let building = kept.get_building(&local(), building_id(1)).await.unwrap();
    assert_eq!(building.head.latest_assessment, Some(assessment_id(5)));
    assert_eq!(building.head.revision, 1, "to assess is no change of the building");
}

#[tokio::test]
async fn an_assessment_cannot_be_changed() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    kept.insert_assessment(&local(), assessment(5, 1, 1, 10), at(10)).await.unwrap();

    let again = kept.insert_assessment(&local(), assessment(5, 1, 1, 11), at(11)).await.unwrap_err();
    let mut officer = kept.officer().await;
    let rewritten = sqlx::query("update assessments set level = 'sampled'").execute(&mut officer).await;

    assert!(matches!(again, StoreError::Conflict(Conflict::IdTaken { .. })), "{again}");
    assert!(rewritten.is_err());
}

#[tokio::test]
async fn assessments_are_listed_newest_first_and_stale_once_the_building_changes() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    for (id, at_us) in [(3, 10), (1, 20), (2, 20)] {
        kept.insert_assessment(&local(), assessment(id, 1, 1, at_us), at(at_us)).await.unwrap();
    }
    kept.put_building(&local(), building_id(1), shop("Changed"), Condition::Any, at(30)).await.unwrap();
    kept.insert_assessment(&local(), assessment(4, 1, 2, 15), at(40)).await.unwrap();

    let (mut walk, mut after) = (Vec::new(), None);
    loop {
        let page = kept.list_assessments(&local(), building_id(1), after, 3).await.unwrap();
        walk.extend(page.items.iter().map(|item| (item.meta.id, item.stale)));
        match page.next {
            Some(cursor) => after = Some(cursor),
            None => break,
        }
    }

    let expected =
        [(2, true), (1, true), (4, false), (3, true)].map(|(id, stale)| (assessment_id(id), stale));
    assert_eq!(walk, expected);
    let latest = kept.latest_assessment(&local(), building_id(1)).await.unwrap().unwrap();
    assert_eq!(latest.meta.id, assessment_id(2));
}

#[tokio::test]
async fn a_summary_carries_the_worst_of_each_rating_and_the_room_that_has_it() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    kept.insert_assessment(&local(), assessment(5, 1, 1, 10), at(10)).await.unwrap();
    let list = ListBuildings { reference: None, after: None, limit: 50 };
    let worst = |rating: &str, room: &str| Some(WorstRating { rating: rating.to_owned(), room: key(room) });

    let fresh = kept.list_buildings(&local(), &list).await.unwrap().items.remove(0).worst.unwrap();
    kept.put_room(&local(), building_id(1), room("shop"), Condition::Any, at(11), accept).await.unwrap();
    let later = kept.list_buildings(&local(), &list).await.unwrap().items.remove(0).worst.unwrap();

    assert_eq!(fresh.flashover, worst("likely", "shop"));
    assert_eq!(fresh.backdraft, worst("cannot_be_excluded", "store"));
    assert_eq!(fresh.entry, worst("not_assessed", "shop"), "of equals the room that ranks first");
    assert_eq!(
        (fresh.assessment, fresh.created_at, fresh.building_revision),
        (assessment_id(5), Timestamp(10), 1)
    );
    assert_eq!((fresh.stale, later.stale), (false, true));
}

#[tokio::test]
async fn a_building_without_rooms_has_no_worst_rating() {
    let kept = Kept::new().await;
    kept.enter(1, Building { rooms: Vec::new(), openings: Vec::new(), ..shop("Empty") }).await;
    let empty = NewAssessment { findings: Vec::new(), ..assessment(5, 1, 1, 10) };

    kept.insert_assessment(&local(), empty, at(10)).await.unwrap();

    let list = ListBuildings { reference: None, after: None, limit: 50 };
    let worst = kept.list_buildings(&local(), &list).await.unwrap().items.remove(0).worst.unwrap();
    assert_eq!((worst.flashover, worst.backdraft, worst.entry), (None, None, None));
}

#[tokio::test]
async fn findings_are_rows_that_ranking_can_read() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    kept.insert_assessment(&local(), assessment(5, 1, 1, 10), at(10)).await.unwrap();

    let rows = kept
        .rows(
            "select room_key, flashover_rating, flashover_typical_s, required_heat_release_kw, backdraft_rating
             from room_findings order by flashover_severity desc, flashover_typical_s",
        )
        .await;

    let row = |row: &SqliteRow| {
        let (room, flashover, backdraft): (String, String, String) = (row.get(0), row.get(1), row.get(4));
        (room, flashover, row.get::<f64, _>(2), row.get::<f64, _>(3), backdraft)
    };
    let found: Vec<_> = rows.iter().map(row).collect();
    let words = |room: &str, flashover: &str, backdraft: &str| {
        (room.to_owned(), flashover.to_owned(), 312.0, 1909.0, backdraft.to_owned())
    };
    assert_eq!(
        found,
        [words("shop", "likely", "not_indicated"), words("store", "possible", "cannot_be_excluded")]
    );
    assert_eq!(kept.number("select max(sequence) from changes where kind = 'assessment_created'").await, 2);
}

#[tokio::test]
async fn nothing_of_an_assessment_is_kept_when_a_finding_fails() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let mut doubled = assessment(5, 1, 1, 10);
    doubled.findings.push(doubled.findings[0].clone());

    let refused = kept.insert_assessment(&local(), doubled, at(10)).await;

    assert!(matches!(refused, Err(StoreError::Database(_))));
    for table in ["assessments", "room_findings", "changes where kind = 'assessment_created'"] {
        assert_eq!(kept.number(&format!("select count(*) from {table}")).await, 0, "{table}");
    }
}

#[tokio::test]
async fn an_assessment_wants_its_building_and_outlives_it() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    kept.insert_assessment(&local(), assessment(5, 1, 1, 10), at(10)).await.unwrap();

    kept.delete_building(&local(), building_id(1), Condition::Any, at(11)).await.unwrap();

    let missing = |refused: StoreError| matches!(refused, StoreError::NotFound(Missing::Building));
    assert!(missing(kept.insert_assessment(&local(), assessment(6, 1, 1, 12), at(12)).await.unwrap_err()));
    assert!(missing(kept.latest_assessment(&local(), building_id(1)).await.unwrap_err()));
    assert!(missing(kept.list_assessments(&local(), building_id(1), None, 50).await.unwrap_err()));
    assert!(kept.get_assessment(&local(), assessment_id(5)).await.is_ok(), "it is a record of its own");
    let unknown = kept.get_assessment(&local(), assessment_id(6)).await.unwrap_err();
    assert!(matches!(unknown, StoreError::NotFound(Missing::Assessment)), "{unknown}");
}

#[tokio::test]
async fn a_building_without_an_assessment_has_no_latest() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;

    assert_eq!(kept.latest_assessment(&local(), building_id(1)).await.unwrap(), None);
    assert!(kept.list_assessments(&local(), building_id(1), None, 50).await.unwrap().items.is_empty());
}
