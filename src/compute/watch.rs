//! What an assessment is asked at each step: go on or stop.

use std::ops::ControlFlow;

use super::StopFlag;
use crate::assessment::Stop;

/// Counts steps against a budget and looks at the flag. A budget of steps and not of time, so
/// that an answer does not depend on what else the machine does.
#[derive(Debug)]
pub struct Watch<'a> {
    flag: &'a StopFlag,
    left: u64,
    spent: bool,
}

impl<'a> Watch<'a> {
    /// Lets so many steps through, unless the flag is set before.
    pub fn new(flag: &'a StopFlag, budget: u64) -> Self {
        Self { flag, left: budget, spent: false }
    }

    /// One step.
    pub fn step(&mut self) -> ControlFlow<Stop> {
        if self.flag.is_set() {
            return ControlFlow::Break(Stop);
        }
        match self.left.checked_sub(1) {
            Some(left) => {
                self.left = left;
                ControlFlow::Continue(())
            }
            None => {
                self.spent = true;
                ControlFlow::Break(Stop)
            }
        }
    }

    /// Whether the budget is what stopped it.
    pub fn is_over_budget(&self) -> bool {
        self.spent
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_budget_lets_through_what_it_says_and_no_step_more() {
        let flag = StopFlag::default();
        let mut watch = Watch::new(&flag, 2);

        let steps = [watch.step(), watch.step()];

        assert_eq!(steps, [ControlFlow::Continue(()); 2]);
        assert!(!watch.is_over_budget());
        assert_eq!(watch.step(), ControlFlow::Break(Stop));
        assert!(watch.is_over_budget());
    }

    #[test]
    fn a_set_flag_stops_without_calling_it_the_budget() {
        let flag = StopFlag::default();
        flag.set();
        let mut watch = Watch::new(&flag, 2);

        assert_eq!(watch.step(), ControlFlow::Break(Stop));
        assert!(!watch.is_over_budget());
    }
}
