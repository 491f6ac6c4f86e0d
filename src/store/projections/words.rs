//! The words of the domain's enums, as on the wire.

use crate::domain::Named;
use crate::domain::building::{Coverage, SprinklerState};
use crate::domain::opening::{Glazing, OpeningKind, Side, Swing};
use crate::domain::room::{CeilingForm, Hazard, Place, RoomKind};
use crate::domain::time::Day;

/// The key of a catalogue row; nothing where the properties were given.
pub(in crate::store) fn name<T>(named: &Named<T>) -> Option<String> {
    match named {
        Named::Catalogue(key) => Some(key.clone()),
        Named::Given(_) => None,
    }
}

pub(in crate::store) fn day(day: Day) -> String {
    format!("{:04}-{:02}-{:02}", day.year, day.month, day.day)
}

pub(in crate::store) fn sprinkler_state(state: SprinklerState) -> &'static str {
    match state {
        SprinklerState::None => "none",
        SprinklerState::NotRecorded => "not_recorded",
        SprinklerState::OutOfService => "out_of_service",
        SprinklerState::Installed => "installed",
        SprinklerState::WorkingTested => "working_tested",
    }
}

pub(in crate::store) fn coverage(coverage: Coverage) -> &'static str {
    match coverage {
        Coverage::Partial => "partial",
        Coverage::Full => "full",
    }
}

pub(super) fn room_kind(kind: RoomKind) -> &'static str {
    match kind {
        RoomKind::Room => "room",
        RoomKind::Corridor => "corridor",
        RoomKind::Stair => "stair",
        RoomKind::Shaft => "shaft",
        RoomKind::Atrium => "atrium",
        RoomKind::Attic => "attic",
        RoomKind::Void => "void",
    }
}

pub(super) fn ceiling_form(form: CeilingForm) -> &'static str {
    match form {
        CeilingForm::Flat => "flat",
        CeilingForm::Sloped => "sloped",
        CeilingForm::OpenToRoof => "open_to_roof",
    }
}

pub(super) fn place(place: Place) -> &'static str {
    match place {
        Place::Centre => "centre",
        Place::Wall => "wall",
        Place::Corner => "corner",
    }
}

pub(super) fn hazard(hazard: Hazard) -> &'static str {
    match hazard {
        Hazard::None => "none",
        Hazard::NotRecorded => "not_recorded",
        Hazard::LithiumIon => "lithium_ion",
        Hazard::GasCylinders => "gas_cylinders",
        Hazard::FlammableLiquid => "flammable_liquid",
        Hazard::FlammableGas => "flammable_gas",
        Hazard::CombustibleDust => "combustible_dust",
        Hazard::Oxidisers => "oxidisers",
        Hazard::Explosives => "explosives",
        Hazard::Hoard => "hoard",
        Hazard::ExposedFoam => "exposed_foam",
        Hazard::MedicalOxygen => "medical_oxygen",
    }
}

pub(super) fn opening_kind(kind: OpeningKind) -> &'static str {
    match kind {
        OpeningKind::Door => "door",
        OpeningKind::DoubleDoor => "double_door",
        OpeningKind::Window => "window",
        OpeningKind::Vent => "vent",
        OpeningKind::Hatch => "hatch",
        OpeningKind::RoofVent => "roof_vent",
        OpeningKind::Gap => "gap",
    }
}

pub(super) fn swing(swing: Swing) -> &'static str {
    match swing {
        Swing::In => "in",
        Swing::Out => "out",
        Swing::Both => "both",
        Swing::Slide => "slide",
    }
}

pub(super) fn side(side: Side) -> &'static str {
    match side {
        Side::A => "A",
        Side::B => "B",
        Side::C => "C",
        Side::D => "D",
    }
}

pub(super) fn glazing(glazing: Glazing) -> &'static str {
    match glazing {
        Glazing::Float3Mm => "float_3mm",
        Glazing::Float6Mm => "float_6mm",
        Glazing::DoubleGlazed => "double_glazed",
        Glazing::Tempered => "tempered",
        Glazing::Laminated => "laminated",
        Glazing::Wired => "wired",
        Glazing::FireResisting => "fire_resisting",
        Glazing::Plastic => "plastic",
    }
}
