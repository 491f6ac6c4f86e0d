//! One comparison: a quantity of a test, measured and computed.

/// A series of experiments.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Series {
    Steckler,
    OpenBurner,
    ShutBurner,
    Furniture,
    LargeRoom,
    Enclosure,
    FurnitureShut,
    Corridor,
    House,
    ReducedScale,
    ChairRoom,
}

impl Series {
    pub const ALL: [Self; 11] = [
        Self::Steckler,
        Self::OpenBurner,
        Self::ShutBurner,
        Self::Furniture,
        Self::LargeRoom,
        Self::Enclosure,
        Self::FurnitureShut,
        Self::Corridor,
        Self::House,
        Self::ReducedScale,
        Self::ChairRoom,
    ];

    pub const fn key(self) -> &'static str {
        match self {
            Self::Steckler => "steckler",
            Self::OpenBurner => "open_burner",
            Self::ShutBurner => "shut_burner",
            Self::Furniture => "furniture",
            Self::LargeRoom => "large_room",
            Self::Enclosure => "enclosure",
            Self::FurnitureShut => "furniture_shut",
            Self::Corridor => "corridor",
            Self::House => "house",
            Self::ReducedScale => "reduced_scale",
            Self::ChairRoom => "chair_room",
        }
    }

    /// As the record calls it.
    pub const fn title(self) -> &'static str {
        match self {
            Self::Steckler => "Steckler room, doors and windows (1982)",
            Self::OpenBurner => "Burner, door open (2018)",
            Self::ShutBurner => "Burner, door shut (2018)",
            Self::Furniture => "Chair and sofa, door open (2018)",
            Self::LargeRoom => "Large room, open and shut (2006)",
            Self::Enclosure => "LLNL enclosure, fans and shut (1986)",
            Self::FurnitureShut => "Chair and sofa, door shut (2018)",
            Self::Corridor => "Room, corridor, 100 kW (1988)",
            Self::House => "House of six rooms (2019)",
            Self::ReducedScale => "Room at 2/5 scale (1994)",
            Self::ChairRoom => "Chair in a room with a window (1984)",
        }
    }
}

/// What is compared.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Quantity {
    UpperRise,
    LayerDepth,
    VentFlow,
    NeutralPlane,
    OxygenDecreaseForced,
    OxygenDecreaseShut,
    MeanRiseShut,
    ExtinctionOxygen,
    ExtinctionTime,
    TimeTo500,
    Reaches600,
    PeakRise,
    LowerRise,
    OxygenDecreaseOpen,
    MeanRiseEnclosure,
    OxygenDecreaseEnclosureShut,
    OxygenLeft,
    RemoteRise,
    OxygenMeanShut,
    OxygenFallShut,
}

impl Quantity {
    pub const ALL: [Self; 20] = [
        Self::UpperRise,
        Self::LayerDepth,
        Self::VentFlow,
        Self::NeutralPlane,
        Self::OxygenDecreaseForced,
        Self::OxygenDecreaseShut,
        Self::MeanRiseShut,
        Self::ExtinctionOxygen,
        Self::ExtinctionTime,
        Self::TimeTo500,
        Self::Reaches600,
        Self::PeakRise,
        Self::LowerRise,
        Self::OxygenDecreaseOpen,
        Self::MeanRiseEnclosure,
        Self::OxygenDecreaseEnclosureShut,
        Self::OxygenLeft,
        Self::RemoteRise,
        Self::OxygenMeanShut,
        Self::OxygenFallShut,
    ];

