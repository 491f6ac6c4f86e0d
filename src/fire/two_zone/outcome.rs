//! What a run gives: samples, events, its own check.

/// How to run.
#[derive(Clone, Debug, PartialEq)]
pub struct Plan {
    /// When to end, s.
    pub duration_s: f64,
    /// When to sample, s, rising; 0 and the end need not be in it.
    pub samples_s: Vec<f64>,
    /// Relative tolerance of a step; [`Plan::TOLERANCE`] is about 1 K.
    pub tolerance: f64,
    /// Steps before the run gives up.
    pub step_budget: usize,
}

impl Plan {
    /// Usual tolerance.
    pub const TOLERANCE: f64 = 7e-4;
    /// Usual budget, far above what a run of a day takes.
    pub const STEP_BUDGET: usize = 400_000;

    /// Samples every `interval_s`, and at the end.
    #[must_use]
    pub fn every(interval_s: f64, duration_s: f64) -> Self {
        let mut samples_s = Vec::new();
        let mut index = 0_u32;
        loop {
            let time_s = f64::from(index) * interval_s;
            if time_s >= duration_s {
                break;
            }
            samples_s.push(time_s);
            index += 1;
        }
        samples_s.push(duration_s);
        Self { duration_s, samples_s, tolerance: Self::TOLERANCE, step_budget: Self::STEP_BUDGET }
    }
}

/// One layer of a room at one moment.
#[derive(Clone, Copy, Debug, PartialEq, Default)]
pub struct Layer {
    /// Temperature, K.
    pub temperature_k: f64,
    /// Mass, kg.
    pub mass_kg: f64,
    /// Mass fractions of the wet gas.
    pub gas: Composition,
}

/// Mass fractions of a gas; nitrogen is the rest.
#[derive(Clone, Copy, Debug, PartialEq, Default)]
pub struct Composition {
    /// Oxygen.
    pub oxygen: f64,
    /// Carbon dioxide.
    pub carbon_dioxide: f64,
    /// Water vapour.
    pub water: f64,
    /// Carbon monoxide.
    pub carbon_monoxide: f64,
    /// Hydrogen cyanide.
    pub hydrogen_cyanide: f64,
    /// Soot.
    pub soot: f64,
    /// Unburned fuel gas.
    pub unburned_fuel: f64,
}

/// One room at one moment.
#[derive(Clone, Copy, Debug, PartialEq, Default)]
pub struct RoomState {
    /// Hot layer.
    pub upper: Layer,
    /// Cool layer.
    pub lower: Layer,
    /// Height of the interface above the floor, m.
    pub interface_height_m: f64,
    /// Pressure at the floor above that of outside air at the same height, Pa.
    pub pressure_pa: f64,
    /// Surface of the ceiling, K.
    pub ceiling_k: f64,
    /// Surface of the walls beside the hot layer, K.
    pub upper_wall_k: f64,
    /// Surface of the walls beside the cool layer, K.
    pub lower_wall_k: f64,
    /// Surface of the floor, K.
    pub floor_k: f64,
    /// Heat that a cold target in the middle of the floor receives by radiation, kW/m².
    pub floor_flux_kw_m2: f64,
    /// Heat released in this room, plume and layers, kW.
    pub heat_release_kw: f64,
    /// Heat released away from the fires themselves, in layers and door jets, kW.
    pub layer_heat_release_kw: f64,
    /// Extinction of light by soot in the hot layer, 1/m.
    pub upper_extinction_1_m: f64,
    /// The same in the cool layer, 1/m.
    pub lower_extinction_1_m: f64,
    /// Gas of the ceiling jet above the fire, K.
    pub ceiling_jet_k: f64,
    /// Fuel over oxygen that the plumes draw, against the chemical need.
    pub equivalence_ratio: f64,
}

/// One opening at one moment; positive into the first of what it joins.
#[derive(Clone, Copy, Debug, PartialEq, Default)]
pub struct OpeningState {
    /// Into the first, kg/s.
    pub inflow_kg_s: f64,
    /// Out of the first, kg/s.
    pub outflow_kg_s: f64,
    /// Where the flow turns, above the floor of the first, m.
    pub neutral_plane_m: Option<f64>,
    /// Heat released by fuel gas that burns beyond the opening, kW.
    pub flame_heat_release_kw: f64,
    /// Greatest pressure across it, Pa; positive from the first outwards.
    pub pressure_pa: f64,
    /// Share that stands open.
    pub open_fraction: f64,
}

