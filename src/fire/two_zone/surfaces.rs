//! Heat in ceiling, walls and floor: one-dimensional conduction through sheets, from the room to the air
//! behind.
//!
//! A sheet is replaced by the shortest chain of heat capacities and conductances that answers at its
//! face as the sheet does, from tenths of a second to its own diffusion time. The chain comes from
//! a fine grid by projection on the answers to steady and to slowly fading heating at a handful of
//! rates (a rational Krylov space, after Druskin and Knizhnerman's Gaussian spectral rules), so
//! six or seven nodes do what sixty of a grid do, and thin, thick and layered sheets alike.
//!
//! Source: [`DRUSKIN_KNIZHNERMAN_2000`](crate::fire::sources::DRUSKIN_KNIZHNERMAN_2000).

use super::network::Slab;

/// Heat that the outer face passes on per kelvin, W/(m² K): air at rest and radiation at room temperature.
/// Common practice.
pub(super) const OUTER_FILM_W_M2K: f64 = 10.0;

/// The chain that stands for the sheets of a surface; node 0 is the face that the fire sees.
#[derive(Clone, Debug, PartialEq)]
pub(super) struct Chain {
    /// Heat capacity of each node, J/(m² K).
    pub capacity: Vec<f64>,
    /// Conductance from each node to the next, W/(m² K); the last to the air behind.
    pub conductance: Vec<f64>,
    /// One over each capacity.
    pub per_capacity: Vec<f64>,
}

/// Fastest heating that the chain follows to within a thousandth, 1/s.
const FASTEST_1_S: f64 = 1.0;

impl Chain {
    /// The chain for sheets, from the room outwards.
    pub(super) fn new(slabs: &[Slab]) -> Self {
        let fine = FineGrid::new(slabs);
        let slowest_1_s = fine.slowest_1_s().min(FASTEST_1_S);
        let decades = (FASTEST_1_S / slowest_1_s).log10();
        #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "at most six decades")]
        let rates = 1 + (1.2 * decades).ceil().clamp(0.0, 6.0) as usize;

        let mut basis: Vec<Vec<f64>> = Vec::with_capacity(rates + 1);
        for index in 0..=rates {
            // The steady answer first, then the slow, then the fast ones.
            let rate_1_s = match index {
                0 => 0.0,
                1 if rates == 1 => FASTEST_1_S,
                #[expect(clippy::cast_precision_loss, reason = "at most seven")]
                _ => slowest_1_s * 10_f64.powf(decades * (index - 1) as f64 / (rates - 1) as f64),
            };
            let mut answer = fine.answer_to_fading(rate_1_s);
            let before = norm(&answer);
            // Twice is enough to be orthogonal to rounding.
            for _ in 0..2 {
                for earlier in &basis {
                    let along = dot(&answer, earlier);
                    answer.iter_mut().zip(earlier).for_each(|(a, e)| *a -= along * e);
                }
            }
            let left = norm(&answer);
            if left > 1e-9 * before {
                answer.iter_mut().for_each(|a| *a /= left);
                basis.push(answer);
            }
        }
        fine.reduced(&basis)
    }

    fn of(capacity: Vec<f64>, conductance: Vec<f64>) -> Self {
        let per_capacity = capacity.iter().map(|c| 1.0 / c).collect();
        Self { capacity, conductance, per_capacity }
    }

    /// Nodes.
    pub(super) fn len(&self) -> usize {
        self.capacity.len()
    }
}

/// The sheets on a grid fine enough to be called exact, scaled to be symmetric: unknowns are
/// `√C (T - T_behind)`.
struct FineGrid {
    root_capacity: Vec<f64>,
    diagonal: Vec<f64>,
    beside: Vec<f64>,
}

