//! A run joined to its network: ready to evolve or to settle.

use std::sync::Arc;

use super::runfile::{RunFile, unknown_species};
use super::start;
use crate::diagnostic::Finding;
use crate::integrate::Invariants;
use crate::kinetics::{Kinetics, Mechanism};
use crate::network::Network;

/// A cloud ready to be computed: network, compiled kinetics, conditions, rate
/// coefficients and start.
#[derive(Clone, Debug)]
pub struct Model {
    /// The network.
    pub network: Arc<Network>,
    /// The network compiled.
    pub kinetics: Arc<Kinetics>,
    /// The run.
    pub run: RunFile,
    /// Rate coefficient of each reaction at the run's conditions, in s-1,
    /// cm3 s-1 or cm6 s-1.
    pub coefficients: Vec<f64>,
    /// Start abundances n(X)/n_H by species.
    pub start: Vec<f64>,
    /// The watched species, as indices.
    pub watch: Vec<usize>,
    /// What deserves a word although the model runs.
    pub warnings: Vec<Finding>,
}

impl Model {
    /// Joins a run to a network.
    ///
    /// # Errors
    /// Every finding: start abundances that do not fit the network, watched
    /// species that it lacks, conditions that a rate law cannot take.
    pub fn new(network: Arc<Network>, run: RunFile) -> Result<Self, Vec<Finding>> {
        let mut findings = Vec::new();
        let mut warnings = Vec::new();
        let start = start::abundances(&run, &network, &mut warnings).unwrap_or_else(|found| {
            findings.extend(found);
            Vec::new()
        });
        let coefficients =
            network.coefficients(&run.conditions, run.extrapolate).unwrap_or_else(|found| {
                findings.extend(found);
                Vec::new()
            });
        let mut watch = Vec::new();
        for (name, place) in &run.watch {
            match network.species_index(name) {
                Some(index) => watch.push(index),
                None => findings.push(unknown_species(
                    name,
                    place.clone(),
                    network.species.iter().map(|s| s.name.as_str()),
                )),
            }
        }
        let sums = network.conserved().len();
        if sums > Invariants::MOST {
            findings.push(
                Finding::error(
                    "run-elements",
                    run.network_place.clone(),
                    format!("network `{}` has {sums} elements, charge included", network.name),
                )
                .remedy(format!("up to {} can be conserved", Invariants::MOST)),
            );
        }
        if !findings.is_empty() {
            return Err(findings);
        }
        if run.watch.is_empty() {
            watch = ["OH", "H2O"].iter().filter_map(|name| network.species_index(name)).collect();
        }
        let kinetics = Arc::new(Kinetics::new(&Mechanism::from(&*network)));
        Ok(Self { network, kinetics, run, coefficients, start, watch, warnings })
    }

    /// The terms' coefficients for the engine.
    pub(super) fn parameters(&self) -> Vec<f64> {
        self.kinetics.parameters(&self.coefficients, self.run.conditions.hydrogen_density)
    }

    /// Events per cm3 and second of every reaction at the given abundances
    /// (by species).
    #[must_use]
    pub fn reaction_rates(&self, abundances: &[f64]) -> Vec<f64> {
        let n_h = self.run.conditions.hydrogen_density;
        self.network
            .reactions
            .iter()
            .zip(&self.coefficients)
            .map(|(reaction, k)| {
                reaction.depends_on.iter().fold(*k, |rate, &s| rate * abundances[s] * n_h)
            })
            .collect()
    }
}
