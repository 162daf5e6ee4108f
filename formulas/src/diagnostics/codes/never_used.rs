//! Something given that nothing uses.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "never-used",
    severity: Severity::Advice,
    what: "Every input is used by a formula, a requirement or another statement.",
    why: "A number that changes nothing may be one that a formula forgot.",
    example: Some("S [ft^2] = 142\nc [ft] = 4.6\nrequire c > 4 ft\n"),
    fixed: Some("c [ft] = 4.6\nrequire c > 4 ft\n"),
};

pub(super) fn draft(name: &str) -> Draft {
    Draft::says(format!("{name} is given, but nothing uses it."))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_symbol() {
        let fault = Fault::NeverUsed {
            name: "S".to_owned(),
        };
        check(
            "S [ft^2] = 142",
            "S",
            fault,
            "S is given, but nothing uses it.",
            &[],
        );
    }
}
