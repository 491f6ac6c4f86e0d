//! The box that the methods see in a room of any shape.

use crate::domain::Room;
use crate::domain::room::{CeilingForm, FloorPlan};

/// A room as a box.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Geometry {
    /// Floor, m².
    pub floor_area_m2: f64,
    /// Length of the walls along the floor, m.
    pub perimeter_m: f64,
    /// Longer side, m.
    pub length_m: f64,
    /// Shorter side, m.
    pub width_m: f64,
    /// Mean height, m.
    pub height_m: f64,
    /// Volume, m³.
    pub volume_m3: f64,
}

impl Geometry {
    /// The box of a room.
    ///
    /// A shape given by area and perimeter becomes the rectangle that has both; one rounder than a
    /// square becomes the square of its area. Under a sloped ceiling the mean of its lowest and
    /// highest point counts.
    pub fn of(room: &Room) -> Self {
        let floor_area_m2 = room.floor_area_m2();
        let perimeter_m = room.perimeter_m();
        let (a, b) = match room.plan {
            FloorPlan::Rectangle { length_m, width_m } => (length_m.get(), width_m.get()),
            FloorPlan::Shape { .. } => rectangle_of(floor_area_m2, perimeter_m),
        };
        let low_m = room.height_m.get();
        let high_m = match room.ceiling.form {
            CeilingForm::Flat => low_m,
            CeilingForm::Sloped | CeilingForm::OpenToRoof => {
                room.ceiling.high_m.map_or(low_m, |high| high.get().max(low_m))
            }
        };
        let height_m = 0.5 * (low_m + high_m);
        Self {
            floor_area_m2,
            perimeter_m,
            length_m: a.max(b),
            width_m: a.min(b),
            height_m,
            volume_m3: floor_area_m2 * height_m,
        }
    }

    /// Walls, without regard to openings, m².
    pub fn wall_area_m2(&self) -> f64 {
        self.perimeter_m * self.height_m
    }

    /// Half the diagonal of the floor, m.
    pub fn half_diagonal_m(&self) -> f64 {
        0.5 * self.length_m.hypot(self.width_m)
    }
}

/// Sides of the rectangle with an area and a perimeter: the roots of `x² - (P/2) x + A`.
fn rectangle_of(area_m2: f64, perimeter_m: f64) -> (f64, f64) {
    let half_m = 0.5 * perimeter_m;
    let discriminant = half_m * half_m - 4.0 * area_m2;
    if discriminant <= 0.0 {
        return (area_m2.sqrt(), area_m2.sqrt());
    }
    let longer_m = 0.5 * (half_m + discriminant.sqrt());
    (longer_m, area_m2 / longer_m)
}

#[cfg(test)]
mod tests {
    use super::rectangle_of;

    #[test]
    fn a_shape_becomes_the_rectangle_of_its_area_and_perimeter() {
        let (long, short) = rectangle_of(12.0, 14.0); // by hand: 4 × 3

        assert!((long - 4.0).abs() < 1e-12 && (short - 3.0).abs() < 1e-12);
    }

    #[test]
    fn a_round_room_becomes_a_square() {
        let (long, short) = rectangle_of(std::f64::consts::PI, 2.0 * std::f64::consts::PI);

        assert_eq!(long, short);
    }
}
