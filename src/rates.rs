//! Rate laws as pure functions of local conditions.
//!
//! A law turns three numbers of a table row (alpha, beta, gamma), the species
//! that react and the [`Conditions`] of a cloud into a coefficient; nothing
//! here depends on abundances of the moment. Each law has a file of its own
//! with its formula, unit, range and source; [`Law`] ties them together.

pub mod capture;
mod conditions;
pub mod dust;
pub mod grain_collision;
mod law;
pub mod photon;
pub mod shielding;
pub mod thermal;

pub use conditions::{Columns, ConditionProblem, Conditions};
pub use law::{Axis, Law, LawNameError};

use crate::species::Species;

/// The three numbers of a row; their meaning depends on the law.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Numbers {
    /// Scale of the coefficient.
    pub alpha: f64,
    /// Usually an exponent of temperature.
    pub beta: f64,
    /// Usually a barrier (K) or a dust exponent (per magnitude).
    pub gamma: f64,
}

/// Who reacts to what.
#[derive(Clone, Copy, Debug)]
pub struct Participants<'a> {
    /// Reactants, with repeats.
    pub reactants: &'a [&'a Species],
    /// Products, with repeats.
    pub products: &'a [&'a Species],
}

/// Why a law does not apply to a reaction.
#[derive(Clone, Debug, PartialEq, Eq)]
#[non_exhaustive]
pub enum RateError {
    /// The reactants are not of the kind the law is about.
    Shape {
        /// The law.
        law: Law,
        /// What it wants, in words.
        wanted: String,
    },
    /// A species lacks a datum that the law needs.
    MissingData {
        /// The law.
        law: Law,
        /// The species.
        species: String,
        /// Column of the species table that is empty.
        column: &'static str,
    },
    /// The effective dust form has no constants for this ion.
    NoConstants {
        /// The ion.
        ion: String,
    },
}

impl RateError {
    /// Stable code of the mistake.
    pub fn code(&self) -> &'static str {
        match self {
            Self::Shape { .. } => "network-law-shape",
            Self::MissingData { .. } => "network-missing-data",
            Self::NoConstants { .. } => "network-dust-ion",
        }
    }

    /// What to do about it.
    pub fn remedy(&self) -> String {
        match self {
            Self::Shape { .. } => "choose the law that describes this process".to_string(),
            Self::MissingData { column, species, .. } => {
                format!("fill in {column} of {species} in species.csv, or use law `thermal`")
            }
            Self::NoConstants { .. } => format!(
                "use one of {}, or explicit grains",
                dust::fitted_ions().collect::<Vec<_>>().join(", ")
            ),
        }
    }
}

impl std::fmt::Display for RateError {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        match self {
            Self::Shape { law, wanted } => write!(f, "law `{}` wants {wanted}", law.name()),
            Self::MissingData { law, species, column } => {
                write!(f, "law `{}` needs {column} of {species}, which is not given", law.name())
            }
            Self::NoConstants { ion } => {
                write!(f, "there are no effective dust recombination constants for {ion}")
            }
        }
    }
}

impl std::error::Error for RateError {}
