//! The `duskwater` program; everything it does lives in the library.

use std::process::ExitCode;

fn main() -> ExitCode {
    duskwater::cli::run(std::env::args_os())
}
