//! An end that closes no table.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "end-without-table",
    severity: Severity::Error,
    what: "A line end stands below a table only.",
    why: "The head of its table could not be read, or the table was closed before.",
    example: Some("S [ft^2] = 142\nend\n"),
    fixed: Some("S [ft^2] = 142\n"),
};

pub(super) fn draft() -> Draft {
    Draft::says("This “end” closes no table.")
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn says_so() {
        check(
            "end",
            "end",
            Fault::EndWithoutTable,
            "This “end” closes no table.",
            &[],
        );
    }
}
