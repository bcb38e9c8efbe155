//! Flight points side by side with several blades.

use spokeshave::result::Brief;

use crate::table::{figure, table};

/// A table of briefs, each with the word for its blade.
pub(crate) fn briefs<'b>(rows: impl Iterator<Item = (&'b Brief, &'b str)>) -> String {
    let header =
        ["flight point", "blade", "km/h", "rpm", "thrust N", "power kW", "efficiency", "climb m/s", ""];
    table(&header, rows.map(|(brief, blade)| row(brief, blade)).collect())
}

fn row(b: &Brief, blade: &str) -> Vec<String> {
    let words = match (b.held_at_limit, b.rpm) {
        (true, _) => "throttled back to the limit rpm",
        (false, None) => b.state.sentence(),
        (false, Some(_)) => "",
    };
    vec![
        b.name.clone(),
        blade.into(),
        figure(b.airspeed_m_s.map(|v| 3.6 * v), 1),
        figure(b.rpm, 0),
        figure(b.thrust_n, 1),
        figure(b.power_w.map(|p| p / 1e3), 3),
        figure(b.efficiency, 4),
        figure(b.rate_of_climb_m_s, 2),
        words.into(),
    ]
}
