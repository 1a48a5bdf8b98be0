//! The README's commands do what it says, with the output it shows.

use std::process::Command;

/// The lines of each fenced block that shows a command after `$ `, with what follows it.
fn shown_commands(readme: &str) -> Vec<(String, String)> {
    let blocks = readme.split("```").skip(1).step_by(2);
    let shown = blocks.filter_map(|block| {
        let body = block.split_once('\n')?.1;
        let (command, output) = body.strip_prefix("$ ")?.split_once('\n')?;
        Some((command.to_string(), output.to_string()))
    });
    shown.collect()
}

#[test]
fn the_readmes_commands_print_what_it_shows() {
    let readme = std::fs::read_to_string(concat!(env!("CARGO_MANIFEST_DIR"), "/README.md")).unwrap();
    let commands = shown_commands(&readme);
    assert!(commands.len() >= 2, "{commands:?}");
    for (command, wanted) in commands {
        let words: Vec<&str> = command.split_whitespace().collect();
        let mut arguments = match words.as_slice() {
            ["gloamline", rest @ ..] | ["cargo", "run", "--release", "--", rest @ ..] => rest.to_vec(),
            other => panic!("not a gloamline command: {other:?}"),
        };
        // what it writes goes elsewhere: the committed reports are another test's matter
        let elsewhere = tempfile::tempdir().unwrap();
        if let Some(at) = arguments.iter().position(|word| *word == "--out") {
            arguments[at + 1] = elsewhere.path().to_str().unwrap();
        }
        let run = Command::new(env!("CARGO_BIN_EXE_gloamline"))
            .current_dir(env!("CARGO_MANIFEST_DIR"))
            .args(arguments)
            .output()
            .unwrap();
        assert!(run.status.success(), "{command}: {}", String::from_utf8_lossy(&run.stderr));
        let printed = String::from_utf8(run.stdout).unwrap();
        // a line of dots stands for what is left out
        let mut rest = printed.as_str();
        for part in wanted.split("…\n") {
            let at =
                rest.find(part).unwrap_or_else(|| panic!("{command} does not print\n{part}\nbut\n{rest}"));
            rest = &rest[at + part.len()..];
        }
    }
}
