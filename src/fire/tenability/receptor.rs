//! What a person at a height stands in, in a room of two layers.

use super::asphyxiants::Asphyxiants;
use super::dose::Exposure;

/// The gas of one layer, and the radiation that a person in it receives.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct LayerAir {
    /// Temperature, K.
    pub temperature_k: f64,
    /// What is breathed.
    pub gas: Asphyxiants,
    /// Extinction of light, 1/m.
    pub extinction_1_m: f64,
    /// Radiation on a person whose head is in this layer, kW/m².
    pub flux_kw_m2: f64,
}

impl LayerAir {
    /// What stands there a share of the way to another.
    #[must_use]
    pub fn towards(&self, other: &Self, share: f64) -> Self {
        let line = |from: f64, to: f64| from + (to - from) * share;
        Self {
            temperature_k: line(self.temperature_k, other.temperature_k),
            gas: self.gas.towards(&other.gas, share),
            extinction_1_m: line(self.extinction_1_m, other.extinction_1_m),
            flux_kw_m2: line(self.flux_kw_m2, other.flux_kw_m2),
        }
    }
}

/// A room of two layers at one moment.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct TwoLayers {
    /// Height of the interface above the floor, m.
    pub interface_height_m: f64,
    /// Hot layer.
    pub upper: LayerAir,
    /// Cool layer.
    pub lower: LayerAir,
}

/// The head of a person.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Receptor {
    /// Above the floor, m.
    pub height_m: f64,
}

/// What is round the head, and how low the layer hangs.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Head {
    /// Gas of the layer that the head is in.
    pub air: LayerAir,
    /// Height of the interface above the floor, m.
    pub interface_height_m: f64,
}

/// A piece of the way between two samples on which the head stays in one layer.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Stretch {
    /// Share of the way at which it starts.
    pub start: f64,
    /// Share of the way at which it ends.
    pub end: f64,
    /// At its start.
    pub from: Head,
    /// At its end.
    pub to: Head,
}

impl Receptor {
    /// Standing: 1.5 m.
    pub const STANDING: Self = Self { height_m: 1.5 };
    /// Crawling: 0.9 m.
    pub const CRAWLING: Self = Self { height_m: 0.9 };

    /// What is round the head. At the interface itself it is still in the cool layer.
    ///
    /// ```
    /// use sootline::fire::tenability::{Asphyxiants, LayerAir, Receptor, TwoLayers};
    ///
    /// let air = |temperature_k| LayerAir {
    ///     temperature_k, gas: Asphyxiants::FRESH_AIR, extinction_1_m: 0.0, flux_kw_m2: 0.0,
    /// };
    /// let room = TwoLayers { interface_height_m: 1.2, upper: air(500.0), lower: air(300.0) };
    /// assert_eq!(Receptor::STANDING.head(&room).air.temperature_k, 500.0);
    /// assert_eq!(Receptor::CRAWLING.head(&room).air.temperature_k, 300.0);
    /// ```
    #[must_use]
    pub fn head(self, room: &TwoLayers) -> Head {
        self.head_in(room, self.is_in_upper(room))
    }

    /// The way between two samples along straight lines, cut where the interface passes the head: one
    /// stretch, or two with a change at once between them.
    #[must_use]
    pub fn stretches(self, from: &TwoLayers, to: &TwoLayers) -> (Stretch, Option<Stretch>) {
        let (starts_upper, ends_upper) = (self.is_in_upper(from), self.is_in_upper(to));
        if starts_upper == ends_upper {
            let (from, to) = (self.head_in(from, starts_upper), self.head_in(to, starts_upper));
            return (Stretch { start: 0.0, end: 1.0, from, to }, None);
        }
        // The two heights differ, or the head would be in the same layer at both ends.
        let cut =
            (self.height_m - from.interface_height_m) / (to.interface_height_m - from.interface_height_m);
        let line = |a: f64, b: f64| a + (b - a) * cut;
        let there = TwoLayers {
            interface_height_m: line(from.interface_height_m, to.interface_height_m),
            upper: from.upper.towards(&to.upper, cut),
            lower: from.lower.towards(&to.lower, cut),
        };
        (
            Stretch {
                start: 0.0,
                end: cut,
                from: self.head_in(from, starts_upper),
                to: self.head_in(&there, starts_upper),
            },
            Some(Stretch {
                start: cut,
                end: 1.0,
                from: self.head_in(&there, ends_upper),
                to: self.head_in(to, ends_upper),
            }),
        )
    }

