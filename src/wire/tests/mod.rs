//! Tests of the forms as a whole.

mod contract;
