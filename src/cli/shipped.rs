//! `shipped`: the runs and networks inside the program, listed or written out.

use std::path::Path;

use super::arguments::ShippedArguments;
use super::exit::{Exit, Outcome, Stop};
use super::load;
use super::output::Output;
use crate::cloud::{RunFile, shipped as runs};
use crate::diagnostic::{Finding, Place};
use crate::network::shipped as networks;
use crate::report::table::{Cell, Column, Table};

pub(super) fn run(arguments: &ShippedArguments, output: &mut Output) -> Outcome {
    match &arguments.into {
        Some(folder) => write_out(folder, output),
        None => list(output),
    }
}

fn list(output: &mut Output) -> Outcome {
    let mut table = Table::new(vec![
        Column::new("kind"),
        Column::new("name"),
        Column::new("species"),
        Column::new("reactions"),
        Column::new("title"),
    ]);
    for name in runs::names() {
        let text = runs::text(name).unwrap_or_default();
        let title = RunFile::read(name, text, &[]).map(|(run, _)| run.title).unwrap_or_default();
        table.push(vec![
            Cell::text("run"),
            Cell::text(name),
            Cell::Empty,
            Cell::Empty,
            Cell::text(title),
        ]);
    }
    for name in networks::names() {
        let network = load::network(name, output)?;
        table.push(vec![
            Cell::text("network"),
            Cell::text(name),
            Cell::Integer(network.species.len() as i64),
            Cell::Integer(network.reactions.len() as i64),
            Cell::text(network.title),
        ]);
    }
    output.table(&table)?;
    Ok(Exit::Done)
}

fn write_out(folder: &Path, output: &mut Output) -> Outcome {
    let mut files: Vec<(std::path::PathBuf, Vec<u8>)> = Vec::new();
    for name in runs::names() {
        let text = runs::text(name).unwrap_or_default();
        files.push((folder.join("runs").join(format!("{name}.toml")), text.into()));
    }
    for name in networks::names() {
        for (file, content) in networks::texts(name).iter().flat_map(|texts| texts.files()) {
            files.push((folder.join("networks").join(name).join(file), content.to_vec()));
        }
    }
    if let Some((there, _)) = files.iter().find(|(path, _)| path.exists()) {
        return Err(Finding::error(
            "output-exists",
            Place::file(there.display().to_string()),
            "this file is there already, and nothing was written",
        )
        .remedy("choose another folder, or move the file away")
        .into());
    }
    for (path, content) in &files {
        write(path, content)?;
    }
    output.remark(&format!("{} files written below {}", files.len(), folder.display()));
    Ok(Exit::Done)
}

/// Writes a file whole or not at all: under a temporary name, then renamed.
pub(super) fn write(path: &Path, content: &[u8]) -> Result<(), Stop> {
    let attempt = || -> std::io::Result<()> {
        let folder = path.parent().filter(|p| !p.as_os_str().is_empty()).unwrap_or(Path::new("."));
        std::fs::create_dir_all(folder)?;
        let mut file = tempfile::NamedTempFile::new_in(folder)?;
        std::io::Write::write_all(&mut file, content)?;
        file.as_file().sync_all()?;
        set_ordinary_permissions(&file)?;
        file.persist(path).map_err(|error| error.error)?;
        Ok(())
    };
    attempt().map_err(|error| {
        Finding::error(
            "output-write",
            Place::file(path.display().to_string()),
            format!("the file could not be written: {error}"),
        )
        .remedy(
            "check the folder, its permissions and the free space; nothing was left half-written",
        )
        .into()
    })
}

/// Temporary files are private; results are to be read by others as usual.
fn set_ordinary_permissions(file: &tempfile::NamedTempFile) -> std::io::Result<()> {
    #[cfg(unix)]
    {
        use std::os::unix::fs::PermissionsExt;
        file.as_file().set_permissions(std::fs::Permissions::from_mode(0o644))?;
    }
    #[cfg(not(unix))]
    let _ = file;
    Ok(())
}
