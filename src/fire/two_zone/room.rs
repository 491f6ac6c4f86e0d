//! What happens inside one room: fires, plumes, layers, surfaces.

use super::building::{CEILING, FLOOR, FuelData, LOWER_WALL, RoomData, SURFACES, UPPER_WALL};
use super::combustion::{Products, flame_share, lights, products, smooth_min};
use super::gas::{GAS_CONSTANT_J_KGK, STEFAN_BOLTZMANN_W_M2K4};
use super::plume::{self, Source};
use super::radiation::{self, Glow, Zones};
use super::real::Real;

/// The variables of a room on which its own rates depend.
#[derive(Clone, Copy, Debug)]
pub(super) struct Inside<R> {
    /// Absolute pressure, Pa.
    pub pressure_pa: R,
    /// Volume of the hot layer, m³.
    pub upper_m3: R,
    /// Mass of the hot, the cool layer, kg.
    pub upper_kg: R,
    pub lower_kg: R,
    /// Oxygen of the hot, the cool layer, kg.
    pub upper_oxygen_kg: R,
    pub lower_oxygen_kg: R,
    /// Unburned fuel gas of the hot layer, kg.
    pub upper_fuel_kg: R,
    /// Faces of the surfaces, K.
    pub surfaces_k: [R; SURFACES],
}

/// What follows from them.
#[derive(Clone, Copy, Debug)]
pub(super) struct Derived<R> {
    pub upper_k: R,
    pub lower_k: R,
    pub lower_m3: R,
    /// Interface above the floor, m.
    pub interface_m: R,
    /// How much of its part the hot, the cool layer still plays: 1, falling to 0 as the layer goes. A layer that
    /// goes gives nothing, takes no heat, and has the temperature of the other: the ratio of two
    /// remnants means nothing.
    pub there: [R; 2],
}

/// Mass below which a layer counts as going, as a share of the air of the room.
const GOING: f64 = 1e-3;

impl<R: Real> Inside<R> {
    /// Temperatures, heights, shares.
    #[inline]
    pub(super) fn derived(&self, room: &RoomData) -> Derived<R> {
        let least_m3 = 1e-7 * room.volume_m3;
        let least_kg = 1e-8 * room.air_kg;
        let upper_m3 = self.upper_m3.at_least(least_m3).at_most(room.volume_m3);
        let lower_m3 = (-self.upper_m3 + room.volume_m3).at_least(least_m3);
        let upper_kg = self.upper_kg.at_least(least_kg);
        let lower_kg = self.lower_kg.at_least(least_kg);
        let per_kg = self.pressure_pa * (1.0 / GAS_CONSTANT_J_KGK);
        let going_kg = GOING * room.air_kg;
        let raw = |volume: R, mass: R| (per_kg * volume / mass).at_least(50.0).at_most(9000.0);
        let (hot_k, cool_k) = (raw(upper_m3, upper_kg), raw(lower_m3, lower_kg));
        let there_of = |mass: R| {
            let squared = mass.squared();
            squared / (squared + going_kg * going_kg)
        };
        let there = [there_of(upper_kg), there_of(lower_kg)];
        Derived {
            upper_k: cool_k + (hot_k - cool_k) * there[0],
            lower_k: hot_k + (cool_k - hot_k) * there[1],
            lower_m3,
            interface_m: lower_m3 * (1.0 / room.floor_area_m2),
            there,
        }
    }
}

/// A fire at this moment.
#[derive(Clone, Copy, Debug)]
pub(super) struct Burning {
    /// Which fire, which fuel.
    pub fire: usize,
    pub fuel: usize,
    /// Heat release with all the air it wants, W.
    pub wanted_w: f64,
    pub alight: bool,
    pub oxygen_limited: bool,
    /// Share of the fuel that comes without flame.
    pub without_flame: f64,
    pub base_m: f64,
    pub diameter_m: f64,
    pub images: f64,
    pub radiative: f64,
}

/// The fires of a room, and all fuels.
#[derive(Clone, Copy, Debug)]
pub(super) struct Fires<'a> {
    pub fuels: &'a [FuelData],
    pub fires: &'a [Burning],
}

