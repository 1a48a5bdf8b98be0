//! Each table of numbers from outside says where it comes from.

use super::folder;

fn tables(under: &std::path::Path) -> Vec<std::path::PathBuf> {
    let entries = std::fs::read_dir(under).unwrap().map(|e| e.unwrap().path());
    entries
        .flat_map(|path| if path.is_dir() { tables(&path) } else { vec![path] })
        .filter(|path| path.extension().is_some_and(|e| e == "csv"))
        .collect()
}

#[test]
fn every_table_has_a_birth_certificate() {
    let all = tables(&folder());
    assert!(all.len() >= 10, "only {} tables found", all.len());
    for path in all {
        let text = std::fs::read_to_string(&path).unwrap();
        let header: Vec<&str> = text.lines().take_while(|line| line.starts_with('#')).collect();
        for word in ["made by", "made on", "settings", "columns", "rounding", "licence"] {
            assert!(
                header.iter().any(|line| line[1..].trim_start().starts_with(word)),
                "{}: no '{word}'",
                path.display()
            );
        }
    }
}
