//! From two layers to what sensors would read, and from sensors to two layers.
//!
//! Janssens, M. and Tran, H.C.: Data reduction of room tests for zone model validation, Journal of Fire
//! Sciences 10 (1992) 528-555 (from memory; the form is checked below against reductions of measured trees).

use sootline::fire::two_zone::{Layer, RoomState};

/// A tree of thermocouples.
#[derive(Clone, Copy, Debug)]
pub struct Tree {
    /// Heights of the sensors above the floor, m, rising.
    pub sensors_m: &'static [f64],
    /// Height over which the reduction runs, m.
    pub height_m: f64,
}

/// Two layers that a profile was reduced to.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Reduced {
    pub upper_k: f64,
    pub lower_k: f64,
    pub interface_m: f64,
}

impl Tree {
    /// What the sensors read where the engine's two layers stand.
    pub fn readings_k(&self, room: &RoomState) -> Vec<f64> {
        self.sensors_m.iter().map(|&height_m| layer_at(room, height_m).temperature_k).collect()
    }

    /// Two layers from readings:
    ///
    /// ```text
    /// I1 = ∫ T dz, I2 = ∫ 1/T dz over the height H
    /// z_i = T_l (I1 I2 - H²) / (I1 + I2 T_l² - 2 T_l H), T_u = mean of T above z_i
    /// ```
    ///
    /// `T_l` is the lowest sensor; straight lines between sensors, constant beyond them.
    pub fn reduce(&self, readings_k: &[f64]) -> Reduced {
        const SLICES: u32 = 2000;
        let slice_m = self.height_m / f64::from(SLICES);
        let gas: Vec<(f64, f64)> = (0..SLICES)
            .map(|slice| {
                let height_m = (f64::from(slice) + 0.5) * slice_m;
                (height_m, self.between(readings_k, height_m))
            })
            .collect();
        let lower_k = readings_k[0];
        let integral = |of: &dyn Fn(f64) -> f64| gas.iter().map(|&(_, k)| of(k)).sum::<f64>() * slice_m;
        let (i1, i2, height_m) = (integral(&|k| k), integral(&|k| 1.0 / k), self.height_m);
        let below = i1 + i2 * lower_k * lower_k - 2.0 * lower_k * height_m;
        let interface_m =
            if below.abs() < 1e-6 { height_m } else { lower_k * (i1 * i2 - height_m * height_m) / below };
        let above: Vec<f64> = gas.iter().filter(|(z, _)| *z > interface_m).map(|&(_, k)| k).collect();
        let upper_k = if above.is_empty() {
            readings_k[readings_k.len() - 1]
        } else {
            above.iter().sum::<f64>() / super::run::count(above.len())
        };
        Reduced { upper_k, lower_k, interface_m }
    }

    /// The engine's layers as this tree would see them.
    pub fn seen(&self, room: &RoomState) -> Reduced {
        self.reduce(&self.readings_k(room))
    }

    fn between(&self, readings_k: &[f64], height_m: f64) -> f64 {
        let above = self.sensors_m.partition_point(|&sensor_m| sensor_m < height_m);
        if above == 0 {
            return readings_k[0];
        }
        if above == self.sensors_m.len() {
            return readings_k[above - 1];
        }
        let (low_m, high_m) = (self.sensors_m[above - 1], self.sensors_m[above]);
        let share = (height_m - low_m) / (high_m - low_m);
        readings_k[above - 1] * (1.0 - share) + readings_k[above] * share
    }
}

/// The layer that a height lies in.
pub fn layer_at(room: &RoomState, height_m: f64) -> &Layer {
    if height_m > room.interface_height_m { &room.upper } else { &room.lower }
}

/// Oxygen as an analyser reads it: by volume of the dried gas, percent. That the sample is dried is
/// common practice. Nitrogen stands with the argon of air, 28.15 g/mol.
pub fn dry_oxygen_volpct(layer: &Layer, fuel_g_mol: f64) -> f64 {
    oxygen_volpct(layer, fuel_g_mol, true)
}

