//! What the comparison had to choose, once for all series and before any run.
//!
//! Where a report gives a number, the series takes it. What no report gives stands here, from a
//! handbook or as the middle of what is plausible; `sensitivity` tells what each is worth.

use sootline::fire::two_zone::{
    Ambient, Fan, Fire, Fuel, GivesWay, HeatRelease, Ignition, Lie, Linings, Network, Opening, Position,
    Room, Side, Slab, Supply, Zoning,
};

/// Inputs that the reports leave open.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Choices {
    /// Height of the top of the burner in the 2018 room, m. Not stated; near the floor in one note, and in the
    /// shut tests the layer comes to rest 0.55 to 0.65 m above the floor. Middle of 0.3 to 0.7.
    pub burner_top_m: f64,
    /// Share that a methane or natural-gas flame radiates: 0.22 for a burner of 0.37 m (NIST, gas burner as a
    /// pool fire, from memory); 0.14 for small ones (Tewarson, from memory).
    pub methane_radiates: f64,
    /// Share that burning furniture radiates: 0.35, usual for mixed fuel (common practice).
    pub furniture_radiates: f64,
    /// Conductivity of every lining over its handbook value.
    pub lining_factor: f64,
    /// Leakage of the 2018 room with its door shut, m²; half near the floor, half near the ceiling.
    pub leakage_2018_m2: f64,
    /// Discharge coefficient of every opening: 0.68 inwards, 0.73 outwards (Steckler; Prahl and Emmons), mean.
    pub discharge_coefficient: f64,
    /// Heat release of every fire over its nominal value.
    pub heat_factor: f64,
    /// Lag of the oxygen points of the 2018 room, s: 10 to 20 s as the data say, middle.
    pub oxygen_lag_s: f64,
    /// True: the oxygen points of the 2018 room read dried gas, which is common practice; not stated.
    pub oxygen_dried: bool,
    /// Lag of the hood that measured the furniture, s. 0 to 25 s is unresolved: taken as logged.
    pub hood_lag_s: f64,
    /// True: layers are compared as the sensors of the test would see them. False: as the engine has them.
    pub through_sensors: bool,
}

impl Default for Choices {
    fn default() -> Self {
        Self {
            burner_top_m: 0.5,
            methane_radiates: 0.22,
            furniture_radiates: 0.35,
            lining_factor: 1.0,
            leakage_2018_m2: 0.03,
            discharge_coefficient: 0.7,
            heat_factor: 1.0,
            oxygen_lag_s: 15.0,
            oxygen_dried: true,
            hood_lag_s: 0.0,
            through_sensors: true,
        }
    }
}

impl Choices {
    /// A sheet of a lining, its conductivity varied with the rest.
    pub fn lined(&self, slab: Slab) -> Vec<Slab> {
        vec![Slab { conductivity_w_mk: slab.conductivity_w_mk * self.lining_factor, ..slab }]
    }

    /// Walls and ceiling of one sheet, the floor of another.
    pub fn linings(&self, walls: Slab, floor: Slab) -> Linings {
        Linings { ceiling: self.lined(walls), walls: self.lined(walls), floor: self.lined(floor) }
    }

    /// An opening to outside or between rooms.
    pub fn opening(&self, between: [Side; 2], width_m: f64, height_m: f64, sill_m: f64) -> Opening {
        Opening {
            lie: Lie::Vertical,
            between,
            width_m,
            height_m,
            sill_m,
            open_fraction: 1.0,
            leakage_area_m2: 0.0,
            discharge_coefficient: self.discharge_coefficient,
            azimuth_deg: None,
            gives_way: GivesWay::default(),
        }
    }

    /// A gas burner in the first room that comes up within 10 s and stays.
    pub fn burner(&self, fuel_kw: f64, diameter_m: f64, base_height_m: f64, position: Position) -> Fire {
        let kw = fuel_kw * self.heat_factor;
        Fire {
            room: 0,
            fuel: 0,
            heat_release: HeatRelease::Points(vec![(0.0, 0.0), (10.0, kw), (1e5, kw)]),
            base_height_m,
            diameter_m,
            position,
            radiative_fraction: self.methane_radiates,
            oxygen_limited: true,
            supply: Supply::Fed,
            ignites: Ignition::At(0.0),
        }
    }
}

const fn slab(
    thickness_m: f64,
    conductivity_w_mk: f64,
    density_kg_m3: f64,
    specific_heat_j_kgk: f64,
) -> Slab {
    Slab { thickness_m, conductivity_w_mk, density_kg_m3, specific_heat_j_kgk }
}

