//! The output times of a run.

use super::Times;
use super::values::{missing, quantity, wrong_type};
use crate::cloud::document::{Node, Section, Value};
use crate::diagnostic::Finding;
use crate::units::Dimension;

/// Reads `[times]`.
pub(super) fn read_times(section: &mut Section<'_>, findings: &mut Vec<Finding>) -> Option<Times> {
    let time = |path: &str, node: &Node, findings: &mut Vec<Finding>| {
        let value = quantity(path, node, Dimension::Time, findings)?;
        if value < 0.0 {
            findings.push(
                Finding::error(
                    "run-range",
                    node.place.clone(),
                    format!("`{path}` = {value} yr is negative"),
                )
                .remedy("times count from the start of the run"),
            );
            return None;
        }
        Some(value)
    };
    let mut output = Vec::new();
    let list = section.take("output");
    if let Some(node) = list {
        match &node.value {
            Value::List(items) => {
                for item in items {
                    output.extend(time(&section.path("output"), item, findings));
                }
                if output.windows(2).any(|pair| pair[0] >= pair[1]) {
                    findings.push(
                        Finding::error(
                            "run-value",
                            node.place.clone(),
                            "`times.output` is not ascending",
                        )
                        .remedy("list the times from early to late, each once"),
                    );
                }
            }
            _ => wrong_type(&section.path("output"), node, "a list of times", findings),
        }
    }
    let until = section.take("until").and_then(|node| {
        let until = time(&section.path("until"), node, findings)?;
        Some((until, node.place.clone()))
    });
    let from = section
        .take("from")
        .and_then(|node| time(&section.path("from"), node, findings))
        .unwrap_or(1.0);
    let per_decade = section.take("per_decade").and_then(|node| {
        let value =
            quantity(&section.path("per_decade"), node, Dimension::Dimensionless, findings)?;
        let good = (1.0..=1000.0).contains(&value) && value.fract().abs() < 1e-12;
        if !good {
            findings.push(
                Finding::error(
                    "run-range",
                    node.place.clone(),
                    format!("`times.per_decade` = {value}"),
                )
                .remedy("give a whole number from 1 to 1000"),
            );
        }
        if list.is_some() {
            findings.push(
                Finding::error(
                    "run-value",
                    node.place.clone(),
                    "both `times.output` and `times.per_decade` are given",
                )
                .remedy("keep one of them"),
            );
        }
        good.then_some(value)
    });
    let end = until.clone().map(|u| u.0).or_else(|| output.last().copied());
    let Some(end) = end else {
        missing(section, "until", findings);
        return None;
    };
    if list.is_none() {
        let per_decade = per_decade.unwrap_or(1.0);
        let first = from.max(end * 1e-30);
        let count = ((end / first).log10() * per_decade).floor();
        output = (0..=count.max(0.0) as u32)
            .map(|i| tidy(first * 10f64.powf(f64::from(i) / per_decade)))
            .filter(|&t| t <= end && t > 0.0)
            .collect();
    }
    if let Some((end, place)) = until {
        if output.last().is_some_and(|&last| last > end) {
            findings.push(
                Finding::error(
                    "run-value",
                    place,
                    format!("`times.until` = {end} yr is before the last output time"),
                )
                .remedy("raise `until`, or drop the later output times"),
            );
        }
        if output.last().is_none_or(|&last| last < end * (1.0 - 1e-12)) {
            output.push(end);
        }
    }
    if output.first().is_none_or(|&first| first > 0.0) {
        output.insert(0, 0.0);
    }
    Some(Times { output_yr: output })
}

/// A time without the rounding dirt of `10^x`.
fn tidy(time: f64) -> f64 {
    format!("{time:.12e}").parse().unwrap_or(time)
}
