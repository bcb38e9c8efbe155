//! A case with its loads, and the margins it leaves.

use super::bent::Bent;
use super::cases::Case;
use super::loads::BladeLoads;
use super::remedy::Nearest;
use super::stress::{Carried, Stresses};
use super::{BladeBeam, Place};
use crate::rig::Rig;
use crate::rotor::{Condition, Loads};

/// One case with its loads.
pub(super) struct Loaded {
    pub(super) name: String,
    pub(super) at: Condition,
    /// Of all blades.
    pub(super) air: Loads,
    /// Of one blade.
    pub(super) loads: BladeLoads,
    pub(super) bent: Bent,
}

impl Loaded {
    /// The blade under a case that has an answer.
    pub(super) fn new(rig: &Rig, beam: &BladeBeam, case: &Case) -> Option<Self> {
        Some(Self::at(rig, beam, &case.name, *case.at.as_ref().ok()?))
    }

    /// The same case with another beam; the air's load stays.
    pub(super) fn on(&self, rig: &Rig, beam: &BladeBeam) -> Self {
        Self::at(rig, beam, &self.name, self.at)
    }

    fn at(rig: &Rig, beam: &BladeBeam, name: &str, at: Condition) -> Self {
        let (air, loads) = (rig.rotor.loads(&at), BladeLoads::new(beam, &rig.rotor, &at));
        let bent = Bent::new(beam, &loads, beam.beyond_rad(&at));
        Self { name: name.into(), at, air, loads, bent }
    }

    /// What a place carries and its stresses.
    pub(super) fn stressed(&self, beam: &BladeBeam, place: &Place) -> (Carried, Stresses) {
        let carried = Carried::at(beam, &self.loads, &self.bent, place, beam.beyond_rad(&self.at));
        (carried, carried.stresses(&place.shape, beam.chords_m[place.index], place.thickness_ratio))
    }

    /// The least margin at a place.
    pub(super) fn margin(&self, beam: &BladeBeam, place: &Place) -> f64 {
        Nearest::of(&self.stressed(beam, place).1, &beam.material).margin()
    }
}

/// The case that leaves the least margin at a place.
pub(super) fn worst<'c>(beam: &BladeBeam, place: &Place, cases: &[&'c Loaded]) -> Option<&'c Loaded> {
    cases.iter().copied().min_by(|a, b| a.margin(beam, place).total_cmp(&b.margin(beam, place)))
}
