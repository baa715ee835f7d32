//! Every code that the sources use is explained once, and nothing else is.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

use std::collections::BTreeSet;
use std::path::Path;

use duskwater::diagnostic::{CODES, explain};

/// First words of codes, one per area.
const AREAS: [&str; 11] = [
    "species", "network", "audit", "run", "solve", "sweep", "store", "match", "columns", "reduce",
    "cli",
];

fn sources(folder: &Path, texts: &mut Vec<String>) {
    for entry in std::fs::read_dir(folder).expect("a folder") {
        let path = entry.expect("an entry").path();
        if path.is_dir() {
            sources(&path, texts);
        } else if path.extension().is_some_and(|end| end == "rs")
            && !path.ends_with("diagnostic/codes.rs")
            && !path.ends_with("tests.rs")
        {
            let text = std::fs::read_to_string(&path).expect("a text");
            // Tests inside a file may name codes that are not ours.
            texts.push(text.split("#[cfg(test)]").next().unwrap_or("").to_string());
        }
    }
}

/// Quoted words such as `"network-charge"`.
fn codes_in(text: &str) -> impl Iterator<Item = &str> {
    text.split('"').filter(|word| {
        let area = word.split('-').next().unwrap_or("");
        word.contains('-')
            && AREAS.contains(&area)
            && word.chars().all(|c| c.is_ascii_lowercase() || c.is_ascii_digit() || c == '-')
    })
}

#[test]
fn every_code_in_the_sources_is_explained_and_every_explained_code_is_used() {
    let mut texts = Vec::new();
    sources(&Path::new(env!("CARGO_MANIFEST_DIR")).join("src"), &mut texts);
    let used: BTreeSet<&str> = texts.iter().flat_map(|text| codes_in(text)).collect();
    let listed: BTreeSet<&str> = CODES.iter().map(|(code, _)| *code).collect();
    assert_eq!(listed.len(), CODES.len(), "a code is listed twice");
    let unexplained: Vec<_> = used.difference(&listed).collect();
    assert!(unexplained.is_empty(), "used but not listed: {unexplained:?}");
    let unused: Vec<_> = listed.difference(&used).collect();
    assert!(unused.is_empty(), "listed but not used: {unused:?}");
    assert!(explain("network-charge").is_some() && explain("nonsense").is_none());
}
