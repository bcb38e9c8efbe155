//! Pictures of the list: measured or exact values as dots, what the program says as lines.

use plotters::prelude::*;

use crate::goldstein::Goldstein;
use crate::tunnel::MEASURED;

use super::{section, tip_loss, tunnel};

/// Size of one chart, px.
const SIZE: (u32, u32) = (560, 400);
const COLOURS: [RGBColor; 4] =
    [RGBColor(0, 90, 160), RGBColor(190, 60, 0), RGBColor(0, 120, 70), RGBColor(120, 40, 140)];

/// File and what it shows.
pub(super) const CAPTIONS: [(&str, &str); 4] = [
    (
        "validation/tunnel.svg",
        "The propeller in the wind tunnel: measured CT and CP over J as dots, computed as lines: the \
         print's angle in quiet air (full strength), in disturbed air and by the drawing's angle (paler)",
    ),
    (
        "validation/naca-0012.svg",
        "NACA 0012 with fixed transition, Reynolds number 6e6: drag over lift, measured (Ladson) as dots, \
         computed as a line",
    ),
    (
        "validation/eppler-387.svg",
        "Eppler 387 at Reynolds numbers 60 000 and 200 000: drag over lift, measured (McGhee and others, \
         figures from memory, those at 60 000 with low confidence) as dots, computed as lines",
    ),
    (
        "validation/tip-loss.svg",
        "Loss over the radius at a wake advance ratio of 0.2: Goldstein's exact factor as dots, Prandtl's \
         as lines, for two and four blades",
    ),
];

/// One curve: name (none: left out of the key), points, whether dots.
struct Curve {
    name: String,
    points: Vec<(f64, f64)>,
    colour: RGBAColor,
    dots: bool,
}

fn line(name: impl Into<String>, colour: usize, strength: f64, points: Vec<(f64, f64)>) -> Curve {
    Curve { name: name.into(), points, colour: COLOURS[colour].mix(strength), dots: false }
}

fn dots(name: impl Into<String>, colour: usize, points: Vec<(f64, f64)>) -> Curve {
    Curve { dots: true, ..line(name, colour, 1.0, points) }
}

