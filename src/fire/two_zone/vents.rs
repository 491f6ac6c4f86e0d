//! Flow through openings: what the difference of pressure along their height drives.

use super::real::Real;
use crate::fire::constants::GRAVITY_M_S2;

/// One side of an opening.
#[derive(Clone, Copy, Debug)]
pub(super) struct Flank<R> {
    /// Pressure at its floor above outside air of the same height, Pa.
    pub pressure_pa: R,
    /// Its floor above the datum, m.
    pub floor_m: f64,
    /// Its interface above the datum, m.
    pub interface_m: R,
    /// Density of the hot layer, kg/m³.
    pub upper_kg_m3: R,
    /// Density of the cool layer, kg/m³.
    pub lower_kg_m3: R,
    /// Share of what is drawn at the hot layer that the hot layer gives; the rest comes from the other. A layer that
    /// is nearly gone gives nothing.
    pub upper_gives: R,
    /// The same of the cool layer.
    pub lower_gives: R,
}

impl<R: Real> Flank<R> {
    /// Pressure above outside air at a height above the datum, Pa.
    #[inline]
    fn pressure_at_pa(&self, height: R, outside_kg_m3: f64) -> R {
        let cool = height.min(self.interface_m) - self.floor_m;
        let hot = (height - self.interface_m).at_least(0.0);
        self.pressure_pa
            + (-self.lower_kg_m3 + outside_kg_m3) * cool * GRAVITY_M_S2
            + (-self.upper_kg_m3 + outside_kg_m3) * hot * GRAVITY_M_S2
    }

    #[inline]
    fn is_upper(&self, height_m: f64) -> bool {
        height_m > self.interface_m.value()
    }
}

/// What flows through an opening, kg/s.
#[derive(Clone, Copy, Debug)]
pub(super) struct Flow<R> {
    /// Out of the hot and the cool layer of each side.
    pub from: [[R; 2]; 2],
    /// Where the flow turns above the datum, m.
    pub neutral_m: Option<f64>,
    /// Pressure of largest size across it, first against second, Pa.
    pub pressure_pa: f64,
}

/// Pressure under which flow falls below the root law, Pa: the root of nothing has no slope.
const SOFT_PA: f64 = 0.004;

/// `∫ Δ/√(Δ + ε) dz` over a height on which `Δ` runs straight from `first` to `last`, none below zero. Exact.
#[inline]
fn root_integral<R: Real>(height: R, first: R, last: R) -> R {
    let (a, b) = (first + SOFT_PA, last + SOFT_PA);
    let (root_a, root_b) = (a.sqrt(), b.sqrt());
    height * ((a + b + root_a * root_b) * (2.0 / 3.0) - 2.0 * SOFT_PA) / (root_a + root_b)
}

/// Flow through an opening in a wall: the orifice law integrated exactly over slabs between the interfaces
/// and the heights at which the flow turns.
///
/// ```text
/// dm = C w √(2 ρ |Δp(z)|) dz
/// ```
///
/// `effective_width_m` is the discharge coefficient times the width.
pub(super) fn through_wall<R: Real>(
    sides: [&Flank<R>; 2],
    bottom_m: f64,
    top_m: f64,
    effective_width_m: f64,
    wind_pa: [f64; 2],
    outside_kg_m3: f64,
) -> Flow<R> {
    let zero = R::constant(0.0);
    let mut flow = Flow { from: [[zero; 2]; 2], neutral_m: None, pressure_pa: 0.0 };
    if effective_width_m <= 0.0 {
        return flow;
    }
    let clamp = |height: R| height.at_least(bottom_m).at_most(top_m);
    let (one, other) = (clamp(sides[0].interface_m), clamp(sides[1].interface_m));
    let cuts = [R::constant(bottom_m), one.min(other), one.max(other), R::constant(top_m)];
    let difference = |height: R| {
        sides[0].pressure_at_pa(height, outside_kg_m3) - sides[1].pressure_at_pa(height, outside_kg_m3)
            + (wind_pa[0] - wind_pa[1])
    };
    let mut low = difference(cuts[0]);
    flow.pressure_pa = low.value();
    for slab in 0..3 {
        let (bottom, top) = (cuts[slab], cuts[slab + 1]);
        let height = top - bottom;
        if height.value() <= 0.0 {
            continue;
        }
        let high = difference(top);
        if high.value().abs() > flow.pressure_pa.abs() {
            flow.pressure_pa = high.value();
        }
        let middle_m = 0.5 * (bottom.value() + top.value());
        let mut add = |height: R, first: R, last: R| {
            let giver = usize::from(first.value() + last.value() < 0.0);
            let side = sides[giver];
            let (density, gives, layer) = if side.is_upper(middle_m) {
                (side.upper_kg_m3, side.upper_gives, 0)
            } else {
                (side.lower_kg_m3, side.lower_gives, 1)
            };
            let (first, last) = if giver == 0 { (first, last) } else { (-first, -last) };
            let mass = root_integral(height, first, last) * (density * 2.0).sqrt() * effective_width_m;
            let own = mass * gives;
            flow.from[giver][layer] = flow.from[giver][layer] + own;
            flow.from[giver][1 - layer] = flow.from[giver][1 - layer] + (mass - own);
        };
        if low.value() * high.value() < 0.0 {
            let share = low / (low - high);
            let turn = height * share;
            add(turn, low, zero);
            add(height - turn, zero, high);
            flow.neutral_m = Some(bottom.value() + turn.value());
        } else {
            add(height, low, high);
        }
        low = high;
    }
    flow
}

