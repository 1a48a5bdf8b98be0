//! The command line of gloamline: arguments in, a brief out, and an exit code that tells how it went.

mod cli;

use std::process::ExitCode;

fn main() -> ExitCode {
    cli::run()
}
