//! What an assessment finds: plain structures that a report is written from.
//!
//! Temperatures and times carry their unit in their name; every word of the wire contract
//! stands once, as `word()` of its enumeration.

use std::borrow::Cow;

use crate::domain::Key;
use crate::domain::assumptions::{GrowthClass, Level, Scenario};
use crate::domain::room::{Hazard, Place};

/// Somebody no longer wants the answer, or the budget is spent.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Stop;

/// The spread of a computed value: corners of the uncertain inputs at screening.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Band {
    /// Least.
    pub low: f64,
    /// With typical inputs.
    pub typical: f64,
    /// Greatest.
    pub high: f64,
}

impl Band {
    /// The same in another unit.
    #[must_use]
    pub fn scaled(self, by: f64) -> Self {
        Self { low: self.low * by, typical: self.typical * by, high: self.high * by }
    }

    /// The same from another zero.
    #[must_use]
    pub fn shifted(self, by: f64) -> Self {
        Self { low: self.low + by, typical: self.typical + by, high: self.high + by }
    }
}

/// Why a value or rating is missing: a stable key, and the text that stands in the report.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Reason {
    /// Stable word for programs, e.g. `large_space`.
    pub key: &'static str,
    /// One sentence that begins with the key where the wire contract names one.
    pub text: Cow<'static, str>,
}

