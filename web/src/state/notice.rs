//! What the page has to say when something did not go as asked.

use spokeshave::job::JobError;

/// Something the page has to say.
#[derive(Clone, Debug, PartialEq)]
pub struct Notice {
    /// What happened.
    pub title: String,
    /// Where, what, what is allowed; one line each.
    pub lines: Vec<String>,
}

/// A job that was refused, by path.
pub(super) fn refused(title: &str, error: &JobError) -> Notice {
    let lines = match error {
        JobError::Values(problems) => problems.iter().take(8).map(ToString::to_string).collect(),
        other => vec![other.to_string()],
    };
    Notice { title: title.into(), lines }
}
