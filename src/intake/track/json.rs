//! JSON (RFC 8259) read from front to back without building it, so that memory does not grow with what is skipped.
//!
//! Does not know GeoJSON. Depth is bounded; strings are given as they stand, escapes and all.

use super::{Found, TrackProblem};

/// How deep arrays and objects may be nested.
const DEEPEST: usize = 64;

/// A place in the text, before a value.
pub(super) struct Cursor<'t> {
    text: &'t str,
    at: usize,
    depth: usize,
}

/// What kind of value comes next.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Next {
    Object,
    Array,
    String,
    /// A number, or `true`, `false`, `null`.
    Word,
}

impl<'t> Cursor<'t> {
    pub(super) fn new(text: &'t str) -> Self {
        Self { text, at: 0, depth: 0 }
    }

    /// The byte at which the cursor stands.
    pub(super) fn at(&self) -> usize {
        self.at
    }

    fn fail<T>(&self, what: &'static str) -> Found<T> {
        Err((Some(self.at.min(self.text.len())), TrackProblem::Json(what)))
    }

    fn byte(&self) -> Option<u8> {
        self.text.as_bytes().get(self.at).copied()
    }

    fn skip_blanks(&mut self) {
        while matches!(self.byte(), Some(b' ' | b'\t' | b'\n' | b'\r')) {
            self.at += 1;
        }
    }

    /// Steps over a byte, if it is the next after blanks.
    fn eat(&mut self, wanted: u8) -> bool {
        self.skip_blanks();
        let found = self.byte() == Some(wanted);
        self.at += usize::from(found);
        found
    }

    /// What comes next.
    pub(super) fn next(&mut self) -> Found<Next> {
        self.skip_blanks();
        match self.byte() {
            Some(b'{') => Ok(Next::Object),
            Some(b'[') => Ok(Next::Array),
            Some(b'"') => Ok(Next::String),
            Some(b'-' | b'0'..=b'9' | b't' | b'f' | b'n') => Ok(Next::Word),
            None => self.fail("it ends before a value"),
            Some(_) => self.fail("a value is expected here"),
        }
    }

    /// Steps into an object; `each` must read the value of the key that it is given.
    pub(super) fn object(&mut self, mut each: impl FnMut(&mut Self, &'t str) -> Found<()>) -> Found<()> {
        self.sequence(b'}', |cursor| {
            let key = cursor.string()?;
            if !cursor.eat(b':') {
                return cursor.fail("a colon is expected here");
            }
            each(cursor, key)
        })
    }

    /// Steps into an array; `each` must read the value that comes next.
    pub(super) fn array(&mut self, each: impl FnMut(&mut Self) -> Found<()>) -> Found<()> {
        self.sequence(b']', each)
    }

    fn sequence(&mut self, end: u8, mut each: impl FnMut(&mut Self) -> Found<()>) -> Found<()> {
        let begin = if end == b'}' { b'{' } else { b'[' };
        if !self.eat(begin) {
            return self.fail("another kind of value is expected here");
        }
        if self.depth >= DEEPEST {
            return Err((Some(self.at), TrackProblem::TooDeep));
        }
        self.depth += 1;
        if !self.eat(end) {
            loop {
                each(self)?;
                if self.eat(end) {
                    break;
                }
                if !self.eat(b',') {
                    return self.fail("a comma or the end of the list is expected here");
                }
            }
        }
        self.depth -= 1;
        Ok(())
    }

    /// A string as it stands between its quotes.
    pub(super) fn string(&mut self) -> Found<&'t str> {
        if !self.eat(b'"') {
            return self.fail("a string is expected here");
        }
        let start = self.at;
        loop {
            match self.byte() {
                Some(b'"') => break,
                Some(b'\\') => self.at += 2,
                Some(0..=0x1f) => return self.fail("a control character stands in a string"),
                Some(_) => self.at += 1,
                None => return self.fail("a string does not end"),
            }
        }
        self.at += 1;
        Ok(self.text.get(start..self.at - 1).unwrap_or_default())
    }

    /// A number or a word, as it stands.
    pub(super) fn word(&mut self) -> Found<&'t str> {
        self.skip_blanks();
        let rest = self.text.get(self.at..).unwrap_or_default();
        let inner = |b: &u8| b.is_ascii_alphanumeric() || matches!(b, b'-' | b'+' | b'.');
        let word = &rest[..rest.as_bytes().iter().take_while(|b| inner(b)).count()];
        if !matches!(word, "true" | "false" | "null") && word.parse::<f64>().is_err() {
            return self.fail("a value is expected here");
        }
        self.at += word.len();
        Ok(word)
    }

    /// Steps over a value.
    pub(super) fn skip(&mut self) -> Found<()> {
        match self.next()? {
            Next::Object => self.object(|cursor, _| cursor.skip()),
            Next::Array => self.array(Self::skip),
            Next::String => self.string().map(drop),
            Next::Word => self.word().map(drop),
        }
    }

    /// Nothing may follow.
    pub(super) fn end(&mut self) -> Found<()> {
        self.skip_blanks();
        if self.byte().is_none() { Ok(()) } else { self.fail("something follows the end") }
    }
}

/// A string with its escapes undone; as it stands if they make no sense.
pub(super) fn unescaped(raw: &str) -> String {
    if !raw.contains('\\') {
        return raw.to_string();
    }
    serde_json::from_str(&format!("\"{raw}\"")).unwrap_or_else(|_| raw.to_string())
}

#[cfg(test)]
mod tests {
    use super::super::TrackProblem;
    use super::{Cursor, unescaped};

    fn judge(text: &str) -> Result<(), TrackProblem> {
        let mut cursor = Cursor::new(text);
        cursor.skip().and_then(|()| cursor.end()).map_err(|(_, problem)| problem)
    }

    #[test]
    fn what_is_json_is_stepped_over() {
        for text in ["{}", " [ ] ", r#"{"a":[1,-2.5e3,null,true],"b\"\\":{"c":""}}"#, "0"] {
            assert_eq!(judge(text), Ok(()), "{text}");
        }
    }

    #[test]
    fn what_is_no_json_is_refused() {
        for text in
            ["", "{", "[1,]", "[1 2]", "{\"a\"}", "{a:1}", "\"a", "\"a\\", "nil", "1x", "[1]]", "\"\n\""]
        {
            assert!(judge(text).is_err(), "{text}");
        }
        let deep = "[".repeat(100_000);
        assert_eq!(judge(&deep), Err(TrackProblem::TooDeep));
    }

    #[test]
    fn escapes_are_undone_where_they_make_sense() {
        assert_eq!(unescaped(r"a\u0041\n"), "aA\n");
        assert_eq!(unescaped(r"\q"), r"\q");
    }
}
