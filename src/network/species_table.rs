//! The reader of `species.csv`: names, compositions and reference data.

use crate::diagnostic::Finding;
use crate::species::{FormulaErrorKind, Species};

use super::cell::maybe_number;
use super::load::Known;
use super::table::{Column, Record, Table, needed, optional};

const COLUMNS: &[Column] = &[
    needed("species"),
    optional("composition"),
    optional("delta_f_h_0K_kJ_mol"),
    optional("polarizability_A3"),
    optional("dipole_D"),
    optional("source"),
    optional("provenance"),
    optional("note"),
];

/// Reads the table onto `known`; what is wrong is added to `findings`.
pub(super) fn read(file: &str, text: &str, known: &mut Known, findings: &mut Vec<Finding>) {
    let Some(table) = Table::read(file, text, COLUMNS, findings) else {
        return;
    };
    for record in table.records() {
        let place = record.place("species");
        let name = record.text("species");
        if let Some(first) = known.place_of(name) {
            findings.push(
                Finding::error(
                    "network-duplicate-species",
                    place,
                    format!("species `{name}` is listed twice, first at {first}"),
                )
                .remedy("leave one out"),
            );
            continue;
        }
        // A name that cannot be read is remembered all the same, so that each
        // equation that uses it is not reported as well.
        let species = read_one(record, findings);
        let key = record.text("source");
        if !key.is_empty() {
            known.cite(key, record.place("source"));
        }
        known.add(name, place, species);
    }
}

fn read_one(record: Record<'_>, findings: &mut Vec<Finding>) -> Option<Species> {
    let name = record.text("species");
    let composition = Some(record.text("composition")).filter(|text| !text.is_empty());
    let made = Species::new(name, composition);
    let values = ["delta_f_h_0K_kJ_mol", "polarizability_A3", "dipole_D"]
        .map(|column| maybe_number(record, column, findings));
    for (column, value) in [("polarizability_A3", values[1]), ("dipole_D", values[2])] {
        if value.is_some_and(|value| value < 0.0) {
            let message = format!("{column} of {name} is negative");
            findings.push(
                Finding::error("network-negative", record.place(column), message)
                    .remedy("give its size, or leave the cell empty"),
            );
        }
    }
    let mut species = match made {
        Ok(species) => species,
        Err(error) => {
            let remedy = match (error.kind, composition) {
                (FormulaErrorKind::UnknownElement, _) => {
                    "correct the name, or say what it is made of in column composition"
                }
                (_, Some(_)) => "write a composition such as `H:2 O:1`",
                (_, None) => "write a name such as `H3O+`, or fill in column composition",
            };
            let in_name = composition.is_none();
            let mut place = record.place(if in_name { "species" } else { "composition" });
            place.column += crate::diagnostic::saturate(error.offset);
            findings.push(Finding::error(error.code(), place, error.message).remedy(remedy));
            return None;
        }
    };
    [species.enthalpy_kj_mol, species.polarizability_a3, species.dipole_d] = values;
    species.source = record.text("source").to_string();
    species.provenance = record.text("provenance").to_string();
    species.note = record.text("note").to_string();
    Some(species)
}
