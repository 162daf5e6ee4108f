//! A tolerance inside a formula.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "tolerance-place",
    severity: Severity::Error,
    what: "A tolerance stands outermost in an input, a list value or a cell.",
    why: "Each tolerance belongs to one thing that was measured or assumed; the formulas then carry it on by themselves.",
    example: Some("a = 2\nb = 3*(a +/- 0.1)\n"),
    fixed: Some("a = 2 +/- 0.1\nb = 3*a\n"),
};

pub(super) fn draft() -> Draft {
    Draft::says(
        "A tolerance stands at the end of an input, a list value or a cell, not inside a formula.",
    )
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn says_where_it_may_stand() {
        let message = "A tolerance stands at the end of an input, a list value or a cell, not inside a formula.";
        check(
            "b = 3*(a +/- 0.1)",
            "+/-",
            Fault::TolerancePlace,
            message,
            &[],
        );
    }
}
