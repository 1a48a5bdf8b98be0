//! What a file takes from its own crate: `use` with its braces opened, and paths written out in the code.

use super::scan::Source;

/// A path from the crate's root, as segments, and where it stands.
pub(super) struct Import {
    pub(super) path: Vec<String>,
    pub(super) line: usize,
}

/// Every path that begins at `crate` or climbs out by `super`.
pub(super) fn imports(source: &Source) -> Vec<Import> {
    let code = &source.code;
    let mut found = Vec::new();
    let mut at = 0;
    while let Some((start, word)) = next_head(code, at) {
        let (climb, begin) = climb(code, start, word);
        let (tree, end) = tree(code, begin);
        for path in opened(&tree) {
            if let Some(path) = from_root(source, start, climb, path) {
                found.push(Import { path, line: source.line(start) });
            }
        }
        at = end.max(start + word.len());
    }
    found
}

/// The next `crate` or `super` that begins a path.
fn next_head(code: &str, from: usize) -> Option<(usize, &'static str)> {
    let at = |word: &'static str| {
        let mut places = code[from..].match_indices(word).map(|(i, _)| from + i);
        places.find(|&i| begins_path(code, i, word)).map(|i| (i, word))
    };
    [at("crate"), at("super")].into_iter().flatten().min()
}

fn begins_path(code: &str, at: usize, word: &str) -> bool {
    let before = code[..at].chars().next_back();
    let fresh = !before.is_some_and(|c| c.is_alphanumeric() || c == '_' || c == ':' || c == '$');
    // `pub(crate)` and `pub(super)` are no paths
    fresh && code[at + word.len()..].trim_start().starts_with("::")
}

/// How many times a path climbs, nothing for one from the root, and where the rest of it begins.
fn climb(code: &str, start: usize, word: &str) -> (Option<usize>, usize) {
    let after = |at: usize| at + code[at..].find("::").unwrap_or(0) + 2;
    let mut at = after(start + word.len());
    if word == "crate" {
        return (None, at);
    }
    let mut times = 1;
    while code[at..].starts_with("super::") {
        at += "super::".len();
        times += 1;
    }
    (Some(times), at)
}

/// The text of a path with its braces, and where it ends.
fn tree(code: &str, begin: usize) -> (String, usize) {
    let mut depth = 0;
    for (i, c) in code[begin..].char_indices() {
        let goes_on = match c {
            '{' => {
                // a brace that does not follow `::` opens a block
                let list = code[..begin + i].trim_end().ends_with("::") || depth > 0;
                depth += i32::from(list);
                list
            }
            '}' => {
                depth -= 1;
                depth >= 0
            }
            ',' | ' ' | '\n' | '*' => depth > 0,
            _ => c.is_alphanumeric() || matches!(c, '_' | ':'),
        };
        if !goes_on {
            return (code[begin..begin + i].to_string(), begin + i);
        }
        if c == '}' && depth == 0 {
            return (code[begin..=begin + i].to_string(), begin + i + 1);
        }
    }
    (code[begin..].to_string(), code.len())
}

/// The single paths of a tree: `a::{b, c::{d, e}}` is `a::b`, `a::c::d` and `a::c::e`.
fn opened(tree: &str) -> Vec<Vec<String>> {
    let tree = tree.trim();
    let Some(brace) = tree.find('{') else {
        let path = tree.split(" as ").next().unwrap_or(tree);
        let segments = path.split("::").map(str::trim).filter(|s| !s.is_empty() && *s != "self" && *s != "*");
        return vec![segments.map(str::to_string).collect()];
    };
    let head = opened(&tree[..brace]).remove(0);
    let inner = tree[brace + 1..].trim_end().strip_suffix('}').unwrap_or(&tree[brace + 1..]);
    let branches = parted(inner).into_iter().flat_map(|branch| opened(&branch));
    branches.map(|branch| head.iter().cloned().chain(branch).collect()).collect()
}

/// A list parted at the commas that stand outside of its inner braces.
fn parted(list: &str) -> Vec<String> {
    let mut parts = vec![String::new()];
    let mut depth = 0;
    for c in list.chars() {
        depth += i32::from(c == '{') - i32::from(c == '}');
        if c == ',' && depth == 0 {
            parts.push(String::new());
        } else if let Some(part) = parts.last_mut() {
            part.push(c);
        }
    }
    parts.into_iter().filter(|part| !part.trim().is_empty()).collect()
}

/// A path from the crate's root; nothing for one that stays within the file's own room by `super`.
fn from_root(source: &Source, at: usize, climb: Option<usize>, path: Vec<String>) -> Option<Vec<String>> {
    let Some(times) = climb else { return Some(path) };
    let mut module = module_of(&source.path);
    module.extend(std::iter::repeat_n("tests".to_string(), blocks_about(&source.code, at)));
    let kept = module.len().checked_sub(times)?;
    if kept > 0 {
        return None;
    }
    Some(path)
}

/// The module that a file is.
fn module_of(path: &str) -> Vec<String> {
    let inner = path.strip_prefix("src/").unwrap_or(path).trim_end_matches(".rs");
    let parts = inner.split('/').map(str::to_string);
    parts.filter(|part| !["mod", "lib", "main"].contains(&part.as_str())).collect()
}

/// How many `mod name { … }` blocks stand about a byte.
fn blocks_about(code: &str, at: usize) -> usize {
    let heads = code.match_indices("mod ").filter(|(i, _)| *i < at);
    heads.filter(|(i, _)| block_end(code, *i).is_some_and(|end| end > at)).count()
}

fn block_end(code: &str, head: usize) -> Option<usize> {
    let open = head + code[head..].find(['{', ';'])?;
    let mut depth = 0;
    for (i, c) in code[open..].char_indices() {
        depth += i32::from(c == '{') - i32::from(c == '}');
        if depth == 0 {
            return Some(open + i);
        }
    }
    None
}

#[test]
fn a_tree_of_imports_is_opened() {
    let text =
        "use crate::{a::{B, c::D}, e::f as g};\npub(crate) fn h(x: crate::i::J) { x }\nuse super::k::L;";
    let source = Source::of("src/room/file.rs".into(), text.into());
    let paths: Vec<String> = imports(&source).iter().map(|import| import.path.join("::")).collect();
    assert_eq!(paths, ["a::B", "a::c::D", "e::f", "i::J"]);
    let climbs = Source::of("src/room/file.rs".into(), "use super::super::m::N;".into());
    assert_eq!(imports(&climbs)[0].path, ["m", "N"]);
}
