//! Figures of commands, written to files.

use std::path::Path;

use super::exit::Stop;
use super::output::Output;
use crate::cloud::Model;
use crate::diagnostic::{Finding, Place};

pub(super) fn abundances(_: &Model, _: &[usize], path: &Path, _: &mut Output) -> Result<(), Stop> {
    Err(Finding::error("output-figure", Place::file(path.display().to_string()), "no figures yet")
        .into())
}
pub(super) fn channels(_: &Model, _: usize, path: &Path, _: &mut Output) -> Result<(), Stop> {
    Err(Finding::error("output-figure", Place::file(path.display().to_string()), "no figures yet")
        .into())
}