    pub const fn key(self) -> &'static str {
        match self {
            Self::UpperRise => "upper_layer_rise",
            Self::LayerDepth => "layer_depth",
            Self::VentFlow => "vent_flow",
            Self::NeutralPlane => "neutral_plane",
            Self::OxygenDecreaseForced => "oxygen_decrease_forced",
            Self::OxygenDecreaseShut => "oxygen_decrease_shut",
            Self::MeanRiseShut => "mean_rise_shut",
            Self::ExtinctionOxygen => "extinction_oxygen",
            Self::ExtinctionTime => "extinction_time",
            Self::TimeTo500 => "time_to_500_c",
            Self::Reaches600 => "reaches_600_c",
            Self::PeakRise => "peak_rise",
            Self::LowerRise => "lower_layer_rise",
            Self::OxygenDecreaseOpen => "oxygen_decrease_open",
            Self::MeanRiseEnclosure => "mean_rise_enclosure",
            Self::OxygenDecreaseEnclosureShut => "oxygen_decrease_enclosure_shut",
            Self::OxygenLeft => "oxygen_left",
            Self::RemoteRise => "remote_rise",
            Self::OxygenMeanShut => "oxygen_mean_decrease_shut",
            Self::OxygenFallShut => "oxygen_fall_shut",
        }
    }

    /// As the record calls it.
    pub const fn title(self) -> &'static str {
        match self {
            Self::UpperRise => "upper-layer rise",
            Self::LayerDepth => "layer depth, vented",
            Self::VentFlow => "vent mass flow",
            Self::NeutralPlane => "neutral plane",
            Self::OxygenDecreaseForced => "oxygen decrease, forced",
            Self::OxygenDecreaseShut => "oxygen decrease, shut, to 240 s",
            Self::MeanRiseShut => "mean rise, shut, to 240 s",
            Self::ExtinctionOxygen => "oxygen at self-extinction",
            Self::ExtinctionTime => "time of self-extinction",
            Self::TimeTo500 => "furniture: time to 500 °C",
            Self::Reaches600 => "furniture: 600 °C reached or not",
            Self::PeakRise => "furniture: peak rise",
            Self::LowerRise => "lower-layer rise",
            Self::OxygenDecreaseOpen => "oxygen decrease, door open, 0.6 m below the ceiling",
            Self::MeanRiseEnclosure => "mean rise of the enclosure",
            Self::OxygenDecreaseEnclosureShut => "oxygen decrease, enclosure shut",
            Self::OxygenLeft => "oxygen left",
            Self::RemoteRise => "rise in rooms away from the fire",
            Self::OxygenMeanShut => {
                "oxygen decrease, shut, mean of both points against mean of the room (straight to the floor)"
            }
            Self::OxygenFallShut => "fall of that mean from 180 to 240 s, 100 kW",
        }
    }

    pub const fn unit(self) -> &'static str {
        match self {
            Self::UpperRise
            | Self::MeanRiseShut
            | Self::PeakRise
            | Self::LowerRise
            | Self::MeanRiseEnclosure
            | Self::RemoteRise => "K",
            Self::LayerDepth | Self::NeutralPlane => "m",
            Self::VentFlow => "kg/s",
            Self::OxygenDecreaseForced
            | Self::OxygenDecreaseShut
            | Self::ExtinctionOxygen
            | Self::OxygenDecreaseOpen
            | Self::OxygenDecreaseEnclosureShut
            | Self::OxygenLeft
            | Self::OxygenMeanShut
            | Self::OxygenFallShut => "vol-%",
            Self::ExtinctionTime | Self::TimeTo500 => "s",
            Self::Reaches600 => "yes 1, no 0",
        }
    }
}

/// A quantity of one test at one moment.
#[derive(Clone, Debug)]
pub struct Point {
    pub series: Series,
    pub quantity: Quantity,
    /// What is counted once: the test, or the configuration that was repeated.
    pub counted: String,
    pub test: String,
    /// When in the test.
    pub moment: String,
    pub measured: f64,
    /// None: the run failed, or what was asked for never happened in it.
    pub computed: Option<f64>,
    /// The engine's own layers, where the reduction of sensors gives something else.
    pub plain: Option<f64>,
    /// Why it stands outside the statistics.
    pub left_out: Option<&'static str>,
}

impl Point {
    pub fn new(
        series: Series,
        quantity: Quantity,
        test: &str,
        moment: &str,
        measured: f64,
        computed: Option<f64>,
    ) -> Self {
        Self {
            series,
            quantity,
            counted: test.to_owned(),
            test: test.to_owned(),
            moment: moment.to_owned(),
            measured,
            computed: computed.filter(|value| value.is_finite()),
            plain: None,
            left_out: None,
        }
    }

    pub fn counted_as(mut self, counted: &str) -> Self {
        counted.clone_into(&mut self.counted);
        self
    }

    pub fn beside(mut self, plain: Option<f64>) -> Self {
        self.plain = plain.filter(|value| value.is_finite());
        self
    }

    pub fn left_out_if(mut self, reason: Option<&'static str>) -> Self {
        self.left_out = reason;
        self
    }

    /// Computed over measured.
    pub fn ratio(&self) -> Option<f64> {
        self.computed.map(|computed| computed / self.measured)
    }
}
