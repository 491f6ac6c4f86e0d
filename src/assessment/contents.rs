//! What burns in a room: its fire load at three fractiles, its items, and the default fire they give.

use std::borrow::Cow;

use super::assumed::{Account, Found, OWN, find};
use super::findings::{AssumedValue, Provenance};
use super::geometry::Geometry;
use super::linings::Lined;
use crate::catalogue::Catalogue;
use crate::domain::assumptions::{Assumptions, GrowthClass};
use crate::domain::properties::{FuelProperties, IgnitionEase, ItemProperties, UseProperties};
use crate::domain::room::{Basis, Hazard, Storage};
use crate::domain::{Key, Room};
use crate::fire::{DesignFire, design_fire, growth, spread};

/// Radiative share where the fuel is not known: 0.35, common practice.
const RADIATIVE_SHARE: f64 = 0.35;
/// Net heat of combustion where the fuel is not known: 20 MJ/kg of mixed contents, common practice.
const CONTENTS_KJ_KG: f64 = 20_000.0;
/// Clear distance between packages where none was measured. Ours.
const SPACING_M: f64 = 0.5;
/// Share of typical growth at the slow corner; its inverse at the fast one. Half a growth class. Ours.
const SLOW_SHARE: f64 = 0.5;

/// Fire load, MJ per m² of floor.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Load {
    pub p50_mj_m2: f64,
    /// At the fractile asked for.
    pub typical_mj_m2: f64,
    pub p95_mj_m2: f64,
    pub fractile: f64,
    pub recorded: bool,
    /// Median of the use: a room that holds less has less of its floor covered.
    usual_mj_m2: f64,
}

/// Growth, kW/s², at the corners.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Growth {
    pub slow_kw_s2: f64,
    pub typical_kw_s2: f64,
    pub fast_kw_s2: f64,
    /// `assumption`, `item`, `use`, `lining`.
    pub from: &'static str,
}

/// A package as it burns.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Package {
    pub key: Key,
    pub growth_kw_s2: f64,
    pub peak_kw: f64,
    pub energy_kj: f64,
    pub burning_area_m2: f64,
    pub base_height_m: f64,
    pub spacing_m: f64,
    pub ease: IgnitionEase,
    pub recalled: bool,
}

/// Goods in racks or piles as they burn.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Pile {
    pub growth_kw_s2: f64,
    pub peak_kw: f64,
    pub energy_kj: f64,
    pub heat_release_per_area_kw_m2: f64,
    pub height_m: f64,
    pub aisle_m: Option<f64>,
    pub ease: IgnitionEase,
}

/// A package that takes fire from the first, on the clock of the fire's curve.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct TakesFire {
    pub package: usize,
    pub at_s: f64,
    pub distance_m: f64,
}

/// All that burns in a room.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Contents {
    pub use_key: String,
    pub way_out: bool,
    pub sleeping: bool,
    pub load: Load,
    pub growth: Growth,
    pub heat_release_per_area_kw_m2: f64,
    pub floor_area_m2: f64,
    pub radiative_share: f64,
    /// Of what the contents burn as.
    pub heat_of_combustion_kj_kg: f64,
    /// What they burn as; none where it is not known.
    pub fuel: Option<FuelProperties>,
    pub packages: Vec<Package>,
    pub pile: Option<Pile>,
    pub origin: Option<usize>,
    pub takes_fire: Vec<TakesFire>,
    /// Peaks of the origin, of what takes fire from it, and of the pile.
    pub items_peak_kw: f64,
    pub items_energy_kj: f64,
    pub recalled: bool,
}