/// What the room does not settle by itself.
#[derive(Clone, Copy, Debug)]
pub(super) struct Around {
    /// Cool gas that comes in per metre of the width it spreads over, m²/s.
    pub inflow_m2_s: f64,
    /// Soot and gas that make the layers glow, absorption 1/m over the hot, the cool layer.
    pub glow: [Glow; 2],
}

/// A reaction and the fuel it came from.
#[derive(Clone, Copy, Debug)]
pub(super) struct Reaction<R> {
    /// Which fire; none in the layer.
    pub fire: Option<usize>,
    pub fuel: usize,
    /// Oxygen used, kg/s.
    pub oxygen_kg_s: R,
    /// Fuel given off, kg/s.
    pub supply_kg_s: R,
    pub products: Products,
    /// Share of the flame that the gas it draws lets burn.
    pub flame: f64,
    /// Oxygen of the gas that the plume draws, kg/kg, and the oxygen it draws, kg/s.
    pub drawn: f64,
    pub drawn_kg_s: f64,
}

/// Rates of a room.
#[derive(Clone, Copy, Debug)]
pub(super) struct Inner<R> {
    /// Cool gas that the plumes lift, kg/s.
    pub lifted_kg_s: R,
    /// Heat to the hot, the cool layer, W.
    pub heat_w: [R; 2],
    /// Heat to each surface, W.
    pub surfaces_w: [R; SURFACES],
    /// Heat released, W.
    pub released_w: R,
}

/// Heat that a face takes from still gas per kelvin to the 4/3, W/(m² K^(4/3)): `1.52` for ceilings over hot gas and
/// floors, `1.31` for walls.
///
/// Source: [`HOLMAN`](crate::fire::sources::HOLMAN), turbulent free convection.
const LEVEL_FILM: f64 = 1.52;
const UPRIGHT_FILM: f64 = 1.31;

/// Heat from gas to a face, W/m².
#[inline]
fn convected<R: Real>(film: f64, gas_k: R, face_k: R) -> R {
    let difference = gas_k - face_k;
    difference * difference.cbrt().abs() * film
}

/// Share of a wall strip beside the hot layer.
#[inline]
pub(super) fn share_in_hot<R: Real>(interface_m: R, bottom_m: f64, top_m: f64) -> R {
    ((-interface_m + top_m) / (top_m - bottom_m)).at_least(0.0).at_most(1.0)
}

