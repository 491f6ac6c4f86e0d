//! What a catalogue name stands for.
//!
//! A building may name a row of the catalogue or carry these numbers itself, so they belong
//! to the domain. Every number has limits, which stand once in each structure's `LIMITS`:
//! whoever reads input checks against them, and whoever describes input prints them.
//!
//! The limits are ours. They are set wide of anything met in buildings or in the catalogue,
//! to stop slips of unit or decimal point, not to judge data.

use super::named::Named;

/// The numbers between which a member must lie, both ends included.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Limit {
    /// Name of the member, as in the structure and on the wire.
    pub member: &'static str,
    /// Smallest value accepted.
    pub least: f64,
    /// Largest value accepted.
    pub most: f64,
}

/// Why a set of properties cannot be used.
#[derive(Debug, Clone, PartialEq)]
pub struct PropertyFault {
    /// Name of the member at fault.
    pub member: &'static str,
    /// What is wrong with it, as a sentence for people.
    pub reason: String,
}

/// What every set of properties can say about itself.
pub trait Properties {
    /// Limits of every number, in the order of the members.
    const LIMITS: &'static [Limit];

    /// The numbers that are given, by member.
    fn numbers(&self) -> Vec<(&'static str, f64)>;

    /// Pairs of members of which the first must not exceed the second.
    fn ordered(&self) -> Vec<[&'static str; 2]> {
        Vec::new()
    }

    /// What else is wrong, beyond single numbers and pairs.
    fn own_fault(&self) -> Option<PropertyFault> {
        None
    }

    /// Every number out of its limits, every pair that contradicts itself, and what else is wrong.
    fn faults(&self) -> Vec<PropertyFault> {
        let numbers = self.numbers();
        let value = |member| numbers.iter().find(|(name, _)| *name == member).map(|(_, v)| *v);

        let mut faults = Vec::new();
        for limit in Self::LIMITS {
            if let Some(v) = value(limit.member)
                && !(limit.least..=limit.most).contains(&v)
            {
                let Limit { member, least, most } = *limit;
                faults.push(PropertyFault { member, reason: format!("must lie between {least} and {most}") });
            }
        }
        for [low, high] in self.ordered() {
            if let (Some(a), Some(b)) = (value(low), value(high))
                && a > b
            {
                faults.push(PropertyFault { member: low, reason: format!("must not exceed `{high}`") });
            }
        }
        faults.extend(self.own_fault());
        faults
    }
}

const fn limit(member: &'static str, least: f64, most: f64) -> Limit {
    Limit { member, least, most }
}

/// Keeps the numbers that are given.
fn given<const N: usize>(members: [(&'static str, Option<f64>); N]) -> Vec<(&'static str, f64)> {
    members.into_iter().filter_map(|(name, value)| Some((name, value?))).collect()
}

/// What a room is used for: how much there is to burn, and how fast it gets going.
#[derive(Debug, Clone, PartialEq)]
pub struct UseProperties {
    /// Mean fire load, net heat per floor area. 1 to 50 000 MJ/m².
    pub fire_load_mean_mj_m2: f64,
    /// Fire load that 80 % of such rooms stay below. At least the mean.
    pub fire_load_p80_mj_m2: f64,
    /// Fire load that 95 % of such rooms stay below. At least the 80 % fractile.
    pub fire_load_p95_mj_m2: f64,
    /// Growth coefficient α of the t² fire. 0.0001 to 50 kW/s².
    pub growth_kw_s2: f64,
    /// Heat release per burning floor area, fuel-controlled. 10 to 20 000 kW/m².
    pub heat_release_per_area_kw_m2: f64,
    /// People sleep here.
    pub sleeping: bool,
    /// The way out leads through here: corridor, stair, lobby.
    pub way_out: bool,
    /// The fuel that the contents burn as.
    pub fuel: Named<FuelProperties>,
}

impl Properties for UseProperties {
    const LIMITS: &'static [Limit] = &[
        limit("fire_load_mean_mj_m2", 1.0, 50_000.0),
        limit("fire_load_p80_mj_m2", 1.0, 50_000.0),
        limit("fire_load_p95_mj_m2", 1.0, 50_000.0),
        limit("growth_kw_s2", 0.0001, 50.0),
        limit("heat_release_per_area_kw_m2", 10.0, 20_000.0),
    ];

    fn numbers(&self) -> Vec<(&'static str, f64)> {
        vec![
            ("fire_load_mean_mj_m2", self.fire_load_mean_mj_m2),
            ("fire_load_p80_mj_m2", self.fire_load_p80_mj_m2),
            ("fire_load_p95_mj_m2", self.fire_load_p95_mj_m2),
            ("growth_kw_s2", self.growth_kw_s2),
            ("heat_release_per_area_kw_m2", self.heat_release_per_area_kw_m2),
        ]
    }

    fn ordered(&self) -> Vec<[&'static str; 2]> {
        vec![["fire_load_mean_mj_m2", "fire_load_p80_mj_m2"], ["fire_load_p80_mj_m2", "fire_load_p95_mj_m2"]]
    }
}

/// How readily a thing takes fire from the radiation of another.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum IgnitionEase {
    /// Thin things: curtains, loose paper.
    Easy,
    /// Upholstered furniture and most solids.
    Normal,
    /// Wood 13 mm and thicker, hard surfaces.
    Hard,
}

impl IgnitionEase {
    /// Every one of them, for reading names and printing them.
    pub const ALL: [Self; 3] = [Self::Easy, Self::Normal, Self::Hard];

