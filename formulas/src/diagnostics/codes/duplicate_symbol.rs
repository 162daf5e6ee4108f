//! A name given twice.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "duplicate-symbol",
    severity: Severity::Error,
    what: "Each symbol, axis and other sheet has a name of its own, and so has each function.",
    why: "With two values for one symbol nobody could tell which of them a result rests on; the first stands.",
    example: Some("S [ft^2] = 142\nS [ft^2] = 150\n"),
    fixed: Some("S [ft^2] = 142\nS_w [ft^2] = 150\n"),
};

pub(super) fn draft(name: &str, first_line: u32) -> Draft {
    Draft::says(format!(
        "{name} is already given in line {first_line}, and the first definition stands."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_first_line() {
        let fault = Fault::Duplicate {
            name: "S".to_owned(),
            first_line: 4,
        };
        check(
            "S [ft^2] = 150",
            "S",
            fault,
            "S is already given in line 4, and the first definition stands.",
            &[],
        );
    }
}
