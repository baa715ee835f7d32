//! Why an integration was given up.

/// What stopped the integration.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Cause {
    /// The step that the tolerance asks for is below the resolution of time.
    StepTooSmall,
    /// The limit of steps was reached.
    TooManySteps,
    /// The state or its rate of change is not a finite number.
    NotFinite,
}

/// An integration that was given up: when, at which unknown, and why.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Failure {
    /// Time that was reached.
    pub time: f64,
    /// Step that was tried last.
    pub step: f64,
    /// Unknown with the largest error in the last try.
    pub unknown: usize,
    /// What stopped it.
    pub cause: Cause,
}

impl std::fmt::Display for Cause {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        f.write_str(match self {
            Self::StepTooSmall => "the step fell below the resolution of time",
            Self::TooManySteps => "the limit of steps was reached",
            Self::NotFinite => "a value stopped being a finite number",
        })
    }
}
