//! An axis that another sheet has with other labels.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "sheet-axis",
    severity: Severity::Error,
    what: "An axis of the same name in two sheets has the same labels in the same order.",
    why: "Otherwise a value would be carried into the wrong condition.",
    example: None,
    fixed: None,
};

pub(super) fn draft(sheet: &str, axis: &str) -> Draft {
    Draft::says(format!(
        "In the sheet {} the axis {axis} has other labels, or in another order, than here.",
        quoted(sheet)
    ))
}

pub(super) fn hidden(sheet: &str, axis: &str) -> Draft {
    Draft::says(format!(
        "This varies over the axis {axis} of the sheet {}, but {axis} is something else here.",
        quoted(sheet)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_sheet_and_axis() {
        let fault = Fault::SheetAxis {
            sheet: "osier-geometry".to_owned(),
            axis: "cg".to_owned(),
        };
        let message = "In the sheet “osier-geometry” the axis cg has other labels, or in another order, than here.";
        check(
            "use \"osier-geometry\" as g",
            "\"osier-geometry\"",
            fault,
            message,
            &[],
        );
    }
}
