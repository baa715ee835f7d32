//! Tables with a header, whose cells are looked up by column name.
//!
//! Columns may stand in any order; unknown, doubled and missing ones, and records
//! of the wrong length, are reported.

mod cells;

use std::collections::BTreeMap;

use crate::diagnostic::{Finding, Place, nearest};

use cells::{Cell, split};

/// A column that a table may or must have.
pub(super) struct Column {
    pub(super) name: &'static str,
    pub(super) required: bool,
}

/// Shorthand for a column that must be there.
pub(super) const fn needed(name: &'static str) -> Column {
    Column { name, required: true }
}

/// Shorthand for a column that may be left out.
pub(super) const fn optional(name: &'static str) -> Column {
    Column { name, required: false }
}

/// A table: its file and its records, looked up by column name.
pub(super) struct Table {
    pub(super) file: String,
    columns: BTreeMap<String, usize>,
    records: Vec<Vec<Cell>>,
}

/// One record of a table.
#[derive(Clone, Copy)]
pub(super) struct Record<'a> {
    table: &'a Table,
    cells: &'a [Cell],
}

impl Table {
    /// Reads a table with the given columns; what is wrong is added to
    /// `findings`. None when the header cannot be used.
    pub(super) fn read(
        file: &str,
        text: &str,
        columns: &[Column],
        findings: &mut Vec<Finding>,
    ) -> Option<Self> {
        let mut records = split(file, text, findings).into_iter();
        let Some(header) = records.next() else {
            let names: Vec<&str> = columns.iter().map(|column| column.name).collect();
            findings.push(
                Finding::error("network-empty-file", Place::file(file), "the file is empty")
                    .remedy(format!("start it with the line `{}`", names.join(","))),
            );
            return None;
        };
        let positions = read_header(file, &header, columns, findings)?;
        let mut kept = Vec::new();
        for record in records {
            if record.len() == header.len() {
                kept.push(record);
                continue;
            }
            let place = Place::new(file, record[0].line, record[0].column);
            let message = format!("{} cells where the header has {}", record.len(), header.len());
            findings.push(
                Finding::error("network-fields", place, message)
                    .remedy("put a cell that holds a comma in quotes, or add what is missing"),
            );
        }
        Some(Self { file: file.to_string(), columns: positions, records: kept })
    }

    /// The records, in order.
    pub(super) fn records(&self) -> impl Iterator<Item = Record<'_>> {
        self.records.iter().map(|cells| Record { table: self, cells })
    }
}

impl<'a> Record<'a> {
    /// The cell of a column; an empty one when the table lacks the column.
    pub(super) fn cell(&self, column: &str) -> &'a Cell {
        static EMPTY: Cell = Cell { text: String::new(), line: 0, column: 0 };
        self.table.columns.get(column).map_or(&EMPTY, |at| &self.cells[*at])
    }

    /// The text of a column.
    pub(super) fn text(&self, column: &str) -> &'a str {
        &self.cell(column).text
    }

    /// The place of the cell of a column.
    pub(super) fn place(&self, column: &str) -> Place {
        let cell = self.cell(column);
        Place::new(&self.table.file, cell.line, cell.column)
    }
}

/// Positions of the columns, or none when a needed one is not there or one
/// stands twice.
fn read_header(
    file: &str,
    header: &[Cell],
    columns: &[Column],
    findings: &mut Vec<Finding>,
) -> Option<BTreeMap<String, usize>> {
    let mut positions = BTreeMap::new();
    let mut twice = false;
    let names = || columns.iter().map(|column| column.name);
    let mut wrong = |place, message: String, remedy: String| {
        findings.push(Finding::error("network-header", place, message).remedy(remedy));
    };
    for (at, cell) in header.iter().enumerate() {
        let place = Place::new(file, cell.line, cell.column);
        let text = &cell.text;
        if !names().any(|name| name == text) {
            let remedy = match nearest(text, names()) {
                Some(name) => format!("did you mean `{name}`?"),
                None => format!("columns are {}", names().collect::<Vec<_>>().join(",")),
            };
            wrong(place, format!("there is no column `{text}`"), remedy);
        } else if positions.contains_key(text) {
            twice = true;
            wrong(place, format!("column `{text}` stands twice"), "leave one out".to_string());
        } else {
            positions.insert(text.clone(), at);
        }
    }
    let missing: Vec<&str> = columns
        .iter()
        .filter(|column| column.required && !positions.contains_key(column.name))
        .map(|column| column.name)
        .collect();
    if missing.is_empty() {
        return (!twice).then_some(positions);
    }
    let message = format!("the header lacks {}", missing.join(", "));
    let remedy = format!("the first line is `{}`", names().collect::<Vec<_>>().join(","));
    wrong(Place::new(file, header[0].line, 1), message, remedy);
    None
}
