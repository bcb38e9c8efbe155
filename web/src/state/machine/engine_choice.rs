//! What is picked of the engine, and the rows of its full-throttle curve that come and go.

use spokeshave::job::{
    AltitudeLaw, Engine, HeldTo, HeldToKind, Interpolation, Job, LoadPoint, Piston, PowerPoint,
};

use super::example_of;

/// Kinds of engine.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum EngineKind {
    /// None: flight points need an rpm or a power.
    None,
    /// A piston engine.
    Piston,
    /// A motor with controller and battery.
    Electric,
}

impl EngineKind {
    /// Every kind, in the order shown.
    pub const ALL: [Self; 3] = [Self::Piston, Self::Electric, Self::None];

    /// The kind a job has.
    #[must_use]
    pub fn of(engine: Option<&Engine>) -> Self {
        match engine {
            None => Self::None,
            Some(Engine::Piston(_)) => Self::Piston,
            Some(Engine::Electric(_)) => Self::Electric,
        }
    }

    /// What it is called.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::None => "none",
            Self::Piston => "piston engine",
            Self::Electric => "electric motor",
        }
    }
}

/// How power falls with height.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum AltitudeKind {
    /// With density from the ground up.
    Falling,
    /// Held up to a height.
    HeldTo,
}

impl AltitudeKind {
    /// Every kind, in the order shown.
    pub const ALL: [Self; 2] = [Self::Falling, Self::HeldTo];

    /// What it is called.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::Falling => "naturally aspirated",
            Self::HeldTo => "held up to a height",
        }
    }

    /// The kind of a law.
    #[must_use]
    pub fn of(law: &AltitudeLaw) -> Self {
        match law {
            AltitudeLaw::NaturallyAspirated => Self::Falling,
            AltitudeLaw::HeldTo(_) => Self::HeldTo,
        }
    }

    fn started(self) -> AltitudeLaw {
        match self {
            Self::Falling => AltitudeLaw::NaturallyAspirated,
            Self::HeldTo => AltitudeLaw::HeldTo(HeldTo { kind: HeldToKind::HeldTo, altitude_m: 2_000.0 }),
        }
    }
}

/// What is picked of the engine.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum EngineChoice {
    /// Its kind.
    Kind(EngineKind),
    /// How the curve runs between its rows.
    Interpolation(Interpolation),
    /// How power falls with height.
    Altitude(AltitudeKind),
    /// A row more in the full-throttle curve, after this one.
    AddRow(usize),
    /// A row less.
    RemoveRow(usize),
    /// How fuel consumption is given.
    FuelBy(FuelBy),
    /// A row more in the fuel consumption by load, after this one.
    AddLoad(usize),
    /// A row less there.
    RemoveLoad(usize),
}

/// How fuel consumption is given.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum FuelBy {
    /// By one figure.
    OneFigure,
    /// By load.
    Load,
}

impl FuelBy {
    /// Every way, in the order shown.
    pub const ALL: [Self; 2] = [Self::OneFigure, Self::Load];

    /// What it is called.
    #[must_use]
    pub fn words(self) -> &'static str {
        match self {
            Self::OneFigure => "one figure",
            Self::Load => "by load",
        }
    }

    /// The way of an engine.
    #[must_use]
    pub fn of(piston: &Piston) -> Self {
        if piston.bsfc_by_load.is_empty() { Self::OneFigure } else { Self::Load }
    }

    /// Gives the consumption this way. From one figure come two rows of it; from rows the one at the highest
    /// load.
    fn apply(self, piston: &mut Piston) {
        const STARTED_KG_PER_KWH: f64 = 0.3;
        match self {
            way if way == Self::of(piston) => {}
            Self::Load => {
                let bsfc_kg_per_kwh = piston.bsfc_kg_per_kwh.take().unwrap_or(STARTED_KG_PER_KWH);
                piston.bsfc_by_load = [0.5, 1.0].map(|load| LoadPoint { load, bsfc_kg_per_kwh }).into();
            }
            Self::OneFigure => {
                piston.bsfc_kg_per_kwh = piston.bsfc_by_load.last().map(|row| row.bsfc_kg_per_kwh);
                piston.bsfc_by_load.clear();
            }
        }
    }
}

