//! Conditions on a change: what `If-Match` and `If-None-Match` say.

use super::error::StoreError;

/// What must be true of the addressed building, room or opening for a change to happen.
///
/// A building's tag is its revision. A room's or opening's tag is the revision
/// in which that part last changed, so that work on two rooms never collides.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum Condition {
    /// It is there: `If-Match: *`.
    Any,
    /// Its tag is one of these: `If-Match: "7", W/"8"`.
    Match(Vec<u64>),
    /// It is not there: `If-None-Match: *`.
    NoneMatch,
}

impl Condition {
    /// Judges the condition against the tag the thing has now.
    pub(super) fn judge(&self, current: Option<u64>) -> Result<(), StoreError> {
        let holds = match (self, current) {
            (Self::Any, Some(_)) | (Self::NoneMatch, None) => true,
            (Self::Match(tags), Some(tag)) => tags.contains(&tag),
            _ => false,
        };
        if holds { Ok(()) } else { Err(StoreError::Stale { current }) }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_condition_holds_only_for_what_it_names() {
        let matching = Condition::Match(vec![3, 7]);
        for (condition, current, holds) in [
            (&Condition::Any, Some(1), true),
            (&Condition::Any, None, false),
            (&matching, Some(7), true),
            (&matching, Some(8), false),
            (&matching, None, false),
            (&Condition::Match(vec![]), Some(1), false),
            (&Condition::NoneMatch, None, true),
            (&Condition::NoneMatch, Some(1), false),
        ] {
            assert_eq!(condition.judge(current).is_ok(), holds, "{condition:?} on {current:?}");
        }
    }
}
