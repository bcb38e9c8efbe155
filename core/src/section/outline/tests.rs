use proptest::prelude::*;

use super::*;

fn ellipse(count: usize, ratio: f64) -> Vec<[f64; 2]> {
    (0..=count)
        .map(|k| k as f64 / count as f64 * std::f64::consts::TAU)
        .map(|a| [0.5 + 0.5 * a.cos(), 0.5 * ratio * a.sin()])
        .collect()
}

#[test]
fn area_and_moments_of_an_ellipse() {
    let outline = Outline::from_points("ellipse", &ellipse(400, 0.2)).expect("a fair outline");
    let (a, b) = (0.5, 0.1);
    let m = outline.measures();
    assert!((m.area / (std::f64::consts::PI * a * b) - 1.0).abs() < 2e-4);
    assert!((m.i_flat / (std::f64::consts::PI / 4.0 * a * b * b * b) - 1.0).abs() < 4e-4);
    assert!((m.i_edge / (std::f64::consts::PI / 4.0 * b * a * a * a) - 1.0).abs() < 4e-4);
    assert!((m.nose_radius / (b * b / a) - 1.0).abs() < 0.05, "{}", m.nose_radius);
    assert!((m.thickness_ratio - 0.2).abs() < 1e-4 && m.camber_ratio.abs() < 1e-4);
}

#[test]
fn either_order_and_any_frame_give_the_same_outline() {
    let wing = naca_four_digit(4, 4, 0.12).expect("a published section");
    let turned = |p: &[f64; 2]| {
        [30.0 + 200.0 * (0.96 * p[0] - 0.28 * p[1]), 7.0 + 200.0 * (0.28 * p[0] + 0.96 * p[1])]
    };
    let mut points: Vec<[f64; 2]> = wing.points().iter().map(turned).collect();
    points.reverse();
    let again = Outline::from_points("", &points).expect("the same section");
    for (a, b) in wing.points().iter().zip(again.points()) {
        // The farthest point is a flat maximum: it is found to the square root of the rounding error.
        assert!((a[0] - b[0]).hypot(a[1] - b[1]) < 1e-6);
    }
    let turn = again.rotation_rad() + 0.28_f64.atan2(0.96);
    assert!(turn.abs() < 1e-6, "{turn}");
}

#[test]
fn exchanged_columns_are_told() {
    let wing = naca_four_digit(4, 4, 0.12).expect("a published section");
    let exchanged: Vec<[f64; 2]> = wing.points().iter().map(|p| [p[1], p[0]]).collect();
    let said = Outline::from_points("", &exchanged).expect_err("x and y are exchanged").to_string();
    assert!(said.contains("90 degrees") && said.contains("are x and y exchanged?"), "{said}");
    // A list that faces the other way is none.
    let facing_back: Vec<[f64; 2]> = wing.points().iter().map(|p| [1.0 - p[0], p[1]]).collect();
    assert!(Outline::from_points("", &facing_back).is_ok());
}

#[test]
fn the_face_of_clark_y_is_two_degrees_under_its_chord_line() {
    let section = clark_y().expect("fixed ordinates");
    let angle = section.face_angle_rad().expect("a flat face").to_degrees();
    assert!((angle - 1.97).abs() < 0.05, "{angle}");
    assert!((section.rotation_rad().to_degrees() - angle).abs() < 0.01);
    assert!((section.thickness_ratio() - 0.117).abs() < 0.0005, "{}", section.thickness_ratio());
}

#[test]
fn rounded_sections_have_no_face() {
    for section in [naca_four_digit(0, 0, 0.06), naca_four_digit(4, 4, 0.12), naca_16_series(0.5, 0.09)] {
        assert!(section.expect("drawn").face().is_none());
    }
}

#[test]
fn scaling_reaches_the_ratio_and_keeps_face_or_camber() {
    for section in
        [clark_y(), raf_6(), arc_back(0.12, 0.05), naca_four_digit(4, 4, 0.12), naca_16_series(0.5, 0.12)]
    {
        let section = section.expect("drawn");
        for ratio in [0.06, 0.1, 0.18, 0.24] {
            let scaled = section.scaled_to(ratio).expect("scales");
            assert!((scaled.thickness_ratio() - ratio).abs() < 1e-6, "{} {ratio}", section.name());
            assert_eq!(scaled.face().is_some(), section.face().is_some(), "{} {ratio}", section.name());
            if section.face().is_none() {
                let change = scaled.measures().camber_ratio - section.measures().camber_ratio;
                assert!(change.abs() < 1e-3, "{} {change}", section.name());
            }
        }
    }
}

#[test]
fn the_arc_back_is_a_circular_arc() {
    let section = arc_back(0.12, 0.0).expect("drawn");
    let big = (0.25 + 0.0144) / 0.24;
    for p in section.points().iter().filter(|p| p[1] > 1e-9) {
        let r = (p[0] - 0.5).hypot(p[1] - 0.12 + big);
        assert!((r - big).abs() < 1e-9);
    }
    assert_eq!(section.measures().nose_radius, 0.0);
}