/// Gypsum board of 15.9 mm, the usual one on steel studs (Karlsson and Quintiere, Table 6.1, from memory).
pub const GYPSUM_BOARD: Slab = slab(0.0159, 0.17, 960.0, 1100.0);
/// Concrete of a laboratory floor (the same table, from memory).
pub const CONCRETE: Slab = slab(0.15, 1.6, 2400.0, 750.0);
/// Ceramic-fibre board of 25 mm (maker's values at 300 °C, from memory).
pub const CERAMIC_FIBRE: Slab = slab(0.025, 0.09, 260.0, 1050.0);
/// Calcium-silicate board of 12.7 mm (the report of the large room, from memory).
pub const CALCIUM_SILICATE: Slab = slab(0.0127, 0.12, 737.0, 1200.0);
/// Dense alumina-silica refractory of 0.1 m (the report of the enclosure, from memory).
pub const REFRACTORY: Slab = slab(0.1, 0.39, 1440.0, 1000.0);

/// Methane, and natural gas: 50.0 MJ/kg, no soot (Tewarson, from memory).
pub const METHANE: Fuel = Fuel {
    carbon: 0.7487,
    hydrogen: 0.2513,
    oxygen: 0.0,
    nitrogen: 0.0,
    heat_of_combustion_kj_kg: 50_000.0,
    carbon_monoxide_yield: 0.0,
    soot_yield: 0.0,
    hydrogen_cyanide_yield: 0.0,
};
/// Propane (Tewarson, from memory).
pub const PROPANE: Fuel = Fuel {
    carbon: 0.8171,
    hydrogen: 0.1829,
    heat_of_combustion_kj_kg: 43_700.0,
    carbon_monoxide_yield: 0.005,
    soot_yield: 0.024,
    ..METHANE
};
/// Heptane (Tewarson, from memory).
pub const HEPTANE: Fuel = Fuel {
    carbon: 0.8391,
    hydrogen: 0.1609,
    heat_of_combustion_kj_kg: 41_200.0,
    carbon_monoxide_yield: 0.010,
    soot_yield: 0.037,
    ..METHANE
};
/// Toluene (Tewarson, from memory).
pub const TOLUENE: Fuel = Fuel {
    carbon: 0.9125,
    hydrogen: 0.0875,
    heat_of_combustion_kj_kg: 27_700.0,
    carbon_monoxide_yield: 0.066,
    soot_yield: 0.178,
    ..METHANE
};
/// Flexible polyurethane foam GM23, C1 H1.8 O0.35 N0.06 (Tewarson, from memory): the one of the foams whose
/// heat, soot and formula agree on the oxygen they need.
pub const FOAM: Fuel = Fuel {
    carbon: 0.5927,
    hydrogen: 0.0895,
    oxygen: 0.2763,
    nitrogen: 0.0415,
    heat_of_combustion_kj_kg: 19_000.0,
    carbon_monoxide_yield: 0.031,
    soot_yield: 0.227,
    hydrogen_cyanide_yield: 0.01,
};

/// Outside and indoor air at one temperature.
pub fn air_at(ambient_c: f64) -> Ambient {
    let temperature_k = ambient_c + 273.15;
    Ambient { temperature_k, indoor_temperature_k: temperature_k, ..Ambient::default() }
}

/// A room on the datum.
pub fn room(length_m: f64, width_m: f64, height_m: f64, linings: Linings) -> Room {
    Room {
        length_m,
        width_m,
        height_m,
        floor_elevation_m: 0.0,
        leakage_low_m2: 0.0,
        leakage_high_m2: 0.0,
        linings,
        zoning: Zoning::TwoLayers,
    }
}

/// A network of some rooms with one fire.
pub fn network(
    rooms: Vec<Room>,
    openings: Vec<Opening>,
    fuel: Fuel,
    fire: Fire,
    ambient: Ambient,
) -> Network {
    Network { rooms, openings, fuels: vec![fuel], fires: vec![fire], ambient, ..Network::default() }
}

/// A fan that moves its volume all the time, whatever stands against it.
pub fn fan(from: Side, to: Side, volume_flow_m3_s: f64, height_m: f64) -> Fan {
    Fan {
        from,
        to,
        volume_flow_m3_s,
        inlet_height_m: height_m,
        outlet_height_m: height_m,
        stall_pa: 1e5,
        starts_s: 0.0,
        stops_s: 1e6,
    }
}

/// Where a burner of the 2018 room stands.
pub fn position(location: &str) -> Position {
    match location {
        "Center" | "A centre" => Position::Centre,
        "Back" | "Side" | "C back wall" => Position::Wall,
        "Corner" | "B corner" => Position::Corner,
        other => panic!("no place {other}"),
    }
}
