//! The propeller with a change made.

use super::{DIAMETERS, MOST_TURN_DEG};
use crate::carved::{CarvedError, Measured, mean_rig, planed, planing};
use crate::job::{AngleReference, Propeller};
use crate::result::{Means, RemovalPlan};
use crate::rig::Rig;
use crate::shape::{PitchBy, sized};

/// The propeller a change starts from: the drawn one, or the carved one where there is wood.
pub(super) struct Base<'r> {
    drawn: &'r Rig,
    wood: Option<(Measured, Rig)>,
}

impl<'r> Base<'r> {
    pub(super) fn new(drawn: &'r Rig) -> Self {
        let wood = Measured::new(drawn).and_then(|m| mean_rig(drawn, &m).map(|mean| (m, mean))).ok();
        Self { drawn, wood }
    }

    pub(super) fn rig(&self) -> &Rig {
        self.wood.as_ref().map_or(self.drawn, |(_, mean)| mean)
    }

    pub(super) fn is_wood(&self) -> bool {
        self.wood.is_some()
    }

    /// Least and greatest amount: degrees, or metres of diameter.
    pub(super) fn range(&self, means: Means) -> (f64, f64) {
        let diameter_m = self.drawn.job.propeller.diameter_m;
        match means {
            Means::Pitch | Means::Twist => (-MOST_TURN_DEG, MOST_TURN_DEG),
            Means::Diameter if self.is_wood() => ((DIAMETERS.0 - 1.0) * diameter_m, 0.0),
            Means::Diameter => ((DIAMETERS.0 - 1.0) * diameter_m, (DIAMETERS.1 - 1.0) * diameter_m),
        }
    }

    /// What to take off carved blades for an amount; `None` where there is no wood, and for the tips.
    pub(super) fn planing(
        &self,
        means: Means,
        amount: f64,
        point: usize,
    ) -> Option<Result<RemovalPlan, CarvedError>> {
        let (measured, _) = self.wood.as_ref().filter(|_| means != Means::Diameter)?;
        let share = self.share(means);
        Some(planing(self.drawn, measured, point, |r| amount.to_radians() * share(r)))
    }

    /// Which share of a turn each radius has.
    fn share(&self, means: Means) -> impl Fn(f64) -> f64 + use<> {
        let tip_m = self.drawn.rotor.blade.radius_m;
        move |r: f64| if means == Means::Pitch { 1.0 } else { (2.0 * r / tip_m - 1.0).max(0.0) }
    }

    /// The propeller with an amount of change; `None` where it cannot be.
    pub(super) fn changed(&self, means: Means, amount: f64) -> Option<Rig> {
        let share = self.share(means);
        match (means, &self.wood) {
            (Means::Diameter, _) => self.resized(amount),
            (_, Some((measured, _))) => {
                let turned = planed(self.drawn, measured, |r| amount.to_radians() * share(r));
                mean_rig(self.drawn, &turned).ok()
            }
            (_, None) => checked(self.drawn, self.turned(|r| amount * share(r))),
        }
    }

    /// The drawn propeller turned by degrees, its pitches as angles.
    fn turned(&self, by_deg: impl Fn(f64) -> f64) -> Propeller {
        let mut propeller = self.drawn.job.propeller.clone();
        let blade = &self.drawn.rotor.blade;
        for (station, r) in propeller.stations.iter_mut().zip(blade.station_radii_m()) {
            let face = match propeller.angle_reference {
                AngleReference::ChordLine => 0.0,
                AngleReference::FlatFace => blade.face_to_chord_rad(r).unwrap_or(0.0),
            };
            station.angle_deg = Some((blade.cut(r).angle_rad - face).to_degrees() + by_deg(r));
            station.pitch_m = None;
        }
        propeller
    }

    fn resized(&self, by_m: f64) -> Option<Rig> {
        let rig = self.rig();
        let diameter_m = rig.job.propeller.diameter_m + by_m;
        if by_m > 0.0 {
            let pitch_m = rig.rotor.blade.pitch_075_m(0.0) * diameter_m / rig.job.propeller.diameter_m;
            return sized(rig, pitch_m, diameter_m, PitchBy::Turn).ok();
        }
        checked(rig, trimmed(rig, diameter_m)?)
    }
}

/// The propeller with its tips trimmed to a diameter: what lies inboard stays as it is.
fn trimmed(rig: &Rig, diameter_m: f64) -> Option<Propeller> {
    let (blade, tip_m) = (&rig.rotor.blade, 0.5 * diameter_m);
    let mut propeller = rig.job.propeller.clone();
    let radii: Vec<f64> = blade.station_radii_m().collect();
    let beyond = radii.iter().position(|r| *r > tip_m * (1.0 - 1e-9)).unwrap_or(radii.len());
    let mut end = propeller.stations.get(beyond.min(radii.len() - 1))?.clone();
    propeller.stations.truncate(beyond);
    for (station, r) in propeller.stations.iter_mut().zip(&radii) {
        station.radius_fraction = (r / tip_m).min(1.0);
    }
    let cut = blade.cut(tip_m);
    if beyond < radii.len() {
        let face = match propeller.angle_reference {
            AngleReference::ChordLine => 0.0,
            AngleReference::FlatFace => blade.face_to_chord_rad(tip_m)?,
        };
        end.radius_fraction = 1.0;
        end.chord_m = cut.chord_m;
        end.thickness_ratio = cut.thickness_ratio;
        end.angle_deg = Some((cut.angle_rad - face).to_degrees());
        end.pitch_m = None;
        propeller.stations.push(end);
    }
    propeller.diameter_m = diameter_m;
    Some(propeller)
}

/// Readings of carved blades are of the propeller before.
fn checked(rig: &Rig, propeller: Propeller) -> Option<Rig> {
    let mut new = rig.with_propeller(propeller).ok()?;
    new.job.carved = None;
    new.job.check().is_empty().then_some(new)
}