impl EngineChoice {
    /// What the step is called.
    pub(in crate::state) fn name(self) -> String {
        match self {
            Self::Kind(_) => "kind of engine".into(),
            Self::Interpolation(_) => "curve between its rows".into(),
            Self::Altitude(_) => "power at height".into(),
            Self::AddRow(i) => format!("add a row after row {} of the curve", i + 1),
            Self::RemoveRow(i) => format!("remove row {} of the curve", i + 1),
            Self::FuelBy(_) => "how fuel consumption is given".into(),
            Self::AddLoad(i) => format!("add a row after row {} of fuel by load", i + 1),
            Self::RemoveLoad(i) => format!("remove row {} of fuel by load", i + 1),
        }
    }

    /// Makes the change.
    ///
    /// # Errors
    /// Why it cannot be.
    pub(in crate::state) fn apply(self, job: &mut Job) -> Result<(), String> {
        match (self, &mut job.engine) {
            (Self::Kind(kind), engine) if kind == EngineKind::of(engine.as_ref()) => {}
            (Self::Kind(kind), _) => job.engine = started(kind, job),
            (Self::Interpolation(to), Some(Engine::Piston(p))) => p.interpolation = to,
            (Self::Altitude(to), Some(Engine::Piston(p))) => {
                if to != AltitudeKind::of(&p.altitude_law) {
                    p.altitude_law = to.started();
                }
            }
            (Self::AddRow(i), Some(Engine::Piston(p))) => return add_row(p, i),
            (Self::RemoveRow(i), Some(Engine::Piston(p))) => {
                return crate::state::choice::remove(&mut p.full_throttle, i, 2, "A curve needs two rows.");
            }
            (Self::FuelBy(way), Some(Engine::Piston(p))) => way.apply(p),
            (Self::AddLoad(i), Some(Engine::Piston(p))) => return add_load(p, i),
            (Self::RemoveLoad(i), Some(Engine::Piston(p))) => {
                return crate::state::choice::remove(&mut p.bsfc_by_load, i, 1, "Fuel by load needs a row.");
            }
            _ => return Err("The job has no such engine.".into()),
        }
        Ok(())
    }
}

/// An engine of a kind to start from, an example's; without its fuel where the aircraft could not carry that.
fn started(kind: EngineKind, job: &Job) -> Option<Engine> {
    let mut engine =
        example_of(job, |example| example.engine.clone().filter(|e| EngineKind::of(Some(e)) == kind));
    let fits = |engine: &Option<Engine>| Job { engine: engine.clone(), ..job.clone() }.check().is_empty();
    if !fits(&engine)
        && let Some(Engine::Piston(p)) = &mut engine
    {
        p.fuel_kg = None;
    }
    engine
}

/// A row on the curve halfway to the next one; after the last one as far on as that lies from the one before.
fn add_row(piston: &mut Piston, after: usize) -> Result<(), String> {
    let rows = &piston.full_throttle;
    let Some(row) = rows.get(after) else { return Err("There is no such row.".into()) };
    let new = match (rows.get(after + 1), after.checked_sub(1).map(|i| &rows[i])) {
        (Some(next), _) => between(row, next),
        (None, Some(before)) => PowerPoint { rpm: 2.0 * row.rpm - before.rpm, power_w: row.power_w },
        (None, None) => return Err("A curve needs two rows.".into()),
    };
    piston.full_throttle.insert(after + 1, new);
    Ok(())
}

/// A row halfway to the next one; after the last one halfway to full load.
fn add_load(piston: &mut Piston, after: usize) -> Result<(), String> {
    let rows = &mut piston.bsfc_by_load;
    let Some(row) = rows.get(after).cloned() else { return Err("There is no such row.".into()) };
    let next = rows.get(after + 1).cloned().unwrap_or(LoadPoint { load: 1.0, ..row });
    if next.load <= row.load {
        return Err("The last row stands at full load: put a row before it.".into());
    }
    let new = LoadPoint {
        load: f64::midpoint(row.load, next.load),
        bsfc_kg_per_kwh: f64::midpoint(row.bsfc_kg_per_kwh, next.bsfc_kg_per_kwh),
    };
    rows.insert(after + 1, new);
    Ok(())
}

fn between(a: &PowerPoint, b: &PowerPoint) -> PowerPoint {
    PowerPoint { rpm: f64::midpoint(a.rpm, b.rpm), power_w: f64::midpoint(a.power_w, b.power_w) }
}
