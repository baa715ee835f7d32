//! Formulas that blow up when continued beyond their rows.
//!
//! Holding the edge, the default, is safe; these rows are why.

use crate::diagnostic::{Finding, Place};
use crate::network::{Extrapolate, Network};

use super::magnitude::limit;
use super::{AuditOptions, conditions_at, file_beside, held, temperatures};

pub(super) fn check(network: &Network, options: &AuditOptions, findings: &mut Vec<Finding>) {
    let mut all: Vec<(Place, String)> = Vec::new();
    for reaction in &network.reactions {
        let Some((limit, _)) = limit(network, reaction) else {
            continue;
        };
        let worst = temperatures(options.coldest, options.hottest, 60)
            .filter(|t| !reaction.covers(*t))
            .filter(|t| held(network, reaction, *t).is_some_and(|value| value <= limit))
            .map(|t| {
                let formula = Extrapolate::Formula;
                (network.coefficient(reaction, &conditions_at(t), formula), t)
            })
            .map(|(value, t)| (value.unwrap_or(f64::INFINITY), t))
            .filter(|(value, _)| *value > limit)
            .max_by(|a, b| a.0.total_cmp(&b.0));
        if let Some((value, temperature)) = worst {
            let row = reaction.active_row(temperature).0;
            let message = format!(
                "{}: continued to {temperature:.0} K the formula gives {value:.1e}",
                reaction.equation
            );
            all.push((row.place.clone(), message));
        }
    }
    let remedy = "hold the edge there; do not run with extrapolate = \"formula\"";
    if options.every_row {
        for (place, message) in all {
            findings.push(Finding::note("audit-continuation", place, message).remedy(remedy));
        }
    } else if !all.is_empty() {
        let equations: Vec<String> = all.iter().map(|(_, message)| message.clone()).collect();
        let message = format!(
            "{} formulas blow up when continued beyond their range: {}",
            all.len(),
            equations.join("; ")
        );
        let place = file_beside(network, "reactions.csv");
        findings.push(Finding::note("audit-continuation", place, message).remedy(remedy));
    }
}
