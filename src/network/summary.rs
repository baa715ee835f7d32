//! A network in numbers, for the page that `check` prints.

use std::collections::BTreeMap;

use serde::Serialize;

use crate::rates::Law;
use crate::species::Phase;

use super::{Network, Row};

/// A word or number and how often it occurs.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Count {
    /// What is counted.
    pub what: String,
    /// How often.
    pub count: usize,
}

/// A network in numbers.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Summary {
    /// Elements present, sorted.
    pub elements: Vec<String>,
    /// Species in all.
    pub species: usize,
    /// Species by kind: neutrals, cations, anions, electrons, ices, grains.
    pub species_by_kind: Vec<Count>,
    /// Reactions.
    pub reactions: usize,
    /// Rows, which are pieces of reactions.
    pub rows: usize,
    /// Reactions by the law of their first row, in the order of the manual.
    pub reactions_by_law: Vec<Count>,
    /// Rows by provenance, most frequent first.
    pub rows_by_provenance: Vec<Count>,
    /// Rows by uncertainty factor.
    pub rows_by_uncertainty: Vec<Count>,
    /// How many of the reactions that depend on temperature have a row at 10,
    /// 30, 100, 300, 1000 and 3000 K.
    pub covered_at: Vec<Count>,
    /// How many reactions depend on temperature at all.
    pub depend_on_temperature: usize,
    /// Sources by the number of rows that cite them, most cited first.
    pub sources: Vec<Count>,
}

/// Upper ends of the classes of uncertainty factors, and their names.
const CLASSES: [(f64, &str); 5] = [
    (1.25, "up to 1.25"),
    (1.5, "1.25 to 1.5"),
    (2.0, "1.5 to 2"),
    (3.0, "2 to 3"),
    (10.0, "3 to 10"),
];

/// Counts a network.
pub fn summary(network: &Network) -> Summary {
    let rows: Vec<&Row> = network.reactions.iter().flat_map(|r| &r.rows).collect();
    let kinds = ["neutrals", "cations", "anions", "electrons", "ices", "grains"];
    let kind_of = |index: usize| {
        let species = &network.species[index];
        match species.phase {
            Phase::Dust => 5,
            Phase::Ice => 4,
            Phase::Gas if species.is_electron() => 3,
            Phase::Gas if species.charge < 0 => 2,
            Phase::Gas if species.charge > 0 => 1,
            Phase::Gas => 0,
        }
    };
    let mut by_kind = [0_usize; 6];
    for index in 0..network.species.len() {
        by_kind[kind_of(index)] += 1;
    }
    let mut by_class = [0_usize; CLASSES.len() + 1];
    for row in &rows {
        let class = CLASSES.iter().position(|(high, _)| row.uncertainty <= *high);
        by_class[class.unwrap_or(CLASSES.len())] += 1;
    }
    let class_names = CLASSES.iter().map(|(_, name)| *name).chain(["above 10"]);
    let warm = || network.reactions.iter().filter(|r| r.law().depends_on_temperature());
    let covered = |temperature: f64| warm().filter(|r| r.covers(temperature)).count();
    let law_count = |law: Law| network.reactions.iter().filter(|r| r.law() == law).count();
    Summary {
        elements: network.elements(),
        species: network.species.len(),
        species_by_kind: named(kinds, by_kind),
        reactions: network.reactions.len(),
        rows: rows.len(),
        reactions_by_law: named(Law::ALL.map(Law::name), Law::ALL.map(law_count)),
        rows_by_provenance: ranked(rows.iter().map(|row| row.provenance.as_str())),
        rows_by_uncertainty: named(class_names, by_class),
        covered_at: [10.0, 30.0, 100.0, 300.0, 1000.0, 3000.0]
            .map(|t| Count { what: format!("{t} K"), count: covered(t) })
            .to_vec(),
        depend_on_temperature: warm().count(),
        sources: ranked(rows.iter().map(|row| row.source.as_str())),
    }
}

fn named<'a>(
    names: impl IntoIterator<Item = &'a str>,
    counts: impl IntoIterator<Item = usize>,
) -> Vec<Count> {
    names
        .into_iter()
        .zip(counts)
        .filter(|(_, count)| *count > 0)
        .map(|(what, count)| Count { what: what.to_string(), count })
        .collect()
}

/// Words by how often they occur; `(none)` for empty ones.
fn ranked<'a>(words: impl Iterator<Item = &'a str>) -> Vec<Count> {
    let mut counts: BTreeMap<&str, usize> = BTreeMap::new();
    for word in words {
        *counts.entry(if word.is_empty() { "(none)" } else { word }).or_default() += 1;
    }
    let mut list: Vec<Count> =
        counts.into_iter().map(|(what, count)| Count { what: what.to_string(), count }).collect();
    list.sort_by_key(|entry| std::cmp::Reverse(entry.count));
    list
}