    fn is_in_upper(self, room: &TwoLayers) -> bool {
        self.height_m > room.interface_height_m
    }

    fn head_in(self, room: &TwoLayers, upper: bool) -> Head {
        Head { air: if upper { room.upper } else { room.lower }, interface_height_m: room.interface_height_m }
    }
}

#[cfg(test)]
pub(super) mod testing {
    use super::*;

    /// Fresh air of a temperature.
    pub(in super::super) fn air(celsius: f64) -> LayerAir {
        LayerAir {
            temperature_k: celsius + 273.15,
            gas: Asphyxiants::FRESH_AIR,
            extinction_1_m: 0.0,
            flux_kw_m2: 0.0,
        }
    }

    /// A hot layer over air of 20 °C.
    pub(in super::super) fn room(interface_height_m: f64, upper: LayerAir) -> TwoLayers {
        TwoLayers { interface_height_m, upper, lower: air(20.0) }
    }
}

#[cfg(test)]
mod tests {
    use super::testing::{air, room};
    use super::*;
    use approx::assert_relative_eq;

    #[test]
    fn a_layer_that_comes_down_past_the_head_cuts_the_way_where_it_does() {
        // By hand: from 2.4 to 0.9 m it passes 1.5 m after 0.9/1.5 = 0.6 of the way, when the layer has
        // warmed from 100 to 160 °C.
        let (before, after) = Receptor::STANDING.stretches(&room(2.4, air(100.0)), &room(0.9, air(200.0)));
        let after = after.unwrap();

        assert_relative_eq!(before.end, 0.6, max_relative = 1e-12);
        assert_eq!(before.end, after.start);
        assert_relative_eq!(before.to.air.temperature_k, 293.15, max_relative = 1e-12);
        assert_relative_eq!(after.from.air.temperature_k, 433.15, max_relative = 1e-12);
        assert_relative_eq!(after.from.interface_height_m, 1.5, max_relative = 1e-12);
        assert_eq!((before.start, after.end), (0.0, 1.0));
    }

    #[test]
    fn a_layer_that_lifts_again_cuts_it_too() {
        let (before, after) = Receptor::STANDING.stretches(&room(1.0, air(200.0)), &room(2.0, air(200.0)));

        assert_eq!(before.from.air.temperature_k, 473.15);
        assert_eq!(after.unwrap().to.air.temperature_k, 293.15);
    }

    #[test]
    fn a_layer_that_stays_on_one_side_does_not() {
        for (from_m, to_m) in [(2.4, 1.6), (2.4, 1.5), (1.4, 0.2), (1.4, 1.4)] {
            let (whole, none) =
                Receptor::STANDING.stretches(&room(from_m, air(100.0)), &room(to_m, air(200.0)));
            assert!(none.is_none() && whole.start == 0.0 && whole.end == 1.0);
            assert_eq!(whole.to, Receptor::STANDING.head(&room(to_m, air(200.0))));
        }
    }

    #[test]
    fn an_interface_exactly_at_the_head_at_an_end_gives_a_stretch_of_no_length() {
        let (before, after) = Receptor::STANDING.stretches(&room(1.5, air(100.0)), &room(0.5, air(100.0)));

        assert_eq!(before.end, 0.0);
        assert_eq!(after.unwrap().from.air.temperature_k, 373.15);

        let (before, after) = Receptor::STANDING.stretches(&room(0.5, air(100.0)), &room(1.5, air(100.0)));

        assert_eq!((before.end, before.to.air.temperature_k), (1.0, 373.15));
        assert_eq!(after.unwrap().to.air.temperature_k, 293.15);
    }
}
