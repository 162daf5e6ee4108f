//! An input that does not say where it comes from.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "input-without-source",
    severity: Severity::Warning,
    what: "In a sheet with sources required every input has a remark.",
    why: "A number without a drawing, report or sheet behind it cannot be checked.",
    example: Some("sources required\nS [ft^2] = 142\n"),
    fixed: Some("sources required\nS [ft^2] = 142 ; drawing OS-010\n"),
};

pub(super) fn draft(symbol: &str) -> Draft {
    Draft::says(format!(
        "{symbol} has no remark that says where it comes from, and this sheet requires sources."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_symbol() {
        let fault = Fault::InputWithoutSource {
            symbol: "S".to_owned(),
        };
        let message =
            "S has no remark that says where it comes from, and this sheet requires sources.";
        check("S [ft^2] = 142", "S", fault, message, &[]);
    }
}
