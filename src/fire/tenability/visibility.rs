//! How far one sees through smoke.

use crate::fire::Exceeded;

/// What is looked for.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Sign {
    /// Lit by the light of the room: doors, walls, most signs.
    Reflecting,
    /// Giving light of its own.
    LightEmitting,
}

impl Sign {
    /// Jin's product of visibility and extinction: 3 and 8, out of 2 to 4 and 5 to 10.
    #[must_use]
    pub const fn factor(self) -> f64 {
        match self {
            Self::Reflecting => 3.0,
            Self::LightEmitting => 8.0,
        }
    }
}

/// Visibility beyond which the air is called clear, m. Ours: the tests end near 15 m.
pub const CLEAR_M: f64 = 100.0;

/// Extinction of light by the soot of flaming fires, in 1/m, by Mulholland and Croarkin.
///
/// ```text
/// K = σ ρ Y_s      σ = 8700 m²/kg
/// ```
///
/// | symbol | argument             | unit  |
/// |--------|----------------------|-------|
/// | `ρ`    | `density_kg_m3`      | kg/m³ |
/// | `Y_s`  | `soot_mass_fraction` | kg/kg |
///
/// Range: flaming fires with all the air they want, 8700 ± 1100 (95 %). Smouldering smoke has about half of
/// it: this sees less far through it than one does.
///
/// Source: [`MULHOLLAND_CROARKIN_2000`](crate::fire::sources::MULHOLLAND_CROARKIN_2000).
///
/// ```
/// use sootline::fire::tenability::mulholland_croarkin_extinction_1_m;
///
/// // By hand: 0.1 g/m³ as 1.0 kg/m³ with a fraction of 1e-4: 8700·1e-4 = 0.87 1/m.
/// assert!((mulholland_croarkin_extinction_1_m(1.0, 1e-4) - 0.87).abs() < 1e-12);
/// ```
#[must_use]
pub fn mulholland_croarkin_extinction_1_m(density_kg_m3: f64, soot_mass_fraction: f64) -> f64 {
    const EXTINCTION_M2_KG: f64 = 8700.0;

    EXTINCTION_M2_KG * density_kg_m3 * soot_mass_fraction.max(0.0)
}

/// Visibility through smoke, in m, by Jin; at most [`CLEAR_M`].
///
/// ```text
/// V = C / K
/// ```
///
/// | symbol | argument         | unit |
/// |--------|------------------|------|
/// | `K`    | `extinction_1_m` | 1/m  |
/// | `C`    | `sign`           | -    |
///
/// Range: see [`jin_visibility_limits`]. Smoke that stings shortens it.
///
/// Source: [`JIN_1978`](crate::fire::sources::JIN_1978).
///
/// ```
/// use sootline::fire::tenability::{Sign, jin_visibility_m};
///
/// // Published: 0.1 1/m, reflecting: 30 m.
/// assert!((jin_visibility_m(0.1, Sign::Reflecting) - 30.0).abs() < 1e-9);
/// ```
#[must_use]
pub fn jin_visibility_m(extinction_1_m: f64, sign: Sign) -> f64 {
    if extinction_1_m > 0.0 { (sign.factor() / extinction_1_m).min(CLEAR_M) } else { CLEAR_M }
}

/// Extinction at which one sees just so far, 1/m: [`jin_visibility_m`] turned round, below [`CLEAR_M`].
#[must_use]
pub fn extinction_for_m(visibility_m: f64, sign: Sign) -> f64 {
    sign.factor() / visibility_m
}

/// What a visibility exceeds of Jin's tests: about 5 to 15 m, in smoke that does not sting.
#[must_use]
pub fn jin_visibility_limits(visibility_m: f64) -> Exceeded {
    Exceeded::none()
        .when(visibility_m < 5.0, "below 5 m: nearer than in the tests, and smoke that stings shuts the eyes")
        .when(visibility_m > 15.0, "above 15 m: further than in the tests")
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;

    #[test]
    fn worked_cases_are_met() {
        // By hand: 0.1 g/m³: 3/0.87 = 3.448 m (a published table rounds it to 3.4), 8/0.87 = 9.195 m.
        let extinction_1_m = mulholland_croarkin_extinction_1_m(1.2, 0.1e-3 / 1.2);
        assert_relative_eq!(jin_visibility_m(extinction_1_m, Sign::Reflecting), 3.448, max_relative = 1e-3);
        assert_relative_eq!(
            jin_visibility_m(extinction_1_m, Sign::LightEmitting),
            9.195,
            max_relative = 1e-3
        );
    }

    #[test]
    fn clear_air_and_strange_numbers_are_clear() {
        for extinction_1_m in [0.0, -1.0, f64::NAN, 1e-12] {
            assert_eq!(jin_visibility_m(extinction_1_m, Sign::Reflecting), CLEAR_M);
        }
        assert_eq!(mulholland_croarkin_extinction_1_m(1.2, -1e-9), 0.0);
    }

    #[test]
    fn visibility_and_extinction_are_each_other_s_inverse() {
        for visibility_m in [1.0, 5.0, 10.0, 60.0] {
            for sign in [Sign::Reflecting, Sign::LightEmitting] {
                let back_m = jin_visibility_m(extinction_for_m(visibility_m, sign), sign);
                assert_relative_eq!(back_m, visibility_m, max_relative = 1e-12);
            }
        }
    }

    #[test]
    fn thicker_smoke_never_lets_one_see_further() {
        let mut last_m = f64::INFINITY;
        for step in 0..1000 {
            let visibility_m = jin_visibility_m(0.01 * f64::from(step), Sign::Reflecting);
            assert!(visibility_m.is_finite() && visibility_m <= last_m && visibility_m > 0.0);
            last_m = visibility_m;
        }
    }

    #[test]
    fn both_ends_of_the_tests_are_told() {
        assert!(jin_visibility_limits(5.0).is_empty() && jin_visibility_limits(15.0).is_empty());
        assert!(!jin_visibility_limits(4.9).is_empty() && !jin_visibility_limits(15.1).is_empty());
    }
}
