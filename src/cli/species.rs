//! Species named on the command line.

use super::exit::Stop;
use crate::cloud::Model;
use crate::diagnostic::{Finding, Place, nearest};
use crate::network::Network;

/// Species shown beside the watched ones where nothing else is asked for.
const MAIN: [&str; 10] = ["H", "H2", "e-", "O", "O2", "C", "C+", "CO", "HCO+", "H3+"];

/// Indices of the named species; names may be repeated.
pub(super) fn indices(network: &Network, names: &[String]) -> Result<Vec<usize>, Stop> {
    let mut findings = Vec::new();
    let mut indices = Vec::new();
    for name in names {
        let name = name.trim();
        match network.species_index(name) {
            Some(index) if indices.contains(&index) => {}
            Some(index) => indices.push(index),
            None => {
                let known = network.species.iter().map(|s| s.name.as_str());
                let remedy = nearest(name, known).map_or_else(
                    || {
                        format!(
                            "network `{}` has {} species; `duskwater check {}` lists them",
                            network.name,
                            network.species.len(),
                            network.name
                        )
                    },
                    |near| format!("did you mean `{near}`?"),
                );
                findings.push(
                    Finding::error(
                        "run-unknown-species",
                        Place::file(format!("--species {name}")),
                        format!("the network has no species `{name}`"),
                    )
                    .remedy(remedy),
                );
            }
        }
    }
    if findings.is_empty() { Ok(indices) } else { Err(Stop::Findings(findings)) }
}

/// The species to show: those named, else the watched and the main ones.
pub(super) fn shown(model: &Model, names: &[String]) -> Result<Vec<usize>, Stop> {
    let named = indices(&model.network, names)?;
    if !named.is_empty() {
        return Ok(named);
    }
    let mut shown = model.watch.clone();
    let main = MAIN.iter().filter_map(|name| model.network.species_index(name));
    for index in main {
        if !shown.contains(&index) {
            shown.push(index);
        }
    }
    if shown.is_empty() {
        shown = (0..model.network.species.len().min(12)).collect();
    }
    Ok(shown)
}
