//! People and crews in a room, as a run goes on.

use crate::fire::crew::Crew;
use crate::fire::tenability::{Clothing, Line, Lost, Reach, Receptor, TwoLayers, WayOut};
use crate::fire::two_zone::RoomState;

/// A person standing, one crawling and a crew in one room, from the moment that anything comes to it.
#[derive(Debug, Clone, PartialEq)]
pub(in crate::assessment) struct People {
    standing: WayOut,
    crawling: WayOut,
    pub crew: Crew,
    at_s: f64,
}

impl People {
    /// The room at this time; in the room of origin one must see to its door, elsewhere along the route.
    pub fn starting(at_s: f64, state: &RoomState, origin: bool) -> Self {
        let air = TwoLayers::from(state);
        let reach = if origin { Reach::WithinRoom } else { Reach::OnRoute };
        let of = |receptor| WayOut::starting(at_s, receptor, reach, Clothing::Full, &air);
        Self {
            standing: of(Receptor::STANDING),
            crawling: of(Receptor::CRAWLING),
            crew: Crew::starting(at_s, &air),
            at_s,
        }
    }

    /// The room a while later.
    pub fn follow(&mut self, at_s: f64, state: &RoomState) {
        let air = TwoLayers::from(state);
        let dt_s = at_s - self.at_s;
        // A dose of one kills: beyond it nothing more is asked.
        if !self.is_settled() {
            self.standing.add(dt_s, &air);
            self.crawling.add(dt_s, &air);
        }
        self.crew.add(dt_s, &air);
        self.at_s = at_s;
    }

    /// When the way out is lost to a person upright, and why.
    pub fn standing(&self, line: Line) -> Option<Lost> {
        self.standing.lost(line)
    }

    /// When it is lost to one who crawls.
    pub fn crawling(&self, line: Line) -> Option<Lost> {
        self.crawling.lost(line)
    }

    /// Every line is passed, by dose as by sight.
    fn is_settled(&self) -> bool {
        [&self.standing, &self.crawling].iter().all(|way| {
            way.gas().reached_s(Line::ThreeTenths).is_some()
                || way.heat().reached_s(Line::ThreeTenths).is_some()
        })
    }
}
