//! The form of a fire of a run.

use serde::Serializer;
use serde::ser::SerializeMap;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::Schema;

use super::curve::HeatReleaseForm;
use super::mention::RoomName;
use crate::domain::properties::FuelProperties;
use crate::domain::quantity::{
    self, Distance, FireDiameter, FireGrowth, Fraction, FuelEnergy, HeatFlux, RadiativeFraction, Span,
    Temperature,
};
use crate::domain::room::Place;
use crate::domain::simulation::check::{Along, Within};
use crate::domain::simulation::{Fire, Growth, HeatRelease, Ignition, Supply, SupplyKind};
use crate::domain::{Key, Pointer};
use crate::wire::form::{Components, Form, Way};
use crate::wire::json::Json;
use crate::wire::named::NameOr;
use crate::wire::object::{self, Maybe, default_of, doc_of, name_of, object, parts};
use crate::wire::reader::Reader;
use crate::wire::room::zero;
use crate::wire::scalar::OneWord;

/// What may light a fire, as it stands on the wire: one of the three.
struct IgnitionMembers {
    at_s: Option<Span>,
    flux_kw_m2: Option<HeatFlux>,
    surface_temperature_c: Option<Temperature>,
}

object! {
    /// What lights a fire: one of the three.
    IgnitionMembers as "SimulationIgnition" {
        /// A time.
        at_s: Maybe<Span> = None,
        /// Heat received at the floor of its room.
        flux_kw_m2: Maybe<HeatFlux> = None,
        /// Temperature of the ceiling's surface in its room.
        surface_temperature_c: Maybe<Temperature> = None,
    }
}

parts! {
    /// A fire. Its heat release is given by points, or by growth, peak and energy.
    FireParts as "SimulationFire" ignoring &[]; {
        /// Unique among the fires.
        key: Key,
        /// Key of its room.
        room: RoomName,
        /// Heat release with all the air it wants, against the time since it was lit: points `[s, kW]`
        /// joined by straight lines, or an object with growth, peak and energy. Nothing burns before
        /// the first point; the last holds on.
        heat_release_kw: Maybe<HeatReleaseForm> = None,
        /// Growth coefficient of a t² fire, in place of `heat_release_kw`; `peak_kw` and `energy_mj` go
        /// with it.
        growth_kw_s2: Maybe<FireGrowth> = None,
        /// Highest heat release of the t² fire.
        peak_kw: Maybe<quantity::HeatRelease> = None,
        /// Heat in the fuel of the t² fire.
        energy_mj: Maybe<FuelEnergy> = None,
        /// Height of its base above the floor.
        base_height_m: Distance = zero!(Distance),
        /// Diameter of its base.
        diameter_m: FireDiameter,
        /// Where it stands.
        position: OneWord<Place> = Place::Centre,
        /// Share of the heat that the flame radiates; null: the fuel's.
        radiative_fraction: Maybe<RadiativeFraction> = None,
        /// What burns: a name of `/v1/catalogue/fuels`, or its properties.
        fuel: NameOr<FuelProperties>,
        /// Whether want of oxygen holds it back.
        oxygen_limited: bool = true,
        /// How the fuel comes: `fed` as told, burnt or not (a burner); `heat_fed` less when the flame
        /// weakens, and what did not come burns later (a solid, a pool).
        supply: OneWord<SupplyKind> = SupplyKind::Fed,
        /// Of a `heat_fed` fire: share of the fuel that goes on coming once the flame is out; null: none.
        after_flame_share: Maybe<Fraction> = None,
        /// Time in which that share falls to 1/e; required with the share.
        after_flame_fades_s: Maybe<Span> = None,
        /// What lights it.
        ignites: Ignition = Ignition::At(zero!(Span)),
    }
}

impl FireParts {
    fn of(fire: &Fire) -> Self {
        let fire = fire.clone();
        let (supply, share, fades) = match fire.supply {
            Supply::Fed => (SupplyKind::Fed, None, None),
            Supply::HeatFed { after_flame_share, after_flame_fades_s } => {
                (SupplyKind::HeatFed, Some(after_flame_share), Some(after_flame_fades_s))
            }
        };
        Self {
            key: Some(fire.key),
            room: Some(fire.room),
            heat_release_kw: Some(Some(fire.heat_release)),
            growth_kw_s2: Some(None),
            peak_kw: Some(None),
            energy_mj: Some(None),
            base_height_m: Some(fire.base_height_m),
            diameter_m: Some(fire.diameter_m),
            position: Some(fire.position),
            radiative_fraction: Some(fire.radiative_fraction),
            fuel: Some(fire.fuel),
            oxygen_limited: Some(fire.oxygen_limited),
            supply: Some(supply),
            after_flame_share: Some(share),
            after_flame_fades_s: Some(fades),
            ignites: Some(fire.ignites),
        }
    }

