//! What holds for any network: atoms and charge are kept, the order of tables
//! does not matter, the analytic Jacobian is the derivative, and a cell's bits
//! do not depend on what is computed beside it.
//!
//! The random networks are drawn from a fixed seed: every run tries the same.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

#[path = "support/random.rs"]
mod random;
mod support;

use std::sync::Arc;

use duskwater::cloud::Model;
use duskwater::integrate::{Options, Problem, Solution, System, integrate_all};
use duskwater::kinetics::Kinetics;
use duskwater::network::Network;
use duskwater::sparse::{Fused, Lane, Separate, Single, Wide};
use proptest::prelude::*;
use proptest::test_runner::{Config, RngAlgorithm, TestRng, TestRunner};
use random::{RandomNetwork, networks};
use support::YEAR_S;

fn check(cases: u32, property: impl Fn(RandomNetwork) -> Result<(), TestCaseError>) {
    let config = Config { cases, failure_persistence: None, ..Config::default() };
    let seed = TestRng::deterministic_rng(RngAlgorithm::ChaCha);
    let result = TestRunner::new_with_rng(config, seed).run(&networks(), property);
    assert!(result.is_ok(), "{}", result.unwrap_err());
}

fn model(network: &Arc<Network>, random: &RandomNetwork, tolerance: f64) -> Model {
    let rest = format!(
        "[times]\noutput = [1e-3, 1, 1e3, 1e6]\n[solver]\nrelative_tolerance = {tolerance:e}\n"
    );
    let run = support::run_text(1.0, 300.0, 1e-17, &random.start_lines(), &rest);
    support::model(network, &run)
}

#[test]
fn any_balanced_network_keeps_atoms_and_charge() {
    check(300, |random| {
        let (species, reactions) = random.own_tables();
        let network = support::network(&species, &reactions);
        let evolution = model(&network, &random, 1e-4).evolve();
        prop_assert!(evolution.failure.is_none(), "{:?}", evolution.failure);
        // Rounding of the sums over at most thirteen species, each relative to
        // the sum of its sizes.
        prop_assert!(evolution.worst_residual() <= 1e-13, "{:?}", evolution.conservation);
        Ok(())
    });
}

#[test]
fn the_order_of_species_and_reactions_changes_nothing_beyond_rounding() {
    check(150, |random| {
        let (species, reactions) = random.own_tables();
        let network = support::network(&species, &reactions);
        // A fixed shuffle: by the remainder of a multiple, then backwards.
        let shuffled = |n: usize| -> Vec<usize> {
            let mut order: Vec<usize> = (0..n).collect();
            order.sort_by_key(|i| (i * 7919 + 13) % 31);
            order.reverse();
            order
        };
        let (species_order, reaction_order) =
            (shuffled(random.species.len()), shuffled(random.reactions.len()));
        let (species, reactions) = random.tables(&species_order, &reaction_order);
        let other = support::network(&species, &reactions);
        let [a, b] = [&network, &other].map(|n| model(n, &random, 1e-9).evolve());
        for (p, q) in a.points.iter().zip(&b.points) {
            for (place, &s) in species_order.iter().enumerate() {
                let (x, y) = (p.abundances[s], q.abundances[place]);
                // Steps differ with the order, so the two agree to the error of
                // the integration (tolerance 1e-9), not to the last bit; below
                // 1e-16 the absolute tolerance of 1e-20 shows.
                let allowed = 1e-6 * x.abs().max(y.abs()) + 1e-20;
                prop_assert!(
                    (x - y).abs() <= allowed,
                    "{} at {:e} yr: {x:e}, {y:e}",
                    random.species[s].0,
                    p.time_yr
                );
            }
        }
        Ok(())
    });
}

type One = Single<Fused>;

fn lanes<L: Lane>(values: &[f64]) -> Vec<L> {
    values.iter().map(|&v| L::splat(v)).collect()
}

