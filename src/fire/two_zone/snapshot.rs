//! What a look shows to the outside: the state of rooms, openings and fires.

use super::building::{CEILING, FLOOR, LOWER_WALL, UPPER_WALL};
use super::controls::Controls;
use super::gas::{SOOT, composition};
use super::outcome::{FireState, Layer, OpeningState, RoomState, Sample};
use super::plume;
use super::rates::{Look, Model, held_kg};
use crate::fire::ceiling_jet::{CeilingPlace, alpert_rise_k};
use crate::fire::radiation::overhead_view_factor;

/// Light that a gram of soot per cubic metre takes, 1/m: 8.7 m²/g for flaming fires.
///
/// Source: [`MULHOLLAND_CROARKIN_2000`](crate::fire::sources::MULHOLLAND_CROARKIN_2000).
const EXTINCTION_M2_KG: f64 = 8700.0;

/// Fills a sample from a look at a state.
pub(super) fn fill(
    model: Model<'_>,
    controls: &Controls,
    look: &Look,
    state: &[f64],
    time_s: f64,
    sample: &mut Sample,
) {
    let network = model.network;
    sample.time_s = time_s;
    sample.rooms.clear();
    sample.openings.clear();
    sample.fires.clear();
    for (index, fire) in network.fires.iter().enumerate() {
        let rates = &look.fires[index];
        let heat_kw = 1e-3 * rates.heat_w;
        sample.fires.push(FireState {
            alight: controls.fires[index].alight,
            heat_release_kw: heat_kw,
            fuel_kg_s: rates.supply_kg_s,
            drawn_oxygen: rates.drawn,
            flame_share: rates.flame,
            flame_height_m: plume::flame_height_m(heat_kw, fire.diameter_m),
        });
    }
    for index in 0..network.rooms.len() {
        sample.rooms.push(room_state(model, look, state, index, &sample.fires));
    }
    for (index, leaf) in controls.leaves.iter().enumerate() {
        let rates = &look.openings[index];
        let between = network.openings[index].between;
        let floor_m = match (between[0], between[1]) {
            (super::network::Side::Room(room), _) | (_, super::network::Side::Room(room)) => {
                network.rooms[room].floor_elevation_m
            }
            _ => 0.0,
        };
        sample.openings.push(OpeningState {
            inflow_kg_s: rates.inflow_kg_s,
            outflow_kg_s: rates.outflow_kg_s,
            neutral_plane_m: rates.neutral_m.map(|height| height - floor_m),
            flame_heat_release_kw: 1e-3 * rates.flame_w,
            pressure_pa: rates.pressure_pa,
            open_fraction: leaf.open_fraction(time_s),
        });
    }
}

fn room_state(model: Model<'_>, look: &Look, state: &[f64], index: usize, fires: &[FireState]) -> RoomState {
    let building = model.building;
    let data = &building.rooms[index];
    let layout = &building.layout;
    let now = &look.now[index];
    let inside = &look.inside[index];
    let zones = &look.zones[index];
    let layer = |layer: usize, temperature_k: f64, mass_kg: f64| {
        let first = layout.species_of(index, layer);
        let held = held_kg(building, state, index, layer);
        Layer { temperature_k, mass_kg, gas: composition(&state[first..first + building.species], held) }
    };
    let upper = layer(0, now.upper_k, inside.upper_kg);
    let lower = layer(1, now.lower_k, inside.lower_kg);
    let soot_kg_m3 = |which: usize, volume_m3: f64| {
        state[layout.species_of(index, which) + SOOT].max(0.0) / volume_m3.max(1e-6 * data.volume_m3)
    };
    let height_m = now.interface_m;
    let sees_plane = if height_m > 0.02 * data.height_m {
        overhead_view_factor(data.length_m, data.width_m, height_m)
    } else {
        1.0
    };
    let released_kw = 1e-3 * inside_released_w(look, index);
    let own_kw: f64 = model
        .network
        .fires
        .iter()
        .zip(fires)
        .filter(|(fire, _)| fire.room == index)
        .map(|(_, state)| state.heat_release_kw)
        .sum();
    let mut flame_w_m2 = 0.0;
    let mut jet_k = now.upper_k;
    let (mut need, mut drawn) = (0.0, 0.0);
    for (place, fire) in model.network.fires.iter().enumerate() {
        if fire.room != index || fires[place].heat_release_kw <= 0.0 {
            continue;
        }
        let kw = fires[place].heat_release_kw;
        need += look.fires[place].need_kg_s;
        drawn += look.fires[place].drawn_kg_s;
        // A point in the middle of the flame, seen from the floor one radius and a half a metre beside it.
        let up_m = fire.base_height_m + 0.5 * fires[place].flame_height_m;
        let aside_m = 0.5 * fire.diameter_m + 0.5 * data.length_m.min(data.width_m) * 0.5;
        let apart_2 = up_m * up_m + aside_m * aside_m;
        let tilt = up_m / apart_2.sqrt();
        flame_w_m2 += 1000.0 * fire.radiative_fraction * kw * tilt / (4.0 * std::f64::consts::PI * apart_2);
        let rise_m = (data.height_m - fire.base_height_m).max(0.1);
        let at = CeilingPlace { height_m: rise_m, radius_m: 0.0 };
        jet_k = jet_k.max(now.lower_k + alpert_rise_k(kw, at).min(1100.0));
    }
    let ambient_w_m2 = super::room::black_w_m2(building.ambient.indoor_temperature_k);
    RoomState {
        upper,
        lower,
        interface_height_m: height_m.min(data.height_m),
        pressure_pa: state[layout.pressure(index)],
        ceiling_k: inside.surfaces_k[CEILING],
        upper_wall_k: inside.surfaces_k[UPPER_WALL],
        lower_wall_k: inside.surfaces_k[LOWER_WALL],
        floor_k: inside.surfaces_k[FLOOR],
        floor_flux_kw_m2: 1e-3 * (zones.floor_receives_w_m2(sees_plane) + flame_w_m2 - ambient_w_m2).max(0.0),
        heat_release_kw: released_kw,
        layer_heat_release_kw: (released_kw - own_kw).max(0.0),
        upper_extinction_1_m: EXTINCTION_M2_KG * soot_kg_m3(0, inside.upper_m3),
        lower_extinction_1_m: EXTINCTION_M2_KG * soot_kg_m3(1, now.lower_m3),
        ceiling_jet_k: jet_k,
        equivalence_ratio: if drawn > 1e-9 { need / drawn } else { 0.0 },
    }
}

fn inside_released_w(look: &Look, index: usize) -> f64 {
    look.inner[index].released_w + look.jet_released_w(index)
}