/// Oxygen by volume, percent, of the gas dried or as it is.
pub fn oxygen_volpct(layer: &Layer, fuel_g_mol: f64, dried: bool) -> f64 {
    let gas = &layer.gas;
    let rest = 1.0
        - gas.oxygen
        - gas.carbon_dioxide
        - gas.water
        - gas.carbon_monoxide
        - gas.hydrogen_cyanide
        - gas.soot
        - gas.unburned_fuel;
    let oxygen = gas.oxygen / 32.0;
    let water = if dried { 0.0 } else { gas.water / 18.015 };
    let all = water
        + oxygen
        + gas.carbon_dioxide / 44.01
        + gas.carbon_monoxide / 28.01
        + gas.hydrogen_cyanide / 27.03
        + gas.unburned_fuel / fuel_g_mol
        + rest.max(0.0) / 28.15;
    100.0 * oxygen / all
}

#[cfg(test)]
mod tests {
    use super::super::data::{Row, table};
    use super::super::series::{open_burner, steckler};
    use super::*;
    use sootline::fire::two_zone::Composition;

    #[test]
    fn the_reduction_of_measured_trees_gives_the_layers_that_came_with_the_data() {
        let trees = table(include_str!("../data/steckler1982_tree.csv"));
        for row in table(include_str!("../data/steckler1982.csv")) {
            let tree: Vec<&Row> =
                trees.iter().filter(|reading| reading.text("test") == row.text("test")).collect();
            if tree.is_empty() {
                continue;
            }
            let readings_k: Vec<f64> = tree.iter().map(|reading| reading.number("gas_c") + 273.15).collect();

            let got = steckler::TREE.reduce(&readings_k);

            assert!((got.interface_m - row.number("interface_m")).abs() < 0.015, "{got:?}");
            assert!((got.upper_k - 273.15 - row.number("upper_c")).abs() < 1.5, "{got:?}");
        }
        for row in table(include_str!("../data/fsri2018_open_burner.csv")) {
            let got = open_burner::TREE.reduce(&open_burner::readings_k(&row));

            // The columns are rounded to 1 K, and to 0.01 m.
            assert!((got.interface_m - row.number("interface_m")).abs() < 0.02, "{got:?}");
            assert!((got.upper_k - 273.15 - row.number("upper_c")).abs() < 2.0, "{got:?}");
        }
    }

    #[test]
    fn two_layers_seen_by_a_dense_tree_are_themselves() {
        const HEIGHTS_M: [f64; 400] = {
            let mut heights = [0.0; 400];
            let mut index = 0;
            while index < 400 {
                heights[index] = 0.005 * index as f64 + 0.0025;
                index += 1;
            }
            heights
        };
        let tree = Tree { sensors_m: &HEIGHTS_M, height_m: 2.0 };
        let layer = |temperature_k| Layer { temperature_k, ..Layer::default() };
        let room = RoomState {
            upper: layer(500.0),
            lower: layer(300.0),
            interface_height_m: 0.8,
            ..RoomState::default()
        };

        let seen = tree.seen(&room);

        assert!((seen.interface_m - 0.8).abs() < 0.01 && (seen.upper_k - 500.0).abs() < 2.0, "{seen:?}");
    }

    #[test]
    fn dry_air_holds_20_95_percent_and_burnt_methane_dries() {
        let air = Layer { gas: Composition { oxygen: 0.2315, ..Composition::default() }, ..Layer::default() };
        assert!((dry_oxygen_volpct(&air, 16.04) - 20.95).abs() < 0.05);

        // By hand: 1 mol of methane in 13.41 mol of air (2.81 mol oxygen, 10.60 mol the rest) leaves 0.81 mol of
        // oxygen of 0.81 + 1 + 10.60 = 12.41 mol dry: 6.53 %.
        let mass_g = 13.41 * 28.96 + 16.04;
        let burnt = Composition {
            oxygen: 0.81 * 32.0 / mass_g,
            carbon_dioxide: 44.01 / mass_g,
            water: 36.03 / mass_g,
            ..Composition::default()
        };
        let got = dry_oxygen_volpct(&Layer { gas: burnt, ..Layer::default() }, 16.04);
        assert!((got - 6.53).abs() < 0.05, "{got}");

        // The same with its 2 mol of water: 0.81 of 14.41 mol, 5.62 %.
        let got = oxygen_volpct(&Layer { gas: burnt, ..Layer::default() }, 16.04, false);
        assert!((got - 5.62).abs() < 0.05, "{got}");
    }
}
