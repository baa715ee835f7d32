//! Finds runs and networks by shipped name or path, and reads their files.

use std::path::Path;
use std::sync::Arc;

use super::arguments::RunArguments;
use super::exit::Stop;
use super::output::Output;
use crate::cloud::{Model, RunFile, shipped as shipped_runs};
use crate::diagnostic::{Finding, Place, nearest};
use crate::network::{Network, NetworkTexts, shipped as shipped_networks};

/// Files of a network folder.
const NETWORK_FILES: [&str; 4] = ["network.toml", "species.csv", "reactions.csv", "sources.csv"];
/// A run file or table larger than this is not one.
const LARGEST: u64 = 256 << 20;

/// Reads the run of a command and joins it to its network.
pub(super) fn model(arguments: &RunArguments, output: &mut Output) -> Result<Model, Stop> {
    let (name, text, folder) = run_text(&arguments.run)?;
    output.remember(&name, &text);
    let (run, findings) = RunFile::read(&name, &text, &arguments.set)?;
    output.findings(&findings);
    let network = network_of_run(&run, folder.as_deref(), output)?;
    let model = Model::new(Arc::new(network), run)?;
    output.findings(&model.warnings);
    Ok(model)
}

/// The text of a run: its name in findings, its content, and the folder that
/// relative network paths start from.
fn run_text(run: &str) -> Result<(String, String, Option<std::path::PathBuf>), Stop> {
    if let Some(text) = shipped_runs::text(run)
        && !Path::new(run).exists()
    {
        return Ok((format!("runs/{run}.toml"), text.to_owned(), None));
    }
    let path = Path::new(run);
    if !path.exists() {
        let names = shipped_runs::names();
        let remedy = match nearest(run, names.iter().copied()) {
            Some(near) => format!("did you mean the shipped run `{near}`?"),
            None => format!("give the path of a run file, or one of {}", names.join(", ")),
        };
        return Err(Finding::error(
            "input-missing",
            Place::default(),
            format!("there is no file and no shipped run `{run}`"),
        )
        .remedy(remedy)
        .into());
    }
    let bytes = read(path)?;
    let text = String::from_utf8(bytes).map_err(|error| {
        let valid = error.utf8_error().valid_up_to();
        let before = String::from_utf8_lossy(&error.as_bytes()[..valid]).into_owned();
        Finding::error(
            "input-encoding",
            Place::of_offset(run, &before, valid),
            "the file is not UTF-8 text from here on",
        )
        .remedy("give a TOML text file")
    })?;
    let folder = path.parent().map(Path::to_path_buf);
    Ok((run.to_owned(), text, folder))
}

fn network_of_run(
    run: &RunFile,
    folder: Option<&Path>,
    output: &mut Output,
) -> Result<Network, Stop> {
    // A path in a run file counts from the run file, then from here.
    let beside = folder.map(|f| f.join(&run.network)).filter(|path| path.is_dir());
    let wanted = beside.and_then(|path| path.to_str().map(str::to_owned));
    network(wanted.as_deref().unwrap_or(&run.network), output).map_err(|stop| match stop {
        // The run file is where the mistake is, so point there.
        Stop::Findings(mut findings) => {
            for finding in &mut findings {
                if finding.code == "input-missing" {
                    finding.place = run.network_place.clone();
                }
            }
            Stop::Findings(findings)
        }
        other => other,
    })
}

/// A network by shipped name or folder; its warnings are left to `check`.
pub(super) fn network(name: &str, output: &mut Output) -> Result<Network, Stop> {
    let texts = texts(name)?;
    for (file, content) in texts.files() {
        if let Ok(text) = std::str::from_utf8(content) {
            output.remember(&texts.label(file), text);
        }
    }
    Ok(Network::from_texts(name, &texts)?.network)
}

/// The files of a network.
pub(super) fn texts(name: &str) -> Result<NetworkTexts, Stop> {
    let path = Path::new(name);
    if path.is_dir() {
        return folder_texts(path);
    }
    if let Some(texts) = shipped_networks::texts(name) {
        return Ok(texts);
    }
    let names = shipped_networks::names();
    let message = if path.exists() {
        format!("`{name}` is a file; a network is a folder")
    } else {
        format!("there is no folder and no shipped network `{name}`")
    };
    let remedy = match nearest(name, names.iter().copied()) {
        Some(near) => format!("did you mean the shipped network `{near}`?"),
        None => format!("give a folder with network.toml in it, or one of {}", names.join(", ")),
    };
    Err(Finding::error("input-missing", Place::default(), message).remedy(remedy).into())
}

fn folder_texts(path: &Path) -> Result<NetworkTexts, Stop> {
    let mut texts = NetworkTexts::new(path.display().to_string());
    for file in NETWORK_FILES {
        let file_path = path.join(file);
        if file_path.exists() {
            texts = texts.with(file, read(&file_path)?);
        }
    }
    let parent = path.parent().map(Path::to_path_buf);
    Ok(texts.with_resolver(move |base| {
        let beside = parent.as_ref()?.join(base);
        beside.is_dir().then(|| folder_texts(&beside).ok()).flatten()
    }))
}

fn read(path: &Path) -> Result<Vec<u8>, Finding> {
    let refuse = |message: String| {
        Finding::error("input-read", Place::file(path.display().to_string()), message)
            .remedy("check the path and the permissions")
    };
    let size = std::fs::metadata(path).map_err(|e| refuse(e.to_string()))?;
    if size.is_dir() {
        return Err(refuse("this is a folder, not a file".to_owned()));
    }
    if size.len() > LARGEST {
        return Err(refuse(format!("{} bytes are too many for this kind of file", size.len())));
    }
    std::fs::read(path).map_err(|e| refuse(e.to_string()))
}
