//! Routes, extractors, errors to status.