/// File names and their SVG.
pub(super) fn all() -> [(&'static str, String); 4] {
    let drawn = [wind_tunnel(), tripped(), eppler(), losses()];
    let mut names = CAPTIONS.iter().map(|caption| caption.0);
    drawn.map(|svg| (names.next().expect("a name"), svg))
}

fn wind_tunnel() -> String {
    let answers = [
        (&tunnel::PHOTOGRAPHED, ["CT computed", "CP computed"], 1.0),
        (&tunnel::DISTURBED, ["", "in disturbed air"], 0.45),
        (&tunnel::DRAWN, ["", "by the drawing's angle"], 0.2),
    ];
    let lines = answers.iter().flat_map(|(answer, names, strength)| {
        let of = |pick: fn(&(f64, f64, f64)) -> (f64, f64)| answer.moving.iter().map(pick).collect();
        [line(names[0], 0, *strength, of(|p| (p.0, p.1))), line(names[1], 1, *strength, of(|p| (p.0, p.2)))]
    });
    let measured = [
        dots("CT measured", 0, MEASURED.iter().map(|m| (m.0, m.1)).collect()),
        dots("CP measured", 1, MEASURED.iter().map(|m| (m.0, m.2)).collect()),
    ];
    chart(
        SeriesLabelPosition::UpperRight,
        ["J", "CT, CP"],
        [0.0..0.7, 0.0..0.13],
        &lines.chain(measured).collect::<Vec<_>>(),
    )
}

fn tripped() -> String {
    let computed = section::TRIPPED_0012.iter().map(|p| (p.cl, p.cd)).collect();
    let measured = section::LADSON.iter().map(|row| (row.1, row.2)).collect();
    chart(
        SeriesLabelPosition::UpperLeft,
        ["cl", "cd"],
        [-0.6..1.8, 0.0..0.03],
        &[line("computed", 0, 1.0, computed), dots("Ladson 1988", 0, measured)],
    )
}

fn eppler() -> String {
    let curves =
        section::EPPLER.iter().zip(&*section::EPPLER_SOLVED).enumerate().flat_map(|(k, (known, points))| {
            let computed = points.iter().map(|p| (p.cl, p.cd)).collect();
            [
                line(format!("computed, {}", known.0), k, 1.0, computed),
                dots(format!("recalled, {}", known.0), k, known.1.to_vec()),
            ]
        });
    chart(SeriesLabelPosition::UpperLeft, ["cl", "cd"], [0.0..1.4, 0.0..0.05], &curves.collect::<Vec<_>>())
}

fn losses() -> String {
    let even =
        |from: f64, to: f64, n: u32| (0..=n).map(move |i| from + (to - from) * f64::from(i) / f64::from(n));
    let curves = [2, 4].into_iter().enumerate().flat_map(|(k, blades)| {
        let exact = Goldstein::new(blades, 0.2);
        let prandtl = even(0.3, 1.0, 35).map(|x| (x, tip_loss::prandtl(blades, 0.2, x))).collect();
        [
            line(format!("Prandtl, {blades} blades"), k, 1.0, prandtl),
            dots(
                format!("Goldstein, {blades} blades"),
                k,
                even(0.3, 0.98, 17).map(|x| (x, exact.factor(x))).collect(),
            ),
        ]
    });
    chart(
        SeriesLabelPosition::LowerLeft,
        ["r/R", "factor"],
        [0.3..1.0, 0.0..1.1],
        &curves.collect::<Vec<_>>(),
    )
}

/// A chart as SVG.
fn chart(
    key: SeriesLabelPosition,
    axes: [&str; 2],
    [x, y]: [std::ops::Range<f64>; 2],
    curves: &[Curve],
) -> String {
    let mut svg = String::new();
    draw(&mut svg, key, axes, [x, y], curves).expect("a text can be written to");
    // What goes without saying goes: the page has these pictures too, and a limit of bytes.
    svg.replace(" opacity=\"1\"", "").replace(" stroke=\"none\"", "")
}

type Drawn<'a> = Result<(), DrawingAreaErrorKind<<SVGBackend<'a> as DrawingBackend>::ErrorType>>;

fn draw<'a>(
    svg: &'a mut String,
    key: SeriesLabelPosition,
    axes: [&str; 2],
    [x, y]: [std::ops::Range<f64>; 2],
    curves: &[Curve],
) -> Drawn<'a> {
    let root = SVGBackend::with_string(svg, SIZE).into_drawing_area();
    root.fill(&WHITE)?;
    let mut chart = ChartBuilder::on(&root)
        .margin(12)
        .x_label_area_size(46)
        .y_label_area_size(70)
        .build_cartesian_2d(x, y)?;
    chart
        .configure_mesh()
        .x_desc(axes[0])
        .y_desc(axes[1])
        .light_line_style(TRANSPARENT)
        .label_style(("sans-serif", 18))
        .draw()?;
    for curve in curves {
        let (colour, points) = (curve.colour, curve.points.clone());
        let drawn = if curve.dots {
            chart.draw_series(points.into_iter().map(|p| Circle::new(p, 4, colour.filled())))?
        } else {
            chart.draw_series(LineSeries::new(points, colour.stroke_width(2)))?
        };
        if curve.name.is_empty() {
            continue;
        }
        drawn.label(&curve.name);
        if curve.dots {
            drawn.legend(move |(x, y)| Circle::new((x + 10, y), 4, colour.filled()));
        } else {
            drawn.legend(move |(x, y)| PathElement::new([(x, y), (x + 20, y)], colour.stroke_width(2)));
        }
    }
    chart
        .configure_series_labels()
        .position(key)
        .background_style(WHITE.mix(0.8))
        .label_font(("sans-serif", 17))
        .draw()?;
    root.present()
}
