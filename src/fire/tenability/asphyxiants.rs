//! Gases that stun: carbon monoxide, hydrogen cyanide, want of oxygen, and carbon dioxide that makes one breathe faster.

use super::dose::Exposure;
use crate::fire::Exceeded;
use crate::fire::crossing::share_passing;

/// Air as a person breathes it, by volume of the wet gas.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Asphyxiants {
    /// Carbon monoxide, ppm.
    pub carbon_monoxide_ppm: f64,
    /// Hydrogen cyanide, ppm.
    pub hydrogen_cyanide_ppm: f64,
    /// Carbon dioxide, %.
    pub carbon_dioxide_percent: f64,
    /// Oxygen, %.
    pub oxygen_percent: f64,
}

impl Asphyxiants {
    /// Air without fire: 0.04 % of carbon dioxide, 20.95 % of oxygen.
    pub const FRESH_AIR: Self = Self {
        carbon_monoxide_ppm: 0.0,
        hydrogen_cyanide_ppm: 0.0,
        carbon_dioxide_percent: 0.04,
        oxygen_percent: 20.95,
    };
}

/// Carbon dioxide from which breathing is counted as faster, %.
const HYPERVENTILATION_FROM_PERCENT: f64 = 2.0;

/// Oxygen below which want of it is counted, %. Ours: the formula gives fresh air a dose of its own, 0.04
/// in two hours.
const LOW_OXYGEN_FROM_PERCENT: f64 = 20.0;

/// Dose of carbon monoxide per minute, by ISO 13571.
///
/// ```text
/// 1/t = [CO] / 35 000
/// ```
///
/// | symbol | argument | unit |
/// |--------|----------|------|
/// | `[CO]` | `ppm`    | ppm  |
/// | `t`    |          | min  |
///
/// For light work. Range: see [`asphyxiants_limits`].
///
/// Source: [`ISO_13571`](crate::fire::sources::ISO_13571).
///
/// ```
/// use sootline::fire::tenability::iso13571_carbon_monoxide_rate_1_min;
///
/// // By hand: 1400/35 000 = 0.04 per minute: a full dose in 25 min.
/// assert!((iso13571_carbon_monoxide_rate_1_min(1400.0) - 0.04).abs() < 1e-12);
/// ```
#[must_use]
pub fn iso13571_carbon_monoxide_rate_1_min(ppm: f64) -> f64 {
    const DOSE_PPM_MIN: f64 = 35_000.0;

    ppm.max(0.0) / DOSE_PPM_MIN
}

/// Dose of hydrogen cyanide per minute, by ISO 13571 of 2012.
///
/// ```text
/// 1/t = [HCN]^2.36 / 1.2·10⁶
/// ```
///
/// | symbol  | argument | unit |
/// |---------|----------|------|
/// | `[HCN]` | `ppm`    | ppm  |
/// | `t`     |          | min  |
///
/// The edition of 2007 had `exp([HCN]/43)/220`: within 7 % at 100 ppm, a third more at 150 ppm, twice as
/// much at 200 ppm. Range: see [`asphyxiants_limits`].
///
/// Source: [`ISO_13571`](crate::fire::sources::ISO_13571).
///
/// ```
/// use sootline::fire::tenability::iso13571_hydrogen_cyanide_rate_1_min;
///
/// // By hand: 100^2.36 = 10^4.72 = 52 481; /1.2e6 = 0.043734 per minute: a full dose in 22.9 min.
/// assert!((iso13571_hydrogen_cyanide_rate_1_min(100.0) - 0.043734).abs() < 1e-6);
/// ```
#[must_use]
pub fn iso13571_hydrogen_cyanide_rate_1_min(ppm: f64) -> f64 {
    // Most fuels give none: spare the power.
    if ppm > 0.0 { ppm.powf(2.36) / 1.2e6 } else { 0.0 }
}

/// How many times more is breathed because of carbon dioxide, by ISO 13571.
///
/// ```text
/// v = exp([CO₂]/5)   above 2 %, else 1
/// ```
///
/// | symbol  | argument  | unit |
/// |---------|-----------|------|
/// | `[CO₂]` | `percent` | %    |
///
/// It steps at 2 %, as printed. Range: up to about 10 %, where nobody breathes any faster.
///
/// Source: [`ISO_13571`](crate::fire::sources::ISO_13571).
///
/// ```
/// use sootline::fire::tenability::iso13571_hyperventilation;
///
/// // By hand: e^(5/5) = 2.71828.
/// assert!((iso13571_hyperventilation(5.0) - 2.71828).abs() < 1e-5);
/// assert_eq!(iso13571_hyperventilation(2.0), 1.0);
/// ```
#[must_use]
pub fn iso13571_hyperventilation(percent: f64) -> f64 {
    if percent > HYPERVENTILATION_FROM_PERCENT { (percent / 5.0).exp() } else { 1.0 }
}