#[test]
fn faults_are_named() {
    let fair = ellipse(40, 0.2);
    let few: Vec<[f64; 2]> = fair[..5].to_vec();
    assert!(matches!(Outline::from_points("", &few), Err(OutlineError::TooFew { found: 5 })));
    let mut doubled = fair.clone();
    doubled.insert(12, doubled[11]);
    let error = Outline::from_points("", &doubled).expect_err("refused");
    assert_eq!(error.to_string(), "point 13: repeats the point before it; neighbouring points must differ");
    let mut crossed = fair.clone();
    crossed.swap(8, 13);
    assert!(Outline::from_points("", &crossed).is_err());
    let mut spiked = fair.clone();
    spiked[10][1] = 0.9;
    assert!(matches!(Outline::from_points("", &spiked), Err(OutlineError::Spike { .. })));
    let mut infinite = fair.clone();
    infinite[7][0] = f64::NAN;
    assert!(matches!(Outline::from_points("", &infinite), Err(OutlineError::OutOfRange { .. })));
    assert!(matches!(Outline::from_points("", &fair[..30]), Err(OutlineError::NotClosed { .. })));
    let many = ellipse(3000, 0.2);
    assert!(matches!(Outline::from_points("", &many), Err(OutlineError::TooMany { .. })));
    assert!(matches!(Outline::read(&"1 0\n".repeat(400_000)), Err(OutlineError::TooLarge { .. })));
    assert!(matches!(Outline::read(""), Err(OutlineError::TooFew { found: 0 })));
}

#[test]
fn any_list_gives_an_outline_or_an_error() {
    // A small congruential generator: lists of random points, random lengths, random repeats.
    let mut seed = 1_u64;
    let mut next = || {
        seed = seed.wrapping_mul(6_364_136_223_846_793_005).wrapping_add(1_442_695_040_888_963_407);
        (seed >> 11) as f64 / (1_u64 << 53) as f64
    };
    for round in 0..300 {
        let count = 1 + (next() * 60.0) as usize;
        let mut points: Vec<[f64; 2]> = ellipse(count.max(2), 0.3 * next());
        for point in &mut points {
            if next() < 0.02 * f64::from(round % 10) {
                *point = [next() * 4.0 - 2.0, next() * 4.0 - 2.0];
            }
        }
        if let Ok(outline) = Outline::from_points("", &points) {
            assert!(outline.measures().area.is_finite());
            let _ = outline.scaled_to(0.1);
        }
    }
}

#[test]
fn a_thick_edge_keeps_the_face() {
    for section in [clark_y(), naca_four_digit(4, 4, 0.12)] {
        let section = section.expect("drawn");
        let thick = section.with_edge_thickness(0.012).expect("thicker");
        assert!((thick.measures().edge_thickness - 0.012).abs() < 2e-4);
        assert!((thick.thickness_ratio() - section.thickness_ratio()).abs() < 1e-3);
        assert_eq!(thick.face().is_some(), section.face().is_some());
        assert!(section.with_edge_thickness(0.2).is_err());
    }
}

#[test]
fn a_blunt_edge_keeps_the_face_the_nose_and_the_greatest_thickness() {
    for section in [clark_y(), arc_back(0.12, 0.05), naca_four_digit(4, 4, 0.12)] {
        let drawn = section.expect("drawn");
        let blunt = drawn.with_edge_thickness(0.012).expect("room for it");
        assert!((blunt.measures().edge_thickness - 0.012).abs() < 1e-4, "{:?}", blunt.measures());
        assert!((blunt.thickness_ratio() - drawn.thickness_ratio()).abs() < 3e-4);
        assert!((blunt.measures().nose_radius / drawn.measures().nose_radius - 1.0).abs() < 0.05);
        assert_eq!(blunt.face().is_some(), drawn.face().is_some());
        // The middle of the edge rises by half of what was added to the back: the chord line drops at the
        // nose by as much.
        if let (Some(a), Some(b)) = (drawn.face_angle_rad(), blunt.face_angle_rad()) {
            let rise = 0.5 * (0.012 - drawn.measures().edge_thickness);
            assert!((a - b - rise).abs() < 1e-4, "{a} {b} {rise}");
            assert!((blunt.rotation_rad() - drawn.rotation_rad() - (b - a)).abs() < 1e-6);
        }
    }
}

#[test]
fn an_edge_thinner_than_drawn_or_absurd_is_refused() {
    let drawn = raf_6().expect("drawn");
    for edge in [0.001, 0.2, -0.01, f64::NAN] {
        assert!(matches!(drawn.with_edge_thickness(edge), Err(OutlineError::Figure { .. })), "{edge}");
    }
}

proptest! {
    #[test]
    fn no_text_panics(text in "\\PC{0,200}") {
        let _ = Outline::read(&text);
    }

    /// Lists of figures, with repeats, gaps, words and figures without bound: an outline whose measures are finite,
    /// or an error.
    #[test]
    fn no_list_of_figures_panics(
        lines in prop::collection::vec(
            "(-?[01](\\.[0-9]{1,4})? -?0(\\.[0-9]{1,4})?)|1 0|0 0||NaN 0|1e999 1|x|9",
            0..60,
        ),
    ) {
        if let Ok(outline) = Outline::read(&lines.join("\n")) {
            let m = outline.measures();
            prop_assert!(m.area.is_finite() && m.thickness_ratio.is_finite() && m.nose_radius.is_finite());
        }
    }

    /// A fair section with a few of its points moved, repeated or struck out.
    #[test]
    fn no_marred_section_panics(
        marks in prop::collection::vec((0..81_usize, -2.0..2.0_f64, -2.0..2.0_f64, 0..3_u8), 0..6),
        size in -6.0..6.0_f64,
    ) {
        let mut points = ellipse(80, 0.12);
        for (at, x, y, how) in marks {
            let at = at.min(points.len() - 1);
            match how {
                0 => points[at] = [x, y],
                1 => points.insert(at, points[at]),
                _ => drop(points.remove(at)),
            }
        }
        for p in &mut points {
            *p = p.map(|v| v * 10_f64.powf(size));
        }
        if let Ok(outline) = Outline::from_points("", &points) {
            prop_assert!(outline.measures().area.is_finite());
            if let Ok(scaled) = outline.scaled_to(0.1) {
                prop_assert!(scaled.measures().area.is_finite());
            }
        }
    }
}
