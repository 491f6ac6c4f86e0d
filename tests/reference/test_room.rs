//! The lined test room of ISO 9705, whose flashover mark is 1000 kW.
//!
//! Source: ISO 9705 (room 3.6 × 2.4 × 2.4 m, door 0.8 × 2.0 m) and EUREFIC (Wickström, ed., 1991):
//! 1000 kW with the burner counts as flashover. From memory.

use sootline::fire::flashover::{Enclosure, babrauskas_kw, mccaffrey_kw, thomas_kw};
use sootline::fire::linings::{Surface, total_conductance_kw_k};
use sootline::fire::ventilation::WallOpening;

const MARK_KW: f64 = 1000.0;

/// The published scatter about Babrauskas' rule, taken for all: chosen beforehand.
const SCATTER: std::ops::RangeInclusive<f64> = 0.6..=1.4;

fn room() -> Enclosure {
    Enclosure::of_box(3.6, 2.4, 2.4, WallOpening { area_m2: 1.6, height_m: 2.0 })
}

/// Gypsum plaster of 16 mm (Drysdale, from memory) after 600 s, when the burner is turned up.
fn plaster() -> Surface {
    Surface {
        area_m2: room().bounding_area_m2,
        conductivity_w_mk: 0.48,
        density_kg_m3: 1440.0,
        specific_heat_j_kgk: 840.0,
        thickness_m: 0.016,
    }
}

/// Paper-faced gypsum board of 12.5 mm (Karlsson and Quintiere, from memory).
fn board() -> Surface {
    Surface {
        conductivity_w_mk: 0.17,
        density_kg_m3: 960.0,
        specific_heat_j_kgk: 1100.0,
        thickness_m: 0.0125,
        ..plaster()
    }
}

fn rows() -> [(&'static str, f64); 4] {
    let mccaffrey = |lining: Surface| mccaffrey_kw(room(), total_conductance_kw_k(&[lining], 600.0));
    [
        ("Babrauskas", babrauskas_kw(room())),
        ("Thomas", thomas_kw(room())),
        ("McCaffrey, 16 mm plaster", mccaffrey(plaster())),
        ("McCaffrey, 12.5 mm board", mccaffrey(board())),
    ]
}

#[test]
fn the_1000_kw_mark_lies_within_the_scatter_of_all_but_babrauskas() {
    // Worked beforehand: Babrauskas' 1697 kW leaves the band. It knows no room size, and this room
    // is small for its door.
    for (name, required_kw) in rows() {
        let inside = SCATTER.contains(&(required_kw / MARK_KW));

        assert_eq!(inside, name != "Babrauskas", "{name}: {required_kw}");
    }
}

#[test]
fn the_correlations_give_what_others_worked_out_for_this_room() {
    // By hand: 750·1.6·√2 = 1697.1; 7.8·44.48 + 378·1.6·√2 = 1202.3; 610·√(0.03·44.48·1.6·√2) = 1060.0.
    for ((name, got_kw), expected_kw) in rows().into_iter().zip([1697.1, 1202.3, 1060.0]) {
        assert!((got_kw - expected_kw).abs() < 0.1, "{name}: {got_kw}");
    }
}

pub fn table() -> String {
    let mut text = String::from(
        "## Lined test room, flashover mark 1000 kW (ISO 9705, from memory)\n\n\
         Tolerance: 0.6 to 1.4, the published scatter. The burner stands in a corner and flames out of the door are the mark, which no \
         correlation has in it.\n\n\
         | correlation | kW | ratio | |\n|---|---|---|---|\n",
    );
    for (name, required_kw) in rows() {
        let ratio = required_kw / MARK_KW;
        let miss = if SCATTER.contains(&ratio) { "" } else { "miss" };
        text.push_str(&format!("| {name} | {required_kw:.0} | {ratio:.2} | {miss} |\n"));
    }
    text
}
