//! What several test files share: small networks written in place, run files
//! with the conditions that do not matter filled in, and values by name.
#![allow(dead_code, reason = "every test file uses its own part of this")]

use std::fmt::Write as _;
use std::sync::Arc;

use duskwater::cloud::{Model, RunFile, shipped as shipped_runs};
use duskwater::network::{Network, NetworkTexts, shipped as shipped_networks};
use duskwater::rates::Conditions;

/// Seconds per year, as in the run file's times.
pub(crate) const YEAR_S: f64 = duskwater::units::YEAR_S;

/// A network from lines `species,composition,polarizability,dipole` (the last
/// three may be left out) and lines `equation,law,alpha,beta,gamma`.
pub(crate) fn network(species: &str, reactions: &str) -> Arc<Network> {
    let mut species_csv = String::from("species,composition,polarizability_A3,dipole_D\n");
    for line in lines(species) {
        let cells: Vec<&str> = line.split(',').map(str::trim).collect();
        let cell = |i: usize| cells.get(i).copied().unwrap_or("");
        writeln!(species_csv, "{},{},{},{}", cell(0), cell(1), cell(2), cell(3)).unwrap();
    }
    let mut reactions_csv =
        String::from("id,equation,law,alpha,beta,gamma,t_min,t_max,uncertainty,source\n");
    for (number, line) in lines(reactions).enumerate() {
        let cells: Vec<&str> = line.split(',').map(str::trim).collect();
        let cell = |i: usize| cells.get(i).copied().unwrap_or("0");
        writeln!(
            reactions_csv,
            "r{number},{},{},{},{},{},1,1e5,2,",
            cell(0),
            cell(1),
            cell(2),
            cell(3),
            cell(4)
        )
        .unwrap();
    }
    let texts = NetworkTexts::new("")
        .with("network.toml", "title = \"written in place\"\n")
        .with("species.csv", species_csv)
        .with("reactions.csv", reactions_csv)
        .with("sources.csv", "key,citation,doi\n");
    match Network::from_texts("in place", &texts) {
        Ok(loaded) => Arc::new(loaded.network),
        Err(findings) => panic!("{}", joined(&findings)),
    }
}

fn lines(text: &str) -> impl Iterator<Item = &str> {
    text.lines().map(str::trim).filter(|line| !line.is_empty())
}

/// Findings as one text.
pub(crate) fn joined<T: std::fmt::Display>(findings: &[T]) -> String {
    findings.iter().map(T::to_string).collect::<Vec<_>>().join("\n")
}

/// The conditions of a small run: density, temperature and cosmic rays; no
/// starlight comes in.
pub(crate) fn run_text(
    n_h_cm3: f64,
    temperature_k: f64,
    zeta_s: f64,
    start: &str,
    rest: &str,
) -> String {
    format!(
        "network = \"in place\"\n[cloud]\nhydrogen_density = {n_h_cm3:e}\n\
         temperature = {temperature_k:e}\ncosmic_ray_ionization_rate = {zeta_s:e}\n\
         visual_extinction = 10\nradiation_field = 0\n[start]\n{start}\n{rest}\n"
    )
}

/// A run file joined to a network.
pub(crate) fn model(network: &Arc<Network>, run: &str) -> Model {
    model_with(network, run, &[])
}

/// A run file with overrides, joined to a network.
pub(crate) fn model_with(network: &Arc<Network>, run: &str, overrides: &[String]) -> Model {
    let (run, _) = RunFile::read("run.toml", run, overrides)
        .unwrap_or_else(|findings| panic!("{}", joined(&findings)));
    Model::new(Arc::clone(network), run).unwrap_or_else(|findings| panic!("{}", joined(&findings)))
}

/// A shipped network.
pub(crate) fn shipped_network(name: &str) -> Arc<Network> {
    match shipped_networks::load(name) {
        Ok(loaded) => Arc::new(loaded.network),
        Err(findings) => panic!("{}", joined(&findings)),
    }
}

/// A shipped run on the network that it names, with overrides.
pub(crate) fn shipped_model(run: &str, overrides: &[&str]) -> Model {
    let text = shipped_runs::text(run).unwrap();
    let overrides: Vec<String> = overrides.iter().map(|&o| o.to_owned()).collect();
    let (file, _) = RunFile::read(run, text, &overrides)
        .unwrap_or_else(|findings| panic!("{}", joined(&findings)));
    let network = shipped_network(&file.network);
    Model::new(network, file).unwrap_or_else(|findings| panic!("{}", joined(&findings)))
}

/// The last output of a run that must not fail.
pub(crate) fn last(model: &Model) -> Vec<f64> {
    let evolution = model.evolve();
    assert!(evolution.failure.is_none(), "{:?}", evolution.failure);
    evolution.points.last().unwrap().abundances.clone()
}

/// Index of a species that the network has.
pub(crate) fn index(network: &Network, name: &str) -> usize {
    network.species_index(name).unwrap_or_else(|| panic!("no species {name}"))
}

/// The summed coefficient of all reactions with these reactants whose products
/// hold all of `products`, at a temperature (K).
pub(crate) fn coefficient(
    network: &Network,
    reactants: &[&str],
    products: &[&str],
    temperature_k: f64,
) -> f64 {
    let conditions = Conditions { temperature: temperature_k, ..Conditions::default() };
    let mut wanted: Vec<usize> = reactants.iter().map(|name| index(network, name)).collect();
    wanted.sort_unstable();
    let mut total = 0.0;
    for reaction in &network.reactions {
        let mut have = reaction.reactants.clone();
        have.sort_unstable();
        let mut left = reaction.products.clone();
        let holds = products.iter().all(|name| {
            let at = left.iter().position(|&s| s == index(network, name));
            at.map(|at| left.swap_remove(at)).is_some()
        });
        if have == wanted && holds {
            total += network
                .coefficient(reaction, &conditions, duskwater::network::Extrapolate::Hold)
                .unwrap();
        }
    }
    total
}

/// Asserts that `got` lies within `relative` of `want`; fails on NaN.
#[track_caller]
pub(crate) fn close(case: &str, got: f64, want: f64, relative: f64) {
    let error = (got / want - 1.0).abs();
    assert!(error <= relative, "{case}: {got:e} against {want:e}, off by {error:.2e}");
}
