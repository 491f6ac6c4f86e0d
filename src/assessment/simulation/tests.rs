//! Runs as the engine would take them.
