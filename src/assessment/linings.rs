//! The linings of a room: surfaces for the methods, and what those that burn do to the fire.

use super::assumed::{Account, Found, find};
use super::findings::{AssumedValue, LiningFinding, Provenance};
use super::geometry::Geometry;
use crate::catalogue::Catalogue;
use crate::domain::Room;
use crate::domain::properties::{ExposedGrowth, MaterialProperties};
use crate::domain::room::{Lining, ReactionToFire};
use crate::fire::linings::{Surface, penetration_time_s};

/// Names of the three, as on the wire.
const NAMES: [&str; 3] = ["walls", "ceiling", "floor"];
/// What is taken where nobody recorded a lining: board in front of whatever carries, concrete below. Ours.
const DEFAULT_KEYS: [&str; 3] = ["gypsum_board", "gypsum_board", "concrete"];

/// The linings, resolved.
#[derive(Debug, Clone)]
pub(super) struct Lined<'c> {
    /// Walls, ceiling, floor, without regard to openings.
    pub surfaces: [Surface; 3],
    /// Growth that a burning lining sets at least, kW/s².
    pub least_growth_kw_s2: Option<f64>,
    /// A lining of walls or ceiling burns.
    pub combustible: bool,
    /// Which of the three nobody recorded.
    pub unrecorded: [bool; 3],
    /// A property is recalled.
    pub recalled: bool,
    found: [Found<'c, MaterialProperties>; 3],
    growths: [Option<ExposedGrowth>; 3],
}

/// Fields of the account, by surface: material, thickness, conductivity, density, specific heat.
const FIELDS: [[&str; 5]; 3] = [
    [
        "linings.walls.material",
        "linings.walls.thickness_m",
        "linings.walls.conductivity_w_mk",
        "linings.walls.density_kg_m3",
        "linings.walls.specific_heat_j_kgk",
    ],
    [
        "linings.ceiling.material",
        "linings.ceiling.thickness_m",
        "linings.ceiling.conductivity_w_mk",
        "linings.ceiling.density_kg_m3",
        "linings.ceiling.specific_heat_j_kgk",
    ],
    [
        "linings.floor.material",
        "linings.floor.thickness_m",
        "linings.floor.conductivity_w_mk",
        "linings.floor.density_kg_m3",
        "linings.floor.specific_heat_j_kgk",
    ],
];

impl<'c> Lined<'c> {
    /// Reads the linings; the error names the catalogue key that is not there.
    pub fn of(
        room: &'c Room,
        geometry: &Geometry,
        catalogue: &'c Catalogue,
        account: &mut Account,
    ) -> Result<Self, String> {
        let recorded = [&room.linings.walls, &room.linings.ceiling, &room.linings.floor];
        let areas_m2 = [geometry.wall_area_m2(), geometry.floor_area_m2, geometry.floor_area_m2];
        let one = |place: usize, account: &mut Account| {
            resolve(recorded[place].as_ref(), place, areas_m2[place], catalogue, account)
        };
        let walls = one(0, account)?;
        let ceiling = one(1, account)?;
        let floor = one(2, account)?;

        // Flame spreads down or along a floor covering late: only walls and ceiling set the growth.
        let growths = [walls.growth, ceiling.growth, None];
        let least_growth_kw_s2 =
            growths.iter().flatten().map(|growth| growth.least_growth_kw_s2()).max_by(f64::total_cmp);
        let found = [walls.found, ceiling.found, floor.found];
        Ok(Self {
            surfaces: [walls.surface, ceiling.surface, floor.surface],
            least_growth_kw_s2,
            combustible: growths.iter().any(Option::is_some),
            unrecorded: recorded.map(|lining| lining.is_none()),
            recalled: found.iter().any(Found::recalled),
            found,
            growths,
        })
    }

    /// The surfaces where an opening takes its area from the walls.
    pub fn around(&self, opening_area_m2: f64) -> Surfaces {
        let [mut walls, ceiling, floor] = self.surfaces;
        walls.area_m2 = (walls.area_m2 - opening_area_m2).max(0.0);
        Surfaces::of([walls, ceiling, floor])
    }

    /// The surfaces of walls and ceiling that burn.
    pub fn burning(&self) -> impl Iterator<Item = &Surface> {
        self.surfaces
            .iter()
            .zip(&self.growths)
            .filter(|(_, growth)| growth.is_some())
            .map(|(surface, _)| surface)
    }

