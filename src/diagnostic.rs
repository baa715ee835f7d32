//! Findings: what is wrong, where it stands, and what to do about it.
//!
//! Readers and checks collect [`Finding`]s instead of stopping at the first
//! one. Each carries a stable code that [`codes::explain`] describes at length
//! and tests can match on; wording may change, codes do not.

pub mod codes;
mod nearest;

use std::fmt;

use serde::Serialize;

pub use codes::{CODES, explain};
pub use nearest::nearest;

/// How bad a finding is. Errors come first in order.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash, Serialize)]
#[serde(rename_all = "lowercase")]
pub enum Severity {
    /// The input cannot be used as it stands.
    Error,
    /// Usable, but probably not what was meant.
    Warning,
    /// Worth knowing.
    Note,
}

impl Severity {
    /// `error`, `warning` or `note`.
    pub fn as_str(self) -> &'static str {
        match self {
            Self::Error => "error",
            Self::Warning => "warning",
            Self::Note => "note",
        }
    }
}

impl fmt::Display for Severity {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.pad(self.as_str())
    }
}

/// Where a finding stands. Lines and columns (in characters) count from 1;
/// 0 means not known.
#[derive(Clone, Debug, Default, PartialEq, Eq, PartialOrd, Ord, Hash, Serialize)]
pub struct Place {
    /// Name of the file as the caller gave it; empty when there is none.
    pub file: String,
    /// Line, from 1; 0 when not known.
    pub line: u32,
    /// Column in characters, from 1; 0 when not known.
    pub column: u32,
}

impl Place {
    /// A place inside a file.
    pub fn new(file: impl Into<String>, line: u32, column: u32) -> Self {
        Self { file: file.into(), line, column }
    }

    /// A file as a whole.
    pub fn file(file: impl Into<String>) -> Self {
        Self::new(file, 0, 0)
    }

    /// The place of a byte offset in `text`, the contents of `file`.
    pub fn of_offset(file: impl Into<String>, text: &str, offset: usize) -> Self {
        let mut end = offset.min(text.len());
        while !text.is_char_boundary(end) {
            end -= 1;
        }
        let before = &text[..end];
        let line = 1 + before.bytes().filter(|byte| *byte == b'\n').count();
        let start = before.rfind('\n').map_or(0, |at| at + 1);
        let column = 1 + before[start..].chars().count();
        Self::new(file, saturate(line), saturate(column))
    }
}

/// A count as u32, held at the largest one.
pub(crate) fn saturate(count: usize) -> u32 {
    u32::try_from(count).unwrap_or(u32::MAX)
}

impl fmt::Display for Place {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.file)?;
        for number in [self.line, self.column] {
            if number == 0 {
                break;
            }
            write!(f, ":{number}")?;
        }
        Ok(())
    }
}

/// One thing found: severity, code, place, what is the matter, what to do.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
pub struct Finding {
    /// How bad it is.
    pub severity: Severity,
    /// Stable code, listed in [`CODES`].
    pub code: &'static str,
    /// Where it stands.
    pub place: Place,
    /// What is the matter, with the values concerned.
    pub message: String,
    /// What to do about it; may be empty.
    pub remedy: String,
}

impl Finding {
    /// A finding of any severity, without a remedy.
    pub fn new(
        severity: Severity,
        code: &'static str,
        place: Place,
        message: impl Into<String>,
    ) -> Self {
        Self { severity, code, place, message: message.into(), remedy: String::new() }
    }

    /// An error without a remedy.
    pub fn error(code: &'static str, place: Place, message: impl Into<String>) -> Self {
        Self::new(Severity::Error, code, place, message)
    }

    /// A warning without a remedy.
    pub fn warning(code: &'static str, place: Place, message: impl Into<String>) -> Self {
        Self::new(Severity::Warning, code, place, message)
    }

    /// A note without a remedy.
    pub fn note(code: &'static str, place: Place, message: impl Into<String>) -> Self {
        Self::new(Severity::Note, code, place, message)
    }

    /// The same finding with advice.
    #[must_use]
    pub fn remedy(mut self, remedy: impl Into<String>) -> Self {
        self.remedy = remedy.into();
        self
    }

    /// Whether this is an error.
    pub fn is_error(&self) -> bool {
        self.severity == Severity::Error
    }
}

impl fmt::Display for Finding {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "{}[{}]", self.severity, self.code)?;
        let place = self.place.to_string();
        if !place.is_empty() {
            write!(f, " {place}")?;
        }
        write!(f, ": {}", self.message)?;
        if !self.remedy.is_empty() {
            write!(f, " ({})", self.remedy)?;
        }
        Ok(())
    }
}

impl std::error::Error for Finding {}

/// Sorts by severity, then by place, then by code; stable, so that equal
/// findings keep the order in which they were made.
pub fn sort(findings: &mut [Finding]) {
    findings.sort_by(|a, b| (a.severity, &a.place, a.code).cmp(&(b.severity, &b.place, b.code)));
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_place_leaves_out_what_is_not_known() {
        let cases = [
            (Place::new("a.csv", 3, 7), "a.csv:3:7"),
            (Place::new("a.csv", 3, 0), "a.csv:3"),
            (Place::file("a.csv"), "a.csv"),
            (Place::default(), ""),
        ];
        for (place, expected) in cases {
            assert_eq!(place.to_string(), expected);
        }
    }

    #[test]
    fn an_offset_is_counted_in_lines_and_characters() {
        let text = "ab\n\u{b5}m x\n";
        for (offset, line, column) in [(0, 1, 1), (3, 2, 1), (5, 2, 2), (4, 2, 1), (99, 3, 1)] {
            let place = Place::of_offset("f", text, offset);
            assert_eq!((place.line, place.column), (line, column), "offset {offset}");
        }
    }

    #[test]
    fn a_finding_reads_as_one_line() {
        let finding =
            Finding::error("network-number", Place::new("r.csv", 2, 5), "`x` is no number")
                .remedy("write a number");
        assert_eq!(
            finding.to_string(),
            "error[network-number] r.csv:2:5: `x` is no number (write a number)"
        );
    }

    #[test]
    fn errors_sort_before_warnings_and_notes() {
        let place = Place::default();
        let mut all = vec![
            Finding::note("c", place.clone(), ""),
            Finding::warning("b", place.clone(), ""),
            Finding::error("a", place, ""),
        ];
        sort(&mut all);
        let order: Vec<&str> = all.iter().map(|finding| finding.code).collect();
        assert_eq!(order, ["a", "b", "c"]);
    }
}
