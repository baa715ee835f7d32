//! Exit codes, and the ways in which a command stops early.

use std::process::ExitCode;

use crate::diagnostic::{Finding, Place};

/// How the program ends.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Exit {
    /// 0: done.
    Done,
    /// 1: done, with findings or failed cells.
    WithFindings,
    /// 2: could not run: bad input or usage, or output that cannot be written.
    CouldNotRun,
    /// 3: a mistake in the program.
    Internal,
}

impl From<Exit> for ExitCode {
    fn from(exit: Exit) -> Self {
        Self::from(match exit {
            Exit::Done => 0,
            Exit::WithFindings => 1,
            Exit::CouldNotRun => 2,
            Exit::Internal => 3,
        })
    }
}

/// Why a command stopped before its end.
#[derive(Debug)]
pub(super) enum Stop {
    /// The reader of standard output went away: no mistake.
    ClosedPipe,
    /// What was found wrong.
    Findings(Vec<Finding>),
}

impl From<Vec<Finding>> for Stop {
    fn from(findings: Vec<Finding>) -> Self {
        Self::Findings(findings)
    }
}

impl From<Finding> for Stop {
    fn from(finding: Finding) -> Self {
        Self::Findings(vec![finding])
    }
}

impl From<std::io::Error> for Stop {
    fn from(error: std::io::Error) -> Self {
        if error.kind() == std::io::ErrorKind::BrokenPipe {
            return Self::ClosedPipe;
        }
        Finding::error(
            "output-write",
            Place::file("standard output"),
            format!("the output could not be written: {error}"),
        )
        .remedy("free some space, or send the output elsewhere")
        .into()
    }
}

/// What every command returns.
pub(super) type Outcome = Result<Exit, Stop>;
