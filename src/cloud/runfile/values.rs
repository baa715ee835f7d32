//! Single values of a run file: sections, texts and quantities with units.

use crate::cloud::document::{Node, Section, Value};
use crate::diagnostic::{Finding, Place};
use crate::units::{Dimension, parse_quantity};

pub(super) fn missing(section: &Section<'_>, key: &str, findings: &mut Vec<Finding>) {
    findings.push(
        Finding::error(
            "run-missing-key",
            section.place(),
            format!("`{}` is missing", section.path(key)),
        )
        .remedy("see docs/formats.md for the keys a run file needs"),
    );
}

pub(super) fn section<T>(
    root: &mut Section<'_>,
    key: &'static str,
    needed: bool,
    findings: &mut Vec<Finding>,
    read: impl Fn(&mut Section<'_>, &mut Vec<Finding>) -> Option<T>,
) -> Option<T> {
    let Some(node) = root.take(key) else {
        if needed {
            missing(root, key, findings);
        }
        return None;
    };
    let mut section = Section::open(key, node, findings)?;
    let value = read(&mut section, findings);
    section.close(findings);
    value
}

pub(super) fn wrong_type(path: &str, node: &Node, wanted: &str, findings: &mut Vec<Finding>) {
    findings.push(
        Finding::error(
            "run-type",
            node.place.clone(),
            format!("`{path}` must be {wanted}, but is {}", node.value.kind()),
        )
        .remedy(format!("give {wanted}")),
    );
}

pub(super) fn text(
    section: &mut Section<'_>,
    key: &'static str,
    findings: &mut Vec<Finding>,
) -> Option<(String, Place)> {
    let node = section.take(key)?;
    match &node.value {
        Value::Text(text) => Some((text.clone(), node.place.clone())),
        _ => {
            wrong_type(&section.path(key), node, "a text in quotes", findings);
            None
        }
    }
}

/// A number in the unit of `dimension`, or a text with a number and a unit.
pub(super) fn quantity(
    path: &str,
    node: &Node,
    dimension: Dimension,
    findings: &mut Vec<Finding>,
) -> Option<f64> {
    let refuse = |message: String, findings: &mut Vec<Finding>| {
        findings.push(
            Finding::error("run-value", node.place.clone(), format!("`{path}`: {message}"))
                .remedy(format!("give a finite number in {}", dimension.unit())),
        );
        None
    };
    match &node.value {
        Value::Number(value) if value.is_finite() => Some(*value),
        Value::Number(value) => refuse(format!("{value} is not a finite number"), findings),
        Value::Text(text) => match parse_quantity(text, dimension) {
            Ok(value) => Some(value),
            Err(message) => refuse(message, findings),
        },
        _ => {
            wrong_type(path, node, "a number", findings);
            None
        }
    }
}