/// Declares an enumeration whose members have fixed words on the wire.
macro_rules! words {
    ($(#[$meta:meta])* $name:ident { $($(#[$doc:meta])* $member:ident = $word:literal,)* }) => {
        $(#[$meta])*
        #[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
        pub enum $name { $($(#[$doc])* $member,)* }
        impl $name {
            /// Every member, in order.
            pub const ALL: &'static [Self] = &[$(Self::$member,)*];

            /// The word on the wire.
            pub const fn word(self) -> &'static str {
                match self { $(Self::$member => $word,)* }
            }
        }
    };
}

words! {
    /// Whether a room can flash over, given an established flaming fire in it that nobody fights.
    FlashoverRating {
        /// In no scenario, with fuel at its 95 % fractile.
        NotIndicated = "not_indicated",
        /// Within the scatter of the correlations.
        Possible = "possible",
        /// The heat required by every correlation in range is there.
        Likely = "likely",
        /// So it is with 1.4 times that.
        Expected = "expected",
        /// See the reason. Sorts with the worst.
        NotAssessed = "not_assessed",
    }
}

words! {
    /// Whether a starved fire can leave hot fuel-rich gas behind a door.
    BackdraftRating {
        /// Too little unburned gas by the screen.
        NotIndicated = "not_indicated",
        /// The screen cannot exclude it.
        CannotBeExcluded = "cannot_be_excluded",
        /// Not given by screening.
        Credible = "credible",
        /// Not given by screening.
        CredibleViolent = "credible_violent",
        /// See the reason. Sorts with the worst.
        NotAssessed = "not_assessed",
    }
}

words! {
    /// What would happen when the door is opened.
    BackdraftOutcome {
        /// Nothing.
        None = "none",
        /// Backdraft.
        Backdraft = "backdraft",
        /// Flames out of the opening.
        FlamingOutflow = "flaming_outflow",
        /// Explosion of smoke and air mixed before ignition.
        SmokeExplosion = "smoke_explosion",
        /// Not computed.
        NotAssessed = "not_assessed",
    }
}

words! {
    /// What holds the fire or the gas down.
    LimitedBy {
        /// The fuel that burns at once.
        Fuel = "fuel",
        /// The air through the openings.
        Ventilation = "ventilation",
        /// The oxygen of a room without open openings.
        Oxygen = "oxygen",
        /// The unburned gas left when the flame dies.
        UnburnedFuel = "unburned_fuel",
    }
}

words! {
    /// How sure the order of flashover and water is, over the corners of both.
    BeforeWater {
        /// Flashover comes first even when it is late and the water early.
        InEveryCase = "in_every_case",
        /// Flashover comes first with typical values, not at every corner.
        Typically = "typically",
        /// Flashover comes first only when it is early or the water late.
        InTheWorstCase = "in_the_worst_case",
        /// Water comes first at every corner.
        InNoCase = "in_no_case",
    }
}

words! {
    /// Where a value that nobody recorded comes from.
    Provenance {
        /// A published text that was seen.
        Seen = "seen",
        /// Recalled without its text.
        Memory = "memory",
        /// This project's own estimate or rule.
        Estimated = "estimated",
    }
}

words! {
    /// Which way an input must not go.
    Direction {
        /// The rating holds while the input stays below the value.
        Below = "below",
        /// The rating holds while the input stays above the value.
        Above = "above",
    }
}

words! {
    /// What tells people of the fire first.
    DetectedBy {
        /// The bureau set the span.
        Given = "given",
        /// A detector in the room.
        Detector = "detector",
        /// A sprinkler head and its flow switch.
        Sprinkler = "sprinkler",
        /// Somebody awake inside.
        Occupant = "occupant",
        /// Smoke or flame seen outside.
        SeenOutside = "seen_outside",
    }
}

words! {
    /// A moment on the timeline.
    MilestoneKind {
        /// Zero of the fire clock: flame about 20 kW, 0.3 m.
        EstablishedBurning = "established_burning",
        /// Detector, sprinkler, occupant or passer-by.
        Detection = "detection",
        /// Zero of the crew clock.
        Call = "call",
        /// Self-closers and released hold-opens have shut.
        DoorsShut = "doors_shut",
        /// First detector acts.
        DetectorActs = "detector_acts",
        /// First sprinkler head opens.
        SprinklerOpens = "sprinkler_opens",
        /// Smoke layer 2 m above the floor.
        SmokeAt2M = "smoke_at_2_m",
        /// Smoke layer 1 m above the floor.
        SmokeAt1M = "smoke_at_1_m",
        /// Smoke in the space behind the open door.
        SmokeNextDoor = "smoke_next_door",
        /// Another fuel package takes fire.
        ItemIgnites = "item_ignites",
        /// Glass falls by its criterion.
        GlassFalls = "glass_falls",
        /// A door burns through.
        DoorBurnsThrough = "door_burns_through",
        /// An opening gives way to pressure.
        GivesWay = "gives_way",
        /// The way out of the room is lost to a person upright.
        WayOutLost = "way_out_lost",
        /// The contents of another room take fire.
        FireNextDoor = "fire_next_door",
        /// Hot layer 600 °C.
        Layer600C = "layer_600_c",
        /// Floor flux 20 kW/m².
        Floor20KwM2 = "floor_20_kw_m2",
        /// Flashover: the earlier of both.
        Flashover = "flashover",
        /// Crew on the road.
        TurnedOut = "turned_out",
        /// Crew on site.
        Arrival = "arrival",
        /// Water on the fire.
        WaterOnFire = "water_on_fire",
        /// The flame dies of lack of oxygen.
        FlameOut = "flame_out",
        /// Decay begins: 70 % burnt.
        Decay = "decay",
        /// All fuel burnt.
        BurntOut = "burnt_out",
    }
}

/// One method's figure.
#[derive(Debug, Clone, PartialEq)]
pub struct Figure {
    /// Key of the method, as in [`MethodUsed`].
    pub method: &'static str,
    /// What the number is, unit last.
    pub quantity: &'static str,
    /// The number, finite.
    pub value: f64,
    /// Whether the room lies in the published range of the method.
    pub in_range: bool,
    /// What of that range is exceeded, in words.
    pub exceeded: Vec<&'static str>,
    /// Rests on a value recalled without its text.
    pub unverified: bool,
    /// Scenario it belongs to, where it belongs to one.
    pub scenario: Option<Scenario>,
}

/// A method that a figure names.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct MethodUsed {
    /// Key.
    pub key: &'static str,
    /// Name for people.
    pub title: &'static str,
    /// Citations in one line.
    pub source: &'static str,
    /// Whether the text was seen.
    pub provenance: Provenance,
}

/// The nearest value of an input that would change a rating `not_indicated`.
#[derive(Debug, Clone, PartialEq)]
pub struct HoldsWhile {
    /// Member of the building, by the name it has on the wire.
    pub field: &'static str,
    /// Value at which the rating changes; none where none within the input's limits does.
    pub value: Option<f64>,
    /// Value it has now.
    pub now: f64,
    /// Which way it must not go.
    pub direction: Direction,
    /// The same in a sentence.
    pub words: String,
}

/// Something that was not computed.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct NotCovered {
    /// Stable word for programs.
    pub key: &'static str,
    /// One sentence for people.
    pub text: Cow<'static, str>,
}

/// A caution.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Caution {
    /// Stable word for programs: `planning_only`, `collapse`, `wind`, `hazard_lithium_ion`, …
    pub key: &'static str,
    /// One or two sentences for people.
    pub text: Cow<'static, str>,
}

/// Something the bureau is asked to record.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Wanted {
    /// Stable word for programs: `openings`, `hazards`, …
    pub key: &'static str,
    /// One sentence for people.
    pub text: Cow<'static, str>,
}