    /// Received flux at which the thing is taken to ignite, in kW/m²: 10, 20 and 40.
    ///
    /// Source: Babrauskas, *Will the second item ignite?*, Fire Safety Journal 4 (1981/82).
    /// The study was seen cited; its figures are from memory.
    pub const fn critical_flux_kw_m2(self) -> f64 {
        match self {
            Self::Easy => 10.0,
            Self::Normal => 20.0,
            Self::Hard => 40.0,
        }
    }

    /// Name on the wire and in the catalogue.
    pub const fn name(self) -> &'static str {
        match self {
            Self::Easy => "easy",
            Self::Normal => "normal",
            Self::Hard => "hard",
        }
    }
}

/// A thing that stands in a room and burns as one.
#[derive(Debug, Clone, PartialEq)]
pub struct ItemProperties {
    /// Mass before the fire. 0.01 to 200 000 kg.
    pub mass_kg: f64,
    /// Heat it can release. 0.1 to 5 000 000 MJ.
    pub energy_mj: f64,
    /// Highest heat release, burning freely. 1 to 500 000 kW.
    pub peak_kw: f64,
    /// Growth coefficient α of its t² fire. 0.0001 to 50 kW/s².
    pub growth_kw_s2: f64,
    /// Area it burns over, seen from above. 0.01 to 1000 m².
    pub burning_area_m2: f64,
    /// Height of its top above its foot. 0.01 to 50 m.
    pub height_m: f64,
    /// The fuel it burns as.
    pub fuel: Named<FuelProperties>,
    /// How readily it takes fire from another.
    pub ignition: IgnitionEase,
}

impl Properties for ItemProperties {
    const LIMITS: &'static [Limit] = &[
        limit("mass_kg", 0.01, 200_000.0),
        limit("energy_mj", 0.1, 5_000_000.0),
        limit("peak_kw", 1.0, 500_000.0),
        limit("growth_kw_s2", 0.0001, 50.0),
        limit("burning_area_m2", 0.01, 1000.0),
        limit("height_m", 0.01, 50.0),
    ];

    fn numbers(&self) -> Vec<(&'static str, f64)> {
        vec![
            ("mass_kg", self.mass_kg),
            ("energy_mj", self.energy_mj),
            ("peak_kw", self.peak_kw),
            ("growth_kw_s2", self.growth_kw_s2),
            ("burning_area_m2", self.burning_area_m2),
            ("height_m", self.height_m),
        ]
    }
}

