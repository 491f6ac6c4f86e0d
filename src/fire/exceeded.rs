//! Which published limits of a method a room lies outside of.

/// Up to six explanations, kept inline: the hot path must not allocate.
const CAPACITY: usize = 6;

/// The limits of a method that its inputs exceed, in words for the report.
///
/// Out of range is a fact to report, never an error: the method computes anyway.
///
/// ```
/// use sootline::fire::Exceeded;
///
/// let exceeded = Exceeded::none().when(3.2 > 2.7, "higher than the rooms of the tests");
/// assert_eq!(exceeded.iter().collect::<Vec<_>>(), ["higher than the rooms of the tests"]);
/// ```
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Exceeded {
    notes: [&'static str; CAPACITY],
    count: usize,
}

impl Exceeded {
    /// Nothing exceeded.
    #[must_use]
    pub const fn none() -> Self {
        Self { notes: [""; CAPACITY], count: 0 }
    }

    /// Adds the explanation when the condition holds. A seventh is dropped: no method has that many.
    #[must_use]
    pub const fn when(mut self, exceeded: bool, explanation: &'static str) -> Self {
        if exceeded && self.count < CAPACITY {
            self.notes[self.count] = explanation;
            self.count += 1;
        }
        self
    }

    /// True when the inputs lie in the published range.
    #[must_use]
    pub const fn is_empty(&self) -> bool {
        self.count == 0
    }

    /// How many limits are exceeded.
    #[must_use]
    pub const fn len(&self) -> usize {
        self.count
    }

    /// The explanations, in the order the method states its limits.
    pub fn iter(&self) -> impl Iterator<Item = &'static str> + '_ {
        self.notes[..self.count].iter().copied()
    }

    /// Both sets, one after the other.
    #[must_use]
    pub fn and(self, other: Self) -> Self {
        other.iter().fold(self, |all, note| all.when(true, note))
    }
}
