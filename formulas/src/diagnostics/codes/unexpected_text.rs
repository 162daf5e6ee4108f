//! Something else than what was due.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "unexpected-text",
    severity: Severity::Error,
    what: "Each statement has the form that its first word or its sign = calls for.",
    why: "What does not fit the form cannot be read, and nothing is guessed into its place.",
    example: Some("S [ft^2] = * 4\n"),
    fixed: Some("S [ft^2] = 4\n"),
};

pub(super) fn draft(what: &str, found: &str) -> Draft {
    if found.trim().is_empty() {
        Draft::says(format!("The line stops where {what} is due."))
    } else {
        Draft::says(format!("{} stands where {what} is due.", quoted(found)))
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn expected(what: &'static str, found: &str) -> Fault {
        Fault::Expected {
            what,
            found: found.to_owned(),
        }
    }

    #[test]
    fn says_what_was_due() {
        check(
            "S [ft^2] = * 4",
            "*",
            expected("a value", "*"),
            "“*” stands where a value is due.",
            &[],
        );
        check(
            "vary cg: fwd |",
            "|",
            expected("a label", ""),
            "The line stops where a label is due.",
            &[],
        );
    }
}