/// A value that nobody recorded, and what stands for it.
#[derive(Debug, Clone, PartialEq)]
pub struct Assumed {
    /// The room; none where the value belongs to the building.
    pub room: Option<Key>,
    /// Member path in the room or building, e.g. `linings.walls.thickness_m`.
    pub field: Cow<'static, str>,
    /// The value.
    pub value: AssumedValue,
    /// Where it comes from.
    pub source: Cow<'static, str>,
    /// Whether that was seen.
    pub provenance: Provenance,
}

/// The value of an [`Assumed`].
#[derive(Debug, Clone, PartialEq)]
pub enum AssumedValue {
    /// A number in the unit of the field.
    Number(f64),
    /// A word, e.g. a catalogue key.
    Text(Cow<'static, str>),
    /// Yes or no.
    Flag(bool),
}

/// A moment on both clocks.
#[derive(Debug, Clone, PartialEq)]
pub struct Milestone {
    /// What happens.
    pub kind: MilestoneKind,
    /// On the fire clock, s.
    pub fire_clock_s: Band,
    /// On the crew clock, s; none before there is a call in the typical case's reckoning.
    pub crew_clock_s: Option<Band>,
    /// Scenario it belongs to, where it belongs to one.
    pub scenario: Option<Scenario>,
    /// The opening, package or detector meant, where there is one.
    pub subject: Option<Key>,
}

/// Whether the room can flash over.
#[derive(Debug, Clone, PartialEq)]
pub struct FlashoverFinding {
    /// Worst over scenarios.
    pub rating: FlashoverRating,
    /// Only when sampled.
    pub probability: Option<f64>,
    /// The earlier of the two criteria, on the fire clock.
    pub time_s: Option<Band>,
    /// Hot layer 600 °C.
    pub time_to_600_c_s: Option<Band>,
    /// Floor flux 20 kW/m².
    pub time_to_20_kw_m2_s: Option<Band>,
    /// Why the rating or a time is missing.
    pub reason: Option<Reason>,
    /// Highest of the correlations in range, in the governing scenario.
    pub required_heat_release_kw: Option<f64>,
    /// Lowest of the correlations in range.
    pub required_lowest_kw: Option<f64>,
    /// Lesser of fuel and ventilation limit.
    pub available_heat_release_kw: Option<f64>,
    /// Which of them.
    pub limited_by: Option<LimitedBy>,
    /// The governing scenario.
    pub scenario: Option<Scenario>,
    /// Flashover before water on the fire, with typical values.
    pub before_water: Option<bool>,
    /// The same over the corners.
    pub before_water_case: Option<BeforeWater>,
    /// An input that decides the rating is assumed, or hazards are not recorded.
    pub provisional: bool,
    /// Which inputs make it so, by member name.
    pub provisional_because: Vec<Cow<'static, str>>,
    /// Nearest first; empty unless `not_indicated`.
    pub holds_while: Vec<HoldsWhile>,
    /// What was not computed.
    pub not_covered: Vec<NotCovered>,
    /// Every method's figure in the governing scenario.
    pub figures: Vec<Figure>,
    /// Clauses of the rating rule that gave the rating, by number.
    pub clauses: Vec<&'static str>,
}

/// Whether a shut room can hide a backdraft.
#[derive(Debug, Clone, PartialEq)]
pub struct BackdraftFinding {
    /// Worst over the shut scenarios.
    pub rating: BackdraftRating,
    /// Only when sampled.
    pub probability: Option<f64>,
    /// What would happen.
    pub outcome: BackdraftOutcome,
    /// The governing scenario.
    pub scenario: Option<Scenario>,
    /// The opening that a crew would use.
    pub opening: Option<Key>,
    /// From when that door is dangerous, on the fire clock. Not given by screening.
    pub dangerous_from_s: Option<Band>,
    /// Until when.
    pub dangerous_until_s: Option<Band>,
    /// It had not ended at the horizon.
    pub beyond_horizon: bool,
    /// From opening to ignition.
    pub ignition_delay_s: Option<Band>,
    /// Peak overpressure.
    pub peak_overpressure_pa: Option<Band>,
    /// Its band.
    pub pressure_band: Option<&'static str>,
    /// What gives way.
    pub elements_failing: Vec<&'static str>,
    /// How far the fireball reaches.
    pub fireball_reach_m: Option<Band>,
    /// What holds it down.
    pub limited_by: Option<LimitedBy>,
    /// Excess fuel gas per mass of layer gas, MJ/kg: the screen's measure.
    pub excess_fuel_mj_kg: Option<Band>,
    /// Layer temperature when the flame dies, °C.
    pub layer_temperature_c: Option<Band>,
    /// When the flame dies, on the fire clock.
    pub flame_out_s: Option<Band>,
    /// Why the rating is what it is, or is missing.
    pub reason: Option<Reason>,
    /// As [`FlashoverFinding::provisional`].
    pub provisional: bool,
    /// Which inputs make it so.
    pub provisional_because: Vec<Cow<'static, str>>,
    /// Nearest first; empty unless `not_indicated`.
    pub holds_while: Vec<HoldsWhile>,
    /// What was not computed.
    pub not_covered: Vec<NotCovered>,
    /// Figures.
    pub figures: Vec<Figure>,
    /// Clauses of the rating rule that gave the rating.
    pub clauses: Vec<&'static str>,
}

/// The room of origin at one moment of a run.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Point {
    /// On the fire clock.
    pub at_s: f64,
    /// Hot layer.
    pub upper_temperature_c: f64,
    /// Cool layer.
    pub lower_temperature_c: f64,
    /// Lower face of the hot layer above the floor.
    pub layer_height_m: f64,
    /// On the floor.
    pub floor_flux_kw_m2: f64,
    /// Of the hot layer, by volume of wet gas.
    pub oxygen_percent: f64,
    /// Of the hot layer.
    pub carbon_monoxide_ppm: f64,
    /// At the floor, against outside air.
    pub pressure_pa: f64,
    /// In the room.
    pub heat_release_kw: f64,
}

