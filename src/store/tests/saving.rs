use sqlx::Row as _;

use super::*;
use crate::domain::building::Boundary;

#[tokio::test]
async fn a_building_read_back_is_the_building_that_was_entered() {
    let kept = Kept::new().await;
    let entered = with_reference("Harbour Row 12", "417-B");

    let answered = kept.enter(7, entered.clone()).await;

    let read = kept.get_building(&local(), building_id(7)).await.unwrap();
    assert_eq!(*read.building, entered);
    assert_eq!(read, answered);
    assert_eq!(
        (read.head.revision, read.head.created_at, read.head.updated_at),
        (1, Timestamp(1), Timestamp(1))
    );
    assert_eq!(kept.find_building(&local(), "417-B").await.unwrap(), Some(read));
    assert_eq!(kept.find_building(&local(), "417-C").await.unwrap(), None);
}

#[tokio::test]
async fn a_change_of_one_room_moves_the_tags_of_the_building_and_of_that_room_only() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;

    let put = kept
        .put_room(
            &local(),
            building_id(1),
            taller(room("shop"), 3.0),
            Condition::Match(vec![1]),
            at(2),
            accept,
        )
        .await
        .unwrap();

    assert_eq!(put, Saved { value: taller(room("shop"), 3.0), revision: 2 });
    let read = kept.get_building(&local(), building_id(1)).await.unwrap();
    assert_eq!(
        (read.head.revision, read.head.created_at, read.head.updated_at),
        (2, Timestamp(1), Timestamp(2))
    );
    assert_eq!(read.tag(&Part::Room(key("shop"))), Some(2));
    assert_eq!(read.tag(&Part::Room(key("store"))), Some(1));
    assert_eq!(read.tag(&Part::Opening(key("inner"))), Some(1));
    assert_eq!(read.tag(&Part::Opening(key("front"))), Some(1));
}

#[tokio::test]
async fn putting_a_whole_building_moves_only_the_tags_of_parts_that_differ() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let mut next = shop("Shop, renamed");
    next.rooms = vec![room("attic"), taller(room("store"), 3.0), room("shop")];
    next.openings[1].entry = false;

    kept.put_building(&local(), building_id(1), next, Condition::Match(vec![1]), at(2)).await.unwrap();

    let read = kept.get_building(&local(), building_id(1)).await.unwrap();
    let tags = |of: &std::collections::BTreeMap<Key, u64>| {
        of.iter().map(|(key, revision)| format!("{key} {revision}")).collect::<Vec<_>>().join(", ")
    };
    assert_eq!(tags(&read.parts.rooms), "attic 2, shop 1, store 2");
    assert_eq!(tags(&read.parts.openings), "front 2, inner 1");
}

#[tokio::test]
async fn tags_answered_are_the_tags_that_another_process_reads() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let mut next = shop("Shop");
    next.rooms.push(room("attic"));
    next.openings.remove(0);

    let answered = kept.put_building(&local(), building_id(1), next, Condition::Any, at(2)).await.unwrap();

    let fresh = Store::open(&url(&kept.path())).await.unwrap();
    assert_eq!(fresh.get_building(&local(), building_id(1)).await.unwrap(), answered);
}

#[tokio::test]
async fn a_put_that_changes_nothing_is_a_revision_of_its_own() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;

    let put = kept
        .put_room(&local(), building_id(1), room("shop"), Condition::Match(vec![1]), at(2), accept)
        .await
        .unwrap();

    assert_eq!(put.revision, 2);
    let store = kept.get_room(&local(), building_id(1), &key("store")).await.unwrap();
    assert_eq!(store.revision, 1);
}

#[tokio::test]
async fn a_room_deleted_and_entered_again_never_has_an_old_tag() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let id = building_id(1);
    kept.put_room(&local(), id, room("attic"), Condition::NoneMatch, at(2), accept).await.unwrap();

    kept.delete_room(&local(), id, &key("attic"), Condition::Match(vec![2]), at(3)).await.unwrap();
    let again =
        kept.put_room(&local(), id, room("attic"), Condition::NoneMatch, at(4), accept).await.unwrap();

    assert_eq!(again.revision, 4);
}

#[tokio::test]
async fn a_room_that_openings_join_is_not_deleted_and_they_are_named() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let id = building_id(1);

    let refused = kept.delete_room(&local(), id, &key("shop"), Condition::Any, at(2)).await.unwrap_err();

    let StoreError::Conflict(Conflict::RoomJoined { room, openings }) = refused else { panic!("{refused}") };
    assert_eq!((room, openings), (key("shop"), vec![key("inner"), key("front")]));
    assert_eq!(kept.get_building(&local(), id).await.unwrap().head.revision, 1);
}

