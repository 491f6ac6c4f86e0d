//! Every scenario of a room of origin, screened.

use super::findings::{Band, FlashoverRating, Reason};
use super::inputs::Inputs;
use super::judge::{CORNER, Judged, Moments, judge, moments, reached_by};
use super::openings::{Stand, State, fallout, way_out};
use super::rules;
use crate::domain::assumptions::Scenario;
use crate::fire::DesignFire;
use crate::fire::hot_layer::{Vented, mccaffrey_rise_k};
use crate::fire::linings::{Surface, total_conductance_kw_k};

const AT_ONCE: Band = Band { low: 0.0, typical: 0.0, high: 0.0 };

/// One scenario, screened.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Screened {
    pub scenario: Scenario,
    pub stand: Stand,
    pub state: State,
    pub rating: FlashoverRating,
    pub reason: Option<Reason>,
    /// With typical inputs.
    pub typical: Judged,
    /// With the fire load at its 95 % fractile.
    pub p95: Judged,
    /// Earliest corner, typical, latest corner.
    pub moments: [Moments; 3],
    /// Before this no air came in: glass had to fall first. Zero where it had not. Fire clock.
    pub not_before_s: Band,
}

impl Screened {
    /// Flashover over the corners; none where it does not come with typical inputs.
    pub fn time_s(&self) -> Option<Band> {
        self.band(Moments::earliest_s)
    }

    /// A moment over the corners.
    pub fn band(&self, of: impl Fn(&Moments) -> Option<f64>) -> Option<Band> {
        if self.rating == FlashoverRating::NotIndicated {
            return None;
        }
        let Band { low: early_s, typical: usual_s, high: late_s } = self.not_before_s;
        let at = |place: usize, least_s: f64| of(&self.moments[place]).map(|time_s| time_s.max(least_s));
        let typical = at(1, usual_s)?;
        Some(Band {
            low: at(0, early_s).map_or(typical, |low| low.min(typical)),
            typical,
            high: at(2, late_s).map_or(typical, |high| high.max(typical)),
        })
    }

    /// Flashover does not come at the mildest corner.
    pub fn not_at_every_corner(&self) -> bool {
        self.moments[1].earliest_s().is_some() && self.moments[2].earliest_s().is_none()
    }
}

/// A cap on the fire, where a sprinkler that may be relied upon holds it down.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Cap {
    /// Heat release when the head opens: the fire grows no further.
    pub heat_release_kw: f64,
    /// In which the fire then falls by e, by the correlation of Evans, s.
    pub fades_in_s: f64,
}

impl Cap {
    pub const NONE: Self = Self { heat_release_kw: f64::INFINITY, fades_in_s: f64::INFINITY };

    /// The fire under water: it grows to the cap and then releases as much heat as the exponential of Evans does,
    /// in a straight line.
    pub fn on(self, fire: DesignFire) -> DesignFire {
        let kw = self.heat_release_kw;
        if !kw.is_finite() || kw >= fire.reached_kw() {
            return fire;
        }
        let grown_kj = kw * (kw / fire.growth_kw_s2.max(f64::MIN_POSITIVE)).sqrt() / 3.0;
        let energy_kj = (grown_kj + kw * self.fades_in_s).min(fire.energy_kj);
        DesignFire { peak_kw: kw, energy_kj, decay_from_share: (grown_kj / energy_kj).min(1.0), ..fire }
    }
}

/// Screens the scenarios asked for, in the order of [`Scenario::ALL`]; `entry` is left to its own finding.
pub(super) fn screen_all(inputs: &Inputs<'_>, asked: Option<&[Scenario]>, cap: Cap) -> Vec<Screened> {
    let wanted = |scenario: Scenario| asked.is_none_or(|asked| asked.contains(&scenario));
    let mut screened: Vec<Screened> = Vec::with_capacity(5);
    let door = way_out(inputs.plan, inputs.number);
    // As found comes first whether asked for or not: it says whether glass falls.
    let as_found = screen_stand(inputs, Stand::as_recorded(Scenario::AsFound), cap, &screened);
    let glass = wanted(Scenario::WindowFails).then(|| window_fails(inputs, &as_found, cap));
    if wanted(Scenario::AsFound) {
        screened.push(as_found.clone());
    }

    let open_door = Stand { opened: door, ..Stand::as_recorded(Scenario::DoorOpen) };
    if wanted(Scenario::DoorOpen) {
        let mut open = screen_stand(inputs, open_door, cap, &screened);
        if door.is_none() {
            open.reason = Some(reason("no_door", "no door is recorded: as found"));
        }
        screened.push(open);
    }
    if wanted(Scenario::Shut) {
        screened.push(screen_stand(inputs, Stand::as_recorded(Scenario::Shut), cap, &screened));
    }
    if wanted(Scenario::ShutLate) {
        let stand = Stand { scenario: Scenario::ShutLate, ..open_door };
        let mut late = screen_stand(inputs, stand, cap, &screened);
        late.reason = Some(if late.state.is_open() {
            reason("until_shut", "open until the door is shut at 400 °C or 60 s after flashover")
        } else {
            reason("never_open", "nothing stands open that could be shut late: as shut")
        });
        screened.push(late);
    }
    screened.extend(glass);
    screened
}

