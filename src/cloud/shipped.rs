//! The run files that come with the program, compiled in.

use include_dir::{Dir, include_dir};

static RUNS: Dir<'_> = include_dir!("$CARGO_MANIFEST_DIR/runs");

/// Names of the shipped runs, sorted.
#[must_use]
pub fn names() -> Vec<&'static str> {
    let mut names: Vec<&str> =
        RUNS.files().filter_map(|file| file.path().to_str()?.strip_suffix(".toml")).collect();
    names.sort_unstable();
    names
}

/// The text of a shipped run.
#[must_use]
pub fn text(name: &str) -> Option<&'static str> {
    RUNS.get_file(format!("{name}.toml"))?.contents_utf8()
}
