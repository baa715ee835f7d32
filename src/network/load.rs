//! From the texts of a folder to a network, gathering every mistake.

use std::collections::BTreeMap;

use crate::diagnostic::{self, Finding, Place, nearest};
use crate::species::{GRAIN, Species};

use super::assemble::{self, Entry};
use super::head::{Head, Word};
use super::{Loaded, Network, NetworkTexts, Source, reaction_table, source_table, species_table};

/// How many networks may build on one another.
const DEPTH: usize = 8;

/// Species and citations met so far.
#[derive(Default)]
pub(super) struct Known {
    index: BTreeMap<String, (Option<usize>, Place)>,
    pub(super) species: Vec<Species>,
    citations: Vec<(String, Place)>,
}

impl Known {
    /// Adds a species; none when its name could not be read.
    pub(super) fn add(&mut self, name: &str, place: Place, species: Option<Species>) {
        let index = species.map(|species| {
            self.species.push(species);
            self.species.len() - 1
        });
        self.index.insert(name.to_string(), (index, place));
    }

    /// Where a species was listed.
    pub(super) fn place_of(&self, name: &str) -> Option<&Place> {
        self.index.get(name).map(|(_, place)| place)
    }

    /// Index of a species: none when it is not listed, `Some(None)` when it is
    /// listed but could not be read.
    pub(super) fn find(&self, name: &str) -> Option<Option<usize>> {
        self.index.get(name).map(|(index, _)| *index)
    }

    /// Names listed.
    pub(super) fn names(&self) -> impl Iterator<Item = &str> {
        self.index.keys().map(String::as_str)
    }

    /// Remembers that a cell names a source.
    pub(super) fn cite(&mut self, key: &str, place: Place) {
        self.citations.push((key.to_string(), place));
    }
}

pub(super) fn from_texts(name: &str, texts: &NetworkTexts) -> Result<Loaded, Vec<Finding>> {
    let mut findings = Vec::new();
    let network = read(name, texts, 0, &mut findings);
    diagnostic::sort(&mut findings);
    match network {
        Some(network) if !findings.iter().any(Finding::is_error) => {
            Ok(Loaded { network, warnings: findings })
        }
        _ => Err(findings),
    }
}

fn read(
    name: &str,
    texts: &NetworkTexts,
    depth: usize,
    findings: &mut Vec<Finding>,
) -> Option<Network> {
    let head_file = texts.label("network.toml");
    let head = match text_of(texts, "network.toml", true, findings) {
        Some(text) => Head::read(&head_file, &text, findings),
        None => Head::default(),
    };
    let mut known = Known::default();
    let mut sources: Vec<Source> = Vec::new();
    let mut entries: Vec<Entry> = Vec::new();
    if let Some(base) = &head.base {
        let network = read_base(texts, base, depth, findings)?;
        let network = pick(network, &head, findings);
        let place = Place::file(&head_file);
        for species in &network.species {
            known.add(&species.name.clone(), place.clone(), Some(species.clone()));
        }
        entries = assemble::entries_of(&network);
        sources = network.sources;
    }
    let needed = head.base.is_none();
    if let Some(text) = text_of(texts, "sources.csv", needed, findings) {
        source_table::read(&texts.label("sources.csv"), &text, &mut sources, findings);
    }
    if let Some(text) = text_of(texts, "species.csv", needed, findings) {
        species_table::read(&texts.label("species.csv"), &text, &mut known, findings);
    }
    if let Some(text) = text_of(texts, "reactions.csv", needed, findings) {
        let file = texts.label("reactions.csv");
        reaction_table::read(&file, &text, &mut known, &mut entries, findings);
    }
    check_citations(&known, &sources, findings);
    check_elements(&head, &known.species, findings);
    let reactions = assemble::reactions(entries, &known.species, findings);
    Some(Network {
        name: name.to_string(),
        title: head.title,
        text: head.text,
        purpose: head.purpose,
        species: known.species,
        reactions,
        sources,
    })
}

/// The text of a file: UTF-8, without a byte order mark.
fn text_of(
    texts: &NetworkTexts,
    file: &str,
    needed: bool,
    findings: &mut Vec<Finding>,
) -> Option<String> {
    let label = texts.label(file);
    let Some(bytes) = texts.get(file) else {
        if needed {
            findings.push(
                Finding::error("network-missing-file", Place::file(label), "the file is missing")
                    .remedy(format!("a network folder holds {file}")),
            );
        }
        return None;
    };
    let text = match std::str::from_utf8(bytes) {
        Ok(text) => text,
        Err(error) => {
            let good = String::from_utf8_lossy(&bytes[..error.valid_up_to()]);
            let place = Place::of_offset(label, &good, good.len());
            findings.push(
                Finding::error("network-encoding", place, "the text is not UTF-8 here")
                    .remedy("save the file as UTF-8"),
            );
            return None;
        }
    };
    Some(text.strip_prefix('\u{feff}').unwrap_or(text).to_string())
}

