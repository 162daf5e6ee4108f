//! A bracket without its other half.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "unmatched-bracket",
    severity: Severity::Error,
    what: "Every bracket that opens is closed in its statement, and every one that closes was opened.",
    why: "A bracket left out changes what a formula means, so its place is not guessed.",
    example: Some("S = 2*(3 + 4\n"),
    fixed: Some("S = 2*(3 + 4)\n"),
};

pub(super) fn unclosed(bracket: char) -> Draft {
    Draft::says(format!("The bracket “{bracket}” is not closed."))
}

pub(super) fn unopened(site: &Site<'_>, bracket: char) -> Draft {
    Draft::says(format!("The bracket “{bracket}” closes none that is open."))
        .offers(format!("Take “{bracket}” out"), site.replace(""))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn an_open_bracket_is_named() {
        let fault = Fault::UnclosedBracket { bracket: '(' };
        check(
            "S = 2*(3 + 4",
            "(",
            fault,
            "The bracket “(” is not closed.",
            &[],
        );
    }

    #[test]
    fn a_closing_bracket_too_many_can_be_taken_out() {
        check(
            "S = 2*(3 + 4))",
            ")",
            Fault::UnopenedBracket { bracket: ')' },
            "The bracket “)” closes none that is open.",
            &[("Take “)” out", false, "S = 2*(3 + 4)")],
        );
    }
}