impl Contents {
    /// Reads what burns in a room; the error names the catalogue key that is not there.
    pub fn of(
        room: &Room,
        geometry: &Geometry,
        lined: &Lined<'_>,
        catalogue: &Catalogue,
        assumptions: &Assumptions,
        account: &mut Account,
    ) -> Result<Self, String> {
        let found = find(&room.room_use, |key| catalogue.use_of(key))
            .ok_or_else(|| format!("use {:?}", room.room_use))?;
        let use_of = found.properties;
        let fuel = find(&use_of.fuel, |key| catalogue.fuel(key));
        if let Some(found) = &fuel {
            let FuelProperties { heat_of_combustion_mj_kg, radiative_fraction, .. } = *found.properties;
            account.row("use.fuel.radiative_fraction", radiative_fraction, found, "radiative_fraction");
            account.row(
                "use.fuel.heat_of_combustion_mj_kg",
                heat_of_combustion_mj_kg,
                found,
                "heat_of_combustion_mj_kg",
            );
        }
        let load = load_of(room, &found, assumptions, account);
        account.row(
            "use.heat_release_per_area_kw_m2",
            use_of.heat_release_per_area_kw_m2,
            &found,
            "heat_release_per_area_kw_m2",
        );

        let packages = packages_of(room, catalogue, account)?;
        let pile = match &room.storage {
            Some(storage) => Some(pile_of(storage, catalogue, account)?),
            None => None,
        };
        let origin = origin_of(&packages, assumptions);
        let growth = growth_of(room, &found, &packages, pile.as_ref(), origin, lined, assumptions, account);
        let radiative_share = fuel.map_or(RADIATIVE_SHARE, |fuel| fuel.properties.radiative_fraction);

        let takes_fire =
            origin.map_or_else(Vec::new, |origin| spread_from(&packages, origin, radiative_share));
        let joined_peak_kw: f64 = takes_fire.iter().map(|t| packages[t.package].peak_kw).sum();
        let origin_peak_kw = origin.map_or(0.0, |origin| packages[origin].peak_kw);
        let pile_peak_kw = pile.map_or(0.0, |pile| pile.peak_kw);
        let items_energy_kj =
            packages.iter().map(|p| p.energy_kj).sum::<f64>() + pile.map_or(0.0, |pile| pile.energy_kj);
        let recalled = found.recalled() || packages.iter().any(|package| package.recalled);
        Ok(Self {
            use_key: found.key().to_owned(),
            way_out: use_of.way_out,
            sleeping: use_of.sleeping,
            load,
            growth,
            heat_release_per_area_kw_m2: use_of.heat_release_per_area_kw_m2,
            floor_area_m2: geometry.floor_area_m2,
            radiative_share,
            heat_of_combustion_kj_kg: fuel
                .map_or(CONTENTS_KJ_KG, |fuel| fuel.properties.heat_of_combustion_mj_kg * 1e3),
            fuel: fuel.map(|fuel| fuel.properties.clone()),
            packages,
            pile,
            origin,
            takes_fire,
            items_peak_kw: origin_peak_kw + joined_peak_kw + pile_peak_kw,
            items_energy_kj,
            recalled,
        })
    }

    /// The default fire with a fire load and a growth, with all the air it wants.
    ///
    /// The floor burns at the heat release per area of the use over the share that is covered: all of it
    /// from the usual load of such rooms on, in proportion below. Items that burn higher than that count
    /// instead. More load never lowers the peak nor the energy.
    pub fn fire(&self, load_mj_m2: f64, growth_kw_s2: f64) -> DesignFire {
        let covered = (load_mj_m2 / self.load.usual_mj_m2).min(1.0);
        let floor_kw = self.heat_release_per_area_kw_m2 * self.floor_area_m2 * covered;
        DesignFire {
            growth_kw_s2,
            peak_kw: floor_kw.max(self.items_peak_kw),
            energy_kj: (load_mj_m2 * self.floor_area_m2 * 1e3).max(self.items_energy_kj),
            decay_from_share: design_fire::DECAY_FROM_SHARE,
        }
    }

    /// The fire with typical inputs.
    pub fn typical_fire(&self) -> DesignFire {
        self.fire(self.load.typical_mj_m2, self.growth.typical_kw_s2)
    }

    /// Much fuel, fast growth.
    pub fn worst_fire(&self) -> DesignFire {
        self.fire(self.load.p95_mj_m2, self.growth.fast_kw_s2)
    }

    /// Little fuel, slow growth.
    pub fn mildest_fire(&self) -> DesignFire {
        self.fire(self.load.p50_mj_m2, self.growth.slow_kw_s2)
    }
}

