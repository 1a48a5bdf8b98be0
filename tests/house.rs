//! The walls of the house: what each room may import, and what only one file may do. A breach names file and line.

mod imports;
mod scan;

use imports::{Import, imports};
use scan::{Source, sources};
use std::path::Path;

/// What a room may import.
enum From {
    /// A room's whole face.
    Face(&'static str),
    /// Of a room's face only these.
    Only(&'static str, &'static [&'static str]),
    /// The values at the crate's root: `Brief` and its like.
    Root,
}

use From::{Face, Only, Root};

/// A sub-face that a room shows on purpose.
const OPEN_SUBROOMS: [(&str, &str); 3] = [("charts", "canvas"), ("label", "clock"), ("label", "words")];

/// The rooms in walking order, each with what it may import besides its own files.
const ROOMS: &[(&str, &[From])] = &[
    ("units", &[]),
    ("curve", &[Face("units")]),
    ("places", &[Face("units")]),
    ("intake", &[Face("units"), Face("places")]),
    ("path", &[Face("units"), Face("intake")]),
    ("sky", &[Face("units"), Face("curve")]),
    ("light", &[Face("units"), Face("curve"), Face("path"), Face("sky")]),
    ("day", &[Face("units"), Face("curve"), Face("intake"), Face("path"), Face("sky"), Face("light")]),
    ("label", &[Face("units"), Face("path"), Face("light")]),
    ("brief", &[Face("units"), Face("intake"), Face("path"), Face("sky"), Face("light")]),
    ("sun_brief", &[Face("units"), Face("intake"), Face("path"), Face("sky"), Face("light"), Face("day")]),
    (
        "charts",
        &[Face("units"), Face("label"), Face("intake"), Face("path"), Face("light"), Face("day"), Root],
    ),
    (
        "reports",
        &[
            Face("units"),
            Face("label"),
            Face("intake"),
            Face("path"),
            Only("sky", &["YearEvent", "YearMoment"]),
            Face("light"),
            Face("day"),
            Face("charts"),
            Root,
        ],
    ),
];

fn is_room(name: &str) -> bool {
    ROOMS.iter().any(|(room, _)| *room == name)
}

/// What is wrong with an import, if anything is.
fn objection(room: &str, import: &Import) -> Option<String> {
    let path: Vec<&str> = import.path.iter().map(String::as_str).collect();
    let Some((_, allowed)) = ROOMS.iter().find(|(name, _)| *name == room) else {
        return Some(format!("the room {room} is not in the table"));
    };
    match path[..] {
        [] => Some("takes in the whole crate".into()),
        [own, ..] if own == room => None,
        [value] if !is_room(value) || value.ends_with("brief") => {
            (!allowed.iter().any(|from| matches!(from, Root)))
                .then(|| format!("{room} may not use the root's {value}"))
        }
        [neighbour, ref rest @ ..] => {
            let may = allowed.iter().any(|from| match from {
                Face(name) => *name == neighbour,
                Only(name, items) => {
                    *name == neighbour && rest.first().is_some_and(|item| items.contains(item))
                }
                Root => false,
            });
            if !may {
                return Some(format!("{room} may not import {}", path.join("::")));
            }
            // a name on its own is an item of the face, though a file may be called alike
            let behind = rest.first().filter(|next| rest.len() > 1 && is_file_of(neighbour, next));
            behind.map(|next| format!("{room} reaches behind the face of {neighbour} into {next}"))
        }
    }
}

/// Whether a room has a file or folder of that name that is not shown on purpose.
fn is_file_of(room: &str, name: &str) -> bool {
    let base = scan::root().join("src").join(room).join(name);
    (base.is_dir() || base.with_extension("rs").is_file()) && !OPEN_SUBROOMS.contains(&(room, name))
}

/// The room that a file belongs to: the first part of its path below `src`.
fn room_of(path: &str) -> Option<&str> {
    let inner = path.strip_prefix("src/")?;
    let first = inner.split('/').next()?;
    let first = first.strip_suffix(".rs").unwrap_or(first);
    (!["lib", "main", "cli"].contains(&first)).then_some(first)
}

fn import_breaches(source: &Source) -> Vec<String> {
    let Some(room) = room_of(&source.path) else { return Vec::new() };
    let judged = imports(source).into_iter();
    judged
        .filter_map(|import| {
            objection(room, &import).map(|why| format!("{}:{}: {why}", source.path, import.line))
        })
        .collect()
}

/// Lines of code on which one of the words stands, outside the files that may hold it.
fn word_breaches(source: &Source, words: &[&str], homes: &[&str]) -> Vec<String> {
    if homes.iter().any(|home| source.path.starts_with(home)) {
        return Vec::new();
    }
    let lines = source.code.lines().enumerate();
    let found = lines.flat_map(|(i, line)| {
        let held = words.iter().filter(move |word| line.contains(**word));
        held.map(move |word| (i + 1, *word))
    });
    found.map(|(line, word)| format!("{}:{line}: '{word}' belongs in {homes:?}", source.path)).collect()
}

fn assert_none(breaches: &[String]) {
    assert!(breaches.is_empty(), "\n{}", breaches.join("\n"));
}

fn code_breaches(words: &[&str], homes: &[&str]) -> Vec<String> {
    sources("src").iter().flat_map(|source| word_breaches(source, words, homes)).collect()
}

#[test]
fn a_room_imports_only_the_faces_that_it_may() {
    let all = sources("src");
    assert!(all.len() > 40, "only {} files found", all.len());
    let seen: usize = all.iter().map(|source| imports(source).len()).sum();
    assert!(seen > 80, "only {seen} imports found");
    assert_none(&all.iter().flat_map(import_breaches).collect::<Vec<_>>());
}

#[test]
fn the_table_names_the_rooms_in_the_order_of_the_library() {
    let library = std::fs::read_to_string(scan::root().join("src/lib.rs")).unwrap();
    let declared: Vec<&str> = library
        .lines()
        .filter_map(|line| line.trim_start_matches("pub ").strip_prefix("mod ")?.strip_suffix(';'))
        .collect();
    assert!(declared.len() > 8);
    let known: Vec<&str> =
        ROOMS.iter().map(|(room, _)| *room).filter(|room| declared.contains(room)).collect();
    for room in &declared {
        assert!(known.contains(room), "src/lib.rs: the room {room} is not in the table of tests/house.rs");
    }
    let place = |room: &str| declared.iter().position(|name| *name == room);
    for (room, allowed) in ROOMS {
        for from in *allowed {
            if let Face(other) | Only(other, _) = from {
                let (Some(own), Some(other_place)) = (place(room), place(other)) else { continue };
                assert!(other_place < own, "src/lib.rs: {room} imports {other}, which stands below it");
            }
        }
    }
}

#[test]
fn the_command_line_sees_only_the_public_crate() {
    let parsers: Vec<String> = code_breaches(&["clap"], &["src/cli/"]);
    assert_none(&parsers);
    for source in sources("src/cli") {
        for import in imports(&source) {
            let line = import.line;
            assert_eq!(import.path.first().map(String::as_str), Some("cli"), "{}:{line}", source.path);
        }
    }
}

#[test]
fn only_one_file_opens_and_writes() {
    let words = ["std::fs", "fs::", "File::", "OpenOptions", "tempfile", "stdin"];
    assert_none(&code_breaches(&words, &["src/cli/files.rs"]));
}

#[test]
fn only_one_file_prints() {
    let words = ["print!", "println!", "dbg!", "stdout()", "stderr()"];
    assert_none(&code_breaches(&words, &["src/cli/terminal.rs"]));
}

#[test]
fn nothing_reads_the_clock() {
    assert_none(&code_breaches(&["SystemTime", "Utc::now", "Local::now", "Instant::now"], &[]));
}

#[test]
fn only_reports_are_serialized() {
    assert_none(&code_breaches(&["Serialize", "Deserialize"], &["src/reports/"]));
}

#[test]
fn nothing_is_left_to_do() {
    let words = ["todo!", "unimplemented!"];
    assert_none(&code_breaches(&words, &[]));
}

#[test]
fn every_file_says_what_it_is_for() {
    let all = ["src", "tests"].into_iter().flat_map(sources);
    let silent = all.filter(|source| !source.text.starts_with("//! "));
    assert_none(
        &silent.map(|source| format!("{}:1: does not begin with //!", source.path)).collect::<Vec<_>>(),
    );
}

#[test]
fn no_file_is_longer_than_four_hundred_lines() {
    let all = ["src", "tests"].into_iter().flat_map(sources);
    let long = all.filter_map(|source| {
        let lines = source.text.lines().count();
        (lines > 400).then(|| format!("{}:401: one of {lines} lines", source.path))
    });
    assert_none(&long.collect::<Vec<_>>());
}

/// Words that stand nowhere in the project, put together so that they do not stand here either.
fn unwanted() -> Vec<String> {
    let halves = [
        ("crates", ".io"),
        ("pypi", ".org"),
        ("npm", "js"),
        ("debian", ".org"),
        ("/wo", "rk/"),
        ("/ro", "ot/"),
        ("/ho", "me/"),
        (".lib", "rary"),
        ("lec", "ture"),
        ("tran", "script"),
    ];
    halves.map(|(a, b)| format!("{a}{b}")).to_vec()
}

fn unwanted_in(path: &Path) -> Vec<String> {
    let bytes = std::fs::read(path).unwrap_or_default();
    let text = String::from_utf8_lossy(&bytes).to_lowercase();
    let words = unwanted();
    let lines = text.lines().enumerate();
    lines
        .flat_map(|(i, line)| {
            words.iter().filter(move |word| line.contains(*word)).map(move |word| (i + 1, word))
        })
        .map(|(line, word)| format!("{}:{line}: '{word}'", path.display()))
        .collect()
}

#[test]
fn no_registry_and_no_machine_is_named() {
    let files = scan::all_files();
    assert!(files.len() > 100, "only {} files found", files.len());
    // the lock file is cargo's own and names where it looked
    let own = files.iter().filter(|path| !path.ends_with("Cargo.lock"));
    assert_none(&own.flat_map(|path| unwanted_in(path)).collect::<Vec<_>>());
}

/// A file that is not there, with these words in it.
fn imagined(path: &str, text: &str) -> Source {
    Source::of(path.to_string(), text.to_string())
}

#[test]
fn a_breach_of_a_wall_is_caught_with_its_line() {
    for (path, text, wanted) in [
        (
            "src/sky/sun.rs",
            "//! x\nuse crate::path::Path;",
            "src/sky/sun.rs:2: sky may not import path::Path",
        ),
        (
            "src/path/leg.rs",
            "use crate::{\n    units::Angle,\n    light::{Light, Limit},\n};",
            "src/path/leg.rs:1: path may not import light::Light",
        ),
        (
            "src/reports/text.rs",
            "\nuse crate::light::segment::Segment;",
            "src/reports/text.rs:2: reports reaches behind the face of light into segment",
        ),
        (
            "src/reports/text.rs",
            "fn f() {\n    crate::sky::elevation(1)\n}",
            "src/reports/text.rs:2: reports may not import sky::elevation",
        ),
        (
            "src/curve/root.rs",
            "mod tests {\n    use super::super::super::places::RunwayEnd;\n}",
            "src/curve/root.rs:2: curve may not import places::RunwayEnd",
        ),
        ("src/path/leg.rs", "use crate::Brief;", "src/path/leg.rs:1: path may not use the root's Brief"),
        (
            "src/attic/rat.rs",
            "use crate::units::Angle;",
            "src/attic/rat.rs:1: the room attic is not in the table",
        ),
    ] {
        let breaches = import_breaches(&imagined(path, text));
        assert_eq!(breaches.first().map(String::as_str), Some(wanted), "{text}");
    }
}

#[test]
fn what_is_allowed_is_no_breach() {
    for (path, text) in [
        ("src/reports/sun.rs", "use crate::sky::{YearEvent, YearMoment};\nuse crate::{PlaceDay, SunBrief};"),
        ("src/light/trace.rs", "use crate::units::wgs84;\nuse super::limit::Limit;"),
        ("src/sky/table.rs", "mod tests {\n    use super::super::model;\n}"),
        ("src/sky/sun.rs", "// use crate::path::Path;\nconst A: &str = \"crate::path::Path\";"),
    ] {
        assert_none(&import_breaches(&imagined(path, text)));
    }
}

#[test]
fn a_word_in_the_wrong_room_is_caught_and_in_a_comment_it_is_not() {
    let source = imagined("src/path/fly.rs", "// std::fs\nfn f() { std::fs::read(\"x\") }\n");
    let breaches = word_breaches(&source, &["std::fs"], &["src/cli/files.rs"]);
    assert_eq!(breaches, ["src/path/fly.rs:2: 'std::fs' belongs in [\"src/cli/files.rs\"]"]);
    let home = imagined("src/cli/files.rs", "fn f() { std::fs::read(\"x\") }");
    assert_none(&word_breaches(&home, &["std::fs"], &["src/cli/files.rs"]));
}
