//! Numbers and tables for people.

use comfy_table::{CellAlignment, ContentArrangement, Table};

/// A table whose columns stand to the right but for the first and one without a heading, which is for words.
pub(crate) fn table(header: &[&str], rows: Vec<Vec<String>>) -> String {
    let mut table = Table::new();
    table.load_style(comfy_table::presets::NOTHING).set_content_arrangement(ContentArrangement::Disabled);
    table.set_header(header.iter().map(ToString::to_string));
    for row in rows {
        table.add_row(row);
    }
    for (column, _) in table.column_iter_mut().zip(header).skip(1).filter(|(_, head)| !head.is_empty()) {
        column.set_cell_alignment(CellAlignment::Right);
    }
    table.lines().map(|l| l.trim_end().to_string()).collect::<Vec<_>>().join("\n")
}

/// A figure, or a dash where there is none.
pub(crate) fn figure(value: Option<f64>, decimals: usize) -> String {
    value.map_or_else(|| "–".into(), |v| format!("{:.decimals$}", clean(v, decimals)).replace('-', "−"))
}

/// A figure with its sign always shown.
pub(crate) fn signed(value: Option<f64>, decimals: usize) -> String {
    value.map_or_else(|| "–".into(), |v| format!("{:+.decimals$}", clean(v, decimals)).replace('-', "−"))
}

/// No minus before a zero.
fn clean(v: f64, decimals: usize) -> f64 {
    let unit = 10f64.powi(i32::try_from(decimals).unwrap_or(0));
    let rounded = (v * unit).round() / unit;
    if rounded == 0.0 { 0.0 } else { rounded }
}

/// A figure for CSV: full precision, empty where there is none.
pub(crate) fn csv_figure(value: Option<f64>) -> String {
    value.map_or_else(String::new, |v| v.to_string())
}

/// The word by which the JSON knows a state or a note.
pub(crate) fn word(value: &impl serde::Serialize) -> String {
    serde_json::to_value(value).ok().and_then(|v| v.as_str().map(String::from)).unwrap_or_default()
}
