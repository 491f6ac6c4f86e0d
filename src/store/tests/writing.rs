use std::sync::mpsc;
use std::sync::{Arc, Mutex};
use std::time::Duration;

use super::writer::QUEUE;
use super::*;

/// A change that stands on the writer until it is let go.
struct Stopped {
    task: tokio::task::JoinHandle<Result<SavedBuilding, StoreError>>,
    let_go: mpsc::Sender<()>,
}

async fn stop_writer_at(store: &Store, id: BuildingId, name: &'static str) -> Stopped {
    let (let_go, gate) = mpsc::channel::<()>();
    let (inside, entered) = tokio::sync::oneshot::channel();
    let store = store.clone();
    let task = tokio::spawn(async move {
        let change = move |building: &Building| {
            inside.send(()).unwrap();
            gate.recv().unwrap();
            Ok::<_, StoreError>(Building { name: name.to_owned(), ..building.clone() })
        };
        store.edit(&local(), id, Part::Whole, Condition::Any, at(2), change).await
    });
    entered.await.unwrap();
    Stopped { task, let_go }
}

#[tokio::test(flavor = "multi_thread", worker_threads = 4)]
async fn a_caller_that_goes_away_mid_write_neither_tears_nor_holds_the_writer() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let stopped = stop_writer_at(&kept, building_id(1), "Written without its caller").await;

    stopped.task.abort();
    assert!(stopped.task.await.unwrap_err().is_cancelled());
    stopped.let_go.send(()).unwrap();
    kept.enter(2, shop("Next")).await;

    let read = kept.get_building(&local(), building_id(1)).await.unwrap();
    assert_eq!((read.building.name.as_str(), read.head.revision), ("Written without its caller", 2));
    assert_eq!(kept.number("select count(*) from building_revisions").await, 3);
    assert_eq!(kept.number("select count(*) from changes").await, 3);
}

#[tokio::test(flavor = "multi_thread", worker_threads = 4)]
async fn a_caller_that_goes_away_before_its_turn_is_passed_over() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let stopped = stop_writer_at(&kept, building_id(1), "First").await;
    let store = kept.store.clone();
    let waiting =
        tokio::spawn(
            async move { store.create_building(&local(), building_id(2), shop("Never"), at(2)).await },
        );
    while kept.writes_waiting() == 0 {
        tokio::time::sleep(Duration::from_millis(1)).await;
    }

    waiting.abort();
    assert!(waiting.await.unwrap_err().is_cancelled());
    stopped.let_go.send(()).unwrap();
    stopped.task.await.unwrap().unwrap();
    kept.enter(3, shop("Next")).await;

    assert_eq!(kept.number("select count(*) from buildings").await, 2);
}

#[tokio::test(flavor = "multi_thread", worker_threads = 4)]
async fn readers_do_not_wait_for_the_writer_and_see_what_was_before() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Before")).await;
    let stopped = stop_writer_at(&kept, building_id(1), "After").await;

    let caller = local();
    let read = tokio::time::timeout(Duration::from_secs(3), kept.get_building(&caller, building_id(1)));
    assert_eq!(read.await.unwrap().unwrap().building.name, "Before");

    stopped.let_go.send(()).unwrap();
    stopped.task.await.unwrap().unwrap();
    assert_eq!(kept.get_building(&local(), building_id(1)).await.unwrap().building.name, "After");
}

#[tokio::test(flavor = "multi_thread", worker_threads = 4)]
async fn a_full_queue_answers_busy_at_once_and_keeps_what_it_took() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let stopped = stop_writer_at(&kept, building_id(1), "First").await;
    let (answered, mut answers) = tokio::sync::mpsc::unbounded_channel();
    let too_many = 9;
    for n in 0..QUEUE + too_many {
        let (store, answered) = (kept.store.clone(), answered.clone());
        tokio::spawn(async move {
            let id = building_id(100 + n as u128);
            answered.send(store.create_building(&local(), id, shop("Queued"), at(2)).await).unwrap();
        });
    }

    for _ in 0..too_many {
        let refused = answers.recv().await.unwrap().unwrap_err();
        assert!(matches!(refused, StoreError::Busy), "{refused}");
    }
    assert_eq!(kept.writes_waiting(), QUEUE);
    stopped.let_go.send(()).unwrap();
    for _ in 0..QUEUE {
        answers.recv().await.unwrap().unwrap();
    }

    let entered = i64::try_from(QUEUE).unwrap() + 1;
    assert_eq!(kept.number("select count(*) from buildings").await, entered);
}

#[tokio::test]
async fn changes_are_made_in_the_order_they_came() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let order = Arc::new(Mutex::new(Vec::new()));

    let tasks: Vec<_> = (0..50)
        .map(|n| {
            let (store, order) = (kept.store.clone(), Arc::clone(&order));
            tokio::spawn(async move {
                let change = move |building: &Building| {
                    order.lock().unwrap().push(n);
                    Ok::<_, StoreError>(building.clone())
                };
                store.edit(&local(), building_id(1), Part::Whole, Condition::Any, at(2), change).await
            })
        })
        .collect();
    for task in tasks {
        task.await.unwrap().unwrap();
    }

    assert_eq!(*order.lock().unwrap(), (0..50).collect::<Vec<_>>());
}

#[tokio::test]
async fn a_change_that_panics_is_undone_and_the_writer_goes_on() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let change = |_: &Building| -> Result<Building, StoreError> { panic!("a fault in the caller's rules") };

    let lost = kept.edit(&local(), building_id(1), Part::Whole, Condition::Any, at(2), change).await;

    assert!(matches!(lost, Err(StoreError::Database(_))));
    let put =
        kept.put_building(&local(), building_id(1), shop("After"), Condition::Match(vec![1]), at(3)).await;
    assert_eq!(put.unwrap().head.revision, 2);
    assert_eq!(kept.number("select count(*) from changes").await, 2);
}

#[tokio::test]
async fn a_closed_store_answers_closed() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let clone = kept.store.clone();
    assert!(kept.ready().await.is_ok());

    kept.close().await.unwrap();
    kept.close().await.unwrap();

    let read = clone.get_building(&local(), building_id(1)).await.unwrap_err();
    let write = clone.create_building(&local(), building_id(2), shop("Late"), at(2)).await.unwrap_err();
    assert!(matches!((&read, &write), (StoreError::Closed, StoreError::Closed)), "{read}, {write}");
    assert!(clone.ready().await.is_err());
}
