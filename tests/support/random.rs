//! Random networks that balance: species of three made-up elements and any
//! charge, and reactions whose two sides hold the same atoms and charge.

use proptest::prelude::*;

/// A species: counts of the three elements, charge.
pub(crate) type Atoms = ([u32; 3], i32);

/// A random network as tables, with a start.
#[derive(Clone, Debug)]
pub(crate) struct RandomNetwork {
    /// Names with their compositions; the electron is the last.
    pub(crate) species: Vec<(String, Atoms)>,
    /// Reactants, products, and log10 of the coefficient times a year.
    pub(crate) reactions: Vec<(Vec<usize>, Vec<usize>, f64)>,
    /// Start abundances by species; the electron balances the charge.
    pub(crate) start: Vec<f64>,
}

impl RandomNetwork {
    /// Lines for [`super::network`], species and reactions in the given orders.
    pub(crate) fn tables(&self, species: &[usize], reactions: &[usize]) -> (String, String) {
        let species_lines: Vec<String> = species
            .iter()
            .map(|&s| {
                let (name, (atoms, _)) = &self.species[s];
                let composition: Vec<String> = ["Xa", "Yb", "Zc"]
                    .iter()
                    .zip(atoms)
                    .filter(|(_, count)| **count > 0)
                    .map(|(element, count)| format!("{element}:{count}"))
                    .collect();
                format!("{name},{}", composition.join(" "))
            })
            .collect();
        let side = |list: &[usize]| {
            list.iter().map(|&s| self.species[s].0.as_str()).collect::<Vec<_>>().join(" + ")
        };
        let reaction_lines: Vec<String> = reactions
            .iter()
            .map(|&r| {
                let (left, right, k) = &self.reactions[r];
                let per_second = 10f64.powf(*k) / super::YEAR_S;
                format!("{} -> {},thermal,{per_second:e}", side(left), side(right))
            })
            .collect();
        (species_lines.join("\n"), reaction_lines.join("\n"))
    }

    /// The tables in their own order.
    pub(crate) fn own_tables(&self) -> (String, String) {
        let all = |n: usize| (0..n).collect::<Vec<_>>();
        self.tables(&all(self.species.len()), &all(self.reactions.len()))
    }

    /// Lines of `[start]`.
    pub(crate) fn start_lines(&self) -> String {
        let lines = self.species.iter().zip(&self.start).filter(|(_, x)| **x > 0.0);
        lines.map(|((name, _), x)| format!("\"{name}\" = {x:e}\n")).collect()
    }
}

/// Networks of 4 to 12 species and up to 24 reactions with coefficients over
/// twelve decades.
pub(crate) fn networks() -> impl Strategy<Value = RandomNetwork> {
    let counts = [0u32..3, 0..3, 0..2];
    let species = prop::collection::vec((counts, -1i32..3), 3..12);
    let picks = prop::collection::vec(
        (prop::collection::vec(any::<prop::sample::Index>(), 1..4), any::<prop::sample::Index>()),
        4..24,
    );
    let coefficients = prop::collection::vec(-6.0..6.0f64, 24);
    let start = prop::collection::vec(-8.0..0.0f64, 12);
    (species, picks, coefficients, start).prop_map(|(species, picks, coefficients, start)| {
        let mut atoms: Vec<Atoms> =
            species.into_iter().filter(|(counts, _)| counts.iter().any(|&c| c > 0)).collect();
        atoms.sort_unstable();
        atoms.dedup();
        atoms.push(([0; 3], -1));
        let electron = atoms.len() - 1;
        let mut reactions = Vec::new();
        for ((reactants, choice), k) in picks.iter().zip(coefficients) {
            let mut left: Vec<usize> = reactants.iter().map(|i| i.index(atoms.len())).collect();
            left.sort_unstable();
            let others: Vec<Vec<usize>> =
                balanced(&atoms, &left).into_iter().filter(|right| *right != left).collect();
            if !others.is_empty() {
                let right = others[choice.index(others.len())].clone();
                if !reactions.iter().any(|(l, r, _)| *l == left && *r == right) {
                    reactions.push((left, right, k));
                }
            }
        }
        // Negative ions start absent, so that electrons can balance the charge.
        let start: Vec<f64> = atoms
            .iter()
            .zip(start)
            .enumerate()
            .map(
                |(s, ((_, charge), x))| {
                    if *charge < 0 || s == electron { 0.0 } else { 10f64.powf(x) }
                },
            )
            .collect();
        let species = atoms
            .into_iter()
            .enumerate()
            .map(|(s, atoms)| {
                let sign = if atoms.1 < 0 { "-" } else { "+" };
                let charge = sign.repeat(atoms.1.unsigned_abs() as usize);
                let name = if s == electron { "e-".into() } else { format!("S{s}{charge}") };
                (name, atoms)
            })
            .collect();
        RandomNetwork { species, reactions, start }
    })
}

/// All sets of one to three species with the atoms and charge of `left`.
fn balanced(atoms: &[Atoms], left: &[usize]) -> Vec<Vec<usize>> {
    let sum = |side: &[usize]| {
        side.iter().fold(([0; 3], 0), |(mut total, charge), &s| {
            for (total, count) in total.iter_mut().zip(atoms[s].0) {
                *total += count;
            }
            (total, charge + atoms[s].1)
        })
    };
    let wanted = sum(left);
    let n = atoms.len();
    let mut sides = Vec::new();
    for a in 0..n {
        sides.push(vec![a]);
        for b in a..n {
            sides.push(vec![a, b]);
            sides.extend((b..n).map(|c| vec![a, b, c]));
        }
    }
    sides.retain(|side| sum(side) == wanted);
    sides
}
