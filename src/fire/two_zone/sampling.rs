//! What is read between two steps: straight lines.
//!
//! A step is never longer than the engine's longest; over it a cubic through the rates at both ends
//! would swing with what settles faster than the step (pressure, faces, a thin layer).

use super::outcome::Sample;

/// Reads between two looks.
#[derive(Debug, Default)]
pub(super) struct Between {
    sample: Sample,
}

impl Between {
    /// The building at a time between.
    pub(super) fn at(&mut self, time_s: f64, before: &Sample, after: &Sample) -> &Sample {
        let step_s = after.time_s - before.time_s;
        let share = if step_s > 0.0 { ((time_s - before.time_s) / step_s).clamp(0.0, 1.0) } else { 1.0 };
        let line = |from: f64, to: f64| from + (to - from) * share;
        let mut sample = std::mem::take(&mut self.sample);
        sample.clone_from(if share < 0.5 { before } else { after });
        sample.time_s = time_s;
        for (index, room) in sample.rooms.iter_mut().enumerate() {
            let (from, to) = (&before.rooms[index], &after.rooms[index]);
            room.pressure_pa = line(from.pressure_pa, to.pressure_pa);
            room.interface_height_m = line(from.interface_height_m, to.interface_height_m);
            for (mine, (a, b)) in
                [(&mut room.upper, (&from.upper, &to.upper)), (&mut room.lower, (&from.lower, &to.lower))]
            {
                mine.temperature_k = line(a.temperature_k, b.temperature_k);
                mine.mass_kg = line(a.mass_kg, b.mass_kg);
            }
            for (mine, (a, b)) in [
                (&mut room.upper.gas, (from.upper.gas, to.upper.gas)),
                (&mut room.lower.gas, (from.lower.gas, to.lower.gas)),
            ] {
                mine.oxygen = line(a.oxygen, b.oxygen);
                mine.carbon_dioxide = line(a.carbon_dioxide, b.carbon_dioxide);
                mine.water = line(a.water, b.water);
                mine.carbon_monoxide = line(a.carbon_monoxide, b.carbon_monoxide);
                mine.hydrogen_cyanide = line(a.hydrogen_cyanide, b.hydrogen_cyanide);
                mine.soot = line(a.soot, b.soot);
                mine.unburned_fuel = line(a.unburned_fuel, b.unburned_fuel);
            }
            room.ceiling_k = line(from.ceiling_k, to.ceiling_k);
            room.upper_wall_k = line(from.upper_wall_k, to.upper_wall_k);
            room.lower_wall_k = line(from.lower_wall_k, to.lower_wall_k);
            room.floor_k = line(from.floor_k, to.floor_k);
            room.floor_flux_kw_m2 = line(from.floor_flux_kw_m2, to.floor_flux_kw_m2);
            room.heat_release_kw = line(from.heat_release_kw, to.heat_release_kw);
            room.layer_heat_release_kw = line(from.layer_heat_release_kw, to.layer_heat_release_kw);
            room.upper_extinction_1_m = line(from.upper_extinction_1_m, to.upper_extinction_1_m);
            room.lower_extinction_1_m = line(from.lower_extinction_1_m, to.lower_extinction_1_m);
            room.ceiling_jet_k = line(from.ceiling_jet_k, to.ceiling_jet_k);
            room.equivalence_ratio = line(from.equivalence_ratio, to.equivalence_ratio);
        }
        for (index, opening) in sample.openings.iter_mut().enumerate() {
            let (from, to) = (&before.openings[index], &after.openings[index]);
            opening.inflow_kg_s = line(from.inflow_kg_s, to.inflow_kg_s);
            opening.outflow_kg_s = line(from.outflow_kg_s, to.outflow_kg_s);
            opening.flame_heat_release_kw = line(from.flame_heat_release_kw, to.flame_heat_release_kw);
            opening.pressure_pa = line(from.pressure_pa, to.pressure_pa);
            opening.open_fraction = line(from.open_fraction, to.open_fraction);
            if let (Some(a), Some(b)) = (from.neutral_plane_m, to.neutral_plane_m) {
                opening.neutral_plane_m = Some(line(a, b));
            }
        }
        for (index, fire) in sample.fires.iter_mut().enumerate() {
            let (from, to) = (&before.fires[index], &after.fires[index]);
            fire.heat_release_kw = line(from.heat_release_kw, to.heat_release_kw);
            fire.fuel_kg_s = line(from.fuel_kg_s, to.fuel_kg_s);
            fire.drawn_oxygen = line(from.drawn_oxygen, to.drawn_oxygen);
            fire.flame_share = line(from.flame_share, to.flame_share);
            fire.flame_height_m = line(from.flame_height_m, to.flame_height_m);
        }
        self.sample = sample;
        &self.sample
    }
}
