//! An opening: door, window, vent, hatch or gap between two spaces.

use super::ids::Key;
use super::quantity::{Angle, FireRating, Fraction, LeakageArea, OpeningSide, Sill};
use super::room::BasisOf;

/// What sort of opening.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[expect(missing_docs, reason = "the words are the trade's")]
pub enum OpeningKind {
    Door,
    DoubleDoor,
    Window,
    Vent,
    Hatch,
    RoofVent,
    Gap,
}

impl OpeningKind {
    /// Whether the opening lies in a floor, ceiling or roof; its two sides are then width and height.
    pub fn is_horizontal(self) -> bool {
        matches!(self, Self::Hatch | Self::RoofVent)
    }
}

/// One side of an opening.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum Space {
    /// A room of the building.
    Room(Key),
    /// Outside air.
    Outside,
}

/// Which way a leaf moves, seen from the first of the connected spaces.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[expect(missing_docs, reason = "the words are the trade's")]
pub enum Swing {
    In,
    Out,
    Both,
    Slide,
}

/// Side of the building by the fire ground's letters: A is the address side, then clockwise.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[expect(missing_docs, reason = "the letters of the fire ground")]
pub enum Side {
    A,
    B,
    C,
    D,
}

/// What the pane is made of.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[expect(missing_docs, reason = "the words are the trade's")]
pub enum Glazing {
    Float3Mm,
    Float6Mm,
    DoubleGlazed,
    Tempered,
    Laminated,
    Wired,
    FireResisting,
    Plastic,
}

/// An opening, checked.
#[derive(Debug, Clone, PartialEq)]
pub struct Opening {
    /// Unique among the building's openings.
    pub key: Key,
    /// Free text; the key where empty.
    pub name: String,
    /// What sort.
    pub kind: OpeningKind,
    /// The two spaces; of a horizontal opening the first is the lower.
    pub connects: [Space; 2],
    /// Width.
    pub width_m: OpeningSide,
    /// Height, or the second side of a horizontal opening.
    pub height_m: OpeningSide,
    /// Lower edge above the floor of the first space; not used by horizontal openings.
    pub sill_m: Sill,
    /// Share of the area that stands open as found.
    pub open_fraction: Fraction,
    /// A hold-open keeps it open until detection releases it.
    pub held_open: bool,
    /// Shuts itself.
    pub self_closing: bool,
    /// Fire resistance, where recorded.
    pub fire_rating_min: Option<FireRating>,
    /// Leakage when shut, where measured.
    pub leakage_area_m2: Option<LeakageArea>,
    /// Which way the leaf moves.
    pub swing: Option<Swing>,
    /// A crew could enter or open it.
    pub entry: bool,
    /// Side of the building.
    pub side: Option<Side>,
    /// Where the outer face looks, degrees clockwise from north.
    pub azimuth_deg: Option<Angle>,
    /// Pane.
    pub glazing: Option<Glazing>,
    /// How the numbers are known.
    pub basis: BasisOf,
}

impl Opening {
    /// Members whose basis can be recorded.
    pub const BASIS_MEMBERS: &[&str] = &[
        "kind",
        "width_m",
        "height_m",
        "sill_m",
        "open_fraction",
        "held_open",
        "self_closing",
        "fire_rating_min",
        "leakage_area_m2",
        "swing",
        "entry",
        "side",
        "azimuth_deg",
        "glazing",
    ];

    /// Whether the opening touches this room.
    pub fn touches(&self, room: &Key) -> bool {
        self.connects.iter().any(|side| matches!(side, Space::Room(key) if key == room))
    }
}
