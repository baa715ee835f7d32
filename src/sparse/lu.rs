//! LU factorization by rows without pivoting, over lanes.
//!
//! The matrix is never stored: each row is written by the caller into a dense
//! row buffer that stays in the first-level cache, eliminated there at once
//! against the rows above, and kept as its row of L and U. The last unknowns
//! form a trailing block in which nearly everything is filled; there the column
//! indices are consecutive and the inner loops need no index.
//!
//! There is no pivoting: the matrices `shift - J` of chemical kinetics have a
//! dominating diagonal. Callers check the result (the step's error estimate, or
//! a residual).

use super::{Lane, Pattern};

/// Where the factors of a pattern are non-zero; worked out once.
#[derive(Clone, Debug)]
pub struct Symbolic {
    size: usize,
    /// Pivots above each row, ascending; `lower_start[i]..lower_start[i + 1]`.
    lower: Vec<u32>,
    lower_start: Vec<usize>,
    /// Columns right of the diagonal of each row that lie before the trailing
    /// block.
    upper: Vec<u32>,
    upper_start: Vec<usize>,
    /// First unknown of the trailing block.
    trailing: usize,
    /// First stored value of each row of U: its sparse part, then its part in
    /// the trailing block.
    value_start: Vec<usize>,
}

/// The numbers of the factors for one batch of lanes, and the row buffer.
#[derive(Clone, Debug)]
pub struct Factors<L> {
    lower: Vec<L>,
    upper: Vec<L>,
    inverse_diagonal: Vec<L>,
    row: Vec<L>,
}

impl Symbolic {
    /// Works out the fill of `pattern`, eliminated in its own order.
    #[must_use]
    pub fn new(pattern: &Pattern) -> Self {
        let n = pattern.size();
        let mut filled: Vec<Vec<u32>> = Vec::with_capacity(n);
        let mut mark = vec![usize::MAX; n];
        for i in 0..n {
            let mut row: Vec<u32> = pattern.row(i).to_vec();
            for &j in &row {
                mark[j as usize] = i;
            }
            let mut k = 0;
            // Ascending pivots; fill may add further ones on the way.
            while k < i {
                if mark[k] == i {
                    for &j in filled[k].iter().filter(|&&j| j as usize > k) {
                        if mark[j as usize] != i {
                            mark[j as usize] = i;
                            row.push(j);
                        }
                    }
                }
                k += 1;
            }
            row.sort_unstable();
            filled.push(row);
        }
        let trailing = trailing_start(&filled);
        let mut this = Self {
            size: n,
            lower: Vec::new(),
            lower_start: vec![0],
            upper: Vec::new(),
            upper_start: vec![0],
            trailing,
            value_start: vec![0],
        };
        let mut values = 0;
        for (i, row) in filled.iter().enumerate() {
            if i < trailing {
                this.lower.extend(row.iter().filter(|&&j| (j as usize) < i));
                this.upper
                    .extend(row.iter().filter(|&&j| (j as usize) > i && (j as usize) < trailing));
            } else {
                this.lower.extend(row.iter().filter(|&&j| (j as usize) < trailing));
                this.lower.extend(trailing as u32..i as u32);
            }
            this.lower_start.push(this.lower.len());
            this.upper_start.push(this.upper.len());
            values += this.upper_start[i + 1] - this.upper_start[i] + n - trailing.max(i + 1);
            this.value_start.push(values);
        }
        this
    }

    /// Unknowns.
    #[must_use]
    pub fn size(&self) -> usize {
        self.size
    }

    /// First unknown of the trailing block, in which the factors are stored as
    /// if full.
    #[must_use]
    pub fn trailing(&self) -> usize {
        self.trailing
    }

    /// Stored entries of L and U, without the diagonal.
    #[must_use]
    pub fn stored(&self) -> usize {
        self.lower.len() + self.value_start[self.size]
    }

