//! A table with named columns, written as csv, json or aligned text.

use std::io::{self, Write};

use serde_json::{Map, Value, json};

/// A column: its name, and its unit where people are shown one.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Column {
    name: String,
    unit: String,
}

impl Column {
    /// A column without a unit.
    pub fn new(name: impl Into<String>) -> Self {
        Self { name: name.into(), unit: String::new() }
    }

    /// A column with a unit, shown in text tables.
    pub fn with_unit(name: impl Into<String>, unit: impl Into<String>) -> Self {
        Self { name: name.into(), unit: unit.into() }
    }

    fn heading(&self) -> String {
        if self.unit.is_empty() {
            self.name.clone()
        } else {
            format!("{} ({})", self.name, self.unit)
        }
    }
}

/// One value of a table.
#[derive(Clone, Debug, PartialEq)]
pub enum Cell {
    /// A text.
    Text(String),
    /// A number; not a finite one is empty in csv and null in json.
    Number(f64),
    /// A whole number.
    Integer(i64),
    /// `true` or `false`.
    Flag(bool),
    /// No value.
    Empty,
}

impl Cell {
    /// A text cell.
    pub fn text(text: impl Into<String>) -> Self {
        Self::Text(text.into())
    }

    /// The value as machines read it back without loss.
    fn exact(&self) -> String {
        match self {
            Self::Text(text) => text.clone(),
            Self::Number(value) => exact(*value),
            Self::Integer(value) => value.to_string(),
            Self::Flag(value) => value.to_string(),
            Self::Empty => String::new(),
        }
    }

    /// The value as people read it.
    fn short(&self) -> String {
        match self {
            Self::Number(value) if value.is_finite() => short(*value),
            other => other.exact(),
        }
    }

    fn json(&self) -> Value {
        match self {
            Self::Text(text) => json!(text),
            Self::Number(value) => json!(value),
            Self::Integer(value) => json!(value),
            Self::Flag(value) => json!(value),
            Self::Empty => Value::Null,
        }
    }

    fn is_number(&self) -> bool {
        matches!(self, Self::Number(_) | Self::Integer(_))
    }
}

/// The shortest text that reads back as the same number.
#[must_use]
pub fn exact(value: f64) -> String {
    if !value.is_finite() {
        return String::new();
    }
    let size = value.abs();
    if size > 0.0 && !(1e-4..1e7).contains(&size) {
        format!("{value:e}")
    } else {
        format!("{value}")
    }
}

/// Three or four digits of a number, as people read it.
fn short(value: f64) -> String {
    let size = value.abs();
    if size > 0.0 && !(1e-2..1e4).contains(&size) {
        super::text::scientific(value, 3)
    } else {
        let text = format!("{value:.3}");
        text.trim_end_matches('0').trim_end_matches('.').to_owned()
    }
}

/// Rows under named columns.
#[derive(Clone, Debug, PartialEq)]
pub struct Table {
    columns: Vec<Column>,
    rows: Vec<Vec<Cell>>,
}

impl Table {
    /// An empty table.
    #[must_use]
    pub fn new(columns: Vec<Column>) -> Self {
        Self { columns, rows: Vec::new() }
    }

    /// Adds a row; short ones are filled with empty cells.
    pub fn push(&mut self, mut row: Vec<Cell>) {
        row.resize(self.columns.len(), Cell::Empty);
        self.rows.push(row);
    }

    /// Whether there are no rows.
    #[must_use]
    pub fn is_empty(&self) -> bool {
        self.rows.is_empty()
    }

    /// Rows become columns: the first column's cells are the new headings, the
    /// first heading stays.
    #[must_use]
    pub fn transposed(&self) -> Self {
        let mut columns =
            vec![Column::new(self.columns.first().map_or_else(String::new, Column::heading))];
        columns.extend(self.rows.iter().map(|row| Column::new(row[0].short())));
        let mut table = Self::new(columns);
        for (place, column) in self.columns.iter().enumerate().skip(1) {
            let mut row = vec![Cell::text(column.heading())];
            row.extend(self.rows.iter().map(|cells| cells[place].clone()));
            table.push(row);
        }
        table
    }

    /// Writes comma-separated values under one heading line.
    ///
    /// # Errors
    /// What the writer says.
    pub fn write_csv(&self, out: &mut impl Write) -> io::Result<()> {
        let mut writer = csv::Writer::from_writer(out);
        writer.write_record(self.columns.iter().map(|c| &c.name)).map_err(io_error)?;
        for row in &self.rows {
            writer.write_record(row.iter().map(Cell::exact)).map_err(io_error)?;
        }
        writer.flush()
    }

