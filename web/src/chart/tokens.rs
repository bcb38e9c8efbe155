//! Tests of the style sheet that holds the colours: nothing else keeps a figure readable on its class.

const SHEET: &str = include_str!("../../style/01-tokens.css");

/// The blocks of the sheet, each with what selects it.
fn blocks() -> Vec<(&'static str, Vec<(&'static str, &'static str)>)> {
    let inner = SHEET.split('}').filter_map(|piece| {
        let (selector, body) = piece.rsplit_once('{')?;
        let declarations = body.split(';').filter_map(|d| d.trim().split_once(": "));
        Some((selector, declarations.filter(|d| d.0.starts_with("--")).collect()))
    });
    inner.collect()
}

/// The colours of the light theme and the two copies of the dark one.
fn themes() -> [Vec<(&'static str, &'static str)>; 3] {
    let blocks = blocks();
    let of = |marks: &dyn Fn(&str) -> bool| {
        blocks
            .iter()
            .find(|(selector, d)| marks(selector) && d.len() > 20)
            .map(|b| b.1.clone())
            .unwrap_or_default()
    };
    [
        of(&|s| s.trim_end().ends_with(":root") && !s.contains('@')),
        of(&|s| s.contains("prefers-color-scheme: dark")),
        of(&|s| s.contains(":root[data-theme=dark]") && !s.contains("@media")),
    ]
}

fn colour(theme: &[(&str, &str)], name: &str) -> [f64; 3] {
    let hex = theme.iter().find(|d| d.0 == name).unwrap_or_else(|| panic!("{name} is not set")).1;
    let digits: Vec<u32> = hex[1..].chars().map(|c| c.to_digit(16).unwrap()).collect();
    let channel = |i: usize| match digits.len() {
        3 => digits[i] * 17,
        _ => digits[2 * i] * 16 + digits[2 * i + 1],
    };
    [0, 1, 2].map(|i| f64::from(channel(i)) / 255.0)
}

/// Relative luminance and contrast ratio of the Web Content Accessibility Guidelines 2.2.
fn contrast(a: [f64; 3], b: [f64; 3]) -> f64 {
    let linear = |c: f64| if c <= 0.04045 { c / 12.92 } else { ((c + 0.055) / 1.055).powf(2.4) };
    let luminance = |c: [f64; 3]| 0.2126 * linear(c[0]) + 0.7152 * linear(c[1]) + 0.0722 * linear(c[2]);
    let (a, b) = (luminance(a), luminance(b));
    (a.max(b) + 0.05) / (a.min(b) + 0.05)
}

#[test]
fn the_two_dark_themes_are_one() {
    let [light, dark, chosen] = themes();
    assert!(light.len() > 30 && dark.len() == light.len(), "{} {}", light.len(), dark.len());
    assert_eq!(dark, chosen);
}

#[test]
fn figures_are_readable_on_every_class() {
    for theme in &themes()[..2] {
        for class in 0..super::departure::CLASSES {
            let ratio =
                contrast(colour(theme, &format!("--d{class}")), colour(theme, &format!("--t{class}")));
            assert!(ratio >= 4.5, "class {class}: {ratio:.2}");
        }
    }
}

#[test]
fn words_are_readable_on_every_ground() {
    for theme in &themes()[..2] {
        for ground in ["--sheet", "--well", "--bg"] {
            for words in ["--ink", "--ink2", "--green", "--alert"] {
                let ratio = contrast(colour(theme, ground), colour(theme, words));
                assert!(ratio >= 4.5, "{words} on {ground}: {ratio:.2}");
            }
        }
        let quiet = contrast(colour(theme, "--sheet"), colour(theme, "--ink3"));
        assert!(quiet >= 4.5, "--ink3 on --sheet: {quiet:.2}");
        let edge = contrast(colour(theme, "--band"), colour(theme, "--band-line"));
        assert!(edge >= 3.0, "edge of the working band: {edge:.2}");
    }
}
