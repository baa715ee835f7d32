//! The house rules that a machine can check: rooms, file sizes, introductions.

#![allow(clippy::unwrap_used, reason = "a test fails by panicking")]

use std::fs;
use std::path::{Path, PathBuf};

/// The rooms in reading order, each with the rooms that it may use.
/// `DEVELOPERS.md` shows the same table to people.
const ROOMS: &[(&str, &[&str])] = &[
    ("units", &[]),
    ("diagnostic", &[]),
    ("species", &["units", "diagnostic"]),
    ("rates", &["units", "species"]),
    ("network", &["units", "diagnostic", "species", "rates"]),
    ("sparse", &[]),
    ("integrate", &["sparse"]),
    ("kinetics", &["network", "rates", "sparse", "integrate"]),
    (
        "cloud",
        &["units", "diagnostic", "species", "rates", "network", "sparse", "kinetics", "integrate"],
    ),
    (
        "analysis",
        &["units", "diagnostic", "species", "rates", "network", "kinetics", "integrate", "cloud"],
    ),
    ("report", &["units", "analysis"]),
    ("cli", &["units", "diagnostic", "species", "rates", "network", "cloud", "analysis", "report"]),
];

/// Lines that a source file may have; it wants to be under 300.
const MOST_LINES: usize = 500;

fn root() -> PathBuf {
    PathBuf::from(env!("CARGO_MANIFEST_DIR"))
}

fn rust_files(folder: &Path) -> Vec<PathBuf> {
    let mut files = Vec::new();
    for entry in fs::read_dir(folder).unwrap() {
        let path = entry.unwrap().path();
        if path.is_dir() {
            files.extend(rust_files(&path));
        } else if path.extension().is_some_and(|e| e == "rs") {
            files.push(path);
        }
    }
    files.sort();
    files
}

/// The room of a file below `src/`.
fn room(file: &Path) -> String {
    let inside = file.strip_prefix(root().join("src")).unwrap();
    let first = inside.components().next().unwrap();
    first.as_os_str().to_str().unwrap().trim_end_matches(".rs").to_owned()
}

/// Rooms that a text names as `crate::ROOM`.
fn rooms_used(text: &str) -> Vec<String> {
    // Unit tests may reach further: they build what they test from below.
    let text = text.split("#[cfg(test)]").next().unwrap();
    text.lines()
        .filter(|line| !line.trim_start().starts_with("//"))
        .flat_map(|line| line.match_indices("crate::").map(move |(at, _)| &line[at + 7..]))
        .flat_map(|rest| {
            let names: String = rest
                .chars()
                .take_while(|c| c.is_alphanumeric() || *c == '_' || *c == '{')
                .collect();
            names.split('{').map(str::to_owned).filter(|n| !n.is_empty()).collect::<Vec<_>>()
        })
        .collect()
}

#[test]
fn every_room_uses_only_the_rooms_below_it() {
    let mut wrong = Vec::new();
    for file in rust_files(&root().join("src")) {
        let room = room(&file);
        if matches!(room.as_str(), "lib" | "main") || file.ends_with("tests.rs") {
            continue;
        }
        let Some((_, allowed)) = ROOMS.iter().find(|(name, _)| *name == room) else {
            wrong.push(format!("{} is in no known room", file.display()));
            continue;
        };
        for used in rooms_used(&fs::read_to_string(&file).unwrap()) {
            let is_room = ROOMS.iter().any(|(name, _)| *name == used);
            if is_room && used != room && !allowed.contains(&used.as_str()) {
                wrong.push(format!("{} uses {used}", file.display()));
            }
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn the_developers_guide_shows_every_room() {
    let guide = fs::read_to_string(root().join("DEVELOPERS.md")).unwrap();
    for (room, allowed) in ROOMS {
        let row = guide
            .lines()
            .find(|line| line.starts_with(&format!("| `{room}` |")))
            .unwrap_or_else(|| panic!("DEVELOPERS.md has no row for {room}"));
        let shown = row.rsplit('|').nth(1).unwrap();
        for other in *allowed {
            assert!(shown.contains(other), "{room}: the row does not name {other}");
        }
    }
}

#[test]
fn every_file_says_what_it_is_for_and_stays_small() {
    let mut wrong = Vec::new();
    for folder in ["src", "tests"] {
        for file in rust_files(&root().join(folder)) {
            let text = fs::read_to_string(&file).unwrap();
            if !text.starts_with("//!") {
                wrong.push(format!("{} does not open with //!", file.display()));
            }
            let lines = text.lines().count();
            if lines > MOST_LINES {
                wrong.push(format!("{} has {lines} lines", file.display()));
            }
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}

#[test]
fn only_the_command_line_prints_and_touches_files() {
    let mut wrong = Vec::new();
    for file in rust_files(&root().join("src")) {
        if matches!(room(&file).as_str(), "cli" | "main") {
            continue;
        }
        let text = fs::read_to_string(&file).unwrap();
        let text = text.split("#[cfg(test)]").next().unwrap();
        for word in ["std::fs", "println!", "eprintln!", "std::process::exit", "File::open"] {
            if text.contains(word) && !file.ends_with("tests.rs") {
                wrong.push(format!("{} has {word}", file.display()));
            }
        }
    }
    assert!(wrong.is_empty(), "{}", wrong.join("\n"));
}
