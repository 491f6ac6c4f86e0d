//! Radiation in a room: flame, two grey layers, grey faces.
//!
//! Two zones meet at the plane of the interface. Within a zone what a face sends is spread over the
//! zone as if well mixed: a share goes through the plane, the rest to the faces of the zone by
//! their area; gas takes its share on the way. Faces send and take [`EMISSIVITY`] of what black ones would; what they
//! throw back is taken as gone to where the rest goes. Every exchange is written once for both partners, so
//! that nothing is lost.

use super::building::{CEILING, FLOOR, LOWER_WALL, RoomData, SURFACES, UPPER_WALL};
use super::gas::FUELS_MAX;
use super::real::Real;
use super::room::{Around, Derived, Inner, black_w_m2, share_in_hot};

/// What makes a layer glow; worked out from its species, taken as fixed within a step.
#[derive(Clone, Copy, Debug, Default)]
pub(super) struct Glow {
    /// Soot in the layer, kg.
    pub soot_kg: f64,
    /// Carbon dioxide and water, mole fraction together; water alone.
    pub gases: f64,
    pub water: f64,
    /// Share of each fuel in the unburned gas.
    pub fuel_shares: [f64; FUELS_MAX],
}

/// Share of what falls on a lining that it takes, and of a black face's power that it sends. Handbook value of
/// plaster, brick, concrete, wood; EN 1991-1-2 takes 0.8.
const EMISSIVITY: f64 = 0.9;
/// Density of soot, kg/m³.
const SOOT_KG_M3: f64 = 1800.0;
/// Absorption by soot per volume fraction and kelvin, 1/(m K).
///
/// Source: [`TIEN_1979`](crate::fire::sources::TIEN_1979).
const SOOT_ABSORBS_1_MK: f64 = 1300.0;

/// Absorption of a layer of a mean path, 1/m: soot, carbon dioxide and water.
///
/// ```text
/// κ = 1300 f_v T + [ (0.78 + 1.6 x_w)/√(x p s) - 0.1 ] (1 - 0.37 T/1000) x p
/// ```
///
/// `x` mole fraction of both gases, `x_w` of water, `p` in atmospheres, `s` in metres. The gas term is the
/// grey fit used for furnaces.
///
/// Source: [`BLOKH_1988`](crate::fire::sources::BLOKH_1988), [`TIEN_1979`](crate::fire::sources::TIEN_1979); from memory.
pub(super) fn absorption_1_m<R: Real>(glow: &Glow, volume_m3: R, temperature_k: R, path_m: R) -> R {
    let soot_share = volume_m3.at_least(1e-6);
    let soot = temperature_k / soot_share * (SOOT_ABSORBS_1_MK * glow.soot_kg.max(0.0) / SOOT_KG_M3);
    let gases = glow.gases.clamp(1e-4, 1.0);
    let thin = (path_m * gases).at_least(1e-4).sqrt();
    let strength = R::constant(0.78 + 1.6 * glow.water) / thin - 0.1;
    let cools = (temperature_k * (-0.37e-3) + 1.0).at_least(0.2);
    soot + (strength * cools).at_least(0.0) * gases
}

/// The two zones of a room.
#[derive(Clone, Copy, Debug)]
pub(super) struct Zones<R> {
    /// Area of faces in the hot, the cool zone, m².
    pub area_m2: [R; 2],
    /// Area of each face in the hot zone, m².
    pub hot_m2: [R; SURFACES],
    /// Area of each face in the cool zone, m².
    pub cool_m2: [R; SURFACES],
    /// Share that each layer takes of what crosses it.
    pub takes: [R; 2],
    /// Area of the plane between, m².
    pub plane_m2: f64,
    /// Mean black power of the faces of each zone, W/m².
    pub faces_w_m2: [R; 2],
    /// Black power of each layer, W/m².
    pub gas_w_m2: [R; 2],
    /// Is there any face at all?
    pub any: bool,
}

/// Works the zones out.
pub(super) fn zones<R: Real>(
    room: &RoomData,
    now: &Derived<R>,
    around: &Around,
    faces_k: &[R; SURFACES],
) -> Zones<R> {
    let zero = R::constant(0.0);
    let half_m = 0.5 * room.height_m;
    let hot_share = [
        R::constant(1.0),
        share_in_hot(now.interface_m, half_m, room.height_m),
        share_in_hot(now.interface_m, 0.0, half_m),
        zero,
    ];
    let mut area = [zero; 2];
    let mut power = [zero; 2];
    let mut hot_m2 = [zero; SURFACES];
    let mut cool_m2 = [zero; SURFACES];
    for surface in [CEILING, UPPER_WALL, LOWER_WALL, FLOOR] {
        let whole = room.areas_m2[surface];
        if whole <= 0.0 {
            continue;
        }
        let hot = hot_share[surface] * whole;
        let cool = -hot + whole;
        let black = black_w_m2(faces_k[surface]);
        area = [area[0] + hot, area[1] + cool];
        power = [power[0] + black * hot, power[1] + black * cool];
        hot_m2[surface] = hot;
        cool_m2[surface] = cool;
    }
    let least = 1e-9;
    let plane_m2 = room.floor_area_m2;
    // Mean beam: 3.6 times volume over the area around it.
    let upper_m = -now.interface_m + room.height_m;
    let beam = |height_m: R| height_m * (3.6 * plane_m2) / (height_m * room.perimeter_m + 2.0 * plane_m2);
    let upper_beam = beam(upper_m.at_least(1e-3 * room.height_m));
    let lower_beam = beam(now.interface_m.at_least(1e-3 * room.height_m));
    let takes = |glow: &Glow, volume: R, temperature: R, path: R| {
        -(-(absorption_1_m(glow, volume, temperature, path) * path)).exp() + 1.0
    };
    let upper_m3 = upper_m.at_least(1e-3 * room.height_m) * plane_m2;
    Zones {
        area_m2: area,
        hot_m2,
        cool_m2,
        takes: [
            takes(&around.glow[0], upper_m3, now.upper_k, upper_beam),
            takes(&around.glow[1], now.lower_m3, now.lower_k, lower_beam),
        ],
        plane_m2,
        faces_w_m2: [power[0] / area[0].at_least(least), power[1] / area[1].at_least(least)],
        gas_w_m2: [black_w_m2(now.upper_k), black_w_m2(now.lower_k)],
        any: area[0].value() + area[1].value() > 1e-6,
    }
}

