//! LU factorization by rows without pivoting, over lanes.
//!
//! The matrix is never stored: each row is written by the caller into a dense
//! row buffer that stays in the first-level cache and is eliminated there. The
//! unknowns split in two:
//!
//! - *leading* ones have few neighbours; their rows are eliminated entry by
//!   entry along index lists;
//! - *trailing* ones (the hubs: H, H2, e- ...) touch nearly everything. Their
//!   part of the factors is a full panel, worked on in tiles of four rows by
//!   four columns whose sums stay in registers.
//!
//! There is no pivoting: the matrices `shift - J` of chemical kinetics have a
//! dominating diagonal. Callers check the result (the step's error estimate, or
//! a residual).

mod factor;
mod solve;
mod split;
mod symbolic;

#[cfg(test)]
mod tests;

use super::Lane;

/// Rows and columns of a tile.
const TILE: usize = 4;

/// Where the factors of a pattern are non-zero; worked out once.
#[derive(Clone, Debug)]
pub struct Symbolic {
    size: usize,
    /// First trailing unknown; a multiple of [`TILE`] unknowns follow.
    trailing: usize,
    /// Leading pivots of each row, ascending: `lower_start[i]..lower_start[i + 1]`.
    lower: Vec<u32>,
    lower_start: Vec<usize>,
    /// Columns right of the diagonal of each leading row, and where those that
    /// are trailing begin.
    upper: Vec<u32>,
    upper_start: Vec<usize>,
    upper_split: Vec<usize>,
    /// Leading pivots of any row of each block of trailing rows.
    block: Vec<u32>,
    block_start: Vec<usize>,
}

/// The numbers of the factors for one batch of lanes, and work space.
#[derive(Clone, Debug)]
pub struct Factors<L> {
    /// Multipliers at the places of `lower`.
    lower: Vec<L>,
    /// Entries of U at the places of `upper`.
    upper: Vec<L>,
    inverse_diagonal: Vec<L>,
    /// `[size][trailing unknowns]`: trailing columns of U, and below the
    /// diagonal the trailing multipliers.
    panel: Vec<L>,
    /// One row under elimination, `[size]`.
    row: Vec<L>,
    /// Negated multipliers of the block of rows under elimination, `[size][TILE]`.
    multipliers: Vec<L>,
}

impl Symbolic {
    /// Unknowns.
    #[must_use]
    pub fn size(&self) -> usize {
        self.size
    }

    /// Number of trailing unknowns, whose factors are stored in full.
    #[must_use]
    pub fn trailing(&self) -> usize {
        self.size - self.trailing
    }

    /// Stored entries of L and U that a solve reads, without the diagonal.
    #[must_use]
    pub fn stored(&self) -> usize {
        let m = self.trailing();
        self.lower.len() + self.upper.len() + m * m.saturating_sub(1)
    }

    /// Room for the numbers of one batch.
    #[must_use]
    pub fn factors<L: Lane>(&self) -> Factors<L> {
        let zeros = |count: usize| vec![L::zero(); count];
        Factors {
            lower: zeros(self.lower.len()),
            upper: zeros(self.upper.len()),
            inverse_diagonal: zeros(self.size),
            panel: zeros(self.size * self.trailing()),
            row: zeros(self.size),
            multipliers: zeros(self.size * TILE),
        }
    }

    fn pivots(&self, row: usize) -> std::ops::Range<usize> {
        self.lower_start[row]..self.lower_start[row + 1]
    }

    fn columns(&self, row: usize) -> std::ops::Range<usize> {
        self.upper_start[row]..self.upper_start[row + 1]
    }
}
