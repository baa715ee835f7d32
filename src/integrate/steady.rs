//! Steady states: `f(y) = 0` on given conserved sums.
//!
//! Newton's method with one equation per conserved sum put in the place of a
//! redundant rate equation, made global by pseudo-transient continuation
//! (Kelley & Keyes 1998, SIAM J. Numer. Anal. 35, 508): each step solves
//! `(1/dt - J) d = f`, an implicit Euler step, and dt grows as the relative
//! change per step falls, until the steps are Newton's. Unknowns are scaled by
//! the present abundances and rows by their largest entry, and the dense
//! matrix is factorized with pivoting: abundances span thirty decades.

use nalgebra::{DMatrix, DVector};

use super::System;
use crate::sparse::Lane;

/// Limits of the search for a steady state.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct SteadyOptions {
    /// Largest relative change of any unknown in the last Newton step.
    pub tolerance: f64,
    /// Abundance below which an unknown's changes do not count.
    pub floor: f64,
    /// Steps after which the search is given up.
    pub step_limit: u32,
    /// First pseudo time step.
    pub first_step: f64,
}

impl Default for SteadyOptions {
    fn default() -> Self {
        Self { tolerance: 1e-9, floor: 1e-28, step_limit: 500, first_step: 1e3 }
    }
}

/// A steady state.
#[derive(Clone, Debug, PartialEq)]
pub struct SteadyState {
    /// The unknowns, `[size]`.
    pub state: Vec<f64>,
    /// Steps taken.
    pub steps: u32,
    /// Relative change of the last Newton step.
    pub last_change: f64,
}

/// A search that did not end in a steady state.
#[derive(Clone, Debug, PartialEq)]
pub struct SteadyFailure {
    /// Where the search stood, `[size]`.
    pub state: Vec<f64>,
    /// Steps taken.
    pub steps: u32,
    /// The unknown that changed most in the last step.
    pub unknown: usize,
    /// Its relative change.
    pub change: f64,
    /// The pseudo time step reached.
    pub step: f64,
}

/// Finds the steady state that pseudo-transient continuation reaches from
/// `start`, on the conserved sums of `start`.
///
/// # Shape
/// `parameters`: `[parameters]`, `start`: `[size]`.
///
/// # Errors
/// [`SteadyFailure`] if the step limit is reached.
pub fn find_steady_state<L: Lane, S: System>(
    system: &S,
    options: &SteadyOptions,
    parameters: &[f64],
    start: &[f64],
) -> Result<SteadyState, SteadyFailure> {
    let parameters = lanes::<L>(parameters);
    let mut y = start.to_vec();
    let targets: Vec<f64> =
        system.invariants().sums(&lanes::<L>(&y)).iter().map(|t| t.get(0)).collect();
    let mut dt = options.first_step;
    let mut change = f64::INFINITY;
    let mut unknown = 0;
    for step in 1..=options.step_limit {
        let carriers = carriers(system, &y, options.floor);
        let newton = dt > 1e22;
        let inverse_dt = if newton { 0.0 } else { 1.0 / dt };
        let Some(d) = increment::<L, S>(
            system,
            &parameters,
            &y,
            &targets,
            &carriers,
            inverse_dt,
            options.floor,
        ) else {
            dt *= 0.1;
            continue;
        };
        // Relative to the larger of old and new, so that growth from nothing
        // counts as a change of one, and damped below zero.
        let relative = |i: usize| {
            let scale = y[i].abs().max((y[i] + d[i]).abs()).max(options.floor);
            d[i].abs() / scale
        };
        unknown = (0..y.len()).max_by(|&a, &b| relative(a).total_cmp(&relative(b))).unwrap_or(0);
        change = relative(unknown);
        let most_negative = (0..y.len())
            .map(|i| -(y[i] + d[i]) / (y[i].abs() + 1e3 * options.floor))
            .fold(0.0, f64::max);
        if !change.is_finite() || most_negative > 0.1 {
            dt = (dt * 0.2).max(1e-3);
            if newton {
                dt = 1e12;
            }
            continue;
        }
        for (y, d) in y.iter_mut().zip(d.iter()) {
            *y += d;
        }
        y = project::<L, S>(system, &targets, &y);
        if newton && change < options.tolerance {
            return Ok(SteadyState { state: y, steps: step, last_change: change });
        }
        dt *= (0.7 / change.max(1e-300)).clamp(0.5, 10.0);
    }
    Err(SteadyFailure { state: y, steps: options.step_limit, unknown, change, step: dt })
}