/// A run of a scenario with typical inputs.
#[derive(Debug, Clone, PartialEq)]
pub struct RunFinding {
    /// The scenario; `shut_late` may stand twice, by when the door was shut.
    pub scenario: Scenario,
    /// What there is to say of it.
    pub reason: Option<Reason>,
    /// Where the fire burned.
    pub place: Place,
    /// When everything that can be shut was shut.
    pub shut_at_s: Option<f64>,
    /// The earlier of both criteria.
    pub flashover_s: Option<f64>,
    /// Hot layer 600 °C.
    pub time_to_600_c_s: Option<f64>,
    /// Floor flux 20 kW/m².
    pub time_to_20_kw_m2_s: Option<f64>,
    /// When the first flame went out for want of oxygen.
    pub flame_out_s: Option<f64>,
    /// Hottest layer.
    pub peak_layer_temperature_c: f64,
    /// Most on the floor.
    pub peak_floor_flux_kw_m2: f64,
    /// Least in the hot layer, by volume.
    pub least_oxygen_percent: f64,
    /// Most in the hot layer.
    pub peak_carbon_monoxide_ppm: f64,
    /// Most in the room.
    pub peak_heat_release_kw: f64,
    /// Most above outside air, at the floor.
    pub peak_pressure_pa: f64,
    /// Most below it, as a negative number.
    pub suction_pa: f64,
}

/// The governing scenario at one corner.
#[derive(Debug, Clone, PartialEq)]
pub struct CornerFinding {
    /// Fire load and growth: `low` or `high`.
    pub fire: &'static str,
    /// Heat into linings, and leakage: `low` or `high`.
    pub shell: &'static str,
    /// Flashover.
    pub flashover_s: Option<f64>,
    /// Hottest layer.
    pub peak_layer_temperature_c: f64,
}

/// A door of the shut room, pressed by the fire.
#[derive(Debug, Clone, PartialEq)]
pub struct DoorForceFinding {
    /// The door.
    pub opening: Key,
    /// `in`, `out`, `both`, seen from this room; none where it is not recorded: then as it moves worst.
    pub swing: Option<&'static str>,
    /// Most out of the room.
    pub peak_pressure_pa: Band,
    /// Most into it, as a negative number.
    pub suction_pa: Band,
    /// Force at the handle that opens it while the pressure is highest; negative: it is thrown open.
    pub force_at_peak_n: Band,
    /// The same while the suction is strongest.
    pub force_at_suction_n: Band,
    /// One of both is above the 133 N that practice allows.
    pub over_limit: bool,
}

