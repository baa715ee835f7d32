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
        let Factors { inverse_diagonal, panel, multipliers, .. } = factors;
        let m = self.trailing();
        let mut diagonal = [[L::zero(); TILE]; TILE];
        for column in (0..m).step_by(TILE) {
            let pivot = self.trailing + column;
            let mut tile = load(panel, first, m, column);
            for &k in shared {
                add_product(&mut tile, multipliers, panel, k as usize, m, column);
            }
            for k in self.trailing..pivot.min(first) {
                add_product(&mut tile, multipliers, panel, k, m, column);
            }
            if pivot < first {
                // Left of the diagonal: multipliers.
                for c in 0..TILE {
                    let right = row_of(panel, pivot + c, m, column);
                    for r in 0..TILE {
                        let multiplier = tile[r][c] * inverse_diagonal[pivot + c];
                        tile[r][c] = multiplier;
                        multipliers[(pivot + c) * TILE + r] = -multiplier;
                        for d in c + 1..TILE {
                            tile[r][d] = (-multiplier).mul_add(right[d], tile[r][d]);
                        }
                    }
                }
            } else if pivot == first {
                for c in 0..TILE {
                    inverse_diagonal[pivot + c] = L::splat(1.0) / tile[c][c];
                    for r in c + 1..TILE {
                        let multiplier = tile[r][c] * inverse_diagonal[pivot + c];
                        tile[r][c] = multiplier;
                        for d in c + 1..TILE {
                            tile[r][d] = (-multiplier).mul_add(tile[c][d], tile[r][d]);
                        }
                    }
                }
                diagonal = tile;
            } else {
                for c in 0..TILE {
                    for r in c + 1..TILE {
                        let minus = -diagonal[r][c];
                        for d in 0..TILE {
                            tile[r][d] = minus.mul_add(tile[c][d], tile[r][d]);
                        }
                    }
                }
            }
            for (r, row) in tile.iter().enumerate() {
                panel[(first + r) * m + column..][..TILE].copy_from_slice(row);
            }
        }
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
    let row = |r| row_of(panel, first + r, m, column);
    [row(0), row(1), row(2), row(3)]
}

/// Adds the (negated) multipliers of pivot `k` times its row of U.
#[inline(always)]
fn add_product<L: Lane>(
    tile: &mut Tile<L>,
    multipliers: &[L],
    panel: &[L],
    k: usize,
    m: usize,
    column: usize,
) {
    let left = &multipliers[k * TILE..][..TILE];
    let right = row_of(panel, k, m, column);
    for r in 0..TILE {
        for c in 0..TILE {
            tile[r][c] = left[r].mul_add(right[c], tile[r][c]);
        }
    }
}
