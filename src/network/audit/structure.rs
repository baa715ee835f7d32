//! Balance, dust schemes, data and doublets.

use std::collections::BTreeMap;

use crate::diagnostic::Finding;
use crate::network::{Network, assemble, balance};
use crate::rates::Law;
use crate::species::elements;

use super::{AuditOptions, file_beside, place_of};

pub(super) fn check(network: &Network, _: &AuditOptions, findings: &mut Vec<Finding>) {
    // Loading has excluded these; a network made in another way may have them.
    for reaction in &network.reactions {
        balance::check(reaction, &network.species, findings);
        assemble::check_overlap(reaction, findings);
    }
    assemble::check_dust_schemes(&network.reactions, &network.species, findings);
    made_up_elements(network, findings);
    twins(network, findings);
    data(network, findings);
    nothing_happens(network, findings);
}

fn made_up_elements(network: &Network, findings: &mut Vec<Finding>) {
    let unknown: Vec<String> = network
        .elements()
        .into_iter()
        .filter(|name| name != crate::species::GRAIN && elements::weight_u(name).is_none())
        .collect();
    if !unknown.is_empty() {
        let message = format!("elements without a known weight: {}", unknown.join(", "));
        let place = file_beside(network, "species.csv");
        findings.push(
            Finding::note("audit-made-up-element", place, message)
                .remedy("fine in a test network; their species have no mass"),
        );
    }
}

/// Species that look like one species under two names.
fn twins(network: &Network, findings: &mut Vec<Finding>) {
    let list = &network.species;
    for (at, one) in list.iter().enumerate() {
        for other in &list[at + 1..] {
            let (Some(a), Some(b)) = (one.enthalpy_kj_mol, other.enthalpy_kj_mol) else {
                continue;
            };
            let alike = one.atoms == other.atoms
                && one.charge == other.charge
                && one.phase == other.phase
                && (a - b).abs() < 1e-9;
            if alike {
                let message = format!(
                    "{} and {} have the same atoms, charge and enthalpy",
                    one.name, other.name
                );
                findings.push(
                    Finding::warning("audit-twins", file_beside(network, "species.csv"), message)
                        .remedy(
                            "if they are one species, use one name; isomers differ in enthalpy",
                        ),
                );
            }
        }
    }
}

/// Reference data that checks or laws would like to have.
fn data(network: &Network, findings: &mut Vec<Finding>) {
    let place = || file_beside(network, "species.csv");
    let without: Vec<&str> = network
        .species
        .iter()
        .filter(|s| s.mass_u.is_some() && s.enthalpy_kj_mol.is_none())
        .map(|s| s.name.as_str())
        .collect();
    if !without.is_empty() {
        let message = format!(
            "{} of {} species have no enthalpy, so reactions with them are not judged: {}",
            without.len(),
            network.species.len(),
            without.join(", ")
        );
        findings.push(
            Finding::note("audit-no-enthalpy", place(), message)
                .remedy("fill in delta_f_h_0K_kJ_mol"),
        );
    }
    let mut dipoles: BTreeMap<&str, u32> = BTreeMap::new();
    for reaction in &network.reactions {
        if !reaction.rows.iter().any(|row| row.law == Law::Capture) {
            continue;
        }
        for species in network.reactants_of(reaction) {
            if species.is_neutral_gas() && species.dipole_d.is_none() {
                *dipoles.entry(&species.name).or_default() += 1;
            }
        }
    }
    for (name, count) in dipoles {
        let message =
            format!("{count} reactions take capture by {name}, whose dipole is not given");
        findings.push(
            Finding::warning("audit-no-dipole", place(), message)
                .remedy("fill in dipole_D; an empty cell counts as 0"),
        );
    }
}

/// Equations that change nothing.
fn nothing_happens(network: &Network, findings: &mut Vec<Finding>) {
    for reaction in &network.reactions {
        let (mut left, mut right) = (reaction.reactants.clone(), reaction.products.clone());
        left.sort_unstable();
        right.sort_unstable();
        if left == right {
            let message = format!("{} changes nothing", reaction.equation);
            findings.push(
                Finding::warning("audit-no-change", place_of(reaction), message)
                    .remedy("leave it out"),
            );
        }
    }
}
