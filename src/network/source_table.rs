//! The reader of `sources.csv`: keys and citations.

use crate::diagnostic::Finding;

use super::Source;
use super::table::{Column, Table, needed, optional};

const COLUMNS: &[Column] = &[needed("key"), needed("citation"), optional("doi")];

/// Reads the table onto `sources`; what is wrong is added to `findings`.
pub(super) fn read(file: &str, text: &str, sources: &mut Vec<Source>, findings: &mut Vec<Finding>) {
    let Some(table) = Table::read(file, text, COLUMNS, findings) else {
        return;
    };
    for record in table.records() {
        let [key, citation, doi] = ["key", "citation", "doi"].map(|name| record.text(name));
        if let Some(message) = problem(key, citation) {
            findings.push(
                Finding::error("network-source-row", record.place("key"), message)
                    .remedy("give every source a key without blanks and a citation"),
            );
            continue;
        }
        let source =
            Source { key: key.to_string(), citation: citation.to_string(), doi: doi.to_string() };
        match sources.iter().find(|known| known.key == source.key) {
            // A network that builds on another may repeat its sources.
            Some(known) if known == &source => {}
            Some(_) => findings.push(
                Finding::error(
                    "network-duplicate-source",
                    record.place("key"),
                    format!("source `{key}` is listed twice, with different citations"),
                )
                .remedy("rename one, or make them the same"),
            ),
            None => sources.push(source),
        }
    }
}

fn problem(key: &str, citation: &str) -> Option<&'static str> {
    if key.is_empty() {
        Some("the key is empty")
    } else if key.contains(char::is_whitespace) {
        Some("the key holds blanks")
    } else if citation.is_empty() {
        Some("the citation is empty")
    } else {
        None
    }
}
