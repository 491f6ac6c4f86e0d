//! Who asks: every store call takes a [`Caller`].

use super::ids::AgencyId;

/// What a caller may do.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Role {
    /// Reads.
    Reader,
    /// Reads and records what was measured.
    Inspector,
    /// Everything within the agency.
    Officer,
}

/// The agency a request acts for, who acts, and in which role.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Caller {
    /// Records of this agency only.
    pub agency: AgencyId,
    /// Who is recorded as having made a change.
    pub actor: String,
    /// What the caller may do.
    pub role: Role,
}

impl Caller {
    /// The only user of an inventory without keys.
    pub fn local() -> Self {
        Self { agency: AgencyId::local(), actor: "local".to_owned(), role: Role::Officer }
    }
}