/// When a place of the way out is lost.
#[derive(Debug, Clone, PartialEq)]
pub struct WayOutFinding {
    /// The room.
    pub room: Key,
    /// `standing` or `crawling`.
    pub posture: &'static str,
    /// Dose that counts: 0.3, or 0.1 where people sleep or need help.
    pub dose: f64,
    /// When it is lost; none where it is not.
    pub lost_s: Option<Band>,
    /// `gas`, `heat`, `visibility` or `layer`, with typical inputs.
    pub cause: Option<&'static str>,
}

/// When a published thermal class is reached 1 m above the floor of the room of origin.
#[derive(Debug, Clone, PartialEq)]
pub struct CrewFinding {
    /// Whose classes.
    pub scheme: &'static str,
    /// The class.
    pub class: &'static str,
    /// When it is reached; none where it is not.
    pub reached_s: Option<Band>,
    /// Shortest stay that is published.
    pub stay_from_s: f64,
    /// Longest.
    pub stay_to_s: f64,
}

/// A room that smoke or fire reaches through openings.
#[derive(Debug, Clone, PartialEq)]
pub struct ReachedFinding {
    /// The room.
    pub room: Key,
    /// Smoke that one sees less than 10 m through hangs below its ceiling.
    pub smoke_s: Option<Band>,
    /// Its contents take fire.
    pub fire_s: Option<Band>,
    /// Hottest layer.
    pub peak_layer_temperature_c: f64,
    /// Lowest that the layer hangs.
    pub lowest_layer_m: f64,
}

/// What happened to an opening in the governing scenario.
#[derive(Debug, Clone, PartialEq)]
pub struct GaveWayFinding {
    /// The opening.
    pub opening: Key,
    /// When.
    pub at_s: f64,
    /// `glass_fell`, `burned_through` or `pressure`.
    pub how: &'static str,
}

/// A number of the room beside those of the experiments.
#[derive(Debug, Clone, PartialEq)]
pub struct PlaceNumber {
    /// Its name.
    pub number: &'static str,
    /// Here; none where it has no meaning.
    pub value: Option<f64>,
    /// Least of the experiments.
    pub lowest: Option<f64>,
    /// Greatest.
    pub highest: Option<f64>,
    /// It lies within.
    pub inside: bool,
}

/// A figure of the screen that differs from the run by more than the published scatter.
#[derive(Debug, Clone, PartialEq)]
pub struct Disagreement {
    /// What differs, unit last.
    pub quantity: &'static str,
    /// By screening.
    pub screening: Option<f64>,
    /// By the run.
    pub transient: Option<f64>,
    /// In a sentence.
    pub words: String,
}

/// What the transient runs of a room of origin gave.
#[derive(Debug, Clone, PartialEq)]
pub struct TransientFinding {
    /// The governing scenario.
    pub scenario: Scenario,
    /// Every scenario with typical inputs.
    pub runs: Vec<RunFinding>,
    /// The governing scenario at its corners.
    pub corners: Vec<CornerFinding>,
    /// Most above outside air in the room shut.
    pub peak_pressure_pa: Option<Band>,
    /// Most below it.
    pub suction_pa: Option<Band>,
    /// Doors of the room shut.
    pub doors: Vec<DoorForceFinding>,
    /// The way out in the governing scenario, the room of origin first.
    pub way_out: Vec<WayOutFinding>,
    /// Crews in the room of origin.
    pub crew: Vec<CrewFinding>,
    /// Rooms that smoke or fire reaches through openings, in order of time. Never a list of rooms that it does not reach.
    pub reached: Vec<ReachedFinding>,
    /// Openings that gave way.
    pub gave_way: Vec<GaveWayFinding>,
    /// The room's place beside the experiments.
    pub place: Vec<PlaceNumber>,
    /// Where the screen disagrees.
    pub disagreements: Vec<Disagreement>,
    /// What was not computed.
    pub not_covered: Vec<NotCovered>,
    /// What a reader should know of the runs.
    pub notes: Vec<&'static str>,
    /// The governing scenario, at no more than 121 times.
    pub series: Vec<Point>,
    /// Runs made.
    pub run_count: usize,
    /// Steps that they took.
    pub step_count: usize,
    /// Figures.
    pub figures: Vec<Figure>,
}

