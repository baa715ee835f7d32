//! The abundances that a run starts from.

use super::runfile::{RunFile, unknown_species};
use crate::diagnostic::Finding;
use crate::network::Network;
use crate::units;

/// Relative mismatch of charge or hydrogen that is taken for rounding of the
/// numbers in a run file.
const ROUNDING: f64 = 1e-3;

/// Density of grain material, g cm-3 (silicate and carbon mixed; common
/// practice), and mean mass per hydrogen nucleus, u (helium included).
const GRAIN_DENSITY_G_CM3: f64 = 3.0;
const MASS_PER_HYDROGEN_U: f64 = 1.4;

/// Abundances n(X)/n_H by species, electrons and grains filled in.
///
/// # Errors
/// Findings: unknown species, hydrogen that does not add up to one, charge
/// that does not balance.
pub(super) fn abundances(run: &RunFile, network: &Network) -> Result<Vec<f64>, Vec<Finding>> {
    let mut findings = Vec::new();
    let mut start = vec![0.0; network.species.len()];
    for (name, place, value) in &run.start {
        match network.species_index(name) {
            Some(index) => start[index] = *value,
            None => findings.push(unknown_species(
                name,
                place.clone(),
                network.species.iter().map(|s| s.name.as_str()),
            )),
        }
    }
    if findings.is_empty() {
        fill_grains(run, network, &mut start);
        check_hydrogen(run, network, &start, &mut findings);
        fill_electrons(run, network, &mut start, &mut findings);
    }
    if findings.iter().any(Finding::is_error) { Err(findings) } else { Ok(start) }
}

/// Grains per hydrogen nucleus: the dust mass in spheres of one radius.
fn grains_per_hydrogen(radius_um: f64, gas_to_dust: f64) -> f64 {
    let radius_cm = radius_um * 1e-4;
    let grain_mass_g = 4.0 / 3.0 * std::f64::consts::PI * radius_cm.powi(3) * GRAIN_DENSITY_G_CM3;
    MASS_PER_HYDROGEN_U * units::ATOMIC_MASS_G / gas_to_dust / grain_mass_g
}

fn fill_grains(run: &RunFile, network: &Network, start: &mut [f64]) {
    let given = |name: &str| run.start.iter().any(|(n, _, _)| n == name);
    if let Some(grain) = network.species_index("grain")
        && !given("grain")
        && !given("grain-")
    {
        start[grain] = grains_per_hydrogen(run.conditions.grain_radius, run.conditions.gas_to_dust);
    }
}

fn check_hydrogen(run: &RunFile, network: &Network, start: &[f64], findings: &mut Vec<Finding>) {
    let Some(hydrogen) = network.conserved().into_iter().find(|c| c.name == "H") else { return };
    let nuclei: f64 = hydrogen.weights.iter().zip(start).map(|(w, x)| w * x).sum();
    if (nuclei - 1.0).abs() > ROUNDING {
        findings.push(
            Finding::error(
                "run-hydrogen",
                run.start_place.clone(),
                format!("the start holds {nuclei:.6} hydrogen nuclei per hydrogen nucleus"),
            )
            .remedy(
                "abundances are n(X)/n_H with n_H = n(H) + 2 n(H2) + ...: H2 = 0.5 is all of it",
            ),
        );
    }
}

fn fill_electrons(
    run: &RunFile,
    network: &Network,
    start: &mut [f64],
    findings: &mut Vec<Finding>,
) {
    let charge: f64 =
        network.species.iter().zip(&*start).map(|(s, x)| f64::from(s.charge) * x).sum();
    let size: f64 =
        network.species.iter().zip(&*start).map(|(s, x)| f64::from(s.charge.abs()) * x).sum();
    let electron = network.species_index("e-");
    let given = run.start.iter().find(|(name, _, _)| name == "e-");
    let place = given.map_or(&run.start_place, |(_, place, _)| place).clone();
    match electron {
        Some(electron) if given.is_none() && charge >= 0.0 => start[electron] = charge,
        // Rounding in the file is mended, so that the run conserves charge exactly.
        Some(electron) if charge.abs() <= ROUNDING * size && start[electron] + charge >= 0.0 => {
            start[electron] += charge;
        }
        None if charge.abs() <= ROUNDING * size => {}
        _ => findings.push(
            Finding::error(
                "run-charge",
                place,
                format!("the start carries a net charge of {charge:e} per hydrogen nucleus"),
            )
            .remedy("leave out `e-` and the electrons are filled in"),
        ),
    }
}

/// Abundances on the same conserved sums as `start`, with each element put
/// into the species of `wanted` as far as it goes, in their order, and the rest
/// into H2 and atoms (neutral ones first); `None` if the network's species
/// cannot hold an element.
pub(super) fn redistributed(network: &Network, start: &[f64], wanted: &[&str]) -> Option<Vec<f64>> {
    let conserved = network.conserved();
    let elements: Vec<_> = conserved.iter().filter(|c| c.name != "charge").collect();
    let mut left: Vec<f64> =
        elements.iter().map(|c| c.weights.iter().zip(start).map(|(w, x)| w * x).sum()).collect();
    let mut out = vec![0.0; start.len()];
    let atoms = (0..start.len()).filter(|&i| {
        let species = &network.species[i];
        species.charge == 0 && species.atoms.len() == 1 && species.atoms[0].1 == 1
    });
    let order =
        wanted.iter().chain(&["H2"]).filter_map(|name| network.species_index(name)).chain(atoms);
    for species in order {
        let amount = elements
            .iter()
            .zip(&left)
            .filter(|(c, _)| c.weights[species] > 0.0)
            .map(|(c, left)| left / c.weights[species])
            .fold(f64::INFINITY, f64::min);
        if amount.is_finite() && amount > 0.0 {
            out[species] += amount;
            for (c, left) in elements.iter().zip(&mut left) {
                *left = (*left - c.weights[species] * amount).max(0.0);
            }
        }
    }
    let charge = |x: &[f64]| -> f64 {
        network.species.iter().zip(x).map(|(s, x)| f64::from(s.charge) * x).sum()
    };
    let surplus = charge(&out) - charge(start);
    if surplus > 0.0 {
        out[network.species_index("e-")?] += surplus;
    } else if surplus < -1e-12 {
        return None;
    }
    left.iter().all(|&left| left <= 1e-12).then_some(out)
}
