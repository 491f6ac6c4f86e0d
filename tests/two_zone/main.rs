//! Is the transient engine solved right? Closed forms, balances, symmetry, limits, a second solver. Whether
//! its laws are the right ones is the matter of `tests/reference`.

mod analytic;
mod bad_input;
mod balances;
mod buildings;
mod cases;
mod claims;
mod house;
mod limits;
mod support;
mod symmetry;
mod threads;
mod variants;
mod wide;
