//! Linear sums that the exact solution conserves, and the projection that
//! keeps them to rounding.
//!
//! A Rosenbrock method conserves linear sums in exact arithmetic; in floating
//! point they drift with the rounding of the solves, which for a trace element
//! is far above the last digit. Each accepted state is therefore moved onto its
//! sums by the smallest change relative to the abundances: minimise
//! sum (dy_i)^2 / |y_i| subject to A (y + dy) = b, that is
//! dy = |y| A^T lambda with (A |y| A^T) lambda = b - A y. Every unknown changes
//! by the same tiny relative amount per sum, so signs are kept.
//!
//! The same is done to the increments of every stage. Where an exchange is so
//! fast that h |J| exceeds 1e16 (grains and electrons in dense lit gas), the solve
//! knows nothing of the slow sum of the partners, and without this the error
//! estimate would be rounding.

use crate::sparse::Lane;

/// The conserved sums of a system: `sum_i weight_i y_i` is constant.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Invariants {
    /// By sum, as (unknown, weight).
    rows: Vec<Weights>,
    /// The same by unknown, as (sum, weight).
    columns: Vec<Weights>,
    /// Pairs of sums with the unknowns that enter both, as (unknown, product of
    /// weights).
    pairs: Vec<(usize, usize, Weights)>,
}

type Weights = Vec<(usize, f64)>;

/// More sums than any network has elements.
const MOST: usize = Invariants::MOST;

/// Part of a sum that must lie in unknowns outside the sums before it, for the
/// sum to be restored in full. Where less does (all carbon and all oxygen in CO,
/// say), only trace unknowns could tell two sums apart, and rounding of the sums
/// would move them by up to 1e-16 over this part of themselves in every step.
const OWN_PART: f64 = 1e-8;

impl Invariants {
    /// Sums that a system may have.
    pub const MOST: usize = 32;

    /// From dense rows of weights over `size` unknowns.
    ///
    /// # Panics
    /// If there are more than [`Invariants::MOST`] rows.
    #[must_use]
    pub fn new(size: usize, weights: &[Vec<f64>]) -> Self {
        assert!(weights.len() <= MOST, "at most {MOST} conserved sums");
        let sparse = |row: &Vec<f64>| -> Weights {
            row.iter().copied().enumerate().filter(|&(_, w)| w.abs() > 0.0).collect()
        };
        let mut pairs = Vec::new();
        for a in 0..weights.len() {
            for b in 0..=a {
                let product: Vec<f64> =
                    weights[a].iter().zip(&weights[b]).map(|(x, y)| x * y).collect();
                pairs.push((a, b, sparse(&product)));
            }
        }
        let columns =
            (0..size).map(|i| sparse(&weights.iter().map(|row| row[i]).collect())).collect();
        Self { rows: weights.iter().map(sparse).collect(), columns, pairs }
    }

    /// Number of sums.
    #[must_use]
    pub fn count(&self) -> usize {
        self.rows.len()
    }

    /// The weights of one sum, as (unknown, weight).
    #[must_use]
    pub fn row(&self, sum: usize) -> &[(usize, f64)] {
        &self.rows[sum]
    }

    /// Number of unknowns.
    #[must_use]
    pub fn size(&self) -> usize {
        self.columns.len()
    }

    /// Evaluates one sum.
    #[inline(always)]
    pub fn sum<L: Lane>(&self, sum: usize, y: &[L]) -> L {
        let mut total = L::zero();
        for &(i, w) in &self.rows[sum] {
            total = y[i].mul_add(L::splat(w), total);
        }
        total
    }

    /// Evaluates all sums.
    #[must_use]
    pub fn sums<L: Lane>(&self, y: &[L]) -> Vec<L> {
        (0..self.count()).map(|s| self.sum(s, y)).collect()
    }

    /// Work space of the projection.
    #[must_use]
    pub fn projection<L: Lane>(&self) -> Projection<L> {
        let m = self.count();
        Projection {
            weights: vec![L::zero(); self.size()],
            matrix: vec![L::zero(); m * m],
            inverse: vec![L::zero(); m],
            multipliers: vec![L::zero(); m],
        }
    }

    /// Moves `y` onto `targets`.
    ///
    /// # Shape
    /// `targets`: `[count]`, `y`: `[size]`.
    #[inline(always)]
    pub fn project<L: Lane>(&self, projection: &mut Projection<L>, targets: &[L], y: &mut [L]) {
        self.weigh(projection, y);
        for (sum, multiplier) in projection.multipliers.iter_mut().enumerate() {
            *multiplier = targets[sum] - self.sum(sum, y);
        }
        self.correct(projection, y);
    }

    /// Takes out of an increment what would change the sums, relative to the
    /// abundances of the last [`Invariants::weigh`].
    ///
    /// # Shape
    /// `increment`: `[size]`.
    #[inline(always)]
    pub fn level<L: Lane>(&self, projection: &mut Projection<L>, increment: &mut [L]) {
        for (sum, multiplier) in projection.multipliers.iter_mut().enumerate() {
            *multiplier = -self.sum(sum, increment);
        }
        self.correct(projection, increment);
    }

