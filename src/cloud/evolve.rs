//! Abundances over time.

use super::model::Model;
use crate::diagnostic::{Finding, Place};
use crate::integrate::{Failure, Options, Problem, Solution, Work, integrate_all};
use crate::network::Network;
use crate::sparse::{Fused, Separate, Single, has_fused_arithmetic};
use crate::units::YEAR_S;

/// The abundances at one time.
#[derive(Clone, Debug, PartialEq)]
pub struct TimePoint {
    /// Time since the start, years.
    pub time_yr: f64,
    /// n(X)/n_H by species.
    pub abundances: Vec<f64>,
}

/// How well one conserved sum was kept.
#[derive(Clone, Debug, PartialEq)]
pub struct Conservation {
    /// The element, or `charge`.
    pub name: String,
    /// Largest change over the outputs, relative to the element's total or to
    /// the charge carried by all ions and electrons.
    pub residual: f64,
}

/// A cloud's evolution.
#[derive(Clone, Debug, PartialEq)]
pub struct Evolution {
    /// The abundances at the output times that were reached.
    pub points: Vec<TimePoint>,
    /// Steps taken.
    pub work: Work,
    /// How well elements and charge were kept.
    pub conservation: Vec<Conservation>,
    /// Why the integration stopped early, if it did.
    pub failure: Option<Finding>,
}

impl Evolution {
    /// The largest conservation residual.
    #[must_use]
    pub fn worst_residual(&self) -> f64 {
        self.conservation.iter().map(|c| c.residual).fold(0.0, worse)
    }
}

impl Model {
    /// Evolves the cloud from its start to the run's output times.
    #[must_use]
    pub fn evolve(&self) -> Evolution {
        self.evolve_to(&self.run.times.output_yr)
    }

    /// Evolves the cloud from its start to the given times (years, ascending).
    #[must_use]
    pub fn evolve_to(&self, times_yr: &[f64]) -> Evolution {
        let solution =
            self.integrate_from(&self.start, times_yr, self.run.solver.relative_tolerance);
        let points: Vec<TimePoint> = solution
            .states
            .iter()
            .zip(times_yr)
            .map(|(state, &time_yr)| TimePoint {
                time_yr,
                abundances: self.kinetics.to_species(state),
            })
            .collect();
        let states: Vec<&[f64]> = points.iter().map(|p| p.abundances.as_slice()).collect();
        Evolution {
            conservation: conservation(&self.network, &self.start, &states),
            points,
            work: solution.work,
            failure: solution.failure.map(|failure| self.describe(&failure)),
        }
    }

    /// Integrates from the given abundances (by species) to the given times.
    pub(super) fn integrate_from(
        &self,
        start: &[f64],
        times_yr: &[f64],
        relative_tolerance: f64,
    ) -> Solution {
        let problem = Problem {
            parameters: self.parameters(),
            start: self.kinetics.to_unknowns(start),
            times: times_yr.iter().map(|t| t * YEAR_S).collect(),
        };
        let options = Options {
            relative_tolerance,
            absolute_tolerance: self.run.solver.absolute_tolerance,
            ..Options::default()
        };
        let mut solution = None;
        let kinetics = &*self.kinetics;
        let keep = |s| solution = Some(s);
        if has_fused_arithmetic() {
            integrate_all::<Single<Fused>, _>(kinetics, &options, [problem], keep);
        } else {
            integrate_all::<Single<Separate>, _>(kinetics, &options, [problem], keep);
        }
        solution.expect("one problem gives one solution")
    }

    fn describe(&self, failure: &Failure) -> Finding {
        let species = &self.network.species[self.kinetics.species_of(failure.unknown)].name;
        Finding::error(
            "solve-integration",
            Place::file(&self.run.name),
            format!(
                "the integration stopped at {:.4e} yr: {}; the largest error was in {species} at a step of {:.3e} yr",
                failure.time / YEAR_S,
                failure.cause,
                failure.step / YEAR_S,
            ),
        )
        .remedy("loosen solver.relative_tolerance, or look at the coefficients of that species' reactions with `duskwater rates`")
    }
}

/// How well the states keep the conserved sums of `start`.
pub(super) fn conservation(
    network: &Network,
    start: &[f64],
    states: &[&[f64]],
) -> Vec<Conservation> {
    network
        .conserved()
        .into_iter()
        .map(|sum| {
            let total = |x: &[f64]| -> f64 { sum.weights.iter().zip(x).map(|(w, x)| w * x).sum() };
            let size =
                |x: &[f64]| -> f64 { sum.weights.iter().zip(x).map(|(w, x)| (w * x).abs()).sum() };
            let at_start = total(start);
            let residual = states
                .iter()
                .map(|x| {
                    let change = (total(x) - at_start).abs();
                    let size = size(x).max(size(start));
                    if size > 0.0 { change / size } else { change }
                })
                .fold(0.0, worse);
            Conservation { name: sum.name, residual }
        })
        .collect()
}

/// The larger of two residuals; one that is not a number is the worst.
pub(super) fn worse(a: f64, b: f64) -> f64 {
    if b.is_nan() || b > a { b } else { a }
}
