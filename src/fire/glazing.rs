//! When glass falls out of its frame.

use super::sources::{self, Source};

/// What stands in the frame.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Glazing {
    /// One pane of float glass of about 3 mm.
    Float3Mm,
    /// One pane of float glass of 4 to 6 mm.
    Float4To6Mm,
    /// Two panes of float glass.
    DoubleGlazed,
    /// Toughened glass.
    Tempered,
    /// Wired glass.
    Wired,
    /// Glass rated for fire.
    FireRated,
}

/// Temperature of the gas in the room at which a pane falls out, K.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Fallout {
    /// Early end of the published values.
    pub low_k: f64,
    /// The usual figure.
    pub typical_k: f64,
    /// Late end.
    pub high_k: f64,
}

/// When a pane falls out, by the temperature of the gas; none where it stays for as long as the screen looks.
///
/// A crack alone (from 150 °C of glass) opens nothing; it is falling out that lets air in.
///
/// | glazing        | low | typical | high °C | note |
/// |----------------|-----|---------|---------|------|
/// | 3 mm float     | 290 | 340 | 390 | normal law, 340 ± 50 |
/// | 4 to 6 mm float| 360 | 450 | 600 | at 450 one thin pane in six is said to fall: the high end is ours |
/// | double         | 450 | 600 | 750 | few tests; the ends are ours |
/// | toughened      | -   | -   | -   | softened without cracking under direct flame |
/// | wired, fire    | -   | -   | -   | stay for 30 min or more |
///
/// Range: panes held at the edge; panes held at points fall sooner; a plastic frame may let go first
/// (16 to 25 kW/m²). Treat as a spread, never as one number.
///
/// Sources: [`BABRAUSKAS_GLASS_1997`](sources::BABRAUSKAS_GLASS_1997), [`WANG_2014`](sources::WANG_2014).
///
/// ```
/// use sootline::fire::glazing::{Glazing, fallout};
///
/// assert_eq!(fallout(Glazing::Float3Mm).unwrap().typical_k, 340.0 + 273.15);
/// assert!(fallout(Glazing::Tempered).is_none());
/// ```
#[must_use]
pub fn fallout(glazing: Glazing) -> Option<Fallout> {
    let celsius = |low: f64, typical: f64, high: f64| {
        const ICE: f64 = super::constants::ICE_POINT_K;
        Some(Fallout { low_k: low + ICE, typical_k: typical + ICE, high_k: high + ICE })
    };
    match glazing {
        Glazing::Float3Mm => celsius(290.0, 340.0, 390.0),
        Glazing::Float4To6Mm => celsius(360.0, 450.0, 600.0),
        Glazing::DoubleGlazed => celsius(450.0, 600.0, 750.0),
        Glazing::Tempered | Glazing::Wired | Glazing::FireRated => None,
    }
}

/// The source of a criterion of [`fallout`].
#[must_use]
pub fn fallout_source(glazing: Glazing) -> &'static Source {
    match glazing {
        Glazing::Float3Mm | Glazing::Float4To6Mm | Glazing::DoubleGlazed => &sources::BABRAUSKAS_GLASS_1997,
        Glazing::Tempered => &sources::WANG_2014,
        Glazing::Wired | Glazing::FireRated => &sources::EN_1634,
    }
}
