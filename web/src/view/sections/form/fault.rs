//! What the core has against a plan of polars, said at the box it is about and in the box's unit.

use spokeshave::section::make::MakeError;
use spokeshave::section::outline::OutlineError;

use super::Place;

/// The box that an error of the plan is about.
pub(super) fn blamed(error: &str) -> Option<Place> {
    let starts = [
        ("first angle", Place::First),
        ("last angle", Place::Last),
        ("step of", Place::Step),
        ("count of angles", Place::Step),
        ("count of Reynolds", Place::Reynolds),
        ("count of polars", Place::Reynolds),
        ("Reynolds", Place::Reynolds),
        ("thickness of the trailing", Place::Edge),
        ("trailing edge", Place::Edge),
        ("thickness ratio", Place::Thickness),
        ("n at", Place::Amplification),
        ("trip on the upper", Place::TripUpper),
        ("trip on the lower", Place::TripLower),
    ];
    starts.iter().find(|(start, _)| error.starts_with(start)).map(|(_, place)| *place)
}

/// The core speaks of shares of the chord, the boxes of per cent.
pub(super) fn said(error: &MakeError) -> String {
    // An absurd share stays as it is; any other has three decimals of a per cent.
    let percent = |share: f64| if share.abs() < 1e7 { (1e5 * share).round() / 1e3 } else { 100.0 * share };
    let text = match error {
        MakeError::Order { what: what @ "thickness ratios", before, after } => {
            let [before, after] = [before, after].map(|t| percent(*t));
            MakeError::Order { what, before, after }.to_string()
        }
        other => match share(other) {
            Some((what, bounds)) => {
                let short = |p: f64| if p.abs() < 1e9 { p.to_string() } else { format!("{p:e}") };
                let [found, least, most] = bounds.map(percent).map(short);
                format!("{what} {found} %: {least} to {most} % is allowed")
            }
            None => other.to_string(),
        },
    };
    format!("{}.", crate::form::capital(&text))
}

/// A share of the chord that is out of its range: what, its value, the least and the most.
fn share(error: &MakeError) -> Option<(&'static str, [f64; 3])> {
    match *error {
        MakeError::Request { what, found, least, most }
            if ["thickness", "trip"].iter().any(|start| what.starts_with(start)) =>
        {
            Some((what, [found, least, most]))
        }
        MakeError::Outline(OutlineError::Figure { what, found, least, most }) => {
            Some((what, [found, least, most]))
        }
        MakeError::Outline(OutlineError::Thickness { found, least, most }) => {
            Some(("thickness ratio", [found, least, most]))
        }
        _ => None,
    }
}