/// Largest difference of the analytic Jacobian and fourth-order central
/// differences, as a change of the gross rate (formation plus destruction) of
/// an unknown per relative change of another. The differences are exact for
/// rates of up to four bodies; what is left is rounding.
fn jacobian_error(kinetics: &Kinetics, parameters: &[f64], y: &[f64], gross: &[f64]) -> f64 {
    let parameters = lanes::<One>(parameters);
    let rates = |y: &[f64]| {
        let mut f = vec![One::zero(); y.len()];
        kinetics.rate_of_change(&parameters, &lanes(y), &mut f);
        f.iter().map(|v| v.get(0)).collect::<Vec<f64>>()
    };
    let at = rates(y);
    let mut analytic = Vec::new();
    for i in 0..y.len() {
        let mut row = vec![One::zero(); y.len()];
        let value = kinetics.subtract_jacobian_row(i, &parameters, &lanes(y), &mut row);
        let miss = (value.get(0) - at[i]).abs();
        assert!(miss <= 1e-14 * gross[i], "row {i} gives another rate of change, by {miss:e}");
        analytic.push(row.iter().map(|v| -v.get(0)).collect::<Vec<f64>>());
    }
    let mut worst = 0.0f64;
    for j in 0..y.len() {
        let h = 0.01 * y[j];
        if h <= 0.0 {
            continue;
        }
        let moved = |steps: f64| {
            let mut y = y.to_vec();
            y[j] += steps * h;
            rates(&y)
        };
        let [one, back, two, far_back] = [1.0, -1.0, 2.0, -2.0].map(moved);
        for i in 0..y.len() {
            let difference = (8.0 * (one[i] - back[i]) - (two[i] - far_back[i])) / (12.0 * h);
            let error = (difference - analytic[i][j]).abs() * y[j] / gross[i].max(1e-300);
            worst = if error.is_nan() { f64::NAN } else { worst.max(error) };
        }
    }
    worst
}

/// Formation plus destruction of every unknown, in abundance per second.
fn gross_rates(model: &Model, abundances: &[f64]) -> Vec<f64> {
    let mut gross = vec![0.0; abundances.len()];
    let rates = model.reaction_rates(abundances);
    for (reaction, rate) in model.network.reactions.iter().zip(rates) {
        for &s in reaction.reactants.iter().chain(&reaction.products) {
            gross[s] += rate / model.run.conditions.hydrogen_density;
        }
    }
    model.kinetics.to_unknowns(&gross)
}

fn jacobian_error_of(model: &Model, abundances: &[f64]) -> f64 {
    let parameters =
        model.kinetics.parameters(&model.coefficients, model.run.conditions.hydrogen_density);
    let y = model.kinetics.to_unknowns(abundances);
    jacobian_error(&model.kinetics, &parameters, &y, &gross_rates(model, abundances))
}

/// Rounding of the rates, 1e-16 of the gross rate times the number of terms,
/// over the step of 0.01.
const JACOBIAN_ROUNDING: f64 = 1e-12;

#[test]
fn the_analytic_jacobian_is_the_derivative_of_any_network() {
    check(300, |random| {
        let (species, reactions) = random.own_tables();
        let model = model(&support::network(&species, &reactions), &random, 1e-4);
        // Every species present, so that every derivative shows.
        let abundances: Vec<f64> =
            (0..random.species.len()).map(|s| 10f64.powi(-((s * 5) as i32 % 9))).collect();
        let error = jacobian_error_of(&model, &abundances);
        prop_assert!(error <= JACOBIAN_ROUNDING, "{error:e}");
        Ok(())
    });
}

fn problems(random: &RandomNetwork, model: &Model) -> Vec<Problem> {
    (0..11)
        .map(|cell| {
            let start = model.start.iter().map(|x| x * f64::from(cell % 4 + 1)).collect::<Vec<_>>();
            let coefficients: Vec<f64> = model
                .coefficients
                .iter()
                .enumerate()
                .map(|(r, k)| k * 10f64.powi((cell * (r as i32 + 1)) % 5 - 2))
                .collect();
            let years = if random.species.len().is_multiple_of(2) { 1.0 } else { 1e4 };
            Problem {
                parameters: model.kinetics.parameters(&coefficients, 1.0),
                start: model.kinetics.to_unknowns(&start),
                times: vec![0.0, 1e-2 * years * YEAR_S, years * YEAR_S],
            }
        })
        .collect()
}

fn all<L: Lane>(kinetics: &Kinetics, problems: Vec<Problem>) -> Vec<Solution> {
    let mut solutions = Vec::new();
    integrate_all::<L, _>(kinetics, &Options::default(), problems, |s| solutions.push(s));
    solutions.sort_by_key(|s| s.cell);
    solutions
}

