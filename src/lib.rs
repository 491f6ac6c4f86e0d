//! Sootline rates the fire risk of buildings, room by room, before anything burns.
//!
//! The modules below stand in the order a newcomer should read them; DEVELOPERS.md
//! has the map and the arrows between them.

pub mod fire;

pub mod domain;

pub mod catalogue;

pub mod assessment;

pub mod wire;

pub mod report;

pub mod store;

pub mod compute;

pub mod http;

pub mod config;

pub mod cli;
