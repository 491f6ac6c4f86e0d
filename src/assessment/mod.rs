//! Building, catalogue and assumptions to findings, ratings and reasons. Pure.
