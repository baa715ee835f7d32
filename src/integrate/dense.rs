//! The state between the ends of a step, by the method's own interpolant.

use super::Method;
use crate::sparse::Lane;

/// State of one lane at the fraction `x` of the step just made.
///
/// # Shape
/// `y`, `y_new`: `[size]`; `stages`: `[method.stages * size]`.
pub(super) fn interpolate<L: Lane>(
    method: &Method,
    x: f64,
    lane: usize,
    y: &[L],
    y_new: &[L],
    stages: &[L],
) -> Vec<f64> {
    let n = y.len();
    let k = |row: &[f64], i: usize| -> f64 {
        (0..method.stages).map(|s| row[s] * stages[s * n + i].get(lane)).sum()
    };
    (0..n)
        .map(|i| {
            let [k1, k2, k3] = [0, 1, 2].map(|m| k(&method.dense[m], i));
            let inner = k1 + x * (k2 + x * k3);
            (1.0 - x) * y[i].get(lane) + x * (y_new[i].get(lane) + (1.0 - x) * inner)
        })
        .collect()
}
