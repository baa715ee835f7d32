//! `check`: how far a network can be trusted.

use super::arguments::CheckArguments;
use super::exit::{Exit, Outcome, Stop};
use super::load;
use super::output::Output;
use crate::diagnostic::{Finding, Severity, explain, sort};
use crate::network::Network;
use crate::network::audit::{AuditOptions, audit};
use crate::network::summary::{Count, summary};
use crate::report::table::{Cell, Column, Table};
use crate::report::text::{bar, wrap};

/// Findings of one code shown in text form before the rest is counted.
const EXAMPLES: usize = 4;

pub(super) fn run(arguments: &CheckArguments, output: &mut Output) -> Outcome {
    let texts = load::texts(&arguments.network)?;
    let (network, mut findings) = match Network::from_texts(&arguments.network, &texts) {
        Ok(loaded) => (Some(loaded.network), loaded.warnings),
        Err(findings) => (None, findings),
    };
    if let Some(network) = &network {
        let options = AuditOptions { every_row: arguments.every_row, ..AuditOptions::default() };
        findings.extend(audit(network, &options));
        sort(&mut findings);
        findings.dedup();
    }
    if output.for_people() {
        match &network {
            Some(network) => page(network, output)?,
            None => output.text(&format!("{}: does not load\n", arguments.network))?,
        }
        account(&findings, arguments.every_row || output.verbose, output)?;
    } else {
        output.table(&table(&findings))?;
    }
    let clean = findings.iter().all(|f| f.severity == Severity::Note);
    Ok(if clean { Exit::Done } else { Exit::WithFindings })
}

fn table(findings: &[Finding]) -> Table {
    let mut table = Table::new(["severity", "code", "place", "message"].map(Column::new).to_vec());
    for finding in findings {
        table.push(vec![
            Cell::text(finding.severity.as_str()),
            Cell::text(finding.code),
            Cell::text(finding.place.to_string()),
            Cell::text(message(finding)),
        ]);
    }
    table
}

fn message(finding: &Finding) -> String {
    if finding.remedy.is_empty() {
        finding.message.clone()
    } else {
        format!("{}; {}", finding.message, finding.remedy)
    }
}

/// What the network is made of.
fn page(network: &Network, output: &mut Output) -> Result<(), Stop> {
    let s = summary(network);
    let width = output.width();
    output.text(&format!("{} ({})\n", network.title, network.name))?;
    if !network.text.is_empty() {
        output.text(&format!("{}\n", wrap(&network.text, width - 2, 2)))?;
    }
    output.text(&format!(
        "\n  {} species of {}\n  {} reactions in {} rows; {} depend on temperature\n",
        s.species,
        s.elements.join(" "),
        s.reactions,
        s.rows,
        s.depend_on_temperature,
    ))?;
    let groups: [(&str, &[Count], usize); 5] = [
        ("species", &s.species_by_kind, s.species),
        ("laws, in reactions", &s.reactions_by_law, s.reactions),
        ("how the numbers are known, in rows", &s.rows_by_provenance, s.rows),
        ("uncertainty factor, in rows", &s.rows_by_uncertainty, s.rows),
        ("reactions with a row at this temperature", &s.covered_at, s.reactions),
    ];
    for (title, counts, total) in groups {
        histogram(title, counts, total, output)?;
    }
    let most: Vec<Count> = s.sources.iter().take(6).cloned().collect();
    histogram(
        &format!("most used of {} sources, in rows", s.sources.len()),
        &most,
        s.rows,
        output,
    )?;
    if output.verbose {
        let names: Vec<&str> = network.species.iter().map(|s| s.name.as_str()).collect();
        output.text(&format!("\n  species by name\n{}\n", wrap(&names.join(" "), width - 4, 4)))?;
    }
    Ok(())
}

fn histogram(title: &str, counts: &[Count], total: usize, output: &mut Output) -> Result<(), Stop> {
    let longest = counts.iter().map(|c| c.what.chars().count()).max().unwrap_or(0);
    output.text(&format!("\n  {title}\n"))?;
    for count in counts {
        let share = count.count as f64 / total.max(1) as f64;
        let bar = bar(share, 20, output.symbols());
        output.text(
            &format!("    {:<longest$} {:>5} {bar}\n", count.what, count.count)
                .replace(" \n", "\n"),
        )?;
    }
    Ok(())
}

/// Findings gathered by code, the worst first.
fn account(findings: &[Finding], all: bool, output: &mut Output) -> Result<(), Stop> {
    let count = |severity| findings.iter().filter(|f| f.severity == severity).count();
    output.text(&format!(
        "\nFindings: {}, {}, {}\n",
        plural(count(Severity::Error), "error"),
        plural(count(Severity::Warning), "warning"),
        plural(count(Severity::Note), "note"),
    ))?;
    let mut codes: Vec<(Severity, &str)> = findings.iter().map(|f| (f.severity, f.code)).collect();
    codes.sort_unstable();
    codes.dedup();
    let width = output.width();
    for (severity, code) in codes {
        let of_code: Vec<&Finding> =
            findings.iter().filter(|f| f.code == code && f.severity == severity).collect();
        output.text(&format!("\n{severity} {code} ({})\n", of_code.len()))?;
        if let Some(text) = explain(code) {
            output.text(&format!("{}\n", wrap(text, width - 2, 2)))?;
        }
        let shown = if all { of_code.len() } else { EXAMPLES };
        for finding in of_code.iter().take(shown) {
            let place = finding.place.to_string();
            let place = if place.is_empty() { String::new() } else { format!("{place}: ") };
            let text = wrap(&format!("{place}{}", message(finding)), width - 6, 6);
            output.text(&format!("    - {}\n", text.trim_start()))?;
        }
        if of_code.len() > shown {
            output.text(&format!(
                "      ... and {} more (--verbose shows all)\n",
                of_code.len() - shown
            ))?;
        }
    }
    Ok(())
}

fn plural(count: usize, what: &str) -> String {
    match count {
        0 => format!("no {what}"),
        1 => format!("1 {what}"),
        n => format!("{n} {what}s"),
    }
}