/// Screens one way in which the room may stand; takes the findings of an earlier scenario with the same state.
pub(super) fn screen_stand(inputs: &Inputs<'_>, stand: Stand, cap: Cap, earlier: &[Screened]) -> Screened {
    let state = stand.state(inputs.plan, inputs.number, inputs.envelope_leak_m2, inputs.ambient_k);
    if let Some(same) = earlier.iter().find(|other| other.state == state) {
        return Screened { scenario: stand.scenario, stand, reason: None, ..same.clone() };
    }
    screen_state(inputs, stand, state, cap)
}

fn screen_state(inputs: &Inputs<'_>, stand: Stand, state: State, cap: Cap) -> Screened {
    let contents = &inputs.contents;
    let surfaces = inputs.lined.around(state.wall.area_m2);
    let typical_fire = cap.on(contents.typical_fire());
    let p95_fire = cap.on(contents.fire(contents.load.p95_mj_m2, contents.growth.typical_kw_s2));
    let typical = judge(inputs, &state, typical_fire, &surfaces);
    // A flame that died of lack of oxygen while the fire still grew would have died so with more fuel too.
    let growing_when_out =
        typical.burn().is_some_and(|b| b.starved && b.state.time_s <= typical_fire.phases().growth_end_s);
    let p95 = if growing_when_out { typical } else { judge(inputs, &state, p95_fire, &surfaces) };
    let only_above = !state.is_open() && state.horizontal_m2 > 0.001 * inputs.geometry.volume_m3;
    let (rating, reason) = if only_above {
        let words = "horizontal_openings_only: the correlations know wall openings, and the room is not shut";
        (FlashoverRating::NotAssessed, Some(Reason { key: "horizontal_openings_only", text: words.into() }))
    } else {
        (rules::flashover(typical.to_highest, p95.to_lowest), None)
    };
    let share = spread_of_linings(inputs);
    // A shut room that stays far from 600 °C stays below it at the corners too, and is spared the work.
    let moments = if state.is_open() || typical.to_highest >= rules::NOT_INDICATED_RATIO {
        let worst = (cap.on(contents.worst_fire()), surfaces.taking_heat(share.low));
        let mildest = (cap.on(contents.mildest_fire()), surfaces.taking_heat(share.high));
        [
            moments(inputs, &state, worst.0, &worst.1, CORNER.high),
            moments(inputs, &state, typical_fire, &surfaces, CORNER.typical),
            moments(inputs, &state, mildest.0, &mildest.1, CORNER.low),
        ]
    } else {
        [Moments::default(); 3]
    };
    Screened {
        scenario: stand.scenario,
        stand,
        state,
        rating,
        reason,
        typical,
        p95,
        moments,
        not_before_s: AT_ONCE,
    }
}

/// Shares of the conductance at the corners: wider where a lining of walls or ceiling is not recorded. Ours.
pub(super) fn spread_of_linings(inputs: &Inputs<'_>) -> Band {
    if inputs.lined.unrecorded[0] || inputs.lined.unrecorded[1] {
        Band { low: 0.6, typical: 1.0, high: 1.6 }
    } else {
        Band { low: 0.8, typical: 1.0, high: 1.25 }
    }
}

/// Shares of the leakage at the corners. Ours.
pub(super) fn spread_of_leaks(inputs: &Inputs<'_>) -> Band {
    if inputs.leak_assumed {
        Band { low: 0.5, typical: 1.0, high: 2.0 }
    } else {
        Band { low: 0.8, typical: 1.0, high: 1.25 }
    }
}

