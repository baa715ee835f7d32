//! Temperatures that no row covers, where it matters what is done there.

use crate::diagnostic::Finding;
use crate::network::{Network, Reaction, Row};

use super::{AuditOptions, factor_between, factor_text, is_nothing, number_text, of_row};

/// A stretch that no row covers, and the row and edge that are held there.
struct Stretch<'a> {
    low: f64,
    high: f64,
    row: &'a Row,
    edge: f64,
    /// The temperature of the stretch farthest from the edge.
    far: f64,
}

/// What to do about a barrier that is not let to close a reaction when cold.
const CLOSES: &str = "held, the barrier never closes it when cold: start the row at 5 K, or add a \
                      cold row if tunnelling is known";

/// What to do about any other stretch.
const OTHERWISE: &str = "widen the range if the formula may be trusted, or add a row";

pub(super) fn check(network: &Network, options: &AuditOptions, findings: &mut Vec<Finding>) {
    let (mut mild, mut short) = (0_usize, 0_usize);
    for reaction in &network.reactions {
        if !reaction.law().depends_on_temperature() {
            continue;
        }
        let stretches = stretches(reaction, options.coldest, options.hottest);
        if stretches.is_empty() {
            continue;
        }
        short += 1;
        let mut worst: Option<(f64, String, &Row, &str)> = None;
        for s in &stretches {
            let (Some(kept), Some(continued)) =
                (of_row(network, reaction, s.row, s.edge), of_row(network, reaction, s.row, s.far))
            else {
                continue;
            };
            if is_nothing(reaction, kept) && is_nothing(reaction, continued) {
                continue;
            }
            let factor = factor_between(kept, continued);
            if factor < options.range_factor || worst.as_ref().is_some_and(|(f, ..)| *f >= factor) {
                continue;
            }
            let message = format!(
                "{}: no row covers {} to {} K; held at {} K it is {}, the formula \
                 continued to {} K gives {}, {} apart",
                reaction.equation,
                s.low,
                s.high,
                s.edge,
                number_text(kept),
                s.far,
                number_text(continued),
                factor_text(factor)
            );
            let closes = s.row.gamma > 0.0 && s.far < s.edge && continued < kept;
            let remedy = if closes { CLOSES } else { OTHERWISE };
            worst = Some((factor, message, s.row, remedy));
        }
        match worst {
            Some((_, message, row, remedy)) => findings
                .push(Finding::warning("audit-range", row.place.clone(), message).remedy(remedy)),
            None => mild += 1,
        }
    }
    if mild > 0 {
        let message = format!(
            "{short} of {} reactions do not cover {} to {} K; in {mild} of them it makes less \
             than {} (or nothing) whether the edge is held or the formula continued",
            network.reactions.len(),
            options.coldest,
            options.hottest,
            factor_text(options.range_factor)
        );
        let place = super::file_beside(network, "reactions.csv");
        findings.push(Finding::note("audit-range", place, message));
    }
}

fn stretches(reaction: &Reaction, coldest: f64, hottest: f64) -> Vec<Stretch<'_>> {
    let rows = &reaction.rows;
    let mut list = Vec::new();
    let first = &rows[0];
    if first.t_min > coldest {
        let (low, high) = (coldest, first.t_min.min(hottest));
        list.push(Stretch { low, high, row: first, edge: first.t_min, far: low });
    }
    for pair in rows.windows(2) {
        let (low, high) = (pair[0].t_max, pair[1].t_min);
        if low < high && low < hottest && high > coldest {
            let middle = 0.5 * (low + high);
            list.push(Stretch { low, high, row: &pair[0], edge: low, far: middle });
            list.push(Stretch { low, high, row: &pair[1], edge: high, far: middle });
        }
    }
    let last = &rows[rows.len() - 1];
    if last.t_max < hottest {
        let (low, high) = (last.t_max.max(coldest), hottest);
        list.push(Stretch { low, high, row: last, edge: last.t_max, far: high });
    }
    list
}
