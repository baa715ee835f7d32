//! Reactions and their reverses: the ratio of their coefficients is fixed by
//! thermodynamics.

use std::collections::BTreeMap;

use crate::diagnostic::Finding;
use crate::network::{Network, Reaction};
use crate::rates::Axis;
use crate::species::spectroscopy::equilibrium_constant;

use super::{AuditOptions, factor_between, factor_text, held, is_nothing, place_of};

/// Temperatures at which pairs are compared, K.
const AT: [f64; 2] = [300.0, 1000.0];

pub(super) fn check(network: &Network, options: &AuditOptions, findings: &mut Vec<Finding>) {
    let sorted = |list: &[usize]| {
        let mut list = list.to_vec();
        list.sort_unstable();
        list
    };
    let mut by_sides: BTreeMap<(Vec<usize>, Vec<usize>), &Reaction> = BTreeMap::new();
    for reaction in &network.reactions {
        if reaction.law().axis() != Axis::Collision || reaction.reactants.len() != 2 {
            continue;
        }
        let (left, right) = (sorted(&reaction.reactants), sorted(&reaction.products));
        if let Some(reverse) = by_sides.get(&(right.clone(), left.clone())) {
            compare(network, options, reverse, reaction, findings);
        }
        by_sides.insert((left, right), reaction);
    }
}

fn compare(
    network: &Network,
    options: &AuditOptions,
    forward: &Reaction,
    reverse: &Reaction,
    findings: &mut Vec<Finding>,
) {
    let (left, right) = (network.reactants_of(forward), network.products_of(forward));
    let mut worst: Option<(f64, String)> = None;
    for temperature in AT {
        if !(forward.covers(temperature) && reverse.covers(temperature)) {
            continue;
        }
        let (Some(constant), Some(there), Some(back)) = (
            equilibrium_constant(&left, &right, temperature),
            held(network, forward, temperature),
            held(network, reverse, temperature),
        ) else {
            continue;
        };
        if is_nothing(forward, there.max(constant * back))
            || is_nothing(reverse, back.max(there / constant))
        {
            continue;
        }
        let factor = factor_between(there, constant * back);
        if factor < options.balance_factor || worst.as_ref().is_some_and(|(w, _)| *w >= factor) {
            continue;
        }
        let message = format!(
            "{} ({there:.2e}) and its reverse at {} ({back:.2e}) are {} from detailed balance \
             at {temperature} K, where forward over reverse is {constant:.2e}",
            forward.equation,
            reverse.rows[0].place,
            factor_text(factor)
        );
        worst = Some((factor, message));
    }
    if let Some((_, message)) = worst {
        findings.push(
            Finding::warning("audit-detailed-balance", place_of(forward), message)
                .remedy("derive the less certain one from the other"),
        );
    }
}
