//! Stability of a steady state: the slowest mode of the linearised system on
//! its conserved sums.

use nalgebra::{Complex, DMatrix, linalg::Schur};

use super::System;
use super::steady::{carriers, jacobian};
use crate::sparse::Lane;

/// What the spectrum of the reduced Jacobian says.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Spectrum {
    /// Eigenvalue with the largest real part, per unit time; negative: small
    /// disturbances decay with the time `-1 / re`.
    pub largest_real_part: f64,
    /// Its imaginary part; other than zero: they oscillate.
    pub imaginary_part: f64,
}

impl Spectrum {
    /// Whether all small disturbances that keep the conserved sums decay.
    #[must_use]
    pub fn is_stable(&self) -> bool {
        self.largest_real_part < 0.0
    }
}

/// The mode that decays slowest (or grows fastest) around a steady state,
/// among disturbances that keep the conserved sums: the eigenvalue with the
/// largest real part of the Jacobian reduced by one carrier per sum.
///
/// Slow modes are read from the inverse of the reduced Jacobian, fast ones from
/// the matrix itself, since rounding hides eigenvalues that are 1e-10 or less
/// of the largest. `None` if the eigenvalues could not be computed, which
/// includes a singular reduced Jacobian (a continuum of steady states).
#[must_use]
pub fn slowest_mode<L: Lane, S: System>(
    system: &S,
    parameters: &[f64],
    state: &[f64],
) -> Option<Spectrum> {
    let floor = 1e-30;
    let lanes: Vec<L> = parameters.iter().map(|&p| L::splat(p)).collect();
    let (matrix, _) = jacobian::<L, S>(system, &lanes, state);
    let carriers = carriers(system, state, floor);
    // Unknowns that nothing changes are no modes.
    let inert = |i: usize| matrix.row(i).amax() <= 0.0;
    let free: Vec<usize> =
        (0..state.len()).filter(|i| !carriers.contains(i) && !inert(*i)).collect();
    let invariants = system.invariants();
    let m = carriers.len();
    let mut of_carriers = DMatrix::zeros(m, m);
    let mut of_free = DMatrix::zeros(m, free.len());
    for sum in 0..m {
        for &(i, w) in invariants.row(sum) {
            if let Some(c) = carriers.iter().position(|&c| c == i) {
                of_carriers[(sum, c)] = w;
            } else if let Some(c) = free.iter().position(|&c| c == i) {
                of_free[(sum, c)] = w;
            }
        }
    }
    let dependence = of_carriers.lu().solve(&of_free)?;
    let scale = |i: usize| state[i].abs().max(floor);
    let reduced = DMatrix::from_fn(free.len(), free.len(), |a, b| {
        let through: f64 = carriers
            .iter()
            .enumerate()
            .map(|(c, &carrier)| matrix[(free[a], carrier)] * dependence[(c, b)])
            .sum();
        (matrix[(free[a], free[b])] - through) * scale(free[b]) / scale(free[a])
    });
    let inverse = reduced.clone().try_inverse()?;
    let slow = trusted(&inverse)?.into_iter().map(|mu| Complex::new(1.0, 0.0) / mu);
    let fast = trusted(&reduced)?;
    let slowest = slow.chain(fast).max_by(|a, b| a.re.total_cmp(&b.re))?;
    Some(Spectrum { largest_real_part: slowest.re, imaginary_part: slowest.im.abs() })
}

/// The eigenvalues that rounding leaves accurate to a few digits.
fn trusted(matrix: &DMatrix<f64>) -> Option<Vec<Complex<f64>>> {
    let matrix = balanced(matrix);
    // Strongly graded matrices may need a looser test for convergence.
    let schur = [1e-15, 1e-14, 1e-13, 1e-12]
        .into_iter()
        .find_map(|precision| Schur::try_new(matrix.clone(), precision, 10_000))?;
    let values = schur.complex_eigenvalues();
    let largest = values.iter().map(|v| v.norm()).fold(0.0, f64::max);
    Some(values.iter().copied().filter(|v| v.norm() > 1e-9 * largest).collect())
}

/// Similarity scaling by powers of two that brings the norms of each row and
/// its column together (Parlett & Reinsch 1969, Numer. Math. 13, 293).
fn balanced(matrix: &DMatrix<f64>) -> DMatrix<f64> {
    let mut matrix = matrix.clone();
    let n = matrix.nrows();
    for _ in 0..20 {
        let mut settled = true;
        for i in 0..n {
            let off = |v: f64, diagonal: f64| v - diagonal.abs();
            let column = off(matrix.column(i).lp_norm(1), matrix[(i, i)]);
            let row = off(matrix.row(i).lp_norm(1), matrix[(i, i)]);
            if column <= 0.0 || row <= 0.0 {
                continue;
            }
            let factor = (row / column).sqrt().log2().round().exp2();
            if (column * factor + row / factor) < 0.95 * (column + row) {
                settled = false;
                matrix.column_mut(i).scale_mut(factor);
                matrix.row_mut(i).scale_mut(1.0 / factor);
            }
        }
        if settled {
            break;
        }
    }
    matrix
}