#[tokio::test]
async fn a_room_that_nothing_joins_is_deleted_with_the_boundaries_it_shared() {
    let kept = Kept::new().await;
    let mut with_walls = shop("Shop");
    let wall = |name: &str, other: &str| Boundary {
        key: key(name),
        between: [Space::Room(key("store")), Space::Room(key(other))],
        area_m2: None,
        fire_rating_min: None,
    };
    with_walls.rooms.push(room("attic"));
    with_walls.boundaries = vec![wall("ceiling", "attic"), wall("wall", "shop")];
    kept.enter(1, with_walls).await;

    let saved =
        kept.delete_room(&local(), building_id(1), &key("attic"), Condition::Any, at(2)).await.unwrap();

    assert_eq!(saved.building.room(&key("attic")), None);
    assert_eq!(saved.building.boundaries, [wall("wall", "shop")]);
    let gone = kept.get_room(&local(), building_id(1), &key("attic")).await.unwrap_err();
    assert!(matches!(gone, StoreError::NotFound(Missing::Room)), "{gone}");
}

#[tokio::test]
async fn a_refusal_by_the_callers_own_rules_saves_nothing_and_comes_through() {
    #[derive(Debug)]
    enum Refusal {
        Rule(usize),
        Store,
    }
    impl From<StoreError> for Refusal {
        fn from(_: StoreError) -> Self {
            Self::Store
        }
    }
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let check = |building: &Building| Err(Refusal::Rule(building.rooms.len()));

    let refused =
        kept.put_room(&local(), building_id(1), room("attic"), Condition::NoneMatch, at(2), check).await;

    assert!(matches!(refused, Err(Refusal::Rule(3))), "the check sees the building with the room in it");
    assert_eq!(kept.get_building(&local(), building_id(1)).await.unwrap().head.revision, 1);
    assert_eq!(kept.number("select count(*) from rooms").await, 2);
}

#[tokio::test]
async fn nothing_is_half_saved_when_a_projection_fails() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let before = kept.get_building(&local(), building_id(1)).await.unwrap();
    kept.sql("create trigger broken before insert on openings begin select raise(abort, 'broken'); end")
        .await;
    let mut next = shop("Renamed");
    next.rooms[0] = taller(room("store"), 3.0);
    next.openings[1].entry = false;

    let entered = kept.create_building(&local(), building_id(2), shop("Second"), at(2)).await;
    let put = kept.put_building(&local(), building_id(1), next, Condition::Any, at(2)).await;

    assert!(matches!(entered, Err(StoreError::Database(_))) && matches!(put, Err(StoreError::Database(_))));
    assert_eq!(kept.get_building(&local(), building_id(1)).await.unwrap(), before);
    for (table, rows) in [
        ("buildings where name = 'Shop'", 1),
        ("buildings", 1),
        ("building_revisions", 1),
        ("building_parts where revision = 1", 4),
        ("building_parts", 4),
        ("rooms where height_m = 2.4", 2),
        ("rooms", 2),
        ("openings", 2),
        ("changes", 1),
    ] {
        assert_eq!(kept.number(&format!("select count(*) from {table}")).await, rows, "{table}");
    }

    kept.sql("drop trigger broken").await;
    kept.enter(2, shop("Second")).await;
    assert_eq!(kept.number("select max(sequence) from changes").await, 2, "no sequence was lost");
}

#[tokio::test]
async fn a_deleted_building_is_gone_and_its_reference_is_free() {
    let kept = Kept::new().await;
    kept.enter(1, with_reference("Old", "417-B")).await;
    let id = building_id(1);

    kept.delete_building(&local(), id, Condition::Match(vec![1]), at(2)).await.unwrap();

    let gone = kept.get_building(&local(), id).await.unwrap_err();
    assert!(matches!(gone, StoreError::NotFound(Missing::Building)), "{gone}");
    let again = kept.put_building(&local(), id, shop("Back"), Condition::Any, at(3)).await.unwrap_err();
    assert!(matches!(again, StoreError::NotFound(Missing::Building)), "{again}");
    let twice = kept.delete_building(&local(), id, Condition::Any, at(3)).await.unwrap_err();
    assert!(matches!(twice, StoreError::NotFound(Missing::Building)), "{twice}");
    assert!(kept.is_empty(&local()).await.unwrap());
    assert_eq!(kept.number("select count(*) from rooms").await, 0, "an officer's sums do not count it");
    assert_eq!(kept.number("select count(*) from building_revisions").await, 1, "its history is kept");
    kept.enter(2, with_reference("New", "417-B")).await;
    let found = kept.find_building(&local(), "417-B").await.unwrap().unwrap();
    assert_eq!(found.head.id, building_id(2));
    let revived = kept.create_building(&local(), id, shop("Back"), at(4)).await.unwrap_err();
    assert!(matches!(revived, StoreError::Conflict(Conflict::IdTaken { .. })), "{revived}");
}

