use super::*;

fn all(limit: u32) -> ListBuildings {
    ListBuildings { reference: None, after: None, limit }
}

/// Ids all over the range, the same ones on every run.
fn scattered(n: u128) -> u128 {
    n.wrapping_mul(0x9E37_79B9_7F4A_7C15_F39C_C060_5CED_C835)
}

#[tokio::test]
async fn a_walk_neither_doubles_nor_loses_while_others_write() {
    let kept = Kept::new().await;
    let mut there_all_along: Vec<BuildingId> = Vec::new();
    for n in 1..=20 {
        there_all_along.push(kept.enter(scattered(n), shop(&format!("Building {n}"))).await.head.id);
    }
    there_all_along.sort();

    let (mut seen, mut list, mut pages) = (Vec::new(), all(3), 0);
    loop {
        let page = kept.list_buildings(&local(), &list).await.unwrap();
        seen.extend(page.items.iter().map(|item| item.id));
        pages += 1;
        assert!(pages < 30, "the walk ends");
        // Meanwhile one is entered anywhere, one seen is renamed, one not seen yet is changed.
        kept.enter(scattered(1000 + pages), shop("New")).await;
        for id in [there_all_along[0], there_all_along[19]] {
            kept.put_building(&local(), id, shop("Renamed"), Condition::Any, at(2)).await.unwrap();
        }
        match page.next {
            Some(last) => list.after = Some(last),
            None => break,
        }
    }

    assert!(seen.windows(2).all(|pair| pair[0] < pair[1]), "in order, so none twice");
    assert!(there_all_along.iter().all(|id| seen.contains(id)), "none lost");
}

#[tokio::test]
async fn a_page_holds_the_limit_and_the_last_one_says_so() {
    let kept = Kept::new().await;
    for n in 1..=4 {
        kept.enter(n, shop("Shop")).await;
    }

    for (limit, items, more) in [(1, 1, true), (3, 3, true), (4, 4, false), (500, 4, false)] {
        let page = kept.list_buildings(&local(), &all(limit)).await.unwrap();

        assert_eq!((page.items.len(), page.next.is_some()), (items, more), "limit {limit}");
    }
    let rest = ListBuildings { after: Some(building_id(3)), ..all(3) };
    let page = kept.list_buildings(&local(), &rest).await.unwrap();
    assert_eq!(page.items.iter().map(|item| item.id).collect::<Vec<_>>(), [building_id(4)]);
    assert_eq!(page.next, None);
}

#[tokio::test]
async fn a_summary_says_what_the_building_says() {
    let kept = Kept::new().await;
    kept.enter(1, with_reference("Harbour Row 12", "417-B")).await;
    kept.put_room(&local(), building_id(1), room("attic"), Condition::NoneMatch, at(5), accept)
        .await
        .unwrap();

    let page = kept.list_buildings(&local(), &all(50)).await.unwrap();

    let expected = Summary {
        id: building_id(1),
        reference: Some("417-B".to_owned()),
        name: "Harbour Row 12".to_owned(),
        location: shop("").location,
        occupancy_group: Some("M".to_owned()),
        rooms: 3,
        revision: 2,
        updated_at: Timestamp(5),
        worst: None,
    };
    assert_eq!(page.items, [expected]);
}

#[tokio::test]
async fn a_reference_finds_its_building_or_nothing() {
    let kept = Kept::new().await;
    kept.enter(1, with_reference("First", "417-B")).await;
    kept.enter(2, shop("Second")).await;
    let by = |reference: &str| ListBuildings { reference: Some(reference.to_owned()), ..all(50) };

    let found = kept.list_buildings(&local(), &by("417-B")).await.unwrap();
    let nothing = kept.list_buildings(&local(), &by("417-b")).await.unwrap();

    assert_eq!(found.items.iter().map(|item| item.id).collect::<Vec<_>>(), [building_id(1)]);
    assert!(nothing.items.is_empty() && nothing.next.is_none());
}

#[tokio::test]
async fn deleted_buildings_vanish_from_lists() {
    let kept = Kept::new().await;
    kept.enter(1, with_reference("First", "417-B")).await;
    kept.enter(2, shop("Second")).await;

    kept.delete_building(&local(), building_id(1), Condition::Any, at(2)).await.unwrap();

    let page = kept.list_buildings(&local(), &all(50)).await.unwrap();
    assert_eq!(page.items.iter().map(|item| item.id).collect::<Vec<_>>(), [building_id(2)]);
    let by = ListBuildings { reference: Some("417-B".to_owned()), ..all(50) };
    assert!(kept.list_buildings(&local(), &by).await.unwrap().items.is_empty());
}
