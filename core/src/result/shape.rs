//! Results of shaping a blade, as plain data.

use serde::Serialize;

use super::State;

/// The figures of a flight point that decide between blades.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Brief {
    /// The flight point's name.
    pub name: String,
    /// Whether there is an answer.
    pub state: State,
    /// Whether the figures are those throttled back to the limit rpm, which full throttle would pass.
    pub held_at_limit: bool,
    /// True airspeed, m/s.
    pub airspeed_m_s: Option<f64>,
    /// Propeller rpm.
    pub rpm: Option<f64>,
    /// Thrust of one propeller, N.
    pub thrust_n: Option<f64>,
    /// Shaft power of one propeller, W.
    pub power_w: Option<f64>,
    /// `T V/P`.
    pub efficiency: Option<f64>,
    /// Figure of merit, at rest only.
    pub figure_of_merit: Option<f64>,
    /// Rate of climb of an aeroplane, m/s.
    pub rate_of_climb_m_s: Option<f64>,
    /// Helical Mach number of the tip.
    pub tip_mach: Option<f64>,
    /// Shaft power over what full throttle gives at this rpm.
    pub power_share: Option<f64>,
    /// How long fuel or battery last so, s.
    pub endurance_s: Option<f64>,
    /// Take-off distance to 15 m in this air, m; only where it was asked for.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub take_off_m: Option<f64>,
}

/// A flight point with the drawn and with the shaped blade.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Compared {
    /// The blade as drawn.
    pub drawn: Brief,
    /// The shaped blade.
    pub shaped: Brief,
}

/// How a station's angle came about.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum Origin {
    /// Its own best angle.
    Solved,
    /// No root, or too near the hub: the pitch of the nearest solved station is held.
    HeldInboard,
    /// No root, or too near the tip: the pitch of the nearest solved station is held.
    HeldAtTip,
}

/// A station of a best-incidence twist.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct TwistStation {
    /// Radius, m.
    pub radius_m: f64,
    /// Radius over tip radius.
    pub radius_fraction: f64,
    /// Blade angle to the chord line as drawn, degrees.
    pub drawn_angle_deg: f64,
    /// The new blade angle to the chord line, degrees.
    pub angle_deg: f64,
    /// The new blade angle on the flat face, degrees; `None` where the section has none.
    pub face_angle_deg: Option<f64>,
    /// Where the angle comes from.
    pub origin: Origin,
    /// Departure from the best angle of the new blade at each weighted flight point, degrees, by analysis.
    pub departures_deg: Vec<Option<f64>>,
}

/// A best-incidence twist.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Twist {
    /// Weights of the flight points that count, by name.
    pub weights: Vec<(String, f64)>,
    /// Stations from hub to tip.
    pub stations: Vec<TwistStation>,
    /// Whether blade and settings agree. Where a governor holds the rpm, they do once all stations depart
    /// alike.
    pub settled: bool,
    /// Where a governor sets the pitch: by how much all solved stations depart from their best angle,
    /// weighted over the points that count, degrees; no twist changes that.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub governor_departure_deg: Option<f64>,
    /// Passes between blade and settings.
    pub passes: u32,
    /// All flight points, drawn and shaped.
    pub flight_points: Vec<Compared>,
}

/// What bounded the chord of a least-loss station.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum Bound {
    /// Nothing: the chord is that of least loss.
    Free,
    /// The least chord; the lift coefficient is lower for it.
    LeastChord,
    /// The greatest chord; the lift coefficient is higher for it.
    GreatestChord,
    /// The greatest chord, and more lift than the section safely gives: the station falls short of its share.
    NearStall,
}

impl Twist {
    /// What became of it: whether blade and settings agree, and what a governor leaves.
    #[must_use]
    pub fn sentence(&self) -> String {
        match (self.settled, self.governor_departure_deg) {
            (false, _) => "Blade and settings did not come to rest.".into(),
            (true, None) => "Blade and settings agree.".into(),
            (true, Some(all)) => {
                let all = format!("{all:+.2}").replace('-', "−");
                format!(
                    "The governor sets the pitch: at the rpm it holds all solved stations depart alike, by \
                     {all}° from their best angle. No twist changes that; another rpm, diameter or chord \
                     does."
                )
            }
        }
    }
}

/// A station of a least-loss blade.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct LossStation {
    /// Radius, m.
    pub radius_m: f64,
    /// Radius over tip radius.
    pub radius_fraction: f64,
    /// Chord, m.
    pub chord_m: f64,
    /// Blade angle to the chord line, degrees.
    pub angle_deg: f64,
    /// Blade angle on the flat face, degrees; `None` where the section has none.
    pub face_angle_deg: Option<f64>,
    /// Inflow angle, degrees.
    pub inflow_angle_deg: f64,
    /// Angle of attack, degrees.
    pub angle_of_attack_deg: f64,
    /// Lift coefficient.
    pub cl: f64,
    /// Lift over drag.
    pub lift_to_drag: f64,
    /// Chord Reynolds number.
    pub reynolds: f64,
    /// What bounded the chord.
    pub bound: Bound,
}

/// A blade of least induced loss.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct LeastLoss {
    /// The flight point it is made for.
    pub flight_point: String,
    /// True airspeed, m/s.
    pub airspeed_m_s: f64,
    /// Propeller rpm.
    pub rpm: f64,
    /// Displacement velocity over airspeed, ζ.
    pub displacement: f64,
    /// Thrust of the design, N.
    pub thrust_n: f64,
    /// Power of the design, W.
    pub power_w: f64,
    /// Efficiency of the design.
    pub efficiency: f64,
    /// Thrust of the shaped blade at that speed and rpm by blade elements, N.
    pub analysed_thrust_n: f64,
    /// Its power there, W.
    pub analysed_power_w: f64,
    /// Stations from hub to tip.
    pub stations: Vec<LossStation>,
    /// All flight points, drawn and shaped.
    pub flight_points: Vec<Compared>,
}
