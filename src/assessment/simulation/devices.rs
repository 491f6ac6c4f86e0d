//! What moves, detects and sprinkles in a run, as the engine takes it.

use super::Note;
use super::network::{Making, kelvin};
use crate::domain::Pointer;
use crate::domain::properties::{DetectorProperties, SprinklerProperties};
use crate::domain::simulation as asked;
use crate::fire::two_zone as engine;

/// Later than any run, for a fan that never stops, s.
const NEVER_S: f64 = 1e6;
/// More than any fan meets, for one that never stalls, Pa.
const NEVER_PA: f64 = 1e6;

/// Least rise at which a detector answers, K: one set below the air of its room answers at the first
/// warmth.
const LEAST_RISE_K: f64 = 0.1;

impl Making<'_> {
    pub(super) fn moved(&mut self, given: &asked::Move, at: &Pointer) -> Option<engine::Move> {
        let opening = self.run.openings.iter().position(|opening| opening.key == given.opening);
        if opening.is_none() {
            let detail = format!("`{}` is no opening of this run", given.opening);
            self.fault(at.member("opening"), "unknown_opening", detail);
        }
        Some(engine::Move {
            at_s: given.at_s.get(),
            opening: opening?,
            open_fraction: given.open_fraction.get(),
        })
    }

    pub(super) fn fan(&mut self, fan: &asked::Fan, at: &Pointer) -> Option<engine::Fan> {
        let (from, to) = (self.side(&fan.from, at.member("from")), self.side(&fan.to, at.member("to")));
        let (from, to) = (from?, to?);
        let half_height_m = |side| match side {
            engine::Side::Room(room) => {
                self.run.rooms.get(room).map_or(0.0, |room| room.height_m.get() / 2.0)
            }
            engine::Side::Outside => 0.0,
        };
        Some(engine::Fan {
            from,
            to,
            volume_flow_m3_s: fan.volume_flow_m3_s.get(),
            inlet_height_m: fan.inlet_height_m.map_or_else(|| half_height_m(from), |height| height.get()),
            outlet_height_m: fan.outlet_height_m.map_or_else(|| half_height_m(to), |height| height.get()),
            stall_pa: fan.stall_pa.map_or(NEVER_PA, |pressure| pressure.get()),
            starts_s: fan.starts_s.get(),
            stops_s: fan.stops_s.map_or(NEVER_S, |span| span.get()),
        })
    }

    /// Half the diagonal of a room: the middle of its ceiling to a corner.
    fn half_diagonal_m(&self, room: usize) -> f64 {
        let room = self.run.rooms.get(room);
        room.map_or(0.0, |room| room.length_m.get().hypot(room.width_m.get()) / 2.0)
    }

    pub(super) fn detector(&mut self, detector: &asked::Detector, at: &Pointer) -> Option<engine::Detector> {
        let room = self.room_index(&detector.room, at.member("room"));
        let class = at.member("class");
        let properties: &DetectorProperties = self.named(&detector.class, &class, |catalogue, key| {
            catalogue.detector(key).map(|row| &row.properties)
        })?;
        let Some(element) = self.element(properties) else {
            let detail = "a run follows detectors by their temperature or its rise, and this one has neither";
            self.fault(class, "not_computed", detail);
            return None;
        };
        if properties.activation_rate_k_min.is_some() {
            let text =
                "The rate of rise is not followed: the detector answers at its fixed temperature, later.";
            self.notes.push(Note { key: "rate_of_rise_not_followed", pointer: class, text: text.to_owned() });
        }
        let room = room?;
        let from_fire_m = detector.from_fire_m.map_or_else(|| self.half_diagonal_m(room), |m| m.get());
        Some(engine::Detector { room, from_fire_m, element })
    }

    /// What makes a detector answer: the first of its temperature and its rise, which without a
    /// response time index follow the gas.
    fn element(&self, detector: &DetectorProperties) -> Option<engine::Element> {
        let air = &self.run.ambient;
        let indoor_c = air.indoor_temperature_c.unwrap_or(air.temperature_c).get();
        let of_fixed_k = detector.activation_c.map(|fixed_c| fixed_c - indoor_c);
        let rises = [of_fixed_k, detector.activation_rise_k];
        let rise_k = rises.into_iter().flatten().reduce(f64::min)?.max(LEAST_RISE_K);
        Some(match detector.response_time_index_sqrt_ms {
            None => engine::Element::Rise(rise_k),
            Some(rti_m05s05) => engine::Element::Heat { rti_m05s05, answers_k: kelvin(indoor_c + rise_k) },
        })
    }

    pub(super) fn sprinkler(&mut self, head: &asked::Sprinkler, at: &Pointer) -> Option<engine::Sprinkler> {
        let room = self.room_index(&head.room, at.member("room"));
        let properties: &SprinklerProperties =
            self.named(&head.class, &at.member("class"), |catalogue, key| {
                catalogue.sprinkler(key).map(|row| &row.properties)
            })?;
        let room = room?;
        let element = engine::Element::Heat {
            rti_m05s05: properties.response_time_index_sqrt_ms,
            answers_k: kelvin(properties.activation_c),
        };
        let from_fire_m = head.from_fire_m.map_or_else(|| self.half_diagonal_m(room), |m| m.get());
        Some(engine::Sprinkler {
            head: engine::Detector { room, from_fire_m, element },
            density_mm_s: head
                .spray_density_mm_s
                .map_or(properties.spray_density_mm_s, |density| density.get()),
        })
    }
}
