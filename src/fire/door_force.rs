//! Force at the handle that opens a door against a pressure.

use super::Exceeded;

/// Most that a door in a way out may ask for to be set in motion, N: 30 lbf. Common practice.
///
/// Source: [`NFPA_101`](crate::fire::sources::NFPA_101).
pub const LIMIT_133_N: f64 = 133.0;

/// The same in Europe, N.
///
/// Source: [`EN_12101_6`](crate::fire::sources::EN_12101_6).
pub const LIMIT_100_N: f64 = 100.0;

/// Handle from the edge of the leaf, m: 3 in. Common practice.
pub const HANDLE_FROM_EDGE_M: f64 = 0.076;

/// Force of a closer at the handle, N: about 10 lbf. Common practice, 6 to 14 lbf.
pub const CLOSER_N: f64 = 45.0;

const NEWTONS_PER_POUND_FORCE: f64 = 4.448_221_615_260_5;

/// A hinged leaf.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Leaf {
    /// Width, m.
    pub width_m: f64,
    /// Height, m.
    pub height_m: f64,
    /// From the handle to the edge that it is at, m: [`HANDLE_FROM_EDGE_M`] unless known better.
    pub handle_from_edge_m: f64,
    /// Force at the handle that overcomes closer and friction, N: [`CLOSER_N`] with a closer, unless known better.
    pub closer_n: f64,
}

/// Which way a leaf swings, seen from the room whose pressure is given.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Swing {
    /// Into the room.
    In,
    /// Out of the room.
    Out,
    /// Both ways: it takes the easier.
    Both,
}

impl Swing {
    /// Pressure that stands against opening, Pa: positive holds the leaf shut, negative throws it open.
    ///
    /// `pressure_pa` is that of the room above that beyond the door, mean over the leaf.
    ///
    /// ```
    /// use sootline::fire::door_force::Swing;
    ///
    /// // A fire pushes a door that opens into its room shut; as it starves it sucks one that opens outwards shut.
    /// assert_eq!(Swing::In.opposing_pa(300.0), 300.0);
    /// assert_eq!(Swing::Out.opposing_pa(300.0), -300.0);
    /// assert_eq!(Swing::Out.opposing_pa(-200.0), 200.0);
    /// ```
    #[must_use]
    pub const fn opposing_pa(self, pressure_pa: f64) -> f64 {
        match self {
            Self::In => pressure_pa,
            Self::Out => -pressure_pa,
            Self::Both => -pressure_pa.abs(),
        }
    }
}

/// Force at the handle that opens a leaf, in N, by Klote and Milke. Negative: the pressure throws it open by itself,
/// and this is what it takes to hold it once the latch is free.
///
/// ```text
/// F = F_dc + W A Δp / (2 (W - d))        A = W H
/// ```
///
/// | symbol | argument             | unit |
/// |--------|----------------------|------|
/// | `F_dc` | `closer_n`           | N    |
/// | `W`    | `width_m`            | m    |
/// | `H`    | `height_m`           | m    |
/// | `d`    | `handle_from_edge_m` | m    |
/// | `Δp`   | `opposing_pa`        | Pa   |
///
/// The first movement only: once the door is ajar the pressure falls away. `Δp` by [`Swing::opposing_pa`]. A
/// handle beyond the middle of the leaf is taken at the middle. Range: see [`klote_milke_limits`].
///
/// Source: [`DOOR_FORCE`](crate::fire::sources::DOOR_FORCE).
///
/// ```
/// use sootline::fire::door_force::{Leaf, Swing, klote_milke_n};
///
/// // By hand: 45 + 0.9·1.8·50/(2·0.824) = 45 + 49.15 = 94.15 N; the other way 45 - 49.15 = -4.15 N.
/// let leaf = Leaf { width_m: 0.9, height_m: 2.0, handle_from_edge_m: 0.076, closer_n: 45.0 };
/// assert!((klote_milke_n(leaf, Swing::In.opposing_pa(50.0)) - 94.15).abs() < 0.01);
/// assert!((klote_milke_n(leaf, Swing::Out.opposing_pa(50.0)) + 4.15).abs() < 0.01);
/// ```
#[must_use]
pub fn klote_milke_n(leaf: Leaf, opposing_pa: f64) -> f64 {
    if leaf.width_m <= 0.0 {
        return leaf.closer_n;
    }
    leaf.closer_n + leaf.width_m * leaf.width_m * leaf.height_m * opposing_pa / (2.0 * lever_m(leaf))
}

/// Pressure against a leaf that asks for a force, in Pa: [`klote_milke_n`] turned round. Zero for a leaf without area.
///
/// ```
/// use sootline::fire::door_force::{LIMIT_133_N, Leaf, klote_milke_pressure_pa};
///
/// // By hand: (133 - 45)·2·0.824/(0.9·1.8) = 89.52 Pa.
/// let leaf = Leaf { width_m: 0.9, height_m: 2.0, handle_from_edge_m: 0.076, closer_n: 45.0 };
/// assert!((klote_milke_pressure_pa(leaf, LIMIT_133_N) - 89.52).abs() < 0.01);
/// ```
#[must_use]
pub fn klote_milke_pressure_pa(leaf: Leaf, force_n: f64) -> f64 {
    if leaf.width_m <= 0.0 || leaf.height_m <= 0.0 {
        return 0.0;
    }
    (force_n - leaf.closer_n) * 2.0 * lever_m(leaf) / (leaf.width_m * leaf.width_m * leaf.height_m)
}

