//! The table of rooms as it is written.

/// A row: what stands in its first and in its last column.
#[derive(Debug, PartialEq, Eq)]
pub(crate) struct Row {
    /// The rooms named in the first column.
    pub(crate) names: Vec<String>,
    /// The rooms named in the last column.
    pub(crate) may_use: Vec<String>,
    /// Whether the last column can be read: it names rooms, or is a dash.
    pub(crate) clear: bool,
}

/// The rows of the first table below a heading.
pub(crate) fn rows(text: &str, heading: &str) -> Vec<Row> {
    let below = text.lines().skip_while(|line| line.strip_prefix("## ") != Some(heading));
    let table = below.skip_while(|line| !line.starts_with('|')).take_while(|line| line.starts_with('|'));
    table.skip(2).map(row).collect()
}

fn row(line: &str) -> Row {
    let cells: Vec<&str> = line.trim().trim_matches('|').split('|').collect();
    let (first, last) = (cells[0], cells[cells.len() - 1].trim());
    let may_use = named(last);
    Row { names: named(first), clear: last == "–" || !may_use.is_empty(), may_use }
}

/// What stands in backticks.
fn named(cell: &str) -> Vec<String> {
    cell.split('`').skip(1).step_by(2).map(String::from).collect()
}

#[test]
fn a_table_is_read_below_its_heading() {
    let text = "## Other\n\n| a | b | c |\n| - | - | - |\n| `x` | – | – |\n\n## Rooms\n\nWords.\n\n\
        | module | holds | may use |\n| --- | --- | --- |\n| `fit` | `settle` | `rig`, `job` (why) |\n\
        | `air` | – | – |\n| `rig`, `job` | – | all |\n\nEnd\n";
    let owned = |names: &[&str]| names.iter().map(ToString::to_string).collect();
    let row = |names, may_use, clear| Row { names: owned(names), may_use: owned(may_use), clear };
    let wanted =
        [row(&["fit"], &["rig", "job"], true), row(&["air"], &[], true), row(&["rig", "job"], &[], false)];
    assert_eq!(rows(text, "Rooms"), wanted);
    assert!(rows(text, "No such").is_empty());
}
