//! Networks: species, reactions and their tables.
//!
//! A network is a folder of four small files (see [`NetworkTexts`]): a title,
//! the species, the rows of rate coefficients and their sources. Loading it
//! checks everything that would make a run meaningless and gathers every
//! mistake with its place; [`audit`] then looks for what is merely doubtful.
//! Several rows of one equation may share a temperature axis and are then one
//! [`Reaction`].

mod assemble;
pub mod audit;
mod balance;
mod cell;
mod equation;
mod evaluate;
mod head;
mod load;
mod reaction_table;
pub mod shipped;
mod source_table;
mod species_table;
mod subset;
pub mod summary;
mod table;
mod texts;
mod write;

use crate::diagnostic::{Finding, Place};
use crate::rates::{Law, Numbers};
use crate::species::Species;

pub use evaluate::Extrapolate;
pub use texts::NetworkTexts;

/// A reaction network, ready to be evaluated.
#[derive(Clone, Debug, PartialEq)]
pub struct Network {
    /// Name by which it was asked for.
    pub name: String,
    /// One line about it.
    pub title: String,
    /// A longer description.
    pub text: String,
    /// What it is for.
    pub purpose: String,
    /// Species, in the order of their table.
    pub species: Vec<Species>,
    /// Reactions, in the order in which they first appear.
    pub reactions: Vec<Reaction>,
    /// Sources, in the order of their table.
    pub sources: Vec<Source>,
}

/// One process: reactants, products, and its coefficient in pieces over
/// temperature.
#[derive(Clone, Debug, PartialEq)]
pub struct Reaction {
    /// Id of its first row; unique in the network.
    pub id: String,
    /// Equation in canonical form: `H3O+ + e- -> OH + H + H`.
    pub equation: String,
    /// Indices of the reactants, with repeats, as written.
    pub reactants: Vec<usize>,
    /// Indices of the products, with repeats, as written.
    pub products: Vec<usize>,
    /// Indices of the species whose number densities multiply the coefficient,
    /// with repeats.
    pub depends_on: Vec<usize>,
    /// Pieces of the coefficient by rising temperature; at least one, without
    /// overlap.
    pub rows: Vec<Row>,
}

impl Reaction {
    /// The law of its first row; all rows share an axis.
    pub fn law(&self) -> Law {
        self.rows[0].law
    }
}

/// One row of the reaction table.
#[derive(Clone, Debug, PartialEq)]
pub struct Row {
    /// Id as written.
    pub id: String,
    /// How the coefficient follows from the numbers.
    pub law: Law,
    /// First number of the law.
    pub alpha: f64,
    /// Second number of the law.
    pub beta: f64,
    /// Third number of the law.
    pub gamma: f64,
    /// Lower end of the range, K.
    pub t_min: f64,
    /// Upper end of the range, K.
    pub t_max: f64,
    /// Factor F by which the coefficient may be wrong either way (one standard
    /// deviation is ln F); at least 1.
    pub uncertainty: f64,
    /// Key of the source; may be empty.
    pub source: String,
    /// How the number was obtained: `seen`, `memory`, ...
    pub provenance: String,
    /// Free text.
    pub note: String,
    /// Where the row stands.
    pub place: Place,
}

impl Row {
    /// The three numbers of the law.
    pub fn numbers(&self) -> Numbers {
        Numbers { alpha: self.alpha, beta: self.beta, gamma: self.gamma }
    }
}

/// A published source.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Source {
    /// Key that rows use.
    pub key: String,
    /// Citation for people.
    pub citation: String,
    /// DOI, or empty.
    pub doi: String,
}

/// A network with what deserves a word although it loads.
#[derive(Clone, Debug, PartialEq)]
pub struct Loaded {
    /// The network.
    pub network: Network,
    /// Warnings and notes; never errors.
    pub warnings: Vec<Finding>,
}

/// A sum over species that reactions leave unchanged.
#[derive(Clone, Debug, PartialEq)]
pub struct Conserved {
    /// An element (dust counts as `grain`), or `charge`.
    pub name: String,
    /// What one particle of each species adds, in species order.
    pub weights: Vec<f64>,
}

impl Network {
    /// Reads a network from the texts of its folder.
    ///
    /// # Errors
    /// Every mistake in every file, with places, sorted by severity; warnings
    /// are among them.
    pub fn from_texts(name: &str, texts: &NetworkTexts) -> Result<Loaded, Vec<Finding>> {
        load::from_texts(name, texts)
    }

    /// Index of a species by its name.
    pub fn species_index(&self, name: &str) -> Option<usize> {
        self.species.iter().position(|species| species.name == name)
    }

    /// Index of a reaction by its id, or by the id of one of its rows.
    pub fn reaction_index(&self, id: &str) -> Option<usize> {
        self.reactions.iter().position(|r| r.id == id || r.rows.iter().any(|row| row.id == id))
    }

    /// The source with a key.
    pub fn source(&self, key: &str) -> Option<&Source> {
        self.sources.iter().find(|source| source.key == key)
    }

    /// The reactants of a reaction, with repeats.
    pub fn reactants_of(&self, reaction: &Reaction) -> Vec<&Species> {
        reaction.reactants.iter().map(|index| &self.species[*index]).collect()
    }

    /// The products of a reaction, with repeats.
    pub fn products_of(&self, reaction: &Reaction) -> Vec<&Species> {
        reaction.products.iter().map(|index| &self.species[*index]).collect()
    }

    /// Elements present, sorted; dust counts as `grain`.
    pub fn elements(&self) -> Vec<String> {
        let mut names: Vec<String> = self
            .species
            .iter()
            .flat_map(|s| s.atoms.iter().map(|(name, _)| name.clone()))
            .collect();
        names.sort();
        names.dedup();
        names
    }

    /// What every reaction conserves: each element present, then `charge` when
    /// any species is charged.
    pub fn conserved(&self) -> Vec<Conserved> {
        let mut sums: Vec<Conserved> = self
            .elements()
            .into_iter()
            .map(|name| {
                let weights = self.species.iter().map(|s| f64::from(s.count(&name))).collect();
                Conserved { name, weights }
            })
            .collect();
        if self.species.iter().any(|s| s.charge != 0) {
            let weights = self.species.iter().map(|s| f64::from(s.charge)).collect();
            sums.push(Conserved { name: "charge".to_string(), weights });
        }
        sums
    }
}
