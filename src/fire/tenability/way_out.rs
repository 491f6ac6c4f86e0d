//! When a way out is lost to people: the first of dose, visibility, and a hot layer at the head.

use super::dose::{GasDose, HeatDose, Line};
use super::heat::{Clothing, Heat};
use super::receptor::{Head, LayerAir, Receptor, TwoLayers};
use super::visibility::{Sign, extinction_for_m};
use crate::fire::crossing::{share_above, span_above};

/// Layer that hangs lower than this counts as being among people, m. Common practice.
pub const LAYER_LIMIT_M: f64 = 2.0;

/// Gas at the head hotter than this, under such a layer, is not borne, K: 60 °C. Common practice.
///
/// Source: [`PURSER_SFPE`](crate::fire::sources::PURSER_SFPE).
pub const HEAD_LIMIT_K: f64 = 333.15;

/// How far one must see.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Reach {
    /// On the route: 10 m.
    OnRoute,
    /// Within the room, to its door: 5 m.
    WithinRoom,
}

impl Reach {
    /// Least visibility, m. Source: [`PURSER_SFPE`](crate::fire::sources::PURSER_SFPE).
    #[must_use]
    pub const fn least_visibility_m(self) -> f64 {
        match self {
            Self::OnRoute => 10.0,
            Self::WithinRoom => 5.0,
        }
    }
}

/// Why a way out is lost.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Cause {
    /// Dose of gases that stun.
    Gas,
    /// Dose of heat.
    Heat,
    /// Not far enough to see.
    Visibility,
    /// A low layer, and hot gas at the head.
    Layer,
}

/// When and why a way out is lost.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Lost {
    /// When, s.
    pub at_s: f64,
    /// Why; of several at once the first of [`Cause`].
    pub cause: Cause,
}

/// One place of a way out, as samples of its room come in.
///
/// Lost at the first of: gas or heat, each alone, at the [`Line`] asked for; less than 10 m (5 m within the room)
/// to see a reflecting sign; the layer below 2 m with more than 60 °C at the head. A person is taken to stay in the
/// place from the start. A route over several rooms is lost with the first of them.
///
/// Sources: [`ISO_13571`](crate::fire::sources::ISO_13571), [`PURSER_SFPE`](crate::fire::sources::PURSER_SFPE),
/// [`JIN_1978`](crate::fire::sources::JIN_1978).
///
/// ```
/// use sootline::fire::tenability::{Asphyxiants, Cause, Clothing, LayerAir, Line, Reach, Receptor, TwoLayers, WayOut};
///
/// let air = LayerAir { temperature_k: 293.15, gas: Asphyxiants::FRESH_AIR, extinction_1_m: 0.0, flux_kw_m2: 0.0 };
/// let smoke = LayerAir { temperature_k: 313.15, extinction_1_m: 1.0, ..air };
/// let at = |interface_height_m| TwoLayers { interface_height_m, upper: smoke, lower: air };
/// let mut corridor = WayOut::starting(0.0, Receptor::STANDING, Reach::OnRoute, Clothing::Full, &at(2.5));
/// corridor.add(100.0, &at(0.5));
/// // By hand: the layer passes 1.5 m half way; in it one sees 3/1.0 = 3 m.
/// let lost = corridor.lost(Line::ThreeTenths).unwrap();
/// assert_eq!((lost.at_s, lost.cause), (50.0, Cause::Visibility));
/// ```
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct WayOut {
    receptor: Receptor,
    reach: Reach,
    clothing: Clothing,
    time_s: f64,
    room: TwoLayers,
    gas: GasDose,
    heat: HeatDose,
    blind_s: Option<f64>,
    under_layer_s: Option<f64>,
}

impl WayOut {
    /// No dose yet; the room at this time.
    #[must_use]
    pub fn starting(
        at_s: f64,
        receptor: Receptor,
        reach: Reach,
        clothing: Clothing,
        room: &TwoLayers,
    ) -> Self {
        let air = receptor.head(room).air;
        Self {
            receptor,
            reach,
            clothing,
            time_s: at_s,
            room: *room,
            gas: GasDose::starting(at_s, air.gas),
            heat: HeatDose::starting(at_s, heat_of(&air, clothing)),
            blind_s: None,
            under_layer_s: None,
        }
    }

    /// The room a while later; between, everything runs along straight lines. Time never goes back: what is not
    /// later is left out.
    pub fn add(&mut self, dt_s: f64, room: &TwoLayers) {
        if dt_s > 0.0 && dt_s.is_finite() {
            let (first, second) = self.receptor.stretches(&self.room, room);
            for stretch in [Some(first), second].into_iter().flatten() {
                let starts_s = self.time_s + dt_s * stretch.start;
                self.pass(starts_s, dt_s * (stretch.end - stretch.start), &stretch.from, &stretch.to);
            }
            self.time_s += dt_s;
            self.room = *room;
        }
    }