/// Fire load at the three fractiles.
///
/// A recorded load stands for the fractile asked for. Beside it stand 0.9 and 1.1 times it where it was
/// measured; where it was estimated the spread of EN 1991-1-2 Annex E (coefficient of variation 0.30,
/// Gumbel law; from memory), by hand: median 0.951 and 95 % 1.560 against 80 % 1.217 of the mean.
fn load_of(
    room: &Room,
    found: &Found<'_, UseProperties>,
    assumptions: &Assumptions,
    account: &mut Account,
) -> Load {
    const DEFAULT_FRACTILE: f64 = 0.8;

    let asked = assumptions.fuel_load_fractile.map(|fraction| fraction.get());
    let fractile = asked.unwrap_or(DEFAULT_FRACTILE);
    let usual_mj_m2 = fractile_of(found.properties, 0.5);
    if let Some(recorded) = room.fuel_load_mj_m2 {
        let measured = room.basis.get("fuel_load_mj_m2") == Some(&Basis::Measured);
        let (below, above) = if measured { (0.9, 1.1) } else { (0.951 / 1.217, 1.560 / 1.217) };
        let value = recorded.get();
        return Load {
            p50_mj_m2: value * below,
            typical_mj_m2: value,
            p95_mj_m2: value * above,
            fractile,
            recorded: true,
            usual_mj_m2,
        };
    }
    let typical_mj_m2 = fractile_of(found.properties, fractile);
    account.row("fuel_load_mj_m2", typical_mj_m2, found, "fire_load_p80_mj_m2");
    Load {
        p50_mj_m2: usual_mj_m2.min(typical_mj_m2),
        typical_mj_m2,
        p95_mj_m2: found.properties.fire_load_p95_mj_m2.max(typical_mj_m2),
        fractile,
        recorded: false,
        usual_mj_m2,
    }
}

/// Fire load of a use at any fractile: a straight line in the reduced variate of the Gumbel law through
/// mean and 80 %, and through 80 % and 95 % beyond. Fractiles below 1 % and above 99 % count as those.
fn fractile_of(use_of: &UseProperties, fractile: f64) -> f64 {
    /// Euler's constant: the reduced variate of a Gumbel law's mean.
    const AT_MEAN: f64 = 0.577_215_664_901_532_9;
    let reduced = |p: f64| -(-p.ln()).ln();

    let (at_80, at_95) = (reduced(0.8), reduced(0.95));
    let y = reduced(fractile.clamp(0.01, 0.99));
    let (mean, p80, p95) =
        (use_of.fire_load_mean_mj_m2, use_of.fire_load_p80_mj_m2, use_of.fire_load_p95_mj_m2);
    let value = if y <= at_80 {
        p80 + (p80 - mean) * (y - at_80) / (at_80 - AT_MEAN)
    } else {
        p80 + (p95 - p80) * (y - at_80) / (at_95 - at_80)
    };
    value.max(0.05 * mean)
}

fn packages_of(room: &Room, catalogue: &Catalogue, account: &mut Account) -> Result<Vec<Package>, String> {
    let mut packages = Vec::with_capacity(room.fuel_packages.len());
    for package in &room.fuel_packages {
        let found = find(&package.item, |key| catalogue.item(key))
            .ok_or_else(|| format!("item {:?}", package.item))?;
        let item = found.properties;
        if found.row.is_some() {
            let field = |member: &str| format!("fuel_packages.{}.{member}", package.key);
            account.row(field("peak_kw"), item.peak_kw, &found, "peak_kw");
            account.row(field("growth_kw_s2"), item.growth_kw_s2, &found, "growth_kw_s2");
            account.row(field("energy_mj"), item.energy_mj, &found, "energy_mj");
            if package.mass_kg.is_none() {
                account.row(field("mass_kg"), item.mass_kg, &found, "mass_kg");
            }
        }
        let heavier = package.mass_kg.map_or(1.0, |mass| mass.get() / item.mass_kg);
        let count = f64::from(package.count);
        let spacing_m = package.spacing_m.map_or(SPACING_M, |spacing| spacing.get());
        if package.spacing_m.is_none() && room.fuel_packages.len() > 1 {
            account.own(format!("fuel_packages.{}.spacing_m", package.key), SPACING_M, OWN);
        }
        packages.push(Package {
            key: package.key.clone(),
            growth_kw_s2: item.growth_kw_s2,
            peak_kw: item.peak_kw * count,
            energy_kj: item.energy_mj * 1e3 * heavier * count,
            burning_area_m2: item.burning_area_m2 * count,
            base_height_m: package.base_height_m.get(),
            spacing_m,
            ease: item.ignition,
            recalled: found.recalled(),
        });
    }
    Ok(packages)
}

