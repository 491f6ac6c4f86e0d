//! Heat on a person: hot air and radiation.

use super::dose::Exposure;
use crate::fire::Exceeded;
use crate::fire::constants::ICE_POINT_K;
use crate::fire::crossing::share_passing;

/// What a person wears.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Clothing {
    /// Dressed.
    Full,
    /// Lightly dressed or not at all: asleep, at home.
    Light,
}

/// Heat that a person stands in.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Heat {
    /// Air at the person, K.
    pub gas_temperature_k: f64,
    /// Radiation received, kW/m².
    pub flux_kw_m2: f64,
    /// What the person wears.
    pub clothing: Clothing,
}

/// Air no warmer than the body gives it no heat, °C. Ours: the formulas have no such floor and give a summer
/// day a dose of its own.
const HEATS_FROM_C: f64 = 37.0;

/// Radiation below which the skin bears it for long, kW/m², as printed.
const PAINS_FROM_KW_M2: f64 = 2.5;

/// Dose of hot air per minute, by ISO 13571.
///
/// ```text
/// 1/t = T^3.4 / 5.0·10⁷     lightly dressed
/// 1/t = T^3.61 / 4.1·10⁸    dressed               nothing below 37 °C
/// ```
///
/// | symbol | argument            | unit |
/// |--------|---------------------|------|
/// | `T`    | `gas_temperature_k` | °C   |
/// | `t`    |                     | min  |
///
/// For dry air; moist air, as behind a hose stream, burns sooner. Range: see [`heat_limits`].
///
/// Source: [`ISO_13571`](crate::fire::sources::ISO_13571).
///
/// ```
/// use sootline::fire::tenability::{Clothing, iso13571_convective_rate_1_min};
///
/// // By hand at 120 °C: 120^3.4 = 1.1728e7: 1.1728e7/5.0e7 = 0.23456 per minute: 4.26 min.
/// let rate_1_min = iso13571_convective_rate_1_min(120.0 + 273.15, Clothing::Light);
/// assert!((rate_1_min - 0.23456).abs() < 1e-5);
/// ```
#[must_use]
pub fn iso13571_convective_rate_1_min(gas_temperature_k: f64, clothing: Clothing) -> f64 {
    let celsius = gas_temperature_k - ICE_POINT_K;
    if celsius <= HEATS_FROM_C {
        return 0.0;
    }
    match clothing {
        Clothing::Full => celsius.powf(3.61) / 4.1e8,
        Clothing::Light => celsius.powf(3.4) / 5.0e7,
    }
}

/// Dose of radiation per minute up to pain, by ISO 13571 of 2012.
///
/// ```text
/// 1/t = q^1.9 / 4.2     above 2.5 kW/m², else 0
/// ```
///
/// | symbol | argument     | unit  |
/// |--------|--------------|-------|
/// | `q`    | `flux_kw_m2` | kW/m² |
/// | `t`    |              | min   |
///
/// Bare skin. Pain ends a flight sooner than a burn does, so the dose of heat takes this form; Purser's older
/// `1.33 q^(-1.33)` lies within 18 % at 10 kW/m². Source: [`ISO_13571`](crate::fire::sources::ISO_13571).
///
/// ```
/// use sootline::fire::tenability::iso13571_radiant_pain_rate_1_min;
///
/// // By hand at 10 kW/m²: 10^1.9/4.2 = 79.433/4.2 = 18.912 per minute: 3.17 s.
/// assert!((iso13571_radiant_pain_rate_1_min(10.0) - 18.912).abs() < 1e-3);
/// ```
#[must_use]
pub fn iso13571_radiant_pain_rate_1_min(flux_kw_m2: f64) -> f64 {
    if flux_kw_m2 > PAINS_FROM_KW_M2 { flux_kw_m2.powf(1.9) / 4.2 } else { 0.0 }
}

/// Dose of radiation per minute up to a burn of the second degree, by ISO 13571 of 2012.
///
/// ```text
/// 1/t = q^1.56 / 6.9    above 2.5 kW/m², else 0
/// ```
///
/// Symbols and source as [`iso13571_radiant_pain_rate_1_min`].
///
/// ```
/// use sootline::fire::tenability::iso13571_radiant_burn_rate_1_min;
///
/// // By hand at 10 kW/m²: 10^1.56/6.9 = 36.308/6.9 = 5.2620 per minute: 11.4 s.
/// assert!((iso13571_radiant_burn_rate_1_min(10.0) - 5.262).abs() < 1e-3);
/// ```
#[must_use]
pub fn iso13571_radiant_burn_rate_1_min(flux_kw_m2: f64) -> f64 {
    if flux_kw_m2 > PAINS_FROM_KW_M2 { flux_kw_m2.powf(1.56) / 6.9 } else { 0.0 }
}

/// What the heat exceeds of what the dose was made for.
#[must_use]
pub fn heat_limits(heat: &Heat) -> Exceeded {
    let celsius = heat.gas_temperature_k - ICE_POINT_K;
    Exceeded::none()
        .when(
            celsius > HEATS_FROM_C && celsius < 60.0,
            "air below 60 °C: borne for longer than half an hour; the formula is drawn out beyond its data",
        )
        .when(celsius > 200.0, "air above 200 °C: beyond the data, and beyond what is borne for a minute")
}

impl Exposure for Heat {
    /// `1/t_conv + 1/t_rad`, the radiant part up to pain.
    fn dose_rate_1_min(&self) -> f64 {
        iso13571_convective_rate_1_min(self.gas_temperature_k, self.clothing)
            + iso13571_radiant_pain_rate_1_min(self.flux_kw_m2)
    }

