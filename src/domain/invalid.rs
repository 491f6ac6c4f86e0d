//! Faults of an input: gathered, never first-only.

use std::fmt;

/// A JSON Pointer (RFC 6901) to a member of the input.
#[derive(Debug, Clone, PartialEq, Eq, PartialOrd, Ord, Hash, Default)]
pub struct Pointer(String);

impl Pointer {
    /// The whole document.
    pub fn root() -> Self {
        Self::default()
    }

    /// The member `name` of what this points to.
    #[must_use]
    pub fn member(&self, name: &str) -> Self {
        Self(format!("{}/{}", self.0, name.replace('~', "~0").replace('/', "~1")))
    }

    /// The element `index` of what this points to.
    #[must_use]
    pub fn element(&self, index: usize) -> Self {
        Self(format!("{}/{index}", self.0))
    }

    /// The name or number of the last step; empty at the root.
    pub fn last(&self) -> &str {
        self.0.rsplit('/').next().unwrap_or_default()
    }

    /// What remains of the pointer below `base`, if it lies there.
    pub fn below(&self, base: &Self) -> Option<Self> {
        let rest = self.0.strip_prefix(base.as_str())?;
        (rest.is_empty() || rest.starts_with('/')).then(|| Self(rest.to_owned()))
    }

    /// The pointer as RFC 6901 writes it.
    pub fn as_str(&self) -> &str {
        &self.0
    }
}

impl fmt::Display for Pointer {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.0)
    }
}

/// One fault of an input: where, what kind, in words, and how to mend it.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Invalid {
    /// Where the fault is.
    pub pointer: Pointer,
    /// A stable word for programs: `missing`, `unknown_member`, `wrong_type`, `out_of_range`, …
    pub code: &'static str,
    /// One sentence for people.
    pub detail: String,
    /// How to mend it, where there is a way to say.
    pub suggestion: Option<String>,
}
