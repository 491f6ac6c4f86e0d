//! Solves the laws of the transient engine a second time, by a general-purpose solver: a check of ours, and a
//! measure of its speed.

extern crate self as sootline;

#[path = "../../../src/fire/mod.rs"]
pub mod fire;

#[path = "../../two_zone/cases.rs"]
pub mod cases;
#[path = "../../two_zone/support.rs"]
pub mod support;

#[path = "../../../benches/two_zone/clock.rs"]
pub mod clock;

pub mod laws;
pub mod second;
pub mod structure;