impl FineGrid {
    fn new(slabs: &[Slab]) -> Self {
        const FIRST_S: f64 = 0.01;
        const WIDENS: f64 = 1.12;
        const CELLS_MAX: usize = 120;

        let mut capacity = vec![0.0];
        let mut through = Vec::new();
        let mut finest_s = FIRST_S;
        for slab in slabs {
            let volumetric = slab.density_kg_m3 * slab.specific_heat_j_kgk;
            let first_m = (slab.conductivity_w_mk / volumetric * finest_s).sqrt().min(slab.thickness_m / 4.0);
            // Sheets behind see what the first lets pass: slower.
            finest_s = 1.0;
            let mut widths_m = vec![first_m];
            let mut whole_m = first_m;
            while whole_m < slab.thickness_m && widths_m.len() < CELLS_MAX {
                let next_m = widths_m[widths_m.len() - 1] * WIDENS;
                whole_m += next_m;
                widths_m.push(next_m);
            }
            let scale = slab.thickness_m / whole_m;
            for width_m in widths_m {
                let half = 0.5 * volumetric * width_m * scale;
                if let Some(last) = capacity.last_mut() {
                    *last += half;
                }
                capacity.push(half);
                through.push(slab.conductivity_w_mk / (width_m * scale));
            }
        }

        let nodes = capacity.len();
        let root_capacity: Vec<f64> = capacity.iter().map(|c| c.sqrt()).collect();
        let mut diagonal = vec![0.0; nodes];
        let mut beside = vec![0.0; nodes - 1];
        for (node, &conductance) in through.iter().enumerate() {
            diagonal[node] += conductance / capacity[node];
            diagonal[node + 1] += conductance / capacity[node + 1];
            beside[node] = -conductance / (root_capacity[node] * root_capacity[node + 1]);
        }
        diagonal[nodes - 1] += OUTER_FILM_W_M2K / capacity[nodes - 1];
        Self { root_capacity, diagonal, beside }
    }

    /// Rate at which the sheets as a whole cool, 1/s: one over resistance times capacity.
    fn slowest_1_s(&self) -> f64 {
        let capacity: f64 = self.root_capacity.iter().map(|r| r * r).sum();
        // The steady answer at the face is the resistance of all the sheets and the film.
        let resistance = self.answer_to_fading(0.0)[0] / self.root_capacity[0];
        1.0 / (capacity * resistance)
    }

    /// Temperatures under heating of the face that fades as `e^(rate t)` backwards in time, scaled.
    fn answer_to_fading(&self, rate_1_s: f64) -> Vec<f64> {
        let nodes = self.diagonal.len();
        let mut diagonal: Vec<f64> = self.diagonal.iter().map(|d| d + rate_1_s).collect();
        let mut right = vec![0.0; nodes];
        right[0] = 1.0 / self.root_capacity[0];
        for node in (0..nodes - 1).rev() {
            let factor = self.beside[node] / diagonal[node + 1];
            diagonal[node] -= factor * self.beside[node];
            right[node] -= factor * right[node + 1];
        }
        right[0] /= diagonal[0];
        for node in 1..nodes {
            right[node] = (right[node] - self.beside[node - 1] * right[node - 1]) / diagonal[node];
        }
        right
    }

    fn times(&self, vector: &[f64]) -> Vec<f64> {
        let nodes = vector.len();
        (0..nodes)
            .map(|node| {
                let mut sum = self.diagonal[node] * vector[node];
                if node > 0 {
                    sum += self.beside[node - 1] * vector[node - 1];
                }
                if node + 1 < nodes {
                    sum += self.beside[node] * vector[node + 1];
                }
                sum
            })
            .collect()
    }

