//! The canvas' two pictures: well formed, inert, the same each time, and as large as they were measured.

#![allow(clippy::unwrap_used, reason = "also what a test calls may panic")]

use gloamline::charts::canvas::{
    Across, Canvas, CanvasError, Dash, Grid, Hatch, Ink, Level, Look, Marker, Point, Rect, Size, Stroke,
    SvgOptions, TextStyle, Texture, Turn, measure,
};
use plotters::prelude::*;
use proptest::prelude::*;

const NAVY: Ink = Ink::hex(0x1b3a5c);

fn blank(width_px: u32, height_px: u32) -> Canvas {
    Canvas::new(Size::new(width_px, height_px).unwrap(), "A chart", "What it shows")
}

/// A little of everything that a canvas can draw.
fn sampler(title: &str, text: &str) -> Canvas {
    let mut canvas = Canvas::new(Size::new(320, 200).unwrap(), title, title);
    let band = Rect::spanned(Point::new(40.3, 20.0), Point::new(160.7, 180.0));
    canvas.rect(band, Look::filled(NAVY.with_alpha(0.2)).hatched(Hatch::new(Texture::Rising, NAVY)));
    canvas.circle(
        Point::new(240.0, 100.0),
        42.5,
        Look::outlined(Stroke::new(NAVY, 1.5)).hatched(Hatch::new(Texture::Dots, NAVY)),
    );
    canvas.clipped(band, |canvas| {
        let wave = |i: i32| Point::new(f64::from(i), 100.0 + 60.0 * (f64::from(i) / 20.0).sin());
        let points: Vec<Point> = (0..320).map(wave).collect();
        canvas.line(&points, Stroke::new(NAVY, 2.0).dashed(Dash::DashDot(9.0, 4.0)));
    });
    canvas.marker(Marker::Diamond, Point::new(100.0, 50.0), 5.0, Look::filled(Ink::BLACK));
    let style = TextStyle::new(15.0, Ink::BLACK).anchored(Across::Middle, Level::Top);
    canvas.text(text, Point::new(160.0, 8.0), &style.haloed(Ink::WHITE, 2.0));
    canvas.text(text, Point::new(8.0, 100.0), &style.bold().turned(Turn::ThreeQuarters));
    canvas
}

fn plotted(canvas: &mut Canvas) {
    let root = canvas.grid().into_drawing_area();
    let mut chart = ChartBuilder::on(&root)
        .margin(Grid::steps(10.0))
        .x_label_area_size(Grid::steps(30.0))
        .y_label_area_size(Grid::steps(50.0))
        .build_cartesian_2d(0.0..12.0, -30.0..30.0)
        .unwrap();
    let label = ("sans-serif", Grid::steps(12.0)).into_font();
    chart.configure_mesh().label_style(label).x_desc("hours").y_desc("elevation").draw().unwrap();
    let curve = (0..=200).map(|i| (f64::from(i) * 0.06, 25.0 * (f64::from(i) * 0.03).sin()));
    chart.draw_series(LineSeries::new(curve, RED.stroke_width(Grid::steps(1.5)))).unwrap();
    root.present().unwrap();
}

struct Decoded {
    width: u32,
    height: u32,
    channels: usize,
    dots_per_metre: u32,
    bytes: Vec<u8>,
}

impl Decoded {
    fn of(png: &[u8]) -> Self {
        let mut reader = png::Decoder::new(std::io::Cursor::new(png)).read_info().unwrap();
        let mut bytes = vec![0; reader.output_buffer_size().unwrap()];
        let frame = reader.next_frame(&mut bytes).unwrap();
        let dots_per_metre = reader.info().pixel_dims.unwrap().xppu;
        let channels = frame.color_type.samples();
        Self { width: frame.width, height: frame.height, channels, dots_per_metre, bytes }
    }

    fn at(&self, x: u32, y: u32) -> &[u8] {
        let begin = (y * self.width + x) as usize * self.channels;
        &self.bytes[begin..begin + self.channels]
    }

    /// How black a pixel of a black-on-white picture is, from 0 to 1.
    fn black(&self, x: u32, y: u32) -> f64 {
        1.0 - f64::from(self.at(x, y)[0]) / 255.0
    }