/// Works out a room. `reactions` is cleared and filled.
pub(super) fn inside<R: Real>(
    room: &RoomData,
    state: &Inside<R>,
    now: &Derived<R>,
    burning: &Fires<'_>,
    around: &Around,
    zones: &Zones<R>,
    reactions: &mut Vec<Reaction<R>>,
) -> Inner<R> {
    reactions.clear();
    let zero = R::constant(0.0);
    let mut inner =
        Inner { lifted_kg_s: zero, heat_w: [zero; 2], surfaces_w: [zero; SURFACES], released_w: zero };
    let upper_kg = state.upper_kg.at_least(1e-8 * room.air_kg);
    let lower_kg = state.lower_kg.at_least(1e-8 * room.air_kg);
    let upper_oxygen = (state.upper_oxygen_kg / upper_kg).at_least(0.0);
    let lower_oxygen = (state.lower_oxygen_kg / lower_kg).at_least(0.0);

    // The cool inflow fills the cool layer: the lower that is, the faster the draught.
    let draught_m_s = R::constant(around.inflow_m2_s) / now.interface_m.at_least(0.1 * room.height_m);
    for fire in burning.fires {
        let fuel = &burning.fuels[fire.fuel];
        let wanted_oxygen = fire.wanted_w / fuel.heat_per_oxygen_j_kg;
        let wanted_fuel = wanted_oxygen / fuel.oxygen_need;
        if !fire.alight || fire.wanted_w <= 0.0 {
            let supply = R::constant(wanted_fuel * fire.without_flame);
            if wanted_fuel > 0.0 {
                reactions.push(Reaction {
                    fire: Some(fire.fire),
                    fuel: fire.fuel,
                    oxygen_kg_s: zero,
                    supply_kg_s: supply,
                    products: products(&fuel.fuel, 0.0, 300.0),
                    flame: 0.0,
                    drawn: 0.0,
                    drawn_kg_s: 0.0,
                });
            }
            continue;
        }
        let source = Source {
            diameter_m: fire.diameter_m,
            convective_share: 1.0 - fire.radiative,
            images: fire.images,
            air_factor: air_factor(now.lower_k.value(), state.pressure_pa.value()),
            draught_m_s,
            density_kg_m3: (state.pressure_pa / now.lower_k).value() / GAS_CONSTANT_J_KGK,
        };
        let clear_m = (now.interface_m - fire.base_m).at_least(0.0);
        let wanted_kw = R::constant(1e-3 * fire.wanted_w);
        let tip_m = plume::flame_height_m(wanted_kw * fire.images, fire.diameter_m)
            .at_least(0.5 * fire.diameter_m)
            .at_most((room.height_m - fire.base_m).max(0.05))
            .at_least(0.05);
        // What the flame draws on its height: cool gas below the interface, hot gas above. By itself, without the
        // draught: fire, pressure and draught would answer each other within milliseconds.
        let still = Source { draught_m_s: zero, ..source };
        let low_kg_s = plume::flow_kg_s(wanted_kw, clear_m.min(tip_m), &still) * now.there[1];
        let all_kg_s = plume::flow_kg_s(wanted_kw, tip_m, &still);
        let high_kg_s = (all_kg_s - low_kg_s).at_least(0.0);
        let drawn_kg_s = low_kg_s + high_kg_s + 1e-12;
        let drawn_oxygen_kg_s = low_kg_s * lower_oxygen + high_kg_s * upper_oxygen;
        let (flame, oxygen) = if fire.oxygen_limited {
            let mixed_k = (low_kg_s * now.lower_k + high_kg_s * now.upper_k) / drawn_kg_s;
            let share = flame_share(drawn_oxygen_kg_s / drawn_kg_s, mixed_k);
            // In a room so hot that fuel gas lights wherever it meets air there is no going out.
            let lives = share.value().max(lights(now.upper_k.value()));
            // The fuel meets the cool gas first; what that leaves meets the hot gas higher up.
            let wanted = R::constant(wanted_oxygen);
            let in_low = smooth_min(wanted, low_kg_s * lower_oxygen) * flame_share(lower_oxygen, now.lower_k);
            let lives = lives.max(in_low.value() / wanted_oxygen);
            let rest = (wanted - in_low).at_least(0.0);
            let in_high = smooth_min(rest, high_kg_s * upper_oxygen) * flame_share(upper_oxygen, now.upper_k);
            (lives, in_low + in_high)
        } else {
            (1.0, R::constant(wanted_oxygen))
        };
        let burns = oxygen / wanted_oxygen;
        let supply = (burns + (-burns + 1.0) * fire.without_flame) * wanted_fuel;
        let equivalence_ratio = supply.value() * fuel.oxygen_need / drawn_oxygen_kg_s.value().max(1e-12);
        reactions.push(Reaction {
            fire: Some(fire.fire),
            fuel: fire.fuel,
            oxygen_kg_s: oxygen,
            supply_kg_s: supply,
            products: products(&fuel.fuel, equivalence_ratio, now.upper_k.value()),
            flame,
            drawn: drawn_oxygen_kg_s.value() / drawn_kg_s.value(),
            drawn_kg_s: drawn_oxygen_kg_s.value(),
        });

        let heat_w = oxygen * fuel.heat_per_oxygen_j_kg;
        inner.released_w = inner.released_w + heat_w;
        let lifted = plume::flow_kg_s(heat_w * 1e-3, clear_m, &source) * now.there[1];
        inner.lifted_kg_s = inner.lifted_kg_s + lifted;
        // A layer that is nearly gone cannot take the heat of the plume: then all of the room is hot.
        inner.heat_w[0] = inner.heat_w[0] + heat_w * (1.0 - fire.radiative);
        let flame_m = plume::flame_height_m(heat_w * (1e-3 * fire.images), fire.diameter_m).at_least(0.02);
        radiation::flame(zones, heat_w * fire.radiative, clear_m, flame_m, &mut inner);
    }

    // Fuel gas of the hot layer burns where it is hot enough and finds oxygen.
    let unburned_kg = state.upper_fuel_kg.at_least(0.0);
    if unburned_kg.value() > 0.0 && now.upper_k.value() > 700.0 {
        const MIXES_S: f64 = 1.0;
        let lit = lights(now.upper_k);
        for (index, fuel) in burning.fuels.iter().enumerate() {
            let share = around.glow[0].fuel_shares[index];
            if share <= 0.0 {
                continue;
            }
            let wants = unburned_kg * (share * fuel.oxygen_need);
            // What is short decides; both fall together towards nothing.
            let has = state.upper_oxygen_kg.at_least(0.0);
            let oxygen = wants * has / (wants + has + 1e-12) * lit * (1.0 / MIXES_S);
            let heat_w = oxygen * fuel.heat_per_oxygen_j_kg;
            inner.released_w = inner.released_w + heat_w;
            inner.heat_w[0] = inner.heat_w[0] + heat_w;
            reactions.push(Reaction {
                fire: None,
                fuel: index,
                oxygen_kg_s: oxygen,
                supply_kg_s: zero,
                products: products(&fuel.fuel, 0.5, now.upper_k.value()),
                flame: 0.0,
                drawn: 0.0,
                drawn_kg_s: 0.0,
            });
        }
    }

    convection(room, state, now, &mut inner);
    radiation::exchange(zones, &state.surfaces_k, &mut inner);
    inner.heat_w = to_what_is_there(inner.heat_w, now.there);
    inner
}