/// Goods as they burn: the item of the catalogue, scaled by floor covered and by height.
fn pile_of(storage: &Storage, catalogue: &Catalogue, account: &mut Account) -> Result<Pile, String> {
    let found = find(&storage.commodity, |key| catalogue.item(key))
        .ok_or_else(|| format!("commodity {:?}", storage.commodity))?;
    let item: &ItemProperties = found.properties;
    account.row("storage.commodity.peak_kw", item.peak_kw, &found, "peak_kw");
    account.row("storage.commodity.growth_kw_s2", item.growth_kw_s2, &found, "growth_kw_s2");
    let footprint_m2 = storage.footprint_m2.get();
    let height_m = storage.height_m.get();
    let times = footprint_m2 / item.burning_area_m2 * height_m / item.height_m;
    Ok(Pile {
        growth_kw_s2: item.growth_kw_s2,
        peak_kw: item.peak_kw * times,
        energy_kj: item.energy_mj * 1e3 * times,
        heat_release_per_area_kw_m2: item.peak_kw / item.burning_area_m2 * height_m / item.height_m,
        height_m,
        aisle_m: storage.aisle_m.map(|aisle| aisle.get()),
        ease: item.ignition,
    })
}

/// The package asked for, else the fastest-growing; of equals the one that burns highest, then by key.
fn origin_of(packages: &[Package], assumptions: &Assumptions) -> Option<usize> {
    let asked = assumptions.item_of_origin.as_ref();
    if let Some(place) = packages.iter().position(|package| Some(&package.key) == asked) {
        return Some(place);
    }
    (0..packages.len()).max_by(|&a, &b| {
        let (a, b) = (&packages[a], &packages[b]);
        a.growth_kw_s2
            .total_cmp(&b.growth_kw_s2)
            .then(a.peak_kw.total_cmp(&b.peak_kw))
            .then_with(|| b.key.cmp(&a.key))
    })
}

/// Growth and its corners.
///
/// The recorded contents stand among those that the use implies, so the faster of both counts: recording
/// one more thing never makes the fire slower.
#[expect(clippy::too_many_arguments, reason = "each is one of the things that can set the growth")]
fn growth_of(
    room: &Room,
    found: &Found<'_, UseProperties>,
    packages: &[Package],
    pile: Option<&Pile>,
    origin: Option<usize>,
    lined: &Lined<'_>,
    assumptions: &Assumptions,
    account: &mut Account,
) -> Growth {
    if let Some(class) = assumptions.growth {
        let value = coefficient_kw_s2(class);
        return Growth { slow_kw_s2: value, typical_kw_s2: value, fast_kw_s2: value, from: "assumption" };
    }
    let of_use = found.properties.growth_kw_s2;
    let (mut typical, mut from) = (of_use, "use");
    let of_item = origin.map(|origin| packages[origin].growth_kw_s2);
    let of_pile = pile.map(|pile| pile.growth_kw_s2);
    for recorded in of_item.into_iter().chain(of_pile) {
        if recorded >= typical {
            (typical, from) = (recorded, "item");
        }
    }
    if from == "use" {
        account.row("growth_kw_s2", of_use, found, "growth_kw_s2");
    }
    let foam = room.hazards.contains(&Hazard::ExposedFoam);
    let of_foam = foam.then(|| coefficient_kw_s2(GrowthClass::UltraFast));
    for least in lined.least_growth_kw_s2.into_iter().chain(of_foam) {
        if least > typical {
            (typical, from) = (least, "lining");
        }
    }
    account.enter(
        "growth_kw_s2.spread",
        AssumedValue::Text(Cow::Borrowed("half and twice the typical growth at the corners")),
        OWN,
        Provenance::Estimated,
    );
    Growth {
        slow_kw_s2: typical * SLOW_SHARE,
        typical_kw_s2: typical,
        fast_kw_s2: typical / SLOW_SHARE,
        from,
    }
}

