//! Formats of others.
