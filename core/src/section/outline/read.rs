//! Reading a list of coordinates.
//!
//! One point `x y` on a line, divided by blanks, tabs, commas or semicolons; a name may stand on one line
//! before the first pair; text after `#` is skipped. Either one list round the section, from the trailing
//! edge over one side to the nose and back along the other, or two blocks divided by an empty line, each from
//! nose to trailing edge; the two blocks may be headed by a line with their two counts.

use super::error::{OutlineError, Place};

/// Largest text that is read, bytes.
pub const MAX_BYTES: usize = 1_000_000;

/// A list of points as read, before any check.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Listing {
    /// The name line, or nothing.
    pub(crate) name: String,
    /// Points in the order of one list round the section.
    pub(crate) points: Vec<[f64; 2]>,
    /// Where each came from.
    pub(crate) places: Vec<Place>,
}

/// A pair with the line it stands on.
type Row = ([f64; 2], usize);

/// Reads a list of coordinates.
///
/// # Errors
/// [`OutlineError::TooLarge`], [`OutlineError::NotAPair`], [`OutlineError::WrongCount`].
pub(crate) fn read(text: &str) -> Result<Listing, OutlineError> {
    if text.len() > MAX_BYTES {
        return Err(OutlineError::TooLarge { bytes: text.len() });
    }
    let (name, mut blocks) = blocks(text)?;
    blocks.retain(|block| !block.is_empty());
    let announced = take_counts(&mut blocks);
    if let Some((counts, line)) = announced {
        split_by_count(&mut blocks, counts, line)?;
    }
    let rows = join(blocks);
    Ok(Listing {
        name,
        points: rows.iter().map(|row| row.0).collect(),
        places: rows.iter().enumerate().map(|(k, row)| Place { point: k + 1, line: Some(row.1) }).collect(),
    })
}

/// The name and the blocks of pairs that empty lines divide.
fn blocks(text: &str) -> Result<(String, Vec<Vec<Row>>), OutlineError> {
    let mut name = String::new();
    let mut blocks: Vec<Vec<Row>> = vec![Vec::new()];
    let text = text.strip_prefix('\u{feff}').unwrap_or(text);
    for (index, raw) in text.lines().enumerate() {
        let line = raw.split('#').next().unwrap_or_default().trim();
        let begun = blocks.iter().any(|block| !block.is_empty());
        if line.is_empty() {
            if raw.trim().is_empty() && begun {
                blocks.push(Vec::new());
            }
        } else if let Some(pair) = pair(line) {
            blocks[..].last_mut().into_iter().for_each(|block| block.push((pair, index + 1)));
        } else if begun || !name.is_empty() || figures(line) {
            let text = line.chars().take(40).collect();
            return Err(OutlineError::NotAPair { line: index + 1, text });
        } else {
            name = line.chars().take(80).collect();
        }
    }
    Ok((name, blocks))
}

/// Whether a line is nothing but figures with a decimal point among them: part of the list, and no name.
fn figures(line: &str) -> bool {
    line.contains('.')
        && line.chars().all(|c| c.is_ascii_digit() || c.is_whitespace() || ".,;+-eE".contains(c))
}

/// Two numbers and nothing else.
fn pair(line: &str) -> Option<[f64; 2]> {
    let mut words = line.split(|c: char| c.is_whitespace() || c == ',' || c == ';').filter(|w| !w.is_empty());
    let pair = [words.next()?.parse().ok()?, words.next()?.parse().ok()?];
    words.next().is_none().then_some(pair)
}

/// Takes a first row that can only be two counts: whole numbers of at least three.
fn take_counts(blocks: &mut Vec<Vec<Row>>) -> Option<([usize; 2], usize)> {
    let total: usize = blocks.iter().map(Vec::len).sum();
    let (first, line) = *blocks.first()?.first()?;
    let whole = |v: f64| v.fract() == 0.0 && (3.0..1e6).contains(&v);
    // Lists in other units than the chord also hold whole numbers: a count must be near the length of the
    // list.
    let near = (first[0] + first[1] - (total as f64 - 1.0)).abs() <= 3.0;
    if !(whole(first[0]) && whole(first[1]) && near) {
        return None;
    }
    blocks[0].remove(0);
    blocks.retain(|block| !block.is_empty());
    Some(([first[0] as usize, first[1] as usize], line))
}

/// Divides a list in one piece by its counts, and checks the counts.
fn split_by_count(blocks: &mut Vec<Vec<Row>>, counts: [usize; 2], line: usize) -> Result<(), OutlineError> {
    let rows: Vec<Row> = blocks.iter().flatten().copied().collect();
    let announced = counts[0] + counts[1];
    if rows.len() != announced {
        return Err(OutlineError::WrongCount { line, announced, found: rows.len() });
    }
    *blocks = vec![rows[..counts[0]].to_vec(), rows[counts[0]..].to_vec()];
    Ok(())
}

/// One list round the section from one or two blocks; two blocks that run nose to trailing edge meet at the
/// nose.
fn join(mut blocks: Vec<Vec<Row>>) -> Vec<Row> {
    let outward = |block: &Vec<Row>| match (block.first(), block.last()) {
        (Some(a), Some(b)) => block.len() > 1 && a.0[0] < b.0[0],
        _ => false,
    };
    if blocks.len() == 2 && blocks.iter().all(outward) {
        let second = blocks.remove(1);
        let mut rows: Vec<Row> = blocks.remove(0).into_iter().rev().collect();
        let same_nose = rows.last().map(|row| row.0) == second.first().map(|row| row.0);
        rows.extend(second.into_iter().skip(usize::from(same_nose)));
        return rows;
    }
    blocks.into_iter().flatten().collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_name_and_commas_and_blanks_are_read() {
        let listing = read("A section\n1.0, 0.0\n0.5\t0.1\n 0 0 \n").expect("reads");
        assert_eq!(listing.name, "A section");
        assert_eq!(listing.points, vec![[1.0, 0.0], [0.5, 0.1], [0.0, 0.0]]);
        assert_eq!(listing.places[1].line, Some(3));
    }

    #[test]
    fn two_blocks_become_one_list_round() {
        let counted = "x\n3. 3.\n\n0 0\n0.5 0.1\n1 0\n\n0 0\n0.5 -0.1\n1 0\n";
        let listing = read(counted).expect("reads");
        assert_eq!(listing.points, vec![[1.0, 0.0], [0.5, 0.1], [0.0, 0.0], [0.5, -0.1], [1.0, 0.0]]);
        let plain = read("0 0\n0.5 0.1\n1 0\n\n0 0\n0.5 -0.1\n1 0\n").expect("reads");
        assert_eq!(plain.points, listing.points);
    }

    #[test]
    fn a_stray_word_is_named_with_its_line() {
        let error = read("1 0\n0.5 0.1\nnonsense here\n").expect_err("refused");
        assert_eq!(error, OutlineError::NotAPair { line: 3, text: "nonsense here".into() });
        let error = read("A section\n1.0 x\n0.5 0.1\n0 0\n").expect_err("one name line");
        assert_eq!(error, OutlineError::NotAPair { line: 2, text: "1.0 x".into() });
        for garbled in ["1.0\n0.5 0.1\n", "1.0 0.0 0.2\n0.5 0.1\n"] {
            assert!(matches!(read(garbled), Err(OutlineError::NotAPair { line: 1, .. })), "{garbled}");
        }
        assert_eq!(read("2412\n1 0\n0 0\n").expect("a name of figures").name, "2412");
        assert!(read("9 9\n0 0\n1 0\n").is_ok(), "whole numbers far from the length are points");
    }
}