/// Flow through an opening in a ceiling; the first side is the space below.
///
/// Driven by pressure as through a wall. Where the gas above is the heavier, hot and cold change places
/// besides, at most
///
/// ```text
/// V = 0.055 (4/π) A √(g D Δρ/ρ)
/// ```
///
/// and less as pressure forces one direction, nothing from `Δp = 0.25 g D Δρ` on.
///
/// Source: [`EPSTEIN_1988`](crate::fire::sources::EPSTEIN_1988), [`COOPER_1995`](crate::fire::sources::COOPER_1995); the
/// linear fall between is ours.
pub(super) fn through_ceiling<R: Real>(
    sides: [&Flank<R>; 2],
    level_m: f64,
    side_m: f64,
    effective_width_m: f64,
    open_area_m2: f64,
    wind_pa: [f64; 2],
    outside_kg_m3: f64,
) -> Flow<R> {
    let zero = R::constant(0.0);
    let mut flow = Flow { from: [[zero; 2]; 2], neutral_m: None, pressure_pa: 0.0 };
    if effective_width_m <= 0.0 {
        return flow;
    }
    let level = R::constant(level_m);
    let difference = sides[0].pressure_at_pa(level, outside_kg_m3)
        - sides[1].pressure_at_pa(level, outside_kg_m3)
        + (wind_pa[0] - wind_pa[1]);
    flow.pressure_pa = difference.value();
    let (below, above) = (sides[0], sides[1]);
    let drive = difference.abs();
    let rate = drive / (drive + SOFT_PA).sqrt() * (effective_width_m * side_m);
    let giver = usize::from(difference.value() < 0.0);
    let (density, gives, layer) = if giver == 0 {
        (below.upper_kg_m3, below.upper_gives, 0)
    } else {
        (above.lower_kg_m3, above.lower_gives, 1)
    };
    let mass = rate * (density * 2.0).sqrt();
    let own = mass * gives;
    flow.from[giver][layer] = own;
    flow.from[giver][1 - layer] = mass - own;

    // A millionth, a few ten-thousandths of a kelvin, is rounding.
    let heavier = above.lower_kg_m3 - below.upper_kg_m3 - 1e-6;
    if heavier.value() > 0.0 && open_area_m2 > 0.0 {
        const EXCHANGE: f64 = 0.055 * 4.0 / std::f64::consts::PI;
        // Below a kelvin of difference it falls faster than the root, without slope at nothing, and pressures below
        // SOFT_PA count for nothing: air at rest stays at rest.
        const SOFT_KG_M3: f64 = 4e-3;
        let flood = heavier * (0.25 * GRAVITY_M_S2 * side_m) + SOFT_PA;
        let free = (-(drive / flood) + 1.0).at_least(0.0);
        if free.value() > 0.0 {
            let mean = (above.lower_kg_m3 + below.upper_kg_m3) * 0.5;
            let pull = heavier * heavier.sqrt() / (heavier + SOFT_KG_M3);
            let volume =
                pull / mean.sqrt() * ((GRAVITY_M_S2 * side_m).sqrt() * EXCHANGE * open_area_m2) * free;
            // Equal volumes change places.
            for (end, density, gives, layer) in
                [(0, below.upper_kg_m3, below.upper_gives, 0), (1, above.lower_kg_m3, above.lower_gives, 1)]
            {
                let mass = volume * density;
                let own = mass * gives;
                flow.from[end][layer] = flow.from[end][layer] + own;
                flow.from[end][1 - layer] = flow.from[end][1 - layer] + (mass - own);
            }
        }
    }
    flow
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fire::two_zone::gas::GAS_CONSTANT_J_KGK;
    use approx::assert_relative_eq;

    fn density(temperature_k: f64) -> f64 {
        101_325.0 / (GAS_CONSTANT_J_KGK * temperature_k)
    }

    fn uniform(temperature_k: f64, pressure_pa: f64) -> Flank<f64> {
        Flank {
            pressure_pa,
            floor_m: 0.0,
            interface_m: 1e9,
            upper_kg_m3: density(temperature_k),
            lower_kg_m3: density(temperature_k),
            upper_gives: 1.0,
            lower_gives: 1.0,
        }
    }

    #[test]
    fn a_constant_pressure_gives_the_orifice_law() {
        // By hand: 0.6 · 0.01 · √(2 ρ 1329.51), ρ at 293 K; the closed form asks for 0.3396 kg/s.
        let flow = through_wall(
            [&uniform(293.0, 1329.51), &uniform(293.0, 0.0)],
            0.0,
            1.0,
            0.6 * 0.01,
            [0.0; 2],
            density(293.0),
        );

        assert_relative_eq!(flow.from[0][1], 0.3396, max_relative = 1e-3);
        assert_eq!(flow.from[1], [0.0; 2]);
    }

    #[test]
    fn a_hot_room_breathes_out_above_and_in_below_as_the_closed_form_says() {
        // One tall opening of a uniform hot room; closed forms, C w (2/3) √(2 g ρ Δρ) z^(3/2).
        let (hot, cold) = (density(600.0), density(293.0));
        let neutral_m = 0.9;
        let pressure = -(cold - hot) * GRAVITY_M_S2 * neutral_m;
        let flow = through_wall(
            [&uniform(600.0, pressure), &uniform(293.0, 0.0)],
            0.0,
            2.0,
            0.7 * 0.8,
            [0.0; 2],
            cold,
        );

        let law = |density: f64, height: f64| {
            0.7 * 0.8 * 2.0 / 3.0
                * (2.0 * GRAVITY_M_S2 * density * (cold - hot)).sqrt()
                * f64::powf(height, 1.5)
        };
        assert_relative_eq!(flow.neutral_m.unwrap(), neutral_m, max_relative = 1e-9);
        assert_relative_eq!(flow.from[0][1], law(hot, 1.1), max_relative = 6e-3);
        assert_relative_eq!(flow.from[1][1], law(cold, 0.9), max_relative = 6e-3);
    }

    #[test]
    fn nothing_moves_between_equal_columns() {
        let air = uniform(293.0, 0.0);

        for flow in [
            through_wall([&air, &air], 0.0, 2.0, 0.5, [0.0; 2], density(293.0)),
            through_ceiling([&air, &air], 2.0, 1.0, 0.6, 1.0, [0.0; 2], density(293.0)),
        ] {
            assert_eq!(flow.from, [[0.0; 2]; 2]);
        }
    }

    #[test]
    fn cold_over_hot_changes_places_and_hot_over_cold_does_not() {
        let (hot, cold) = (uniform(500.0, 0.0), uniform(293.0, 0.0));
        let level = |below: &Flank<f64>, above: &Flank<f64>| {
            // Pressures that balance at the level of the opening.
            let lift = (density(293.0) - below.lower_kg_m3) * GRAVITY_M_S2 * 2.0;
            let below = Flank { pressure_pa: -lift, ..*below };
            let lift = (density(293.0) - above.lower_kg_m3) * GRAVITY_M_S2 * 2.0;
            let above = Flank { pressure_pa: -lift, ..*above };
            through_ceiling([&below, &above], 2.0, 1.0, 0.6, 1.0, [0.0; 2], density(293.0))
        };

        let unstable = level(&hot, &cold);
        // By hand: 0.055 · 4/π · √(9.80665 · (1.2044 - 0.7058)/0.9551) = 0.1585 m³/s of hot gas up, less the
        // remnant of pressure.
        let up: f64 = unstable.from[0].iter().sum();
        assert_relative_eq!(up, 0.1585 * density(500.0), max_relative = 0.01);
        let stable = level(&cold, &hot);
        let moved: f64 = stable.from.iter().flatten().sum();
        assert!(moved < 1e-6, "{moved}");
    }
}
