//! Sheets that use one another without end.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "sheet-depth",
    severity: Severity::Error,
    what: "A sheet uses others that use others, down to a limit.",
    why: "Nobody could follow a value through more sheets than that.",
    example: None,
    fixed: None,
};

pub(super) fn draft(limit: usize) -> Draft {
    Draft::says(format!(
        "Sheets use one another more than {limit} deep here; what lies deeper is not read."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_limit() {
        check(
            "use \"h\" as h",
            "\"h\"",
            Fault::SheetDepth { limit: 16 },
            "Sheets use one another more than 16 deep here; what lies deeper is not read.",
            &[],
        );
    }
}
