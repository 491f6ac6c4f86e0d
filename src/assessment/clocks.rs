//! The two clocks: from established burning over detection and call to water on the fire.

use super::assumed::{Account, OWN};
use super::findings::{Assumed, Band, BeforeWater, ClockFinding, DetectedBy, Provenance};
use super::inputs::Inputs;
use super::judge::FireClock;
use super::watchers::Watcher;
use crate::domain::Building;
use crate::domain::assumptions::Assumptions;
use crate::domain::building::{Occupants, SprinklerState};
use crate::domain::quantity::Span;

/// Somebody awake inside notices a flaming fire, s after established burning. Ours.
const OCCUPANT_S: Band = Band { low: 30.0, typical: 120.0, high: 300.0 };
/// Smoke or flame is seen from outside, s after established burning. Ours.
const SEEN_OUTSIDE_S: Band = Band { low: 300.0, typical: 600.0, high: 1800.0 };
/// Set-up time added for each floor above the second or below grade, s. Ours.
const PER_FLOOR_S: f64 = 60.0;
/// Incubation before established burning: recorded furniture fires took 31 to 120 s from ignition to growth.
pub(super) const INCUBATION_S: Band = Band { low: 31.0, typical: 71.0, high: 120.0 };

/// The spans of the crew clock, the same for the whole building.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Spans {
    pub given_detection_s: Option<f64>,
    pub call_s: f64,
    pub processing_s: f64,
    pub turnout_s: f64,
    pub travel_s: f64,
    pub setup_s: f64,
}

impl Spans {
    /// The building's spans, those of the assumptions before them, and what stands for the unknown ones.
    pub fn of(building: &Building, assumptions: &Assumptions) -> (Self, Vec<Assumed>) {
        let (given, recorded) = (assumptions.response, building.response);
        let mut account = Account::default();
        let mut span = |asked: Option<Span>, known: Option<Span>, field, default_s, source, provenance| {
            asked.or(known).map_or_else(
                || {
                    let value = super::findings::AssumedValue::Number(default_s);
                    account.enter(field, value, source, provenance);
                    default_s
                },
                Span::get,
            )
        };
        let spans = Self {
            given_detection_s: given.detection_s.or(recorded.detection_s).map(Span::get),
            call_s: span(given.call_s, recorded.call_s, "response.call_s", 60.0, OWN, Provenance::Estimated),
            processing_s: span(
                given.processing_s,
                recorded.processing_s,
                "response.processing_s",
                64.0,
                "NFPA 1710:2016, alarm processing, 90 %",
                Provenance::Seen,
            ),
            turnout_s: span(
                given.turnout_s,
                recorded.turnout_s,
                "response.turnout_s",
                80.0,
                "NFPA 1710, turnout to fires, 90 %",
                Provenance::Seen,
            ),
            travel_s: span(
                given.travel_s,
                recorded.travel_s,
                "response.travel_s",
                240.0,
                "NFPA 1710, travel of the first engine, 90 %",
                Provenance::Seen,
            ),
            setup_s: span(
                given.setup_s,
                recorded.setup_s,
                "response.setup_s",
                120.0,
                OWN,
                Provenance::Estimated,
            ),
        };
        (spans, account.into_entries())
    }
}

/// The clock of a room.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Clock {
    pub finding: ClockFinding,
    pub spans: Spans,
    /// First detector, over the corners.
    pub detector: Option<Act>,
    /// First sprinkler head, over the corners.
    pub sprinkler: Option<Act>,
    /// Water on the fire if no detector told anybody.
    pub water_without_alarm_s: Band,
    /// Water on the fire if a detector told somebody at once.
    pub water_with_alarm_s: Option<Band>,
}

/// Something acts: which of the watchers, and when.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Act {
    pub watcher: usize,
    pub at_s: Band,
}

