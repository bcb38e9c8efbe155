//! Whether a committed text still says what is worked out now: words by bytes, numbers to within what
//! machines and compilers make of their last place.

/// A text in pieces: numbers, and what stands between them.
#[derive(Debug, PartialEq)]
enum Piece<'a> {
    Words(&'a str),
    Number(&'a str),
}

/// By how many units of the last place two numbers may differ.
const UNITS: f64 = 2.5;

/// The first lines that differ, old beside new; nothing where the old text is still true. Whole numbers are
/// counts and must be the same, but where they are `coordinates` of a picture.
#[must_use]
pub fn differences(old: &str, new: &str, coordinates: bool) -> Vec<String> {
    let (old, new): (Vec<&str>, Vec<&str>) = (old.lines().collect(), new.lines().collect());
    let at = |lines: &[&str], i: usize| lines.get(i).map_or("(nothing)", |line| *line).to_owned();
    let rows = old.len().max(new.len());
    let differ = |i: &usize| match (old.get(*i), new.get(*i)) {
        (Some(a), Some(b)) => !same(a, b, coordinates),
        _ => true,
    };
    let told = |i| format!("line {}\n  was {}\n  is  {}", i + 1, at(&old, i), at(&new, i));
    (0..rows).filter(differ).take(5).map(told).collect()
}

fn same(old: &str, new: &str, coordinates: bool) -> bool {
    let (old, new) = (pieces(old), pieces(new));
    let near = |a: &str, b: &str| {
        let counts = !coordinates && !a.contains(['.', 'e']) && !b.contains(['.', 'e']);
        match (a.parse::<f64>(), b.parse::<f64>()) {
            (Ok(x), Ok(y)) if !counts => (x - y).abs() <= UNITS * last_place(a).max(last_place(b)),
            _ => a == b,
        }
    };
    let alike = |(a, b): (&Piece, &Piece)| match (a, b) {
        (Piece::Number(a), Piece::Number(b)) => near(a, b),
        (a, b) => a == b,
    };
    old.len() == new.len() && old.iter().zip(&new).all(alike)
}

/// One unit of the last place of a number as written.
fn last_place(number: &str) -> f64 {
    let (digits, power) = number.split_once('e').unwrap_or((number, "0"));
    let places = digits.split_once('.').map_or(0, |(_, behind)| i32::try_from(behind.len()).unwrap_or(0));
    10_f64.powi(power.parse::<i32>().unwrap_or(0) - places)
}

fn pieces(line: &str) -> Vec<Piece<'_>> {
    let mut pieces = Vec::new();
    let mut rest = line;
    while !rest.is_empty() {
        let start = rest.find(|c: char| c.is_ascii_digit()).unwrap_or(rest.len());
        // A sign belongs to the number where no word ends before it.
        let signed = start > 0 && rest.as_bytes()[start - 1] == b'-';
        let word_before = start > 1 && rest.as_bytes()[start - 2].is_ascii_alphanumeric();
        let start = if signed && !word_before { start - 1 } else { start };
        let (words, number) = rest.split_at(start);
        let end = number_end(number);
        pieces.push(Piece::Words(words));
        if end > 0 {
            pieces.push(Piece::Number(&number[..end]));
        }
        rest = &number[end..];
    }
    pieces
}

/// Where the number at the start of a text ends: `-1.5e-3`.
fn number_end(text: &str) -> usize {
    let bytes = text.as_bytes();
    let digits = |from: usize| from + bytes[from..].iter().take_while(|b| b.is_ascii_digit()).count();
    let sign = |from: usize| from + usize::from(bytes.get(from) == Some(&b'-'));
    let mut end = digits(sign(0));
    if bytes.get(end) == Some(&b'.') && digits(end + 1) > end + 1 {
        end = digits(end + 1);
    }
    if bytes.get(end) == Some(&b'e') && digits(sign(end + 1)) > sign(end + 1) {
        end = digits(sign(end + 1));
    }
    end
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn last_places_may_differ_and_nothing_else() {
        let same = |a, b| differences(a, b, false).is_empty();
        assert!(same("| x | 1.234 | -0.001 |", "| x | 1.236 | 0.001 |"));
        assert!(same("1.78938e-5", "1.78937e-5") && !same("1.7e-5", "1.7e-4"));
        assert!(!same("| x | 1.234 |", "| x | 1.244 |") && !same("| x | 1.234 |", "| y | 1.234 |"));
        assert!(!same("worst of 13", "worst of 14") && differences("13", "14", true).is_empty());
        assert!(!same("naca-44", "naca-45") && !same("a\nb", "a") && !same("a 1.5", "a 1.5 b"));
    }
}
