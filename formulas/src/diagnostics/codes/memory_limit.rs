//! A line that needs more memory than there is.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "memory-limit",
    severity: Severity::Error,
    what: "The values of a line fit into memory.",
    why: "The line is left without values, so that the rest of the sheet is still worked out.",
    example: None,
    fixed: None,
};

pub(super) fn draft(symbol: &str) -> Draft {
    Draft::says(format!(
        "{symbol} needs more memory than there is; it is left without values."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_symbol() {
        let fault = Fault::MemoryLimit {
            symbol: "y".to_owned(),
        };
        check(
            "y = a*b",
            "y",
            fault,
            "y needs more memory than there is; it is left without values.",
            &[],
        );
    }
}
