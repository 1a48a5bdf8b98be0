//! XML as tracks need it: elements, their text and attributes. Document types and entities are refused, depth is bounded.
//!
//! Does not know GPX or KML, and does not resolve namespaces: names are told apart without their prefix.

use super::{Found, TrackProblem};
use quick_xml::Reader;
use quick_xml::events::{BytesStart, Event};

/// How deep elements may be nested.
pub(super) const DEEPEST: usize = 64;
/// The longest text of an element that is kept.
const LONGEST_TEXT: usize = 1024;

/// What takes elements in as they come.
pub(super) trait Visitor {
    /// An element begins inside `parents`, the outermost first.
    fn open(&mut self, parents: &[Name], element: &Element<'_>) -> Found<()>;
    /// An element ends, with the text that stood in it, up to a bound.
    fn close(&mut self, parents: &[Name], name: Name, text: &str) -> Found<()>;
    /// The names that matter; all others are one.
    fn names(&self) -> &'static [&'static str];
}

/// A name's place among those that matter, or none of them.
pub(super) type Name = Option<u8>;

/// An element's beginning.
pub(super) struct Element<'e> {
    pub(super) name: Name,
    pub(super) at: usize,
    start: &'e BytesStart<'e>,
}

impl Element<'_> {
    /// The value of an attribute as a number; not a number if there is none.
    pub(super) fn number(&self, attribute: &str) -> f64 {
        let value = self.start.try_get_attribute(attribute).ok().flatten();
        value.and_then(|value| super::sheet::number(value.value.trim())).unwrap_or(f64::NAN)
    }
}

/// Walks a document.
pub(super) fn walk(text: &str, visitor: &mut impl Visitor) -> Found<()> {
    let mut reader = Reader::from_str(text);
    let mut walk = Walk { visitor, open: Vec::new(), content: String::new() };
    loop {
        let at = reader.buffer_position() as usize;
        let event = reader.read_event().map_err(|error| {
            let position = reader.error_position() as usize;
            (Some(position), TrackProblem::Xml(error.to_string()))
        })?;
        if matches!(event, Event::Eof) {
            return walk.end(text.len());
        }
        walk.take(&event, at)?;
    }
}

struct Walk<'v, V> {
    visitor: &'v mut V,
    open: Vec<Name>,
    content: String,
}

impl<V: Visitor> Walk<'_, V> {
    fn take(&mut self, event: &Event<'_>, at: usize) -> Found<()> {
        match event {
            Event::Start(start) => self.begin(start, at),
            Event::Empty(start) => {
                self.begin(start, at)?;
                self.finish()
            }
            Event::End(_) => self.finish(),
            Event::Text(text) => {
                self.keep(text);
                Ok(())
            }
            Event::CData(text) => {
                self.keep(text);
                Ok(())
            }
            Event::GeneralRef(reference) => {
                let known = match &**reference {
                    "lt" => Some('<'),
                    "gt" => Some('>'),
                    "amp" => Some('&'),
                    "apos" => Some('\''),
                    "quot" => Some('"'),
                    _ => reference.resolve_char_ref().ok().flatten(),
                };
                let refused = || (Some(at), TrackProblem::Entity(reference.to_string()));
                self.keep(known.ok_or_else(refused)?.encode_utf8(&mut [0; 4]));
                Ok(())
            }
            Event::DocType(_) => Err((Some(at), TrackProblem::Doctype)),
            _ => Ok(()),
        }
    }

    fn begin(&mut self, start: &BytesStart<'_>, at: usize) -> Found<()> {
        if self.open.len() >= DEEPEST {
            return Err((Some(at), TrackProblem::TooDeep));
        }
        let local = start.local_name();
        let known = self.visitor.names().iter().position(|name| *name == local.as_ref());
        let name = known.map(|index| index as u8);
        self.visitor.open(&self.open, &Element { name, at, start })?;
        self.open.push(name);
        self.content.clear();
        Ok(())
    }

    fn finish(&mut self) -> Found<()> {
        let name = self.open.pop().flatten();
        self.visitor.close(&self.open, name, self.content.trim())?;
        self.content.clear();
        Ok(())
    }

    fn keep(&mut self, text: &str) {
        let room = LONGEST_TEXT.saturating_sub(self.content.len());
        let end = text.char_indices().map(|(i, c)| i + c.len_utf8()).take_while(|end| *end <= room).last();
        self.content.push_str(if text.len() <= room { text } else { &text[..end.unwrap_or(0)] });
    }

    fn end(&self, length: usize) -> Found<()> {
        if self.open.is_empty() {
            return Ok(());
        }
        Err((Some(length), TrackProblem::Xml("the document ends inside an element".to_string())))
    }
}
