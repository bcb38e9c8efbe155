//! The engine of a job.

use spokeshave::job::{AltitudeLaw, Engine, Job, Piston};

use super::place::{Place, places};
use crate::units::Quantity;

/// A figure of the engine.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum EngineFigure {
    /// Engine rpm of a row of the full-throttle curve.
    CurveRpm(usize),
    /// Shaft power of a row of the full-throttle curve.
    CurvePower(usize),
    /// Load of a row of the fuel consumption.
    Load(usize),
    /// Brake specific fuel consumption of a row.
    LoadConsumption(usize),
    /// Engine rpm over propeller rpm.
    GearRatio,
    /// Limit of engine rpm.
    LimitRpm,
    /// Idle engine rpm.
    IdleRpm,
    /// Height up to which power is held.
    HeldTo,
    /// Brake specific fuel consumption.
    Consumption,
    /// Fuel on board.
    Fuel,
    /// Speed constant of the motor.
    SpeedConstant,
    /// Winding resistance.
    Resistance,
    /// No-load current.
    NoLoadCurrent,
    /// Voltage at which the no-load current was read.
    NoLoadVoltage,
    /// Limit of motor current.
    MostCurrent,
    /// Resistance of controller and leads.
    ControllerResistance,
    /// Cells in series.
    Cells,
    /// Open-circuit voltage of a cell.
    CellVoltage,
    /// Resistance of a cell.
    CellResistance,
    /// Capacity of the battery.
    Capacity,
    /// Part of the capacity that may be used.
    UsableShare,
}

places! { EngineFigure, Engine, |self, engine|
    (Self::GearRatio, Engine::Piston(p)) => Figure(p.gear_ratio),
    (Self::LimitRpm, Engine::Piston(p)) => Maybe(p.max_rpm),
    (Self::IdleRpm, Engine::Piston(p)) => Maybe(p.idle_rpm),
    (Self::HeldTo, Engine::Piston(Piston { altitude_law: AltitudeLaw::HeldTo(held), .. })) => Figure(held.altitude_m),
    (Self::Consumption, Engine::Piston(p)) => Maybe(p.bsfc_kg_per_kwh),
    (Self::Fuel, Engine::Piston(p)) => Maybe(p.fuel_kg),
    (Self::GearRatio, Engine::Electric(e)) => Figure(e.gear_ratio),
    (Self::SpeedConstant, Engine::Electric(e)) => Figure(e.kv_rpm_per_v),
    (Self::Resistance, Engine::Electric(e)) => Figure(e.resistance_ohm),
    (Self::NoLoadCurrent, Engine::Electric(e)) => Figure(e.no_load_current_a),
    (Self::NoLoadVoltage, Engine::Electric(e)) => Maybe(e.no_load_voltage_v),
    (Self::MostCurrent, Engine::Electric(e)) => Maybe(e.max_current_a),
    (Self::ControllerResistance, Engine::Electric(e)) => Figure(e.controller_resistance_ohm),
    (Self::Cells, Engine::Electric(e)) => Count(e.battery.cells),
    (Self::CellVoltage, Engine::Electric(e)) => Figure(e.battery.open_circuit_v_per_cell),
    (Self::CellResistance, Engine::Electric(e)) => Figure(e.battery.resistance_ohm_per_cell),
    (Self::Capacity, Engine::Electric(e)) => Figure(e.battery.capacity_ah),
    (Self::UsableShare, Engine::Electric(e)) => Figure(e.battery.usable_fraction),
}