    /// Left and right edge of what is black, from the coverage of the outermost columns.
    fn black_from_to(&self) -> (f64, f64) {
        let column = |x: u32| (0..self.height).map(|y| self.black(x, y)).fold(0.0, f64::max);
        let inked: Vec<(u32, f64)> =
            (0..self.width).map(|x| (x, column(x))).filter(|(_, c)| *c > 0.0).collect();
        let (first, last) = (inked[0], inked[inked.len() - 1]);
        (f64::from(first.0) + 1.0 - first.1, f64::from(last.0) + last.1)
    }
}

#[test]
fn the_svg_is_well_formed_and_says_what_it_shows() {
    let mut canvas = sampler("Day & night <beneath> \"AY99\"", "00:00Z → −6°");
    plotted(&mut canvas);
    for real_text in [false, true] {
        let svg = canvas.to_svg_with(SvgOptions { real_text, id_prefix: "p1-" });
        let document = roxmltree::Document::parse(&svg).unwrap();
        let root = document.root_element();
        let title =
            root.children().find(|n| n.has_tag_name(("http://www.w3.org/2000/svg", "title"))).unwrap();
        assert_eq!(title.text(), Some("Day & night <beneath> \"AY99\""));
        assert_eq!(root.attribute("aria-labelledby"), Some("p1-title p1-desc"));
        assert_eq!(root.attribute("role") == Some("img"), !real_text);
        let texts = document.descendants().filter(|n| n.tag_name().name() == "text").count();
        assert_eq!(texts > 0, real_text);
    }
}

#[test]
fn every_reference_in_the_svg_has_its_target() {
    let svg = sampler("t", "Łódź 漢 12:30").to_svg();
    let document = roxmltree::Document::parse(&svg).unwrap();
    let ids: Vec<&str> = document.descendants().filter_map(|n| n.attribute("id")).collect();
    let uses: Vec<&str> = document
        .descendants()
        .filter_map(|n| n.attribute(("http://www.w3.org/1999/xlink", "href")))
        .collect();
    assert!(uses.len() > 10);
    for href in uses {
        assert!(ids.contains(&href.trim_start_matches('#')), "{href}");
    }
    let mut once = ids.clone();
    once.sort_unstable();
    once.dedup();
    assert_eq!(once.len(), ids.len(), "no identifier is given twice");
}

#[test]
fn a_hostile_title_stays_words() {
    let hostile = "</title><script>alert(1)</script>\u{0}\u{202e}]]>&#x0;\u{fffe}\u{1b}[31m<svg onload='x'>";
    let svg = sampler(hostile, hostile).to_svg_with(SvgOptions { real_text: true, id_prefix: hostile });
    let document = roxmltree::Document::parse(&svg).unwrap();
    let names = ["svg", "title", "desc", "defs", "clipPath", "path", "g", "use", "circle", "text"];
    for node in document.descendants().filter(roxmltree::Node::is_element) {
        assert!(names.contains(&node.tag_name().name()), "{}", node.tag_name().name());
        assert!(node.attributes().all(|a| !a.name().starts_with("on")));
    }
    assert!(!svg.contains('\u{202e}') && !svg.contains('\u{1b}'));
}

#[test]
fn a_polyline_keeps_its_decimals() {
    let mut canvas = blank(100, 100);
    canvas.line(&[Point::new(1.37, 2.5), Point::new(3.125, 4.06)], Stroke::new(NAVY, 0.75));
    let svg = canvas.to_svg();
    assert!(svg.contains("M1.37 2.5 3.12 4.06") || svg.contains("M1.37 2.5 3.13 4.06"), "{svg}");
    assert!(svg.contains("stroke-width=\"0.75\""));
}

#[test]
fn a_curve_through_plotters_is_finer_than_a_pixel() {
    let mut canvas = blank(400, 300);
    plotted(&mut canvas);
    let svg = canvas.to_svg();
    let document = roxmltree::Document::parse(&svg).unwrap();
    let curve = document.descendants().find(|n| n.attribute("stroke") == Some("#ff0000")).unwrap();
    let numbers = curve.attribute("d").unwrap().trim_start_matches('M').split(' ');
    let broken = numbers.clone().filter(|n| n.contains('.')).count();
    assert!(broken * 10 > numbers.count() * 7, "most coordinates have decimals");
}