#[tokio::test]
async fn a_reference_belongs_to_one_building_and_the_conflict_names_it() {
    let kept = Kept::new().await;
    kept.enter(1, with_reference("First", "417-B")).await;
    kept.enter(2, with_reference("Second", "417-C")).await;
    let taken = |refused: StoreError| match refused {
        StoreError::Conflict(Conflict::ReferenceTaken { reference, by }) => (reference, by),
        other => panic!("{other}"),
    };

    let third = kept.create_building(&local(), building_id(3), with_reference("Third", "417-B"), at(2)).await;
    let moved = kept
        .put_building(&local(), building_id(2), with_reference("Second", "417-B"), Condition::Any, at(2))
        .await;
    let kept_own = kept
        .put_building(&local(), building_id(1), with_reference("Renamed", "417-B"), Condition::Any, at(2))
        .await;

    assert_eq!(taken(third.unwrap_err()), ("417-B".to_owned(), building_id(1)));
    assert_eq!(taken(moved.unwrap_err()), ("417-B".to_owned(), building_id(1)));
    assert!(kept_own.is_ok());
}

#[tokio::test]
async fn a_key_used_twice_is_a_conflict_and_no_failure_of_the_database() {
    let kept = Kept::new().await;
    let mut doubled = shop("Shop");
    doubled.rooms[0].fuel_packages = vec![package("sofa"), package("sofa")];

    let refused = kept.create_building(&local(), building_id(1), doubled, at(1)).await.unwrap_err();

    assert!(
        matches!(&refused, StoreError::Conflict(Conflict::KeyTaken { key: taken }) if *taken == key("sofa")),
        "{refused}"
    );
}

#[tokio::test]
async fn every_change_has_its_row_in_order() {
    let kept = Kept::new().await;
    let id = building_id(1);
    kept.enter(1, shop("Shop")).await;
    kept.put_room(&local(), id, room("attic"), Condition::NoneMatch, at(2), accept).await.unwrap();
    kept.delete_opening(&local(), id, &key("front"), Condition::Any, at(3)).await.unwrap();
    kept.put_building(&local(), id, shop("Shop"), Condition::Any, at(4)).await.unwrap();
    kept.delete_building(&local(), id, Condition::Any, at(5)).await.unwrap();

    let rows = kept
        .rows("select sequence, kind, revision, part_kind, part_key, actor, at_us from changes order by sequence")
        .await;

    let row = |row: &SqliteRow| {
        let part = row.get::<Option<String>, _>(3).zip(row.get::<Option<String>, _>(4));
        let part = part.map_or_else(String::new, |(kind, key)| format!(" {kind} {key}"));
        let (number, kind): (i64, String) = (row.get(0), row.get(1));
        let (revision, actor, at_us): (i64, String, i64) = (row.get(2), row.get(5), row.get(6));
        format!("{number} {kind}{part} {revision} {actor} {at_us}")
    };
    let expected = [
        "1 building_created 1 local 1",
        "2 building_changed room attic 2 local 2",
        "3 building_changed opening front 3 local 3",
        "4 building_changed 4 local 4",
        "5 building_deleted 4 local 5",
    ];
    assert_eq!(rows.iter().map(row).collect::<Vec<_>>(), expected);
}

#[tokio::test]
async fn every_revision_is_kept_whole_with_its_digest_and_cannot_be_changed() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Before")).await;
    kept.put_building(&local(), building_id(1), shop("After"), Condition::Any, at(2)).await.unwrap();

    let rows = kept
        .rows("select revision, schema, document, digest, at_us from building_revisions order by revision")
        .await;

    for (row, (revision, name)) in rows.iter().zip([(1, "Before"), (2, "After")]) {
        let text: String = row.get("document");
        assert_eq!(row.get::<i64, _>("revision"), revision);
        assert_eq!(row.get::<i64, _>("at_us"), revision);
        assert_eq!(document::from_text(&text, row.get("schema")).unwrap(), shop(name));
        assert_eq!(row.get::<String, _>("digest"), document::digest(&text));
    }
    assert_eq!(rows.len(), 2);
    let mut officer = kept.officer().await;
    let rewritten = sqlx::query("update building_revisions set actor = 'nobody'").execute(&mut officer).await;
    assert!(rewritten.is_err());
}

#[test]
fn the_digest_is_sha_256() {
    // FIPS 180-2, appendix B.1, from memory; `printf abc | sha256sum` agrees.
    let of_abc = "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad";

    assert_eq!(document::digest("abc"), of_abc);
}
