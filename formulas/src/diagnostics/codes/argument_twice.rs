//! An argument given twice.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "argument-twice",
    severity: Severity::Error,
    what: "Each argument is given once, by its position or by its name.",
    why: "Of two values for one argument nobody could tell which one counts.",
    example: Some("y = clamp(4, 1, 3, x: 2)\n"),
    fixed: Some("y = clamp(4, 1, 3)\n"),
};

pub(super) fn draft(function: &str, name: &str) -> Draft {
    Draft::says(format!("The argument {name} of {function} is given twice."))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_argument() {
        let fault = Fault::ArgumentTwice {
            function: "clamp".to_owned(),
            name: "x".to_owned(),
        };
        check(
            "y = clamp(4, 1, 3, x: 2)",
            "x",
            fault,
            "The argument x of clamp is given twice.",
            &[],
        );
    }
}