/// Heat meant for a layer that is nearly gone goes to the other.
#[inline]
pub(super) fn to_what_is_there<R: Real>(heat_w: [R; 2], there: [R; 2]) -> [R; 2] {
    let kept = [heat_w[0] * there[0], heat_w[1] * there[1]];
    [kept[0] + heat_w[1] - kept[1], kept[1] + heat_w[0] - kept[0]]
}

/// `(ρ²/T)^(1/3)` against air at 293 K and 101 325 Pa: plume laws grow with it.
fn air_factor(temperature_k: f64, pressure_pa: f64) -> f64 {
    let cold = 293.0 / temperature_k;
    let dense = pressure_pa / 101_325.0 * cold;
    (dense * dense * cold).cbrt()
}

/// Heat from the layers to the faces beside them.
fn convection<R: Real>(room: &RoomData, state: &Inside<R>, now: &Derived<R>, inner: &mut Inner<R>) {
    let half_m = 0.5 * room.height_m;
    let mut give = |surface: usize, film: f64, hot_share: R| {
        let area = room.areas_m2[surface];
        if area <= 0.0 {
            return;
        }
        let face = state.surfaces_k[surface];
        let hot = convected(film, now.upper_k, face) * hot_share * area;
        let cool = convected(film, now.lower_k, face) * (-hot_share + 1.0) * area;
        inner.heat_w[0] = inner.heat_w[0] - hot;
        inner.heat_w[1] = inner.heat_w[1] - cool;
        inner.surfaces_w[surface] = inner.surfaces_w[surface] + hot + cool;
    };
    give(CEILING, LEVEL_FILM, now.there[0]);
    give(UPPER_WALL, UPRIGHT_FILM, share_in_hot(now.interface_m, half_m, room.height_m));
    give(LOWER_WALL, UPRIGHT_FILM, share_in_hot(now.interface_m, 0.0, half_m));
    give(FLOOR, LEVEL_FILM, -now.there[1] + 1.0);
}

/// Emissive power of a black face, W/m².
#[inline]
pub(super) fn black_w_m2<R: Real>(temperature_k: R) -> R {
    temperature_k.squared().squared() * STEFAN_BOLTZMANN_W_M2K4
}
