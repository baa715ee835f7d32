//! The fill of a pattern, and the index lists that follow from it.

use super::split::trailing_start;
use super::{Symbolic, TILE};
use crate::sparse::Pattern;

impl Symbolic {
    /// Works out the fill of `pattern`, eliminated in its own order.
    #[must_use]
    pub fn new(pattern: &Pattern) -> Self {
        let filled = fill(pattern);
        let trailing = trailing_start(&filled);
        let n = filled.len();
        let mut this = Self {
            size: n,
            trailing,
            lower: Vec::new(),
            lower_start: vec![0],
            upper: Vec::new(),
            upper_start: vec![0],
            upper_split: Vec::new(),
            block: Vec::new(),
            block_start: vec![0],
        };
        for (i, row) in filled.iter().enumerate() {
            let pivots = row.iter().filter(|&&j| (j as usize) < trailing.min(i));
            this.lower.extend(pivots);
            this.lower_start.push(this.lower.len());
            if i < trailing {
                let right = row.iter().filter(|&&j| j as usize > i);
                this.upper.extend(right.clone());
                let leading = right.filter(|&&j| (j as usize) < trailing).count();
                this.upper_split.push(this.upper_start[i] + leading);
                this.upper_start.push(this.upper.len());
            }
        }
        for first in (trailing..n).step_by(TILE) {
            let rows = &filled[first..first + TILE];
            let any = |k: &u32| rows.iter().any(|row| row.binary_search(k).is_ok());
            this.block.extend((0..trailing as u32).filter(any));
            this.block_start.push(this.block.len());
        }
        this
    }
}

/// The columns of each row of L + U, ascending.
fn fill(pattern: &Pattern) -> Vec<Vec<u32>> {
    let n = pattern.size();
    let mut filled: Vec<Vec<u32>> = Vec::with_capacity(n);
    let mut mark = vec![usize::MAX; n];
    for i in 0..n {
        let mut row: Vec<u32> = pattern.row(i).to_vec();
        for &j in &row {
            mark[j as usize] = i;
        }
        // Ascending pivots; fill may add further ones on the way.
        for k in 0..i {
            if mark[k] != i {
                continue;
            }
            for &j in filled[k].iter().filter(|&&j| j as usize > k) {
                if mark[j as usize] != i {
                    mark[j as usize] = i;
                    row.push(j);
                }
            }
        }
        row.sort_unstable();
        filled.push(row);
    }
    filled
}
