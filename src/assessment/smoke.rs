//! Smoke: how fast it fills the room, and the space behind its door with the door open or shut.

use super::findings::{Band, Reason, SmokeFinding, SmokeNextDoor};
use super::inputs::Inputs;
use super::judge::FireClock;
use super::methods::figure;
use super::openings::State;
use crate::fire::DesignFire;
use crate::fire::constants::{
    AIR_DENSITY_TIMES_TEMPERATURE_KG_K_M3, AIR_SPECIFIC_HEAT_KJ_KGK, air_density_kg_m3,
};
use crate::fire::leakage::{LeakyRoom, buoyant_exchange_kg_s};
use crate::fire::smoke_filling::{
    FillingRoom, cube_root_integral_kw13_s, zukoski_limits, zukoski_time_to_height_s,
};

/// Height at which smoke reaches faces of people who stand, m.
const HEAD_M: f64 = 2.0;
/// Height to which people who crawl must duck, m.
const CRAWL_M: f64 = 1.0;

/// Smoke of a fire in this room; `shut` is the room with everything shut.
pub(super) fn finding(inputs: &Inputs<'_>, shut: &State) -> SmokeFinding {
    let room =
        FillingRoom { floor_area_m2: inputs.geometry.floor_area_m2, height_m: inputs.geometry.height_m };
    let time_to_2_m_s = fills(inputs, room, HEAD_M);
    let time_to_1_m_s = fills(inputs, room, CRAWL_M);
    let mut figures = Vec::new();
    for (quantity, band) in [("time_to_2_m_s", time_to_2_m_s), ("time_to_1_m_s", time_to_1_m_s)] {
        if let Some(band) = band {
            let limits = zukoski_limits(room);
            figures.push(figure(
                "zukoski_filling",
                quantity,
                band.typical,
                &limits,
                inputs.contents.recalled,
                None,
            ));
        }
    }
    let reason = (time_to_2_m_s.is_none() || time_to_1_m_s.is_none()).then(|| Reason {
        key: "smoke_not_reached",
        text: "smoke_not_reached: the fire burns out before the layer comes down so far".into(),
    });
    SmokeFinding { time_to_2_m_s, time_to_1_m_s, next_door: next_door(inputs, shut), reason, figures }
}

/// When the layer has come down to a height, over the corners, on the fire clock.
///
/// The fire stands in the middle: there it draws in most air, and the room fills soonest.
fn fills(inputs: &Inputs<'_>, room: FillingRoom, height_m: f64) -> Option<Band> {
    let at = |fire: DesignFire| {
        let at_s = zukoski_time_to_height_s(room, &fire, height_m).ok().flatten()?;
        Some(FireClock::of(&fire).at_s(at_s))
    };
    let contents = &inputs.contents;
    let typical = at(contents.typical_fire())?;
    Some(Band {
        low: at(contents.worst_fire()).map_or(typical, |low| low.min(typical)),
        typical,
        high: at(contents.mildest_fire()).map_or(typical, |high| high.max(typical)),
    })
}

/// Smoke behind each door that leads to another room.
fn next_door(inputs: &Inputs<'_>, shut: &State) -> Vec<SmokeNextDoor> {
    let plan = inputs.plan;
    plan.of_room[inputs.number]
        .iter()
        .filter_map(|&number| {
            let hole = &plan.openings[number];
            let behind = hole.behind(inputs.number).filter(|_| hole.is_door())?;
            let place = plan.rooms[behind].geometry;
            // What lies below head height need not fill; a low room counts as full when a tenth is left.
            let to_fill_m3 = place.floor_area_m2 * (place.height_m - HEAD_M).max(0.1 * place.height_m);
            let leaving = Leaving {
                inputs,
                soffit_m: hole.height_m.min(inputs.geometry.height_m),
                crack_m2: hole.crack_m2,
                share_of_cracks: if shut.leak_m2 > 0.0 {
                    (hole.crack_m2 / shut.leak_m2).min(1.0)
                } else {
                    0.0
                },
                to_fill_m3,
            };
            Some(SmokeNextDoor {
                opening: plan.opening_key(number).clone(),
                room: plan.building.rooms[behind].key.clone(),
                time_open_s: leaving.fills_s(true),
                time_shut_s: leaving.fills_s(false),
            })
        })
        .collect()
}

