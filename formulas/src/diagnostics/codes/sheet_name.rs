//! Another sheet by something else than its name.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "sheet-name",
    severity: Severity::Error,
    what: "A sheet is used by its name alone, without folders or ending, and never by itself.",
    why: "A sheet moved to another machine, with those beside it, still finds them.",
    example: Some("use \"../osier-geometry\" as g\nS = g.S\n"),
    fixed: Some("S [ft^2] = 142\n"),
};

pub(super) fn draft(sheet: &str) -> Draft {
    Draft::says(format!(
        "{} is not the name of another sheet beside this one; a path is not taken.",
        quoted(sheet)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_text() {
        let fault = Fault::SheetName {
            sheet: "../a".to_owned(),
        };
        let message =
            "“../a” is not the name of another sheet beside this one; a path is not taken.";
        check("use \"../a\" as g", "\"../a\"", fault, message, &[]);
    }
}