/// What burns: heat, composition and what it gives off in plenty of air.
#[derive(Debug, Clone, PartialEq)]
pub struct FuelProperties {
    /// Net heat of complete combustion. 1 to 150 MJ/kg.
    pub heat_of_combustion_mj_kg: f64,
    /// Heat really released in well-ventilated burning. 1 to 150 MJ/kg, at most the former.
    pub chemical_heat_mj_kg: f64,
    /// Share of the chemical heat that leaves as radiation. 0 to 0.9.
    pub radiative_fraction: f64,
    /// Atoms of carbon in the formula as printed. 0 to 1000, as all counts here.
    pub carbon: f64,
    /// Atoms of hydrogen.
    pub hydrogen: f64,
    /// Atoms of oxygen.
    pub oxygen: f64,
    /// Atoms of nitrogen.
    pub nitrogen: f64,
    /// Atoms of chlorine.
    pub chlorine: f64,
    /// Carbon monoxide per fuel burnt, well ventilated. 0 to 1 kg/kg. None: not in the source.
    pub co_yield_kg_kg: Option<f64>,
    /// Soot per fuel burnt, well ventilated. 0 to 1 kg/kg. None: not in the source.
    pub soot_yield_kg_kg: Option<f64>,
    /// Hydrogen cyanide per fuel burnt, well ventilated. 0 to 1 kg/kg. None: not in the source.
    pub hcn_yield_kg_kg: Option<f64>,
    /// Air that burns one kilogram completely, from the formula. 0.1 to 60 kg/kg.
    pub stoichiometric_air_kg_kg: f64,
}

impl Properties for FuelProperties {
    const LIMITS: &'static [Limit] = &[
        limit("heat_of_combustion_mj_kg", 1.0, 150.0),
        limit("chemical_heat_mj_kg", 1.0, 150.0),
        limit("radiative_fraction", 0.0, 0.9),
        limit("carbon", 0.0, 1000.0),
        limit("hydrogen", 0.0, 1000.0),
        limit("oxygen", 0.0, 1000.0),
        limit("nitrogen", 0.0, 1000.0),
        limit("chlorine", 0.0, 1000.0),
        limit("co_yield_kg_kg", 0.0, 1.0),
        limit("soot_yield_kg_kg", 0.0, 1.0),
        limit("hcn_yield_kg_kg", 0.0, 1.0),
        limit("stoichiometric_air_kg_kg", 0.1, 60.0),
    ];

    fn numbers(&self) -> Vec<(&'static str, f64)> {
        given([
            ("heat_of_combustion_mj_kg", Some(self.heat_of_combustion_mj_kg)),
            ("chemical_heat_mj_kg", Some(self.chemical_heat_mj_kg)),
            ("radiative_fraction", Some(self.radiative_fraction)),
            ("carbon", Some(self.carbon)),
            ("hydrogen", Some(self.hydrogen)),
            ("oxygen", Some(self.oxygen)),
            ("nitrogen", Some(self.nitrogen)),
            ("chlorine", Some(self.chlorine)),
            ("co_yield_kg_kg", self.co_yield_kg_kg),
            ("soot_yield_kg_kg", self.soot_yield_kg_kg),
            ("hcn_yield_kg_kg", self.hcn_yield_kg_kg),
            ("stoichiometric_air_kg_kg", Some(self.stoichiometric_air_kg_kg)),
        ])
    }

    fn ordered(&self) -> Vec<[&'static str; 2]> {
        vec![["chemical_heat_mj_kg", "heat_of_combustion_mj_kg"]]
    }

    /// Without carbon or hydrogen the formula has nothing to burn.
    fn own_fault(&self) -> Option<PropertyFault> {
        (self.carbon == 0.0 && self.hydrogen == 0.0).then(|| PropertyFault {
            member: "carbon",
            reason: "must be above 0 when `hydrogen` is 0".into(),
        })
    }
}

/// What a combustible lining does to the growth of a fire in its room.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum ExposedGrowth {
    /// The fire grows fast at least.
    Fast,
    /// The fire grows ultra-fast at least: bare foam, fibreboard.
    UltraFast,
}

impl ExposedGrowth {
    /// Every one of them, for reading names and printing them.
    pub const ALL: [Self; 2] = [Self::Fast, Self::UltraFast];

