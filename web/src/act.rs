//! What a part of the page is handed: the state as it sees it, and where its actions go.

use std::rc::Rc;

use yew::prelude::*;

use crate::state::{Action, State};

/// Where actions go.
#[derive(Clone, Debug, PartialEq)]
pub struct Act(pub Callback<Action>);

impl Act {
    /// A callback that sends the action made from what it is given.
    pub fn on<T: 'static>(&self, make: impl Fn(T) -> Action + 'static) -> Callback<T> {
        self.0.reform(make)
    }

    /// Sends an action.
    pub fn send(&self, action: Action) {
        self.0.emit(action);
    }
}

/// Where actions go, for the component that asks.
#[hook]
pub fn use_act() -> Act {
    // The application provides it around everything.
    use_context::<Act>().unwrap_or_else(|| Act(Callback::noop()))
}

/// The state as seen in one frame by a part of the page: equal to another as long as what that part shows is.
#[derive(Clone, Debug)]
pub struct Seen {
    state: Rc<State>,
    same: fn(&State, &State) -> bool,
}

impl Seen {
    /// The whole state; any action makes another.
    #[must_use]
    pub fn new(state: Rc<State>) -> Self {
        Self { state, same: |_, _| false }
    }

    /// The state as a part sees it that shows the same while `same` holds.
    #[must_use]
    pub fn part(&self, same: fn(&State, &State) -> bool) -> Self {
        Self { state: self.state.clone(), same }
    }
}

impl PartialEq for Seen {
    fn eq(&self, other: &Self) -> bool {
        Rc::ptr_eq(&self.state, &other.state) || (self.same)(&self.state, &other.state)
    }
}

impl std::ops::Deref for Seen {
    type Target = State;
    fn deref(&self) -> &State {
        &self.state
    }
}
