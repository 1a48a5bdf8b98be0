//! Plain text in columns.

/// A table whose columns are as wide as their widest cell, each row indented by two spaces.
pub(super) fn columns<R: AsRef<[String]>>(rows: &[R]) -> String {
    let cells = |column: usize| rows.iter().filter_map(move |row| row.as_ref().get(column));
    let count = rows.first().map_or(0, |row| row.as_ref().len());
    let width = |column: usize| cells(column).map(|cell| cell.chars().count()).max().unwrap_or(0);
    let widths: Vec<usize> = (0..count).map(width).collect();
    let mut out = String::new();
    for row in rows {
        let cells = row
            .as_ref()
            .iter()
            .zip(&widths)
            .map(|(cell, &width)| (cell, width))
            .map(|(cell, width)| format!("{cell:<width$}"));
        let line = cells.collect::<Vec<_>>().join("  ");
        out.push_str("  ");
        out.push_str(line.trim_end());
        out.push('\n');
    }
    out
}

/// A paragraph broken into lines of at most `width` characters, the first led in by `lead`, the rest indented alike.
pub(super) fn wrapped(lead: &str, text: &str, width: usize) -> String {
    let indent = lead.chars().count();
    let mut lines = vec![String::new()];
    for word in text.split_whitespace() {
        let used = lines.last().map_or(0, |line| line.chars().count());
        if used > 0 && indent + used + 1 + word.chars().count() > width {
            lines.push(String::new());
        }
        if let Some(line) = lines.last_mut() {
            let gap = if line.is_empty() { "" } else { " " };
            line.push_str(gap);
            line.push_str(word);
        }
    }
    let begin = |i: usize| if i == 0 { lead.to_string() } else { " ".repeat(indent) };
    let whole: Vec<String> = lines.iter().enumerate().map(|(i, line)| begin(i) + line).collect();
    whole.join("\n") + "\n"
}

#[cfg(test)]
mod tests {
    use super::{columns, wrapped};

    #[test]
    fn a_paragraph_keeps_its_margins() {
        assert_eq!(wrapped("  - ", "one two three", 11), "  - one two\n    three\n");
    }

    #[test]
    fn columns_are_as_wide_as_their_widest_cell() {
        assert_eq!(
            columns(&[["a", "b"].map(String::from), ["−1°", "x"].map(String::from)]),
            "  a    b\n  −1°  x\n"
        );
    }
}
