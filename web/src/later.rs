//! Work that follows an edit in later frames, a piece at a time so that the page stays at hand: the other
//! flight points first, then, unless something is being dragged, the curves and the map.

use std::cell::RefCell;
use std::rc::Rc;

use gloo_timers::callback::Timeout;
use spokeshave::fit::Along;
use spokeshave::result::Logged;
use yew::UseStateSetter;

use crate::effect::after_frame::{Waiting, after_frame};
use crate::keep;
use crate::results::{CarvedFound, Results};
use crate::results::{Later, RigRef};
use crate::state::Opened;

/// What has to be worked out.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Plan {
    /// Number of flight points.
    pub count: usize,
    /// The one selected.
    pub point: usize,
    /// Whether something is being dragged: then the map and the curves stay as they are.
    pub dragging: bool,
    /// What the map follows.
    pub along: Along,
    /// Which panels are open.
    pub opened: Opened,
}

/// A piece of the work.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Piece {
    /// A flight point.
    Point(usize),
    /// The coefficient curves.
    Curves,
    /// The departure map.
    Map,
    /// What the shaft offers and the propeller takes.
    Offer,
    /// The speed range.
    Envelope,
    /// The ceilings.
    Ceilings,
    /// What a variable pitch is worth.
    Worth,
    /// The strength of the blade.
    Strength,
    /// The carved blades.
    Carved,
    /// The logbook.
    Logbook,
    /// How far every limit is kept.
    Limits,
    /// Showing the flight points and the limits.
    Show,
    /// Showing the map and the curves as well.
    ShowMap,
    /// Showing everything worked out so far.
    ShowAll,
}

impl Plan {
    /// The pieces in order.
    #[must_use]
    pub fn pieces(self) -> Vec<Piece> {
        let mut pieces: Vec<Piece> = (0..self.count).map(Piece::Point).collect();
        pieces.extend([Piece::Limits, Piece::Show]);
        if !self.dragging {
            pieces.extend([Piece::Map, Piece::Curves, Piece::ShowMap]);
            pieces.extend(self.opened.engine.then_some(Piece::Offer));
            pieces.extend(self.opened.fit.then_some(Piece::Envelope));
            if self.opened.engine || self.opened.fit {
                pieces.push(Piece::ShowAll);
            }
            if self.opened.fit {
                pieces.extend([Piece::Ceilings, Piece::ShowAll, Piece::Worth, Piece::ShowAll]);
            }
            if self.opened.bench {
                pieces.extend([Piece::Strength, Piece::ShowAll]);
            }
            if self.opened.readings.carved {
                pieces.extend([Piece::Carved, Piece::ShowAll]);
            }
            if self.opened.readings.logbook {
                pieces.extend([Piece::Logbook, Piece::ShowAll]);
            }
        }
        pieces
    }
}

/// Work going on; dropping it calls it off.
#[derive(Debug)]
pub struct Work {
    _waiting: Waiting,
    _next: Rc<RefCell<Option<Timeout>>>,
}

/// What was read off the carved blades and in flight.
#[derive(Clone)]
struct Read {
    carved: Option<Rc<Result<CarvedFound, String>>>,
    logged: Option<Rc<Result<Logged, String>>>,
}

/// What the pieces need.
struct Bench {
    plan: Plan,
    results: Rc<RefCell<Results>>,
    before: Rc<Later>,
    setter: UseStateSetter<Rc<Later>>,
    next: std::rc::Weak<RefCell<Option<Timeout>>>,
    /// The carved blades and the logbook, once they have been worked out; what was before until then.
    read: RefCell<Read>,
}

impl Work {
    /// Begins after the next frame has been drawn.
    #[must_use]
    pub fn begin(
        plan: Plan,
        results: Rc<RefCell<Results>>,
        before: Rc<Later>,
        setter: UseStateSetter<Rc<Later>>,
    ) -> Self {
        let next = Rc::new(RefCell::new(None));
        let read = RefCell::new(Read { carved: before.carved.clone(), logged: before.logged.clone() });
        let bench = Rc::new(Bench { plan, results, before, setter, next: Rc::downgrade(&next), read });
        let waiting = after_frame(move || run(&bench, plan.pieces(), 0));
        Self { _waiting: waiting, _next: next }
    }
}

