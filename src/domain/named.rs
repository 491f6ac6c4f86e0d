//! A catalogue name, or the properties themselves.

/// Wherever a building may name a row of the catalogue it may give the properties instead.
#[derive(Debug, Clone, PartialEq)]
pub enum Named<T> {
    /// A key of the catalogue; the wire form has checked that it exists.
    Catalogue(String),
    /// The properties, given by the bureau.
    Given(T),
}