    /// Least growth coefficient of a fire in a room so lined, in kW/s².
    ///
    /// The classes are those of EN 1991-1-2, Table E.5 (1 MW in 150 s and in 75 s, from
    /// memory); that a lining sets them is this project's rule for screening.
    pub const fn least_growth_kw_s2(self) -> f64 {
        match self {
            Self::Fast => 0.04444,
            Self::UltraFast => 0.17778,
        }
    }

    /// Name on the wire and in the catalogue.
    pub const fn name(self) -> &'static str {
        match self {
            Self::Fast => "fast",
            Self::UltraFast => "ultra_fast",
        }
    }
}

/// What a wall, ceiling or floor is lined with.
#[derive(Debug, Clone, PartialEq)]
pub struct MaterialProperties {
    /// Thermal conductivity. 0.005 to 500 W/(m K).
    pub conductivity_w_mk: f64,
    /// Density. 1 to 25 000 kg/m³.
    pub density_kg_m3: f64,
    /// Specific heat. 100 to 10 000 J/(kg K).
    pub specific_heat_j_kgk: f64,
    /// Thickness it usually has. 0.0001 to 5 m.
    pub thickness_m: f64,
    /// It burns.
    pub combustible: bool,
    /// What it does to growth when a flame can reach it. None: nothing.
    pub exposed_growth: Option<ExposedGrowth>,
}

impl Properties for MaterialProperties {
    const LIMITS: &'static [Limit] = &[
        limit("conductivity_w_mk", 0.005, 500.0),
        limit("density_kg_m3", 1.0, 25_000.0),
        limit("specific_heat_j_kgk", 100.0, 10_000.0),
        limit("thickness_m", 0.0001, 5.0),
    ];

    fn numbers(&self) -> Vec<(&'static str, f64)> {
        vec![
            ("conductivity_w_mk", self.conductivity_w_mk),
            ("density_kg_m3", self.density_kg_m3),
            ("specific_heat_j_kgk", self.specific_heat_j_kgk),
            ("thickness_m", self.thickness_m),
        ]
    }
}

/// How much a room leaks through its boundaries, shut doors and windows aside.
///
/// Areas of leak per area of boundary, to be used with a flow coefficient of 0.65.
#[derive(Debug, Clone, PartialEq)]
pub struct LeakageProperties {
    /// Through walls. 0 to 0.1 m²/m², as the others.
    pub wall_m2_m2: f64,
    /// Through the floor.
    pub floor_m2_m2: f64,
    /// Through the ceiling.
    pub ceiling_m2_m2: f64,
}

impl Properties for LeakageProperties {
    const LIMITS: &'static [Limit] =
        &[limit("wall_m2_m2", 0.0, 0.1), limit("floor_m2_m2", 0.0, 0.1), limit("ceiling_m2_m2", 0.0, 0.1)];

    fn numbers(&self) -> Vec<(&'static str, f64)> {
        vec![
            ("wall_m2_m2", self.wall_m2_m2),
            ("floor_m2_m2", self.floor_m2_m2),
            ("ceiling_m2_m2", self.ceiling_m2_m2),
        ]
    }
}

/// What a detector feels.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum DetectorKind {
    /// Smoke at a point of the ceiling.
    SmokePoint,
    /// Smoke along a beam of light.
    SmokeBeam,
    /// Smoke in air drawn through pipes.
    SmokeAspirating,
    /// A fixed temperature.
    HeatFixed,
    /// A rate of temperature rise, or a fixed temperature if that comes first.
    HeatRateOfRise,
}

impl DetectorKind {
    /// Every one of them, for reading names and printing them.
    pub const ALL: [Self; 5] =
        [Self::SmokePoint, Self::SmokeBeam, Self::SmokeAspirating, Self::HeatFixed, Self::HeatRateOfRise];

    /// Name on the wire and in the catalogue.
    pub const fn name(self) -> &'static str {
        match self {
            Self::SmokePoint => "smoke_point",
            Self::SmokeBeam => "smoke_beam",
            Self::SmokeAspirating => "smoke_aspirating",
            Self::HeatFixed => "heat_fixed",
            Self::HeatRateOfRise => "heat_rate_of_rise",
        }
    }
}