#[test]
fn the_png_has_the_size_the_scale_and_the_resolution_asked_for() {
    for (scale, width, height) in [(1.0, 320, 200), (2.0, 640, 400), (1.5, 480, 300)] {
        let picture = Decoded::of(&sampler("t", "x").to_png(scale).unwrap());
        assert_eq!((picture.width, picture.height, picture.channels), (width, height, 3));
        let inches = f64::from(picture.width) / f64::from(picture.dots_per_metre) / 0.0254;
        assert!((inches - 320.0 / 96.0).abs() < 0.01, "printed {inches} inches wide");
    }
}

#[test]
fn scales_without_a_picture_are_refused() {
    for scale in [0.0, -1.0, f64::NAN, f64::INFINITY, 1e9, 1e-9] {
        assert!(matches!(blank(100, 100).to_png(scale), Err(CanvasError::Scale { .. })), "{scale}");
    }
}

#[test]
fn a_clear_background_gives_alpha() {
    let picture = Decoded::of(&blank(10, 10).on(None).to_png(1.0).unwrap());
    assert_eq!(picture.at(5, 5), [0, 0, 0, 0]);
}

#[test]
fn the_same_drawing_gives_the_same_bytes() {
    let draw = || {
        let mut canvas = sampler("t", "EFHK 21:40");
        plotted(&mut canvas);
        canvas
    };
    let (one, other) = (draw(), draw());
    assert_eq!(one.to_svg(), other.to_svg());
    assert_eq!(one.to_png(1.0).unwrap(), other.to_png(1.0).unwrap());
}

#[test]
fn a_slanting_line_is_smoothed() {
    let mut canvas = blank(100, 100);
    canvas.line(&[Point::new(5.0, 10.0), Point::new(95.0, 40.0)], Stroke::new(Ink::BLACK, 1.5));
    let picture = Decoded::of(&canvas.to_png(1.0).unwrap());
    let mut levels: Vec<u8> = picture.bytes.clone();
    levels.sort_unstable();
    levels.dedup();
    assert!(levels.len() > 8, "{} grey levels", levels.len());
}

#[test]
fn neighbouring_bands_meet_without_a_seam() {
    let mut canvas = blank(100, 20);
    for (left, right) in [(0.0, 33.4), (33.4, 66.7), (66.7, 100.0)] {
        let band = Rect::spanned(Point::new(left, 0.0), Point::new(right, 20.0));
        canvas.rect(band, Look::filled(Ink::BLACK.with_alpha(0.4)));
    }
    let picture = Decoded::of(&canvas.to_png(1.0).unwrap());
    assert!((0..100).all(|x| picture.at(x, 10) == picture.at(0, 10)));
}

#[test]
fn nothing_is_drawn_outside_a_clip() {
    let mut canvas = blank(60, 60);
    let clip = Rect::spanned(Point::new(20.0, 20.0), Point::new(40.0, 40.0));
    canvas.clipped(clip, |c| c.rect(c.size().sheet(), Look::filled(Ink::BLACK)));
    let picture = Decoded::of(&canvas.to_png(1.0).unwrap());
    for (x, y) in (0..60).flat_map(|x| (0..60).map(move |y| (x, y))) {
        let inside = (20..40).contains(&x) && (20..40).contains(&y);
        assert_eq!(picture.black(x, y) > 0.5, inside, "{x},{y}");
    }
}

#[test]
fn a_hatch_darkens_an_area_by_the_share_that_it_covers() {
    let textures = [
        (Texture::Rising, 0.125),
        (Texture::Falling, 0.125),
        (Texture::Level, 0.125),
        (Texture::Upright, 0.125),
        (Texture::Crossed, 0.234),
        (Texture::Dots, std::f64::consts::PI / 64.0),
    ];
    for (texture, share) in textures {
        let mut canvas = blank(400, 400);
        canvas.rect(canvas.size().sheet(), Look::default().hatched(Hatch::new(texture, Ink::BLACK)));
        let picture = Decoded::of(&canvas.to_png(1.0).unwrap());
        let pixels = (0..400).flat_map(|x| (0..400).map(move |y| (x, y)));
        let black = pixels.map(|(x, y)| picture.black(x, y)).sum::<f64>() / 160_000.0;
        assert!((black / share - 1.0).abs() < 0.08, "{texture:?}: {black} of {share}");
    }
}