/// Packages that take fire by radiation from the origin.
fn spread_from(packages: &[Package], origin: usize, radiative_share: f64) -> Vec<TakesFire> {
    let first = &packages[origin];
    let fire = DesignFire {
        growth_kw_s2: first.growth_kw_s2,
        peak_kw: first.peak_kw,
        energy_kj: first.energy_kj,
        decay_from_share: design_fire::DECAY_FROM_SHARE,
    };
    let radius_m = (first.burning_area_m2 / std::f64::consts::PI).sqrt();
    let mut taken: Vec<TakesFire> = packages
        .iter()
        .enumerate()
        .filter(|&(place, _)| place != origin)
        .filter_map(|(place, package)| {
            let neighbour = spread::Neighbour {
                distance_m: radius_m + package.spacing_m,
                radiative_fraction: radiative_share.max(0.05),
                ignitability: ignitability(package.ease),
            };
            let at_s = spread::ignition_s(&fire, neighbour)?;
            Some(TakesFire { package: place, at_s, distance_m: package.spacing_m })
        })
        .collect();
    taken.sort_by(|a, b| {
        a.at_s.total_cmp(&b.at_s).then_with(|| packages[a.package].key.cmp(&packages[b.package].key))
    });
    taken
}

/// The class of `fire` for the domain's.
pub(super) fn ignitability(ease: IgnitionEase) -> spread::Ignitability {
    match ease {
        IgnitionEase::Easy => spread::Ignitability::Easy,
        IgnitionEase::Normal => spread::Ignitability::Normal,
        IgnitionEase::Hard => spread::Ignitability::Difficult,
    }
}

/// Coefficient of a growth class, kW/s².
pub(super) fn coefficient_kw_s2(class: GrowthClass) -> f64 {
    match class {
        GrowthClass::Slow => growth::GrowthClass::Slow,
        GrowthClass::Medium => growth::GrowthClass::Medium,
        GrowthClass::Fast => growth::GrowthClass::Fast,
        GrowthClass::UltraFast => growth::GrowthClass::UltraFast,
    }
    .coefficient_kw_s2()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn office() -> UseProperties {
        UseProperties {
            fire_load_mean_mj_m2: 420.0,
            fire_load_p80_mj_m2: 511.0,
            fire_load_p95_mj_m2: 655.0,
            growth_kw_s2: 0.01111,
            heat_release_per_area_kw_m2: 250.0,
            sleeping: false,
            way_out: false,
            fuel: crate::domain::Named::Catalogue("wood".to_owned()),
        }
    }

    #[test]
    fn the_fractiles_of_the_table_are_met() {
        assert!((fractile_of(&office(), 0.8) - 511.0).abs() < 1e-9);
        assert!((fractile_of(&office(), 0.95) - 655.0).abs() < 1e-9);
    }

    #[test]
    fn the_median_follows_from_mean_and_80_percent() {
        // By hand: reduced variates 0.36651 (50 %) and 1.49994 (80 %), mean 0.57722:
        // 511 - 91·(1.49994 - 0.36651)/(1.49994 - 0.57722) = 399.2 MJ/m².
        assert!((fractile_of(&office(), 0.5) - 399.2).abs() < 0.1);
    }

    #[test]
    fn fractiles_rise_and_stay_finite_to_both_ends() {
        let values: Vec<f64> = (0..=100).map(|p| fractile_of(&office(), f64::from(p) / 100.0)).collect();

        assert!(values.iter().all(|value| value.is_finite() && *value > 0.0));
        assert!(values.is_sorted());
    }
}
