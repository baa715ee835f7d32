//! The command line: one file per verb under `cli/`, and what they share.
//!
//! Only this room reads files, prints and decides exit codes. Results go to
//! standard output, everything else to standard error.

mod arguments;
mod exit;
mod findings;
mod load;
mod output;

mod channel_text;
mod channels;
mod check;
mod evolve;
mod explain;
mod figures;
mod header;
mod rates;
mod shipped;
mod species;
mod steady;

use std::ffi::OsString;
use std::io::Write;
use std::process::ExitCode;

use clap::Parser;

use arguments::{Arguments, Command};
use exit::{Exit, Stop};
use output::Output;

/// Runs the program with its arguments (the first is the program's name) and
/// returns its exit code; see `docs/errors.md` for the codes.
pub fn run(arguments: impl IntoIterator<Item = OsString>) -> ExitCode {
    let arguments: Vec<OsString> = arguments.into_iter().collect();
    // A panic has told its place already; say whose mistake it is.
    std::panic::catch_unwind(|| run_verb(arguments)).unwrap_or_else(|_| {
        let _ = writeln!(
            anstream::stderr(),
            "internal error: this is a mistake in duskwater; please report it with the command line"
        );
        Exit::Internal.into()
    })
}

fn run_verb(arguments: Vec<OsString>) -> ExitCode {
    let arguments = match Arguments::try_parse_from(arguments) {
        Ok(arguments) => arguments,
        Err(error) => {
            // clap prints help and versions to stdout, mistakes to stderr.
            let failed = error.use_stderr();
            let written = error.print().is_ok();
            return if failed || !written { Exit::CouldNotRun } else { Exit::Done }.into();
        }
    };
    let mut output = Output::new(&arguments.common);
    let outcome = match &arguments.command {
        Command::Check(a) => check::run(a, &mut output),
        Command::Rates(a) => rates::run(a, &mut output),
        Command::Evolve(a) => evolve::run(a, &mut output),
        Command::Steady(a) => steady::run(a, &mut output),
        Command::Channels(a) => channels::run(a, &mut output),
        Command::Shipped(a) => shipped::run(a, &mut output),
        Command::Explain(a) => explain::run(a, &mut output),
    };
    let outcome = outcome.and_then(|exit| output.finish().map(|()| exit));
    match outcome {
        Ok(exit) => exit.into(),
        Err(Stop::ClosedPipe) => Exit::Done.into(),
        Err(Stop::Findings(findings)) => {
            output.findings(&findings);
            Exit::CouldNotRun.into()
        }
    }
}
