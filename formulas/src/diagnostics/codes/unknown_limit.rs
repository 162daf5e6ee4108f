//! More unknowns in a statement than can be solved for together.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "unknown-limit",
    severity: Severity::Error,
    what: "A statement solves for at most ten unknowns together.",
    why: "The size of each equation is taken from all corners of the bounds, and those double with every unknown.",
    example: None,
    fixed: None,
};

pub(super) fn draft(found: usize, limit: usize) -> Draft {
    Draft::says(format!(
        "This statement has {found} unknowns; at most {limit} are solved for together."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn says_how_many() {
        let fault = Fault::UnknownLimit {
            found: 11,
            limit: 10,
        };
        let message = "This statement has 11 unknowns; at most 10 are solved for together.";
        check("unknown x between 0 and 3", "x", fault, message, &[]);
    }
}
