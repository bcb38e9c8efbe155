//! Blades kept beside the drawn one: never over it until one is taken.

use std::rc::Rc;

use spokeshave::job::{Job, Propeller};

/// Most blades kept; the oldest goes.
const MOST: usize = 8;

/// A blade beside the drawn one.
#[derive(Clone, Debug, PartialEq)]
pub struct Variant {
    /// What it is, used once.
    pub name: String,
    /// The propeller.
    pub propeller: Propeller,
    /// What is to be said of it.
    pub said: Vec<String>,
}

impl Variant {
    /// The job with this propeller.
    #[must_use]
    pub fn of(&self, job: &Job) -> Job {
        Job { propeller: self.propeller.clone(), ..job.clone() }
    }
}

/// What may be done with them.
#[derive(Clone, Debug)]
pub enum Beside {
    /// Another one, in place of one of the same name, and compared.
    Keep(Variant),
    /// This one, or none, is compared.
    Compare(Option<usize>),
    /// This one is given up.
    Drop(usize),
    /// This one takes the place of the drawn blade, as a step that can be taken back.
    Use(usize),
}

/// Blades beside the drawn one.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Variants {
    /// In the order they came.
    pub all: Vec<Rc<Variant>>,
    /// Which is compared.
    pub compared: Option<usize>,
}

impl Variants {
    /// The one compared.
    #[must_use]
    pub fn compared(&self) -> Option<&Rc<Variant>> {
        self.all.get(self.compared?)
    }

    /// Keeps one more.
    pub fn keep(&mut self, variant: Variant) {
        let place = self.all.iter().position(|v| v.name == variant.name);
        if let Some(i) = place {
            self.all[i] = Rc::new(variant);
            self.compared = Some(i);
            return;
        }
        if self.all.len() >= MOST {
            self.all.remove(0);
        }
        self.all.push(Rc::new(variant));
        self.compared = Some(self.all.len() - 1);
    }

    /// Gives one up.
    pub fn drop(&mut self, i: usize) {
        if i < self.all.len() {
            self.all.remove(i);
            self.compared = self.compared.filter(|c| *c != i).map(|c| if c > i { c - 1 } else { c });
        }
    }
}