fn lanes<L: Lane>(values: &[f64]) -> Vec<L> {
    values.iter().map(|&v| L::splat(v)).collect()
}

fn project<L: Lane, S: System>(system: &S, targets: &[f64], y: &[f64]) -> Vec<f64> {
    let mut y = lanes::<L>(y);
    let invariants = system.invariants();
    invariants.project(&mut invariants.projection(), &lanes::<L>(targets), &mut y);
    y.iter().map(|v| v.get(0)).collect()
}

/// The Jacobian (dense) and the rates of change at a state.
pub(super) fn jacobian<L: Lane, S: System>(
    system: &S,
    parameters: &[L],
    y: &[f64],
) -> (DMatrix<f64>, DVector<f64>) {
    let n = y.len();
    let y = lanes::<L>(y);
    let mut matrix = DMatrix::zeros(n, n);
    let mut f = DVector::zeros(n);
    let mut row = vec![L::zero(); n];
    for i in 0..n {
        row.fill(L::zero());
        f[i] = system.subtract_jacobian_row(i, parameters, &y, &mut row).get(0);
        for (j, value) in row.iter().enumerate() {
            matrix[(i, j)] = -value.get(0);
        }
    }
    (matrix, f)
}

/// One unknown per conserved sum whose rate equation the sum replaces: the
/// main carrier of each, chosen so that the sums determine them.
pub(super) fn carriers<S: System>(system: &S, y: &[f64], floor: f64) -> Vec<usize> {
    let invariants = system.invariants();
    let m = invariants.count();
    let mut rows = DMatrix::<f64>::zeros(m, y.len());
    for sum in 0..m {
        for &(i, w) in invariants.row(sum) {
            rows[(sum, i)] = w * y[i].abs().max(floor);
        }
        let largest = rows.row(sum).amax().max(f64::MIN_POSITIVE);
        rows.row_mut(sum).scale_mut(1.0 / largest);
    }
    let mut chosen = Vec::with_capacity(m);
    for sum in 0..m {
        // Gaussian elimination with the largest entry of the row as the pivot.
        let pivot = (0..y.len())
            .filter(|i| !chosen.contains(i))
            .max_by(|&a, &b| rows[(sum, a)].abs().total_cmp(&rows[(sum, b)].abs()))
            .unwrap_or(0);
        chosen.push(pivot);
        for later in sum + 1..m {
            let factor = rows[(later, pivot)] / rows[(sum, pivot)];
            if factor.is_finite() && factor.abs() > 0.0 {
                for i in 0..y.len() {
                    let value = rows[(sum, i)];
                    rows[(later, i)] -= factor * value;
                }
                rows[(later, pivot)] = 0.0;
            }
        }
    }
    chosen
}

/// Solves `(1/dt - J) d = f` with the conservation sums in their places.
fn increment<L: Lane, S: System>(
    system: &S,
    parameters: &[L],
    y: &[f64],
    targets: &[f64],
    carriers: &[usize],
    inverse_dt: f64,
    floor: f64,
) -> Option<DVector<f64>> {
    let n = y.len();
    let (mut matrix, mut right) = jacobian::<L, S>(system, parameters, y);
    matrix.neg_mut();
    for i in 0..n {
        matrix[(i, i)] += inverse_dt;
    }
    let sums = system.invariants().sums(&lanes::<L>(y));
    for (sum, &carrier) in carriers.iter().enumerate() {
        matrix.row_mut(carrier).fill(0.0);
        for &(i, w) in system.invariants().row(sum) {
            matrix[(carrier, i)] = w;
        }
        right[carrier] = targets[sum] - sums[sum].get(0);
    }
    let scale: Vec<f64> = y.iter().map(|v| v.abs().max(floor)).collect();
    for i in 0..n {
        let mut largest = 0.0f64;
        for j in 0..n {
            matrix[(i, j)] *= scale[j];
            largest = largest.max(matrix[(i, j)].abs());
        }
        if largest > 0.0 {
            matrix.row_mut(i).scale_mut(1.0 / largest);
            right[i] /= largest;
        } else {
            // Nothing changes this unknown: it stays.
            matrix[(i, i)] = 1.0;
        }
    }
    let mut d = matrix.lu().solve(&right)?;
    for (d, s) in d.iter_mut().zip(&scale) {
        *d *= s;
    }
    d.iter().all(|v| v.is_finite()).then_some(d)
}
