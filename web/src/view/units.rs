//! Picking units.

use yew::prelude::*;

use crate::act::use_act;
use crate::form::Pick;
use crate::state::Action;
use crate::units::{
    AreaUnit, ForceUnit, HeightUnit, LengthUnit, MassUnit, PowerUnit, SpeedUnit, TorqueUnit, Units,
};

/// Properties of [`UnitPicks`].
#[derive(Properties, PartialEq)]
pub struct UnitPicksProps {
    /// The units shown.
    pub units: Units,
}

/// Makes one list of units.
macro_rules! list {
    ($act:expr, $units:expr, $label:literal, $field:ident, $kind:ty) => {{
        let units = $units;
        let options: Vec<AttrValue> = <$kind>::ALL.iter().map(|u| AttrValue::from(u.symbol())).collect();
        let picked = <$kind>::ALL.iter().position(|u| *u == units.$field);
        let onpick = $act.on(move |i: usize| {
            let $field = <$kind>::ALL.get(i).copied().unwrap_or(units.$field);
            Action::Units(Units { $field, ..units })
        });
        html! { <Pick label={$label} {options} {picked} {onpick} /> }
    }};
}

/// One list for each kind of figure.
#[component]
pub fn UnitPicks(props: &UnitPicksProps) -> Html {
    let (act, units) = (use_act(), props.units);
    html! {
        <div class="unit-picks">
            { list!(act, units, "Lengths", length, LengthUnit) }
            { list!(act, units, "Airspeed", speed, SpeedUnit) }
            { list!(act, units, "Thrust", force, ForceUnit) }
            { list!(act, units, "Power", power, PowerUnit) }
            { list!(act, units, "Torque", torque, TorqueUnit) }
            { list!(act, units, "Height", height, HeightUnit) }
            { list!(act, units, "Mass and fuel", mass, MassUnit) }
            { list!(act, units, "Wing area", area, AreaUnit) }
        </div>
    }
}
