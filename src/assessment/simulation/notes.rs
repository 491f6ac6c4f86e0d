//! What the reader of a run should know beside its series.

use super::{Keys, Note};
use crate::domain::opening::Space;
use crate::domain::{Pointer, Simulation};
use crate::fire::two_zone;

fn room(index: usize) -> Pointer {
    Pointer::root().member("rooms").element(index)
}

/// What can be told before the run.
pub(super) fn of_request(run: &Simulation) -> Vec<Note> {
    let mut notes = Vec::new();
    linings(run, &mut notes);
    sealed(run, &mut notes);
    wind(run, &mut notes);
    notes
}

fn linings(run: &Simulation, notes: &mut Vec<Note>) {
    for (index, given) in run.rooms.iter().enumerate() {
        let linings = [
            ("walls", &given.linings.walls),
            ("ceiling", &given.linings.ceiling),
            ("floor", &given.linings.floor),
        ];
        let none: Vec<&str> =
            linings.iter().filter(|(_, sheets)| sheets.is_empty()).map(|(name, _)| *name).collect();
        if !none.is_empty() {
            notes.push(Note {
                key: "no_heat_through",
                pointer: room(index).member("linings"),
                text: format!("No heat passes the {}: no lining is given there.", none.join(", ")),
            });
        }
    }
}

/// Rooms from which no gas can leave at the start, by whatever way through other rooms.
fn sealed(run: &Simulation, notes: &mut Vec<Note>) {
    let index = |space: &Space| match space {
        Space::Room(key) => run.rooms.iter().position(|room| room.key == *key),
        Space::Outside => None,
    };
    let mut vented: Vec<bool> = run.rooms.iter().map(|room| room.leakage_area_m2.get() > 0.0).collect();
    let passing: Vec<[Option<usize>; 2]> = run
        .openings
        .iter()
        .filter(|opening| opening.open_fraction.get() > 0.0 || opening.leakage_area_m2.get() > 0.0)
        .map(|opening| [index(&opening.connects[0]), index(&opening.connects[1])])
        .collect();
    // Each round carries the outside one opening further in.
    for _ in 0..=run.rooms.len() {
        let reaches = |vented: &[bool], end: Option<usize>| {
            end.is_none_or(|room| vented.get(room).copied().unwrap_or(false))
        };
        for [first, second] in &passing {
            let out = reaches(&vented, *first) || reaches(&vented, *second);
            for room in [first, second].into_iter().copied().flatten() {
                if out && let Some(vented) = vented.get_mut(room) {
                    *vented = true;
                }
            }
        }
    }
    for (index, _) in vented.iter().enumerate().filter(|(_, vented)| !**vented) {
        notes.push(Note {
            key: "sealed",
            pointer: room(index),
            text: "No gas can leave this room at the start: a fire drives its pressure beyond what any \
                   building holds. Give it a leakage area."
                .to_owned(),
        });
    }
}

fn wind(run: &Simulation, notes: &mut Vec<Note>) {
    let felt = run
        .openings
        .iter()
        .any(|opening| opening.azimuth_deg.is_some() && opening.connects.contains(&Space::Outside));
    if run.ambient.wind_m_s.get() > 0.0 && !felt {
        notes.push(Note {
            key: "wind_meets_no_opening",
            pointer: Pointer::root().member("ambient").member("wind_m_s"),
            text: "The wind has no effect: no opening to the outside has its `azimuth_deg` given.".to_owned(),
        });
    }
}

/// What the engine says.
pub(super) fn of_engine(note: two_zone::Note, keys: &Keys) -> Note {
    use two_zone::Note as Engine;
    let fires = Pointer::root().member("fires");
    let name = |list: &[crate::domain::Key], index: usize| {
        list.get(index).map_or_else(|| "?".to_owned(), ToString::to_string)
    };
    match note {
        Engine::PressureBeyondBuildings(index) => Note {
            key: "pressure_beyond_buildings",
            pointer: room(index),
            text: format!(
                "The pressure in `{}` passed 10 kPa: a real room would have given way before.",
                name(&keys.rooms, index)
            ),
        },
        Engine::HotterThanTried(index) => Note {
            key: "hotter_than_tried",
            pointer: room(index),
            text: format!(
                "The gas in `{}` passed 1500 K, beyond what the physics here has been compared with.",
                name(&keys.rooms, index)
            ),
        },
        Engine::TooLongForOneLayer(index) => Note {
            key: "too_long_for_one_layer",
            pointer: room(index),
            text: format!(
                "`{}` is longer or larger than a layer forms evenly in: split it into several rooms.",
                name(&keys.rooms, index)
            ),
        },
        Engine::FlameBeyondCeiling(index) => Note {
            key: "flame_beyond_ceiling",
            pointer: fires.element(index),
            text: format!(
                "The flame of `{}` is taller than its room: it spreads below the ceiling.",
                name(&keys.fires, index)
            ),
        },
    }
}