    fn towards(&self, other: &Self, share: f64) -> Self {
        let line = |from: f64, to: f64| from + (to - from) * share;
        Self {
            gas_temperature_k: line(self.gas_temperature_k, other.gas_temperature_k),
            flux_kw_m2: line(self.flux_kw_m2, other.flux_kw_m2),
            clothing: self.clothing,
        }
    }

    fn breaks(&self, other: &Self) -> [Option<f64>; 2] {
        [
            share_passing(self.gas_temperature_k, other.gas_temperature_k, HEATS_FROM_C + ICE_POINT_K),
            share_passing(self.flux_kw_m2, other.flux_kw_m2, PAINS_FROM_KW_M2),
        ]
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fire::tenability::{HeatDose, Line};
    use approx::{assert_relative_eq, relative_eq};

    fn heat(celsius: f64, flux_kw_m2: f64) -> Heat {
        Heat { gas_temperature_k: celsius + 273.15, flux_kw_m2, clothing: Clothing::Light }
    }

    #[test]
    fn times_to_a_full_dose_are_the_published_ones() {
        for (rate_1_min, minutes, origin) in [
            (iso13571_convective_rate_1_min(393.15, Clothing::Light), 4.26, "by hand: 5.0e7 · 120^-3.4"),
            (iso13571_convective_rate_1_min(333.15, Clothing::Light), 45.0, "by hand: 5.0e7 · 60^-3.4"),
            (iso13571_convective_rate_1_min(393.15, Clothing::Full), 12.79, "by hand: 4.1e8 · 120^-3.61"),
            (iso13571_radiant_pain_rate_1_min(4.0), 0.3015, "by hand: 4.2 · 4^-1.9"),
            (iso13571_radiant_burn_rate_1_min(4.0), 0.7936, "by hand: 6.9 · 4^-1.56"),
        ] {
            assert!(relative_eq!(1.0 / rate_1_min, minutes, max_relative = 1e-3), "{origin}: {rate_1_min}");
        }
    }

    #[test]
    fn rival_forms_agree_where_they_were_both_meant() {
        // Purser's 1.33 q^-1.33, from memory: pain within a factor of 1.75 from 3 to 20 kW/m².
        for flux_kw_m2 in [3.0, 5.0, 10.0, 20.0_f64] {
            let purser_1_min = flux_kw_m2.powf(1.33) / 1.33;
            let ratio = iso13571_radiant_pain_rate_1_min(flux_kw_m2) / purser_1_min;
            assert!((1.0 / 1.75..1.75).contains(&ratio), "{flux_kw_m2}: {ratio}");
        }
        // Skin hurts before it blisters, and clothes help.
        for flux_kw_m2 in [2.6, 4.0, 10.0, 40.0] {
            assert!(
                iso13571_radiant_pain_rate_1_min(flux_kw_m2) > iso13571_radiant_burn_rate_1_min(flux_kw_m2)
            );
        }
        for celsius in [60.0, 100.0, 150.0, 200.0] {
            let rate = |clothing| iso13571_convective_rate_1_min(celsius + 273.15, clothing);
            assert!(rate(Clothing::Light) > rate(Clothing::Full));
        }
    }

    #[test]
    fn both_sides_of_each_threshold() {
        assert_eq!(heat(37.0, 2.5).dose_rate_1_min(), 0.0);
        assert!(heat(37.1, 0.0).dose_rate_1_min() > 0.0);
        assert!(heat(20.0, 2.51).dose_rate_1_min() > 0.0);
        assert!(heat_limits(&heat(20.0, 0.0)).is_empty() && heat_limits(&heat(61.0, 0.0)).is_empty());
        assert!(!heat_limits(&heat(59.0, 0.0)).is_empty() && !heat_limits(&heat(201.0, 0.0)).is_empty());
    }

    #[test]
    fn ramps_in_one_step_give_their_closed_forms() {
        // By hand: 0 to 200 °C in 10 min: ∫ T^3.4 dT from 37 to 200 = (200^4.4 - 37^4.4)/4.4 = 3.02566e9;
        // times 10/200 over 5.0e7: 3.0257.
        let mut air = HeatDose::starting(0.0, heat(0.0, 0.0));
        air.add(600.0, heat(200.0, 0.0));
        assert_relative_eq!(air.total(), 3.0257, max_relative = 1e-4);
        // By hand: 0 to 10 kW/m² in 60 s: (10^2.9 - 2.5^2.9)/2.9/4.2/10 = (794.328 - 14.2569)/121.8 = 6.40453.
        let mut radiation = HeatDose::starting(0.0, heat(20.0, 0.0));
        radiation.add(60.0, heat(20.0, 10.0));
        assert_relative_eq!(radiation.total(), 6.404_53, max_relative = 1e-4);
        // The threshold is passed at 15 s, and 0.3 is there soon after: q^2.9 = 14.2569 + 0.3·121.8 = 50.797:
        // q = 3.87454: 23.247 s.
        assert!((radiation.reached_s(Line::ThreeTenths).unwrap() - 23.247).abs() < 0.05);
    }

    #[test]
    fn hotter_never_takes_longer() {
        let mut last = 0.0;
        for step in 0..400 {
            let celsius = -40.0 + 2.0 * f64::from(step);
            let rate_1_min = heat(celsius, 0.05 * f64::from(step)).dose_rate_1_min();
            assert!(rate_1_min.is_finite() && rate_1_min >= last);
            last = rate_1_min;
        }
    }
}
