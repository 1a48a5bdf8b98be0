//! A brief as KML: the track in the colours of the light, and a placemark for each thing that happens.
//!
//! The elements are those that KML 2.2 and OGC KML 2.3 (12-007r2) share, under the namespace of the former, which more
//! programs read. Words from outside stand in names only: a description is taken for HTML by those who show it, and so
//! are names in a balloon, which ours keep out.

use super::marks::{TOLERANCE, marks};
use super::position::{Position, position, position_at};
use super::record::when;
use crate::Brief;
use crate::charts::state_ink;
use crate::label::one_line;
use crate::label::words::{spoken, state_key};
use crate::light::{Segment, State};
use crate::path::TrackPoint;

const HEAD: &str = "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n<kml xmlns=\"http://www.opengis.net/kml/2.2\">\n<Document>\n";
/// Lets a balloon show our description alone.
const BALLOON: &str = "<BalloonStyle><text>$[description]</text></BalloonStyle>";

/// One brief as a KML document, ending in a line feed.
///
/// # Shapes and units
/// Longitude, latitude in degrees and, where the flight's level is known, metres above mean sea level; without it the
/// track lies on the ground. A line is parted where the 180° meridian or a pole is passed, as in
/// `GeoJSON`.
pub fn kml(brief: &Brief) -> String {
    let tracks = tracks(brief);
    let all: Vec<Vec<Position>> = tracks.iter().flat_map(|(_, lines)| lines.clone()).collect();
    let name = escaped(&one_line(&brief.flight.name));
    let cautions = escaped(&super::caution::cautions(brief).join(" "));
    let styles: String = State::ALL.map(style).concat();
    let light: String = tracks.iter().map(|(segment, lines)| stretch(brief, segment, lines)).collect();
    let events: String = marks(brief)
        .iter()
        .map(|mark| placemark(brief, mark, &position_at(brief, mark.at_s, &all)))
        .collect();
    format!(
        "{HEAD}<name>{name}</name>\n<description>{cautions}</description>\n{styles}\
         <Style id=\"mark\">{BALLOON}</Style>\n\
         <Folder>\n<name>Light beneath</name>\n{light}</Folder>\n\
         <Folder>\n<name>Events</name>\n{events}</Folder>\n</Document>\n</kml>\n"
    )
}

/// Each segment of the light with its lines.
fn tracks(brief: &Brief) -> Vec<(&Segment, Vec<Vec<Position>>)> {
    let lines = |s: &Segment| brief.path.track(s.begin_s, s.end_s, TOLERANCE);
    let positions = |line: &Vec<TrackPoint>| line.iter().map(position).collect();
    brief.light.segments.iter().map(|s| (s, lines(s).iter().map(positions).collect())).collect()
}

/// A state's line; KML writes colours as opacity, blue, green, red.
fn style(state: State) -> String {
    let [red, green, blue] = state_ink(state).rgb;
    format!(
        "<Style id=\"{}\"><LineStyle><color>ff{blue:02x}{green:02x}{red:02x}</color><width>5</width></LineStyle>\
         {BALLOON}</Style>\n",
        state_key(state)
    )
}

fn stretch(brief: &Brief, segment: &Segment, lines: &[Vec<Position>]) -> String {
    let key = state_key(segment.state);
    let (begin, end) = (when(brief, segment.begin_s), when(brief, segment.end_s));
    let lines: String = lines.iter().map(|line| line_string(line)).collect();
    format!(
        "<Placemark>\n<name>{name}</name>\n<description>{name} from {begin} until {end}</description>\n\
         <TimeSpan><begin>{begin}</begin><end>{end}</end></TimeSpan>\n<styleUrl>#{key}</styleUrl>\n\
         <MultiGeometry>\n{lines}</MultiGeometry>\n</Placemark>\n",
        name = spoken(key),
    )
}

fn line_string(line: &[Position]) -> String {
    let coordinates: Vec<String> = line.iter().map(tuple).collect();
    // what lies on the ground follows it between two points
    let tessellate = u8::from(!has_height(line.first()));
    format!(
        "<LineString><tessellate>{tessellate}</tessellate><altitudeMode>{}</altitudeMode><coordinates>\n{}\n\
         </coordinates></LineString>\n",
        altitude_mode(line.first()),
        coordinates.join("\n")
    )
}

fn placemark(brief: &Brief, mark: &super::marks::Mark, position: &Position) -> String {
    let utc = when(brief, mark.at_s);
    format!(
        "<Placemark>\n<name>{}</name>\n<description>{} at {utc}</description>\n\
         <TimeStamp><when>{utc}</when></TimeStamp>\n<styleUrl>#mark</styleUrl>\n\
         <Point><altitudeMode>{}</altitudeMode><coordinates>{}</coordinates></Point>\n</Placemark>\n",
        escaped(&mark.title),
        spoken(mark.tells.kind),
        altitude_mode(Some(position)),
        tuple(position)
    )
}

fn has_height(position: Option<&Position>) -> bool {
    position.is_some_and(|position| position.len() > 2)
}

fn altitude_mode(position: Option<&Position>) -> &'static str {
    if has_height(position) { "absolute" } else { "clampToGround" }
}

/// Longitude, latitude and height with commas and no blanks: blanks part tuples.
fn tuple(position: &Position) -> String {
    position.iter().map(f64::to_string).collect::<Vec<_>>().join(",")
}

/// Text that can end neither an element nor an attribute, of characters that XML has (1.0, section 2.2).
fn escaped(text: &str) -> String {
    let mut out = String::with_capacity(text.len());
    for c in text.chars() {
        match c {
            '&' => out.push_str("&amp;"),
            '<' => out.push_str("&lt;"),
            '>' => out.push_str("&gt;"),
            '"' => out.push_str("&quot;"),
            '\'' => out.push_str("&#39;"),
            '\u{fffe}' | '\u{ffff}' => {}
            c if c.is_control() => out.push(' '),
            c => out.push(c),
        }
    }
    out
}

#[cfg(test)]
mod tests {
    use super::escaped;

    #[test]
    fn text_cannot_leave_its_element() {
        assert_eq!(
            escaped("]]></name><script>\"'&\u{0}\u{fffe}"),
            "]]&gt;&lt;/name&gt;&lt;script&gt;&quot;&#39;&amp; "
        );
    }
}
