//! The numeric factorization.

use super::{Factors, Symbolic, TILE};
use crate::sparse::Lane;

type Tile<L> = [[L; TILE]; TILE];

impl Symbolic {
    /// Factorizes the matrix whose row `i` is added by `fill(i, row)` into a
    /// buffer that is zero wherever the factors can be non-zero.
    ///
    /// # Shape
    /// `row`: `[size]`.
    #[inline(always)]
    pub fn factor<L: Lane>(&self, factors: &mut Factors<L>, mut fill: impl FnMut(usize, &mut [L])) {
        for i in 0..self.trailing {
            self.clear(i, &mut factors.row);
            fill(i, &mut factors.row);
            self.leading_row(i, factors);
        }
        for (block, first) in (self.trailing..self.size).step_by(TILE).enumerate() {
            let shared = &self.block[self.block_start[block]..self.block_start[block + 1]];
            for &k in shared {
                factors.multipliers[k as usize * TILE..][..TILE].fill(L::zero());
            }
            for r in 0..TILE {
                self.clear(first + r, &mut factors.row);
                fill(first + r, &mut factors.row);
                self.leading_part(first + r, r, factors);
            }
            self.trailing_part(first, shared, factors);
        }
    }

    /// Zeroes a row's places in the row buffer.
    #[inline(always)]
    fn clear<L: Lane>(&self, i: usize, row: &mut [L]) {
        for &k in &self.lower[self.pivots(i)] {
            row[k as usize] = L::zero();
        }
        if i < self.trailing {
            row[i] = L::zero();
            for &j in &self.upper[self.columns(i)] {
                row[j as usize] = L::zero();
            }
        } else {
            row[self.trailing..].fill(L::zero());
        }
    }

    /// Eliminates a leading row and keeps its part of L and U.
    #[inline(always)]
    fn leading_row<L: Lane>(&self, i: usize, factors: &mut Factors<L>) {
        let Factors { lower, upper, inverse_diagonal, panel, row, .. } = factors;
        for p in self.pivots(i) {
            let k = self.lower[p] as usize;
            let multiplier = row[k] * inverse_diagonal[k];
            lower[p] = multiplier;
            let columns = self.columns(k);
            subtract(row, &self.upper[columns.clone()], &upper[columns], multiplier);
        }
        inverse_diagonal[i] = L::splat(1.0) / row[i];
        let columns = self.columns(i);
        for (&j, value) in self.upper[columns.clone()].iter().zip(&mut upper[columns]) {
            *value = row[j as usize];
        }
        let m = self.trailing();
        let panel = &mut panel[i * m..][..m];
        panel.fill(L::zero());
        for &j in &self.upper[self.upper_split[i]..self.upper_start[i + 1]] {
            panel[j as usize - self.trailing] = row[j as usize];
        }
    }

    /// Eliminates the leading columns of a trailing row, the `r`-th of its
    /// block, and lays its trailing columns into the panel.
    #[inline(always)]
    fn leading_part<L: Lane>(&self, i: usize, r: usize, factors: &mut Factors<L>) {
        let Factors { lower, upper, inverse_diagonal, panel, row, multipliers } = factors;
        for p in self.pivots(i) {
            let k = self.lower[p] as usize;
            let multiplier = row[k] * inverse_diagonal[k];
            lower[p] = multiplier;
            multipliers[k * TILE + r] = -multiplier;
            let columns = self.upper_start[k]..self.upper_split[k];
            subtract(row, &self.upper[columns.clone()], &upper[columns], multiplier);
        }
        let m = self.trailing();
        panel[i * m..][..m].copy_from_slice(&row[self.trailing..]);
    }

    /// Eliminates the trailing columns of a block of rows, tile by tile.
    #[inline(always)]
    fn trailing_part<L: Lane>(&self, first: usize, shared: &[u32], factors: &mut Factors<L>) {
        let m = self.trailing();
        for column in (0..m).step_by(TILE) {
            let pivot = self.trailing + column;
            // The long sum by itself, so that it stays in registers.
            let Factors { panel, multipliers, .. } = &mut *factors;
            let mut sums = load(panel, first, m, column);
            for &k in shared {
                sums = plus_product(sums, multipliers, panel, k as usize, m, column);
            }
            for k in self.trailing..pivot.min(first) {
                sums = plus_product(sums, multipliers, panel, k, m, column);
            }
            store(panel, first, m, column, &sums);
            if pivot < first {
                left_tile(first, pivot, column, m, factors);
            } else if pivot == first {
                diagonal_tile(first, column, m, factors);
            } else {
                right_tile(first, first - self.trailing, column, m, panel);
            }
        }
    }
}