    /// What the report says of each.
    pub fn findings(&self) -> Vec<LiningFinding> {
        (0..3)
            .map(|place| {
                let found = &self.found[place];
                let growth = self.growths[place];
                LiningFinding {
                    surface: NAMES[place],
                    material: found.key().to_owned(),
                    combustible: found.properties.combustible,
                    least_growth_kw_s2: growth.map(ExposedGrowth::least_growth_kw_s2),
                    penetration_s: penetration_time_s(&self.surfaces[place]),
                    words: growth.map(|growth| {
                        format!(
                            "The lining of the {} burns and joins the fire: growth is at least {}.",
                            NAMES[place],
                            match growth {
                                ExposedGrowth::Fast => "fast",
                                ExposedGrowth::UltraFast => "ultra-fast",
                            }
                        )
                    }),
                }
            })
            .collect()
    }
}

/// The surfaces as the methods sum over them: those that are lined alike as one, which spares the hot loops a third.
#[derive(Debug, Clone, Copy)]
pub(super) struct Surfaces {
    list: [Surface; 3],
    count: usize,
}

impl Surfaces {
    fn of([walls, ceiling, floor]: [Surface; 3]) -> Self {
        let mut surfaces = Self { list: [walls, ceiling, floor], count: 1 };
        for next in [ceiling, floor] {
            let alike = surfaces.list[..surfaces.count]
                .iter_mut()
                .find(|one| Surface { area_m2: next.area_m2, ..**one } == next);
            match alike {
                Some(one) => one.area_m2 += next.area_m2,
                None => {
                    surfaces.list[surfaces.count] = next;
                    surfaces.count += 1;
                }
            }
        }
        surfaces
    }

    /// The surfaces where the linings take less heat (share below 1) or more.
    ///
    /// Conductivity and density go together, so that the conductance changes in proportion at every time: with
    /// the conductivity alone the penetration time would move, and at its jump a better insulator would seem worse.
    pub fn taking_heat(mut self, share: f64) -> Self {
        for surface in &mut self.list {
            surface.conductivity_w_mk *= share;
            surface.density_kg_m3 *= share;
        }
        self
    }
}

impl std::ops::Deref for Surfaces {
    type Target = [Surface];

    fn deref(&self) -> &[Surface] {
        &self.list[..self.count]
    }
}

struct One<'c> {
    surface: Surface,
    found: Found<'c, MaterialProperties>,
    growth: Option<ExposedGrowth>,
}

fn resolve<'c>(
    lining: Option<&'c Lining>,
    place: usize,
    area_m2: f64,
    catalogue: &'c Catalogue,
    account: &mut Account,
) -> Result<One<'c>, String> {
    let [material, thickness, conductivity, density, specific_heat] = FIELDS[place];
    let found = match lining {
        Some(lining) => find(&lining.material, |key| catalogue.material(key))
            .ok_or_else(|| format!("material {:?}", lining.material))?,
        None => {
            let key = DEFAULT_KEYS[place];
            account.enter(
                material,
                AssumedValue::Text(key.into()),
                "this project's default where no lining is recorded",
                Provenance::Estimated,
            );
            let row = catalogue.material(key).ok_or_else(|| format!("material {key}"))?;
            Found { properties: &row.properties, row: Some(row) }
        }
    };
    let properties = found.properties;
    let thickness_m = match lining.and_then(|lining| lining.thickness_m) {
        Some(recorded) => recorded.get(),
        None => {
            account.row(thickness, properties.thickness_m, &found, "thickness_m");
            properties.thickness_m
        }
    };
    account.row(conductivity, properties.conductivity_w_mk, &found, "conductivity_w_mk");
    account.row(density, properties.density_kg_m3, &found, "density_kg_m3");
    account.row(specific_heat, properties.specific_heat_j_kgk, &found, "specific_heat_j_kgk");
    Ok(One {
        surface: Surface {
            area_m2,
            conductivity_w_mk: properties.conductivity_w_mk,
            density_kg_m3: properties.density_kg_m3,
            specific_heat_j_kgk: properties.specific_heat_j_kgk,
            thickness_m,
        },
        found,
        growth: growth_by(lining.and_then(|lining| lining.reaction_to_fire), properties),
    })
}

/// Growth that a lining sets: by its recorded class, else by its material.
///
/// Classes A1 to B do not take a room to flashover in the reference test, C and D do late, E and F early
/// (EN 13501-1 after EN 14390, from memory); the growth that follows from it is this project's rule.
fn growth_by(class: Option<ReactionToFire>, material: &MaterialProperties) -> Option<ExposedGrowth> {
    use ReactionToFire::{A1, A2, B, C, D, E, F};

    match class {
        Some(A1 | A2 | B) => None,
        Some(C | D) => Some(ExposedGrowth::Fast),
        Some(E | F) => Some(ExposedGrowth::UltraFast),
        None => material.exposed_growth.or_else(|| material.combustible.then_some(ExposedGrowth::Fast)),
    }
}
