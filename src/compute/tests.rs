use std::num::NonZeroUsize;
use std::sync::mpsc;
use std::time::Duration;

use super::{Compute, Lane, NoAnswer, StopFlag};

/// One thread, held by work that waits for a word, so that what follows must queue.
async fn held(bound: usize) -> (Compute, mpsc::Sender<()>, tokio::task::JoinHandle<()>) {
    let compute = Compute::with(NonZeroUsize::MIN, bound).unwrap();
    let (release, wait) = mpsc::channel::<()>();
    let (started, begun) = tokio::sync::oneshot::channel();
    let holder = compute.clone();
    let held = tokio::spawn(async move {
        let work = move |_: &StopFlag| {
            started.send(()).unwrap();
            let _released = wait.recv();
        };
        holder.run(Lane::Interactive, work).await.unwrap();
    });
    begun.await.unwrap();
    (compute, release, held)
}

async fn until(mut holds: impl FnMut() -> bool) {
    for _ in 0..500 {
        if holds() {
            return;
        }
        tokio::time::sleep(Duration::from_millis(10)).await;
    }
    panic!("did not come about in five seconds");
}

#[tokio::test]
async fn the_answer_comes_back() {
    let compute = Compute::with(NonZeroUsize::MIN, 1).unwrap();

    let answer = compute.run(Lane::Interactive, |_| 6 * 7).await;

    assert_eq!(answer, Ok(42));
}

#[tokio::test]
async fn a_panic_is_an_error_and_the_thread_goes_on() {
    let compute = Compute::with(NonZeroUsize::MIN, 1).unwrap();

    let broken = compute.run(Lane::Interactive, |_| -> u8 { panic!("on purpose") }).await;
    let next = compute.run(Lane::Interactive, |_| 1).await;

    assert_eq!(broken, Err(NoAnswer::BrokeOff));
    assert_eq!(next, Ok(1));
}

#[tokio::test]
async fn a_full_lane_refuses_and_the_other_lane_does_not() {
    let (compute, release, held) = held(1).await;
    let second = tokio::spawn({
        let compute = compute.clone();
        async move { compute.run(Lane::Interactive, |_| 2).await }
    });
    until(|| compute.load().interactive_waiting == 1).await;

    let third = compute.run(Lane::Interactive, |_| 3).await;
    let other = tokio::spawn({
        let compute = compute.clone();
        async move { compute.run(Lane::Background, |_| 4).await }
    });
    until(|| compute.load().background_waiting == 1).await;
    release.send(()).unwrap();

    assert_eq!(third, Err(NoAnswer::Full));
    assert_eq!(second.await.unwrap(), Ok(2));
    assert_eq!(other.await.unwrap(), Ok(4));
    held.await.unwrap();
}

#[tokio::test]
async fn an_asker_who_leaves_sets_the_flag_of_running_work() {
    let compute = Compute::with(NonZeroUsize::MIN, 1).unwrap();
    let (saw, seen) = tokio::sync::oneshot::channel();
    let work = move |stop: &StopFlag| {
        while !stop.is_set() {
            std::thread::yield_now();
        }
        saw.send(()).unwrap();
    };

    let asked = tokio::time::timeout(Duration::from_millis(50), compute.run(Lane::Interactive, work)).await;

    assert!(asked.is_err(), "the work only ends when it is told to");
    seen.await.unwrap();
}

#[tokio::test]
async fn work_abandoned_before_it_began_never_begins() {
    let (compute, release, held) = held(2).await;
    let (ran, has_run) = mpsc::channel();
    let abandoned = compute.run(Lane::Interactive, move |_| ran.send(()).unwrap());

    let asked = tokio::time::timeout(Duration::from_millis(20), abandoned).await;
    release.send(()).unwrap();
    held.await.unwrap();
    // One thread, one lane: when this answers, the abandoned work has had its turn.
    compute.run(Lane::Interactive, |_| ()).await.unwrap();

    assert!(asked.is_err());
    assert!(has_run.try_recv().is_err(), "it ran although nobody waited");
}

#[tokio::test]
async fn people_who_wait_go_first_and_the_background_is_not_starved() {
    let (compute, release, held) = held(32).await;
    let (done, order) = mpsc::channel();
    let mut tasks = Vec::new();
    for (lane, name, count) in [(Lane::Background, 'b', 2_usize), (Lane::Interactive, 'i', 12)] {
        for _ in 0..count {
            let (compute, done) = (compute.clone(), done.clone());
            tasks.push(tokio::spawn(async move {
                compute.run(lane, move |_| done.send(name).unwrap()).await.unwrap();
            }));
        }
        until(|| {
            let load = compute.load();
            match lane {
                Lane::Interactive => load.interactive_waiting == count,
                Lane::Background => load.background_waiting == count,
            }
        })
        .await;
    }

    release.send(()).unwrap();
    held.await.unwrap();
    for task in tasks {
        task.await.unwrap();
    }

    // The held work was the first of eight in a row.
    assert_eq!(order.try_iter().collect::<String>(), "iiiiiiibiiiiib");
}

#[tokio::test]
async fn the_threads_end_with_the_last_handle() {
    let compute = Compute::with(NonZeroUsize::MIN, 1).unwrap();
    let shared = std::sync::Arc::downgrade(&compute.0.shared);

    drop(compute);

    until(|| shared.strong_count() == 0).await;
}
