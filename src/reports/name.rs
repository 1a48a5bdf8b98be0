//! A flight's name as the stem of a file's name, safe on every system.

/// The longest stem in bytes: file systems take 255, and endings and a number follow.
const LONGEST: usize = 100;

/// Names that one system keeps for devices, whatever their ending.
const DEVICES: [&str; 22] = [
    "con", "prn", "aux", "nul", "com1", "com2", "com3", "com4", "com5", "com6", "com7", "com8", "com9",
    "lpt1", "lpt2", "lpt3", "lpt4", "lpt5", "lpt6", "lpt7", "lpt8", "lpt9",
];

/// The stem: letters, digits and single hyphens in lower case, nothing that could leave a folder or hide a file.
pub fn file_stem(name: &str) -> String {
    let mut stem = String::new();
    for c in name.chars().flat_map(char::to_lowercase) {
        if c.is_alphanumeric() {
            if stem.len() + c.len_utf8() > LONGEST {
                break;
            }
            stem.push(c);
        } else if !stem.is_empty() && !stem.ends_with('-') {
            stem.push('-');
        }
    }
    let stem = stem.trim_end_matches('-');
    if stem.is_empty() || DEVICES.contains(&stem) {
        format!("flight-{stem}").trim_end_matches('-').to_string()
    } else {
        stem.to_string()
    }
}

#[cfg(test)]
mod tests {
    use super::file_stem;

    #[test]
    fn a_name_cannot_leave_its_folder() {
        for (name, stem) in [
            ("Varde 71", "varde-71"),
            ("../../etc/passwd", "etc-passwd"),
            ("<script>alert(1)</script>", "script-alert-1-script"),
            ("..", "flight"),
            ("", "flight"),
            ("NUL", "flight-nul"),
            ("a/b\\c:d\0e\n", "a-b-c-d-e"),
            (".hidden", "hidden"),
            ("Łódź", "łódź"),
        ] {
            assert_eq!(file_stem(name), stem);
        }
        assert!(file_stem(&"é".repeat(10_000)).len() <= 100);
    }
}
