//! A reader of comma-separated tables that knows the line and column of every
//! cell.
//!
//! RFC 4180 with leniency: cells may be quoted, hold doubled quotes and line
//! breaks; lines end in LF, CRLF or CR; empty lines are skipped; blanks around a
//! cell do not count. Columns may stand in any order.

use std::collections::BTreeMap;

use crate::diagnostic::{Finding, Place, nearest};

/// A cell and where its text begins.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub(super) struct Cell {
    pub(super) text: String,
    pub(super) line: u32,
    pub(super) column: u32,
}

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

/// Positions of the columns, or none when a needed one is not there.
fn read_header(
    file: &str,
    header: &[Cell],
    columns: &[Column],
    findings: &mut Vec<Finding>,
) -> Option<BTreeMap<String, usize>> {
    let mut positions = BTreeMap::new();
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
        } else if positions.insert(text.clone(), at).is_some() {
            wrong(place, format!("column `{text}` stands twice"), "leave one out".to_string());
        }
    }
    let missing: Vec<&str> = columns
        .iter()
        .filter(|column| column.required && !positions.contains_key(column.name))
        .map(|column| column.name)
        .collect();
    if missing.is_empty() {
        return Some(positions);
    }
    let message = format!("the header lacks {}", missing.join(", "));
    let remedy = format!("the first line is `{}`", names().collect::<Vec<_>>().join(","));
    wrong(Place::new(file, header[0].line, 1), message, remedy);
    None
}

/// Cells of all records that are not empty lines.
fn split(file: &str, text: &str, findings: &mut Vec<Finding>) -> Vec<Vec<Cell>> {
    let mut reader = Reader { letters: text.chars().peekable(), line: 1, column: 1 };
    let mut records = Vec::new();
    while reader.letters.peek().is_some() {
        let record = reader.record(file, findings);
        let empty = matches!(record.as_slice(), [only] if only.text.is_empty());
        if !empty {
            records.push(record);
        }
    }
    records
}

struct Reader<'a> {
    letters: std::iter::Peekable<std::str::Chars<'a>>,
    line: u32,
    column: u32,
}

impl Reader<'_> {
    /// The next character, with CRLF and CR turned into LF.
    fn next(&mut self) -> Option<char> {
        let letter = match self.letters.next()? {
            '\r' => {
                self.letters.next_if_eq(&'\n');
                '\n'
            }
            other => other,
        };
        if letter == '\n' {
            self.line = self.line.saturating_add(1);
            self.column = 1;
        } else {
            self.column = self.column.saturating_add(1);
        }
        Some(letter)
    }

    fn record(&mut self, file: &str, findings: &mut Vec<Finding>) -> Vec<Cell> {
        let mut cells = Vec::new();
        loop {
            let (cell, more) = self.cell(file, findings);
            cells.push(cell);
            if !more {
                return cells;
            }
        }
    }

    /// One cell, and whether another follows in the record.
    fn cell(&mut self, file: &str, findings: &mut Vec<Finding>) -> (Cell, bool) {
        while self.letters.next_if(|c| matches!(c, ' ' | '\t')).is_some() {
            self.column = self.column.saturating_add(1);
        }
        let (line, column) = (self.line, self.column);
        if self.letters.peek() == Some(&'"') {
            return self.quoted(file, findings);
        }
        let mut text = String::new();
        let more = loop {
            match self.next() {
                Some(',') => break true,
                Some('\n') | None => break false,
                Some(letter) => text.push(letter),
            }
        };
        (Cell { text: text.trim_end().to_string(), line, column }, more)
    }

    fn quoted(&mut self, file: &str, findings: &mut Vec<Finding>) -> (Cell, bool) {
        let (open_line, open_column) = (self.line, self.column);
        self.next();
        let (mut line, mut column) = (self.line, self.column);
        let mut text = String::new();
        let mut quote = |message: &str, remedy: &str| {
            let place = Place::new(file, open_line, open_column);
            findings.push(Finding::error("network-quote", place, message).remedy(remedy));
        };
        loop {
            match self.next() {
                None => {
                    quote("this quoted cell never ends", "close it with `\"`");
                    return (Cell { text, line, column }, false);
                }
                Some('"') if self.letters.peek() == Some(&'"') => {
                    self.next();
                    text.push('"');
                }
                Some('"') => break,
                Some(letter) if letter.is_whitespace() && text.is_empty() => {
                    (line, column) = (self.line, self.column);
                }
                Some(letter) => text.push(letter),
            }
        }
        let mut after = String::new();
        let more = loop {
            match self.next() {
                Some(',') => break true,
                Some('\n') | None => break false,
                Some(letter) => after.push(letter),
            }
        };
        if !after.trim().is_empty() {
            quote("text follows the closing quote of this cell", "double quotes inside quotes");
        }
        (Cell { text: text.trim_end().to_string(), line, column }, more)
    }
}

#[cfg(test)]
#[path = "table/tests.rs"]
mod tests;
