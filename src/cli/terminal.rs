//! The only place that prints.
#![allow(clippy::print_stdout, clippy::print_stderr)]

use std::io::{ErrorKind, Write};
use std::process::ExitCode;

/// Writes a result to standard output. A reader that has gone away has what it wanted.
///
/// # Errors
/// Standard output cannot be written, a full disk behind it for one.
pub(super) fn show(text: &str) -> std::io::Result<()> {
    let mut out = std::io::stdout().lock();
    match out.write_all(text.as_bytes()).and_then(|()| out.flush()) {
        Err(error) if error.kind() == ErrorKind::BrokenPipe => Ok(()),
        other => other,
    }
}

/// Says what went wrong, and how to mend it, on standard error.
pub(super) fn complain(problem: &dyn std::fmt::Display, hint: Option<&str>) {
    // standard error that has gone away leaves nobody to tell
    let mut err = std::io::stderr().lock();
    let _ = writeln!(err, "gloamline: {}", inert(&problem.to_string()));
    if let Some(hint) = hint {
        let _ = writeln!(err, "  hint: {}", inert(hint));
    }
}

/// A complaint without control characters: the name of a file may hold any.
fn inert(text: &str) -> String {
    let escaped = |c: char| if c.is_control() { c.escape_default().to_string() } else { c.to_string() };
    text.chars().map(escaped).collect()
}

/// Shows what the argument parser has to say: help and version are results, the rest are complaints.
pub(super) fn usage(error: &clap::Error) -> ExitCode {
    let _ = error.print();
    ExitCode::from(if error.use_stderr() { 2 } else { 0 })
}
