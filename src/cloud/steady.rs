//! Steady states of a cloud: all that are found from several starts.

use rayon::prelude::*;

use super::evolve::{Conservation, conservation};
use super::model::Model;
use super::start::redistributed;
use crate::diagnostic::{Finding, Place};
use crate::integrate::{
    Spectrum, SteadyFailure, SteadyOptions, SteadyState, find_steady_state, slowest_mode,
};
use crate::sparse::{Fused, Separate, Single, has_fused_arithmetic};
use crate::units::YEAR_S;

/// One steady state.
#[derive(Clone, Debug, PartialEq)]
pub struct SteadyStateFound {
    /// n(X)/n_H by species.
    pub abundances: Vec<f64>,
    /// The starts that lead here.
    pub from: Vec<&'static str>,
    /// Whether it is stable; `None` if the spectrum could not be computed.
    pub stable: Option<bool>,
    /// Time in which a small disturbance falls (stable) or grows (unstable)
    /// by e at the slowest, years.
    pub response_yr: Option<f64>,
    /// Period of the slowest disturbance if it oscillates, years.
    pub period_yr: Option<f64>,
    /// Largest |formation - destruction| over formation of any species above
    /// 1e-25 of n_H.
    pub imbalance: f64,
    /// Steps of the search.
    pub steps: u32,
    /// How well elements and charge were kept.
    pub conservation: Vec<Conservation>,
}

/// What the search for steady states gave.
#[derive(Clone, Debug, PartialEq)]
pub struct SteadyReport {
    /// The states, the one reached from the run's start first.
    pub states: Vec<SteadyStateFound>,
    /// Searches that failed.
    pub failures: Vec<Finding>,
}

/// Species that take up the elements in a cloud of low ionization.
const MOLECULAR: &[&str] = &["CO", "N2", "SiO", "SO", "O2", "H2"];
/// Species that take up the elements in a cloud of high ionization, its
/// hydrogen still molecular.
const IONIZED: &[&str] = &["C+", "S+", "Si+", "Mg+", "Fe+", "Na+", "H2"];
/// Species that take up the elements where hydrogen is atomic too.
const ATOMIC: &[&str] = &["C+", "S+", "Si+", "Mg+", "Fe+", "Na+", "H"];

/// Relative difference in a species above 1e-15 that makes two states two.
const DISTINCT: f64 = 1e-3;

/// How long a cloud is followed before the search starts again, years, and the
/// relative tolerance of that.
const LONG_YR: f64 = 1e9;
const LOOSE: f64 = 1e-3;

impl Model {
    /// Looks for the steady states of the cloud: from the run's own start, from
    /// molecules, and from ions with hydrogen molecular or atomic, since such
    /// networks can have two (Pineau des Forets, Roueff & Flower 1992, MNRAS
    /// 258, 45P; Le Bourlot et al. 1993, ApJ 416, L87).
    #[must_use]
    pub fn steady_states(&self) -> SteadyReport {
        let starts = [
            ("the run's start", Some(self.start.clone())),
            ("molecules", redistributed(&self.network, &self.start, MOLECULAR)),
            ("ions in molecular hydrogen", redistributed(&self.network, &self.start, IONIZED)),
            ("ions in atomic hydrogen", redistributed(&self.network, &self.start, ATOMIC)),
        ];
        let searches: Vec<_> = starts
            .into_par_iter()
            .filter_map(|(name, start)| Some((name, self.settle(&start?))))
            .collect();
        let mut report = SteadyReport { states: Vec::new(), failures: Vec::new() };
        for (name, found) in searches {
            match found {
                Ok(found) => self.add(&mut report.states, name, &found),
                Err(failure) => report.failures.push(self.describe_search(name, &failure)),
            }
        }
        report
    }

    /// The steady state that a start leads to: by pseudo-transient continuation
    /// at once or, where that gets stuck, after following the cloud in time.
    fn settle(&self, start: &[f64]) -> Result<SteadyState, SteadyFailure> {
        let options = SteadyOptions::default();
        self.search(&options, start).or_else(|failure| {
            let later = self.integrate_from(start, &[LONG_YR], LOOSE);
            match later.states.last() {
                Some(state) => {
                    let options = SteadyOptions { first_step: LONG_YR * YEAR_S, ..options };
                    self.search(&options, &self.kinetics.to_species(state))
                }
                None => Err(failure),
            }
        })
    }

    fn search(&self, options: &SteadyOptions, start: &[f64]) -> Result<SteadyState, SteadyFailure> {
        let parameters = self.parameters();
        let start = self.kinetics.to_unknowns(start);
        let kinetics = &*self.kinetics;
        if has_fused_arithmetic() {
            find_steady_state::<Single<Fused>, _>(kinetics, options, &parameters, &start)
        } else {
            find_steady_state::<Single<Separate>, _>(kinetics, options, &parameters, &start)
        }
    }

    fn spectrum(&self, state: &[f64]) -> Option<Spectrum> {
        let parameters = self.parameters();
        if has_fused_arithmetic() {
            slowest_mode::<Single<Fused>, _>(&*self.kinetics, &parameters, state)
        } else {
            slowest_mode::<Single<Separate>, _>(&*self.kinetics, &parameters, state)
        }
    }

    fn add(&self, states: &mut Vec<SteadyStateFound>, name: &'static str, found: &SteadyState) {
        let abundances = self.kinetics.to_species(&found.state);
        for known in &mut *states {
            let same = known.abundances.iter().zip(&abundances).all(|(a, b)| {
                let size = a.abs().max(b.abs());
                size < 1e-15 || (a - b).abs() <= DISTINCT * size
            });
            if same {
                known.from.push(name);
                return;
            }
        }
        let spectrum = self.spectrum(&found.state);
        states.push(SteadyStateFound {
            from: vec![name],
            stable: spectrum.map(|s| s.is_stable()),
            response_yr: spectrum.map(|s| 1.0 / s.largest_real_part.abs() / YEAR_S),
            period_yr: spectrum
                .filter(|s| s.imaginary_part > 1e-6 * s.largest_real_part.abs())
                .map(|s| 2.0 * std::f64::consts::PI / s.imaginary_part / YEAR_S),
            imbalance: self.imbalance(&abundances),
            steps: found.steps,
            conservation: conservation(&self.network, &self.start, &[&abundances]),
            abundances,
        });
    }

    /// Largest relative difference of gross formation and destruction.
    fn imbalance(&self, abundances: &[f64]) -> f64 {
        let rates = self.reaction_rates(abundances);
        let mut made = vec![0.0; abundances.len()];
        let mut lost = vec![0.0; abundances.len()];
        for (reaction, rate) in self.network.reactions.iter().zip(rates) {
            for &s in &reaction.products {
                made[s] += rate;
            }
            for &s in &reaction.reactants {
                lost[s] += rate;
            }
        }
        (0..abundances.len())
            .filter(|&s| abundances[s] > 1e-25 && made[s] > 0.0)
            .map(|s| (made[s] - lost[s]).abs() / made[s])
            .fold(0.0, f64::max)
    }

    fn describe_search(&self, name: &str, failure: &SteadyFailure) -> Finding {
        let species = &self.network.species[self.kinetics.species_of(failure.unknown)].name;
        Finding::warning(
            "solve-steady",
            Place::file(&self.run.name),
            format!(
                "the search from {name} gave up after {} steps at a pseudo time step of {:.2e} yr; {species} still changed by {:.1e} of itself",
                failure.steps,
                failure.step / YEAR_S,
                failure.change,
            ),
        )
        .remedy("evolve the cloud to 1e8 yr and look whether its abundances settle or oscillate")
    }
}