    /// Writes an array of objects, one to a line.
    ///
    /// # Errors
    /// What the writer says.
    pub fn write_json(&self, out: &mut impl Write) -> io::Result<()> {
        for (number, row) in self.rows.iter().enumerate() {
            out.write_all(if number == 0 { b"[\n" } else { b",\n" })?;
            let object: Map<String, Value> = self
                .columns
                .iter()
                .zip(row)
                .map(|(column, cell)| (column.name.clone(), cell.json()))
                .collect();
            let text = serde_json::to_string(&object).map_err(io::Error::other)?;
            out.write_all(text.as_bytes())?;
        }
        out.write_all(if self.rows.is_empty() { b"[]\n" } else { b"\n]\n" })
    }

    /// Writes aligned columns: numbers to the right, the last text column as
    /// long as it is.
    ///
    /// # Errors
    /// What the writer says.
    pub fn write_text(&self, out: &mut impl Write) -> io::Result<()> {
        let count = self.columns.len();
        let shown: Vec<Vec<String>> =
            self.rows.iter().map(|row| row.iter().map(Cell::short).collect()).collect();
        let headings: Vec<String> = self.columns.iter().map(Column::heading).collect();
        let length = |text: &String| text.chars().count();
        let widths: Vec<usize> = (0..count)
            .map(|c| {
                shown
                    .iter()
                    .map(|row| length(&row[c]))
                    .chain([length(&headings[c])])
                    .max()
                    .unwrap_or(0)
            })
            .collect();
        let looks_like_number = |text: &str| text.parse::<f64>().is_ok();
        let to_right: Vec<bool> = (0..count)
            .map(|c| {
                let filled = || self.rows.iter().zip(&shown).filter(|(_, s)| !s[c].is_empty());
                filled().count() > 0
                    && filled().all(|(row, s)| row[c].is_number() || looks_like_number(&s[c]))
            })
            .collect();
        let mut line = |cells: &[String]| -> io::Result<()> {
            let mut text = String::new();
            for (c, cell) in cells.iter().enumerate() {
                text.push_str("  ");
                let width = widths[c];
                if to_right[c] {
                    text.push_str(&format!("{cell:>width$}"));
                } else {
                    text.push_str(&format!("{cell:<width$}"));
                }
            }
            writeln!(out, "{}", text.trim_end())
        };
        line(&headings)?;
        for row in &shown {
            line(row)?;
        }
        Ok(())
    }
}

/// The error of the writer below, so that a closed pipe can be told.
fn io_error(error: csv::Error) -> io::Error {
    match error.into_kind() {
        csv::ErrorKind::Io(error) => error,
        other => io::Error::other(format!("{other:?}")),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn table() -> Table {
        let mut table = Table::new(vec![Column::new("species"), Column::with_unit("time", "yr")]);
        table.push(vec![Cell::text("H3O+, hot"), Cell::Number(1.25e-9)]);
        table.push(vec![Cell::text("e-"), Cell::Number(f64::NAN)]);
        table
    }

    #[test]
    fn csv_quotes_and_keeps_every_digit() {
        let mut out = Vec::new();
        table().write_csv(&mut out).unwrap();
        assert_eq!(String::from_utf8(out).unwrap(), "species,time\n\"H3O+, hot\",1.25e-9\ne-,\n");
        for value in [0.1 + 0.2, 1.0 / 3.0 * 1e-20, 123456789.0, 1e300] {
            assert_eq!(exact(value).parse::<f64>().unwrap().to_bits(), value.to_bits());
        }
    }

    #[test]
    fn json_is_an_array_of_objects_in_column_order() {
        let mut out = Vec::new();
        table().write_json(&mut out).unwrap();
        let text = String::from_utf8(out).unwrap();
        assert_eq!(
            text,
            "[\n{\"species\":\"H3O+, hot\",\"time\":1.25e-9},\n{\"species\":\"e-\",\"time\":null}\n]\n"
        );
        let mut out = Vec::new();
        Table::new(vec![]).write_json(&mut out).unwrap();
        assert_eq!(out, b"[]\n");
    }

    #[test]
    fn text_aligns_numbers_to_the_right() {
        let mut table = Table::new(vec![Column::new("a"), Column::with_unit("b", "K")]);
        table.push(vec![Cell::text("x"), Cell::Integer(5)]);
        table.push(vec![Cell::text("yy"), Cell::Number(1.5)]);
        let mut out = Vec::new();
        table.write_text(&mut out).unwrap();
        assert_eq!(String::from_utf8(out).unwrap(), "  a   b (K)\n  x       5\n  yy    1.5\n");
        let mut out = Vec::new();
        table.transposed().write_text(&mut out).unwrap();
        assert_eq!(String::from_utf8(out).unwrap(), "  a      x   yy\n  b (K)  5  1.5\n");
    }
}