/// How long a crew that opens up has got.
#[derive(Debug, Clone, PartialEq)]
pub struct EntryFinding {
    /// As flashover.
    pub rating: FlashoverRating,
    /// Only when sampled.
    pub probability: Option<f64>,
    /// The scenario.
    pub scenario: Option<Scenario>,
    /// The opening.
    pub opening: Option<Key>,
    /// When it was opened.
    pub opened_at_s: Option<Band>,
    /// From opening to flashover.
    pub time_to_flashover_s: Option<Band>,
    /// From opening to 260 °C at 1 m.
    pub time_to_260_c_s: Option<Band>,
    /// From opening to 10 kW/m² at 1 m.
    pub time_to_10_kw_m2_s: Option<Band>,
    /// What was found when it was opened.
    pub state_at_opening: Option<Cow<'static, str>>,
    /// Openings a crew could use.
    pub openings_tried: Vec<Key>,
    /// Why the rating is missing.
    pub reason: Option<Reason>,
    /// As [`FlashoverFinding::provisional`].
    pub provisional: bool,
    /// Nearest first; empty unless `not_indicated`.
    pub holds_while: Vec<HoldsWhile>,
    /// What was not computed.
    pub not_covered: Vec<NotCovered>,
    /// Figures.
    pub figures: Vec<Figure>,
}

/// The flashover screen of one scenario.
#[derive(Debug, Clone, PartialEq)]
pub struct ScenarioFinding {
    /// The scenario.
    pub scenario: Scenario,
    /// Its rating.
    pub rating: FlashoverRating,
    /// Open area that counts, m².
    pub opening_area_m2: f64,
    /// Height of the openings as one, m.
    pub opening_height_m: f64,
    /// Heat release that is reached, kW.
    pub available_kw: Option<f64>,
    /// Lowest required, kW.
    pub required_lowest_kw: Option<f64>,
    /// Highest required, kW.
    pub required_highest_kw: Option<f64>,
    /// What holds the fire down.
    pub limited_by: Option<LimitedBy>,
    /// Flashover on the fire clock.
    pub time_s: Option<Band>,
    /// Openings that count, and why.
    pub openings: Vec<OpeningState>,
    /// The unburned gas, where the room can starve in this scenario.
    pub starved: Option<StarvedFinding>,
    /// Why it was not judged, or how.
    pub reason: Option<Reason>,
}

/// Unburned gas of a scenario in which the room starves.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct StarvedFinding {
    /// Backdraft rating of this scenario.
    pub rating: BackdraftRating,
    /// Heat of combustion of unburned gas per mass of layer gas, MJ/kg.
    pub excess_fuel_mj_kg: Band,
    /// From where on a mixture with air can carry a flame, MJ/kg.
    pub threshold_mj_kg: f64,
    /// Layer temperature when the flame dies, °C.
    pub layer_temperature_c: Band,
    /// When the flame dies, or is cut down to what the air of a room that stands open allows, on the fire clock.
    pub flame_out_s: Band,
}

/// What an opening counts as in a scenario.
#[derive(Debug, Clone, PartialEq)]
pub struct OpeningState {
    /// The opening.
    pub key: Key,
    /// Share of it that stands open.
    pub open_fraction: f64,
    /// Area that admits air to the fire, m²; 0 for a shut one, which leaks only.
    pub counted_area_m2: f64,
    /// Why, in a few words.
    pub because: &'static str,
}

/// One step of the strip slow / medium / fast / ultra-fast.
#[derive(Debug, Clone, PartialEq)]
pub struct GrowthFinding {
    /// The class.
    pub growth: GrowthClass,
    /// Its coefficient.
    pub growth_kw_s2: f64,
    /// Rating with it.
    pub rating: FlashoverRating,
    /// Flashover on the fire clock, with typical inputs otherwise.
    pub time_s: Option<f64>,
    /// Before water on the fire, with typical values.
    pub before_water: Option<bool>,
}

/// The fire that the findings rest on.
#[derive(Debug, Clone, PartialEq)]
pub struct FireFinding {
    /// Key of the package of origin; none where the use's growth stands.
    pub item_of_origin: Option<Key>,
    /// Where it burns: the worst of centre and corner.
    pub place: Place,
    /// Growth coefficient.
    pub growth_kw_s2: f64,
    /// What set the growth: `assumption`, `item`, `use`, `lining`.
    pub growth_from: &'static str,
    /// Heat release that the fuel reaches, kW.
    pub fuel_limit_kw: f64,
    /// Energy at the 50 % fractile, MJ.
    pub energy_p50_mj: f64,
    /// Energy at the fractile used (80 % unless assumed otherwise), MJ.
    pub energy_mj: f64,
    /// The fractile used.
    pub fractile: f64,
    /// Energy at the 95 % fractile, MJ.
    pub energy_p95_mj: f64,
    /// Incubation before established burning; reported, never added.
    pub incubation_s: Option<Band>,
    /// Packages that take fire by received flux, with the time on the fire clock.
    pub joined: Vec<Joined>,
}