impl Clock {
    /// Joins the clocks for a fire in a room.
    pub fn of(inputs: &Inputs<'_>, spans: Spans) -> Self {
        let building = inputs.plan.building;
        let detector = first_act(inputs, &inputs.watchers);
        let sprinkler =
            inputs.sprinkler.as_ref().and_then(|head| first_act(inputs, std::slice::from_ref(head)));

        let day = awake_by_day(&building.occupants);
        let night = awake_by_night(&building.occupants);
        let without = detection(None, None, day, night);
        // A detector that rings in an empty building tells nobody, unless it calls by itself.
        let heard = building.alarm_monitored == Some(true) || inside(&building.occupants);
        let flow_heard = heard && building.sprinklers.state == SprinklerState::WorkingTested;
        let (detected_by, found_s) = match spans.given_detection_s {
            Some(given_s) => (DetectedBy::Given, Band { low: given_s, typical: given_s, high: given_s }),
            None => detection(
                detector.filter(|_| heard).map(|act| act.at_s),
                sprinkler.filter(|_| flow_heard).map(|act| act.at_s),
                day,
                night,
            ),
        };

        let floor_setup_s = floor_setup_s(inputs.room.floor);
        let call_to_water_s =
            spans.processing_s + spans.turnout_s + spans.travel_s + spans.setup_s + floor_setup_s;
        let call_s = later(found_s, spans.call_s);
        let to_water_s = spans.call_s + call_to_water_s;
        let with_alarm = detector
            .map(|act| earlier(earlier(act.at_s, without.1), found_s))
            .map(|at_s| later(at_s, to_water_s));
        Self {
            finding: ClockFinding {
                detected_by,
                detection_s: found_s,
                call_s,
                call_to_water_s,
                water_on_fire_s: later(call_s, call_to_water_s),
                floor_setup_s,
            },
            spans,
            detector,
            sprinkler,
            water_without_alarm_s: later(without.1, to_water_s),
            water_with_alarm_s: with_alarm,
        }
    }
}

/// The first of several to act, over the corners of growth; one that does not act at the slow corner acts,
/// for want of better, as late as with typical growth.
fn first_act(inputs: &Inputs<'_>, watchers: &[Watcher]) -> Option<Act> {
    let contents = &inputs.contents;
    let acts_s = |watcher: &Watcher, fire, best| {
        let at_s = watcher.acts_s(&fire, inputs.ambient_k, inputs.horizon.open_s, best)?;
        Some(FireClock::of(&fire).at_s(at_s))
    };
    let (number, typical) = watchers
        .iter()
        .enumerate()
        .filter_map(|(number, watcher)| Some((number, acts_s(watcher, contents.typical_fire(), false)?)))
        .min_by(|a, b| a.1.total_cmp(&b.1))?;
    let watcher = &watchers[number];
    let low = acts_s(watcher, contents.worst_fire(), true).unwrap_or(typical);
    let high = acts_s(watcher, contents.mildest_fire(), false).unwrap_or(typical);
    Some(Act { watcher: number, at_s: Band { low: low.min(typical), typical, high: high.max(typical) } })
}

/// What tells people first: with typical values by day; the latest value is that of the night.
fn detection(
    detector: Option<Band>,
    sprinkler: Option<Band>,
    awake_by_day: bool,
    awake_by_night: bool,
) -> (DetectedBy, Band) {
    let mut first = (DetectedBy::SeenOutside, SEEN_OUTSIDE_S);
    let mut night_high_s = SEEN_OUTSIDE_S.high;
    if awake_by_night {
        night_high_s = night_high_s.min(OCCUPANT_S.high);
    }
    let mut candidates: [(DetectedBy, Option<Band>); 3] = [
        (DetectedBy::Occupant, awake_by_day.then_some(OCCUPANT_S)),
        (DetectedBy::Sprinkler, sprinkler),
        (DetectedBy::Detector, detector),
    ];
    for (by, band) in &mut candidates {
        let Some(band) = band else { continue };
        if *by != DetectedBy::Occupant {
            night_high_s = night_high_s.min(band.high);
        }
        if band.typical < first.1.typical {
            first.0 = *by;
        }
        first.1 = earlier(first.1, *band);
    }
    first.1.high = night_high_s.max(first.1.typical);
    first
}