/// A detector, by what makes it act. It acts on whichever of its criteria is met first.
#[derive(Debug, Clone, PartialEq)]
pub struct DetectorProperties {
    /// What it feels.
    pub kind: DetectorKind,
    /// Response time index, √(m s). 0.1 to 1000. None: it follows the gas without delay.
    pub response_time_index_sqrt_ms: Option<f64>,
    /// Temperature of its element at which it acts. 20 to 400 °C.
    pub activation_c: Option<f64>,
    /// Rise of its element's temperature, over the start, at which it acts. 0.1 to 400 K.
    pub activation_rise_k: Option<f64>,
    /// Rate of that rise at which it acts. 0.5 to 200 K/min.
    pub activation_rate_k_min: Option<f64>,
    /// Optical density (to base ten) of the smoke at it at which it acts. 0.0001 to 10 1/m.
    pub activation_optical_density_1_m: Option<f64>,
}

impl Properties for DetectorProperties {
    const LIMITS: &'static [Limit] = &[
        limit("response_time_index_sqrt_ms", 0.1, 1000.0),
        limit("activation_c", 20.0, 400.0),
        limit("activation_rise_k", 0.1, 400.0),
        limit("activation_rate_k_min", 0.5, 200.0),
        limit("activation_optical_density_1_m", 0.0001, 10.0),
    ];

    fn numbers(&self) -> Vec<(&'static str, f64)> {
        given([
            ("response_time_index_sqrt_ms", self.response_time_index_sqrt_ms),
            ("activation_c", self.activation_c),
            ("activation_rise_k", self.activation_rise_k),
            ("activation_rate_k_min", self.activation_rate_k_min),
            ("activation_optical_density_1_m", self.activation_optical_density_1_m),
        ])
    }

    /// A detector without a criterion would never act.
    fn own_fault(&self) -> Option<PropertyFault> {
        let criteria = self.numbers().iter().filter(|(member, _)| member.starts_with("activation_")).count();
        (criteria == 0).then(|| PropertyFault {
            member: "activation_rise_k",
            reason: "must be given, or another criterion that makes the detector act".into(),
        })
    }
}

/// A sprinkler head, by what opens it and what it then gives.
#[derive(Debug, Clone, PartialEq)]
pub struct SprinklerProperties {
    /// Response time index, √(m s). 1 to 1000.
    pub response_time_index_sqrt_ms: f64,
    /// Conduction factor C, √(m/s): heat its frame draws from the element. 0 to 10.
    pub conduction_factor_sqrt_m_s: f64,
    /// Temperature of its element at which it opens. 30 to 400 °C.
    pub activation_c: f64,
    /// Water reaching the floor, per area. 0.001 to 5 mm/s.
    pub spray_density_mm_s: f64,
}

