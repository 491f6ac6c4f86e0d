//! Hazards outside the methods.

use super::findings::{Caution, HazardFinding};
use super::inputs::Inputs;
use crate::domain::room::Hazard;

/// Key of a hazard's caution and what is not computed because of it; none where there is nothing to say.
const fn words(hazard: Hazard) -> Option<(&'static str, &'static str)> {
    match hazard {
        Hazard::None => None,
        Hazard::NotRecorded => Some((
            "hazards_not_recorded",
            "Nobody recorded whether this room holds hazards outside the methods. None is computed; every rating is \
             provisional.",
        )),
        Hazard::LithiumIon => Some((
            "hazard_lithium_ion",
            "Lithium-ion batteries: venting of flammable and toxic gas, explosion of that gas, re-ignition and jets are \
             not computed.",
        )),
        Hazard::GasCylinders => Some((
            "hazard_gas_cylinders",
            "Gas cylinders: their bursting and what they feed to the fire are not computed.",
        )),
        Hazard::FlammableLiquid => Some((
            "hazard_flammable_liquid",
            "Flammable liquid: a spreading pool fire, its vapour and its growth within seconds are not computed.",
        )),
        Hazard::FlammableGas => Some((
            "hazard_flammable_gas",
            "Flammable gas: a leak, its explosion and the fire that it feeds are not computed.",
        )),
        Hazard::CombustibleDust => Some((
            "hazard_combustible_dust",
            "Combustible dust: flash fires and dust explosions are not computed.",
        )),
        Hazard::Oxidisers => Some((
            "hazard_oxidisers",
            "Oxidisers: burning without air from outside, and faster than the limits by air say, is not computed.",
        )),
        Hazard::Explosives => Some(("hazard_explosives", "Explosives: their effects are not computed.")),
        Hazard::Hoard => Some((
            "hazard_hoard",
            "Hoarded contents: fuel far above that of the use, blocked ways and hidden fire are not computed.",
        )),
        Hazard::ExposedFoam => Some((
            "hazard_exposed_foam",
            "Exposed foam: flame over whole surfaces within a minute or two is not computed beyond the ultra-fast growth \
             that it sets.",
        )),
        Hazard::MedicalOxygen => Some((
            "hazard_medical_oxygen",
            "Medical oxygen: ignition and growth in enriched air are not computed.",
        )),
    }
}

/// What the report says of each hazard.
pub(super) fn findings(inputs: &Inputs<'_>) -> Vec<HazardFinding> {
    inputs
        .hazards
        .iter()
        .filter_map(|&hazard| {
            let (_, text) = words(hazard)?;
            Some(HazardFinding { hazard, text, bars_not_indicated: hazard != Hazard::NotRecorded })
        })
        .collect()
}

/// The cautions of the hazards.
pub(super) fn cautions<'i>(inputs: &'i Inputs<'_>) -> impl Iterator<Item = Caution> + 'i {
    inputs
        .hazards
        .iter()
        .filter_map(|&hazard| words(hazard))
        .map(|(key, text)| Caution { key, text: text.into() })
}

/// The hazard that bars `not_indicated`, and its words.
pub(super) fn bar(inputs: &Inputs<'_>) -> Option<(&'static str, &'static str)> {
    inputs.known_hazards().find_map(words)
}
