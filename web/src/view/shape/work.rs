//! One piece of shaping work at a time, in a worker: begun, followed, called off.

use std::cell::RefCell;
use std::rc::Rc;

use spokeshave::job::{Job, Propeller};
use web_sys::js_sys::Date;
use yew::prelude::*;

use crate::act::{Act, use_act};
use crate::background::hand::{Hand, Heard};
use crate::background::shape::{Chart, Cost, Order, Report, Step, Task};
use crate::form::capital;
use crate::number::fixed;
use crate::state::{Action, Beside, Variant};

/// What the work is doing or has come to.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) enum Run {
    /// Nothing was asked for yet.
    #[default]
    Idle,
    /// At work on this; steps are those of a search.
    At(String, Option<Step>),
    /// It came to something: what is to be said.
    Done(Vec<String>),
    /// It came to nothing: why.
    Stopped(String),
}

/// Drawings of the job as it was.
#[derive(Clone, Debug, Default, PartialEq)]
pub(super) struct Drawn {
    pub(super) chart: Option<(Rc<Job>, Rc<Chart>)>,
    pub(super) costs: Option<(Rc<Job>, Rc<Vec<Cost>>)>,
}

/// The hook's handles.
#[derive(Clone)]
pub(super) struct Work {
    pub(super) run: UseStateHandle<Run>,
    pub(super) drawn: UseStateHandle<Drawn>,
    hand: Rc<RefCell<Option<Hand>>>,
    /// Name and best blade so far of what is at work.
    best: Rc<RefCell<Option<(String, Propeller)>>>,
    act: Act,
}

/// Work of the Shape panel.
#[hook]
pub(super) fn use_work() -> Work {
    Work {
        run: use_state_eq(Run::default),
        drawn: use_state_eq(Drawn::default),
        hand: use_mut_ref(|| None),
        best: use_mut_ref(|| None),
        act: use_act(),
    }
}

impl Work {
    /// Whether something is at work.
    pub(super) fn busy(&self) -> bool {
        matches!(*self.run, Run::At(..))
    }

    /// Begins, unless something is at work; `name` is that of the blade it makes, or of the drawing.
    pub(super) fn begin(&self, job: &Rc<Job>, name: &str, task: Task) {
        if self.busy() {
            return;
        }
        let order = Order { job: job.to_json(), task };
        *self.best.borrow_mut() = None;
        self.run.set(Run::At(name.into(), None));
        let (this, job, name, begun) = (self.clone(), job.clone(), name.to_string(), Date::now());
        let drawn = RefCell::new((*self.drawn).clone());
        let given = Hand::give("shape_blade", &order, move |heard: Heard<Report>| {
            let seconds = (Date::now() - begun) / 1000.0;
            this.hear(heard, (&job, &name, seconds), &drawn);
        });
        if given.is_none() {
            self.run.set(Run::Stopped("This browser refuses to start a worker for it.".into()));
        }
        *self.hand.borrow_mut() = given;
    }

    fn hear(
        &self,
        heard: Heard<Report>,
        (job, name, seconds): (&Rc<Job>, &str, f64),
        drawn: &RefCell<Drawn>,
    ) {
        self.run.set(match heard {
            Heard::Report(Report::Step(mut step)) => {
                if let Some(better) = step.better.take() {
                    *self.best.borrow_mut() = Some((name.into(), *better));
                }
                Run::At(name.into(), Some(step))
            }
            Heard::Report(Report::Blade(propeller, mut said)) => {
                said.insert(
                    0,
                    format!("“{name}” stands beside the drawn blade after {} s.", fixed(seconds, 1)),
                );
                self.keep(name, *propeller, said.clone());
                Run::Done(said)
            }
            Heard::Report(Report::Chart(chart)) => {
                drawn.borrow_mut().chart = Some((job.clone(), Rc::new(*chart)));
                self.drawn.set(drawn.borrow().clone());
                Run::Done(Vec::new())
            }
            Heard::Report(Report::Errors(costs)) => {
                drawn.borrow_mut().costs = Some((job.clone(), Rc::new(costs)));
                self.drawn.set(drawn.borrow().clone());
                Run::Done(Vec::new())
            }
            Heard::Report(Report::Refused(why)) => Run::Stopped(capital(&why)),
            Heard::Fault(why) => Run::Stopped(format!(
                "The computation met a fault of its own and stopped; the job is as it was. It said: {why}"
            )),
        });
    }

    fn keep(&self, name: &str, propeller: Propeller, said: Vec<String>) {
        let variant = Variant { name: name.into(), propeller, said };
        self.act.send(Action::Beside(Beside::Keep(variant)));
    }

    /// Calls it off; the best so far is kept.
    pub(super) fn call_off(&self) {
        *self.hand.borrow_mut() = None;
        let best = self.best.borrow_mut().take();
        let said = match best {
            None => "Called off. Nothing was found yet.",
            Some((name, propeller)) => {
                let said = "Called off; this is the best it had found.";
                self.keep(&name, propeller, vec![said.into()]);
                said
            }
        };
        self.run.set(Run::Done(vec![said.into()]));
    }
}