/// The network that this one builds on.
fn read_base(
    texts: &NetworkTexts,
    base: &Word,
    depth: usize,
    findings: &mut Vec<Finding>,
) -> Option<Network> {
    let mut fail = |message: String, remedy: String| {
        let finding = Finding::error("network-base", base.place.clone(), message);
        findings.push(finding.remedy(remedy));
    };
    if depth >= DEPTH {
        fail(
            format!("more than {DEPTH} networks build on one another"),
            "does a network build on itself?".to_string(),
        );
        return None;
    }
    let Some(base_texts) = texts.resolve(&base.text) else {
        let names = super::shipped::names();
        let remedy = match nearest(&base.text, names.iter().copied()) {
            Some(name) => format!("did you mean `{name}`?"),
            None => format!("shipped networks are {}", names.join(", ")),
        };
        fail(format!("there is no network `{}`", base.text), remedy);
        return None;
    };
    read(&base.text, &base_texts, depth + 1, findings)
}

/// The part of a base network that the head asks for.
fn pick(network: Network, head: &Head, findings: &mut Vec<Finding>) -> Network {
    if head.species.is_none() && head.without.is_none() && head.reactions.is_none() {
        return network;
    }
    let mut unknown = |word: &Word, what: &str, guess: Option<&str>| {
        let code = if what == "species" { "network-unknown-species" } else { "network-unknown-id" };
        let message = format!("the base network has no {what} `{}`", word.text);
        let remedy = match guess {
            Some(name) => format!("did you mean `{name}`?"),
            None => "leave it out".to_string(),
        };
        findings.push(Finding::error(code, word.place.clone(), message).remedy(remedy));
    };
    let mut keep_species: Vec<usize> = (0..network.species.len()).collect();
    if let Some(words) = &head.species {
        keep_species.clear();
        for word in words {
            match network.species_index(&word.text) {
                Some(index) => keep_species.push(index),
                None => {
                    let names = network.species.iter().map(|species| species.name.as_str());
                    unknown(word, "species", nearest(&word.text, names));
                }
            }
        }
    }
    let mut find = |words: &[Word]| {
        let mut found = Vec::new();
        for word in words {
            match network.reaction_index(&word.text) {
                Some(index) => found.push(index),
                None => {
                    let names = network.reactions.iter().map(|reaction| reaction.id.as_str());
                    unknown(word, "reaction", nearest(&word.text, names));
                }
            }
        }
        found
    };
    let mut keep: Vec<usize> = match &head.reactions {
        Some(words) => find(words),
        None => (0..network.reactions.len()).collect(),
    };
    if let Some(words) = &head.without {
        let dropped = find(words);
        keep.retain(|index| !dropped.contains(index));
    }
    network.subset(&keep_species, &keep)
}

/// Every source that is named must be listed.
fn check_citations(known: &Known, sources: &[Source], findings: &mut Vec<Finding>) {
    for (key, place) in &known.citations {
        if sources.iter().any(|source| source.key == *key) {
            continue;
        }
        let remedy = match nearest(key, sources.iter().map(|source| source.key.as_str())) {
            Some(name) => format!("did you mean `{name}`?"),
            None => "list it in sources.csv".to_string(),
        };
        let message = format!("source `{key}` is not listed in sources.csv");
        let finding = Finding::error("network-unknown-source", place.clone(), message);
        findings.push(finding.remedy(remedy));
    }
}

/// The elements a network claims must be the ones it has.
fn check_elements(head: &Head, species: &[Species], findings: &mut Vec<Finding>) {
    let Some(claimed) = &head.elements else {
        return;
    };
    for word in claimed {
        if !species.iter().any(|one| one.count(&word.text) > 0) {
            let message = format!("no species holds the element `{}`", word.text);
            let finding = Finding::warning("network-elements", word.place.clone(), message);
            findings.push(finding.remedy("leave it out of elements"));
        }
    }
    let place = claimed.first().map_or_else(Place::default, |word| word.place.clone());
    let mut missing: Vec<&str> = species
        .iter()
        .flat_map(|one| one.atoms.iter().map(|(element, _)| element.as_str()))
        .filter(|element| *element != GRAIN && !claimed.iter().any(|word| word.text == *element))
        .collect();
    missing.sort_unstable();
    missing.dedup();
    if !missing.is_empty() {
        let message = format!("species hold elements that are not claimed: {}", missing.join(", "));
        let finding = Finding::warning("network-elements", place, message);
        findings.push(finding.remedy("add them to elements"));
    }
}