impl EngineFigure {
    /// What it is called, its name in the job file, and what it measures.
    const fn about(self) -> (&'static str, &'static str, Quantity) {
        match self {
            Self::CurveRpm(_) => ("rpm", "rpm", Quantity::Rpm),
            Self::CurvePower(_) => ("power", "power_w", Quantity::Power),
            Self::Load(_) => ("load", "load", Quantity::Share),
            Self::GearRatio => ("gear ratio", "gear_ratio", Quantity::Ratio),
            Self::LimitRpm => ("limit rpm", "max_rpm", Quantity::Rpm),
            Self::IdleRpm => ("idle rpm", "idle_rpm", Quantity::Rpm),
            Self::HeldTo => ("height up to which power is held", "altitude_law.altitude_m", Quantity::Height),
            Self::Consumption | Self::LoadConsumption(_) => {
                ("fuel consumption", "bsfc_kg_per_kwh", Quantity::Consumption)
            }
            Self::Fuel => ("fuel on board", "fuel_kg", Quantity::Mass),
            Self::SpeedConstant => ("speed constant", "kv_rpm_per_v", Quantity::SpeedConstant),
            Self::Resistance => ("winding resistance", "resistance_ohm", Quantity::Resistance),
            Self::NoLoadCurrent => ("no-load current", "no_load_current_a", Quantity::Current),
            Self::NoLoadVoltage => ("voltage of the no-load current", "no_load_voltage_v", Quantity::Voltage),
            Self::MostCurrent => ("limit current", "max_current_a", Quantity::Current),
            Self::ControllerResistance => {
                ("controller resistance", "controller_resistance_ohm", Quantity::Resistance)
            }
            Self::Cells => ("cells in series", "battery.cells", Quantity::Count),
            Self::CellVoltage => ("voltage of a cell", "battery.open_circuit_v_per_cell", Quantity::Voltage),
            Self::CellResistance => {
                ("resistance of a cell", "battery.resistance_ohm_per_cell", Quantity::Resistance)
            }
            Self::Capacity => ("battery capacity", "battery.capacity_ah", Quantity::Charge),
            Self::UsableShare => ("usable part of the capacity", "battery.usable_fraction", Quantity::Share),
        }
    }

    /// The table it stands in, as it is called and in the job file, and its row.
    fn row(self) -> Option<(&'static str, &'static str, usize)> {
        match self {
            Self::CurveRpm(i) | Self::CurvePower(i) => Some(("the curve", "full_throttle", i)),
            Self::Load(i) | Self::LoadConsumption(i) => Some(("fuel by load", "bsfc_by_load", i)),
            _ => None,
        }
    }

    /// What it is called, with its place.
    #[must_use]
    pub fn name(self) -> String {
        let name = self.about().0;
        self.row().map_or_else(|| name.into(), |(table, _, i)| format!("{name} in row {} of {table}", i + 1))
    }

    /// What it measures.
    #[must_use]
    pub fn quantity(self) -> Quantity {
        self.about().2
    }

    /// Its path in the job file.
    pub(in crate::state) fn path(self) -> String {
        let row = self.row().map_or_else(String::new, |(_, key, i)| format!("{key}[{i}]."));
        format!("engine.{row}{}", self.about().1)
    }

    /// The figure, SI.
    #[must_use]
    pub fn value(self, job: &Job) -> Option<f64> {
        let engine = job.engine.as_ref()?;
        match (self, engine) {
            (Self::CurveRpm(i), Engine::Piston(p)) => Some(p.full_throttle.get(i)?.rpm),
            (Self::CurvePower(i), Engine::Piston(p)) => Some(p.full_throttle.get(i)?.power_w),
            (Self::Load(i), Engine::Piston(p)) => Some(p.bsfc_by_load.get(i)?.load),
            (Self::LoadConsumption(i), Engine::Piston(p)) => Some(p.bsfc_by_load.get(i)?.bsfc_kg_per_kwh),
            _ => self.read(engine)?.value(),
        }
    }

    /// Writes the figure, SI; whether there was a place for it.
    pub(in crate::state) fn write(self, job: &mut Job, value: f64) -> bool {
        match (self, &mut job.engine) {
            (Self::CurveRpm(i), Some(Engine::Piston(p))) => {
                p.full_throttle.get_mut(i).map(|row| row.rpm = value).is_some()
            }
            (Self::CurvePower(i), Some(Engine::Piston(p))) => {
                p.full_throttle.get_mut(i).map(|row| row.power_w = value).is_some()
            }
            (Self::Load(i), Some(Engine::Piston(p))) => {
                p.bsfc_by_load.get_mut(i).map(|row| row.load = value).is_some()
            }
            (Self::LoadConsumption(i), Some(Engine::Piston(p))) => {
                p.bsfc_by_load.get_mut(i).map(|row| row.bsfc_kg_per_kwh = value).is_some()
            }
            (_, engine) => {
                let place = engine.as_mut().and_then(|e| self.place(e));
                place.map(|place| place.put(value)).is_some()
            }
        }
    }

    /// Takes the figure out; whether the job may go without it.
    pub(in crate::state) fn clear(self, job: &mut Job) -> bool {
        job.engine.as_mut().and_then(|e| self.place(e)).is_some_and(Place::clear)
    }
}
