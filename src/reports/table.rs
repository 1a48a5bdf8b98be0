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
    let indent = " ".repeat(lead.chars().count() + 1);
    let mut out = String::new();
    let mut line = lead.to_string();
    for word in text.split_whitespace() {
        if line.chars().count() + 1 + word.chars().count() > width && line.trim() != lead.trim() {
            out.push_str(line.trim_end());
            out.push('\n');
            line.clone_from(&indent);
        }
        if !line.ends_with(' ') {
            line.push(' ');
        }
        line.push_str(word);
    }
    out.push_str(line.trim_end());
    out.push('\n');
    out
}
