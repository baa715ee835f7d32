//! Where the trailing unknowns begin: a cost model of the factorization.

use super::TILE;

/// Cost of a multiply-add along an index list in units of one inside a tile:
/// loads the index, both operands and stores the result, where a tile keeps its
/// sums in registers (measured on AVX-512 hardware; the optimum is flat).
const INDEXED: u64 = 5;
/// Cost of one inside a tile, in the same units.
const TILED: u64 = 2;

/// The first trailing unknown that makes the factorization cheapest, with a
/// multiple of [`TILE`] unknowns after it.
pub(super) fn trailing_start(filled: &[Vec<u32>]) -> usize {
    let n = filled.len();
    (0..=n / TILE)
        .map(|blocks| n - blocks * TILE)
        .min_by_key(|&start| cost(filled, start))
        .unwrap_or(n)
}

fn cost(filled: &[Vec<u32>], start: usize) -> u64 {
    let n = filled.len();
    let right_of = |k: usize, until: usize| {
        filled[k].iter().filter(|&&j| j as usize > k && (j as usize) < until).count() as u64
    };
    let (all, leading): (Vec<u64>, Vec<u64>) =
        (0..start).map(|k| (right_of(k, n), right_of(k, start))).unzip();
    let pivots = |i: usize| filled[i].iter().map(|&k| k as usize).filter(move |&k| k < start.min(i));
    let indexed: u64 = (0..start).flat_map(&pivots).map(|k| all[k]).sum::<u64>()
        + (start..n).flat_map(&pivots).map(|k| leading[k]).sum::<u64>();
    let mut tiled = 0;
    for first in (start..n).step_by(TILE) {
        let mut any = vec![false; start];
        for i in first..first + TILE {
            pivots(i).for_each(|k| any[k] = true);
        }
        let shared = any.iter().filter(|&&any| any).count();
        // Earlier trailing rows take part in the columns right of themselves.
        let earlier: usize = (start..first + TILE).map(|k| n - k).sum();
        tiled += (TILE * (shared * (n - start) + earlier)) as u64;
    }
    INDEXED * indexed + TILED * tiled
}
