//! From canvas to picture pixels, with upright edges and baselines moved onto the pixel grid.
//!
//! Nothing moves by more than half a pixel of the picture. Knows nothing of inks.

use super::geometry::Point;
use super::scene::Shape;
use super::text::{Label, Turn};

/// A shape to be filled: upright edges between pixels.
pub(super) fn edges(shape: &Shape, scale: f64) -> Shape {
    let scaled = scaled(shape, scale);
    if scaled.is_upright() { mapped(&scaled, |p| Point::new(p.x.round(), p.y.round())) } else { scaled }
}

/// A shape to be stroked: upright lines of an odd width along the middle of pixels, of an even width between them.
pub(super) fn centres(shape: &Shape, width: f64, scale: f64) -> Shape {
    let scaled = scaled(shape, scale);
    if !scaled.is_upright() {
        return scaled;
    }
    let odd = (width * scale).round().max(1.0) % 2.0 == 1.0;
    // `plotters` puts an axis one grid step beside the mesh line at the same value: rounded this way they fall together
    let centre = |v: f64| if odd { v.ceil() - 0.5 } else { v.round() };
    match &scaled {
        // the ends of a lone line keep their fractions
        Shape::Lines { lines, square: false } => {
            let lines = lines.iter().map(|line| centred_line(line, centre)).collect();
            Shape::Lines { lines, square: false }
        }
        _ => mapped(&scaled, |p| Point::new(centre(p.x), centre(p.y))),
    }
}

fn centred_line(line: &[Point], centre: impl Fn(f64) -> f64) -> Vec<Point> {
    match line {
        [a, b] if a.x == b.x => [a, b].map(|p| Point::new(centre(p.x), p.y)).to_vec(),
        [a, b] => [a, b].map(|p| Point::new(p.x, centre(p.y))).to_vec(),
        longer => longer.iter().map(|p| Point::new(centre(p.x), centre(p.y))).collect(),
    }
}

/// A label's origin with its baseline between two rows, or columns, of pixels.
pub(super) fn baseline(label: &Label, scale: f64) -> Point {
    let (x, y) = (label.origin.x * scale, label.origin.y * scale);
    match label.turn {
        Turn::None | Turn::Half => Point::new(x, y.round()),
        Turn::Quarter | Turn::ThreeQuarters => Point::new(x.round(), y),
    }
}

fn scaled(shape: &Shape, scale: f64) -> Shape {
    match shape {
        Shape::Circle { centre, radius } => {
            Shape::Circle { centre: Point::new(centre.x * scale, centre.y * scale), radius: radius * scale }
        }
        _ => mapped(shape, |p| Point::new(p.x * scale, p.y * scale)),
    }
}

fn mapped(shape: &Shape, map: impl Fn(Point) -> Point) -> Shape {
    let each = |runs: &[Vec<Point>]| runs.iter().map(|run| run.iter().map(|p| map(*p)).collect()).collect();
    match shape {
        Shape::Lines { lines, square } => Shape::Lines { lines: each(lines), square: *square },
        Shape::Rings(rings) => Shape::Rings(each(rings)),
        Shape::Circle { centre, radius } => Shape::Circle { centre: map(*centre), radius: *radius },
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn lines(points: &[(f64, f64)]) -> Shape {
        Shape::Lines { lines: vec![points.iter().map(|&(x, y)| Point::new(x, y)).collect()], square: false }
    }

    #[test]
    fn a_thin_grid_line_runs_along_the_middle_of_a_pixel() {
        assert_eq!(centres(&lines(&[(1.3, 7.2), (90.0, 7.2)]), 1.0, 1.0), lines(&[(1.3, 7.5), (90.0, 7.5)]));
        assert_eq!(
            centres(&lines(&[(1.3, 7.2), (90.0, 7.2)]), 1.0, 2.0),
            lines(&[(2.6, 14.0), (180.0, 14.0)])
        );
    }

    #[test]
    fn an_axis_falls_on_the_mesh_line_beside_it() {
        let level = |y: f64| centres(&lines(&[(0.0, y), (9.0, y)]), 1.0, 1.0);
        assert_eq!(level(94.875), level(95.0));
    }

    #[test]
    fn a_slanting_line_is_left_where_it_is() {
        let slanting = lines(&[(1.3, 7.2), (90.0, 8.2)]);
        assert_eq!(centres(&slanting, 1.0, 1.0), slanting);
    }

    #[test]
    fn a_band_thinner_than_a_pixel_is_not_moved_out_of_sight() {
        let ring = [(3.1, 0.0), (3.4, 0.0), (3.4, 50.0), (3.1, 50.0)].map(|(x, y)| Point::new(x, y));
        let thin = Shape::Rings(vec![ring.to_vec()]);
        assert_eq!(edges(&thin, 1.0), thin);
    }
}
