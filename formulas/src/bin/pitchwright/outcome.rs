//! What a command leaves: results, diagnostics, exit status.

use std::io::Write;
use std::process::ExitCode;

/// All well.
pub(crate) const WELL: u8 = 0;
/// A requirement is not met or not shown.
pub(crate) const NOT_MET: u8 = 1;
/// The sheet has an error.
pub(crate) const SHEET_ERROR: u8 = 2;
/// Bad usage, an unknown symbol among them.
pub(crate) const BAD_USAGE: u8 = 64;
/// No such file.
pub(crate) const NO_FILE: u8 = 66;

/// What a command leaves.
#[derive(Debug, Default, PartialEq, Eq)]
pub(crate) struct Outcome {
    /// For standard output.
    pub(crate) results: String,
    /// For standard error.
    pub(crate) diagnostics: String,
    /// Exit status.
    pub(crate) status: u8,
}

impl Outcome {
    pub(crate) fn results(results: String) -> Self {
        Outcome {
            results,
            ..Outcome::default()
        }
    }

    pub(crate) fn failed(status: u8, message: &str) -> Self {
        Outcome {
            diagnostics: format!("{}\n", message.trim_end()),
            status,
            ..Outcome::default()
        }
    }

    pub(crate) fn usage(message: &str) -> Self {
        Outcome::failed(BAD_USAGE, message)
    }

    /// Prints and gives the exit status. A reader that goes away early (`… | head`) is no failure.
    pub(crate) fn print(&self) -> ExitCode {
        let _ = std::io::stdout().write_all(self.results.as_bytes());
        let _ = std::io::stdout().flush();
        let _ = std::io::stderr().write_all(self.diagnostics.as_bytes());
        ExitCode::from(self.status)
    }
}
