//! Another sheet with findings of its own.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{counted, quoted};

pub(super) const ROW: Code = Code {
    code: "sheet-findings",
    severity: Severity::Warning,
    what: "A sheet that is used has neither errors nor warnings.",
    why: "What is wrong there is carried into this sheet.",
    example: None,
    fixed: None,
};

pub(super) fn draft(sheet: &str, errors: usize, warnings: usize) -> Draft {
    let errors_counted = counted(errors as u64, "error");
    let warnings_counted = counted(warnings as u64, "warning");
    let has = match (errors, warnings) {
        (_, 0) => errors_counted,
        (0, _) => warnings_counted,
        _ => format!("{errors_counted} and {warnings_counted}"),
    };
    let draft = Draft::says(format!("The sheet {} has {has} of its own.", quoted(sheet)));
    if errors > 0 {
        draft.severity(Severity::Error)
    } else {
        draft
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::diagnostics::finding::Severity;
    use crate::problem::Fault;

    fn found(errors: usize, warnings: usize, message: &str) -> Severity {
        let fault = Fault::SheetFindings {
            sheet: "g".to_owned(),
            errors,
            warnings,
        };
        check("use \"g\" as g", "\"g\"", fault, message, &[]).severity
    }

    #[test]
    fn is_as_severe_as_what_it_counts() {
        assert_eq!(
            found(2, 1, "The sheet “g” has 2 errors and 1 warning of its own."),
            Severity::Error
        );
        assert_eq!(
            found(1, 0, "The sheet “g” has 1 error of its own."),
            Severity::Error
        );
        assert_eq!(
            found(0, 3, "The sheet “g” has 3 warnings of its own."),
            Severity::Warning
        );
    }
}