impl Properties for SprinklerProperties {
    const LIMITS: &'static [Limit] = &[
        limit("response_time_index_sqrt_ms", 1.0, 1000.0),
        limit("conduction_factor_sqrt_m_s", 0.0, 10.0),
        limit("activation_c", 30.0, 400.0),
        limit("spray_density_mm_s", 0.001, 5.0),
    ];

    fn numbers(&self) -> Vec<(&'static str, f64)> {
        vec![
            ("response_time_index_sqrt_ms", self.response_time_index_sqrt_ms),
            ("conduction_factor_sqrt_m_s", self.conduction_factor_sqrt_m_s),
            ("activation_c", self.activation_c),
            ("spray_density_mm_s", self.spray_density_mm_s),
        ]
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn gypsum() -> MaterialProperties {
        MaterialProperties {
            conductivity_w_mk: 0.17,
            density_kg_m3: 960.0,
            specific_heat_j_kgk: 1100.0,
            thickness_m: 0.0125,
            combustible: false,
            exposed_growth: None,
        }
    }

    fn storage() -> UseProperties {
        UseProperties {
            fire_load_mean_mj_m2: 1180.0,
            fire_load_p80_mj_m2: 1800.0,
            fire_load_p95_mj_m2: 2690.0,
            growth_kw_s2: 0.04444,
            heat_release_per_area_kw_m2: 500.0,
            sleeping: false,
            way_out: false,
            fuel: Named::Catalogue("wood".into()),
        }
    }

    fn members(faults: Vec<PropertyFault>) -> Vec<&'static str> {
        faults.into_iter().map(|fault| fault.member).collect()
    }

    #[test]
    fn plausible_properties_have_no_faults() {
        assert_eq!(gypsum().faults(), vec![]);
        assert_eq!(storage().faults(), vec![]);
    }

    #[test]
    fn both_ends_of_a_limit_are_accepted_and_the_next_number_is_not() {
        for limit in MaterialProperties::LIMITS {
            for (value, fine) in [
                (limit.least, true),
                (limit.most, true),
                (limit.least.next_down(), false),
                (limit.most.next_up(), false),
                (-limit.most, false),
                (f64::NAN, false),
                (f64::INFINITY, false),
            ] {
                let mut material = gypsum();
                let member = match limit.member {
                    "conductivity_w_mk" => &mut material.conductivity_w_mk,
                    "density_kg_m3" => &mut material.density_kg_m3,
                    "specific_heat_j_kgk" => &mut material.specific_heat_j_kgk,
                    "thickness_m" => &mut material.thickness_m,
                    other => panic!("a limit without a member: {other}"),
                };
                *member = value;

                let want = if fine { vec![] } else { vec![limit.member] };
                assert_eq!(members(material.faults()), want, "{} = {value}", limit.member);
            }
        }
    }

    #[test]
    fn every_fault_is_reported_at_once() {
        let nonsense = MaterialProperties { density_kg_m3: -1.0, thickness_m: f64::NAN, ..gypsum() };

        assert_eq!(members(nonsense.faults()), ["density_kg_m3", "thickness_m"]);
    }

    #[test]
    fn fractiles_must_not_fall() {
        let falling = UseProperties { fire_load_p80_mj_m2: 1000.0, fire_load_p95_mj_m2: 900.0, ..storage() };

        assert_eq!(members(falling.faults()), ["fire_load_mean_mj_m2", "fire_load_p80_mj_m2"]);
    }

    #[test]
    fn what_is_not_given_has_no_fault() {
        let silent = DetectorProperties {
            kind: DetectorKind::SmokePoint,
            response_time_index_sqrt_ms: None,
            activation_c: None,
            activation_rise_k: Some(13.0),
            activation_rate_k_min: None,
            activation_optical_density_1_m: None,
        };

        assert_eq!(silent.faults(), vec![]);
        assert_eq!(silent.numbers(), [("activation_rise_k", 13.0)]);
        let deaf = DetectorProperties { activation_rise_k: None, ..silent };
        assert_eq!(members(deaf.faults()), ["activation_rise_k"]);
    }

    #[test]
    fn a_fuel_needs_carbon_or_hydrogen_and_cannot_release_more_than_it_holds() {
        let methane = FuelProperties {
            heat_of_combustion_mj_kg: 50.1,
            chemical_heat_mj_kg: 49.6,
            radiative_fraction: 0.141,
            carbon: 1.0,
            hydrogen: 4.0,
            oxygen: 0.0,
            nitrogen: 0.0,
            chlorine: 0.0,
            co_yield_kg_kg: None,
            soot_yield_kg_kg: None,
            hcn_yield_kg_kg: None,
            stoichiometric_air_kg_kg: 17.2,
        };
        let hydrogen = FuelProperties { carbon: 0.0, ..methane.clone() };
        let nothing = FuelProperties { hydrogen: 0.0, ..hydrogen.clone() };
        let swapped = FuelProperties { chemical_heat_mj_kg: 51.0, ..methane.clone() };

        assert_eq!(methane.faults(), vec![]);
        assert_eq!(hydrogen.faults(), vec![]);
        assert_eq!(members(nothing.faults()), ["carbon"]);
        assert_eq!(members(swapped.faults()), ["chemical_heat_mj_kg"]);
    }
}
