use super::assessments::{assessment, assessment_id};
use super::*;

/// Two agencies; `local` has a building with an assessment.
async fn two() -> Kept {
    let kept = Kept::new().await;
    kept.sql("insert into agencies (agency_id) values ('other')").await;
    kept.enter(1, with_reference("Ours", "417-B")).await;
    kept.insert_assessment(&local(), assessment(5, 1, 1, 10), at(10)).await.unwrap();
    kept
}

#[tokio::test]
async fn nobody_sees_the_records_of_another_agency() {
    let kept = two().await;
    let (id, by) = (building_id(1), other());
    let list = ListBuildings { reference: None, after: None, limit: 50 };
    let by_reference = ListBuildings { reference: Some("417-B".to_owned()), ..list.clone() };

    assert!(kept.is_empty(&by).await.unwrap());
    assert!(kept.list_buildings(&by, &list).await.unwrap().items.is_empty());
    assert!(kept.list_buildings(&by, &by_reference).await.unwrap().items.is_empty());
    assert_eq!(kept.find_building(&by, "417-B").await.unwrap(), None);
    let refusals = [
        kept.get_building(&by, id).await.err(),
        kept.get_room(&by, id, &key("shop")).await.err(),
        kept.get_opening(&by, id, &key("front")).await.err(),
        kept.get_assessment(&by, assessment_id(5)).await.err(),
        kept.latest_assessment(&by, id).await.err(),
        kept.list_assessments(&by, id, None, 50).await.err(),
    ];
    for (n, refused) in refusals.into_iter().enumerate() {
        assert!(matches!(refused, Some(StoreError::NotFound(_))), "read {n}: {refused:?}");
    }
}

#[tokio::test]
async fn nobody_changes_the_records_of_another_agency() {
    let kept = two().await;
    let (id, by) = (building_id(1), other());
    let before = kept.get_building(&local(), id).await.unwrap();
    let any = || Condition::Any;
    let same = |building: &Building| Ok::<_, StoreError>(building.clone());

    let refusals = [
        kept.put_building(&by, id, shop("Theirs"), any(), at(20)).await.err(),
        kept.edit(&by, id, Part::Whole, any(), at(20), same).await.err(),
        kept.delete_building(&by, id, any(), at(20)).await.err(),
        kept.put_room(&by, id, room("shop"), any(), at(20), accept).await.err(),
        kept.put_room(&by, id, room("attic"), Condition::NoneMatch, at(20), accept).await.err(),
        kept.put_opening(&by, id, door("front", ["shop", "outside"]), any(), at(20), accept).await.err(),
        kept.delete_room(&by, id, &key("shop"), any(), at(20)).await.err(),
        kept.delete_opening(&by, id, &key("front"), any(), at(20)).await.err(),
        kept.insert_assessment(&by, assessment(6, 1, 1, 20), at(20)).await.err(),
    ];

    for (n, refused) in refusals.into_iter().enumerate() {
        assert!(matches!(refused, Some(StoreError::NotFound(Missing::Building))), "change {n}: {refused:?}");
    }
    assert_eq!(kept.get_building(&local(), id).await.unwrap(), before);
}

#[tokio::test]
async fn two_agencies_may_use_the_same_ids_references_and_keys_side_by_side() {
    let kept = two().await;
    let (id, by) = (building_id(1), other());

    kept.create_building(&by, id, with_reference("Theirs", "417-B"), at(20)).await.unwrap();
    kept.insert_assessment(&by, assessment(5, 1, 1, 21), at(21)).await.unwrap();
    kept.put_building(&by, id, shop("Theirs, changed"), Condition::Match(vec![1]), at(22)).await.unwrap();

    for (caller, name, revision) in [(local(), "Ours", 1), (other(), "Theirs, changed", 2)] {
        // Twice: from the file, then from memory.
        for _ in 0..2 {
            let read = kept.get_building(&caller, id).await.unwrap();
            assert_eq!((read.building.name.as_str(), read.head.revision), (name, revision));
        }
    }
    let of = |agency: &str| {
        format!("select group_concat(sequence) = '1,2,3' from changes where agency_id = '{agency}'")
    };
    assert_eq!(kept.number(&of("other")).await, 1, "each agency counts its own changes");
    kept.delete_building(&by, id, Condition::Any, at(23)).await.unwrap();
    assert!(kept.get_building(&local(), id).await.is_ok());
    assert_eq!(kept.number("select count(*) from rooms where agency_id = 'local'").await, 2);
}

#[tokio::test]
async fn an_agency_that_was_never_made_can_enter_nothing() {
    let kept = Kept::new().await;

    let refused = kept.create_building(&other(), building_id(1), shop("Nobody's"), at(1)).await;

    assert!(matches!(refused, Err(StoreError::Database(_))));
}