/// Dose of want of oxygen per minute, by Purser.
///
/// ```text
/// 1/t = exp( -(8.13 - 0.54 (20.9 - [O₂])) )   below 20 %, else 0
/// ```
///
/// | symbol | argument  | unit |
/// |--------|-----------|------|
/// | `[O₂]` | `percent` | %    |
/// | `t`    |           | min  |
///
/// ISO 13571 leaves want of oxygen out as long as 13 % are there; this counts it from the start, which adds
/// little above 15 %. Source: [`PURSER_SFPE`](crate::fire::sources::PURSER_SFPE).
///
/// ```
/// use sootline::fire::tenability::purser_low_oxygen_rate_1_min;
///
/// // By hand at 10 %: 8.13 - 0.54·10.9 = 2.244, e^(-2.244) = 0.10603 per minute: 9.43 min.
/// assert!((purser_low_oxygen_rate_1_min(10.0) - 0.10603).abs() < 1e-5);
/// ```
#[must_use]
pub fn purser_low_oxygen_rate_1_min(percent: f64) -> f64 {
    if percent < LOW_OXYGEN_FROM_PERCENT { (0.54 * (20.9 - percent) - 8.13).exp() } else { 0.0 }
}

/// What the air exceeds of what the dose was made for.
#[must_use]
pub fn asphyxiants_limits(air: &Asphyxiants) -> Exceeded {
    Exceeded::none()
        .when(
            air.carbon_dioxide_percent > 5.0,
            "more than 5 % of carbon dioxide: it stuns by itself, which is not added",
        )
        .when(
            air.carbon_dioxide_percent > 10.0,
            "more than 10 % of carbon dioxide: nobody breathes as fast as the formula says",
        )
        .when(
            air.hydrogen_cyanide_ppm > 150.0,
            "more than 150 ppm of hydrogen cyanide: published formulas differ by a third and more",
        )
        .when(
            air.carbon_monoxide_ppm > 10_000.0,
            "more than 10 000 ppm of carbon monoxide: a few breaths count, and the sum is rough",
        )
}

impl Exposure for Asphyxiants {
    /// `( F_CO + F_HCN ) v + F_O2`, as Purser adds them with the terms of ISO 13571.
    fn dose_rate_1_min(&self) -> f64 {
        let poisons = iso13571_carbon_monoxide_rate_1_min(self.carbon_monoxide_ppm)
            + iso13571_hydrogen_cyanide_rate_1_min(self.hydrogen_cyanide_ppm);
        poisons * iso13571_hyperventilation(self.carbon_dioxide_percent)
            + purser_low_oxygen_rate_1_min(self.oxygen_percent)
    }

    fn towards(&self, other: &Self, share: f64) -> Self {
        let line = |from: f64, to: f64| from + (to - from) * share;
        Self {
            carbon_monoxide_ppm: line(self.carbon_monoxide_ppm, other.carbon_monoxide_ppm),
            hydrogen_cyanide_ppm: line(self.hydrogen_cyanide_ppm, other.hydrogen_cyanide_ppm),
            carbon_dioxide_percent: line(self.carbon_dioxide_percent, other.carbon_dioxide_percent),
            oxygen_percent: line(self.oxygen_percent, other.oxygen_percent),
        }
    }