/// A package that takes fire from the first.
#[derive(Debug, Clone, PartialEq)]
pub struct Joined {
    /// The package.
    pub key: Key,
    /// When, on the fire clock.
    pub at_s: f64,
    /// Clear distance reckoned with, m.
    pub distance_m: f64,
}

/// The spans between fire and water, on the fire clock.
#[derive(Debug, Clone, PartialEq)]
pub struct ClockFinding {
    /// What tells people first.
    pub detected_by: DetectedBy,
    /// Established burning to detection.
    pub detection_s: Band,
    /// Established burning to call: zero of the crew clock.
    pub call_s: Band,
    /// Call to water.
    pub call_to_water_s: f64,
    /// Established burning to water on the fire.
    pub water_on_fire_s: Band,
    /// Added to set-up because of the floor.
    pub floor_setup_s: f64,
}

/// How smoke fills the room and reaches the space behind its door.
#[derive(Debug, Clone, PartialEq)]
pub struct SmokeFinding {
    /// Layer 2 m above the floor, door shut.
    pub time_to_2_m_s: Option<Band>,
    /// Layer 1 m above the floor, door shut.
    pub time_to_1_m_s: Option<Band>,
    /// Spaces that the room's doors lead to.
    pub next_door: Vec<SmokeNextDoor>,
    /// Why a time is missing.
    pub reason: Option<Reason>,
    /// Figures.
    pub figures: Vec<Figure>,
}

/// How fast the smoke of this room's fire fills the space behind a door.
#[derive(Debug, Clone, PartialEq)]
pub struct SmokeNextDoor {
    /// The door.
    pub opening: Key,
    /// The room behind it.
    pub room: Key,
    /// Smoke 2 m above its floor with the door open, on the fire clock.
    pub time_open_s: Option<f64>,
    /// Smoke 2 m above its floor with the door shut and leaking, on the fire clock.
    pub time_shut_s: Option<f64>,
}

/// What is asked of a large, tall or long space instead of whole-room flashover.
#[derive(Debug, Clone, PartialEq)]
pub struct LargeSpaceFinding {
    /// Which thresholds are exceeded, in words.
    pub because: Vec<&'static str>,
    /// Mean flame height at the peak, m.
    pub flame_height_m: f64,
    /// Clear height above the base of the fire, m.
    pub ceiling_height_m: f64,
    /// Whether the flame reaches the ceiling.
    pub flame_reaches_ceiling: bool,
    /// Gap to the next pile or package that the flame can cross, m.
    pub spreads_across_m: Option<f64>,
    /// Gap that is there (aisle or spacing), m.
    pub gap_m: Option<f64>,
    /// Whether the next pile takes fire.
    pub next_pile_ignites: Option<bool>,
    /// Layer 2 m above the floor.
    pub layer_to_2_m_s: Option<Band>,
    /// Figures.
    pub figures: Vec<Figure>,
}

/// A protection and what it changes.
#[derive(Debug, Clone, PartialEq)]
pub struct ProtectionFinding {
    /// `sprinkler`, `self_closer`, `alarm`.
    pub kind: &'static str,
    /// Whether the rating gives it credit: recorded as working and tested.
    pub credited: bool,
    /// When it acts, on the fire clock.
    pub acts_at_s: Option<Band>,
    /// Heat release when it acts, kW.
    pub heat_release_kw: Option<f64>,
    /// Flashover rating without it.
    pub flashover_without: FlashoverRating,
    /// Flashover rating with it.
    pub flashover_with: FlashoverRating,
    /// Flashover before water without it, with typical values.
    pub before_water_without: Option<bool>,
    /// The same with it.
    pub before_water_with: Option<bool>,
    /// What it does, in a sentence.
    pub words: String,
    /// Figures.
    pub figures: Vec<Figure>,
}

/// Needed fire flow against the water recorded.
#[derive(Debug, Clone, PartialEq)]
pub struct WaterFinding {
    /// Figures of the two formulas, L/min, each named for what it means.
    pub figures: Vec<Figure>,
    /// Greatest of them, L/min.
    pub needed_l_min: f64,
    /// Recorded, L/min.
    pub available_l_min: Option<f64>,
    /// Whether it covers the greatest; none where nothing is recorded.
    pub enough: Option<bool>,
}