    /// Room for the numbers of one batch.
    #[must_use]
    pub fn factors<L: Lane>(&self) -> Factors<L> {
        Factors {
            lower: vec![L::zero(); self.lower.len()],
            upper: vec![L::zero(); self.value_start[self.size]],
            inverse_diagonal: vec![L::zero(); self.size],
            row: vec![L::zero(); self.size],
        }
    }

    /// Factorizes the matrix whose row `i` is added by `fill(i, row)` into a
    /// buffer that is zero where the factors can be non-zero.
    ///
    /// # Shape
    /// `row`: `[size]`.
    #[inline(always)]
    pub fn factor<L: Lane>(&self, factors: &mut Factors<L>, mut fill: impl FnMut(usize, &mut [L])) {
        let Factors { lower, upper, inverse_diagonal, row } = factors;
        let trailing = self.trailing;
        for i in 0..self.size {
            let pivots = &self.lower[self.lower_start[i]..self.lower_start[i + 1]];
            let columns = &self.upper[self.upper_start[i]..self.upper_start[i + 1]];
            for &k in pivots {
                row[k as usize] = L::zero();
            }
            for &j in columns {
                row[j as usize] = L::zero();
            }
            row[i] = L::zero();
            for value in &mut row[trailing..] {
                *value = L::zero();
            }
            fill(i, row);
            let kept = &mut lower[self.lower_start[i]..self.lower_start[i + 1]];
            for (&k, kept) in pivots.iter().zip(kept) {
                let k = k as usize;
                let multiplier = row[k] * inverse_diagonal[k];
                *kept = multiplier;
                let minus = -multiplier;
                let columns = &self.upper[self.upper_start[k]..self.upper_start[k + 1]];
                let values = &upper[self.value_start[k]..self.value_start[k + 1]];
                let (sparse, full) = values.split_at(columns.len());
                for (&j, &value) in columns.iter().zip(sparse) {
                    let entry = &mut row[j as usize];
                    *entry = minus.mul_add(value, *entry);
                }
                for (entry, &value) in row[trailing.max(k + 1)..].iter_mut().zip(full) {
                    *entry = minus.mul_add(value, *entry);
                }
            }
            inverse_diagonal[i] = L::splat(1.0) / row[i];
            let values = &mut upper[self.value_start[i]..self.value_start[i + 1]];
            let (sparse, full) = values.split_at_mut(columns.len());
            for (&j, value) in columns.iter().zip(sparse) {
                *value = row[j as usize];
            }
            full.copy_from_slice(&row[trailing.max(i + 1)..]);
        }
    }

    /// Solves in place.
    ///
    /// # Shape
    /// `x`: `[size]`, right-hand side in, solution out.
    #[inline(always)]
    pub fn solve<L: Lane>(&self, factors: &Factors<L>, x: &mut [L]) {
        for i in 0..self.size {
            let range = self.lower_start[i]..self.lower_start[i + 1];
            let sum = dot(&self.lower[range.clone()], &factors.lower[range], x);
            x[i] = x[i] - sum;
        }
        for i in (0..self.size).rev() {
            let columns = &self.upper[self.upper_start[i]..self.upper_start[i + 1]];
            let values = &factors.upper[self.value_start[i]..self.value_start[i + 1]];
            let (sparse, full) = values.split_at(columns.len());
            let sum =
                dot(columns, sparse, x) + dot_consecutive(full, &x[self.trailing.max(i + 1)..]);
            x[i] = (x[i] - sum) * factors.inverse_diagonal[i];
        }
    }
}

/// Sum of `values[m] * x[places[m]]`, in four interleaved partial sums.
#[inline(always)]
fn dot<L: Lane>(places: &[u32], values: &[L], x: &[L]) -> L {
    let mut sums = [L::zero(); 4];
    let mut places = places.chunks_exact(4);
    let mut values = values.chunks_exact(4);
    for (p, v) in places.by_ref().zip(values.by_ref()) {
        for m in 0..4 {
            sums[m] = v[m].mul_add(x[p[m] as usize], sums[m]);
        }
    }
    for (&p, &v) in places.remainder().iter().zip(values.remainder()) {
        sums[0] = v.mul_add(x[p as usize], sums[0]);
    }
    (sums[0] + sums[1]) + (sums[2] + sums[3])
}

