//! A line of the title block below other statements.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "title-late",
    severity: Severity::Error,
    what: "The lines of the title block stand before everything but blank lines and asides.",
    why: "Whoever signs a sheet looks for its title, revision and basis at the top, all together.",
    example: Some("S [ft^2] = 142\nrevision C\n"),
    fixed: Some("revision C\nS [ft^2] = 142\n"),
};

pub(super) fn draft(word: &str) -> Draft {
    Draft::says(format!(
        "The line {} belongs to the title block, before all other statements.",
        quoted(word)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_word() {
        let fault = Fault::TitleLate {
            word: "revision".to_owned(),
        };
        let message =
            "The line “revision” belongs to the title block, before all other statements.";
        check("revision C", "revision", fault, message, &[]);
    }
}
