//! Stiff integration of many small systems side by side, and their steady
//! states.
//!
//! A [`System`] gives the right-hand side and the Jacobian rows of
//! `dy/dt = f(y; parameters)`; a [`Problem`] is one cell of it, a [`Solution`]
//! what became of that cell. [`integrate_all`] keeps the lanes of one batch
//! filled from an iterator of problems: every lane has its own time, step,
//! error and accept or reject, and no decision looks across lanes, so a cell's
//! bits do not depend on its neighbours. This room knows no chemistry.

mod batch;
mod dense;
mod failure;
mod invariants;
mod method;
mod spectrum;
mod steady;

mod step;

pub use batch::integrate_all;
pub use failure::{Cause, Failure};
pub use invariants::{Invariants, Projection};
pub use method::Method;
pub use spectrum::{Spectrum, slowest_mode};
pub use steady::{SteadyFailure, SteadyOptions, SteadyState, find_steady_state};

use crate::sparse::{Lane, Symbolic};

/// An autonomous system `dy/dt = f(y; parameters)` whose Jacobian has a fixed
/// sparse pattern.
pub trait System: Sync {
    /// Unknowns.
    fn size(&self) -> usize;
    /// Parameters of one cell.
    fn parameters(&self) -> usize;
    /// Fill of the matrices `shift - J`, in the order of the unknowns.
    fn symbolic(&self) -> &Symbolic;
    /// The linear sums that the system conserves.
    fn invariants(&self) -> &Invariants;
    /// Writes `f(y)`.
    ///
    /// # Shape
    /// `parameters`: `[parameters]`, `y` and `f`: `[size]`.
    fn rate_of_change<L: Lane>(&self, parameters: &[L], y: &[L], f: &mut [L]);
    /// Subtracts row `i` of the Jacobian from `row` and returns `f_i(y)`.
    ///
    /// # Shape
    /// `row`: `[size]`.
    fn subtract_jacobian_row<L: Lane>(
        &self,
        i: usize,
        parameters: &[L],
        y: &[L],
        row: &mut [L],
    ) -> L;
}

/// One cell to integrate.
#[derive(Clone, Debug, PartialEq)]
pub struct Problem {
    /// Parameters of the system, `[parameters]`.
    pub parameters: Vec<f64>,
    /// State at time zero, `[size]`.
    pub start: Vec<f64>,
    /// Times at which the state is wanted, ascending, not negative; the last
    /// one ends the integration.
    pub times: Vec<f64>,
}

/// Tolerances and limits of the integration.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Options {
    /// The method; [`Method::rodas5`] unless there is a reason.
    pub method: &'static Method,
    /// Error allowed per step relative to each unknown.
    pub relative_tolerance: f64,
    /// Error allowed per step in each unknown besides.
    pub absolute_tolerance: f64,
    /// Steps (accepted and rejected) after which a cell is given up.
    pub step_limit: u32,
}

impl Default for Options {
    fn default() -> Self {
        Self {
            method: Method::rodas5(),
            relative_tolerance: 1e-5,
            absolute_tolerance: 1e-20,
            step_limit: 100_000,
        }
    }
}

/// Work done on one cell.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Work {
    /// Steps that were kept; each costs one Jacobian and one factorization.
    pub accepted: u32,
    /// Steps that were tried and thrown away, at the same cost.
    pub rejected: u32,
}

/// What became of one cell.
#[derive(Clone, Debug, PartialEq)]
pub struct Solution {
    /// Place of the problem in the input, from 0.
    pub cell: usize,
    /// The state at each wanted time that was reached, `[times][size]`.
    pub states: Vec<Vec<f64>>,
    /// Work done.
    pub work: Work,
    /// Why the integration stopped early, if it did.
    pub failure: Option<Failure>,
}

#[cfg(test)]
mod tests;
