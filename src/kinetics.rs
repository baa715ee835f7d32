//! The compiled network: right-hand side, Jacobian and conserved sums, over
//! lanes.
//!
//! A [`Mechanism`] says which species each reaction takes, gives and depends
//! on. [`Kinetics`] compiles it once: species are numbered in elimination
//! order, and in the equation of each species all reactions with the same
//! reactants become one term with one summed coefficient. A cell's rate
//! coefficients are summed into these terms when the cell is loaded
//! ([`Kinetics::parameters`]); after that nothing here knows a reaction.
//!
//! The unknowns are abundances n(X)/n_H, time is in seconds.

mod compile;
mod terms;

pub use compile::{Change, Kinetics, Mechanism};