/// A hazard outside the methods.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct HazardFinding {
    /// Which.
    pub hazard: Hazard,
    /// What is not computed, in a sentence.
    pub text: &'static str,
    /// Whether it bars `not_indicated`.
    pub bars_not_indicated: bool,
}

/// What the room's linings do.
#[derive(Debug, Clone, PartialEq)]
pub struct LiningFinding {
    /// `walls`, `ceiling`, `floor`.
    pub surface: &'static str,
    /// Catalogue key, or `given`.
    pub material: String,
    /// Whether it burns.
    pub combustible: bool,
    /// Growth it sets at least, kW/s².
    pub least_growth_kw_s2: Option<f64>,
    /// Thermal penetration time, s.
    pub penetration_s: f64,
    /// In a sentence, where it joins the fire.
    pub words: Option<String>,
}

/// All that was found about one room.
#[derive(Debug, Clone, PartialEq)]
pub struct RoomFindings {
    /// Key.
    pub key: Key,
    /// Name; the key where the room has none.
    pub name: String,
    /// Can it flash over.
    pub flashover: FlashoverFinding,
    /// Can it hide a backdraft.
    pub backdraft: BackdraftFinding,
    /// How long has a crew that opens up.
    pub entry: EntryFinding,
    /// The transient runs; none at screening, or where they gave no answer.
    pub transient: Option<TransientFinding>,
    /// Every scenario's screen, in the order of [`Scenario::ALL`].
    pub scenarios: Vec<ScenarioFinding>,
    /// The strip slow / medium / fast / ultra-fast.
    pub growth_strip: Vec<GrowthFinding>,
    /// The fire.
    pub fire: FireFinding,
    /// The clocks.
    pub clock: ClockFinding,
    /// Smoke.
    pub smoke: SmokeFinding,
    /// Only of a large, tall or long space.
    pub large_space: Option<LargeSpaceFinding>,
    /// Protection with and without credit.
    pub protection: Vec<ProtectionFinding>,
    /// Water.
    pub water: Option<WaterFinding>,
    /// Hazards.
    pub hazards: Vec<HazardFinding>,
    /// Linings.
    pub linings: Vec<LiningFinding>,
    /// Both clocks, in order of time.
    pub timeline: Vec<Milestone>,
    /// Values that nobody recorded: the room's, then the building's.
    pub assumptions: Vec<Assumed>,
    /// What the bureau is asked to record.
    pub wanted: Vec<Wanted>,
    /// Methods that the figures name.
    pub methods: Vec<MethodUsed>,
    /// Cautions.
    pub cautions: Vec<Caution>,
}

/// A room's place in its building.
#[derive(Debug, Clone, PartialEq)]
pub struct Ranked {
    /// 1 is the worst; rooms that tie share the place.
    pub place: usize,
    /// The room.
    pub room: Key,
    /// Flashover.
    pub flashover: FlashoverRating,
    /// Typical time to flashover, s.
    pub flashover_time_s: Option<f64>,
    /// Before water on the fire, with typical values.
    pub before_water: Option<bool>,
    /// Backdraft.
    pub backdraft: BackdraftRating,
    /// Entry.
    pub entry: FlashoverRating,
}

/// All that was found about a building.
#[derive(Debug, Clone, PartialEq)]
pub struct BuildingFindings {
    /// [`ENGINE_VERSION`](super::ENGINE_VERSION).
    pub engine_version: &'static str,
    /// [`RATING_RULE`](super::RATING_RULE).
    pub rating_rule: u32,
    /// Digest of the catalogue used.
    pub catalogue_digest: String,
    /// SHA-256 of the resolved inputs, in hexadecimal.
    pub input_digest: String,
    /// The rule that gave the ratings.
    pub level: Level,
    /// Seed of the sampling; 0 where none.
    pub seed: u64,
    /// The rooms, in the order of the building.
    pub rooms: Vec<RoomFindings>,
    /// The rooms, worst first.
    pub ranking: Vec<Ranked>,
    /// Values that nobody recorded about the building as a whole.
    pub assumptions: Vec<Assumed>,
    /// Methods that any figure names.
    pub methods: Vec<MethodUsed>,
    /// Cautions for the building as a whole.
    pub cautions: Vec<Caution>,
}
