//! What would make flashover possible where no run has it: searched for with runs.

use super::super::findings::{Direction, HoldsWhile};

/// How far the search goes, and how finely.
const FACTOR: f64 = 1.6;
const TRIALS: u32 = 4;
const HALVINGS: u32 = 2;

/// The largest fire load that holds, by trials of a factor on it; `flips` runs the worst corner.
pub(super) fn fire_load<E>(
    now_mj_m2: f64,
    mut flips: impl FnMut(f64) -> Result<bool, E>,
) -> Result<HoldsWhile, E> {
    let (mut holds, mut flipped) = (1.0, None);
    for _ in 0..TRIALS {
        let trial = holds * FACTOR;
        if flips(trial)? {
            flipped = Some(trial);
            break;
        }
        holds = trial;
    }
    if let Some(mut flipped) = flipped {
        for _ in 0..HALVINGS {
            let middle = f64::sqrt(holds * flipped);
            if flips(middle)? {
                flipped = middle;
            } else {
                holds = middle;
            }
        }
        let value = holds * now_mj_m2;
        return Ok(HoldsWhile {
            field: "fuel_load_mj_m2",
            value: Some(value),
            now: now_mj_m2,
            direction: Direction::Below,
            words: format!("Holds while the fire load stays below {value:.0} MJ/m²; now {now_mj_m2:.0}."),
        });
    }
    Ok(HoldsWhile {
        field: "fuel_load_mj_m2",
        value: None,
        now: now_mj_m2,
        direction: Direction::Below,
        words: format!(
            "Holds up to {:.1} times the fire load of {now_mj_m2:.0} MJ/m²: the air that the openings let in holds the fire \
             down, and it holds only while they stay as in the scenarios.",
            holds
        ),
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_load_told_is_one_that_holds_and_lies_near_one_that_flips() {
        // Flips from 3.0 times on. By hand: 1.6 and 2.56 hold, 4.096 flips; √(2.56·4.096) = 3.238 flips, then
        // √(2.56·3.238) = 2.879 holds.
        let found = fire_load(100.0, |factor| Ok::<_, ()>(factor >= 3.0)).unwrap();

        assert!((found.value.unwrap() - 287.9).abs() < 0.1, "{:?}", found.value);
    }

    #[test]
    fn where_no_load_flips_it_the_openings_are_named() {
        let found = fire_load(100.0, |_| Ok::<_, ()>(false)).unwrap();

        assert_eq!(found.value, None);
        assert!(found.words.contains("openings"));
    }
}
