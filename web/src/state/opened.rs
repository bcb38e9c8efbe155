//! Which of the panels whose figures take work are open: what is closed is not worked out.

/// A panel whose figures take work.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Part {
    /// The Engine panel.
    Engine,
    /// The Fit panel.
    Fit,
    /// The Bench panel.
    Bench,
    /// The panel of the carved blades.
    Carved,
    /// The logbook's panel.
    Logbook,
}

/// Which of them are open.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Opened {
    /// The Engine panel.
    pub engine: bool,
    /// The Fit panel.
    pub fit: bool,
    /// The Bench panel.
    pub bench: bool,
    /// The panels of what was read.
    pub readings: OpenedReadings,
}

/// Which panels of what was read are open.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct OpenedReadings {
    /// The panel of the carved blades.
    pub carved: bool,
    /// The logbook's panel.
    pub logbook: bool,
}

impl Opened {
    /// With one panel opened or closed.
    #[must_use]
    pub fn with(self, part: Part, open: bool) -> Self {
        match part {
            Part::Engine => Self { engine: open, ..self },
            Part::Fit => Self { fit: open, ..self },
            Part::Bench => Self { bench: open, ..self },
            Part::Carved => Self { readings: OpenedReadings { carved: open, ..self.readings }, ..self },
            Part::Logbook => Self { readings: OpenedReadings { logbook: open, ..self.readings }, ..self },
        }
    }
}
