//! Figures as text, and text as figures.

use crate::units::{Quantity, Units, typed_unit_si};

use crate::chart::number::{MINUS, THIN_SPACE};
pub use crate::chart::number::{
    NONE as NO_FIGURE, fixed, fixed_or_none, signed, signed_or_none, significant,
};

/// A figure for a box to type in: a true minus, no grouping.
#[must_use]
pub fn plain(value: f64, decimals: usize) -> String {
    if !value.is_finite() {
        return NO_FIGURE.to_string();
    }
    let text = format!("{value:.decimals$}");
    match text.strip_prefix('-') {
        Some(rest) if rest.chars().all(|c| c == '0' || c == '.') => rest.to_string(),
        Some(rest) => format!("{MINUS}{rest}"),
        None => text,
    }
}

/// An SI figure in the unit shown, without the unit.
#[must_use]
pub fn figure(units: Units, quantity: Quantity, si: Option<f64>) -> String {
    let Some(shown) = si.map(|si| units.shown(quantity, si)) else { return NO_FIGURE.into() };
    match quantity {
        // From grams to tonnes, and figures as they are given: no more decimals than they have, small masses
        // in three figures.
        Quantity::Mass | Quantity::Area | Quantity::Charge => {
            let small = quantity == Quantity::Mass && shown.abs() < 1.0 && shown != 0.0;
            let text = if small { significant(shown, 3) } else { fixed(shown, 2) };
            text.trim_end_matches('0').trim_end_matches('.').into()
        }
        // From a palm-size rotor to a light aeroplane: five orders of size.
        Quantity::Force
        | Quantity::Grading
        | Quantity::TorqueGrading
        | Quantity::Torque
        | Quantity::Power
        | Quantity::Distance => significant(shown, 3),
        _ => fixed(shown, units.decimals(quantity)),
    }
}

/// An SI figure with its unit.
#[must_use]
pub fn with_unit(units: Units, quantity: Quantity, si: Option<f64>) -> String {
    let text = figure(units, quantity, si);
    match units.symbol(quantity) {
        "" => text,
        "°" => format!("{text}°"),
        unit => format!("{text}\u{a0}{unit}"),
    }
}

/// Reads what a person typed: decimal point or comma, a true minus, thousands apart by spaces, whole and
/// broken inches (`3 1/4`), and a unit of the quantity behind it. Gives SI.
///
/// # Errors
/// What is wrong with it, in a few words.
pub fn read(units: Units, quantity: Quantity, text: &str) -> Result<f64, String> {
    let text = text.trim().replace(MINUS, "-").replace([THIN_SPACE, '\u{a0}'], " ");
    let end = text.rfind(|c: char| c.is_ascii_digit() || c == '.' || c == ',').map_or(0, |i| i + 1);
    if text.is_empty() {
        return Err("a figure is needed".into());
    }
    let (digits, suffix) = (text[..end].trim(), text[end..].trim());
    let value = number(digits).ok_or_else(|| "not a number".to_string())?;
    let si = if suffix.is_empty() {
        units.si(quantity, value)
    } else {
        let worth =
            typed_unit_si(quantity, suffix).ok_or_else(|| format!("“{suffix}” is no unit for this"))?;
        value * worth
    };
    if si.is_finite() { Ok(si) } else { Err("too large".into()) }
}

fn number(text: &str) -> Option<f64> {
    if text.is_empty() || text.matches([',', '.']).count() > 1 {
        return None;
    }
    if text.contains('/') {
        return broken(text);
    }
    let text = text.replace(',', ".");
    let spaced = text.contains(' ');
    let joined = text.replace(' ', "");
    let ordinary = joined.chars().all(|c| c.is_ascii_digit() || "+-.eE".contains(c));
    if !ordinary || (spaced && !well_grouped(&text)) { None } else { joined.parse().ok() }
}

/// Whether spaces stand only before groups of three digits.
fn well_grouped(text: &str) -> bool {
    let whole = text.split('.').next().unwrap_or("");
    !text.contains(". ") && whole.split(' ').skip(1).all(|g| g.len() == 3) && !text.ends_with(' ')
}

/// `3 1/4` or `5/8`.
fn broken(text: &str) -> Option<f64> {
    let (sign, text) = text.strip_prefix('-').map_or((1.0, text), |rest| (-1.0, rest));
    let (whole, part) = text.rsplit_once(' ').unwrap_or(("0", text));
    let (above, below) = part.split_once('/')?;
    let natural = |s: &str| s.trim().parse::<u32>().ok().map(f64::from);
    let below = natural(below).filter(|b| *b > 0.0)?;
    Some(sign * (natural(whole)? + natural(above)? / below))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::units::LengthUnit;

    fn mm(text: &str) -> Result<f64, String> {
        read(Units::default(), Quantity::Length, text)
    }

    fn close(a: f64, b: f64) {
        assert!((a - b).abs() < 1e-12, "{a} is not {b}");
    }

    #[test]
    fn a_box_shows_a_true_minus_and_no_grouping() {
        assert_eq!(plain(-1234.5, 1), "−1234.5");
        assert_eq!(plain(-0.04, 1), "0.0");
        assert_eq!(plain(f64::NAN, 1), NO_FIGURE);
    }

    #[test]
    fn a_small_mass_keeps_three_figures() {
        let shown = [0.0, 0.0414, 0.25, 0.00312, 1.234, 620.0]
            .map(|kg| figure(Units::default(), Quantity::Mass, Some(kg)));
        assert_eq!(shown, ["0", "0.0414", "0.25", "0.00312", "1.23", "620"]);
    }

    #[test]
    fn comma_and_point_are_both_decimal() {
        close(mm("75,5").unwrap(), 0.0755);
        close(mm(" 75.5 ").unwrap(), 0.0755);
        close(mm("1 520,0").unwrap(), 1.52);
        close(mm("−3").unwrap(), -0.003);
        close(mm("1.2e3").unwrap(), 1.2);
    }

    #[test]
    fn inches_may_be_broken_and_units_may_be_typed() {
        let inches = Units { length: LengthUnit::Inch, ..Units::default() };
        close(read(inches, Quantity::Length, "3 1/4").unwrap(), 3.25 * 0.0254);
        close(read(inches, Quantity::Length, "5/8").unwrap(), 0.625 * 0.0254);
        close(mm("3 1/4 in").unwrap(), 3.25 * 0.0254);
        close(mm("2\"").unwrap(), 0.0508);
        close(read(inches, Quantity::Length, "83 mm").unwrap(), 0.083);
    }

    #[test]
    fn what_is_no_number_is_refused() {
        for text in [
            "",
            "abc",
            "1.234,5",
            "1,2,3",
            "12 34",
            "1/0",
            "--3",
            "NaN",
            "inf",
            "e",
            "1e",
            "5 furlongs",
            "3 1/",
        ] {
            assert!(mm(text).is_err(), "{text}");
        }
    }
}
