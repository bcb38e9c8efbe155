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
}

impl Opened {
    /// With one panel opened or closed.
    #[must_use]
    pub fn with(self, part: Part, open: bool) -> Self {
        match part {
            Part::Engine => Self { engine: open, ..self },
            Part::Fit => Self { fit: open, ..self },
            Part::Bench => Self { bench: open, ..self },
        }
    }
}
