//! The one error of this folder: an iteration that did not settle.

/// An iteration ended without an answer.
///
/// Correlations never fail; only searches can, and only when they are fed numbers that are not finite.
#[derive(Clone, Copy, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{what} did not settle after {after} steps")]
pub struct NotConverged {
    /// What was being looked for.
    pub what: &'static str,
    /// How many steps were spent on it.
    pub after: u32,
}