    /// The chain that has the spectrum of this grid seen from the face, within a space.
    fn reduced(&self, basis: &[Vec<f64>]) -> Chain {
        let size = basis.len();
        let small: Vec<Vec<f64>> = basis
            .iter()
            .map(|column| {
                let image = self.times(column);
                basis.iter().map(|row| dot(row, &image)).collect()
            })
            .collect();
        let mut vector: Vec<f64> = basis.iter().map(|b| b[0] / self.root_capacity[0]).collect();
        let strength = norm(&vector);
        vector.iter_mut().for_each(|v| *v /= strength);

        // Lanczos from the face: a chain, node by node.
        let mut capacity = vec![1.0 / (strength * strength)];
        let mut conductance: Vec<f64> = Vec::with_capacity(size);
        let mut seen: Vec<Vec<f64>> = vec![vector];
        for node in 0..size {
            let current = &seen[node];
            let mut image: Vec<f64> = small.iter().map(|row| dot(row, current)).collect();
            let own = dot(&image, current);
            let before = node.checked_sub(1).map_or(0.0, |last| conductance[last]);
            let onwards = own * capacity[node] - before;
            conductance.push(onwards);
            if node + 1 == size {
                break;
            }
            for _ in 0..2 {
                for earlier in &seen {
                    let along = dot(&image, earlier);
                    image.iter_mut().zip(earlier).for_each(|(i, e)| *i -= along * e);
                }
            }
            let link = norm(&image);
            image.iter_mut().for_each(|i| *i /= link);
            seen.push(image);
            capacity.push(onwards * onwards / (capacity[node] * link * link));
        }
        Chain::of(capacity, conductance)
    }
}

fn dot(a: &[f64], b: &[f64]) -> f64 {
    a.iter().zip(b).map(|(x, y)| x * y).sum()
}

fn norm(a: &[f64]) -> f64 {
    dot(a, a).sqrt()
}

#[cfg(test)]
mod tests {
    use super::*;

    const GYPSUM: Slab =
        Slab { thickness_m: 0.1, conductivity_w_mk: 0.17, density_kg_m3: 790.0, specific_heat_j_kgk: 900.0 };

    /// Follows a chain by many small implicit (trapezium) steps; film to gas plus a fixed heat flux.
    fn face_rise_k(chain: &Chain, film_w_m2k: f64, gas_rise_k: f64, flux_w_m2: f64, end_s: f64) -> f64 {
        let nodes = chain.len();
        let steps = 20_000;
        let mut rise = vec![0.0; nodes];
        // Short steps first: the exact answer starts as the root of time.
        let mut time_s = 0.0;
        for step in 1..=steps {
            let next_s = end_s * (f64::from(step) / f64::from(steps)).powi(2);
            let half = 0.5 * (next_s - time_s);
            time_s = next_s;
            let flow = |rise: &[f64], node: usize| {
                let before = if node == 0 {
                    film_w_m2k * (gas_rise_k - rise[0]) + flux_w_m2
                } else {
                    chain.conductance[node - 1] * (rise[node - 1] - rise[node])
                };
                let next = if node + 1 < nodes { rise[node + 1] } else { 0.0 };
                before - chain.conductance[node] * (rise[node] - next)
            };
            let mut diagonal = vec![0.0; nodes];
            let mut right: Vec<f64> =
                (0..nodes).map(|n| chain.capacity[n] / half * rise[n] + flow(&rise, n)).collect();
            right[0] += film_w_m2k * gas_rise_k + flux_w_m2;
            for n in 0..nodes {
                let before = if n == 0 { film_w_m2k } else { chain.conductance[n - 1] };
                diagonal[n] = chain.capacity[n] / half + before + chain.conductance[n];
            }
            for n in (0..nodes - 1).rev() {
                let factor = chain.conductance[n] / diagonal[n + 1];
                diagonal[n] -= factor * chain.conductance[n];
                right[n] += factor * right[n + 1];
            }
            rise[0] = right[0] / diagonal[0];
            for n in 1..nodes {
                rise[n] = (right[n] + chain.conductance[n - 1] * rise[n - 1]) / diagonal[n];
            }
        }
        rise[0]
    }

