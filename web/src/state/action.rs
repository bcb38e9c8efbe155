//! What can happen on the page.

use spokeshave::fit::Along;

use super::{Beside, Choice, Field, Held, Notice, Part, Running, Theme};
use crate::units::Units;

/// What can happen.
#[derive(Clone, Debug)]
pub enum Action {
    /// A text is being typed into a box.
    Type(Field, String),
    /// The text in a box is meant.
    Commit(Field),
    /// The text in a box is given up.
    GiveUp(Field),
    /// Something was picked, added or removed.
    Choose(Choice, Running),
    /// A flight point was selected.
    SelectPoint(usize),
    /// A station was selected.
    SelectStation(usize),
    /// One station outward.
    Outward,
    /// One station inward.
    Inward,
    /// A ring was taken.
    Take(Held),
    /// The ring taken is here, SI.
    DragTo(f64),
    /// The ring was let go.
    LetGo,
    /// The ring goes back.
    PutBack,
    /// A ring was moved by a key to here, SI.
    Nudge(Held, f64),
    /// The run of key presses is over.
    EndRun,
    /// So many stations on either side follow.
    Follow(usize),
    /// The latest step is taken back.
    Undo,
    /// The step taken back is taken again.
    Redo,
    /// A job file was read: its name and text.
    Open(String, String),
    /// A job that comes with the program.
    Demo(usize),
    /// A plain job to start from.
    Blank,
    /// Units were picked.
    Units(Units),
    /// The line that the departure map follows was picked.
    Along(Along),
    /// Colours were picked.
    Theme(Theme),
    /// Something has to be said.
    Say(Notice),
    /// A panel was opened or closed.
    Unfold(Part, bool),
    /// Something is done with the blades beside the drawn one.
    Beside(Beside),
    /// The job was saved as a file.
    Saved,
    /// What was said has been read.
    Dismiss,
}
