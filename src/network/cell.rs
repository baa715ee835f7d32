//! Numbers in cells.

use crate::diagnostic::Finding;

use super::table::Record;

/// A finite number, or a finding. An empty cell is `default` when there is one.
pub(super) fn number(
    record: Record<'_>,
    column: &str,
    default: Option<f64>,
    findings: &mut Vec<Finding>,
) -> Option<f64> {
    let text = record.text(column);
    if text.is_empty() && default.is_some() {
        return default;
    }
    let problem = match text.parse::<f64>() {
        Ok(value) if value.is_finite() => return Some(value),
        Ok(_) => format!("{column} is `{text}`, which is not a finite number"),
        Err(_) if text.is_empty() => format!("{column} is empty"),
        Err(_) => format!("{column} is `{text}`, which is not a number"),
    };
    findings.push(
        Finding::error("network-number", record.place(column), problem)
            .remedy("write a plain number such as 4.3e-7"),
    );
    None
}

/// A number that may be left out; a finding when it is there but wrong.
pub(super) fn maybe_number(
    record: Record<'_>,
    column: &str,
    findings: &mut Vec<Finding>,
) -> Option<f64> {
    if record.text(column).is_empty() {
        return None;
    }
    number(record, column, None, findings)
}