    #[test]
    fn a_thick_sheet_under_steady_flux_warms_as_the_half_space() {
        let chain = Chain::new(&[GYPSUM]);
        assert!(chain.len() <= 8, "{} nodes", chain.len());

        // ΔT = 2 q √(t/(π k ρ c)): closed form; 112.43 K after 300 s of 2 kW/m².
        for (time_s, expected_k) in [(10.0, 20.527), (60.0, 50.280), (300.0, 112.43), (1200.0, 224.86)] {
            let got_k = face_rise_k(&chain, 0.0, 0.0, 2000.0, time_s);
            assert!((got_k / expected_k - 1.0).abs() < 2e-3, "{time_s} s: {got_k} K against {expected_k} K");
        }
    }

    #[test]
    fn a_thick_sheet_in_hot_gas_warms_as_the_half_space() {
        // 1 - exp(h² t/kρc) erfc(h √(t/kρc)): closed form; 214.95 K after 600 s, 25 W/m²K, 300 K.
        let got_k = face_rise_k(&Chain::new(&[GYPSUM]), 25.0, 300.0, 0.0, 600.0);

        assert!((got_k / 214.95 - 1.0).abs() < 2e-3, "{got_k}");
    }

    #[test]
    fn a_sheet_in_the_end_passes_what_its_resistances_let_through() {
        // q = ΔT/(1/h_in + d/k + 1/h_out) = 1397.3 W/m² for 12.7 mm, 25 and 10 W/m²K, 300 K: closed form.
        let sheet = Slab { thickness_m: 0.0127, ..GYPSUM };
        let face_k = face_rise_k(&Chain::new(&[sheet]), 25.0, 300.0, 0.0, 40_000.0);

        assert!((25.0 * (300.0 - face_k) / 1397.3 - 1.0).abs() < 1e-3);
    }

    #[test]
    fn a_chain_answers_as_a_fine_grid_does_thin_thick_and_layered() {
        let steel = Slab {
            thickness_m: 0.002,
            conductivity_w_mk: 46.0,
            density_kg_m3: 7850.0,
            specific_heat_j_kgk: 460.0,
        };
        let wool = Slab {
            thickness_m: 0.1,
            conductivity_w_mk: 0.04,
            density_kg_m3: 60.0,
            specific_heat_j_kgk: 840.0,
        };
        let foil = Slab { thickness_m: 0.0001, ..GYPSUM };
        let board = Slab { thickness_m: 0.0127, ..GYPSUM };
        for sheets in [vec![board], vec![steel], vec![steel, wool], vec![board, wool, board], vec![foil]] {
            let fine = FineGrid::new(&sheets);
            let grid = Chain::of(
                fine.root_capacity.iter().map(|r| r * r).collect(),
                fine.beside
                    .iter()
                    .enumerate()
                    .map(|(n, b)| -b * fine.root_capacity[n] * fine.root_capacity[n + 1])
                    .chain([OUTER_FILM_W_M2K])
                    .collect(),
            );
            let chain = Chain::new(&sheets);
            assert!(chain.len() <= 8);
            for time_s in [5.0, 60.0, 600.0, 7200.0] {
                let exact_k = face_rise_k(&grid, 20.0, 400.0, 0.0, time_s);
                let got_k = face_rise_k(&chain, 20.0, 400.0, 0.0, time_s);
                assert!((got_k - exact_k).abs() < 2e-3 * 400.0, "{sheets:?} {time_s}: {got_k} for {exact_k}");
            }
        }
    }

    #[test]
    fn every_capacity_and_conductance_of_a_chain_is_positive() {
        for thickness_m in [0.0001, 0.001, 0.01, 0.05, 0.2, 1.0] {
            for conductivity_w_mk in [0.03, 0.2, 1.5, 50.0, 400.0] {
                let chain = Chain::new(&[Slab { thickness_m, conductivity_w_mk, ..GYPSUM }]);
                assert!(chain.capacity.iter().chain(&chain.conductance).all(|&c| c > 0.0 && c.is_finite()));
            }
        }
    }
}
