//! Rust files with their comments and strings blanked out, so that only code is judged.

use std::path::{Path, PathBuf};

/// A file of the project.
pub(super) struct Source {
    /// From the project's folder on, with slashes.
    pub(super) path: String,
    pub(super) text: String,
    /// The text with blanks for what stands in comments, strings and characters; lines stay where they are.
    pub(super) code: String,
}

impl Source {
    pub(super) fn of(path: String, text: String) -> Self {
        let code = code_of(&text);
        Self { path, text, code }
    }

    /// The line, from 1, on which a byte stands.
    pub(super) fn line(&self, byte: usize) -> usize {
        self.code[..byte].matches('\n').count() + 1
    }
}

pub(super) fn root() -> &'static Path {
    Path::new(env!("CARGO_MANIFEST_DIR"))
}

fn walk(folder: &Path, found: &mut Vec<PathBuf>) {
    let mut entries: Vec<PathBuf> =
        std::fs::read_dir(folder).unwrap().map(|entry| entry.unwrap().path()).collect();
    entries.sort();
    for path in entries {
        let name = path.file_name().unwrap_or_default().to_string_lossy().into_owned();
        if path.is_dir() {
            if !["target", ".git", "__pycache__"].contains(&name.as_str()) {
                walk(&path, found);
            }
        } else if path.is_file() && name != ".git" {
            found.push(path);
        }
    }
}

/// Every file of the project but what is built.
pub(super) fn all_files() -> Vec<PathBuf> {
    let mut found = Vec::new();
    walk(root(), &mut found);
    found
}

/// The Rust files under a folder.
pub(super) fn sources(folder: &str) -> Vec<Source> {
    let mut found = Vec::new();
    walk(&root().join(folder), &mut found);
    let rust = found.into_iter().filter(|path| path.extension().is_some_and(|e| e == "rs"));
    rust.map(|path| {
        let text = std::fs::read_to_string(&path).unwrap();
        let inner = path.strip_prefix(root()).unwrap().to_string_lossy().replace('\\', "/");
        Source::of(inner, text)
    })
    .collect()
}

/// The text with comments, strings and characters blanked byte for byte.
fn code_of(text: &str) -> String {
    let bytes = text.as_bytes();
    let mut code = Vec::with_capacity(bytes.len());
    let mut at = 0;
    while at < bytes.len() {
        let length = blank_length(&bytes[at..], bytes[..at].last().copied());
        if length == 0 {
            code.push(bytes[at]);
            at += 1;
            continue;
        }
        let end = (at + length).min(bytes.len());
        code.extend(bytes[at..end].iter().map(|&b| if b == b'\n' { b } else { b' ' }));
        at = end;
    }
    String::from_utf8(code).unwrap()
}

/// How many bytes from here on are a comment, a string or a character.
fn blank_length(rest: &[u8], before: Option<u8>) -> usize {
    let in_word = before.is_some_and(|b| b.is_ascii_alphanumeric() || b == b'_');
    match rest {
        [b'/', b'/', ..] => rest.iter().position(|&b| b == b'\n').unwrap_or(rest.len()),
        [b'/', b'*', ..] => find(rest, b"*/", 2).unwrap_or(rest.len()),
        [b'"', ..] => quoted_length(rest),
        [b'r', b'"' | b'#', ..] if !in_word => raw_length(rest),
        [b'\'', b'\\', ..] => find(rest, b"'", 3).unwrap_or(0),
        // a character, not a lifetime: it closes within one code point
        [b'\'', ..] => find(rest, b"'", 2)
            .filter(|&length| length <= 6 && !rest[1..length - 1].contains(&b' ') || length == 3)
            .unwrap_or(0),
        _ => 0,
    }
}

fn find(rest: &[u8], end: &[u8], from: usize) -> Option<usize> {
    let at = rest.get(from..)?.windows(end.len()).position(|window| window == end)?;
    Some(from + at + end.len())
}

fn quoted_length(rest: &[u8]) -> usize {
    let mut escaped = false;
    for (i, &b) in rest.iter().enumerate().skip(1) {
        match b {
            _ if escaped => escaped = false,
            b'\\' => escaped = true,
            b'"' => return i + 1,
            _ => {}
        }
    }
    rest.len()
}

fn raw_length(rest: &[u8]) -> usize {
    let hashes = rest[1..].iter().take_while(|&&b| b == b'#').count();
    if rest.get(1 + hashes) != Some(&b'"') {
        return 0;
    }
    let end: Vec<u8> = std::iter::once(b'"').chain(std::iter::repeat_n(b'#', hashes)).collect();
    find(rest, &end, 2 + hashes).unwrap_or(rest.len())
}

#[test]
fn only_code_is_left() {
    let text = "let a = \"x\\\"y\"; // z\nlet b = r#\"q\"w\"#; /* e\n */ fn f<'a>(c: char) { c == '\\'' || c == '\"' || c == '…' }";
    let code = code_of(text);
    assert_eq!(code.len(), text.len());
    assert_eq!(
        code.split_whitespace().collect::<Vec<_>>().join(" "),
        "let a = ; let b = ; fn f<'a>(c: char) { c == || c == || c == }"
    );
    assert_eq!(code.lines().count(), 3);
}