/// A force in pounds.
///
/// ```
/// use sootline::fire::door_force::pounds_force;
///
/// // By hand: 133/4.44822 = 29.90 lbf: the 30 lbf of the practice.
/// assert!((pounds_force(133.0) - 29.90).abs() < 0.01);
/// ```
#[must_use]
pub fn pounds_force(newtons: f64) -> f64 {
    newtons / NEWTONS_PER_POUND_FORCE
}

/// What a leaf exceeds of what the formula describes.
#[must_use]
pub fn klote_milke_limits(leaf: Leaf, opposing_pa: f64) -> Exceeded {
    Exceeded::none()
        .when(leaf.handle_from_edge_m > 0.5 * leaf.width_m, "handle beyond the middle of the leaf")
        .when(leaf.width_m > 1.3, "wider than one hinged leaf")
        .when(opposing_pa.abs() > 2000.0, "above about 2 kPa the door itself may give way")
}

/// From the hinges to the handle.
fn lever_m(leaf: Leaf) -> f64 {
    leaf.width_m - leaf.handle_from_edge_m.min(0.5 * leaf.width_m)
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    const LEAF: Leaf =
        Leaf { width_m: 0.9, height_m: 2.0, handle_from_edge_m: HANDLE_FROM_EDGE_M, closer_n: CLOSER_N };

    #[test]
    fn the_greatest_pressures_of_the_published_table_are_met() {
        // NFPA 92, greatest pressure across doors at 30 lbf, from memory: leaf 7 ft high, handle 3 in from the edge;
        // closer in lbf, width in in, pressure in inches of water to two places. 1 in of water is 249.1 Pa.
        for (closer_lbf, width_in, water_in) in [
            (6.0, 32.0, 0.45),
            (6.0, 36.0, 0.40),
            (6.0, 48.0, 0.31),
            (10.0, 36.0, 0.34),
            (12.0, 44.0, 0.25),
            (14.0, 32.0, 0.30),
            (14.0, 48.0, 0.21),
        ] {
            let leaf = Leaf {
                width_m: width_in * 0.0254,
                height_m: 7.0 * 0.3048,
                handle_from_edge_m: 3.0 * 0.0254,
                closer_n: closer_lbf * NEWTONS_PER_POUND_FORCE,
            };
            let got_in = klote_milke_pressure_pa(leaf, 30.0 * NEWTONS_PER_POUND_FORCE) / 249.1;
            assert!((got_in - water_in).abs() < 0.0065, "{closer_lbf} {width_in}: {got_in}");
        }
    }

    #[test]
    fn force_and_pressure_are_each_other_s_inverse() {
        for opposing_pa in [-500.0, -10.0, 0.0, 25.0, 1500.0] {
            let force_n = klote_milke_n(LEAF, opposing_pa);
            let back_pa = klote_milke_pressure_pa(LEAF, force_n);
            assert_relative_eq!(back_pa, opposing_pa, max_relative = 1e-9, epsilon = 1e-9);
        }
        assert_eq!(klote_milke_n(LEAF, 0.0), CLOSER_N);
    }

    #[test]
    fn a_door_is_harder_against_the_pressure_than_with_it_whichever_way_it_swings() {
        for pressure_pa in [-800.0, -20.0, 20.0, 800.0_f64] {
            let force_n = |swing: Swing| klote_milke_n(LEAF, swing.opposing_pa(pressure_pa));
            let (hard, easy) =
                if pressure_pa > 0.0 { (Swing::In, Swing::Out) } else { (Swing::Out, Swing::In) };
            assert!(force_n(hard) > force_n(easy));
            assert_eq!(force_n(Swing::Both), force_n(easy));
            assert_relative_eq!(force_n(hard) - CLOSER_N, CLOSER_N - force_n(easy), max_relative = 1e-9);
        }
    }

    #[test]
    fn strange_leaves_give_a_number() {
        for leaf in [
            Leaf { width_m: 0.0, ..LEAF },
            Leaf { handle_from_edge_m: 0.9, ..LEAF },
            Leaf { handle_from_edge_m: 5.0, ..LEAF },
            Leaf { height_m: 0.0, ..LEAF },
        ] {
            assert!(klote_milke_n(leaf, 100.0).is_finite());
            assert!(klote_milke_pressure_pa(leaf, LIMIT_133_N).is_finite());
        }
        // By hand: the handle at the middle halves the lever: 45 + 0.9·1.8·100/0.9 = 225 N.
        assert_relative_eq!(klote_milke_n(Leaf { handle_from_edge_m: 0.9, ..LEAF }, 100.0), 225.0);
    }

    #[test]
    fn both_sides_of_each_limit_are_told() {
        assert!(klote_milke_limits(LEAF, 2000.0).is_empty());
        assert_eq!(klote_milke_limits(LEAF, -2001.0).len(), 1);
        assert_eq!(klote_milke_limits(Leaf { width_m: 1.31, ..LEAF }, 0.0).len(), 1);
        assert_eq!(klote_milke_limits(Leaf { handle_from_edge_m: 0.46, ..LEAF }, 0.0).len(), 1);
    }
}
