//! What stops a build, in words for the person at the terminal.

use std::fmt;

/// A build step that could not be done, as one plain message.
#[derive(Debug)]
pub struct Failure(String);

/// The result of a build step.
pub type Outcome<T> = Result<T, Failure>;

impl Failure {
    /// A failure told by `message`.
    pub fn new(message: impl Into<String>) -> Self {
        Self(message.into())
    }
}

impl fmt::Display for Failure {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.0)
    }
}

impl std::error::Error for Failure {}

/// Names the thing that was being done when `error` arose.
pub(crate) fn while_doing<E: fmt::Display>(what: impl fmt::Display) -> impl FnOnce(E) -> Failure {
    move |error| Failure(format!("{what}: {error}"))
}
