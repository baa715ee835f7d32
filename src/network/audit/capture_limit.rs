//! Ions and neutrals that react more often than they meet.

use std::collections::BTreeMap;

use crate::diagnostic::Finding;
use crate::network::{Network, Reaction};
use crate::rates::{Axis, capture};

use super::{AuditOptions, held, place_of};

/// Temperatures at which the sum over channels is compared, K.
const AT: [f64; 3] = [10.0, 100.0, 300.0];

pub(super) fn check(network: &Network, options: &AuditOptions, findings: &mut Vec<Finding>) {
    let mut pairs: BTreeMap<(usize, usize), Vec<&Reaction>> = BTreeMap::new();
    for reaction in &network.reactions {
        if let ([a, b], Axis::Collision) = (reaction.reactants.as_slice(), reaction.law().axis()) {
            pairs.entry((*a.min(b), *a.max(b))).or_default().push(reaction);
        }
    }
    for ((a, b), channels) in pairs {
        let (one, other) = (&network.species[a], &network.species[b]);
        let mut worst: Option<(f64, f64, f64, f64)> = None;
        for temperature in AT {
            let Ok(limit) = capture::of_pair(one, other, temperature) else {
                break;
            };
            let sum: f64 = channels.iter().filter_map(|r| held(network, r, temperature)).sum();
            let ratio = sum / limit;
            if ratio > options.capture_factor && worst.is_none_or(|(w, ..)| ratio > w) {
                worst = Some((ratio, sum, limit, temperature));
            }
        }
        if let Some((ratio, sum, limit, temperature)) = worst {
            let ids: Vec<&str> = channels.iter().map(|reaction| reaction.id.as_str()).collect();
            let message = format!(
                "{} + {}: {sum:.2e} at {temperature} K is {ratio:.2} times the capture \
                 coefficient {limit:.2e} (rows {})",
                one.name,
                other.name,
                ids.join(", ")
            );
            findings.push(
                Finding::warning("audit-beyond-capture", place_of(channels[0]), message)
                    .remedy("cut the channels to the capture limit, or say in the note why not"),
            );
        }
    }
}
