use std::sync::Arc;

use super::cache::{BUILDINGS, Cache, Decoded, PARTS};
use super::*;

fn decoded(rooms: usize) -> Decoded {
    let rooms = (0..rooms).map(|n| room(&format!("r{n}"))).collect();
    let building = Building { rooms, openings: Vec::new(), ..shop("Shop") };
    Decoded { building: Arc::new(building), parts: Arc::default() }
}

fn kept(cache: &Cache, ids: std::ops::Range<usize>) -> usize {
    ids.filter(|&n| cache.get(&AgencyId::local(), building_id(n as u128), 1).is_some()).count()
}

#[test]
fn only_the_revision_that_is_asked_for_is_answered() {
    let cache = Cache::default();
    cache.put(&AgencyId::local(), building_id(1), 7, decoded(1));

    for (revision, there) in [(6, false), (7, true), (8, false)] {
        assert_eq!(cache.get(&AgencyId::local(), building_id(1), revision).is_some(), there, "{revision}");
    }
    assert!(cache.get(&other().agency, building_id(1), 7).is_none());
}

#[test]
fn a_slow_reader_does_not_put_an_old_revision_in_the_place_of_a_newer_one() {
    let cache = Cache::default();
    cache.put(&AgencyId::local(), building_id(1), 8, decoded(1));

    cache.put(&AgencyId::local(), building_id(1), 7, decoded(2));

    assert!(cache.get(&AgencyId::local(), building_id(1), 8).is_some());
}

#[test]
fn many_buildings_push_out_those_not_used_for_longest() {
    let cache = Cache::default();
    for n in 0..BUILDINGS + 10 {
        cache.put(&AgencyId::local(), building_id(n as u128), 1, decoded(0));
        assert!(cache.get(&AgencyId::local(), building_id(0), 1).is_some(), "used all along, so it stays");
    }

    assert_eq!(kept(&cache, 0..BUILDINGS + 10), BUILDINGS);
    assert_eq!(kept(&cache, 1..11), 0);
}

#[test]
fn large_buildings_count_by_their_parts() {
    let cache = Cache::default();
    // One more than its rooms each, for the building itself.
    let each = PARTS / 4;
    for n in 0..9 {
        cache.put(&AgencyId::local(), building_id(n), 1, decoded(each - 1));
    }
    assert_eq!(kept(&cache, 0..9), 4);

    cache.put(&AgencyId::local(), building_id(100), 1, decoded(PARTS));
    assert_eq!(
        (kept(&cache, 100..101), kept(&cache, 0..9)),
        (0, 4),
        "one that is too large pushes nothing out"
    );

    // The same buildings at their next revision take the place of the old ones, and no more.
    for revision in 2..9 {
        for n in 5..9 {
            cache.put(&AgencyId::local(), building_id(n), revision, decoded(each - 1));
        }
    }
    let kept_now = (5..9).filter(|&n| cache.get(&AgencyId::local(), building_id(n), 8).is_some()).count();
    assert_eq!(kept_now, 4);
}

#[tokio::test]
async fn a_building_in_memory_gives_way_to_what_another_process_saved() {
    let ours = Kept::new().await;
    ours.enter(1, shop("Before")).await;
    let theirs = Store::open(&url(&ours.path())).await.unwrap();

    theirs
        .put_building(&local(), building_id(1), shop("After"), Condition::Match(vec![1]), at(2))
        .await
        .unwrap();

    assert_eq!(ours.get_building(&local(), building_id(1)).await.unwrap().building.name, "After");
    let late =
        ours.put_building(&local(), building_id(1), shop("Lost"), Condition::Match(vec![1]), at(3)).await;
    assert!(matches!(late, Err(StoreError::Stale { current: Some(2) })));
}
