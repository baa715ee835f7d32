//! Jumps between neighbouring pieces of one coefficient.

use crate::diagnostic::Finding;
use crate::network::Network;

use super::{AuditOptions, factor_between, factor_text, of_row};

pub(super) fn check(network: &Network, options: &AuditOptions, findings: &mut Vec<Finding>) {
    for reaction in &network.reactions {
        for pair in reaction.rows.windows(2) {
            let (below, above) = (&pair[0], &pair[1]);
            let (Some(left), Some(right)) = (
                of_row(network, reaction, below, below.t_max),
                of_row(network, reaction, above, above.t_min),
            ) else {
                continue;
            };
            let factor = factor_between(left, right);
            if factor <= options.seam_factor {
                continue;
            }
            let message = format!(
                "{}: the coefficient jumps by {} from {left:.2e} at {} K to {right:.2e} at {} K",
                reaction.equation,
                factor_text(factor),
                below.t_max,
                above.t_min
            );
            findings.push(
                Finding::warning("audit-seam", above.place.clone(), message)
                    .remedy("move the edge to where the pieces meet, or refit one"),
            );
        }
    }
}
