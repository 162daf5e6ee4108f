//! Another sheet that is not there.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "missing-sheet",
    severity: Severity::Error,
    what: "A sheet that is used lies beside this one.",
    why: "All that rests on it goes without a value.",
    example: Some("use \"nowhere\" as g\nS = g.S\n"),
    fixed: Some("S [ft^2] = 142\n"),
};

pub(super) fn draft(sheet: &str) -> Draft {
    Draft::says(format!(
        "There is no sheet {} beside this one.",
        quoted(sheet)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_sheet() {
        let fault = Fault::MissingSheet {
            sheet: "nowhere".to_owned(),
        };
        check(
            "use \"nowhere\" as g",
            "\"nowhere\"",
            fault,
            "There is no sheet “nowhere” beside this one.",
            &[],
        );
    }
}
