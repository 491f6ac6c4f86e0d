use super::*;

#[tokio::test(flavor = "multi_thread", worker_threads = 8)]
async fn of_eight_threads_with_one_tag_exactly_one_wins() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;

    // Each sends its own name; then all send the same, which is what was there before.
    for (round, name) in [(1, None), (2, Some("Shop"))] {
        let answers: Vec<_> = (0..8)
            .map(|thread| {
                let store = kept.store.clone();
                let building = shop(name.unwrap_or(&format!("Shop {thread}")));
                let condition = Condition::Match(vec![round]);
                tokio::spawn(async move {
                    store.put_building(&local(), building_id(1), building, condition, at(2)).await
                })
            })
            .collect();

        let mut won = 0;
        for answer in answers {
            match answer.await.unwrap() {
                Ok(_) => won += 1,
                Err(StoreError::Stale { current }) => assert_eq!(current, Some(round + 1)),
                Err(other) => panic!("{other}"),
            }
        }

        assert_eq!(won, 1);
        let read = kept.get_building(&local(), building_id(1)).await.unwrap();
        assert_eq!(read.head.revision, round + 1);
    }
}

#[tokio::test(flavor = "multi_thread", worker_threads = 8)]
async fn of_eight_threads_with_one_room_tag_exactly_one_wins() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;

    let answers: Vec<_> = (0..8)
        .map(|_| {
            let store = kept.store.clone();
            let condition = Condition::Match(vec![1]);
            tokio::spawn(async move {
                store.put_room(&local(), building_id(1), room("shop"), condition, at(2), accept).await
            })
        })
        .collect();

    let mut won = 0;
    for answer in answers {
        won += usize::from(answer.await.unwrap().is_ok());
    }
    assert_eq!(won, 1);
}

#[tokio::test(flavor = "multi_thread", worker_threads = 8)]
async fn work_on_two_rooms_and_an_opening_never_collides() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let id = building_id(1);
    let rooms = ["store", "shop"].map(|name| {
        let store = kept.store.clone();
        tokio::spawn(async move {
            let mut tag = 1;
            for step in 0..20 {
                let next = taller(room(name), 2.0 + f64::from(step) / 10.0);
                let condition = Condition::Match(vec![tag]);
                let put = store.put_room(&local(), id, next, condition, at(2), accept).await;
                tag = put.unwrap().revision;
            }
        })
    });
    let mut tag = 1;
    for _ in 0..20 {
        let next = door("front", ["shop", "outside"]);
        let condition = Condition::Match(vec![tag]);
        let put = kept.put_opening(&local(), id, next, condition, at(2), accept).await;
        tag = put.unwrap().revision;
    }
    for task in rooms {
        task.await.unwrap();
    }

    let read = kept.get_building(&local(), id).await.unwrap();
    assert_eq!(read.head.revision, 61);
    for name in ["store", "shop"] {
        assert_eq!(read.room(&key(name)).unwrap().value, taller(room(name), 3.9));
    }
}

#[tokio::test]
async fn a_part_is_entered_on_condition_that_it_is_new_and_changed_on_condition_that_it_is_there() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let id = building_id(1);
    let stale = |refused: StoreError| match refused {
        StoreError::Stale { current } => current,
        other => panic!("{other}"),
    };

    for condition in [Condition::Any, Condition::Match(vec![1])] {
        let absent = kept.put_room(&local(), id, room("attic"), condition.clone(), at(2), accept).await;
        assert_eq!(stale(absent.unwrap_err()), None, "{condition:?}");
    }
    let there = kept.put_room(&local(), id, room("shop"), Condition::NoneMatch, at(2), accept).await;
    assert_eq!(stale(there.unwrap_err()), Some(1));
    let there = kept
        .put_opening(&local(), id, door("front", ["shop", "outside"]), Condition::NoneMatch, at(2), accept)
        .await;
    assert_eq!(stale(there.unwrap_err()), Some(1));

    let back = door("back", ["store", "outside"]);
    let new = kept.put_opening(&local(), id, back, Condition::NoneMatch, at(2), accept).await.unwrap();
    assert_eq!(new.revision, 2);
    let new = kept.put_room(&local(), id, room("attic"), Condition::NoneMatch, at(3), accept).await.unwrap();
    assert_eq!(new.revision, 3);
}

#[tokio::test]
async fn what_is_not_there_is_not_found_before_any_condition_is_judged() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let (id, nowhere) = (building_id(1), building_id(9));
    let stale = || Condition::Match(vec![99]);

    let missing = |refused: StoreError| match refused {
        StoreError::NotFound(what) => what,
        other => panic!("{other}"),
    };

    let room_of_none = kept.put_room(&local(), nowhere, room("shop"), stale(), at(2), accept).await;
    assert_eq!(missing(room_of_none.unwrap_err()), Missing::Building);
    let no_room = kept.delete_room(&local(), id, &key("attic"), stale(), at(2)).await;
    assert_eq!(missing(no_room.unwrap_err()), Missing::Room);
    let no_opening = kept.delete_opening(&local(), id, &key("back"), stale(), at(2)).await;
    assert_eq!(missing(no_opening.unwrap_err()), Missing::Opening);
    let no_patch = kept
        .edit(&local(), id, Part::Room(key("attic")), stale(), at(2), |building: &Building| {
            Ok::<_, StoreError>(building.clone())
        })
        .await;
    assert_eq!(missing(no_patch.unwrap_err()), Missing::Room);
}

#[tokio::test]
async fn a_stale_condition_is_judged_before_conflicts() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;

    let refused = kept
        .delete_room(&local(), building_id(1), &key("shop"), Condition::Match(vec![9]), at(2))
        .await
        .unwrap_err();

    assert!(matches!(refused, StoreError::Stale { current: Some(1) }), "{refused}");
}

#[tokio::test]
async fn a_list_of_tags_wins_with_any_of_them() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;

    let put =
        kept.put_building(&local(), building_id(1), shop("New"), Condition::Match(vec![5, 1]), at(2)).await;

    assert_eq!(put.unwrap().head.revision, 2);
}
