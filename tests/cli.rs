//! The program as its users meet it: commands in an empty environment and a
//! temporary folder.

#![expect(clippy::unwrap_used, reason = "a test fails by panicking")]

mod cli {
    mod bad_input;
    mod contract;
    mod program;
}