/// Turns a tile left of the diagonal into multipliers, column by column.
#[inline(always)]
fn left_tile<L: Lane>(
    first: usize,
    pivot: usize,
    column: usize,
    m: usize,
    factors: &mut Factors<L>,
) {
    let Factors { inverse_diagonal, panel, multipliers, .. } = factors;
    let u0 = row_of(panel, pivot, m, column);
    let u1 = row_of(panel, pivot + 1, m, column);
    let u2 = row_of(panel, pivot + 2, m, column);
    let inverse = row_of(inverse_diagonal, 0, 0, pivot);
    for r in 0..TILE {
        let [x0, x1, x2, x3] = row_of(panel, first + r, m, column);
        let m0 = -(x0 * inverse[0]);
        let m1 = -(m0.mul_add(u0[1], x1) * inverse[1]);
        let m2 = -(m1.mul_add(u1[2], m0.mul_add(u0[2], x2)) * inverse[2]);
        let x3 = m2.mul_add(u2[3], m1.mul_add(u1[3], m0.mul_add(u0[3], x3)));
        let m3 = -(x3 * inverse[3]);
        for (c, minus) in [m0, m1, m2, m3].into_iter().enumerate() {
            multipliers[(pivot + c) * TILE + r] = minus;
            panel[(first + r) * m + column + c] = -minus;
        }
    }
}

/// Factorizes a tile on the diagonal: U on and above it, multipliers below.
#[inline(always)]
fn diagonal_tile<L: Lane>(first: usize, column: usize, m: usize, factors: &mut Factors<L>) {
    let Factors { inverse_diagonal, panel, .. } = factors;
    let inverse = &mut inverse_diagonal[first..][..TILE];
    for c in 0..TILE {
        inverse[c] = L::splat(1.0) / panel[(first + c) * m + column + c];
        for r in c + 1..TILE {
            let multiplier = panel[(first + r) * m + column + c] * inverse[c];
            panel[(first + r) * m + column + c] = multiplier;
            for d in column + c + 1..column + TILE {
                let upper = panel[(first + c) * m + d];
                let entry = &mut panel[(first + r) * m + d];
                *entry = (-multiplier).mul_add(upper, *entry);
            }
        }
    }
}

/// Takes the multipliers of the diagonal tile off a tile right of it.
#[inline(always)]
fn right_tile<L: Lane>(first: usize, diagonal: usize, column: usize, m: usize, panel: &mut [L]) {
    for r in 1..TILE {
        let multipliers = row_of(panel, first + r, m, diagonal);
        let mut row = row_of(panel, first + r, m, column);
        for (c, &multiplier) in multipliers.iter().enumerate().take(r) {
            row = plus_scaled(row, -multiplier, row_of(panel, first + c, m, column));
        }
        panel[(first + r) * m + column..][..TILE].copy_from_slice(&row);
    }
}

/// Writes a tile into the panel.
#[inline(always)]
fn store<L: Lane>(panel: &mut [L], first: usize, m: usize, column: usize, tile: &Tile<L>) {
    for (r, row) in tile.iter().enumerate() {
        panel[(first + r) * m + column..][..TILE].copy_from_slice(row);
    }
}

/// `row[columns] -= multiplier * values`.
#[inline(always)]
fn subtract<L: Lane>(row: &mut [L], columns: &[u32], values: &[L], multiplier: L) {
    let minus = -multiplier;
    for (&j, &value) in columns.iter().zip(values) {
        let entry = &mut row[j as usize];
        *entry = minus.mul_add(value, *entry);
    }
}

/// Four entries of a row of the panel.
#[inline(always)]
fn row_of<L: Lane>(panel: &[L], row: usize, m: usize, column: usize) -> [L; TILE] {
    let entries = &panel[row * m + column..][..TILE];
    [entries[0], entries[1], entries[2], entries[3]]
}

#[inline(always)]
fn load<L: Lane>(panel: &[L], first: usize, m: usize, column: usize) -> Tile<L> {
    [
        row_of(panel, first, m, column),
        row_of(panel, first + 1, m, column),
        row_of(panel, first + 2, m, column),
        row_of(panel, first + 3, m, column),
    ]
}

/// A tile plus the (negated) multipliers of pivot `k` times its row of U.
#[inline(always)]
fn plus_product<L: Lane>(
    tile: Tile<L>,
    multipliers: &[L],
    panel: &[L],
    k: usize,
    m: usize,
    column: usize,
) -> Tile<L> {
    let left = row_of(multipliers, k, TILE, 0);
    let right = row_of(panel, k, m, column);
    [
        plus_scaled(tile[0], left[0], right),
        plus_scaled(tile[1], left[1], right),
        plus_scaled(tile[2], left[2], right),
        plus_scaled(tile[3], left[3], right),
    ]
}

/// `row + factor * other`.
#[inline(always)]
fn plus_scaled<L: Lane>(row: [L; TILE], factor: L, other: [L; TILE]) -> [L; TILE] {
    [
        factor.mul_add(other[0], row[0]),
        factor.mul_add(other[1], row[1]),
        factor.mul_add(other[2], row[2]),
        factor.mul_add(other[3], row[3]),
    ]
}