/// One piece now, the others each in a turn of its own.
fn run(bench: &Rc<Bench>, pieces: Vec<Piece>, i: usize) {
    let Some(&piece) = pieces.get(i) else { return keep::after_work() };
    bench.work(piece);
    let (again, next) = (bench.clone(), bench.next.upgrade());
    if let Some(next) = next {
        *next.borrow_mut() = Some(Timeout::new(0, move || run(&again, pieces, i + 1)));
    }
}

impl Bench {
    fn work(&self, piece: Piece) {
        let mut results = self.results.borrow_mut();
        match piece {
            Piece::Point(i) => drop(results.point(i)),
            Piece::Limits => drop(results.margins()),
            Piece::Curves => drop(results.curves(self.plan.point)),
            Piece::Map => drop(results.map(self.plan.point, self.plan.along)),
            Piece::Offer => drop(results.offer(self.plan.point)),
            Piece::Envelope => drop(results.envelope(self.plan.point)),
            Piece::Ceilings => results.work_ceilings(self.plan.point),
            Piece::Worth => results.work_worth(),
            Piece::Strength => results.work_strength(),
            Piece::Carved => self.read.borrow_mut().carved = results.carved(self.plan.point),
            Piece::Logbook => self.read.borrow_mut().logged = results.logged(),
            Piece::Show | Piece::ShowMap | Piece::ShowAll => {
                let later = self.shown(&mut results, piece);
                drop(results);
                self.setter.set(Rc::new(later));
            }
        }
    }

    /// What has been worked out so far; what has not stays as it was before.
    fn shown(&self, results: &mut Results, so_far: Piece) -> Later {
        let point = self.plan.point;
        let points = (0..self.plan.count).map(|i| results.point(i)).collect();
        let rig = results.rig().map(RigRef);
        let mut now = Later { rig, point, points, margins: results.margins(), ..Later::clone(&self.before) };
        if so_far == Piece::Show {
            return now;
        }
        now.along = self.plan.along;
        (now.map, now.curves) = (results.map(point, now.along), results.curves(point));
        if so_far == Piece::ShowMap {
            return now;
        }
        now.offer = if self.plan.opened.engine { results.offer(point) } else { Rc::default() };
        now.envelope = self.plan.opened.fit.then(|| results.envelope(point));
        now.take_off = now.envelope.as_ref().and_then(|_| results.take_off(point));
        (now.ceilings, now.worth) = (results.ceilings(point), results.worth());
        // An older sheet stays until the new one is there.
        now.strength = results.strength().or(now.strength);
        let read = self.read.borrow();
        (now.carved, now.logged) = (read.carved.clone(), read.logged.clone());
        now
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::state::Part;

    #[test]
    fn the_map_waits_until_a_drag_is_over() {
        let plan =
            Plan { count: 2, point: 0, dragging: true, along: Along::default(), opened: Opened::default() };
        assert_eq!(plan.pieces(), [Piece::Point(0), Piece::Point(1), Piece::Limits, Piece::Show]);
        let all = Plan { dragging: false, ..plan }.pieces();
        assert_eq!(all[4..], [Piece::Map, Piece::Curves, Piece::ShowMap]);
    }

    #[test]
    fn a_closed_panel_is_not_worked_out() {
        let closed =
            Plan { count: 1, point: 0, dragging: false, along: Along::default(), opened: Opened::default() };
        for (part, piece) in
            [(Part::Engine, Piece::Offer), (Part::Fit, Piece::Envelope), (Part::Bench, Piece::Strength)]
        {
            assert!(!closed.pieces().contains(&piece));
            let open = Plan { opened: Opened::default().with(part, true), ..closed };
            assert!(open.pieces().contains(&piece));
        }
    }
}
