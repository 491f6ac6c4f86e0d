//! Large, tall and long spaces: flame against ceiling and storage, spread to the next pile, descent of the layer.

use super::findings::{Band, Figure, LargeSpaceFinding, Reason};
use super::inputs::Inputs;
use super::judge::FireClock;
use super::methods::figure;
use super::rules::{LARGE_FLOOR_M2, LONG_RATIO, TALL_M};
use crate::domain::room::RoomKind;
use crate::fire::flame::{RoundFire, equivalent_diameter_m, heskestad_height_limits, heskestad_height_m};
use crate::fire::radiation::point_source_limits;
use crate::fire::{Exceeded, growth};

/// Which thresholds a room exceeds.
pub(super) fn because(inputs: &Inputs<'_>) -> Vec<&'static str> {
    let geometry = &inputs.geometry;
    let mut because = Vec::new();
    match inputs.room.kind {
        RoomKind::Stair => because.push("a stair"),
        RoomKind::Shaft => because.push("a shaft"),
        RoomKind::Atrium => because.push("an atrium"),
        RoomKind::Room | RoomKind::Corridor | RoomKind::Attic | RoomKind::Void => {}
    }
    if geometry.floor_area_m2 > LARGE_FLOOR_M2 {
        because.push("floor above 300 m²");
    }
    if geometry.height_m > TALL_M {
        because.push("higher than 6 m");
    }
    if geometry.length_m / geometry.width_m > LONG_RATIO {
        because.push("more than 5 times as long as wide");
    }
    because
}

/// The reason of the rating.
pub(super) fn reason(because: &[&'static str]) -> Reason {
    let text = format!(
        "large_space: {}; whole-room flashover is the wrong question here, see large_space",
        because.join(", ")
    );
    Reason { key: "large_space", text: text.into() }
}

/// What is asked instead.
///
/// The fire is as large as it has grown when water comes, no larger than its fuel. It burns on the area that its heat
/// release needs at the heat release per area of the goods, or of the use.
pub(super) fn finding(
    inputs: &Inputs<'_>,
    because: Vec<&'static str>,
    water_s: f64,
    layer_to_2_m_s: Option<Band>,
) -> LargeSpaceFinding {
    let contents = &inputs.contents;
    let fire = contents.typical_fire();
    let at_s = FireClock::of(&fire).on_curve_s(water_s);
    let heat_release_kw = growth::t_squared_kw(fire.growth_kw_s2, at_s).min(fire.reached_kw());
    let per_area_kw_m2 =
        contents.pile.map_or(contents.heat_release_per_area_kw_m2, |p| p.heat_release_per_area_kw_m2);
    let round = RoundFire {
        heat_release_kw,
        diameter_m: equivalent_diameter_m(heat_release_kw / per_area_kw_m2.max(1.0)),
    };
    let flame_height_m = heskestad_height_m(round);
    let base_m = contents.origin.map_or(0.0, |origin| contents.packages[origin].base_height_m);
    let ceiling_height_m = (inputs.geometry.height_m - base_m).max(0.0);

    let origin = contents.origin.map(|origin| &contents.packages[origin]);
    let (ease, gap_m) = match (&contents.pile, origin) {
        (Some(pile), _) => (Some(pile.ease), pile.aisle_m),
        (None, Some(package)) => (Some(package.ease), Some(package.spacing_m)),
        (None, None) => (None, None),
    };
    let reach_m = ease.map(|ease| {
        let flux_kw_m2 = super::contents::ignitability(ease).flux_kw_m2();
        let from_axis_m =
            (contents.radiative_share * heat_release_kw / (4.0 * std::f64::consts::PI * flux_kw_m2)).sqrt();
        (from_axis_m - 0.5 * round.diameter_m).max(0.0)
    });
    let next_pile_ignites = reach_m.zip(gap_m).map(|(reach_m, gap_m)| reach_m >= gap_m);

    let recalled = contents.recalled;
    let mut figures: Vec<Figure> = vec![
        figure("t_squared_growth", "heat_release_kw", heat_release_kw, &Exceeded::none(), recalled, None),
        figure(
            "heskestad_flame_height",
            "flame_height_m",
            flame_height_m,
            &heskestad_height_limits(round),
            recalled,
            None,
        ),
    ];
    if let Some(reach_m) = reach_m {
        let limits = point_source_limits(reach_m + 0.5 * round.diameter_m, round.diameter_m);
        figures.push(figure("point_source_radiation", "spreads_across_m", reach_m, &limits, recalled, None));
    }
    LargeSpaceFinding {
        because,
        flame_height_m,
        ceiling_height_m,
        flame_reaches_ceiling: flame_height_m >= ceiling_height_m,
        spreads_across_m: reach_m,
        gap_m,
        next_pile_ignites,
        layer_to_2_m_s,
        figures,
    }
}
