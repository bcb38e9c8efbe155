//! A station in one sentence.

use crate::chart::departure::word;
use crate::chart::number::{fixed, signed};
use spokeshave::result::{Note, StationResult};

/// What a station does, figure first.
#[must_use]
pub fn sentence(station: &StationResult) -> String {
    let noted = |note| station.notes.contains(&note);
    if noted(Note::NoLoadAtEnd) {
        return "At the end of the blade: no load.".to_owned();
    }
    if noted(Note::NoBalance) {
        return "No balance of momentum found here: no load is counted.".to_owned();
    }
    let Some(departure) = station.departure_deg.filter(|d| d.is_finite()) else {
        return match station.angle_of_attack_deg {
            Some(_) => "No best angle here: the section has none at this Reynolds number.".to_owned(),
            None => "No answer at this flight point.".to_owned(),
        };
    };
    let driven = if noted(Note::Windmilling) { " The air drives the blade here." } else { "" };
    format!("{}{driven}", judged(station, departure, noted(Note::Stalled)))
}

fn judged(station: &StationResult, departure: f64, stalled: bool) -> String {
    let amount = fixed(departure.abs(), 1);
    let size = format!("{amount}° {}", word(departure));
    let (low, high) = (station.band_low_deg, station.band_high_deg);
    if stalled {
        return format!("{size}, stalled.");
    }
    if amount == "0.0" {
        return "At its best angle.".to_owned();
    }
    match (low, high) {
        (Some(low), _) if departure < low => {
            format!("{size}; the working band starts at {}°.", signed(low, 1))
        }
        (_, Some(high)) if departure > high => {
            format!("{size}; the working band ends at {}°.", signed(high, 1))
        }
        (Some(_), Some(_)) => format!("{size}, inside the working band."),
        _ => format!("{size}."),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn station(departure_deg: f64) -> StationResult {
        StationResult {
            departure_deg: Some(departure_deg),
            angle_of_attack_deg: Some(1.0),
            band_low_deg: Some(-1.1),
            band_high_deg: Some(1.4),
            ..Default::default()
        }
    }

    #[test]
    fn says_where_the_station_is_against_its_band() {
        assert_eq!(sentence(&station(-0.9)), "0.9° slack, inside the working band.");
        assert_eq!(sentence(&station(-1.3)), "1.3° slack; the working band starts at −1.1°.");
        assert_eq!(sentence(&station(2.5)), "2.5° hard; the working band ends at +1.4°.");
        assert_eq!(sentence(&station(0.02)), "At its best angle.");
    }

    #[test]
    fn says_what_is_out_of_the_ordinary() {
        let noted = |d, note| StationResult { notes: vec![note], ..station(d) };
        assert_eq!(sentence(&noted(8.1, Note::Stalled)), "8.1° hard, stalled.");
        assert!(sentence(&noted(-7.0, Note::Windmilling)).ends_with("The air drives the blade here."));
        assert_eq!(sentence(&noted(0.0, Note::NoLoadAtEnd)), "At the end of the blade: no load.");
        assert!(sentence(&noted(0.0, Note::NoBalance)).starts_with("No balance"));
        assert_eq!(sentence(&StationResult::default()), "No answer at this flight point.");
    }
}
