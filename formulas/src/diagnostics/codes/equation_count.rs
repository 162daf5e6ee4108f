//! Unknowns and equations that differ in number.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::counted;

pub(super) const ROW: Code = Code {
    code: "equation-count",
    severity: Severity::Error,
    what: "A statement has as many equations as unknowns.",
    why: "With fewer there is no single solution, with more there is none.",
    example: Some("unknown x between 0 and 3, y between 0 and 3 such that x + y = 2\n"),
    fixed: Some("unknown x between 0 and 3, y between 0 and 3 such that x + y = 2 and x - y = 1\n"),
};

pub(super) fn draft(unknowns: usize, equations: usize) -> Draft {
    let (unknowns, equations) = (
        counted(unknowns as u64, "unknown"),
        counted(equations as u64, "equation"),
    );
    Draft::says(format!(
        "This statement has {unknowns} and {equations}; there are to be as many of one as of the other."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn counts_both() {
        let fault = Fault::EquationCount {
            unknowns: 2,
            equations: 1,
        };
        let message = "This statement has 2 unknowns and 1 equation; there are to be as many of one as of the other.";
        check("unknown x between 0 and 3", "unknown", fault, message, &[]);
    }
}
