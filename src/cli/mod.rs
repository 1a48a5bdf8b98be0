//! Arguments, files and the terminal: everything that touches the outside.

mod aerodrome;
mod arguments;
mod brief;
mod files;
mod fixes;
mod sun;
mod terminal;

use arguments::{Arguments, Command};
use clap::Parser;
use std::process::ExitCode;

/// How a command ended; each has its exit code.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Outcome {
    /// All was done.
    Done,
    /// Some inputs were refused, the rest was done.
    SomeRefused,
    /// Nothing could be done.
    Failed,
}

impl Outcome {
    /// The outcome of a command that does one thing: a refusal is said, with its cure where one is known.
    fn of<R: std::fmt::Display>(told: Result<(), R>, hint: impl Fn(&R) -> Option<String>) -> Self {
        match told {
            Ok(()) => Self::Done,
            Err(refusal) => {
                terminal::complain(&refusal, hint(&refusal).as_deref());
                Self::Failed
            }
        }
    }
}

/// Runs what the arguments ask for.
pub(crate) fn run() -> ExitCode {
    let arguments = match Arguments::try_parse() {
        Ok(arguments) => arguments,
        Err(error) => return terminal::usage(&error),
    };
    let outcome = match arguments.command {
        Command::Brief(request) => brief::run(&request),
        Command::Sun(request) => sun::run(&request),
        Command::Aerodrome(request) => aerodrome::run(&request),
    };
    ExitCode::from(match outcome {
        Outcome::Done => 0,
        Outcome::SomeRefused => 1,
        Outcome::Failed => 2,
    })
}
