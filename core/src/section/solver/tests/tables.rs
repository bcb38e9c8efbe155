//! The tables that come with the program are what this solver gives: sections with open, sharp and thick edges, slow
//! and fast, in quiet and in disturbed air.

use super::polar;
use crate::section::outline::{Outline, OutlineError, arc_back, clark_y, naca_16_series, raf_6};
use crate::section::solver::{Settings, State};

const CLARK_Y: &str = include_str!("../../../../../airfoils/clark-y/polars.csv");
const RAF_6: &str = include_str!("../../../../../airfoils/raf-6/polars.csv");
const ARC_BACK: &str = include_str!("../../../../../airfoils/arc-back/polars.csv");
const NACA_16: &str = include_str!("../../../../../airfoils/naca-16/polars.csv");

/// The row of a table for an angle: cl, cd, cm and the two places of transition.
fn row(table: &str, head: &str, alpha_deg: f64) -> [f64; 5] {
    let start = format!("{head},{alpha_deg},");
    let line = table.lines().find(|line| line.starts_with(&start)).expect("a row");
    let figures: Vec<f64> =
        line[start.len()..].split(',').take(5).map(|v| v.parse().expect("a figure")).collect();
    figures.try_into().expect("five")
}

/// Every second degree, each angle started from another neighbour than in the table, which went by halves.
#[test]
fn shipped_tables_are_what_the_solver_gives() {
    type Draw = fn() -> Result<Outline, OutlineError>;
    let cases: [(&str, Draw, f64, f64, f64); 4] = [
        (CLARK_Y, clark_y, 0.12, 3e6, 4.0),
        (RAF_6, raf_6, 0.1, 220e3, 9.0),
        (ARC_BACK, || arc_back(0.12, 0.10), 0.1, 750e3, 9.0),
        (NACA_16, || naca_16_series(0.5, 0.12), 0.18, 400e3, 9.0),
    ];
    let angles = [-2.0, 0.0, 2.0, 4.0, 6.0, 8.0];
    for (table, draw, thickness, reynolds, n_crit) in cases {
        let section = draw().expect("drawn").scaled_to(thickness).expect("scaled");
        let head = format!("{thickness},{reynolds},0,{n_crit}");
        for point in polar(&section, &Settings::free(reynolds, n_crit), &angles) {
            assert_eq!(point.state, State::Converged, "{head} {point:?}");
            let expected = row(table, &head, point.alpha_deg);
            let found = [point.cl, point.cd, point.cm, point.xtr_upper, point.xtr_lower];
            // The tables hold four, five, four and three decimals; the solution is held to 1e-5 of the speeds.
            for (k, allowed) in [2e-4, 2e-5, 2e-4, 2e-3, 2e-3].into_iter().enumerate() {
                assert!(
                    (found[k] - expected[k]).abs() <= allowed,
                    "{head} {}: {found:?} {expected:?}",
                    point.alpha_deg
                );
            }
        }
    }
}

/// The last figure that is allowed and the first that is not.
#[test]
fn limits_of_the_settings_lie_where_the_messages_say() {
    type Put = fn(&mut Settings, f64);

    let base = Settings::free(1e6, 9.0);
    let cases: [(Put, [f64; 2], [f64; 2]); 4] = [
        (|s, v| s.mach = v, [0.0, 0.6], [-0.01, 0.61]),
        (|s, v| s.n_crit = v, [1.0, 14.0], [0.99, 14.1]),
        (|s, v| s.trip_lower = Some(v), [0.0, 1.0], [-0.01, 1.01]),
        (|s, v| s.reynolds = v, [1e4, 1e8], [9.9e3, 1.01e8]),
    ];
    for (put, fits, not) in cases {
        let checked = |v: f64| {
            let mut settings = base.clone();
            put(&mut settings, v);
            settings.check()
        };
        assert!(fits.into_iter().all(|v| checked(v).is_ok()), "{fits:?}");
        assert!(not.into_iter().all(|v| checked(v).is_err()), "{not:?}");
    }
}
