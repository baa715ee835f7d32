//! Chemistry of interstellar clouds.
//!
//! Read a gas-phase reaction network and a cloud, evaluate the rate
//! coefficients, integrate the stiff abundance equations or find their steady
//! states, and rank what makes and destroys a species.
//!
//! The modules are the rooms of the house, in reading order; a room uses only
//! rooms above it (`tests/tidy.rs` checks this, `DEVELOPERS.md` draws it).

pub mod diagnostic;
pub mod units;

pub mod species;

pub mod rates;

pub mod network;

pub mod sparse;

pub mod integrate;

pub mod kinetics;

pub mod cloud;

pub mod analysis;

pub mod report;

pub mod cli;
