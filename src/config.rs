//! Flags and environment, parsed once.
