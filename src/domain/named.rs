//! A catalogue name, or the properties themselves.

/// Wherever a building may name a row of the catalogue it may give the properties instead.
#[derive(Debug, Clone, PartialEq)]
pub enum Named<T> {
    /// A key of the catalogue; the wire form has checked that it exists.
    Catalogue(String),
    /// The properties, given by the bureau.
    Given(T),
}

impl<T> Named<T> {
    /// The key, where it is one.
    pub fn key(&self) -> Option<&str> {
        match self {
            Self::Catalogue(key) => Some(key),
            Self::Given(_) => None,
        }
    }
}

/// A row of the catalogue names another by its key.
impl<T> From<String> for Named<T> {
    fn from(key: String) -> Self {
        Self::Catalogue(key)
    }
}