/// Whether bits agree between one lane and eight, and between two orders of
/// the cells in the batch.
fn bits_agree<A, B>(kinetics: &Kinetics, problems: &[Problem]) -> bool
where
    A: Lane,
    B: Lane,
{
    let alone = all::<A>(kinetics, problems.to_vec());
    let together = all::<B>(kinetics, problems.to_vec());
    let mut turned = problems.to_vec();
    turned.rotate_left(5);
    let mut turned = all::<B>(kinetics, turned);
    turned.rotate_right(5);
    let same = |a: &Solution, b: &Solution| {
        let bits =
            |s: &Solution| s.states.iter().flatten().map(|x| x.to_bits()).collect::<Vec<_>>();
        bits(a) == bits(b) && a.work == b.work && a.failure == b.failure
    };
    alone.len() == problems.len()
        && alone.iter().zip(&together).all(|(a, b)| same(a, b))
        && alone.iter().zip(&turned).all(|(a, b)| same(a, b))
}

#[test]
fn the_width_of_a_batch_and_a_cells_neighbours_change_no_bit() {
    check(150, |random| {
        let (species, reactions) = random.own_tables();
        let model = model(&support::network(&species, &reactions), &random, 1e-5);
        let cells = problems(&random, &model);
        prop_assert!(bits_agree::<Single<Fused>, Wide<Fused>>(&model.kinetics, &cells));
        prop_assert!(bits_agree::<Single<Separate>, Wide<Separate>>(&model.kinetics, &cells));
        Ok(())
    });
}

#[test]
fn the_analytic_jacobian_is_the_derivative_on_the_shipped_networks() {
    for run in ["dense-core", "diffuse", "post-shock"] {
        let model = support::shipped_model(run, &[]);
        for point in model.evolve().points {
            // Absent species are made present, so that every derivative shows.
            let abundances: Vec<f64> = point.abundances.iter().map(|x| x.max(1e-14)).collect();
            let error = jacobian_error_of(&model, &abundances);
            assert!(error <= JACOBIAN_ROUNDING, "{run} at {:e} yr: {error:e}", point.time_yr);
        }
    }
}

#[test]
fn clouds_side_by_side_on_the_shipped_network_have_the_bits_of_clouds_alone() {
    // Ten clouds of different density and temperature, so that their steps part
    // at once and lanes fall free at different times.
    let base = support::shipped_model("dense-core", &[]);
    let cells: Vec<Problem> = (0..10)
        .map(|cell| {
            let density = format!("cloud.hydrogen_density={:e}", 10f64.powi(2 + cell % 5));
            let temperature = format!("cloud.temperature={}", 10 + 30 * cell);
            let model = support::shipped_model("dense-core", &[&density, &temperature]);
            let n_h = model.run.conditions.hydrogen_density;
            Problem {
                parameters: base.kinetics.parameters(&model.coefficients, n_h),
                start: base.kinetics.to_unknowns(&model.start),
                times: vec![1e3 * YEAR_S, 1e6 * YEAR_S],
            }
        })
        .collect();
    assert!(bits_agree::<Single<Fused>, Wide<Fused>>(&base.kinetics, &cells));
}

#[test]
fn the_order_of_the_shipped_tables_changes_nothing_beyond_rounding() {
    // `cloud` with the lines of both tables reversed.
    let reversed = |text: &[u8]| {
        let text = std::str::from_utf8(text).unwrap();
        let (head, rest) = text.split_once('\n').unwrap();
        let rest: Vec<&str> = rest.lines().rev().collect();
        format!("{head}\n{}\n", rest.join("\n"))
    };
    let texts = duskwater::network::shipped::texts("cloud").unwrap();
    let [species, reactions] =
        ["species.csv", "reactions.csv"].map(|file| reversed(texts.get(file).unwrap()));
    let turned = texts.with("species.csv", species).with("reactions.csv", reactions);
    let turned = Arc::new(Network::from_texts("cloud", &turned).unwrap().network);
    let run = duskwater::cloud::shipped::text("diffuse").unwrap();
    let tight = vec!["solver.relative_tolerance=1e-9".to_owned()];
    let network = support::shipped_network("cloud");
    let [a, b] = [&network, &turned].map(|n| support::model_with(n, run, &tight).evolve());
    for (p, q) in a.points.iter().zip(&b.points) {
        for (s, species) in network.species.iter().enumerate() {
            let (x, y) = (p.abundances[s], q.abundances[support::index(&turned, &species.name)]);
            // As for random networks: the error of the integration.
            let allowed = 1e-6 * x.abs() + 1e-20;
            assert!(
                (x - y).abs() <= allowed,
                "{} at {:e} yr: {x:e}, {y:e}",
                species.name,
                p.time_yr
            );
        }
    }
}