/// Sum of `values[m] * x[m]`, in four interleaved partial sums.
#[inline(always)]
fn dot_consecutive<L: Lane>(values: &[L], x: &[L]) -> L {
    let mut sums = [L::zero(); 4];
    let mut values = values.chunks_exact(4);
    let mut xs = x.chunks_exact(4);
    for (v, x) in values.by_ref().zip(xs.by_ref()) {
        for m in 0..4 {
            sums[m] = v[m].mul_add(x[m], sums[m]);
        }
    }
    for (&v, &x) in values.remainder().iter().zip(xs.remainder()) {
        sums[0] = v.mul_add(x, sums[0]);
    }
    (sums[0] + sums[1]) + (sums[2] + sums[3])
}

/// Chooses where the trailing block begins: treating a row's entries there as
/// full costs operations on zeros but saves an index per entry, so the block
/// grows while at least 70 % of it is filled.
fn trailing_start(filled: &[Vec<u32>]) -> usize {
    let n = filled.len();
    let mut start = n;
    for candidate in (0..n).rev() {
        let inside: usize = filled[candidate..]
            .iter()
            .map(|row| row.iter().filter(|&&j| j as usize >= candidate).count())
            .sum();
        let full = (n - candidate) * (n - candidate);
        if inside * 10 >= full * 7 {
            start = candidate;
        } else if n - candidate > 2 * (n - start).max(8) {
            break;
        }
    }
    start
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sparse::{Fused, Single, Wide, elimination_order};

    /// A reproducible matrix with a dominating diagonal, two hubs and random
    /// entries, and its pattern.
    fn matrix(n: usize) -> (Vec<Vec<f64>>, Pattern) {
        let mut state = 12345u64;
        let mut random = move || {
            state = state.wrapping_mul(6364136223846793005).wrapping_add(1442695040888963407);
            (state >> 11) as f64 / (1u64 << 53) as f64
        };
        let mut dense = vec![vec![0.0; n]; n];
        for i in 0..n {
            for j in 0..n {
                let hub = j + 2 >= n || i + 2 >= n;
                if i != j && (hub || random() < 0.08) {
                    dense[i][j] = random() - 0.5;
                }
            }
            dense[i][i] = n as f64;
        }
        let places: Vec<(usize, usize)> = (0..n)
            .flat_map(|i| (0..n).map(move |j| (i, j)))
            .filter(|&(i, j)| dense[i][j] != 0.0)
            .collect();
        (dense, Pattern::new(n, places))
    }

    fn residual<L: Lane>(n: usize) -> f64 {
        let (dense, pattern) = matrix(n);
        let order = elimination_order(&pattern, &[]);
        let symbolic = Symbolic::new(&pattern.renumbered(&order));
        let mut factors = symbolic.factors::<L>();
        symbolic.factor(&mut factors, |i, row| {
            for (j, entry) in row.iter_mut().enumerate() {
                let value = dense[order[i]][order[j]];
                if value != 0.0 {
                    *entry = *entry + L::splat(value);
                }
            }
        });
        let mut x: Vec<L> = (0..n).map(|i| L::splat(1.0 + i as f64)).collect();
        symbolic.solve(&factors, &mut x);
        (0..n)
            .map(|i| {
                let sum: f64 =
                    (0..n).map(|j| dense[order[i]][order[j]] * x[j].get(L::WIDTH - 1)).sum();
                (sum - (1.0 + i as f64)).abs()
            })
            .fold(0.0, f64::max)
    }

    #[test]
    fn solves_leave_a_residual_at_rounding_level() {
        for n in [1, 2, 7, 40, 90] {
            assert!(residual::<Single<Fused>>(n) < 1e-11, "{n} unknowns, one lane");
            assert!(residual::<Wide<Fused>>(n) < 1e-11, "{n} unknowns, eight lanes");
        }
    }
}