/// Smoke that leaves through one door.
struct Leaving<'i, 'a> {
    inputs: &'i Inputs<'a>,
    soffit_m: f64,
    crack_m2: f64,
    /// The door's cracks over all cracks of the shut room.
    share_of_cracks: f64,
    to_fill_m3: f64,
}

impl Leaving<'_, '_> {
    /// When the space behind is filled down to head height, on the fire clock; none where the fire burns out first.
    ///
    /// Smoke begins to leave when the layer has come down to the door's soffit. Through the open door goes what the
    /// plume brings to that height; through the shut one its share of what swells, and what warm gas drives through its
    /// cracks. What leaves through the shut door is counted with the open one too, so that shutting it never makes the
    /// space behind fill sooner.
    fn fills_s(&self, open: bool) -> Option<f64> {
        let fire = self.inputs.contents.typical_fire();
        let room = FillingRoom {
            floor_area_m2: self.inputs.geometry.floor_area_m2,
            height_m: self.inputs.geometry.height_m,
        };
        let begins_s = zukoski_time_to_height_s(room, &fire, self.soffit_m).ok().flatten()?;
        let end_s = fire.duration_s();
        let volume_m3 = |until_s: f64| {
            let by_crack = self.through_cracks_m3(&fire, begins_s, until_s);
            if open { by_crack + self.by_plume_m3(&fire, begins_s, until_s) } else { by_crack }
        };
        if begins_s >= end_s || volume_m3(end_s) < self.to_fill_m3 {
            return None;
        }
        let (mut from_s, mut to_s) = (begins_s, end_s);
        for _ in 0..16 {
            let middle_s = 0.5 * (from_s + to_s);
            if volume_m3(middle_s) < self.to_fill_m3 { from_s = middle_s } else { to_s = middle_s }
        }
        Some(FireClock::of(&fire).at_s(to_s))
    }

    /// Air that the plume has brought up to the soffit, as smoke at ambient density.
    fn by_plume_m3(&self, fire: &DesignFire, from_s: f64, to_s: f64) -> f64 {
        // The plume of Zukoski, as in fire::plume, integrated over the fire's course.
        let per_root = crate::fire::plume::zukoski_kg_s(1.0, self.soffit_m);
        per_root / air_density_kg_m3(self.inputs.ambient_k)
            * (cube_root_integral_kw13_s(fire, to_s) - cube_root_integral_kw13_s(fire, from_s))
    }

    /// What swells out through the cracks, and what rises through them from gas at 300 K above ambient.
    fn through_cracks_m3(&self, fire: &DesignFire, from_s: f64, to_s: f64) -> f64 {
        const WARM_RISE_K: f64 = 300.0;

        let heat_kj = fire.energy_released_kj(to_s) - fire.energy_released_kj(from_s);
        let stays = 1.0 - self.inputs.contents.radiative_share;
        let swelling_m3 = self.share_of_cracks * stays * heat_kj
            / (AIR_DENSITY_TIMES_TEMPERATURE_KG_K_M3 * AIR_SPECIFIC_HEAT_KJ_KGK);
        let gas_k = self.inputs.ambient_k + WARM_RISE_K;
        let exchange_kg_s = buoyant_exchange_kg_s(LeakyRoom {
            leakage_area_m2: self.crack_m2,
            height_m: self.soffit_m,
            gas_temperature_k: gas_k,
            ambient_temperature_k: self.inputs.ambient_k,
        });
        swelling_m3 + exchange_kg_s / air_density_kg_m3(gas_k) * (to_s - from_s)
    }
}
