//! Blades kept beside the drawn one: never over it until one is taken.

use std::rc::Rc;

use serde::{Deserialize, Serialize};
use spokeshave::job::{Job, Propeller};

/// Most blades kept; the oldest goes.
const MOST: usize = 8;

/// A blade beside the drawn one.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
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
    /// As JSON, to be kept; nothing where there is none.
    #[must_use]
    pub fn to_text(&self) -> String {
        let all: Vec<&Variant> = self.all.iter().map(Rc::as_ref).collect();
        if all.is_empty() { String::new() } else { serde_json::to_string(&all).unwrap_or_default() }
    }

    /// From what was kept; what cannot be read is none.
    #[must_use]
    pub fn from_text(text: &str) -> Self {
        let mut all: Vec<Variant> = serde_json::from_str(text).unwrap_or_default();
        all.truncate(MOST);
        Self { all: all.into_iter().map(Rc::new).collect(), compared: None }
    }

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

#[cfg(test)]
mod tests {
    use super::*;
    use spokeshave::job::DEMOS;

    #[test]
    fn what_is_kept_comes_back_and_nonsense_is_none() {
        let propeller = Job::from_json(DEMOS[0].json).unwrap().propeller;
        let mut variants = Variants::default();
        assert_eq!(variants.to_text(), "");
        variants.keep(Variant { name: "Search 1".into(), propeller, said: vec!["a word".into()] });
        assert_eq!(Variants::from_text(&variants.to_text()).all, variants.all);
        assert_eq!(Variants::from_text("[{\"name\": 3}]"), Variants::default());
    }
}
