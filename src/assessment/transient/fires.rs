//! What burns in a room, as fires of the engine.
//!
//! The item of origin and the contents round it are one fire: the contents stand close, and nobody recorded how close. It
//! grows as at screening, stands at the worst of corner and centre, and has the fire load that no other recorded
//! package holds. The other packages are fires of their own, lit by the flame of the first or by the heat of the layer;
//! so is a lining that burns, lit by its temperature; so are the contents of each other room.

use super::super::contents::{self, Contents, Package};
use super::super::inputs::Inputs;
use super::shell::Lean;
use crate::fire::design_fire::DECAY_FROM_SHARE;
use crate::fire::excess_fuel::AftergasShare;
use crate::fire::flame::equivalent_diameter_m;
use crate::fire::two_zone::{Fire, HeatRelease, Ignition, Position, Supply};
use crate::fire::{DesignFire, spread};

/// A fire drawn with one diameter while it grows: that of so much heat, kW. Ours: wide enough for a grown fire, narrow
/// enough for a young one.
const DRAWN_AT_KW: f64 = 1000.0;
/// Heat release of burning wood-based sheets, kW/m². From memory: 100 to 150 in small tests at 50 kW/m².
const LINING_KW_M2: f64 = 100.0;
/// Surface at which they take fire beside flames, K: 360 °C. From memory.
const LINING_IGNITES_K: f64 = 633.15;
/// Depth that burns, m: some 0.65 mm a minute for half an hour.
const LINING_BURNS_M: f64 = 0.02;
/// Heat of such sheets, kJ/kg: wood, as in the catalogue.
const LINING_KJ_KG: f64 = 12_400.0;
/// Flame over a surface that is hot already: the ultra-fast class, kW/s².
const LINING_GROWTH_KW_S2: f64 = 0.177_78;
/// Share of the fuel that goes on without flame, of what the flame drew.
const WITHOUT_FLAME: f64 = 0.5;

/// How the fuel of a room answers to want of air.
///
/// The screen for unburned gas counts a share `s` of the heat released until the flame dies as given off afterwards. A fire
/// that grew for `t` with t² has released `Q t/3`; half of `Q` fading by `1/e` in `τ` gives `Q τ/2`. Both agree with
/// `τ = 2 s t/3`; here `t` is four minutes, when shut rooms starve.
pub(super) fn supply(combustible_lining: bool) -> Supply {
    const STARVES_S: f64 = 240.0;
    let share = if combustible_lining {
        AftergasShare::COMBUSTIBLE_LINING
    } else {
        AftergasShare::NONCOMBUSTIBLE_LINING
    };
    Supply::HeatFed {
        without_flame: WITHOUT_FLAME,
        fades_s: share.typical * STARVES_S / (3.0 * WITHOUT_FLAME),
    }
}

/// Load and growth at one end.
fn design(contents: &Contents, lean: Lean) -> DesignFire {
    match lean {
        Lean::Low => contents.mildest_fire(),
        Lean::Typical => contents.typical_fire(),
        Lean::High => contents.worst_fire(),
    }
}

