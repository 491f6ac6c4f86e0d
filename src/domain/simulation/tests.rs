use super::*;

fn run(duration_s: f64, interval_s: f64) -> Simulation {
    Simulation {
        rooms: Vec::new(),
        openings: Vec::new(),
        ambient: Ambient::default(),
        fires: Vec::new(),
        schedule: Vec::new(),
        fans: Vec::new(),
        detectors: Vec::new(),
        sprinklers: Vec::new(),
        duration_s: RunTime::new(duration_s).unwrap(),
        output_interval_s: OutputInterval::new(interval_s).unwrap(),
        tolerance: None,
    }
}

#[test]
fn times_go_by_the_interval_and_end_with_the_run() {
    for (duration_s, interval_s, times_s) in [
        (30.0, 10.0, vec![0.0, 10.0, 20.0, 30.0]),
        (25.0, 10.0, vec![0.0, 10.0, 20.0, 25.0]),
        (1.0, 10.0, vec![0.0, 1.0]),
        (1.0, 0.3, vec![0.0, 0.3, 0.6, 0.9, 1.0]),
        (1.0, 0.1, vec![0.0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1.0]),
    ] {
        let run = run(duration_s, interval_s);

        assert_eq!(run.times_s(), times_s);
        assert_eq!(run.output_times(), times_s.len());
    }
}

#[test]
fn a_day_has_as_many_times_as_a_division_by_hand_says() {
    // 86 400 / 8.64 = 10 000 intervals, so 10 001 times; 86 400 / 0.01 = 8 640 000.
    for (interval_s, times) in [(8.64, 10_001), (8.65, 9990), (86_400.0, 2), (0.01, 8_640_001)] {
        let run = run(86_400.0, interval_s);

        assert_eq!(run.output_times(), times, "{interval_s}");
    }
}

#[test]
fn times_rise_and_never_touch_the_end_twice() {
    for interval_s in [0.01, 0.07, 1.0 / 3.0, 0.3, 1.7, 9.99, 10.0] {
        for duration_s in [1.0, 2.1, 9.999, 60.0, 99.9] {
            let times_s = run(duration_s, interval_s).times_s();

            assert!(times_s.windows(2).all(|pair| pair[0] < pair[1]), "{interval_s} of {duration_s}");
            assert_eq!(times_s.last(), Some(&duration_s));
        }
    }
}