    /// Factorizes A |y| A^T as L D L^T.
    ///
    /// # Shape
    /// `y`: `[size]`.
    #[inline(always)]
    pub fn weigh<L: Lane>(&self, projection: &mut Projection<L>, y: &[L]) {
        let Projection { weights, matrix, inverse, .. } = projection;
        let m = self.count();
        for (weight, &y) in weights.iter_mut().zip(y) {
            *weight = y.abs();
        }
        // A sum without members in this cell (an element that is absent) has a
        // zero row; the tiny shift makes its multiplier zero instead of 0/0.
        let tiny = L::splat(1e-200);
        for (a, b, members) in &self.pairs {
            let mut total = if a == b { tiny } else { L::zero() };
            for &(i, w) in members {
                total = weights[i].mul_add(L::splat(w), total);
            }
            matrix[a * m + b] = total;
        }
        for a in 0..m {
            for b in 0..a {
                let mut value = matrix[a * m + b];
                for c in 0..b {
                    value = value - matrix[a * m + c] * matrix[b * m + c] * matrix[c * m + c];
                }
                matrix[a * m + b] = value * inverse[b];
            }
            let mut diagonal = matrix[a * m + a];
            let least = diagonal * L::splat(OWN_PART);
            for c in 0..a {
                let left = matrix[a * m + c];
                diagonal = diagonal - left * left * matrix[c * m + c];
            }
            diagonal = diagonal.max(least).max(tiny);
            matrix[a * m + a] = diagonal;
            inverse[a] = L::splat(1.0) / diagonal;
        }
    }

    /// Solves for the multipliers and adds |y| A^T times them.
    #[inline(always)]
    fn correct<L: Lane>(&self, projection: &mut Projection<L>, y: &mut [L]) {
        let Projection { weights, matrix, inverse, multipliers: x } = projection;
        let m = self.count();
        for a in 0..m {
            for c in 0..a {
                x[a] = x[a] - matrix[a * m + c] * x[c];
            }
        }
        for a in (0..m).rev() {
            x[a] = x[a] * inverse[a];
            for c in a + 1..m {
                x[a] = x[a] - matrix[c * m + a] * x[c];
            }
        }
        for ((y, weight), column) in y.iter_mut().zip(weights).zip(&self.columns) {
            let mut relative = L::zero();
            for &(sum, w) in column {
                relative = x[sum].mul_add(L::splat(w), relative);
            }
            *y = weight.mul_add(relative, *y);
        }
    }
}

/// The factorized projection of one batch; see [`Invariants::projection`].
#[derive(Clone, Debug)]
pub struct Projection<L> {
    weights: Vec<L>,
    matrix: Vec<L>,
    inverse: Vec<L>,
    multipliers: Vec<L>,
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sparse::{Fused, Single};

    type One = Single<Fused>;

    #[test]
    fn a_disturbed_mixture_returns_to_its_sums_and_keeps_its_signs() {
        // Sums with abundances from 1 down to 1e-12.
        let weights = vec![
            vec![2.0, 1.0, 0.0, 0.0, 2.0, 0.0],
            vec![0.0, 0.0, 1.0, 0.0, 1.0, 0.0],
            vec![0.0, 0.0, 0.0, 1.0, 0.0, -1.0],
        ];
        let invariants = Invariants::new(6, &weights);
        let exact = [0.5, 1e-3, 1e-9, 1e-12, 3e-9, 1e-12];
        let lanes = |v: &[f64]| -> Vec<One> { v.iter().map(|&x| One::splat(x)).collect() };
        let targets = invariants.sums(&lanes(&exact));
        let disturbed: Vec<f64> =
            exact.iter().enumerate().map(|(i, x)| x * (1.0 + 1e-7 * i as f64)).collect();
        let mut y = lanes(&disturbed);
        invariants.project(&mut invariants.projection(), &targets, &mut y);
        for sum in 0..2 {
            let (got, want) = (invariants.sum(sum, &y).get(0), targets[sum].get(0));
            assert!((got / want - 1.0).abs() < 1e-14, "sum {sum}: {got:e} against {want:e}");
        }
        assert!(invariants.sum(2, &y).get(0).abs() < 1e-25);
        assert!(y.iter().all(|v| v.get(0) > 0.0));
    }

    #[test]
    fn an_absent_element_does_no_harm() {
        let invariants = Invariants::new(2, &[vec![1.0, 0.0], vec![0.0, 1.0]]);
        let mut y = vec![One::splat(0.3), One::splat(0.0)];
        let targets = [One::splat(0.25), One::splat(0.0)];
        invariants.project(&mut invariants.projection(), &targets, &mut y);
        assert!((y[0].get(0) - 0.25).abs() < 1e-16 && y[1].get(0).abs() < 1e-300);
    }

    #[test]
    fn sums_that_cannot_be_told_apart_do_no_harm() {
        // Carbon and oxygen, all of both in CO but for traces, and a third sum
        // that repeats the first.
        let weights = [vec![1.0, 1.0, 0.0], vec![1.0, 0.0, 1.0], vec![1.0, 1.0, 0.0]];
        let invariants = Invariants::new(3, &weights);
        let start = [1.7e-4, 3e-19, 1e-19];
        let lanes = |v: &[f64]| -> Vec<One> { v.iter().map(|&x| One::splat(x)).collect() };
        let mut targets = invariants.sums(&lanes(&start));
        // A unit in the last place, as rounding may leave it.
        targets[1] = One::splat(targets[1].get(0) * (1.0 + f64::EPSILON));
        targets[2] = One::splat(targets[2].get(0) * (1.0 - f64::EPSILON));
        let mut y = lanes(&start);
        invariants.project(&mut invariants.projection(), &targets, &mut y);
        for (got, want) in y.iter().zip(start) {
            let error = (got.get(0) / want - 1.0).abs();
            assert!(error < 1e-7, "{:e} against {want:e}", got.get(0));
        }
    }
}
