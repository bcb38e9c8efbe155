//! The figures of the speed range that decide.

use spokeshave::air::HIGHEST_M;
use spokeshave::result::{Ceilings, Envelope, Mark, TakeOff};
use yew::prelude::*;

use crate::number::{NO_FIGURE, figure, fixed, with_unit};
use crate::units::{Quantity, Units};
use crate::view::verdict::Cell;

/// Properties of [`Figures`].
#[derive(Properties, PartialEq)]
pub(super) struct FiguresProps {
    pub(super) envelope: Envelope,
    /// How many propellers share the thrust told.
    pub(super) propellers: f64,
    pub(super) take_off: Option<TakeOff>,
    pub(super) ceilings: Option<Ceilings>,
    pub(super) units: Units,
}

/// The figures in columns.
#[component]
pub(super) fn Figures(props: &FiguresProps) -> Html {
    let cells = cells(props).into_iter().map(Cell::item);
    html! { <ul class="verdict fit-figures">{ for cells }</ul> }
}

fn cells(props: &FiguresProps) -> Vec<Cell> {
    let (envelope, units) = (&props.envelope, props.units);
    let marks = &envelope.marks;
    let standing = envelope.standing.as_ref();
    let aeroplane = envelope.speeds.is_some();
    let flight = [
        marked(units, "Best climb", Quantity::Climb, marks.best_rate_of_climb),
        marked(units, "Steepest climb", Quantity::Angle, marks.best_angle_of_climb),
        speed(units, "Top speed", marks.top_speed),
        long(units, "Longest range", marks.best_range, distance),
    ];
    let mut cells = vec![Cell {
        name: "Standing start",
        figure: figure(units, Quantity::Rpm, standing.map(|s| s.rpm)),
        unit: units.symbol(Quantity::Rpm),
        more: {
            let thrust = with_unit(units, Quantity::Force, standing.map(|s| s.thrust_n));
            let of = if props.propellers > 1.5 {
                format!(" of all {}", fixed(props.propellers, 0))
            } else {
                String::new()
            };
            format!("thrust{of} {thrust}")
        },
        gauge: None,
    }];
    if aeroplane {
        cells.push(take_off(units, props.take_off));
        cells.extend(flight);
    }
    if aeroplane {
        cells.push(ceiling(units, props.ceilings));
    }
    cells.push(long(units, "Longest aloft", marks.best_endurance, |_, s| duration(s)));
    cells
}

fn take_off(units: Units, take_off: Option<TakeOff>) -> Cell {
    let height = |m| with_unit(units, Quantity::Height, Some(m));
    let more = take_off.map_or_else(
        || "the stall is not reached, or not known".into(),
        |t| {
            format!(
                "to {} high {}; friction {}",
                height(15.0),
                height(t.distance_to_15_m),
                fixed(t.rolling_friction, 2)
            )
        },
    );
    Cell {
        name: "Take-off run",
        figure: figure(units, Quantity::Height, take_off.map(|t| t.ground_roll_m)),
        unit: units.symbol(Quantity::Height),
        more,
        gauge: None,
    }
}

fn ceiling(units: Units, ceilings: Option<Ceilings>) -> Cell {
    let height = |m| with_unit(units, Quantity::Height, Some(m));
    let more = match ceilings {
        None => "worked out last".into(),
        Some(Ceilings { absolute_m: Some(m), .. }) => format!("no climb left at {}", height(m)),
        Some(Ceilings { sea_level_climb_m_s: Some(climb), .. }) if climb > 0.0 => {
            format!("climb is left at {}, where the air's table ends", height(HIGHEST_M))
        }
        Some(_) => "no climb even at sea level".into(),
    };
    Cell {
        name: "Service ceiling",
        figure: figure(units, Quantity::Height, ceilings.and_then(|c| c.service_m)),
        unit: units.symbol(Quantity::Height),
        more: format!("0.5 m/s (100 ft/min) of climb left; {more}"),
        gauge: None,
    }
}

fn at(units: Units, mark: Option<Mark>) -> String {
    mark.map_or_else(
        || "no such speed".into(),
        |m| {
            let (speed, rpm) = (
                with_unit(units, Quantity::Speed, Some(m.airspeed_m_s)),
                with_unit(units, Quantity::Rpm, Some(m.rpm)),
            );
            format!("at {speed}, {rpm}")
        },
    )
}

fn marked(units: Units, name: &'static str, quantity: Quantity, mark: Option<Mark>) -> Cell {
    let value = mark.map(|m| m.value);
    Cell {
        name,
        figure: figure(units, quantity, value),
        unit: units.symbol(quantity),
        more: at(units, mark),
        gauge: None,
    }
}

fn speed(units: Units, name: &'static str, mark: Option<Mark>) -> Cell {
    let more = mark.map_or_else(
        || "no level flight at full throttle".into(),
        |m| format!("at {}", with_unit(units, Quantity::Rpm, Some(m.rpm))),
    );
    Cell {
        name,
        figure: figure(units, Quantity::Speed, mark.map(|m| m.airspeed_m_s)),
        unit: units.symbol(Quantity::Speed),
        more,
        gauge: None,
    }
}

fn long(
    units: Units,
    name: &'static str,
    mark: Option<Mark>,
    words: fn(Units, f64) -> (String, &'static str),
) -> Cell {
    let (figure, unit) = mark.map_or_else(|| (NO_FIGURE.into(), ""), |m| words(units, m.value));
    let more = if mark.is_some() {
        at(units, mark)
    } else {
        "no level flight, or nothing on board to run on".into()
    };
    Cell { name, figure, unit, more, gauge: None }
}

/// Hours and minutes.
fn duration(seconds: f64) -> (String, &'static str) {
    let minutes = (seconds / 60.0).round();
    let hours = (minutes / 60.0).floor();
    if hours >= 1.0 {
        (format!("{} h {}", fixed(hours, 0), fixed(minutes - 60.0 * hours, 0)), "min")
    } else {
        (fixed(minutes, 0), "min")
    }
}

fn distance(units: Units, metres: f64) -> (String, &'static str) {
    (figure(units, Quantity::Distance, Some(metres)), units.symbol(Quantity::Distance))
}

#[cfg(test)]
mod tests {
    use super::duration;

    #[test]
    fn times_are_hours_and_minutes() {
        assert_eq!(duration(1_500.0), ("25".into(), "min"));
        assert_eq!(duration(3.0 * 3600.0 + 59.0 * 60.0 + 40.0), ("4 h 0".into(), "min"));
    }
}
