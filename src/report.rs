//! How results look: machine tables, terminal text, figures.
//!
//! Plain values come in, text goes out; nothing here knows a network, prints or
//! touches files.

pub mod table;
pub mod text;