    /// The heat release out of `heat_release_kw`, or of the three members in its place.
    fn heat_release(&self, at: &Pointer, reader: &mut Reader<'_>) -> Option<HeatRelease> {
        let given = self.heat_release_kw.clone()?;
        let (growth, peak, energy) = (self.growth_kw_s2?, self.peak_kw?, self.energy_mj?);
        if let (None, Some(growth_kw_s2), Some(peak_kw), Some(energy_mj)) = (&given, growth, peak, energy) {
            return Some(HeatRelease::Grown(Growth { growth_kw_s2, peak_kw, energy_mj }));
        }
        let members = [
            ("growth_kw_s2", growth.is_some()),
            ("peak_kw", peak.is_some()),
            ("energy_mj", energy.is_some()),
        ];
        let some = members.iter().any(|(_, there)| *there);
        match given {
            Some(given) if !some => Some(given),
            Some(_) => {
                let detail = "the heat release is given twice";
                let mend = "give either `heat_release_kw`, or `growth_kw_s2`, `peak_kw` and `energy_mj`";
                reader.fault_with(&at.member("heat_release_kw"), "contradiction", detail, Some(mend));
                None
            }
            None if !some => {
                let mend = "give `heat_release_kw`, or `growth_kw_s2`, `peak_kw` and `energy_mj`";
                let detail = "the heat release is required";
                reader.fault_with(&at.member("heat_release_kw"), "missing", detail, Some(mend));
                None
            }
            None => {
                for (name, _) in members.iter().filter(|(_, there)| !there) {
                    let detail = format!("the member `{name}` is required for a t² fire");
                    reader.fault(&at.member(name), "missing", detail);
                }
                None
            }
        }
    }

    fn supply(&self, at: &Pointer, reader: &mut Reader<'_>) -> Option<Supply> {
        let (share, fades) = (self.after_flame_share?, self.after_flame_fades_s?);
        match (self.supply?, share, fades) {
            (SupplyKind::Fed, None, None) => Some(Supply::Fed),
            (SupplyKind::Fed, share, _) => {
                let name = if share.is_some() { "after_flame_share" } else { "after_flame_fades_s" };
                let detail = "only a fuel that is `heat_fed` goes on after its flame";
                let mend = "leave it out, or give `supply` as `heat_fed`";
                reader.fault_with(&at.member(name), "contradiction", detail, Some(mend));
                None
            }
            (SupplyKind::HeatFed, Some(share), None) if share.get() > 0.0 => {
                let detail = "the member `after_flame_fades_s` is required with `after_flame_share`";
                reader.fault(&at.member("after_flame_fades_s"), "missing", detail);
                None
            }
            (SupplyKind::HeatFed, share, fades) => Some(Supply::HeatFed {
                after_flame_share: share.unwrap_or(zero!(Fraction)),
                after_flame_fades_s: fades.unwrap_or(zero!(Span)),
            }),
        }
    }

    /// Lengths that must fit into its room.
    fn within(&self, at: &Pointer, reader: &mut Reader<'_>) {
        let Some(room) = &self.room else { return };
        let height = self.base_height_m.map(|m| ("base_height_m", m.get(), Along::Height));
        let side = self.diameter_m.map(|m| ("diameter_m", m.get(), Along::Floor));
        for (member, length_m, along) in [height, side].into_iter().flatten() {
            reader.cross.within.push(Within { at: at.member(member), room: room.clone(), length_m, along });
        }
    }

    fn whole(self, heat_release: Option<HeatRelease>, supply: Option<Supply>) -> Option<Fire> {
        Some(Fire {
            key: self.key?,
            room: self.room?,
            heat_release: heat_release?,
            base_height_m: self.base_height_m?,
            diameter_m: self.diameter_m?,
            position: self.position?,
            radiative_fraction: self.radiative_fraction?,
            fuel: self.fuel?,
            oxygen_limited: self.oxygen_limited?,
            supply: supply?,
            ignites: self.ignites?,
        })
    }
}

impl Form for Fire {
    type Value = Self;

    const IDENTITY: Option<&'static str> = Some("key");

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        let parts = FireParts::read(json, at, reader)?;
        parts.within(at, reader);
        let heat_release = parts.heat_release(at, reader);
        let supply = parts.supply(at, reader);
        parts.whole(heat_release, supply)
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut map = serializer.serialize_map(None)?;
        FireParts::of(value).write(&mut map)?;
        map.end()
    }

    fn schema(way: Way) -> RefOr<Schema> {
        object::reference("SimulationFire", way)
    }

    fn components(way: Way, into: &mut Components) {
        let schema = FireParts::object(way);
        let name = object::component_name("SimulationFire", way);
        object::add_component(into, name, schema.into(), |into| {
            FireParts::components_of_members(way, into);
        });
    }
}

impl Form for Ignition {
    type Value = Self;

    fn read(json: &Json, at: &Pointer, reader: &mut Reader<'_>) -> Option<Self> {
        let given = IgnitionMembers::read(json, at, reader)?;
        let causes = [
            given.at_s.map(Self::At),
            given.flux_kw_m2.map(Self::Flux),
            given.surface_temperature_c.map(Self::Surface),
        ];
        let mut causes = causes.into_iter().flatten();
        match (causes.next(), causes.next()) {
            (Some(cause), None) => Some(cause),
            (None, _) => {
                let detail = "one of `at_s`, `flux_kw_m2` and `surface_temperature_c` is required";
                reader.fault_with(at, "missing", detail, Some("{\"at_s\": 0}: it burns from the start"));
                None
            }
            (Some(_), Some(_)) => {
                let detail = "a fire is lit by one of `at_s`, `flux_kw_m2` and `surface_temperature_c`";
                reader.fault(at, "contradiction", detail);
                None
            }
        }
    }

    fn write<S: Serializer>(value: &Self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut members = IgnitionMembers { at_s: None, flux_kw_m2: None, surface_temperature_c: None };
        match *value {
            Self::At(at_s) => members.at_s = Some(at_s),
            Self::Flux(flux_kw_m2) => members.flux_kw_m2 = Some(flux_kw_m2),
            Self::Surface(temperature_c) => members.surface_temperature_c = Some(temperature_c),
        }
        IgnitionMembers::write(&members, serializer)
    }

    fn schema(way: Way) -> RefOr<Schema> {
        IgnitionMembers::schema(way)
    }

    fn components(way: Way, into: &mut Components) {
        IgnitionMembers::components(way, into);
    }
}