/// The fires of the room of origin, the first alight from the start of its curve.
pub(super) fn of_origin(
    inputs: &Inputs<'_>,
    lean: Lean,
    position: Position,
    room: usize,
    fuel: usize,
) -> Vec<Fire> {
    let contents = &inputs.contents;
    let whole = design(contents, lean);
    let growth_share = whole.growth_kw_s2 / contents.growth.typical_kw_s2;
    let origin = contents.origin.map(|origin| &contents.packages[origin]);
    let others = |package: usize| Some(package) != contents.origin;
    let joins: Vec<(usize, &Package)> =
        contents.packages.iter().enumerate().filter(|(package, _)| others(*package)).collect();

    let own_kw = origin.map_or(0.0, |origin| origin.peak_kw) + contents.pile.map_or(0.0, |pile| pile.peak_kw);
    let own_kj =
        origin.map_or(0.0, |origin| origin.energy_kj) + contents.pile.map_or(0.0, |pile| pile.energy_kj);
    let (joining_kw, joining_kj) =
        joins.iter().fold((0.0, 0.0), |(kw, kj), (_, join)| (kw + join.peak_kw, kj + join.energy_kj));
    let first = DesignFire {
        peak_kw: (whole.peak_kw - joining_kw).max(own_kw).max(1.0),
        energy_kj: (whole.energy_kj - joining_kj).max(own_kj).max(1.0),
        ..whole
    };
    let per_area_kw_m2 = origin
        .map(|origin| origin.peak_kw / origin.burning_area_m2)
        .or(contents.pile.map(|pile| pile.heat_release_per_area_kw_m2))
        .unwrap_or(contents.heat_release_per_area_kw_m2);
    let with = |heat_release, base_height_m: f64, diameter_m, position, ignites| Fire {
        room,
        fuel,
        heat_release: HeatRelease::Grown(heat_release),
        base_height_m: base_height_m.min(0.8 * inputs.geometry.height_m),
        diameter_m,
        position,
        radiative_fraction: contents.radiative_share,
        oxygen_limited: true,
        supply: supply(inputs.lined.combustible),
        ignites,
    };
    let mut fires = vec![with(
        first,
        origin.map_or(0.0, |origin| origin.base_height_m),
        diameter_m(first.peak_kw, per_area_kw_m2),
        position,
        Ignition::At(0.0),
    )];
    for (number, join) in joins {
        let grown = DesignFire {
            growth_kw_s2: join.growth_kw_s2 * growth_share,
            peak_kw: join.peak_kw,
            energy_kj: join.energy_kj,
            decay_from_share: DECAY_FROM_SHARE,
        };
        fires.push(with(
            grown,
            join.base_height_m,
            diameter_m(join.peak_kw, join.peak_kw / join.burning_area_m2),
            Position::Centre,
            joins_at(contents, number, growth_share),
        ));
    }
    if let Some(lining) = lining(inputs) {
        let diameter_m = diameter_m(lining.peak_kw, LINING_KW_M2);
        let ignites = Ignition::SurfaceTemperature(LINING_IGNITES_K);
        fires.push(with(lining, 0.5 * inputs.geometry.height_m, diameter_m, Position::Wall, ignites));
    }
    fires
}

/// By the flame of the origin where that is hot enough, sooner with faster growth as a t² fire is; else by the layer.
fn joins_at(contents: &Contents, package: usize, growth_share: f64) -> Ignition {
    match contents.takes_fire.iter().find(|taken| taken.package == package) {
        Some(taken) => Ignition::At(taken.at_s / growth_share.sqrt()),
        None => Ignition::Flux(contents::ignitability(contents.packages[package].ease).flux_kw_m2()),
    }
}

/// The contents of another room, lit by the heat of its layer.
pub(super) fn of_other(inputs: &Inputs<'_>, lean: Lean, room: usize, fuel: usize) -> Option<Fire> {
    let contents = &inputs.contents;
    let whole = design(contents, lean);
    (whole.reached_kw() > 0.0).then(|| Fire {
        room,
        fuel,
        heat_release: HeatRelease::Grown(whole),
        base_height_m: 0.0,
        diameter_m: diameter_m(whole.peak_kw, contents.heat_release_per_area_kw_m2),
        position: Position::Centre,
        radiative_fraction: contents.radiative_share,
        oxygen_limited: true,
        supply: supply(inputs.lined.combustible),
        ignites: Ignition::Flux(spread::Ignitability::Normal.flux_kw_m2()),
    })
}

/// Walls and ceiling that burn, as one fire.
fn lining(inputs: &Inputs<'_>) -> Option<DesignFire> {
    let (area_m2, kg) = inputs.lined.burning().fold((0.0, 0.0), |(area_m2, kg), surface| {
        let burns_m = surface.thickness_m.min(LINING_BURNS_M);
        (area_m2 + surface.area_m2, kg + surface.area_m2 * burns_m * surface.density_kg_m3)
    });
    (area_m2 > 0.0).then_some(DesignFire {
        growth_kw_s2: LINING_GROWTH_KW_S2,
        peak_kw: LINING_KW_M2 * area_m2,
        energy_kj: LINING_KJ_KG * kg,
        decay_from_share: DECAY_FROM_SHARE,
    })
}

fn diameter_m(peak_kw: f64, per_area_kw_m2: f64) -> f64 {
    equivalent_diameter_m(peak_kw.min(DRAWN_AT_KW) / per_area_kw_m2.max(1.0)).max(0.1)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn gas_after_the_flame_is_as_much_as_the_screen_counts() {
        // By hand: half of typical heat released in 240 s of t² growth is 0.5 · Q · 80 s = 40 Q; half of Q fading in 80 s
        // is 40 Q too.
        let Supply::HeatFed { without_flame, fades_s } = supply(false) else {
            panic!("solids are fed by heat")
        };

        assert!((without_flame * fades_s - 40.0).abs() < 1e-9);
    }
}
