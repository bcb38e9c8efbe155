//! What is remembered of the view, apart from any job: units and colours.

use serde::{Deserialize, Serialize};

use crate::state::{State, Theme};
use crate::units::{LengthUnit, Units};

/// Every page opened from disk shares one storage, so the key says whose it is and of which version.
const KEY: &str = "spokeshave.1.view";

/// Units and colours as picked.
#[derive(Clone, Copy, Debug, Default, PartialEq, Serialize, Deserialize)]
#[serde(default)]
pub struct Remembered {
    units: Option<Units>,
    length: Option<LengthUnit>,
    theme: Theme,
}

impl Remembered {
    /// What is worth remembering of a state.
    #[must_use]
    pub fn of(state: &State) -> Self {
        let units = state.units_picked.then_some(state.units);
        Self { units, length: Some(state.units.length), theme: state.theme }
    }

    /// The state with what was remembered.
    #[must_use]
    pub fn applied(self, mut state: State) -> State {
        if let Some(units) = self.units {
            (state.units, state.units_picked) = (units, true);
        }
        state.units.length = self.length.unwrap_or(state.units.length);
        state.theme = self.theme;
        state
    }

    /// What this browser remembers; nothing where it refuses storage.
    #[must_use]
    pub fn read() -> Self {
        storage()
            .and_then(|s| s.get_item(KEY).ok().flatten())
            .and_then(|text| serde_json::from_str(&text).ok())
            .unwrap_or_default()
    }

    /// Lets this browser remember.
    pub fn write(self) {
        if let (Some(storage), Ok(text)) = (storage(), serde_json::to_string(&self)) {
            // A browser that refuses only forgets the units.
            let _ = storage.set_item(KEY, &text);
        }
    }
}

fn storage() -> Option<web_sys::Storage> {
    web_sys::window()?.local_storage().ok()?
}
