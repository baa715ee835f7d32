//! Species that nothing makes, or nothing destroys.

use crate::diagnostic::Finding;
use crate::network::{Extrapolate, Network};
use crate::rates::Conditions;

use super::{AuditOptions, file_beside, is_nothing};

pub(super) fn check(network: &Network, _: &AuditOptions, findings: &mut Vec<Finding>) {
    let mut made = vec![false; network.species.len()];
    let mut destroyed = vec![false; network.species.len()];
    let mut used = vec![false; network.species.len()];
    // Cold, and thin enough for starlight to come in.
    let conditions =
        Conditions { visual_extinction: 1.0, ..Conditions::default() }.with_default_columns();
    for reaction in &network.reactions {
        let value = network.coefficient(reaction, &conditions, Extrapolate::Hold).unwrap_or(0.0);
        let count =
            |list: &[usize], index: usize| list.iter().filter(|other| **other == index).count();
        for index in reaction.reactants.iter().chain(&reaction.products).copied() {
            used[index] = true;
            if is_nothing(reaction, value) {
                continue;
            }
            let before = count(&reaction.reactants, index);
            let after = count(&reaction.products, index);
            made[index] |= after > before;
            destroyed[index] |= after < before;
        }
    }
    let place = file_beside(network, "species.csv");
    let cases = [
        ("audit-never-used", "take part in no reaction", &used, "leave them out"),
        (
            "audit-never-made",
            "are made by nothing at 10 K",
            &made,
            "start with some, or add a source",
        ),
        (
            "audit-never-destroyed",
            "are destroyed by nothing at 10 K",
            &destroyed,
            "add what destroys them, or they pile up",
        ),
    ];
    for (code, what, marks, remedy) in cases {
        let names: Vec<&str> = network
            .species
            .iter()
            .zip(marks)
            .zip(&used)
            .filter(|((_, mark), used)| !**mark && (**used || code == "audit-never-used"))
            .map(|((species, _), _)| species.name.as_str())
            .collect();
        if !names.is_empty() {
            let message = format!("species that {what}: {}", names.join(", "));
            findings.push(Finding::warning(code, place.clone(), message).remedy(remedy));
        }
    }
}
