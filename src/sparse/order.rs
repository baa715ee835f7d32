//! Elimination order: which unknown to eliminate next so that little fill
//! arises.

use super::Pattern;

/// Greedy Markowitz order on the diagonal (Markowitz 1957, Management Science
/// 3, 255): at each step the pivot with the smallest product of the off-diagonal
/// counts of its row and column, ties broken by the smaller index. `last`
/// unknowns are held back to the end. Returns `order[position] = unknown`.
#[must_use]
pub fn elimination_order(pattern: &Pattern, last: &[usize]) -> Vec<usize> {
    let n = pattern.size();
    let words = n.div_ceil(64);
    let mut rows = vec![vec![0u64; words]; n];
    let mut columns = vec![vec![0u64; words]; n];
    for i in 0..n {
        for &j in pattern.row(i) {
            if j as usize != i {
                set(&mut rows[i], j as usize);
                set(&mut columns[j as usize], i);
            }
        }
    }
    let mut held = vec![false; n];
    for &i in last {
        held[i] = true;
    }
    let mut left: Vec<usize> = (0..n).collect();
    let mut order = Vec::with_capacity(n);
    while !left.is_empty() {
        let cost = |i: usize| (held[i], count(&rows[i]) * count(&columns[i]), i);
        let (place, &pivot) =
            left.iter().enumerate().min_by_key(|&(_, &i)| cost(i)).expect("some unknown is left");
        left.remove(place);
        order.push(pivot);
        let row = std::mem::take(&mut rows[pivot]);
        let column = std::mem::take(&mut columns[pivot]);
        for i in members(&column) {
            for j in members(&row) {
                if i != j {
                    set(&mut rows[i], j);
                    set(&mut columns[j], i);
                }
            }
            clear(&mut rows[i], pivot);
        }
        for j in members(&row) {
            clear(&mut columns[j], pivot);
        }
        rows[pivot] = vec![0; words];
        columns[pivot] = vec![0; words];
    }
    order
}

fn set(bits: &mut [u64], i: usize) {
    bits[i / 64] |= 1 << (i % 64);
}

fn clear(bits: &mut [u64], i: usize) {
    bits[i / 64] &= !(1 << (i % 64));
}

fn count(bits: &[u64]) -> u32 {
    bits.iter().map(|w| w.count_ones()).sum()
}

fn members(bits: &[u64]) -> Vec<usize> {
    (0..bits.len() * 64).filter(|&i| bits[i / 64] >> (i % 64) & 1 == 1).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_hub_is_eliminated_last() {
        // An arrow matrix: unknown 0 touches all others. Eliminating it first
        // would fill everything; last, nothing.
        let n = 12;
        let arrow = Pattern::new(n, (1..n).flat_map(|i| [(0, i), (i, 0)]));
        let order = elimination_order(&arrow, &[]);
        assert!(order.iter().position(|&i| i == 0).is_some_and(|p| p >= n - 2));
    }

    #[test]
    fn held_unknowns_come_last() {
        let pattern = Pattern::new(5, [(0, 1), (1, 2), (2, 3), (3, 4), (4, 0)]);
        let order = elimination_order(&pattern, &[1, 3]);
        assert_eq!(
            {
                let mut t = order[3..].to_vec();
                t.sort_unstable();
                t
            },
            vec![1, 3]
        );
    }
}
