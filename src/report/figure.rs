//! Charts drawn as SVG: curves, stacked shares and ranked bars.
//!
//! A chart is a struct of plain values with a `to_svg` method. The same values
//! always give the same bytes. Text stays text, no element needs an `id` (so
//! that any number of figures can share one page), and every figure carries a
//! `<title>` and a `<desc>` for screen readers. Colours are the palette of
//! Okabe & Ito (2008); dashes, numbers and direct labels carry the same
//! information, so that colour is never the only cue.
//!
//! # Marked text
//!
//! Titles, headings, axis labels and notes read a little markup:
//!
//! | written | drawn |
//! |---|---|
//! | `cm^{-3}` | superscript |
//! | `n_{H}` | subscript |
//! | `*n*` | italic |
//! | `` `H3O+ + e- -> OH + H + H` `` | chemical notation |
//!
//! Names of series, layers and bars are always read as chemical notation.
//! Words that are no formula are left as they are.

mod bars;
mod frame;
mod labels;
mod lines;
mod palette;
#[cfg(feature = "png")]
pub mod png;
mod rich;
mod scale;
mod shares;
mod sheet;
mod stack;
mod svg;

pub use bars::{BarChart, BarGroup, BarRow};
pub use lines::{LineChart, Series};
pub use scale::{Axis, Spacing};
pub use shares::{ShareLayer, SharePanel, StackedShares};

#[cfg(test)]
mod tests;