    /// When and why it is lost; none while it is not.
    #[must_use]
    pub fn lost(&self, line: Line) -> Option<Lost> {
        [
            (self.gas.reached_s(line), Cause::Gas),
            (self.heat.reached_s(line), Cause::Heat),
            (self.blind_s, Cause::Visibility),
            (self.under_layer_s, Cause::Layer),
        ]
        .into_iter()
        .filter_map(|(at_s, cause)| Some(Lost { at_s: at_s?, cause }))
        .min_by(|a, b| a.at_s.total_cmp(&b.at_s))
    }

    /// Dose of gas.
    #[must_use]
    pub const fn gas(&self) -> &GasDose {
        &self.gas
    }

    /// Dose of heat.
    #[must_use]
    pub const fn heat(&self) -> &HeatDose {
        &self.heat
    }

    /// When one no longer sees far enough, s.
    #[must_use]
    pub const fn visibility_lost_s(&self) -> Option<f64> {
        self.blind_s
    }

    /// When a low layer and hot gas at the head came together, s.
    #[must_use]
    pub const fn layer_lost_s(&self) -> Option<f64> {
        self.under_layer_s
    }

    /// A stretch with the head in one layer.
    fn pass(&mut self, starts_s: f64, dt_s: f64, from: &Head, to: &Head) {
        self.gas.change_to(from.air.gas);
        self.gas.add(dt_s, to.air.gas);
        self.heat.change_to(heat_of(&from.air, self.clothing));
        self.heat.add(dt_s, heat_of(&to.air, self.clothing));

        let limit_1_m = extinction_for_m(self.reach.least_visibility_m(), Sign::Reflecting);
        let blind = share_above(from.air.extinction_1_m, to.air.extinction_1_m, limit_1_m);
        self.blind_s = self.blind_s.or(blind.map(|share| starts_s + dt_s * share));
        self.under_layer_s =
            self.under_layer_s.or(under_layer(from, to).map(|share| starts_s + dt_s * share));
    }
}

fn heat_of(air: &LayerAir, clothing: Clothing) -> Heat {
    Heat { gas_temperature_k: air.temperature_k, flux_kw_m2: air.flux_kw_m2, clothing }
}

/// Share of the way after which the layer hangs low and the head is hot, both.
fn under_layer(from: &Head, to: &Head) -> Option<f64> {
    let hangs = |head: &Head| -head.interface_height_m;
    let low = span_above(hangs(from), hangs(to), -LAYER_LIMIT_M)?;
    let hot = span_above(from.air.temperature_k, to.air.temperature_k, HEAD_LIMIT_K)?;
    // One may have ended before the other began.
    let (start, end) = (low.0.max(hot.0), low.1.min(hot.1));
    (start < end).then_some(start)
}

#[cfg(test)]
mod tests {
    use super::super::asphyxiants::Asphyxiants;
    use super::super::receptor::testing::{air, room};
    use super::*;

    fn smoky(celsius: f64, extinction_1_m: f64) -> LayerAir {
        LayerAir { extinction_1_m, ..air(celsius) }
    }

    fn starting(receptor: Receptor, reach: Reach, first: &TwoLayers) -> WayOut {
        WayOut::starting(0.0, receptor, reach, Clothing::Light, first)
    }

    #[test]
    fn nothing_that_happens_over_the_head_is_a_loss() {
        let over = room(1.6, smoky(400.0, 5.0));
        let mut way = starting(Receptor::STANDING, Reach::OnRoute, &over);

        way.add(3600.0, &over);

        assert_eq!(way.lost(Line::OneTenth), None);
        assert_eq!((way.gas().total(), way.heat().total()), (0.0, 0.0));
    }

    #[test]
    fn who_crawls_loses_the_way_later() {
        let lost_s = |receptor| {
            let mut way = starting(receptor, Reach::WithinRoom, &room(2.4, smoky(150.0, 3.0)));
            for step in 1..=12 {
                way.add(10.0, &room(2.4 - 0.15 * f64::from(step), smoky(150.0, 3.0)));
            }
            way.lost(Line::ThreeTenths).unwrap().at_s
        };

        // By hand: 0.015 m/s from 2.4 m: 1.5 m after 60 s, 0.9 m after 100 s; 3/3.0 = 1 m to see.
        assert!((lost_s(Receptor::STANDING) - 60.0).abs() < 1e-6);
        assert!((lost_s(Receptor::CRAWLING) - 100.0).abs() < 1e-6);
    }

