//! The blade standing on its hub, its departure profile beside it on the same radius axis.

mod blade;
mod layout;
mod profile;
mod tags;

use super::planform::Planform;
use super::radius_axis::RadiusAxis;
use super::stations::{list, on_keys};
use crate::chart::unit::Unit;
use layout::Layout;
use spokeshave::result::StationResult;
use std::rc::Rc;
use yew::prelude::*;

/// The departure of another variant, for comparison.
#[derive(Clone, Debug, PartialEq)]
pub struct Ghost {
    /// The variant's short name, written on its line.
    pub name: AttrValue,
    /// Radius (m) and departure (degrees).
    pub points: Vec<(f64, f64)>,
    /// Its outline.
    pub shape: Option<Rc<Planform>>,
}

/// Properties of [`BladeRack`].
#[derive(Properties, PartialEq)]
pub struct BladeRackProps {
    /// The blade's outline.
    pub shape: Rc<Planform>,
    /// The stations at the flight point shown, hub first.
    pub stations: Rc<Vec<StationResult>>,
    /// The radius axis, in common with the map.
    pub axis: RadiusAxis,
    /// Unit of length.
    pub length: Unit,
    /// Index of the chosen station.
    pub selected: usize,
    /// Told when a station is chosen.
    pub on_select: Callback<usize>,
    /// Width, pixels.
    #[prop_or(372.0)]
    pub width: f64,
    /// Whether the leading edge is drawn on the right, as on a blade that turns clockwise seen from behind.
    #[prop_or(true)]
    pub leading_right: bool,
    /// Another variant's departure.
    #[prop_or_default]
    pub ghost: Option<Ghost>,
}

/// The blade with its stations, bands coloured by departure, and the departure profile.
#[component]
pub fn BladeRack(props: &BladeRackProps) -> Html {
    let layout = Layout::new(props.axis, &props.shape, props.width, props.leading_right);
    let (w, h) = (props.width, props.axis.rack_height_px());
    let keys = on_keys(props.selected, props.stations.len(), &props.on_select);
    html! {
        <svg class="rack" width={w.to_string()} height={h.to_string()} viewBox={format!("0 0 {w} {h}")}
            role="group" aria-label="Blade and departure by station">
            <desc>{ description(&layout) }</desc>
            { blade::headings(&layout, props) }
            { blade::drawing(&layout, props) }
            { profile::drawing(&layout, props) }
            { list("rack", props.selected, keys, tags::options(&layout, props)) }
        </svg>
    }
}

fn description(layout: &Layout) -> String {
    let share = layout.chord_share();
    let chord = if share < 0.999 {
        format!(" Chord is drawn at {share:.2} of the scale of radius.")
    } else {
        String::new()
    };
    format!(
        "Seen from behind. The axis is drawn 35 % of the chord behind the leading edge and the tip rounded; \
         neither is part of the job.{chord}"
    )
}
