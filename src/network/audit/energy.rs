//! Barriers against reaction enthalpies.

use crate::diagnostic::Finding;
use crate::network::{Network, Reaction, Row};
use crate::rates::{Axis, Law};
use crate::units::KELVIN_PER_KJ_MOL;

use super::{AuditOptions, file_beside, of_row, place_of};

/// Reaction enthalpy at 0 K, kJ mol^-1; none when a value is missing.
pub(super) fn enthalpy(network: &Network, reaction: &Reaction) -> Option<f64> {
    let side = |list: &[usize]| -> Option<f64> {
        list.iter().map(|index| network.species[*index].enthalpy_kj_mol).sum()
    };
    Some(side(&reaction.products)? - side(&reaction.reactants)?)
}

/// How much larger than the Arrhenius limit a coefficient may be; covers tunnelling,
/// excited levels and fits that are only nearly right. Our choice.
const SLACK: f64 = 30.0;

/// Exothermic by at least this, a reaction counts as strongly downhill, kJ/mol.
/// Our choice.
const DOWNHILL_KJ_MOL: f64 = 30.0;

/// Barriers below this are not remarked on, K. Our choice.
const SMALL_BARRIER_K: f64 = 100.0;

pub(super) fn check(network: &Network, options: &AuditOptions, findings: &mut Vec<Finding>) {
    let mut hindered = Vec::new();
    for reaction in &network.reactions {
        if reaction.law().axis() != Axis::Collision || reaction.reactants.len() != 2 {
            continue;
        }
        let Some(change) = enthalpy(network, reaction) else {
            continue;
        };
        let uphill = (change - options.enthalpy_tolerance_kj_mol) * KELVIN_PER_KJ_MOL;
        if uphill > 0.0 {
            uphill_rows(network, reaction, change, uphill, findings);
        } else if change < -DOWNHILL_KJ_MOL {
            let barrier = reaction.rows.iter().fold(0.0, |most: f64, row| most.max(row.gamma));
            if barrier < SMALL_BARRIER_K {
                continue;
            }
            if network.reactants_of(reaction).iter().any(|s| s.is_ion()) {
                let message = format!(
                    "{}: a barrier of {barrier} K although it is downhill by {:.0} kJ/mol; ions \
                     seldom have one",
                    reaction.equation, -change
                );
                findings.push(
                    Finding::note("audit-ion-barrier", place_of(reaction), message)
                        .remedy("keep it if it was measured, and say so in the note"),
                );
            } else {
                hindered.push(reaction);
            }
        }
    }
    note_hindered(network, options, &hindered, findings);
}

fn uphill_rows(
    network: &Network,
    reaction: &Reaction,
    change: f64,
    uphill: f64,
    findings: &mut Vec<Finding>,
) {
    for row in &reaction.rows {
        if row.law == Law::Capture {
            let message = format!(
                "{}: uphill by {change:.1} kJ/mol, yet every capture is taken to react",
                reaction.equation
            );
            findings.push(uphill_finding(row, message));
            continue;
        }
        // Where the row starts is where a missing barrier shows most.
        let temperature = row.t_min.max(10.0);
        let Some(value) = of_row(network, reaction, row, temperature) else {
            continue;
        };
        let fastest = 1e-9_f64.max(row.alpha) * libm::exp(-uphill / temperature) * SLACK;
        // Slower than once in the age of the universe at 1e4 cm^-3.
        if value > fastest && value > 1e-22 {
            let message = format!(
                "{}: uphill by {change:.1} kJ/mol ({:.0} K), yet {value:.1e} at {temperature} K \
                 (barrier {} K)",
                reaction.equation,
                change * KELVIN_PER_KJ_MOL,
                row.gamma
            );
            findings.push(uphill_finding(row, message));
        } else if row.gamma > 0.0 && row.gamma < 0.5 * uphill {
            let message = format!(
                "{}: a barrier of {} K is less than half of the {:.0} K it goes uphill",
                reaction.equation,
                row.gamma,
                change * KELVIN_PER_KJ_MOL
            );
            findings.push(
                Finding::warning("audit-low-barrier", row.place.clone(), message)
                    .remedy("raise gamma to at least the enthalpy, or check the enthalpies"),
            );
        }
    }
}

fn uphill_finding(row: &Row, message: String) -> Finding {
    Finding::warning("audit-uphill", row.place.clone(), message)
        .remedy("give it a barrier, leave it out, or check the enthalpies of its species")
}

fn note_hindered(
    network: &Network,
    options: &AuditOptions,
    hindered: &[&Reaction],
    findings: &mut Vec<Finding>,
) {
    if options.every_row {
        for reaction in hindered {
            let message = format!("{}: downhill with a barrier", reaction.equation);
            findings.push(Finding::note("audit-neutral-barrier", place_of(reaction), message));
        }
    } else if !hindered.is_empty() {
        let message = format!(
            "{} reactions of neutrals are downhill and have a barrier, which is normal",
            hindered.len()
        );
        let place = file_beside(network, "reactions.csv");
        findings.push(Finding::note("audit-neutral-barrier", place, message));
    }
}
