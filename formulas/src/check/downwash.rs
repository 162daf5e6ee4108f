//! Downwash: a sheet takes it by one function, since each stands for all of it.

use super::Checker;
use crate::names::located;
use crate::problem::Fault;
use crate::span::Span;

/// The functions that give the whole downwash of a wing at its tail: of the far wake, and by DATCOM.
const FUNCTIONS: [&str; 2] = ["downwash_angle", "downwash_slope"];

/// A call of one of them.
pub(crate) struct DownwashAsked {
    function: &'static str,
    statement: usize,
    span: Span,
}

impl Checker<'_> {
    /// Remembers a call that gives a downwash.
    pub(crate) fn note_downwash(&mut self, function: &'static str, span: Span) {
        if FUNCTIONS.contains(&function) {
            let statement = self.statement;
            self.downwash_asked.push(DownwashAsked {
                function,
                statement,
                span,
            });
        }
    }

    /// Advice where a sheet takes downwash by both.
    pub(super) fn advise_downwash(&mut self) {
        self.downwash_asked
            .sort_by_key(|a| (a.statement, a.span.start));
        let Some(first) = self.downwash_asked.first() else {
            return;
        };
        let later = self
            .downwash_asked
            .iter()
            .find(|asked| asked.function != first.function);
        if let Some(later) = later {
            let fault = Fault::DownwashTwice {
                function: later.function.to_string(),
                other: first.function.to_string(),
            };
            self.problems
                .push(located(later.statement, later.span, fault));
        }
    }
}
