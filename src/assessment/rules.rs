//! The rating rules, numbered, in one place, with the text that reports print.

/// One clause.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Clause {
    /// Number, `rule.clause`.
    pub number: &'static str,
    /// Text that reports print.
    pub text: &'static str,
}

/// Rule 1, clause by clause.
pub const CLAUSES: &[Clause] = &[];
