//! One polar as measured or computed: lift and drag against angle of attack at one Reynolds number.

use serde::{Deserialize, Serialize};
use thiserror::Error;

/// One row of a polar.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct PolarPoint {
    /// Angle of attack to the chord line, degrees, −180 to 180.
    pub alpha_deg: f64,
    /// Lift coefficient.
    pub cl: f64,
    /// Drag coefficient, above zero.
    pub cd: f64,
    /// Moment coefficient about the quarter chord, nose up positive; kept where it is known, nothing here is
    /// computed from it.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub cm: Option<f64>,
}

/// Lift and drag of one section at one Reynolds number, by rising angle of attack.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "cli", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Polar {
    /// Chord Reynolds number; may be left out when it is the only polar of its thickness.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub reynolds: Option<f64>,
    /// Mach number the polar holds for; 0 for incompressible flow.
    #[serde(default)]
    pub mach: f64,
    /// Thickness over chord, for a family of sections; left out when the polars hold for one section only.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub thickness_ratio: Option<f64>,
    /// The rows, by strictly rising angle.
    pub points: Vec<PolarPoint>,
}

/// Fewest rows a polar may have.
pub const FEWEST_POINTS: usize = 5;
/// Most rows a polar may have.
pub const MOST_POINTS: usize = 4_000;
/// Most polars a section may have.
pub const MOST_POLARS: usize = 400;

/// What is wrong with a section's tables. `place` is a path below the section, such as
/// `polars[2].points[7].cd`.
#[derive(Clone, Debug, Error, PartialEq)]
#[error("{place}: {found}; allowed is {allowed}")]
pub struct TableError {
    /// Path below the section.
    pub place: String,
    /// What was found.
    pub found: String,
    /// What is allowed.
    pub allowed: String,
}

impl TableError {
    pub(super) fn new(
        place: impl Into<String>,
        found: impl std::fmt::Display,
        allowed: impl Into<String>,
    ) -> Self {
        Self { place: place.into(), found: found.to_string(), allowed: allowed.into() }
    }
}

/// Checks all polars of one section.
///
/// # Errors
/// The first table or row that is empty, not finite, out of order or out of range, by path.
pub(crate) fn check_polars(polars: &[Polar]) -> Result<(), TableError> {
    if polars.is_empty() || polars.len() > MOST_POLARS {
        return Err(TableError::new("polars", polars.len(), format!("1 to {MOST_POLARS} polars")));
    }
    for (i, polar) in polars.iter().enumerate() {
        check_polar(i, polar)?;
    }
    check_family(polars)
}

fn check_polar(i: usize, polar: &Polar) -> Result<(), TableError> {
    let at = |name: &str| format!("polars[{i}].{name}");
    if let Some(re) = polar.reynolds
        && !(100.0..=1e9).contains(&re)
    {
        return Err(TableError::new(at("reynolds"), re, "100 to 1e9"));
    }
    if !(0.0..0.95).contains(&polar.mach) {
        return Err(TableError::new(at("mach"), polar.mach, "0 to below 0.95"));
    }
    if let Some(t) = polar.thickness_ratio
        && !(0.005..=1.0).contains(&t)
    {
        return Err(TableError::new(at("thickness_ratio"), t, "0.005 to 1"));
    }
    let n = polar.points.len();
    if !(FEWEST_POINTS..=MOST_POINTS).contains(&n) {
        return Err(TableError::new(
            at("points"),
            format!("{n} rows"),
            format!("{FEWEST_POINTS} to {MOST_POINTS} rows"),
        ));
    }
    polar.points.iter().enumerate().try_for_each(|(j, p)| check_point(&at(&format!("points[{j}]")), p))?;
    for (j, pair) in polar.points.windows(2).enumerate() {
        if pair[1].alpha_deg - pair[0].alpha_deg < 1e-6 {
            let place = at(&format!("points[{}].alpha_deg", j + 1));
            let (a, b) = (pair[1].alpha_deg, pair[0].alpha_deg);
            return Err(TableError::new(place, a, format!("above {b}, the row before")));
        }
    }
    Ok(())
}

fn check_point(at: &str, p: &PolarPoint) -> Result<(), TableError> {
    let rules = [
        ("alpha_deg", p.alpha_deg, (-180.0..=180.0).contains(&p.alpha_deg), "−180 to 180"),
        ("cl", p.cl, p.cl.abs() <= 10.0, "−10 to 10"),
        ("cd", p.cd, p.cd > 0.0 && p.cd <= 10.0, "above 0, up to 10"),
        ("cm", p.cm.unwrap_or(0.0), p.cm.is_none_or(|cm| cm.abs() <= 10.0), "−10 to 10"),
    ];
    match rules.iter().find(|(_, _, ok, _)| !ok) {
        Some((name, value, _, allowed)) => Err(TableError::new(format!("{at}.{name}"), value, *allowed)),
        None => Ok(()),
    }
}

fn check_family(polars: &[Polar]) -> Result<(), TableError> {
    for (i, a) in polars.iter().enumerate() {
        if a.thickness_ratio.is_some() != polars[0].thickness_ratio.is_some() {
            let place = format!("polars[{i}].thickness_ratio");
            return Err(TableError::new(place, "given for some polars only", "all or none"));
        }
        for (j, b) in polars.iter().enumerate().skip(i + 1) {
            if a.thickness_ratio == b.thickness_ratio
                && (a.reynolds == b.reynolds || a.reynolds.is_none() || b.reynolds.is_none())
            {
                let place = format!("polars[{j}].reynolds");
                let found = format!("the same as polars[{i}], or missing");
                return Err(TableError::new(
                    place,
                    found,
                    "another Reynolds number for each polar of a thickness",
                ));
            }
        }
    }
    Ok(())
}

#[cfg(test)]
mod tests {
    use super::*;

    /// The last value that is allowed and the first that is not, as the messages say them, with their path.
    #[test]
    fn limits_lie_where_the_messages_say() {
        type Put = fn(&mut Polar, f64);

        let points = (0..5)
            .map(|k| PolarPoint { alpha_deg: f64::from(k), cl: 0.1, cd: 0.01, cm: Some(0.0) })
            .collect();
        let fair = Polar { reynolds: Some(1e5), mach: 0.0, thickness_ratio: Some(0.1), points };
        let cases: [(Put, &str, [f64; 2], [f64; 2]); 6] = [
            (|p, v| p.points[4].cm = Some(v), "polars[0].points[4].cm", [-10.0, 10.0], [-10.01, 10.01]),
            (|p, v| p.points[4].cl = v, "polars[0].points[4].cl", [-10.0, 10.0], [-10.01, 10.01]),
            (|p, v| p.points[4].cd = v, "polars[0].points[4].cd", [1e-9, 10.0], [0.0, 10.01]),
            (|p, v| p.thickness_ratio = Some(v), "polars[0].thickness_ratio", [0.005, 1.0], [0.0049, 1.01]),
            (|p, v| p.reynolds = Some(v), "polars[0].reynolds", [100.0, 1e9], [99.0, 1.01e9]),
            (|p, v| p.mach = v, "polars[0].mach", [0.0, 0.94], [-0.01, 0.95]),
        ];
        for (put, place, fits, not) in cases {
            let checked = |v: f64| {
                let mut polar = fair.clone();
                put(&mut polar, v);
                check_polars(&[polar])
            };
            assert!(fits.into_iter().all(|v| checked(v).is_ok()), "{place}");
            assert!(not.into_iter().all(|v| checked(v).is_err_and(|e| e.place == place)), "{place}");
        }
    }
}
