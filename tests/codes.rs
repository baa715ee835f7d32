//! Every code that the sources use is explained once, and nothing else is.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

use std::collections::BTreeSet;
use std::path::Path;

use duskwater::diagnostic::{CODES, explain};

/// First words of codes, one per area.
const AREAS: [&str; 7] = ["species", "network", "audit", "run", "solve", "input", "output"];

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

/// The page as the list of codes makes it.
fn page() -> String {
    let mut page = String::from(
        "# Errors\n\n\
         ## Exit codes\n\n\
         | code | meaning |\n|---|---|\n\
         | 0 | done (also when the reader of the output went away) |\n\
         | 1 | done, with findings: `check` found errors or warnings, a run stopped early, a search for a steady state failed |\n\
         | 2 | could not run: bad input, wrong usage, or output that cannot be written |\n\
         | 3 | a mistake in the program; please report it |\n\n\
         Findings go to standard error, all of an input's at once, each with its code, place (file,\n\
         line, column, counted from 1) and a remedy. `duskwater explain CODE` prints the\n\
         paragraphs below. Codes are stable; wording is not.\n\n\
         ## Codes\n",
    );
    for (code, text) in duskwater::diagnostic::CODES {
        page.push_str(&format!("\n### `{code}`\n\n"));
        page.push_str(&duskwater::report::text::wrap(text, 92, 0));
        page.push('\n');
    }
    page
}

#[test]
fn the_page_of_errors_lists_every_code() {
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join("docs/errors.md");
    if std::env::var_os("DUSKWATER_WRITE_DOCS").is_some() {
        std::fs::write(&path, page()).unwrap();
    }
    let written = std::fs::read_to_string(&path).unwrap_or_default();
    assert!(
        written == page(),
        "docs/errors.md is not current; DUSKWATER_WRITE_DOCS=1 cargo test --test codes writes it"
    );
}
