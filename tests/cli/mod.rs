//! The built program, run as its users run it.

mod aerodrome;
mod batch;
mod brightness;
mod forms;
mod hostile;
mod raw;
mod refusal;
mod route;
mod sun;
mod writing;

use std::io::Write;
use std::path::Path;
use std::process::{Command, Output, Stdio};

/// A long-haul flight that is briefed without complaint.
pub(crate) const FLIGHT: &str = r#"
name = "Varde 71"
from = "CYYZ"
to = "VHHH"
takeoff = 2026-12-18T05:10:00Z
airborne = "14h55m"
"#;

/// How a run ended and what it said.
#[derive(Debug)]
struct Ran {
    code: Option<i32>,
    out: String,
    err: String,
}

impl Ran {
    fn of(output: &Output) -> Self {
        let text = |bytes: &[u8]| String::from_utf8(bytes.to_vec()).unwrap();
        Self { code: output.status.code(), out: text(&output.stdout), err: text(&output.stderr) }
    }

    fn done(self) -> String {
        assert_eq!((self.code, self.err.as_str()), (Some(0), ""), "{}", self.out);
        self.out
    }

    /// Nothing was done, and this is what was said.
    fn refused(&self) -> &str {
        assert_eq!((self.code, self.out.as_str()), (Some(2), ""), "{}", self.err);
        assert!(!self.err.contains("panicked"), "{}", self.err);
        &self.err
    }
}

fn program() -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_gloamline"));
    command.stdin(Stdio::null());
    command
}

fn run(arguments: &[&str]) -> Ran {
    Ran::of(&program().args(arguments).output().unwrap())
}

fn run_in(folder: &Path, arguments: &[&str]) -> Ran {
    Ran::of(&program().current_dir(folder).args(arguments).output().unwrap())
}

/// Runs with bytes on standard input.
fn run_fed(input: &[u8], arguments: &[&str]) -> Ran {
    let mut child = program()
        .args(arguments)
        .stdin(Stdio::piped())
        .stdout(Stdio::piped())
        .stderr(Stdio::piped())
        .spawn()
        .unwrap();
    // the program may refuse before it has read everything
    let _ = child.stdin.take().unwrap().write_all(input);
    Ran::of(&child.wait_with_output().unwrap())
}

/// A folder with these files in it.
fn folder(files: &[(&str, &str)]) -> tempfile::TempDir {
    let folder = tempfile::tempdir().unwrap();
    for (name, text) in files {
        std::fs::write(folder.path().join(name), text).unwrap();
    }
    folder
}

/// The names of what lies in a folder, hidden files too.
fn names(folder: &Path) -> Vec<String> {
    let entries = std::fs::read_dir(folder).unwrap();
    let mut names: Vec<String> =
        entries.map(|entry| entry.unwrap().file_name().into_string().unwrap()).collect();
    names.sort();
    names
}
