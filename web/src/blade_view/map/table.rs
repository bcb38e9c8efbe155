//! The map's figures as a table.

use crate::chart::figure::Table;
use crate::chart::number::signed_or_none;
use crate::chart::unit::Unit;
use spokeshave::rotor::DepartureMap;
use yew::AttrValue;

/// Departure at about a dozen radii, tip first, and nine speeds.
pub(super) fn table(map: &DepartureMap, length: &Unit, speed: &Unit) -> Table {
    let (rows, columns) = (picked(map.radii_m.len(), 12), picked(map.airspeeds_m_s.len(), 9));
    let heads = columns.iter().map(|&c| AttrValue::from(speed.text(map.airspeeds_m_s[c])));
    let row = |&r: &usize| {
        let cells = columns.iter().map(|&c| {
            let cell = &map.cells[[r, c]];
            let stalled = if cell.past_stall_deg.is_some_and(|p| p > 0.0) { " stalled" } else { "" };
            AttrValue::from(signed_or_none(cell.departure_deg, 1) + stalled)
        });
        std::iter::once(AttrValue::from(length.short_figure(map.radii_m[r]))).chain(cells).collect()
    };
    Table {
        columns: std::iter::once(AttrValue::from(format!("radius, {}", length.name))).chain(heads).collect(),
        rows: rows.iter().rev().map(row).collect(),
    }
}

/// At most `most` of `count` places, evenly, first and last among them.
fn picked(count: usize, most: usize) -> Vec<usize> {
    if count <= most {
        return (0..count).collect();
    }
    (0..most).map(|i| i * (count - 1) / (most - 1)).collect()
}

#[cfg(test)]
mod tests {
    use super::super::frame::tests::sample;
    use super::*;

    #[test]
    fn the_table_starts_at_the_tip_and_names_its_units() {
        let table = table(&sample(), &Unit::MM, &Unit::KM_H);
        assert_eq!(table.columns[0], "radius, mm");
        assert_eq!((table.columns.len(), table.rows.len()), (10, 12));
        assert_eq!(table.rows[0][0], "675");
        assert_eq!(table.rows[11][1], "+14.0 stalled");
        assert_eq!(table.rows[8][5], "–");
    }

    #[test]
    fn picks_hold_both_ends() {
        assert_eq!(picked(60, 4), [0, 19, 39, 59]);
        assert_eq!(picked(2, 4), [0, 1]);
    }
}
