//! The factorization against the matrix it came from.

use super::Symbolic;
use crate::sparse::{Fused, Lane, Pattern, Single, Wide, elimination_order};

/// A reproducible matrix with a dominating diagonal, `hubs` full rows and
/// columns and random entries, and its pattern.
fn matrix(n: usize, hubs: usize) -> (Vec<Vec<f64>>, Pattern) {
    let mut state = 12345u64;
    let mut random = move || {
        state = state.wrapping_mul(6364136223846793005).wrapping_add(1442695040888963407);
        (state >> 11) as f64 / (1u64 << 53) as f64
    };
    let mut dense = vec![vec![0.0; n]; n];
    for i in 0..n {
        for j in 0..n {
            let hub = j + hubs >= n || i + hubs >= n;
            if i != j && (hub || random() < 0.08) {
                dense[i][j] = random() - 0.5;
            }
        }
        dense[i][i] = n as f64;
    }
    let places: Vec<(usize, usize)> = (0..n)
        .flat_map(|i| (0..n).map(move |j| (i, j)))
        .filter(|&(i, j)| dense[i][j].abs() > 0.0)
        .collect();
    (dense, Pattern::new(n, places))
}

/// Solves twice, so that what the first factorization left behind shows.
fn solution<L: Lane>(n: usize, hubs: usize) -> (Vec<f64>, f64) {
    let (dense, pattern) = matrix(n, hubs);
    let order = elimination_order(&pattern, &[]);
    let symbolic = Symbolic::new(&pattern.renumbered(&order));
    let mut factors = symbolic.factors::<L>();
    let mut x = Vec::new();
    for scale in [3.0, 1.0] {
        symbolic.factor(&mut factors, |i, row| {
            for (j, entry) in row.iter_mut().enumerate() {
                let value = dense[order[i]][order[j]];
                if value.abs() > 0.0 {
                    *entry = *entry + L::splat(scale * value);
                }
            }
        });
        x = (0..n).map(|i| L::splat(1.0 + i as f64)).collect::<Vec<L>>();
        symbolic.solve(&factors, &mut x);
    }
    let x: Vec<f64> = x.iter().map(|x| x.get(L::WIDTH - 1)).collect();
    let residual = (0..n)
        .map(|i| {
            let sum: f64 = (0..n).map(|j| dense[order[i]][order[j]] * x[j]).sum();
            (sum - (1.0 + i as f64)).abs()
        })
        .fold(0.0, f64::max);
    (x, residual)
}

#[test]
fn solves_leave_a_residual_at_rounding_level() {
    for n in [1, 2, 3, 4, 5, 7, 8, 40, 90] {
        for hubs in [0, 2, 9, n] {
            let (one, residual) = solution::<Single<Fused>>(n, hubs.min(n));
            assert!(residual < 1e-11, "{n} unknowns, {hubs} hubs: {residual:e}");
            let (eight, _) = solution::<Wide<Fused>>(n, hubs.min(n));
            assert_eq!(one, eight, "{n} unknowns, {hubs} hubs: eight lanes differ from one");
        }
    }
}
