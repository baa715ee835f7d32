//! The reader of `network.toml`: what the network is and what it is based on.

use std::ops::Range;

use toml::de::{DeTable, DeValue};

use crate::diagnostic::{Finding, Place, nearest};

/// A word of a list and where it stands.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(super) struct Word {
    pub(super) text: String,
    pub(super) place: Place,
}

/// The contents of `network.toml`.
#[derive(Clone, Debug, Default)]
pub(super) struct Head {
    pub(super) title: String,
    pub(super) text: String,
    pub(super) purpose: String,
    pub(super) elements: Option<Vec<Word>>,
    pub(super) base: Option<Word>,
    pub(super) species: Option<Vec<Word>>,
    pub(super) without: Option<Vec<Word>>,
    pub(super) reactions: Option<Vec<Word>>,
}

const KEYS: [&str; 8] =
    ["title", "text", "purpose", "elements", "base", "species", "without", "reactions"];

impl Head {
    /// Reads the file; what is wrong is added to `findings`.
    pub(super) fn read(file: &str, text: &str, findings: &mut Vec<Finding>) -> Self {
        let mut head = Self::default();
        let at = |span: Range<usize>| Place::of_offset(file, text, span.start);
        let (table, errors) = DeTable::parse_recoverable(text);
        for error in errors {
            let place = error.span().map_or_else(|| Place::file(file), at);
            findings.push(
                Finding::error("network-toml", place, error.message().trim())
                    .remedy("write key = \"text\" lines"),
            );
        }
        for (key, value) in table.get_ref() {
            let place = at(value.span());
            let name = key.get_ref().as_ref();
            let value = value.get_ref();
            match name {
                "title" => head.title = string(name, value, place, findings),
                "text" => head.text = string(name, value, place, findings),
                "purpose" => head.purpose = string(name, value, place, findings),
                "base" => {
                    let text = string(name, value, place.clone(), findings);
                    head.base = Some(Word { text, place });
                }
                "elements" => head.elements = Some(words(name, value, place, &at, findings)),
                "species" => head.species = Some(words(name, value, place, &at, findings)),
                "without" => head.without = Some(words(name, value, place, &at, findings)),
                "reactions" => head.reactions = Some(words(name, value, place, &at, findings)),
                _ => {
                    let remedy = match nearest(name, KEYS) {
                        Some(known) => format!("did you mean `{known}`?"),
                        None => format!("keys are {}", KEYS.join(", ")),
                    };
                    let message = format!("there is no key `{name}`");
                    let place = at(key.span());
                    findings.push(Finding::error("network-key", place, message).remedy(remedy));
                }
            }
        }
        if head.title.trim().is_empty() && !findings.iter().any(|f| f.place.file == file) {
            findings.push(
                Finding::error("network-key", Place::file(file), "the title is missing")
                    .remedy("add a line title = \"...\""),
            );
        }
        for (name, list) in
            [("species", &head.species), ("without", &head.without), ("reactions", &head.reactions)]
        {
            if let (Some(list), None) = (list, &head.base) {
                let place = list.first().map_or_else(|| Place::file(file), |w| w.place.clone());
                let message = format!("`{name}` picks from a base network, and there is no `base`");
                findings.push(
                    Finding::error("network-key", place, message).remedy("add base = \"NAME\""),
                );
            }
        }
        head
    }
}

fn wrong_type(name: &str, wanted: &str, value: &DeValue<'_>, place: Place) -> Finding {
    let message = format!("`{name}` wants {wanted}, not a {}", value.type_str());
    Finding::error("network-key", place, message).remedy(format!("write {name} = {wanted}"))
}

fn string(name: &str, value: &DeValue<'_>, place: Place, findings: &mut Vec<Finding>) -> String {
    match value.as_str() {
        Some(text) => text.to_string(),
        None => {
            findings.push(wrong_type(name, "\"text\"", value, place));
            String::new()
        }
    }
}

fn words(
    name: &str,
    value: &DeValue<'_>,
    place: Place,
    at: &dyn Fn(Range<usize>) -> Place,
    findings: &mut Vec<Finding>,
) -> Vec<Word> {
    let wanted = "[\"text\", ...]";
    let Some(items) = value.as_array() else {
        findings.push(wrong_type(name, wanted, value, place));
        return Vec::new();
    };
    let mut list = Vec::new();
    for item in items.iter() {
        let place = at(item.span());
        match item.get_ref().as_str() {
            Some(text) => list.push(Word { text: text.to_string(), place }),
            None => findings.push(wrong_type(name, wanted, item.get_ref(), place)),
        }
    }
    list
}
