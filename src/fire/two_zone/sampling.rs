//! What is read between two steps.
//!
//! Volumes and masses follow a cubic held within what both ends allow; pressures, faces and flows a straight line: they
//! settle faster than a step, and a cubic through their slopes would swing.

use super::outcome::Sample;
use super::rates::Model;
use super::gas;

/// Both ends of a step.
#[derive(Debug)]
pub(super) struct Between {
    from_s: f64,
    to_s: f64,
    from: Vec<f64>,
    from_rates: Vec<f64>,
    to: Vec<f64>,
    to_rates: Vec<f64>,
    sample: Sample,
}

impl Between {
    pub(super) fn new(len: usize) -> Self {
        let zeros = vec![0.0; len];
        Self {
            from_s: 0.0,
            to_s: 0.0,
            from: zeros.clone(),
            from_rates: zeros.clone(),
            to: zeros.clone(),
            to_rates: zeros,
            sample: Sample::default(),
        }
    }

    pub(super) fn leave(&mut self, state: &[f64], rates: &[f64], time_s: f64) {
        self.from_s = time_s;
        self.from.copy_from_slice(state);
        self.from_rates.copy_from_slice(rates);
    }

    pub(super) fn arrive(&mut self, state: &[f64], rates: &[f64], time_s: f64) {
        self.to_s = time_s;
        self.to.copy_from_slice(state);
        self.to_rates.copy_from_slice(rates);
    }

    /// Stays where it is: both ends the same.
    pub(super) fn stay(&mut self, state: &[f64], time_s: f64) {
        self.from_s = time_s;
        self.to_s = time_s;
        self.from.copy_from_slice(state);
        self.to.copy_from_slice(state);
        self.from_rates.fill(0.0);
        self.to_rates.fill(0.0);
    }

    fn cubic(&self, at: usize, share: f64) -> f64 {
        let step_s = self.to_s - self.from_s;
        let (from, to) = (self.from[at], self.to[at]);
        if step_s <= 0.0 {
            return to;
        }
        let rise = to - from;
        // Slopes beyond three times the rise would swing past the ends.
        let held = |slope: f64| {
            let scaled = slope * step_s;
            if rise == 0.0 || scaled * rise <= 0.0 { 0.0 } else { scaled.signum() * scaled.abs().min(3.0 * rise.abs()) }
        };
        let (first, last) = (held(self.from_rates[at]), held(self.to_rates[at]));
        let s = share;
        let (s2, s3) = (s * s, s * s * s);
        from * (2.0 * s3 - 3.0 * s2 + 1.0)
            + first * (s3 - 2.0 * s2 + s)
            + to * (3.0 * s2 - 2.0 * s3)
            + last * (s3 - s2)
    }

    /// The building at a time between.
    pub(super) fn at(&mut self, model: Model<'_>, time_s: f64, before: &Sample, after: &Sample) -> &Sample {
        let step_s = self.to_s - self.from_s;
        let share = if step_s > 0.0 { ((time_s - self.from_s) / step_s).clamp(0.0, 1.0) } else { 1.0 };
        let line = |from: f64, to: f64| from + (to - from) * share;
        let mut sample = std::mem::take(&mut self.sample);
        sample.clone_from(if share < 0.5 { before } else { after });
        sample.time_s = time_s;
        let building = model.building;
        for (index, room) in sample.rooms.iter_mut().enumerate() {
            let (from, to) = (&before.rooms[index], &after.rooms[index]);
            let data = &building.rooms[index];
            let at = building.layout.pressure(index);
            room.pressure_pa = line(from.pressure_pa, to.pressure_pa);
            let pressure = building.ambient.pressure_pa + room.pressure_pa;
            let upper_m3 = self.cubic(at + 1, share).clamp(1e-7 * data.volume_m3, data.volume_m3);
            room.upper.mass_kg = self.cubic(at + 2, share).max(1e-8 * data.air_kg);
            room.lower.mass_kg = self.cubic(at + 3, share).max(1e-8 * data.air_kg);
            room.upper.temperature_k = gas::temperature_k(pressure, upper_m3, room.upper.mass_kg);
            let lower_m3 = data.volume_m3 - upper_m3;
            // The warmth of a layer that is nearly gone is a ratio of two remnants: a line serves better.
            room.lower.temperature_k = if lower_m3 > 0.01 * data.volume_m3 {
                gas::temperature_k(pressure, lower_m3, room.lower.mass_kg)
            } else {
                line(from.lower.temperature_k, to.lower.temperature_k)
            };
            room.interface_height_m = lower_m3 / data.floor_area_m2;
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
