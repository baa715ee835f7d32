//! A splitter of comma-separated text that knows the line and column of every
//! cell.
//!
//! RFC 4180 with leniency: cells may be quoted, hold doubled quotes and line
//! breaks; lines end in LF, CRLF or CR; empty lines are skipped; blanks around a
//! cell do not count.

use crate::diagnostic::{Finding, Place};

/// A cell and where its text begins.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub(in crate::network) struct Cell {
    pub(in crate::network) text: String,
    pub(in crate::network) line: u32,
    pub(in crate::network) column: u32,
}

/// Cells of all records that are not empty lines.
pub(super) fn split(file: &str, text: &str, findings: &mut Vec<Finding>) -> Vec<Vec<Cell>> {
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
#[path = "tests.rs"]
mod tests;
