//! The form of the assumptions of an assessment.

use super::list::{List, Words};
use super::number::{Bare, Whole};
use super::object::{Maybe, default_of, doc_of, name_of, object};
use super::scalar::OneWord;
use crate::domain::Key;
use crate::domain::assumptions::{Ambient, Assumptions, GrowthClass, Level, Scenario};
use crate::domain::building::Response;
use crate::domain::quantity::{Angle, Fraction, Span, Temperature, WindSpeed};

object! {
    /// Air around and inside the building before the fire.
    Ambient as "Ambient" {
        /// Outside temperature; 20 °C unless given.
        temperature_c: Maybe<Temperature> = None,
        /// Indoor temperature; that outside unless given.
        indoor_temperature_c: Maybe<Temperature> = None,
        /// Wind speed; zero unless given.
        wind_m_s: Maybe<Bare<WindSpeed>> = None,
        /// Direction the wind comes from, clockwise from north.
        wind_from_deg: Maybe<Bare<Angle>> = None,
    }

    /// What an assessment is asked to assume. Null: the service's default.
    Assumptions as "Assumptions" {
        /// How deep the computation goes.
        level: Maybe<OneWord<Level>> = None,
        /// Only these scenarios; null: all.
        scenarios: Maybe<Words<Scenario, 1>> = None,
        /// Horizon; null: 60 min open and 120 min shut.
        horizon_s: Maybe<Span> = None,
        /// Fractile of the fire load; null: 0.8.
        fuel_load_fractile: Maybe<Fraction> = None,
        /// Growth instead of the room's own.
        growth: Maybe<OneWord<GrowthClass>> = None,
        /// The key of a fuel package, taken as origin in rooms that have it.
        item_of_origin: Maybe<Key> = None,
        /// Spans of the response instead of the building's own.
        response: Response = Response::default(),
        /// Ambient air.
        ambient: Ambient = Ambient::default(),
        /// Times of entry on the fire clock, for the scenario `entry`.
        entry_times_s: Maybe<List<Span, 50>> = None,
        /// Seed of the sampling.
        seed: Maybe<Whole<u64, 0, 9_007_199_254_740_991>> = None,
    }
}