    fn breaks(&self, other: &Self) -> [Option<f64>; 2] {
        [
            share_passing(
                self.carbon_dioxide_percent,
                other.carbon_dioxide_percent,
                HYPERVENTILATION_FROM_PERCENT,
            ),
            share_passing(self.oxygen_percent, other.oxygen_percent, LOW_OXYGEN_FROM_PERCENT),
        ]
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::{assert_relative_eq, relative_eq};

    #[test]
    fn times_to_a_full_dose_are_the_published_ones() {
        // Worked from the published forms, which are themselves recalled; rounded as the tables have them.
        for (rate_1_min, minutes, origin) in [
            (iso13571_carbon_monoxide_rate_1_min(1400.0), 25.0, "ISO 13571: 1400 ppm, 25 min"),
            (iso13571_hydrogen_cyanide_rate_1_min(100.0), 22.87, "by hand: 1.2e6/10^4.72"),
            (purser_low_oxygen_rate_1_min(10.0), 9.4, "Purser: 10 %, 9.4 min"),
            (purser_low_oxygen_rate_1_min(12.0), 27.7, "Purser: 12 %, 27.7 min"),
        ] {
            assert!(relative_eq!(1.0 / rate_1_min, minutes, max_relative = 5e-3), "{origin}: {rate_1_min}");
        }
    }

    #[test]
    fn five_and_thirty_minute_limits_of_purser_s_table_are_met() {
        // Purser's table of incapacitation, from memory: CO 6000 to 8000 ppm in 5 min, HCN 150 to 200 ppm in
        // 5 min, 90 to 120 ppm in 30 min: at the middle of each span the dose lies within a third of 1.
        let dose = |rate: f64, minutes: f64| rate * minutes;

        for (got, origin) in [
            (dose(iso13571_carbon_monoxide_rate_1_min(7000.0), 5.0), "CO, 5 min"),
            (dose(iso13571_hydrogen_cyanide_rate_1_min(175.0), 5.0), "HCN, 5 min"),
            (dose(iso13571_hydrogen_cyanide_rate_1_min(105.0), 30.0), "HCN, 30 min"),
        ] {
            assert!((0.67..1.5).contains(&got), "{origin}: {got}");
        }
    }

    #[test]
    fn rival_forms_lie_within_their_published_difference() {
        // ISO 13571:2007 for HCN, against 2012: 7 % more at 100 ppm, 30 % at 150 ppm, twice at 200 ppm.
        for (ppm, times) in [(100.0, 1.07), (150.0, 1.30), (200.0, 2.1)] {
            let earlier_1_min = (ppm / 43.0_f64).exp() / 220.0;
            let later_1_min = iso13571_hydrogen_cyanide_rate_1_min(ppm);
            assert_relative_eq!(earlier_1_min / later_1_min, times, max_relative = 0.02);
        }
        // Purser's uptake of CO for light work (25 L/min, 30 % of COHb): within 35 %, the uncertainty of ISO 13571.
        for ppm in [500.0, 1400.0, 5000.0, 10_000.0_f64] {
            let uptake_1_min = 3.317e-5 * ppm.powf(1.036) * 25.0 / 30.0;
            assert!((iso13571_carbon_monoxide_rate_1_min(ppm) / uptake_1_min - 1.0).abs() < 0.35, "{ppm}");
        }
        // Purser's breathing: exp(0.1903 [CO₂] + 2.0004)/7.1.
        for percent in [3.0, 5.0, 7.0_f64] {
            let purser = (0.1903 * percent + 2.0004).exp() / 7.1;
            assert_relative_eq!(iso13571_hyperventilation(percent), purser, max_relative = 0.06);
        }
    }

    #[test]
    fn fresh_air_gives_nothing_and_each_gas_only_adds() {
        let fresh = Asphyxiants::FRESH_AIR;
        let smoke = Asphyxiants {
            carbon_monoxide_ppm: 2000.0,
            hydrogen_cyanide_ppm: 50.0,
            carbon_dioxide_percent: 4.0,
            oxygen_percent: 16.0,
        };

        assert_eq!(fresh.dose_rate_1_min(), 0.0);
        for worse in [
            Asphyxiants { carbon_monoxide_ppm: 2100.0, ..smoke },
            Asphyxiants { hydrogen_cyanide_ppm: 51.0, ..smoke },
            Asphyxiants { carbon_dioxide_percent: 4.1, ..smoke },
            Asphyxiants { oxygen_percent: 15.9, ..smoke },
        ] {
            assert!(worse.dose_rate_1_min() > smoke.dose_rate_1_min());
        }
        // By hand: (2000/35000 + 50^2.36/1.2e6) e^0.8 + e^(0.54·4.9 - 8.13)
        // = (0.0571429 + 0.00851951)·2.225541 + 0.00415262 = 0.150286.
        assert_relative_eq!(smoke.dose_rate_1_min(), 0.150_286, max_relative = 1e-5);
    }

    #[test]
    fn both_sides_of_each_limit_are_told() {
        let smoke = Asphyxiants { carbon_dioxide_percent: 5.0, ..Asphyxiants::FRESH_AIR };
        assert!(asphyxiants_limits(&smoke).is_empty());
        assert_eq!(asphyxiants_limits(&Asphyxiants { carbon_dioxide_percent: 5.1, ..smoke }).len(), 1);
        assert_eq!(asphyxiants_limits(&Asphyxiants { carbon_dioxide_percent: 10.1, ..smoke }).len(), 2);
        assert_eq!(asphyxiants_limits(&Asphyxiants { hydrogen_cyanide_ppm: 151.0, ..smoke }).len(), 1);
        assert_eq!(asphyxiants_limits(&Asphyxiants { carbon_monoxide_ppm: 10_001.0, ..smoke }).len(), 1);
    }
}