    #[test]
    fn visibility_is_lost_at_ten_metres_on_the_route_and_at_five_within_the_room() {
        // By hand: reflecting signs: 3/10 = 0.3 1/m, 3/5 = 0.6 1/m; from 0 to 1 1/m in 100 s.
        for (reach, at_s) in [(Reach::OnRoute, 30.0), (Reach::WithinRoom, 60.0)] {
            let mut way = starting(Receptor::STANDING, reach, &room(0.0, smoky(30.0, 0.0)));
            way.add(100.0, &room(0.0, smoky(30.0, 1.0)));

            let lost = way.lost(Line::ThreeTenths).unwrap();
            assert!((lost.at_s - at_s).abs() < 1e-9 && lost.cause == Cause::Visibility);
            assert_eq!(way.visibility_lost_s(), Some(lost.at_s));
        }
    }

    #[test]
    fn a_low_layer_counts_only_with_a_hot_head_and_a_hot_head_only_under_a_low_layer() {
        let lower_hot = |interface_height_m, celsius| TwoLayers {
            lower: air(celsius),
            ..room(interface_height_m, air(200.0))
        };
        let layer_s = |first: TwoLayers, last: TwoLayers| {
            let mut way = starting(Receptor::STANDING, Reach::OnRoute, &first);
            way.add(100.0, &last);
            way.layer_lost_s()
        };

        assert_eq!(layer_s(lower_hot(1.9, 59.0), lower_hot(1.9, 60.0)), None);
        assert_eq!(layer_s(lower_hot(2.1, 70.0), lower_hot(2.0, 70.0)), None);
        // By hand: 60 °C after half the way; 2.0 m after a quarter: both after the later.
        let both_s = layer_s(lower_hot(2.1, 50.0), lower_hot(1.7, 70.0)).unwrap();
        assert!((both_s - 50.0).abs() < 1e-9);
        // Cool again by the time the layer is low.
        assert_eq!(layer_s(lower_hot(2.5, 70.0), lower_hot(1.9, 50.0)), None);
    }

    #[test]
    fn a_layer_that_passes_the_head_counts_from_that_moment() {
        // By hand: 2.5 to 0.5 m in 100 s: the head is in at 50 s. 35 000 ppm is 1 per minute: 0.3 18 s later, 0.1
        // 6 s later. 100 °C, lightly dressed: 100^3.4/5e7 = 0.12619 per minute: 0.1 after 47.5 s.
        let toxic = LayerAir {
            gas: Asphyxiants { carbon_monoxide_ppm: 35_000.0, ..Asphyxiants::FRESH_AIR },
            ..air(50.0)
        };
        let mut way = starting(Receptor::STANDING, Reach::OnRoute, &room(2.5, toxic));
        way.add(100.0, &room(0.5, toxic));

        let lost = |line| way.lost(line).unwrap();
        assert_eq!((lost(Line::ThreeTenths).cause, lost(Line::OneTenth).cause), (Cause::Gas, Cause::Gas));
        assert!((lost(Line::ThreeTenths).at_s - 68.0).abs() < 0.02);
        assert!((lost(Line::OneTenth).at_s - 56.0).abs() < 0.02);
        assert!((way.gas().total() - 50.0 / 60.0).abs() < 1e-12);
    }

    #[test]
    fn heat_alone_loses_it_and_each_dose_stands_alone() {
        // By hand: 60 °C and no more: 60^3.4/5e7 = 0.0222200 per minute: 0.1 after 270.03 s, 0.3 after 810.08 s.
        // CO at 0.0222 per minute beside it moves neither.
        let warm = LayerAir {
            gas: Asphyxiants { carbon_monoxide_ppm: 777.0, ..Asphyxiants::FRESH_AIR },
            ..air(60.0)
        };
        let mut way = starting(Receptor::STANDING, Reach::OnRoute, &room(0.0, warm));
        way.add(1000.0, &room(0.0, warm));

        let lost = way.lost(Line::ThreeTenths).unwrap();
        assert!((lost.at_s - 810.08).abs() < 0.05 && lost.cause == Cause::Heat);
        assert!((way.heat().reached_s(Line::OneTenth).unwrap() - 270.03).abs() < 0.05);
        assert!((way.gas().reached_s(Line::ThreeTenths).unwrap() - 810.81).abs() < 0.05);
    }

    #[test]
    fn the_second_line_never_comes_after_the_first_and_time_never_goes_back() {
        let mut way = starting(Receptor::STANDING, Reach::OnRoute, &room(0.0, air(20.0)));
        for step in 0..60 {
            way.add(10.0, &room(0.0, air(20.0 + 3.0 * f64::from(step))));
            way.add(-5.0, &room(0.0, air(900.0)));
            way.add(f64::NAN, &room(0.0, air(900.0)));
        }

        let at_s = |line| way.lost(line).unwrap().at_s;
        assert!(at_s(Line::OneTenth) <= at_s(Line::ThreeTenths));
        // By hand: 60 °C is passed on the way from the 14th (59 °C, 140 s) to the 15th step (62 °C, 150 s).
        assert!((way.layer_lost_s().unwrap() - (140.0 + 10.0 / 3.0)).abs() < 1e-6);
    }
}
