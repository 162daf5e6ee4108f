//! A dimension with powers out of bounds.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "dimension-limit",
    severity: Severity::Error,
    what: "The powers of length, mass, time and the rest stay within what can be kept exactly.",
    why: "Powers that large come from a slip, such as one power typed inside another.",
    example: Some("x [ft] = 3\ny = x^2000000000*x^2000000000\n"),
    fixed: Some("x [ft] = 3\ny = x^2*x^2\n"),
};

pub(super) fn draft() -> Draft {
    Draft::says("The units of this line come to powers too large to be kept.")
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn says_so() {
        let message = "The units of this line come to powers too large to be kept.";
        check("y = x^2000000000", "^", Fault::DimensionLimit, message, &[]);
    }
}