impl<R: Real> Zones<R> {
    /// Share of what the faces of a zone send that leaves through the plane.
    #[inline]
    fn through_plane(&self, zone: usize) -> R {
        (R::constant(self.plane_m2) / self.area_m2[zone].at_least(1e-9)).at_most(1.0)
    }

    /// Power that leaves a zone through an opening in its walls, W/m².
    pub(super) fn leaves_w_m2(&self, zone: usize) -> R {
        let through = -self.takes[zone] + 1.0;
        self.takes[zone] * self.gas_w_m2[zone] + through * self.faces_w_m2[zone]
    }

    /// Power that a cold upward face in the middle of the floor receives, W/m².
    pub(super) fn floor_receives_w_m2(&self, sees_plane: f64) -> R {
        let clear = -self.takes[1] + 1.0;
        let from_above = self.leaves_w_m2(0) * clear;
        let beside = self.faces_w_m2[1] * clear;
        from_above * sees_plane + beside * (1.0 - sees_plane) + self.takes[1] * self.gas_w_m2[1]
    }
}

/// Exchange among layers and faces.
pub(super) fn exchange<R: Real>(zones: &Zones<R>, faces_k: &[R; SURFACES], inner: &mut Inner<R>) {
    if !zones.any {
        return;
    }
    let clear = [-zones.takes[0] + 1.0, -zones.takes[1] + 1.0];
    let plane = [zones.through_plane(0), zones.through_plane(1)];
    // The plane passes what the smaller zone can send: both partners use the same area.
    let plane_m2 = (plane[0] * zones.area_m2[0]).min(plane[1] * zones.area_m2[1]);
    let share = [plane_m2 / zones.area_m2[0].at_least(1e-9), plane_m2 / zones.area_m2[1].at_least(1e-9)];

    for surface in 0..SURFACES {
        let black = black_w_m2(faces_k[surface]);
        for zone in 0..2 {
            let area = if zone == 0 { zones.hot_m2[surface] } else { zones.cool_m2[surface] };
            if area.value() <= 0.0 {
                continue;
            }
            let far = 1 - zone;
            // Gas of the zone, faces of the zone, then through the plane: far gas, far faces.
            let received = zones.takes[zone] * zones.gas_w_m2[zone]
                + clear[zone]
                    * ((-share[zone] + 1.0) * zones.faces_w_m2[zone]
                        + share[zone]
                            * (zones.takes[far] * zones.gas_w_m2[far] + clear[far] * zones.faces_w_m2[far]));
            inner.surfaces_w[surface] = inner.surfaces_w[surface] + (received - black) * area * EMISSIVITY;
        }
    }
    for zone in 0..2 {
        let far = 1 - zone;
        let gas = zones.gas_w_m2[zone];
        let own = zones.area_m2[zone] * zones.takes[zone] * (zones.faces_w_m2[zone] - gas) * EMISSIVITY;
        let through = plane_m2 * zones.takes[zone];
        let far_faces = through * clear[far] * (zones.faces_w_m2[far] - gas) * EMISSIVITY;
        let far_gas = through * zones.takes[far] * (zones.gas_w_m2[far] - gas);
        inner.heat_w[zone] = inner.heat_w[zone] + own + far_faces + far_gas;
    }
}

/// Heat that a flame radiates, spread over layers and faces.
///
/// The part of the flame below the interface sends half up, half to the faces beside and below; the part in
/// the hot layer loses first to the gas, then by the share of the plane downwards.
pub(super) fn flame<R: Real>(zones: &Zones<R>, heat_w: R, clear_m: R, flame_m: R, inner: &mut Inner<R>) {
    if !zones.any {
        inner.heat_w[0] = inner.heat_w[0] + heat_w;
        return;
    }
    let below = (clear_m / flame_m).at_most(1.0);
    let in_clear = heat_w * below;
    let in_hot = heat_w - in_clear;
    let up = in_clear * 0.5;
    // A flame in the layer has half the layer about it.
    let taken = in_hot * zones.takes[0] * 0.5 + up * zones.takes[0];
    let past = in_hot - in_hot * zones.takes[0] * 0.5;
    let down_share = zones.through_plane(0) * 0.5;
    let to_cool = in_clear * 0.5 + past * down_share;
    let to_hot = up - up * zones.takes[0] + past - past * down_share;
    inner.heat_w[0] = inner.heat_w[0] + taken;
    give(zones, 0, to_hot, inner);
    give(zones, 1, to_cool, inner);
}

/// Spreads heat over the faces of a zone by area; to the gas where it has none.
pub(super) fn give<R: Real>(zones: &Zones<R>, zone: usize, heat_w: R, inner: &mut Inner<R>) {
    if zones.area_m2[zone].value() <= 1e-6 {
        inner.heat_w[zone] = inner.heat_w[zone] + heat_w;
        return;
    }
    let each = heat_w / zones.area_m2[zone];
    for surface in 0..SURFACES {
        let area = if zone == 0 { zones.hot_m2[surface] } else { zones.cool_m2[surface] };
        inner.surfaces_w[surface] = inner.surfaces_w[surface] + each * area;
    }
}
