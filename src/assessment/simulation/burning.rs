//! Fires of a run as the engine takes them.

use super::super::engine_fuel::fuel;
use super::Note;
use super::network::{Making, kelvin};
use crate::domain::Pointer;
use crate::domain::properties::FuelProperties;
use crate::domain::room::Place;
use crate::domain::simulation::{self as asked, HeatRelease, Ignition, Supply};
use crate::fire::design_fire::{DECAY_FROM_SHARE, DesignFire};
use crate::fire::two_zone::{self as engine, FUELS_MAX};

impl Making<'_> {
    pub(super) fn fire(
        &mut self,
        fire: &asked::Fire,
        at: &Pointer,
        fuels: &mut Vec<engine::Fuel>,
    ) -> Option<engine::Fire> {
        let room = self.room_index(&fire.room, at.member("room"));
        let burns: &FuelProperties = self.named(&fire.fuel, &at.member("fuel"), |catalogue, key| {
            catalogue.fuel(key).map(|row| &row.properties)
        })?;
        let made = match fuel(burns) {
            Ok(made) => made,
            Err(fault) => {
                let pointer = at.member("fuel").member(fault.member);
                self.fault(pointer, "contradiction", fault.reason);
                return None;
            }
        };
        self.fuel_notes(burns, at);
        let index = match fuels.iter().position(|fuel| *fuel == made) {
            Some(known) => known,
            None if fuels.len() < FUELS_MAX => {
                fuels.push(made);
                fuels.len() - 1
            }
            None => {
                let detail = format!("a run burns at most {FUELS_MAX} different fuels");
                self.fault(at.member("fuel"), "too_many_fuels", detail);
                return None;
            }
        };
        let radiative = fire.radiative_fraction.map_or(burns.radiative_fraction, |fraction| fraction.get());
        Some(engine::Fire {
            room: room?,
            fuel: index,
            heat_release: heat_release(&fire.heat_release),
            base_height_m: fire.base_height_m.get(),
            diameter_m: fire.diameter_m.get(),
            position: match fire.position {
                Place::Centre => engine::Position::Centre,
                Place::Wall => engine::Position::Wall,
                Place::Corner => engine::Position::Corner,
            },
            radiative_fraction: radiative,
            oxygen_limited: fire.oxygen_limited,
            supply: supply(fire.supply),
            ignites: match fire.ignites {
                Ignition::At(at_s) => engine::Ignition::At(at_s.get()),
                Ignition::Flux(flux) => engine::Ignition::Flux(flux.get()),
                Ignition::Surface(temperature) => {
                    engine::Ignition::SurfaceTemperature(kelvin(temperature.get()))
                }
            },
        })
    }

    /// What the fuel's row does not know, or the engine does not follow.
    fn fuel_notes(&mut self, burns: &FuelProperties, at: &Pointer) {
        let unknown: Vec<&str> = [
            ("carbon monoxide", burns.co_yield_kg_kg.is_none()),
            ("soot", burns.soot_yield_kg_kg.is_none()),
            ("hydrogen cyanide", burns.hcn_yield_kg_kg.is_none() && burns.nitrogen > 0.0),
        ]
        .into_iter()
        .filter_map(|(name, missing)| missing.then_some(name))
        .collect();
        let pointer = at.member("fuel");
        if !unknown.is_empty() {
            let names = unknown.join(", ");
            let text = format!("Not known of this fuel in good ventilation, and taken as none: {names}.");
            self.notes.push(Note { key: "yield_not_known", pointer: pointer.clone(), text });
        }
        if burns.chlorine > 0.0 {
            let text = "Hydrogen chloride of this fuel is not followed.".to_owned();
            self.notes.push(Note { key: "hydrogen_chloride_not_followed", pointer, text });
        }
    }
}

/// Nothing burns before the first point.
fn heat_release(given: &HeatRelease) -> engine::HeatRelease {
    match given {
        HeatRelease::Points(points) => {
            let before = match points.first() {
                Some(&(first_s, _)) if first_s > 0.0 => vec![(0.0, 0.0), (first_s, 0.0)],
                _ => Vec::new(),
            };
            engine::HeatRelease::Points(before.into_iter().chain(points.iter().copied()).collect())
        }
        HeatRelease::Grown(growth) => engine::HeatRelease::Grown(DesignFire {
            growth_kw_s2: growth.growth_kw_s2.get(),
            peak_kw: growth.peak_kw.get(),
            energy_kj: growth.energy_mj.get() * 1000.0,
            decay_from_share: DECAY_FROM_SHARE,
        }),
    }
}

/// A share that fades in no time is none; the engine divides by the time.
fn supply(given: Supply) -> engine::Supply {
    match given {
        Supply::Fed => engine::Supply::Fed,
        Supply::HeatFed { after_flame_share, after_flame_fades_s } => {
            let (without_flame, fades_s) = (after_flame_share.get(), after_flame_fades_s.get());
            if fades_s > 0.0 {
                engine::Supply::HeatFed { without_flame, fades_s }
            } else {
                engine::Supply::HeatFed { without_flame: 0.0, fades_s: 1.0 }
            }
        }
    }
}
