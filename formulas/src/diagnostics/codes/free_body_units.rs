//! A free body whose entries do not fit together.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "free-body-units",
    severity: Severity::Error,
    what: "The entries of a free body are forces at stations, axial forces at heights, and couples.",
    why: "Sums of forces and moments can be formed from nothing else.",
    example: None,
    fixed: None,
};

pub(super) fn draft(name: &str) -> Draft {
    Draft::says(format!(
        "The entries of the free body {} are to be forces at lengths, and couples that are moments.",
        quoted(name)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_free_body() {
        let fault = Fault::FreebodyUnits {
            name: "Balance".to_owned(),
        };
        let message = "The entries of the free body “Balance” are to be forces at lengths, and couples that are moments.";
        check("freebody \"Balance\": S @ x", "S @ x", fault, message, &[]);
    }
}