fn awake_by_day(occupants: &Occupants) -> bool {
    occupants.day.is_some_and(|people| people > 0)
}

fn awake_by_night(occupants: &Occupants) -> bool {
    occupants.night.is_some_and(|people| people > 0) && occupants.asleep == Some(false)
}

fn inside(occupants: &Occupants) -> bool {
    awake_by_day(occupants) || occupants.night.is_some_and(|people| people > 0)
}

/// Set-up time for the way up or down. Floor 0 is the entrance level and the first floor of the count, so
/// that floors from 2 up lie above the second.
fn floor_setup_s(floor: i32) -> f64 {
    let floors = if floor >= 2 { floor - 1 } else { (-floor).max(0) };
    PER_FLOOR_S * f64::from(floors)
}

fn later(band: Band, by_s: f64) -> Band {
    Band { low: band.low + by_s, typical: band.typical + by_s, high: band.high + by_s }
}

fn earlier(a: Band, b: Band) -> Band {
    Band { low: a.low.min(b.low), typical: a.typical.min(b.typical), high: a.high.min(b.high) }
}

/// Which comes first, flashover or water, over the corners of both.
pub(super) fn before_water(flashover_s: Band, water_s: Band) -> BeforeWater {
    if flashover_s.high < water_s.low {
        BeforeWater::InEveryCase
    } else if flashover_s.typical < water_s.typical {
        BeforeWater::Typically
    } else if flashover_s.low < water_s.high {
        BeforeWater::InTheWorstCase
    } else {
        BeforeWater::InNoCase
    }
}

/// A time of the fire clock on the crew clock; none where the crew clock has not begun by then.
pub(super) fn crew_clock_s(fire_clock_s: Band, call_s: Band) -> Option<Band> {
    let typical = fire_clock_s.typical - call_s.typical;
    (typical >= 0.0).then(|| Band {
        low: (fire_clock_s.low - call_s.high).min(typical),
        typical,
        high: (fire_clock_s.high - call_s.low).max(typical),
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn floors_above_the_second_and_below_grade_take_longer() {
        // Floor 0 is the first floor of the count and 1 the second: 2 is the first above it.
        for (floor, seconds) in [(0, 0.0), (1, 0.0), (2, 60.0), (4, 180.0), (-1, 60.0), (-2, 120.0)] {
            assert_eq!(floor_setup_s(floor), seconds, "floor {floor}");
        }
    }

    #[test]
    fn with_nobody_awake_and_no_detector_detection_is_a_range() {
        let (by, band) = detection(None, None, false, false);

        assert_eq!(by, DetectedBy::SeenOutside);
        assert!(band.low < band.typical && band.typical < band.high);
    }

    #[test]
    fn a_detector_bounds_the_night_where_nobody_is_awake() {
        let acts = Band { low: 40.0, typical: 60.0, high: 90.0 };

        let (by, band) = detection(Some(acts), None, true, false);

        assert_eq!(by, DetectedBy::Detector);
        assert_eq!(band.high, 90.0);
    }

    #[test]
    fn order_of_flashover_and_water_is_told_over_the_corners() {
        let water = Band { low: 500.0, typical: 600.0, high: 900.0 };
        for (low, typical, high, expected) in [
            (100.0, 200.0, 400.0, BeforeWater::InEveryCase),
            (100.0, 300.0, 700.0, BeforeWater::Typically),
            (400.0, 700.0, 1000.0, BeforeWater::InTheWorstCase),
            (950.0, 1000.0, 1100.0, BeforeWater::InNoCase),
        ] {
            assert_eq!(before_water(Band { low, typical, high }, water), expected);
        }
    }
}
