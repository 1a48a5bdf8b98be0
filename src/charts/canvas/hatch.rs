//! Hatching as geometry: the pieces of parallel lines that lie inside an area.
//!
//! Textures are cut here, once, rather than given as patterns to whoever shows the picture, so that both
//! pictures carry the same lines and no viewer's own tiling blurs them. Knows nothing of inks.

use super::geometry::Point;
use super::ink::Texture;

/// The directions a texture's lines run in, in degrees below the horizontal to the right.
pub(super) fn directions_deg(texture: Texture) -> &'static [f64] {
    match texture {
        Texture::Rising | Texture::Dots => &[-45.0],
        Texture::Falling => &[45.0],
        Texture::Level => &[0.0],
        Texture::Upright => &[90.0],
        Texture::Crossed => &[-45.0, 45.0],
    }
}

/// A hatch has at most this many pieces; a finer one is not drawn.
const MOST_LINES: f64 = 20_000.0;

/// The pieces inside the rings of lines in one direction, `spacing` px apart. Rings count by the even-odd rule.
pub(super) fn lines_inside(rings: &[Vec<Point>], direction_deg: f64, spacing: f64) -> Vec<[Point; 2]> {
    let (sin, cos) = direction_deg.to_radians().sin_cos();
    // along and across the lines
    let turned: Vec<Vec<Point>> = rings
        .iter()
        .map(|ring| ring.iter().map(|p| Point::new(p.x * cos + p.y * sin, p.y * cos - p.x * sin)).collect())
        .collect();
    let across = || turned.iter().flatten().map(|p| p.y);
    let (first, last) = (across().fold(f64::MAX, f64::min), across().fold(f64::MIN, f64::max));
    let (first, last) = ((first / spacing).ceil(), (last / spacing).floor());
    if !(spacing > 0.0 && last - first < MOST_LINES) {
        return Vec::new();
    }
    let back = |along: f64, y: f64| Point::new(along * cos - y * sin, along * sin + y * cos);
    let mut pieces = Vec::new();
    let mut line = first;
    while line <= last {
        let y = line * spacing;
        let cuts = cuts_at(&turned, y);
        pieces.extend(cuts.chunks_exact(2).map(|c| [back(c[0], y), back(c[1], y)]));
        line += 1.0;
    }
    pieces
}

/// Where the level line at `y` meets the rings' edges, in order.
fn cuts_at(rings: &[Vec<Point>], y: f64) -> Vec<f64> {
    let mut cuts: Vec<f64> = rings.iter().flat_map(|ring| ring_cuts(ring, y)).collect();
    cuts.sort_by(f64::total_cmp);
    cuts
}

fn ring_cuts(ring: &[Point], y: f64) -> impl Iterator<Item = f64> + '_ {
    let next = ring.iter().cycle().skip(1);
    // half-open in y, so that a corner on the line is met once
    ring.iter()
        .zip(next)
        .filter(move |(a, b)| (a.y <= y) != (b.y <= y))
        .map(move |(a, b)| a.x + (b.x - a.x) * (y - a.y) / (b.y - a.y))
}

/// Dots for one piece of line: the piece shortened to the first and last dot of a row whose dots stand at whole
/// multiples of `spacing`, staggered from row to row by the lines' slant.
pub(super) fn dot_row(piece: [Point; 2], direction_deg: f64, spacing: f64) -> Option<[Point; 2]> {
    let (sin, cos) = direction_deg.to_radians().sin_cos();
    let along = |p: Point| p.x * cos + p.y * sin;
    let (begin, end) = (along(piece[0]), along(piece[1]));
    let (first, last) = ((begin / spacing).ceil() * spacing, (end / spacing).floor() * spacing);
    let at = |a: f64| piece[0].moved((a - begin) * cos, (a - begin) * sin);
    // a little beyond the last dot, so that rounding does not lose it
    (first <= last).then(|| [at(first), at(last + spacing / 4.0)])
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::charts::canvas::Rect;

    fn square(from: f64, to: f64) -> Vec<Point> {
        Rect::spanned(Point::new(from, from), Point::new(to, to)).corners().to_vec()
    }

    fn length(pieces: &[[Point; 2]]) -> f64 {
        pieces.iter().map(|[a, b]| (b.x - a.x).hypot(b.y - a.y)).sum()
    }

    #[test]
    fn the_lines_cover_the_share_of_the_area_that_their_spacing_says() {
        for direction in [-45.0, 0.0, 45.0, 90.0] {
            let covered = length(&lines_inside(&[square(0.0, 400.0)], direction, 4.0)) * 4.0;
            assert!((covered / 160_000.0 - 1.0).abs() < 0.02, "{direction}: {covered}");
        }
    }

    #[test]
    fn a_ring_within_a_ring_stays_empty() {
        let rings = [square(0.0, 100.0), square(20.0, 80.0)];
        let inside = |p: Point| p.x > 20.5 && p.x < 79.5 && p.y > 20.5 && p.y < 79.5;
        for [a, b] in lines_inside(&rings, -45.0, 5.0) {
            assert!(!inside(Point::new(f64::midpoint(a.x, b.x), f64::midpoint(a.y, b.y))));
        }
    }

    #[test]
    fn senseless_spacings_draw_nothing_and_end() {
        for spacing in [0.0, -3.0, f64::NAN, 1e-300] {
            assert!(lines_inside(&[square(0.0, 100.0)], 45.0, spacing).is_empty());
        }
        assert!(lines_inside(&[], 45.0, 5.0).is_empty());
    }
}
