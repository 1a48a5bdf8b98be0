//! Points as maps take them: longitude, latitude and, where known, height; and the box about them.

use super::record::rounded;
use crate::Brief;
use crate::path::TrackPoint;
use crate::units::Metres;

/// Longitude and latitude in degrees to 1e-6° (0.1 m), then the height in metres to 0.1 m where known.
pub(super) type Position = Vec<f64>;

/// A point of a track as a position.
pub(super) fn position(point: &TrackPoint) -> Position {
    placed(point.lon_deg, point.lat_deg, point.height)
}

fn placed(lon_deg: f64, lat_deg: f64, height: Option<Metres>) -> Position {
    let mut position = vec![rounded(lon_deg, 6), rounded(lat_deg, 6)];
    position.extend(height.map(|height| rounded(height.0, 1)));
    position
}

/// Where the aircraft is at a time; the 180° meridian has a sign that the lines know it by.
pub(super) fn position_at(brief: &Brief, at_s: f64, lines: &[Vec<Position>]) -> Position {
    let at = brief.path.at(at_s);
    let mut position = placed(at.place.lon.deg(), at.place.lat.deg(), at.height);
    let lon = position[0];
    if lon.abs() == 180.0 && !lines.iter().flatten().any(|other| other[0] == lon) {
        position[0] = -lon;
    }
    position
}

/// The box about lines and points, each a line of one position: RFC 7946, section 5.
pub(super) struct Bounds {
    /// Western and eastern edge; the western one is the greater where the box crosses 180° (5.2).
    west_east: (f64, f64),
    south_north: (f64, f64),
    heights: Option<(f64, f64)>,
}

impl Bounds {
    /// The smallest box; one about a pole takes in all longitudes (5.3).
    pub(super) fn of(lines: &[Vec<Position>]) -> Self {
        let range = |part: usize| {
            let values = lines.iter().flatten().filter_map(move |position| position.get(part).copied());
            values.fold(None, |range: Option<(f64, f64)>, value| {
                Some(range.map_or((value, value), |(low, high)| (low.min(value), high.max(value))))
            })
        };
        let south_north = range(1).unwrap_or_default();
        let at_pole = south_north.0 <= -90.0 || south_north.1 >= 90.0;
        let west_east = if at_pole { (-180.0, 180.0) } else { about(&merged(lines)) };
        Self { west_east, south_north, heights: range(2) }
    }

    /// West, south, the lowest height, east, north, the highest height; without the heights where none are known.
    pub(super) fn numbers(&self) -> Vec<f64> {
        let ((west, east), (south, north)) = (self.west_east, self.south_north);
        match self.heights {
            Some((low, high)) => vec![west, south, low, east, north, high],
            None => vec![west, south, east, north],
        }
    }
}

/// The ranges of longitude that lines take up, joined where they overlap, from west to east.
fn merged(lines: &[Vec<Position>]) -> Vec<(f64, f64)> {
    let range = |line: &Vec<Position>| {
        let start = (f64::MAX, f64::MIN);
        line.iter().fold(start, |(west, east), p| (west.min(p[0]), east.max(p[0])))
    };
    let mut ranges: Vec<(f64, f64)> = lines.iter().map(range).collect();
    ranges.sort_by(|a, b| a.0.total_cmp(&b.0));
    let mut joined: Vec<(f64, f64)> = Vec::new();
    for (west, east) in ranges {
        match joined.last_mut() {
            Some(last) if west <= last.1 => last.1 = last.1.max(east),
            _ => joined.push((west, east)),
        }
    }
    joined
}

/// What the widest gap between ranges leaves: from its eastern edge round to its western one.
fn about(ranges: &[(f64, f64)]) -> (f64, f64) {
    let (Some(first), Some(last)) = (ranges.first(), ranges.last()) else { return (0.0, 0.0) };
    let over_180 = (first.0 + 360.0 - last.1, (first.0, last.1));
    let between = ranges.windows(2).map(|pair| (pair[1].0 - pair[0].1, (pair[1].0, pair[0].1)));
    between.fold(over_180, |widest, gap| if gap.0 > widest.0 { gap } else { widest }).1
}

#[cfg(test)]
mod tests {
    use super::Bounds;

    fn bounds(lines: &[&[[f64; 2]]]) -> Vec<f64> {
        let lines: Vec<Vec<Vec<f64>>> =
            lines.iter().map(|line| line.iter().map(|p| p.to_vec()).collect()).collect();
        Bounds::of(&lines).numbers()
    }

    #[test]
    fn a_box_is_the_smallest_and_may_cross_180() {
        assert_eq!(bounds(&[&[[-10.0, 50.0], [20.0, 40.0]]]), [-10.0, 40.0, 20.0, 50.0]);
        let across: &[&[[f64; 2]]] = &[&[[170.0, -30.0], [180.0, -10.0]], &[[-180.0, -10.0], [-150.0, 5.0]]];
        assert_eq!(bounds(across), [170.0, -30.0, -150.0, 5.0]);
        let pole: &[&[[f64; 2]]] = &[&[[20.0, 60.0], [20.0, 90.0]], &[[-160.0, 90.0], [-160.0, 50.0]]];
        assert_eq!(bounds(pole), [-180.0, 50.0, 180.0, 90.0]);
        assert_eq!(bounds(&[&[[180.0, 1.0], [180.0, 2.0]]]), [180.0, 1.0, 180.0, 2.0]);
    }
}
