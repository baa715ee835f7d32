//! The reader of `reactions.csv`: equations, laws and their numbers.

use crate::diagnostic::{Finding, nearest, saturate};
use crate::rates::{Law, LawNameError};

use super::Row;
use super::assemble::Entry;
use super::cell::number;
use super::equation::Equation;
use super::load::Known;
use super::table::{Column, Record, Table, needed, optional};

const COLUMNS: &[Column] = &[
    needed("id"),
    needed("equation"),
    needed("law"),
    needed("alpha"),
    needed("beta"),
    needed("gamma"),
    needed("t_min"),
    needed("t_max"),
    needed("uncertainty"),
    needed("source"),
    optional("provenance"),
    optional("note"),
];

/// Reads the table onto `entries`; what is wrong is added to `findings`.
pub(super) fn read(
    file: &str,
    text: &str,
    known: &mut Known,
    entries: &mut Vec<Entry>,
    findings: &mut Vec<Finding>,
) {
    let Some(table) = Table::read(file, text, COLUMNS, findings) else {
        return;
    };
    for record in table.records() {
        let key = record.text("source");
        if !key.is_empty() {
            known.cite(key, record.place("source"));
        }
        let sides = read_equation(record, known, findings);
        let row = read_row(record, findings);
        if let (Some((equation, reactants, products)), Some(row)) = (sides, row) {
            entries.push(Entry { equation, reactants, products, row });
        }
    }
}

type Sides = (String, Vec<usize>, Vec<usize>);

fn read_equation(record: Record<'_>, known: &Known, findings: &mut Vec<Finding>) -> Option<Sides> {
    let place_at = |offset: usize| {
        let mut place = record.place("equation");
        place.column = place.column.saturating_add(saturate(offset));
        place
    };
    let equation = match Equation::parse(record.text("equation")) {
        Ok(equation) => equation,
        Err(error) => {
            let place = place_at(error.offset);
            findings.push(
                Finding::error("network-equation", place, error.message)
                    .remedy("write it like `H3O+ + e- -> OH + 2 H`"),
            );
            return None;
        }
    };
    let mut all = true;
    let mut side = |names: &[(String, usize)]| {
        let mut indices = Vec::new();
        for (name, offset) in names {
            match known.find(name) {
                Some(Some(index)) => indices.push(index),
                Some(None) => all = false,
                None => {
                    all = false;
                    let remedy = match nearest(name, known.names()) {
                        Some(near) => format!("did you mean `{near}`? or list it in species.csv"),
                        None => "list it in species.csv".to_string(),
                    };
                    let message = format!("species `{name}` is not listed in species.csv");
                    let place = place_at(*offset);
                    let finding = Finding::error("network-unknown-species", place, message);
                    findings.push(finding.remedy(remedy));
                }
            }
        }
        indices
    };
    let reactants = side(&equation.reactants);
    let products = side(&equation.products);
    all.then(|| (equation.canonical(), reactants, products))
}

fn read_row(record: Record<'_>, findings: &mut Vec<Finding>) -> Option<Row> {
    let id = record.text("id");
    if id.is_empty() || id.contains(char::is_whitespace) {
        let message = format!("`{id}` is not an id");
        findings.push(
            Finding::error("network-id", record.place("id"), message)
                .remedy("give every row a short id without blanks"),
        );
    }
    let law = read_law(record, findings);
    let mut wrong = |code, column: &str, message: String, remedy: &str| {
        findings.push(Finding::error(code, record.place(column), message).remedy(remedy));
    };
    let mut problems = Vec::new();
    let mut read = |column, default| number(record, column, default, &mut problems);
    let alpha = read("alpha", None);
    let beta = read("beta", Some(0.0));
    let gamma = read("gamma", Some(0.0));
    let t_min = read("t_min", None);
    let t_max = read("t_max", None);
    let uncertainty = read("uncertainty", None);
    if let Some(alpha) = alpha.filter(|alpha| *alpha < 0.0) {
        let message = format!("alpha is negative ({alpha:e})");
        wrong("network-negative", "alpha", message, "coefficients are not negative");
    }
    if let Some(factor) = uncertainty.filter(|factor| *factor < 1.0) {
        let message = format!("uncertainty is {factor}, which is below 1");
        let remedy = "it is the factor F either way: 1 is certain, 2 is k/2 to 2k";
        wrong("network-uncertainty", "uncertainty", message, remedy);
    }
    if let Some(low) = t_min.filter(|low| *low <= 0.0) {
        let message = format!("t_min is {low} K");
        wrong("network-range", "t_min", message, "temperatures are above 0 K");
    } else if let (Some(low), Some(high)) = (t_min, t_max)
        && low >= high
    {
        let message = format!("the range {low} to {high} K is empty");
        wrong("network-range", "t_max", message, "t_min is below t_max");
    }
    findings.append(&mut problems);
    Some(Row {
        id: id.to_string(),
        law: law?,
        alpha: alpha?,
        beta: beta?,
        gamma: gamma?,
        t_min: t_min?,
        t_max: t_max?,
        uncertainty: uncertainty?,
        source: record.text("source").to_string(),
        provenance: record.text("provenance").to_string(),
        note: record.text("note").to_string(),
        place: record.place("id"),
    })
}

fn read_law(record: Record<'_>, findings: &mut Vec<Finding>) -> Option<Law> {
    let error = match Law::from_name(record.text("law")) {
        Ok(law) => return Some(law),
        Err(error) => error,
    };
    let names = || Law::ALL.iter().map(|law| law.name());
    let (code, remedy) = match &error {
        LawNameError::NotYetBuilt(_) => {
            ("network-law-not-built", "leave the row out for now".to_string())
        }
        LawNameError::Unknown(word) => match nearest(word, names()) {
            Some(name) => ("network-law", format!("did you mean `{name}`?")),
            None => ("network-law", format!("laws are {}", names().collect::<Vec<_>>().join(", "))),
        },
    };
    findings.push(Finding::error(code, record.place("law"), error.to_string()).remedy(remedy));
    None
}
