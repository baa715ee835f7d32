//! Colours, dash patterns and type sizes shared by all charts.
//!
//! Source of the colours: Okabe & Ito 2008, "Color Universal Design"
//! (provenance: memory); their yellow is left out of lines because it is too
//! light on white paper.

/// Text and frames.
pub(super) const INK: &str = "#1a1a1a";
/// Secondary text.
pub(super) const SOFT: &str = "#555555";
/// Grid lines.
pub(super) const GRID: &str = "#e8e8e8";
/// Whatever is not listed by name.
pub(super) const REST: &str = "#ececec";
/// Paper.
pub(super) const PAPER: &str = "#ffffff";

/// Type sizes in user units.
pub(super) const TITLE_SIZE: f64 = 16.0;
pub(super) const SUBTITLE_SIZE: f64 = 12.5;
pub(super) const LABEL_SIZE: f64 = 13.0;
pub(super) const TICK_SIZE: f64 = 12.0;
pub(super) const NOTE_SIZE: f64 = 10.5;

/// Colours of lines, and darker ones for text beside them.
const LINES: [(&str, &str); 7] = [
    ("#0072b2", "#005f96"),
    ("#d55e00", "#a84a00"),
    ("#009e73", "#00704f"),
    ("#cc79a7", "#9a3f72"),
    ("#000000", "#000000"),
    ("#56b4e9", "#1f6f9f"),
    ("#e69f00", "#8a5f00"),
];

/// Dash patterns; empty is solid.
const DASHES: [&str; 7] = ["", "8 3", "2 2.5", "9 3 2 3", "14 3", "9 3 2 3 2 3", "4.5 2.5"];

/// Fills of areas: light enough for dark text upon them, neighbours unlike.
const FILLS: [&str; 8] =
    ["#7fb8d8", "#f0b48c", "#7fcdb5", "#f5eb8a", "#e0b3cb", "#b5dcf4", "#f2cf80", "#c4c4c4"];

/// Colour of line `i`, the colour of its label, and its dash pattern. The
/// pairs of colour and dash repeat only after 49 lines.
pub(super) fn line(i: usize) -> (&'static str, &'static str, &'static str) {
    let (stroke, text) = LINES[i % LINES.len()];
    (stroke, text, DASHES[(i + i / LINES.len()) % DASHES.len()])
}

/// Fill of area `i`.
pub(super) fn fill(i: usize) -> &'static str {
    FILLS[i % FILLS.len()]
}
