//! Forward and backward substitution.

use super::{Factors, Symbolic};
use crate::sparse::Lane;

impl Symbolic {
    /// Solves in place.
    ///
    /// # Shape
    /// `x`: `[size]`, right-hand side in, solution out.
    #[inline(always)]
    pub fn solve<L: Lane>(&self, factors: &Factors<L>, x: &mut [L]) {
        let (n, t, m) = (self.size, self.trailing, self.trailing());
        for i in 0..n {
            let pivots = self.pivots(i);
            let mut sum = dot(&self.lower[pivots.clone()], &factors.lower[pivots], x);
            if i > t {
                sum = sum + dot_consecutive(&factors.panel[i * m..][..i - t], &x[t..i]);
            }
            x[i] = x[i] - sum;
        }
        for i in (t..n).rev() {
            let right = &factors.panel[i * m..][i + 1 - t..m];
            x[i] = (x[i] - dot_consecutive(right, &x[i + 1..])) * factors.inverse_diagonal[i];
        }
        for i in (0..t).rev() {
            let columns = self.columns(i);
            let sum = dot(&self.upper[columns.clone()], &factors.upper[columns], x);
            x[i] = (x[i] - sum) * factors.inverse_diagonal[i];
        }
    }
}

/// Sum of `values[p] * x[places[p]]`, in four interleaved partial sums.
#[inline(always)]
fn dot<L: Lane>(places: &[u32], values: &[L], x: &[L]) -> L {
    let mut sums = [L::zero(); 4];
    let mut places = places.chunks_exact(4);
    let mut values = values.chunks_exact(4);
    for (p, v) in places.by_ref().zip(values.by_ref()) {
        for s in 0..4 {
            sums[s] = v[s].mul_add(x[p[s] as usize], sums[s]);
        }
    }
    for (&p, &v) in places.remainder().iter().zip(values.remainder()) {
        sums[0] = v.mul_add(x[p as usize], sums[0]);
    }
    (sums[0] + sums[1]) + (sums[2] + sums[3])
}

/// Sum of `values[p] * x[p]`, in four interleaved partial sums.
#[inline(always)]
fn dot_consecutive<L: Lane>(values: &[L], x: &[L]) -> L {
    let mut sums = [L::zero(); 4];
    let mut values = values.chunks_exact(4);
    let mut xs = x.chunks_exact(4);
    for (v, x) in values.by_ref().zip(xs.by_ref()) {
        for s in 0..4 {
            sums[s] = v[s].mul_add(x[s], sums[s]);
        }
    }
    for (&v, &x) in values.remainder().iter().zip(xs.remainder()) {
        sums[0] = v.mul_add(x, sums[0]);
    }
    (sums[0] + sums[1]) + (sums[2] + sums[3])
}
