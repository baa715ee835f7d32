//! From reactions to terms: the compilation of a network.

use std::collections::BTreeMap;

use super::terms::{Program, Term};
use crate::integrate::Invariants;
use crate::sparse::{Pattern, Symbolic, elimination_order};

/// What one reaction takes, gives and depends on, as species indices; a species
/// stands as often as it takes part.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Change {
    /// Species taken by an event.
    pub reactants: Vec<usize>,
    /// Species given by an event.
    pub products: Vec<usize>,
    /// Species whose number densities multiply the rate coefficient; one to
    /// three.
    pub depends_on: Vec<usize>,
}

/// A network as the kinetics sees it.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Mechanism {
    /// Number of species.
    pub species: usize,
    /// The reactions.
    pub reactions: Vec<Change>,
    /// Conserved sums (elements, charge): weights per species.
    pub conserved: Vec<Vec<f64>>,
}

/// A compiled network; see the [room's introduction](crate::kinetics).
#[derive(Clone, Debug)]
pub struct Kinetics {
    pub(super) program: Program,
    pub(super) symbolic: Symbolic,
    pub(super) invariants: Invariants,
    /// `order[position] = species`.
    order: Vec<usize>,
    /// Each term's coefficient as a sum: (reaction, events' net gain, power of
    /// n_H).
    recipes: Vec<Vec<(usize, f64)>>,
    powers: Vec<i32>,
}

impl Kinetics {
    /// Compiles a mechanism.
    ///
    /// # Panics
    /// If a reaction depends on no species or on more than three, or names a
    /// species that does not exist: the network's reader has checked that.
    #[must_use]
    pub fn new(mechanism: &Mechanism) -> Self {
        let merged = merge(mechanism);
        let pattern = Pattern::new(
            mechanism.species,
            merged.iter().enumerate().flat_map(|(species, terms)| {
                terms.keys().flatten().map(move |&other| (species, other))
            }),
        );
        let order = elimination_order(&pattern, &[]);
        let mut position = vec![0; order.len()];
        for (place, &species) in order.iter().enumerate() {
            position[species] = place;
        }
        let mut program = Program::default();
        let mut recipes = Vec::new();
        for (place, &species) in order.iter().enumerate() {
            let mut terms: Vec<(Term, Vec<(usize, f64)>)> = merged[species]
                .iter()
                .map(|(factors, sum)| {
                    let factors = factors.iter().map(|&s| position[s]);
                    (Term::new(place, factors.collect()), sum.clone())
                })
                .collect();
            terms.sort_by(|a, b| a.0.cmp(&b.0));
            for (term, recipe) in terms {
                program.push(&term);
                recipes.push(recipe);
            }
            program.end_species();
        }
        let weights: Vec<Vec<f64>> = independent(&mechanism.conserved)
            .into_iter()
            .map(|row| order.iter().map(|&species| row[species]).collect())
            .collect();
        Self {
            program,
            symbolic: Symbolic::new(&pattern.renumbered(&order)),
            invariants: Invariants::new(mechanism.species, &weights),
            order,
            recipes,
            powers: mechanism.reactions.iter().map(|r| r.depends_on.len() as i32 - 1).collect(),
        }
    }

    /// The terms' coefficients in a cell, from the rate coefficients of the
    /// reactions (s-1, cm3 s-1 or cm6 s-1) and the density of hydrogen nuclei
    /// (cm-3).
    #[must_use]
    pub fn parameters(&self, coefficients: &[f64], hydrogen_density: f64) -> Vec<f64> {
        let per_abundance: Vec<f64> = coefficients
            .iter()
            .zip(&self.powers)
            .map(|(k, &power)| k * hydrogen_density.powi(power))
            .collect();
        let sum = |recipe: &Vec<(usize, f64)>| {
            recipe.iter().map(|&(reaction, gain)| gain * per_abundance[reaction]).sum()
        };
        self.recipes.iter().map(sum).collect()
    }

    /// Values per species brought into the order of the unknowns.
    #[must_use]
    pub fn to_unknowns(&self, by_species: &[f64]) -> Vec<f64> {
        self.order.iter().map(|&species| by_species[species]).collect()
    }

    /// Values per unknown brought into the order of the species.
    #[must_use]
    pub fn to_species(&self, by_unknown: &[f64]) -> Vec<f64> {
        let mut out = vec![0.0; by_unknown.len()];
        for (&species, &value) in self.order.iter().zip(by_unknown) {
            out[species] = value;
        }
        out
    }

    /// The species of an unknown.
    #[must_use]
    pub fn species_of(&self, unknown: usize) -> usize {
        self.order[unknown]
    }

    /// Terms of the right-hand side.
    #[must_use]
    pub fn terms(&self) -> usize {
        self.recipes.len()
    }
}

/// The sums that do not follow from those before them, by rising number of
/// members: an element that occurs only in a fixed ratio to others says nothing
/// new, and a sum of many species follows from its parts with less rounding than
/// a part from what is left of the whole.
fn independent(sums: &[Vec<f64>]) -> Vec<&Vec<f64>> {
    let mut by_size: Vec<&Vec<f64>> = sums.iter().collect();
    by_size.sort_by_key(|sum| sum.iter().filter(|weight| weight.abs() > 0.0).count());
    // Gaussian elimination on small whole numbers.
    let mut reduced: Vec<(usize, Vec<f64>)> = Vec::new();
    let mut kept = Vec::new();
    for sum in by_size {
        let mut rest = sum.clone();
        for (pivot, row) in &reduced {
            let factor = rest[*pivot] / row[*pivot];
            for (rest, value) in rest.iter_mut().zip(row) {
                *rest -= factor * value;
            }
        }
        let pivot = (0..rest.len()).max_by(|&a, &b| rest[a].abs().total_cmp(&rest[b].abs()));
        if let Some(pivot) = pivot.filter(|&pivot| rest[pivot].abs() > 1e-9) {
            reduced.push((pivot, rest));
            kept.push(sum);
        }
    }
    kept
}

/// Per species: the reactions that change it, gathered by the (sorted) species
/// they depend on.
type Merged = Vec<BTreeMap<Vec<usize>, Vec<(usize, f64)>>>;

fn merge(mechanism: &Mechanism) -> Merged {
    let mut merged: Merged = vec![BTreeMap::new(); mechanism.species];
    for (index, reaction) in mechanism.reactions.iter().enumerate() {
        let mut factors = reaction.depends_on.clone();
        factors.sort_unstable();
        let mut gain: BTreeMap<usize, f64> = BTreeMap::new();
        for &species in &reaction.reactants {
            *gain.entry(species).or_default() -= 1.0;
        }
        for &species in &reaction.products {
            *gain.entry(species).or_default() += 1.0;
        }
        for (species, gain) in gain {
            if gain.abs() > 0.0 {
                merged[species].entry(factors.clone()).or_default().push((index, gain));
            }
        }
    }
    merged
}

impl From<&crate::network::Network> for Mechanism {
    fn from(network: &crate::network::Network) -> Self {
        Self {
            species: network.species.len(),
            reactions: network
                .reactions
                .iter()
                .map(|reaction| Change {
                    reactants: reaction.reactants.clone(),
                    products: reaction.products.clone(),
                    depends_on: reaction.depends_on.clone(),
                })
                .collect(),
            conserved: network.conserved().into_iter().map(|sum| sum.weights).collect(),
        }
    }
}