/// One fire at one moment.
#[derive(Clone, Copy, Debug, PartialEq, Default)]
pub struct FireState {
    /// Burning or not.
    pub alight: bool,
    /// Heat released at the fire, kW.
    pub heat_release_kw: f64,
    /// Fuel given off, kg/s.
    pub fuel_kg_s: f64,
    /// Oxygen of the gas its plume draws, kg/kg.
    pub drawn_oxygen: f64,
    /// Height of the flame, m.
    pub flame_height_m: f64,
    /// Share of the flame that the gas it draws lets burn; below a half it goes out.
    pub flame_share: f64,
}

/// The building at one moment.
#[derive(Clone, Debug, PartialEq, Default)]
pub struct Sample {
    /// Time, s.
    pub time_s: f64,
    /// Rooms, as in the network.
    pub rooms: Vec<RoomState>,
    /// Openings, as in the network.
    pub openings: Vec<OpeningState>,
    /// Fires, as in the network.
    pub fires: Vec<FireState>,
}

/// What happened.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Event {
    /// When, s.
    pub at_s: f64,
    /// What.
    pub kind: EventKind,
}

/// What can happen; indices as in the network.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum EventKind {
    /// A fire was lit.
    Ignited(usize),
    /// A fire went out for want of oxygen.
    WentOut(usize),
    /// A fire that was out burns again.
    Relit(usize),
    /// A fire has no fuel left.
    BurntOut(usize),
    /// An opening was moved by the schedule.
    Moved(usize),
    /// Glass fell, by its temperature.
    GlassFell(usize),
    /// A door burned through.
    BurnedThrough(usize),
    /// An opening gave way to pressure.
    GaveWay(usize),
    /// A detector answered.
    Detected(usize),
    /// A sprinkler opened.
    SprinklerOpened(usize),
}

/// What a run did, beside its samples.
#[derive(Clone, Debug, PartialEq, Default)]
pub struct Ended {
    /// What happened, in order.
    pub events: Vec<Event>,
    /// Its own check.
    pub balance: Balance,
    /// Its work.
    pub work: Work,
    /// What the reader should know.
    pub notes: Vec<Note>,
}

/// How well the run kept mass, energy and elements; each against what was there and what passed.
#[derive(Clone, Copy, Debug, PartialEq, Default)]
pub struct Balance {
    /// Mass of gas.
    pub mass_error_relative: f64,
    /// Energy of gas and linings, outflow, losses.
    pub energy_error_relative: f64,
    /// Worst of carbon, hydrogen, oxygen, nitrogen.
    pub element_error_relative: f64,
}

/// Work of a run.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Default)]
pub struct Work {
    /// Steps taken.
    pub steps: usize,
    /// Steps tried and refused.
    pub rejected: usize,
    /// Right-hand sides.
    pub evaluations: usize,
    /// Jacobians.
    pub jacobians: usize,
}

/// What the reader should know of a run.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Note {
    /// Pressure of this room passed 10 kPa: no real room holds that.
    PressureBeyondBuildings(usize),
    /// Gas of this room passed 1500 K, beyond what the physics here is tried for.
    HotterThanTried(usize),
    /// This room is longer or larger than a layer forms evenly in.
    TooLongForOneLayer(usize),
    /// The flame of this fire is taller than its room.
    FlameBeyondCeiling(usize),
}

/// Why a run did not end.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Failed {
    /// Where it had got to, s.
    pub at_s: f64,
    /// Room that would not converge, by index.
    pub room: Option<usize>,
    /// Why.
    pub reason: FailureReason,
}

/// Why a run did not end.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum FailureReason {
    /// The step fell below what a number can hold.
    StepTooSmall,
    /// More steps than the budget.
    OutOfSteps,
    /// The caller stopped it.
    Stopped,
    /// A part of the network names another that is not there, or a number that cannot be.
    Malformed(&'static str),
}
