//! The only place that opens and writes files.

use std::io::{BufRead, BufReader, Read, Write};
use std::path::{Path, PathBuf};
use tempfile::NamedTempFile;

/// No flight file and no recording is longer than this; a longer one is something else.
const LONGEST_INPUT: u64 = 64 << 20;

/// A file that cannot be read or written.
#[derive(Debug, thiserror::Error)]
pub(super) enum FileError {
    #[error("{source_name}: cannot be read: {source}")]
    Read { source_name: String, source: std::io::Error },
    #[error("{source_name}: longer than {} MB, which no flight and no recording is", LONGEST_INPUT >> 20)]
    TooLong { source_name: String },
    #[error("{}: cannot be written: {source}", .path.display())]
    Write { path: PathBuf, source: std::io::Error },
}

/// What a file is called in messages.
pub(super) fn source_name(path: &Path) -> String {
    if path == Path::new("-") { "standard input".to_string() } else { path.display().to_string() }
}

/// All bytes of a file, or of standard input for `-`.
pub(super) fn read(path: &Path) -> Result<Vec<u8>, FileError> {
    let fail = |source| FileError::Read { source_name: source_name(path), source };
    let mut bytes = Vec::new();
    let limit = LONGEST_INPUT + 1;
    if path == Path::new("-") {
        std::io::stdin().lock().take(limit).read_to_end(&mut bytes).map_err(fail)?;
    } else {
        std::fs::File::open(path).map_err(fail)?.take(limit).read_to_end(&mut bytes).map_err(fail)?;
    }
    if bytes.len() as u64 > LONGEST_INPUT {
        Err(FileError::TooLong { source_name: source_name(path) })
    } else {
        Ok(bytes)
    }
}

/// The longest line of a file that is read line by line.
const LONGEST_LINE: u64 = 64 << 10;

/// Gives a file's lines one after another, so that a long file needs no room; a line that is too long, or no text, is
/// given as nothing.
pub(super) fn each_line(path: &Path, mut take: impl FnMut(Option<&str>)) -> Result<(), FileError> {
    let fail = |source| FileError::Read { source_name: source_name(path), source };
    let mut reader = BufReader::new(std::fs::File::open(path).map_err(fail)?);
    let mut bytes = Vec::new();
    loop {
        bytes.clear();
        let read = (&mut reader).take(LONGEST_LINE).read_until(b'\n', &mut bytes).map_err(fail)?;
        if read == 0 {
            return Ok(());
        }
        if bytes.last() != Some(&b'\n') && read as u64 == LONGEST_LINE {
            reader.skip_until(b'\n').map_err(fail)?;
            bytes.push(0xff);
        }
        take(std::str::from_utf8(&bytes).ok().map(|text| text.trim_end_matches(['\r', '\n'])));
    }
}

/// Files that appear together and whole, or not at all: each is written under a temporary name beside its final one,
/// and only when all are complete do they take their names.
pub(super) struct Batch<'a> {
    folder: &'a Path,
    written: Vec<(NamedTempFile, PathBuf)>,
}

impl<'a> Batch<'a> {
    /// A batch for a folder, which is made if it is missing.
    pub(super) fn new(folder: &'a Path) -> Result<Self, FileError> {
        std::fs::create_dir_all(folder)
            .map_err(|source| FileError::Write { path: folder.to_path_buf(), source })?;
        Ok(Self { folder, written: Vec::new() })
    }

    /// Adds a file.
    pub(super) fn add(&mut self, name: &str, bytes: &[u8]) -> Result<(), FileError> {
        let path = self.folder.join(name);
        let fail = |source| FileError::Write { path: path.clone(), source };
        let mut builder = tempfile::Builder::new();
        #[cfg(unix)]
        {
            use std::os::unix::fs::PermissionsExt;
            // as any new file: the process's mask takes away what it should
            builder.permissions(std::fs::Permissions::from_mode(0o666));
        }
        let mut file = builder.prefix(".gloamline-").tempfile_in(self.folder).map_err(fail)?;
        file.write_all(bytes).and_then(|()| file.as_file().sync_all()).map_err(fail)?;
        self.written.push((file, path));
        Ok(())
    }

    /// Gives all files their names; if one cannot take it, those that have are taken away again.
    pub(super) fn finish(self) -> Result<(), FileError> {
        let mut named: Vec<PathBuf> = Vec::with_capacity(self.written.len());
        for (file, path) in self.written {
            if let Err(error) = file.persist(&path) {
                for done in &named {
                    // what cannot be removed either leaves nothing better to do
                    let _ = std::fs::remove_file(done);
                }
                return Err(FileError::Write { path, source: error.error });
            }
            named.push(path);
        }
        Ok(())
    }
}
