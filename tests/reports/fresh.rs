//! `reports/` is what the tool makes of `demo-flights/` today.
//!
//! To rewrite it: `cargo run --release -- brief demo-flights/*.toml --out reports`.

use std::collections::BTreeSet;
use std::path::{Path, PathBuf};
use std::process::Command;

fn root() -> &'static Path {
    Path::new(env!("CARGO_MANIFEST_DIR"))
}

fn demo_flights() -> Vec<PathBuf> {
    let entries = std::fs::read_dir(root().join("demo-flights")).unwrap().map(|e| e.unwrap().path());
    let mut files: Vec<PathBuf> = entries.filter(|p| p.extension().is_some_and(|e| e == "toml")).collect();
    files.sort();
    files
}

fn names(folder: &Path) -> BTreeSet<String> {
    std::fs::read_dir(folder).unwrap().map(|e| e.unwrap().file_name().into_string().unwrap()).collect()
}

#[test]
fn the_committed_reports_are_what_the_tool_makes() {
    assert!(demo_flights().len() >= 8);
    let made = tempfile::tempdir().unwrap();
    let run = Command::new(env!("CARGO_BIN_EXE_gloamline"))
        .arg("brief")
        .args(demo_flights())
        .arg("--out")
        .arg(made.path())
        .output()
        .unwrap();
    assert!(run.status.success(), "{}", String::from_utf8_lossy(&run.stderr));
    let kept = root().join("reports");
    assert_eq!(names(made.path()), names(&kept), "rewrite reports/ with the command in this file's head");
    for name in names(&kept) {
        let (old, new) =
            (std::fs::read(kept.join(&name)).unwrap(), std::fs::read(made.path().join(&name)).unwrap());
        let picture = kept.join(&name).extension().is_some_and(|e| e == "png");
        let same = if picture { pictures_agree(&old, &new) } else { old == new };
        assert!(same, "reports/{name} is not what the tool makes today: rewrite reports/");
    }
}

/// Same size, and no pixel's channel differs by more than a shade: rounding may differ between processors.
fn pictures_agree(old: &[u8], new: &[u8]) -> bool {
    let decode = |bytes: &[u8]| {
        let mut reader = png::Decoder::new(std::io::Cursor::new(bytes.to_vec())).read_info().unwrap();
        let mut pixels = vec![0; reader.output_buffer_size().unwrap()];
        let info = reader.next_frame(&mut pixels).unwrap();
        (info.width, info.height, pixels)
    };
    let ((w, h, a), (v, g, b)) = (decode(old), decode(new));
    (w, h) == (v, g) && a.len() == b.len() && a.iter().zip(&b).all(|(x, y)| x.abs_diff(*y) <= 2)
}
