//! A function given an axis that it does not take.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "over-not-taken",
    severity: Severity::Error,
    what: "Only functions that consume an axis are given one behind over.",
    why: "The function works condition by condition, so the axis would stay in its result.",
    example: Some("vary a: p | q\nx by a = 1 | 4\ny = sqrt(x over a)\n"),
    fixed: Some("vary a: p | q\nx by a = 1 | 4\ny = sqrt(x)\n"),
};

pub(super) fn draft(function: &str) -> Draft {
    Draft::says(format!(
        "{function} works condition by condition and takes no over."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_function() {
        let fault = Fault::OverNotTaken {
            function: "sqrt".to_owned(),
        };
        check(
            "y = sqrt(x over a)",
            "over a",
            fault,
            "sqrt works condition by condition and takes no over.",
            &[],
        );
    }
}