/// Gas temperature that a scenario reaches with typical inputs, K.
pub(super) fn hottest_k(inputs: &Inputs<'_>, screened: &Screened, surfaces: &[Surface], cap: Cap) -> f64 {
    if let Some(burn) = screened.typical.burn() {
        return burn.state.peak_temperature_k;
    }
    let fire = cap.on(inputs.contents.typical_fire());
    let (heat_release_kw, hottest_s) = reached_by(&screened.state.admits(fire), inputs.horizon.open_s);
    let rise_k = mccaffrey_rise_k(Vented {
        heat_release_kw,
        opening: screened.state.wall,
        conductance_kw_k: total_conductance_kw_k(surfaces, hottest_s),
    });
    inputs.ambient_k + CORNER.typical * rise_k
}

/// The room once its glass has fallen, where the fire found gets hot enough for that.
pub(super) fn window_fails(inputs: &Inputs<'_>, as_found: &Screened, cap: Cap) -> Screened {
    let surfaces = inputs.lined.around(as_found.state.wall.area_m2);
    let gas_k = hottest_k(inputs, as_found, &surfaces, cap);
    let falling = inputs.plan.of_room[inputs.number]
        .iter()
        .filter_map(|&number| fallout(inputs.plan, number))
        .filter(|fallout| fallout.low_k <= gas_k)
        .min_by(|a, b| a.typical_k.total_cmp(&b.typical_k));
    let stand = Stand {
        scenario: Scenario::WindowFails,
        glass_fallen_at_k: falling.map(|_| gas_k),
        ..as_found.stand
    };
    let mut failed = screen_stand(inputs, stand, cap, std::slice::from_ref(as_found));
    match falling {
        None => failed.reason = Some(reason("glass_holds", "no glass falls by its criterion: as found")),
        Some(fallout) => {
            let falls_s = glass_falls_s(inputs, as_found, &surfaces, fallout.typical_k.min(gas_k), cap);
            if as_found.moments[1].earliest_s().is_some_and(|flashover_s| flashover_s <= falls_s) {
                failed.moments = as_found.moments;
            } else {
                // A fire that grows faster or slower has given off the same heat sooner or later by the cube root: E = α t³/3.
                let growth = inputs.contents.growth;
                let by = |kw_s2: f64| (growth.typical_kw_s2 / kw_s2).cbrt();
                failed.not_before_s = Band {
                    low: falls_s * by(growth.fast_kw_s2),
                    typical: falls_s,
                    high: falls_s * by(growth.slow_kw_s2),
                };
            }
        }
    }
    failed
}

/// When the gas of the room as found has reached a temperature, on the fire clock.
fn glass_falls_s(
    inputs: &Inputs<'_>,
    as_found: &Screened,
    surfaces: &[Surface],
    gas_k: f64,
    cap: Cap,
) -> f64 {
    use crate::fire::hot_layer::{GrowingVented, mccaffrey_time_to_rise_s};

    let fire = cap.on(inputs.contents.typical_fire());
    let clock = super::judge::FireClock::of(&fire);
    // In a shut room the gas is hottest about when the flame dies.
    if let Some(burn) = as_found.typical.burn() {
        return clock.at_s(burn.state.time_s);
    }
    let growing = GrowingVented {
        fire: as_found.state.admits(fire),
        opening: as_found.state.wall,
        surfaces,
        position_factor: CORNER.typical,
    };
    let reached = mccaffrey_time_to_rise_s(&growing, gas_k - inputs.ambient_k).ok().flatten();
    reached.map_or(0.0, |at_s| clock.at_s(at_s))
}

/// The scenario that governs: clause 2.5; of equals the one with more heat over what is required, then the first.
pub(super) fn governing(screened: &[Screened]) -> Option<usize> {
    let rank = |s: &Screened| rules::flashover_severity(s.rating);
    let time = |s: &Screened| s.time_s().map_or(f64::INFINITY, |band| band.typical);
    (0..screened.len()).min_by(|&a, &b| {
        let (x, y) = (&screened[a], &screened[b]);
        rank(y)
            .cmp(&rank(x))
            .then(time(x).total_cmp(&time(y)))
            .then(y.typical.to_highest.total_cmp(&x.typical.to_highest))
            .then(a.cmp(&b))
    })
}

pub(super) fn reason(key: &'static str, words: &'static str) -> Reason {
    Reason { key, text: words.into() }
}
