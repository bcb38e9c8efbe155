//! What the blade is made of and how it is held.

use spokeshave::job::{Hub, Job, Species, Wood};
use spokeshave::wood::SPECIES;

use super::place::places;
use crate::units::Quantity;

/// A figure of the wood.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum WoodFigure {
    /// Moisture content.
    Moisture,
    /// Safety factor.
    Safety,
    /// Overspeed over the highest rpm.
    Overspeed,
    /// Lean forward.
    Rake,
    /// Thickness of the boss.
    Boss,
    /// Diameter of the plates.
    Plates,
    /// Diameter of the hole in the middle.
    Bore,
    /// Number of bolts.
    Bolts,
    /// Diameter of the bolt circle.
    Circle,
    /// Diameter of a bolt.
    Bolt,
    /// Torque on a nut.
    NutTorque,
}

/// The wood with its hub, where there is one.
type Held = (Wood, Option<Hub>);

places! { WoodFigure, Held, |self, held|
    (Self::Moisture, (wood, _)) => Figure(wood.moisture_percent),
    (Self::Safety, (wood, _)) => Figure(wood.safety_factor),
    (Self::Overspeed, (wood, _)) => Figure(wood.overspeed),
    (Self::Rake, (wood, _)) => Figure(wood.rake_deg),
    (Self::Boss, (_, Some(hub))) => Figure(hub.thickness_m),
    (Self::Plates, (_, Some(hub))) => Figure(hub.flange_diameter_m),
    (Self::Bore, (_, Some(hub))) => Figure(hub.bore_m),
    (Self::Bolts, (_, Some(hub))) => Count(hub.bolts),
    (Self::Circle, (_, Some(hub))) => Figure(hub.bolt_circle_m),
    (Self::Bolt, (_, Some(hub))) => Figure(hub.bolt_diameter_m),
    (Self::NutTorque, (_, Some(hub))) => Maybe(hub.bolt_torque_n_m),
}

/// The wood of a job, the usual one where it has none.
#[must_use]
pub fn wood_of(job: &Job) -> Wood {
    job.wood.clone().unwrap_or_default()
}

fn held(job: &Job) -> Held {
    let mut wood = wood_of(job);
    let hub = wood.hub.take();
    (wood, hub)
}

impl WoodFigure {
    /// Figures of the blade's wood.
    pub const BLADE: [Self; 4] = [Self::Moisture, Self::Safety, Self::Overspeed, Self::Rake];
    /// Figures of the hub.
    pub const HUB: [Self; 7] =
        [Self::Boss, Self::Plates, Self::Bore, Self::Bolts, Self::Circle, Self::Bolt, Self::NutTorque];

    /// What it is called, its name in the job file, and what it measures.
    const fn about(self) -> (&'static str, &'static str, Quantity) {
        match self {
            Self::Moisture => ("moisture, % of dry weight", "moisture_percent", Quantity::Number),
            Self::Safety => ("safety factor", "safety_factor", Quantity::Ratio),
            Self::Overspeed => ("overspeed, times the highest rpm", "overspeed", Quantity::Ratio),
            Self::Rake => ("rake forward", "rake_deg", Quantity::Angle),
            Self::Boss => ("thickness of the boss", "hub.thickness_m", Quantity::Length),
            Self::Plates => ("diameter of the plates", "hub.flange_diameter_m", Quantity::Length),
            Self::Bore => ("bore", "hub.bore_m", Quantity::Length),
            Self::Bolts => ("number of bolts", "hub.bolts", Quantity::Count),
            Self::Circle => ("bolt circle", "hub.bolt_circle_m", Quantity::Length),
            Self::Bolt => ("bolt diameter", "hub.bolt_diameter_m", Quantity::Length),
            Self::NutTorque => ("torque on a nut", "hub.bolt_torque_n_m", Quantity::Torque),
        }
    }

    /// What it is called.
    #[must_use]
    pub fn name(self) -> &'static str {
        self.about().0
    }

    /// What it measures.
    #[must_use]
    pub fn quantity(self) -> Quantity {
        self.about().2
    }

    /// Its path in the job file.
    pub(in crate::state) fn path(self) -> String {
        format!("wood.{}", self.about().1)
    }

    /// The figure, SI; the usual one where the job has no wood.
    #[must_use]
    pub fn value(self, job: &Job) -> Option<f64> {
        self.read(&held(job))?.value()
    }

    /// Writes the figure, SI; whether there was a place for it.
    pub(in crate::state) fn write(self, job: &mut Job, value: f64) -> bool {
        self.change(job, Some(value))
    }

    /// Takes the figure out; whether the job may go without it.
    pub(in crate::state) fn clear(self, job: &mut Job) -> bool {
        self.change(job, None)
    }

    /// Puts a figure in, or takes it out.
    fn change(self, job: &mut Job, value: Option<f64>) -> bool {
        let mut held = held(job);
        let changed = match (self.place(&mut held), value) {
            (Some(place), Some(value)) => {
                place.put(value);
                true
            }
            (Some(place), None) => place.clear(),
            (None, _) => false,
        };
        let next = Wood { hub: held.1, ..held.0 };
        // What is usual needs no place in the job.
        if changed && (job.wood.is_some() || next != Wood::default()) {
            job.wood = Some(next);
        }
        changed
    }
}

/// What is picked of the wood.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum WoodChoice {
    /// A material of the program's, by its place in the list.
    Species(usize),
    /// Whether the hub is judged.
    Hub(bool),
}

impl WoodChoice {
    /// What the step is called.
    pub(in crate::state) fn name(self) -> String {
        match self {
            Self::Species(_) => "material of the blade".into(),
            Self::Hub(_) => "hub".into(),
        }
    }

    /// Makes the change.
    pub(in crate::state) fn apply(self, job: &mut Job) {
        let mut wood = wood_of(job);
        match self {
            Self::Species(i) => {
                if let Some(species) = SPECIES.get(i) {
                    wood.species = Species::Named(species.name.into());
                }
            }
            Self::Hub(false) => wood.hub = None,
            Self::Hub(true) => wood.hub = wood.hub.or_else(|| Some(started(job))),
        }
        job.wood = Some(wood);
    }
}

/// A hub to start from, in the proportions of a small wooden propeller's: for its owner to put right.
fn started(job: &Job) -> Hub {
    let p = &job.propeller;
    let plates = p.hub_diameter_m.max(0.05 * p.diameter_m);
    let tenth_mm = |metres: f64| (1e4 * metres).round() / 1e4;
    Hub {
        thickness_m: tenth_mm(0.065 * p.diameter_m),
        flange_diameter_m: tenth_mm(plates),
        bore_m: tenth_mm(0.15 * plates),
        bolts: if p.diameter_m < 0.6 { 4 } else { 6 },
        bolt_circle_m: tenth_mm(0.65 * plates),
        bolt_diameter_m: tenth_mm(0.05 * plates).max(0.001),
        bolt_torque_n_m: None,
    }
}

/// Place of the job's material in the program's list; none for the user's own.
#[must_use]
pub fn species_of(job: &Job) -> Option<usize> {
    let Species::Named(name) = wood_of(job).species else { return None };
    let known = spokeshave::wood::Species::named(&name)?;
    SPECIES.iter().position(|s| s.name == known.name)
}
