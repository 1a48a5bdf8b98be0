//! `--fixes`: a user's own points, read a line at a time.

use super::files::{self, FileError};
use super::terminal;
use gloamline::intake::Fixes;
use std::path::Path;

/// Bad rows beyond this many are counted and not shown.
const MOST_SHOWN: usize = 20;

/// The fixes of a file and how many of its rows were refused; each is told with its line.
pub(super) fn read(path: &Path) -> Result<(Fixes, usize), FileError> {
    let mut fixes = Fixes::of(&files::source_name(path));
    let mut bad = 0;
    files::each_line(path, |line| {
        // what is no text is refused by its line like any other bad row
        if let Err(error) = fixes.take(line.unwrap_or("\0")) {
            bad += 1;
            if bad <= MOST_SHOWN {
                terminal::complain(&error, error.hint().as_deref());
            }
        }
    })?;
    if bad > MOST_SHOWN {
        let name = files::source_name(path);
        terminal::complain(&format!("{name}: {} more rows were refused", bad - MOST_SHOWN), None);
    }
    Ok((fixes, bad))
}
