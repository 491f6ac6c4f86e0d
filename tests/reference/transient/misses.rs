//! What is written where a bar is missed: the miss, its likely cause, the experiment that would tell.
//!
//! A bar that is missed with nothing here fails the test; one that is met with something here does too. The tables
//! that the texts lean on are those of `evidence`.

/// Why a bar is missed.
#[derive(Clone, Copy, Debug)]
pub struct Miss {
    /// What is off, and which tests make it so.
    pub what: &'static str,
    /// What most likely makes it.
    pub cause: &'static str,
    /// What would separate the causes.
    pub experiment: &'static str,
}

pub const UPPER_RISE: Option<Miss> = None;
pub const LAYER_DEPTH: Option<Miss> = None;
pub const VENT_FLOW: Option<Miss> = None;
pub const NEUTRAL_PLANE: Option<Miss> = None;
pub const OXYGEN_FORCED: Option<Miss> = None;
pub const OXYGEN_SHUT: Option<Miss> = Some(Miss {
    what: "The oxygen 0.6 m below the ceiling of the shut 2018 room falls a sixth too little, in all configurations alike; the scatter is within the bar.",
    cause: "several that add up, none of them enough alone. The engine keeps the gas below the burner as air (at 240 s about a third of the gas of the room) while the room \
            mixed: 1.8 m below the ceiling the oxygen had fallen by 60 to 80 % of what it had at the point, and the lowest sensor had warmed more than twice as much as the \
            computed lower layer (part of that may be radiation to a bare sensor). The burner gave more than its nominal 100 kW in some places: 101 to 127 kW by the oxygen \
            that went, where the same balance makes 82 kW of the computed 100. The point reads 1.05 to 1.11 times the mean of the layer that it lies in, which the engine has as one. Whether the gas was dried before it was read is \
            not stated: if it was not, the figure is 0.94 and within the bar, and the burner gave 93 to 118 kW. Half the leakage makes the late fall steeper and the figure 0.85. With 500 kW the computed \
            flame is out while the real one goes on (see the mean rise).",
    experiment: "the same burn with the gas flow logged, the sample line described, and oxygen at four heights down to 0.1 m: a lower part that holds air would clear \
                 the mixing, a logged flow the burner.",
});
pub const MEAN_RISE_SHUT: Option<Miss> = Some(Miss {
    what: "The scatter is too wide, by the three configurations of 500 kW alone: at 1.12 of the measured rise at 60 s, they are computed at 0.7 of it at 120 s (scatter 0.5: one is still alight) and at half and \
           less from 180 s on. Without them the figure is 1.08 ± 0.10, within the bar; it is not counted so.",
    cause: "the computed flame goes out as a whole within the second minute, and its gas cools towards the lining; the real one burned on, at 4 to 5 \
            vol-% above and 8 to 14 at the lower point, on the air that came in: at least 125 to 165 kW between 120 and 180 s by its oxygen, and no \
            log says that it went out by itself. The engine has no flame that shrinks to the air it finds near the floor, and does not relight gas that goes on streaming into the air about the burner.",
    experiment: "200, 300 and 400 kW in the same shut room with a thermocouple at the burner's rim and oxygen beside it: whether the flame shrinks or dies, and at what oxygen \
                 of the gas that it draws rather than of the room.",
});
pub const EXTINCTION_OXYGEN: Option<Miss> = None;
pub const EXTINCTION_TIME: Option<Miss> = None;
pub const TIME_TO_500: Option<Miss> = None;
pub const REACHES_600: Option<Miss> = Some(Miss {
    what: "Three of the four chairs reached 600 °C in the mean of the sensors of the top 0.6 m; computed they stop at 530 to 550 °C. All four sofas and the chair that did not reach it \
           are told rightly.",
    cause: "at their hottest the sensors of the top 0.6 m had risen 1.20 to 1.26 times as much as the mean of the layer (1.23 to 1.42 with the burner in the same room), and the \
            engine has one layer. Its own mean is at 0.88 to 0.99 of the measured two-zone layer at that moment; both together make the 0.77 to 0.85 of the peak. For the sofas the profile is \
            flatter (1.02 to 1.14) and the computed layer itself is too cool (0.72 to 0.80), which their 600 °C survives.",
    experiment: "the same burns judged by the mean of the layer instead of its top, with the lag of the hood measured: a lag of 15 s taken off moves the computed mean history from 0.93 to \
                 0.98 and leaves the peak, so that what remains is the profile; a burner of 1.5 MW in the same room, whose heat needs no hood, would tell the heat balance.",
});
pub const PEAK_RISE: Option<Miss> = None;
