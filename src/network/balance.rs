//! Whether an equation keeps its atoms and its charge.

use crate::diagnostic::Finding;
use crate::species::Species;

use super::Reaction;

/// Adds a finding for each element, and for charge, that does not balance.
pub(super) fn check(reaction: &Reaction, species: &[Species], findings: &mut Vec<Finding>) {
    let place = &reaction.rows[0].place;
    let mut elements: Vec<&str> = reaction
        .reactants
        .iter()
        .chain(&reaction.products)
        .flat_map(|index| species[*index].atoms.iter().map(|(element, _)| element.as_str()))
        .collect();
    elements.sort_unstable();
    elements.dedup();
    let mut uneven = Vec::new();
    for element in elements {
        let count = |side: &[usize]| -> u64 {
            side.iter().map(|index| u64::from(species[*index].count(element))).sum()
        };
        let (left, right) = (count(&reaction.reactants), count(&reaction.products));
        if left != right {
            uneven.push(format!("{element} {left} against {right}"));
        }
    }
    if !uneven.is_empty() {
        let message = format!("{}: atoms do not balance: {}", reaction.equation, uneven.join(", "));
        findings.push(
            Finding::error("network-atoms", place.clone(), message)
                .remedy("correct the equation or the compositions"),
        );
    }
    let charge = |side: &[usize]| -> i64 {
        side.iter().map(|index| i64::from(species[*index].charge)).sum()
    };
    let (left, right) = (charge(&reaction.reactants), charge(&reaction.products));
    if left != right {
        let message =
            format!("{}: charge does not balance: {left} against {right}", reaction.equation);
        findings.push(
            Finding::error("network-charge", place.clone(), message)
                .remedy("correct the charges, or add the missing e-"),
        );
    }
}