#[test]
fn a_text_is_as_wide_as_it_was_measured() {
    let style = TextStyle::new(17.0, Ink::BLACK);
    for text in ["Tokyo → Helsinki", "AVATAR 12:34:56Z", "Łódź", "−18°", "illicit", "漢"] {
        for style in [style, style.bold()] {
            let mut canvas = blank(300, 60);
            canvas.text(text, Point::new(20.3, 40.0), &style);
            let (left, right) = Decoded::of(&canvas.to_png(1.0).unwrap()).black_from_to();
            let ink = measure(text, &style).ink;
            assert!((left - 20.3 - ink.left).abs() < 0.5, "{text}: begins {left}, {ink:?}");
            assert!((right - 20.3 - ink.right).abs() < 0.5, "{text}: ends {right}, {ink:?}");
        }
    }
}

#[test]
fn both_pictures_put_a_text_at_the_same_place() {
    let style = TextStyle::new(20.0, Ink::BLACK).anchored(Across::End, Level::Middle);
    let mut canvas = blank(200, 60);
    canvas.text("Ivalo", Point::new(150.0, 30.0), &style);
    let svg = canvas.to_svg();
    let begin = 150.0 - measure("Ivalo", &style).width;
    let place = svg.split("translate(").nth(1).unwrap();
    let written: f64 = place.split(' ').next().unwrap().parse().unwrap();
    assert!((written - begin).abs() < 0.006 && place.contains(" 37.5)scale(0.01)"), "{place}");
    let (left, _) = Decoded::of(&canvas.to_png(1.0).unwrap()).black_from_to();
    assert!((left - begin - measure("Ivalo", &style).ink.left).abs() < 0.5);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(64))]

    #[test]
    fn no_text_makes_it_panic_or_breaks_the_svg(text in any::<String>(), size in -10.0..60.0, at in any::<(f64, f64)>()) {
        let mut canvas = sampler(&text, &text);
        canvas.text(&text, Point::new(at.0, at.1), &TextStyle::new(size, Ink::BLACK));
        canvas.text(&text, Point::new(60.0, 60.0), &TextStyle::new(size, Ink::BLACK).turned(Turn::Quarter));
        let svg = canvas.to_svg_with(SvgOptions { real_text: true, id_prefix: &text });
        prop_assert!(roxmltree::Document::parse(&svg).is_ok());
        prop_assert!(canvas.to_png(0.5).is_ok());
    }

    #[test]
    fn no_coordinates_make_it_panic(xy in proptest::collection::vec(any::<(f64, f64)>(), 0..12), wide in any::<f64>()) {
        let points: Vec<Point> = xy.iter().map(|&(x, y)| Point::new(x, y)).collect();
        let mut canvas = blank(50, 50);
        let stroke = Stroke::new(NAVY, wide).dashed(Dash::Dashed(wide, 3.0));
        canvas.line(&points, stroke);
        canvas.area(&points, Look::filled(NAVY).edged(stroke).hatched(Hatch::new(Texture::Crossed, NAVY)));
        canvas.clipped_to(&[points], |c| c.rect(c.size().sheet(), Look::filled(NAVY)));
        prop_assert!(roxmltree::Document::parse(&canvas.to_svg()).is_ok());
        prop_assert!(canvas.to_png(1.0).is_ok());
    }

    #[test]
    fn coordinates_about_the_sheet_make_no_trouble(
        xy in proptest::collection::vec((-300.0..300.0, -30_000.0..30_000.0), 0..12), spacing in 0.0..20.0
    ) {
        let points: Vec<Point> = xy.iter().map(|&(x, y)| Point::new(x, y)).collect();
        let mut canvas = blank(50, 50);
        canvas.line(&points, Stroke::new(NAVY, 1.0).dashed(Dash::Dashed(spacing, spacing)));
        let hatch = Hatch { spacing, ..Hatch::new(Texture::Dots, NAVY) };
        canvas.area(&points, Look::filled(NAVY).hatched(hatch));
        prop_assert!(roxmltree::Document::parse(&canvas.to_svg()).is_ok());
        prop_assert!(canvas.to_png(1.0).is_ok());
    }
}
