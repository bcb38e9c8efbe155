//! Numbers as the page writes them: true minus, thin spaces by the thousand, signs where a sign matters.

/// The true minus sign.
pub const MINUS: char = '\u{2212}';
/// A thin space at which no line is broken.
pub const THIN_SPACE: char = '\u{202f}';
/// Written where there is no figure.
pub const NONE: &str = "–";

/// With a fixed number of decimals: `−1 215.0`.
#[must_use]
pub fn fixed(value: f64, decimals: usize) -> String {
    written(value, decimals, "")
}

/// With its sign always: `+0.6`, `−6.0`, and a plain `0.0` for what rounds to nothing.
#[must_use]
pub fn signed(value: f64, decimals: usize) -> String {
    written(value, decimals, "+")
}

/// As [`fixed`], or a dash where there is no figure.
#[must_use]
pub fn fixed_or_none(value: Option<f64>, decimals: usize) -> String {
    value.map_or_else(|| NONE.to_owned(), |v| fixed(v, decimals))
}

/// As [`signed`], or a dash where there is no figure.
#[must_use]
pub fn signed_or_none(value: Option<f64>, decimals: usize) -> String {
    value.map_or_else(|| NONE.to_owned(), |v| signed(v, decimals))
}

/// To so many significant figures and never more than needed: `798 000`, `0.0155`.
#[must_use]
pub fn significant(value: f64, figures: i32) -> String {
    if value == 0.0 || !value.is_finite() {
        return fixed(value, 0);
    }
    let place = figures - 1 - value.abs().log10().floor() as i32;
    let unit = 10_f64.powi(-place);
    fixed((value / unit).round() * unit, place.max(0) as usize)
}

fn written(value: f64, decimals: usize, plus: &str) -> String {
    if !value.is_finite() {
        return NONE.to_owned();
    }
    let plain = format!("{:.decimals$}", value.abs());
    let nothing = plain.bytes().all(|b| matches!(b, b'0' | b'.'));
    let (whole, rest) = plain.split_at(plain.find('.').unwrap_or(plain.len()));
    let mut text = String::with_capacity(plain.len() + 8);
    match (nothing, value < 0.0) {
        (true, _) => {}
        (false, true) => text.push(MINUS),
        (false, false) => text.push_str(plus),
    }
    for (i, digit) in whole.chars().enumerate() {
        if i > 0 && (whole.len() - i) % 3 == 0 {
            text.push(THIN_SPACE);
        }
        text.push(digit);
    }
    text + rest
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn carry_a_true_minus_and_thin_spaces() {
        assert_eq!(fixed(-1215.04, 1), "−1\u{202f}215.0");
        assert_eq!(fixed(1_234_567.0, 0), "1\u{202f}234\u{202f}567");
        assert_eq!(fixed(999.4, 0), "999");
        assert_eq!(fixed(-0.04, 1), "0.0");
    }

    #[test]
    fn are_signed_where_the_sign_matters() {
        assert_eq!((signed(0.56, 1), signed(-6.0, 1)), ("+0.6".into(), "−6.0".into()));
        assert_eq!(signed(0.04, 1), "0.0");
        assert_eq!(signed_or_none(None, 1), NONE);
    }

    #[test]
    fn keep_significant_figures() {
        assert_eq!(significant(798_412.0, 3), "798\u{202f}000");
        assert_eq!(significant(0.015_51, 3), "0.0155");
        assert_eq!(significant(0.0, 3), "0");
    }

    #[test]
    fn never_say_nan() {
        for bad in [f64::NAN, f64::INFINITY, f64::NEG_INFINITY] {
            assert_eq!(
                (fixed(bad, 1), signed(bad, 1), significant(bad, 3)),
                (NONE.into(), NONE.into(), NONE.into())
            );
        }
    }
}
