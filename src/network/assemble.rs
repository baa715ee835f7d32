//! From rows to reactions: pieces of one coefficient are put together, and what
//! cannot stand together is reported.

use std::collections::BTreeMap;

use crate::diagnostic::{Finding, Place};
use crate::rates::{Axis, Conditions, Law, Participants};
use crate::species::Species;

use super::{Network, Reaction, Row, balance};

/// A row with its equation.
#[derive(Clone, Debug)]
pub(super) struct Entry {
    pub(super) equation: String,
    pub(super) reactants: Vec<usize>,
    pub(super) products: Vec<usize>,
    pub(super) row: Row,
}

/// What makes rows pieces of one reaction: both sides in any order, and the
/// axis of the law.
type Key = (Vec<usize>, Vec<usize>, Axis);

fn sorted(list: &[usize]) -> Vec<usize> {
    let mut list = list.to_vec();
    list.sort_unstable();
    list
}

/// The rows of a network, reaction by reaction.
pub(super) fn entries_of(network: &Network) -> Vec<Entry> {
    let mut entries = Vec::new();
    for reaction in &network.reactions {
        for row in &reaction.rows {
            entries.push(Entry {
                equation: reaction.equation.clone(),
                reactants: reaction.reactants.clone(),
                products: reaction.products.clone(),
                row: row.clone(),
            });
        }
    }
    entries
}

/// Puts rows together and checks them; what is wrong is added to `findings`.
pub(super) fn reactions(
    entries: Vec<Entry>,
    species: &[Species],
    findings: &mut Vec<Finding>,
) -> Vec<Reaction> {
    let mut reactions: Vec<Reaction> = Vec::new();
    let mut by_key: BTreeMap<Key, usize> = BTreeMap::new();
    let mut by_id: BTreeMap<String, (usize, Place)> = BTreeMap::new();
    for entry in entries {
        let Entry { equation, reactants, products, row } = entry;
        check_row(&row, &equation, &reactants, &products, species, findings);
        let key = (sorted(&reactants), sorted(&products), row.law.axis());
        let index = *by_key.entry(key).or_insert(reactions.len());
        match by_id.get(&row.id) {
            Some((other, place)) if *other != index => {
                let message = format!("id `{}` already stands for another reaction", row.id);
                findings.push(
                    Finding::error("network-duplicate-id", row.place.clone(), message)
                        .remedy(format!("rename this one or the one at {place}")),
                );
            }
            Some(_) => {}
            None => {
                by_id.insert(row.id.clone(), (index, row.place.clone()));
            }
        }
        if index == reactions.len() {
            let depends_on = depends_on(row.law, &reactants, &products, species);
            let id = row.id.clone();
            let rows = vec![row];
            reactions.push(Reaction { id, equation, reactants, products, depends_on, rows });
        } else {
            reactions[index].rows.push(row);
        }
    }
    for reaction in &mut reactions {
        reaction.rows.sort_by(|a, b| a.t_min.total_cmp(&b.t_min));
        reaction.id.clone_from(&reaction.rows[0].id);
        balance::check(reaction, species, findings);
        check_overlap(reaction, findings);
    }
    check_dust_schemes(&reactions, species, findings);
    reactions
}

fn picked<'a>(indices: &[usize], species: &'a [Species]) -> Vec<&'a Species> {
    indices.iter().map(|index| &species[*index]).collect()
}

fn depends_on(
    law: Law,
    reactants: &[usize],
    products: &[usize],
    species: &[Species],
) -> Vec<usize> {
    let (left, right) = (picked(reactants, species), picked(products, species));
    let participants = Participants { reactants: &left, products: &right };
    law.depends_on(participants).into_iter().map(|at| reactants[at]).collect()
}

/// The law must fit the species, and numbers it does not use should be zero.
fn check_row(
    row: &Row,
    equation: &str,
    reactants: &[usize],
    products: &[usize],
    species: &[Species],
    findings: &mut Vec<Finding>,
) {
    let (left, right) = (picked(reactants, species), picked(products, species));
    let participants = Participants { reactants: &left, products: &right };
    let conditions = Conditions::default();
    if let Err(error) = row.law.coefficient(row.numbers(), participants, &conditions, row.t_max) {
        findings.push(
            Finding::error(error.code(), row.place.clone(), format!("{equation}: {error}"))
                .remedy(error.remedy()),
        );
    }
    let numbers = [("beta", row.beta), ("gamma", row.gamma)];
    for ((name, value), used) in numbers.into_iter().zip(&row.law.uses()[1..]) {
        if !used && value.abs() > 0.0 {
            let law = row.law.name();
            let message = format!("{equation}: law `{law}` does not use {name}, which is {value}");
            findings.push(
                Finding::warning("network-unused-number", row.place.clone(), message)
                    .remedy("write 0, or choose the law that was meant"),
            );
        }
    }
}

/// Rows of one reaction may touch, not overlap.
pub(super) fn check_overlap(reaction: &Reaction, findings: &mut Vec<Finding>) {
    for pair in reaction.rows.windows(2) {
        if pair[0].t_max > pair[1].t_min {
            let message = format!(
                "{}: {} to {} K overlaps {} to {} K of the row at {}",
                reaction.equation,
                pair[1].t_min,
                pair[1].t_max,
                pair[0].t_min,
                pair[0].t_max,
                pair[0].place
            );
            findings.push(
                Finding::error("network-overlap", pair[1].place.clone(), message)
                    .remedy("let the ranges touch, or leave one row out"),
            );
        }
    }
}

/// A network uses explicit grains or the effective form, never both.
pub(super) fn check_dust_schemes(
    reactions: &[Reaction],
    species: &[Species],
    findings: &mut Vec<Finding>,
) {
    let on_dust = |reaction: &&Reaction| reaction.law() == Law::DustRecombination;
    let explicit = |reaction: &&Reaction| reaction.reactants.iter().any(|i| species[*i].is_grain());
    let with_grains = reactions.iter().filter(on_dust).find(explicit);
    let effective = reactions.iter().filter(on_dust).find(|reaction| !explicit(reaction));
    if let (Some(a), Some(b)) = (with_grains, effective) {
        let message = format!(
            "two ways of recombining on dust are mixed: grains ({}, at {}) and the effective \
             form ({})",
            a.equation, a.rows[0].place, b.equation
        );
        findings
            .push(Finding::error("network-mixed-dust", b.rows[0].place.clone(), message).remedy(
                "keep the effective rows for diffuse gas, or the grain rows for dense gas",
            ));
    }
}
