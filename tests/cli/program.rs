//! Runs the built program in a folder of its own.

use std::path::Path;
use std::process::{Command, Output, Stdio};

use tempfile::TempDir;

/// A small network of made-up elements that loads without a finding.
pub(crate) const SPECIES: &str = "\
species,composition,delta_f_h_0K_kJ_mol,polarizability_A3,dipole_D,source,provenance,note
A,Q:1,,,,lab,seen,
B,Q:1,,,,lab,seen,
H,,,,,lab,seen,
H2,,,0.8,,lab,seen,
H3+,,,,,lab,seen,
e-,,,,,lab,seen,
";
pub(crate) const REACTIONS: &str = "\
id,equation,law,alpha,beta,gamma,t_min,t_max,uncertainty,source,provenance,note
r-1,A -> B,thermal,1e-12,0,0,5,3000,1.5,lab,seen,
r-2,B -> A,thermal,2e-12,0,0,5,3000,1.5,lab,seen,
r-3,H2 -> H + H,cosmic_ray,1,0,0,5,3000,1.5,lab,seen,
r-4,H + H -> H2,dust_h2,3e-17,0.5,0,5,3000,1.5,lab,seen,
r-5,H3+ + e- -> H2 + H,thermal,1e-7,-0.5,0,5,3000,1.5,lab,seen,
";
pub(crate) const SOURCES: &str = "key,citation,doi\nlab,An invented laboratory,\n";
pub(crate) const HEAD: &str =
    "title = \"Test\"\ntext = \"\"\nelements = [\"H\", \"Q\"]\npurpose = \"tests\"\n";
pub(crate) const RUN: &str = "\
title = \"Test\"
network = \"net\"
[cloud]
hydrogen_density = 1e4
temperature = 10
cosmic_ray_ionization_rate = 1e-17
visual_extinction = 10
[start]
H2 = 0.5
A = 1e-4
[times]
until = 1e6
output = [1e3, 1e5]
[watch]
species = [\"A\"]
";

/// A folder with the run `run.toml` and the network `net`, ready to be spoilt.
pub(crate) fn folder() -> TempDir {
    let folder = tempfile::tempdir().unwrap();
    write(folder.path(), "run.toml", RUN.as_bytes());
    for (file, text) in [
        ("net/network.toml", HEAD),
        ("net/species.csv", SPECIES),
        ("net/reactions.csv", REACTIONS),
        ("net/sources.csv", SOURCES),
    ] {
        write(folder.path(), file, text.as_bytes());
    }
    folder
}

/// Writes a file below a folder.
pub(crate) fn write(folder: &Path, file: &str, content: &[u8]) {
    let path = folder.join(file);
    std::fs::create_dir_all(path.parent().unwrap()).unwrap();
    std::fs::write(path, content).unwrap();
}

/// The program with an empty environment in a folder.
pub(crate) fn program(folder: &Path, arguments: &[&str]) -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_duskwater"));
    command.args(arguments).current_dir(folder).env_clear().stdin(Stdio::null());
    command
}

/// Runs the program.
pub(crate) fn run(folder: &Path, arguments: &[&str]) -> Output {
    program(folder, arguments).output().unwrap()
}

pub(crate) fn stdout(output: &Output) -> String {
    String::from_utf8(output.stdout.clone()).unwrap()
}

pub(crate) fn stderr(output: &Output) -> String {
    String::from_utf8(output.stderr.clone()).unwrap()
}

/// Rows of a csv output under their headings.
pub(crate) fn rows(output: &Output) -> (Vec<String>, Vec<Vec<String>>) {
    let mut reader = csv::Reader::from_reader(output.stdout.as_slice());
    let head = reader.headers().unwrap().iter().map(str::to_owned).collect();
    let rows = reader
        .records()
        .map(|record| record.unwrap().iter().map(str::to_owned).collect())
        .collect();
    (head, rows)
}
