//! Rows and cells of delimited text, in memory that does not grow with the file.
//!
//! Does not know what a column means.

use super::{Found, TrackProblem};
use csv_core::{ReadRecordResult, Reader, ReaderBuilder};

/// The longest row.
const MOST_BYTES: usize = 1 << 16;
/// The most cells of a row.
const MOST_CELLS: usize = 1 << 10;
/// The longest text of a number, more than any number of use has.
const LONGEST_NUMBER: usize = 40;

/// Delimited text, row by row. A line that begins with `#` is a comment; lines end in any way, and mixed.
pub(super) struct Sheet<'t> {
    text: &'t [u8],
    reader: Reader,
    next: usize,
    at: usize,
    cells: Vec<u8>,
    ends: Vec<usize>,
    count: usize,
}

impl<'t> Sheet<'t> {
    pub(super) fn new(text: &'t str) -> Self {
        let reader = ReaderBuilder::new().delimiter(delimiter(text)).comment(Some(b'#')).build();
        let (cells, ends) = (vec![0; MOST_BYTES], vec![0; MOST_CELLS]);
        Self { text: text.as_bytes(), reader, next: 0, at: 0, cells, ends, count: 0 }
    }

    /// Goes to the next row; false after the last.
    pub(super) fn advance(&mut self) -> Found<bool> {
        self.at = self.next;
        let (mut written, mut ended) = (0, 0);
        loop {
            let (outcome, read, out, cells) = self.reader.read_record(
                &self.text[self.next..],
                &mut self.cells[written..],
                &mut self.ends[ended..],
            );
            self.next += read;
            written += out;
            ended += cells;
            self.count = ended;
            match outcome {
                ReadRecordResult::Record => return Ok(true),
                ReadRecordResult::End => return Ok(false),
                // called again with nothing left, the reader closes the last row
                ReadRecordResult::InputEmpty => {}
                ReadRecordResult::OutputFull | ReadRecordResult::OutputEndsFull => {
                    return Err((Some(self.at()), TrackProblem::LongRow));
                }
            }
        }
    }

    /// The byte at which the row begins, past line ends that the row before has left.
    pub(super) fn at(&self) -> usize {
        let row = self.text.get(self.at..).unwrap_or_default();
        self.at + row.iter().take_while(|b| b.is_ascii_whitespace()).count()
    }

    /// How many cells the row has.
    pub(super) fn width(&self) -> usize {
        self.count
    }

    /// A cell without blanks around it; nothing if the row is shorter or the cell's bytes are cut amid a letter.
    pub(super) fn cell(&self, column: usize) -> &str {
        if column >= self.count {
            return "";
        }
        let start = if column == 0 { 0 } else { self.ends[column - 1] };
        std::str::from_utf8(&self.cells[start..self.ends[column]]).unwrap_or_default().trim()
    }

    /// All cells of the row.
    pub(super) fn row(&self) -> Vec<String> {
        (0..self.count).map(|column| self.cell(column).to_string()).collect()
    }
}

/// Tab, semicolon or comma: whichever the first line that is no comment has; decimal commas make semicolons win.
fn delimiter(text: &str) -> u8 {
    let mut lines = text.split(['\n', '\r']).map(str::trim);
    let line = lines.find(|line| !line.is_empty() && !line.starts_with('#')).unwrap_or_default();
    let mut quoted = false;
    let mut counts = [(0, b'\t'), (0, b';'), (0, b',')];
    for byte in line.bytes() {
        quoted ^= byte == b'"';
        if let Some((count, _)) = counts.iter_mut().find(|(_, d)| *d == byte && !quoted) {
            *count += 1;
        }
    }
    counts.iter().find(|(count, _)| *count >= 2).map_or(b',', |(_, delimiter)| *delimiter)
}

/// A finite number with a decimal point or a decimal comma.
pub(super) fn number(text: &str) -> Option<f64> {
    // the words that also parse, such as inf and nan, begin with a letter
    let begins = text.as_bytes().iter().find(|b| !matches!(b, b'+' | b'-'))?;
    if text.len() > LONGEST_NUMBER || !matches!(begins, b'0'..=b'9' | b'.' | b',') {
        return None;
    }
    let parsed = match text.bytes().position(|b| b == b',') {
        None => text.parse::<f64>().ok(),
        Some(comma) => with_point(text, comma)?.parse().ok(),
    };
    parsed.filter(|number| number.is_finite())
}

fn with_point(text: &str, comma: usize) -> Option<String> {
    (!text.contains('.')).then(|| format!("{}.{}", &text[..comma], &text[comma + 1..]))
}

#[cfg(test)]
mod tests {
    use super::{Sheet, number};

    fn rows(text: &str) -> Vec<Vec<String>> {
        let mut sheet = Sheet::new(text);
        let mut rows = Vec::new();
        while sheet.advance().unwrap() {
            rows.push(sheet.row());
        }
        rows
    }

    #[test]
    fn rows_end_in_any_way_and_cells_are_parted_by_the_first_line() {
        let wanted = vec![vec!["a", "b", "c"], vec!["1", "2;2", "3"], vec!["4", "", "6"]];
        assert_eq!(rows("# x;y;z\na,b,c\r\n1,2;2, 3\r4,,6"), wanted);
        assert_eq!(rows("a\tb\tc\n1\t2;2\t3\n\n4\t\t6\n"), wanted);
        assert_eq!(rows("a;b;c\n1;\"2;2\";3\n4;;6\n"), wanted);
    }

    #[test]
    fn a_row_that_never_ends_is_refused() {
        for endless in [format!("a,b,c\n1,\"{}", "x\n".repeat(40_000)), ",".repeat(5000)] {
            let mut sheet = Sheet::new(&endless);
            let end = std::iter::repeat_with(|| sheet.advance()).find(|step| step != &Ok(true)).unwrap();
            assert!(end.is_err());
        }
    }

    #[test]
    fn numbers_are_finite_and_may_have_a_decimal_comma() {
        for (text, wanted) in [("-1.5", -1.5), ("-1,5", -1.5), ("+7", 7.0), ("1e3", 1000.0), (".5", 0.5)] {
            assert_eq!(number(text), Some(wanted), "{text}");
        }
        for text in ["", "-", "NaN", "inf", "-inf", "1.000,5", "1,2,3", "1e999", "0x10", "12°", "٣"] {
            assert_eq!(number(text), None, "{text}");
        }
    }
}
