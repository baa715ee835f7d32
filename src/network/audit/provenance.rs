//! Where numbers come from: missing, unused and remembered sources.

use std::collections::BTreeMap;

use crate::diagnostic::{Finding, Severity};
use crate::network::{Network, Row};

use super::{AuditOptions, file_beside};

/// Most names that one finding lists.
const LISTED: usize = 12;

pub(super) fn check(network: &Network, options: &AuditOptions, findings: &mut Vec<Finding>) {
    let rows: Vec<&Row> = network.reactions.iter().flat_map(|r| &r.rows).collect();
    let unsourced: Vec<&Row> = rows.iter().copied().filter(|row| row.source.is_empty()).collect();
    report(
        network,
        options,
        (Severity::Warning, "audit-no-source", "name no source", "fill in source"),
        &unsourced,
        rows.len(),
        findings,
    );
    let mut by_word: BTreeMap<&str, Vec<&Row>> = BTreeMap::new();
    for row in &rows {
        by_word.entry(&row.provenance).or_default().push(row);
    }
    for (word, of_word) in &by_word {
        if *word == "seen" {
            continue;
        }
        let what = if word.is_empty() {
            "do not say how their number was obtained".to_string()
        } else {
            format!("have provenance `{word}`")
        };
        let remedy = "check against the paper, then write `seen`";
        let kind = (Severity::Note, "audit-provenance", what.as_str(), remedy);
        report(network, options, kind, of_word, rows.len(), findings);
    }
    unused(network, findings);
}

/// One finding per row, or one for all of them.
fn report(
    network: &Network,
    options: &AuditOptions,
    (severity, code, what, remedy): (Severity, &'static str, &str, &str),
    rows: &[&Row],
    total: usize,
    findings: &mut Vec<Finding>,
) {
    if rows.is_empty() {
        return;
    }
    if options.every_row {
        for row in rows {
            let message = format!("row `{}`: rows like this {what}", row.id);
            findings.push(Finding::new(severity, code, row.place.clone(), message).remedy(remedy));
        }
        return;
    }
    let message = format!("{} of {total} rows {what}", rows.len());
    let place = file_beside(network, "reactions.csv");
    findings.push(Finding::new(severity, code, place, message).remedy(remedy));
}

fn unused(network: &Network, findings: &mut Vec<Finding>) {
    let cited = |key: &str| {
        network.species.iter().any(|species| species.source == key)
            || network.reactions.iter().any(|r| r.rows.iter().any(|row| row.source == key))
    };
    let names: Vec<&str> = network
        .sources
        .iter()
        .map(|source| source.key.as_str())
        .filter(|key| !cited(key))
        .collect();
    if names.is_empty() {
        return;
    }
    let more = names.len().saturating_sub(LISTED);
    let mut list = names[..names.len().min(LISTED)].join(", ");
    if more > 0 {
        list.push_str(&format!(" and {more} more"));
    }
    let message = format!("{} sources are cited by nothing: {list}", names.len());
    findings.push(
        Finding::note("audit-unused-source", file_beside(network, "sources.csv"), message)
            .remedy("leave them out"),
    );
}
