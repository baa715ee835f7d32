//! Networks that come with the program, compiled in from `networks/`.

use include_dir::{Dir, include_dir};

use crate::diagnostic::{Finding, Place, nearest};

use super::{Loaded, Network, NetworkTexts};

static FOLDERS: Dir<'_> = include_dir!("$CARGO_MANIFEST_DIR/networks");

/// Names of the shipped networks, sorted. A folder without `network.toml` is
/// not one.
pub fn names() -> Vec<&'static str> {
    let mut names: Vec<&str> = FOLDERS
        .dirs()
        .filter(|folder| folder.get_file(folder.path().join("network.toml")).is_some())
        .filter_map(|folder| folder.path().to_str())
        .collect();
    names.sort_unstable();
    names
}

/// The texts of a shipped network; its findings speak of `networks/NAME/FILE`.
pub fn texts(name: &str) -> Option<NetworkTexts> {
    if !names().contains(&name) {
        return None;
    }
    let folder = FOLDERS.get_dir(name)?;
    let mut texts = NetworkTexts::new(format!("networks/{name}"));
    for file in folder.files() {
        if let Some(file_name) = file.path().file_name().and_then(|name| name.to_str()) {
            texts = texts.with(file_name, file.contents());
        }
    }
    Some(texts)
}

/// A shipped network, read.
///
/// # Errors
/// When there is no such network, or it does not load.
pub fn load(name: &str) -> Result<Loaded, Vec<Finding>> {
    match texts(name) {
        Some(texts) => Network::from_texts(name, &texts),
        None => {
            let names = names();
            let remedy = match nearest(name, names.iter().copied()) {
                Some(near) => format!("did you mean `{near}`?"),
                None => format!("shipped networks are {}", names.join(", ")),
            };
            let message = format!("there is no shipped network `{name}`");
            Err(vec![Finding::error("network-base", Place::default(), message).remedy(remedy)])
        }
    }
}
