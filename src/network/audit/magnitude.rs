//! Coefficients larger than anything that collides.

use crate::diagnostic::Finding;
use crate::network::{Network, Reaction};
use crate::rates::{Axis, Law};
use crate::species::Species;

use super::{AuditOptions, held, temperatures};

/// Largest believable coefficient of a collision, and what it is for; none for
/// laws that are not collisions.
///
/// Electrons with ions reach 1e-6 to 1e-5 near 10 K, ions with polar molecules
/// a few 1e-8, opposite ions 1e-6, neutrals about 1e-9; three bodies
/// stay below about 1e-26. Common practice, rounded up.
pub(super) fn limit(network: &Network, reaction: &Reaction) -> Option<(f64, &'static str)> {
    if reaction.law().axis() != Axis::Collision && reaction.law() != Law::DustRecombination {
        return None;
    }
    let reactants = network.reactants_of(reaction);
    let charged = |s: &&Species| s.charge != 0;
    match reactants.as_slice() {
        [a, b] if a.is_grain() || b.is_grain() => None,
        [a, b] if a.charge * b.charge < 0 => Some((1e-5, "two opposite charges")),
        [_, _] if reactants.iter().any(charged) => Some((1e-6, "two bodies with an ion")),
        [_, _] => Some((3e-9, "two neutrals")),
        [_, _, _] => Some((1e-25, "three bodies")),
        _ => None,
    }
    .filter(|_| reaction.depends_on.len() == reactants.len())
}

pub(super) fn check(network: &Network, options: &AuditOptions, findings: &mut Vec<Finding>) {
    for reaction in &network.reactions {
        let Some((limit, kind)) = limit(network, reaction) else {
            continue;
        };
        let worst = temperatures(options.coldest, options.hottest, 60)
            .filter_map(|t| held(network, reaction, t).map(|value| (value, t)))
            .fold((0.0, 0.0), |best: (f64, f64), now| if now.0 > best.0 { now } else { best });
        if worst.0 > limit {
            let (value, temperature) = worst;
            let row = reaction.active_row(temperature).0;
            let message = format!(
                "{}: {value:.1e} at {temperature:.0} K, above {limit:.0e} for {kind}",
                reaction.equation
            );
            findings.push(
                Finding::warning("audit-too-fast", row.place.clone(), message)
                    .remedy("check alpha, its power of ten and the range of the row"),
            );
        }
    }
}
