//! Commands, their help and their tables.
