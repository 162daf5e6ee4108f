//! A line of the title block given twice.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "title-twice",
    severity: Severity::Error,
    what: "The title block has each of its lines once.",
    why: "Of two revisions or two bases only one can be the one that was signed.",
    example: Some("revision B\nrevision C\n"),
    fixed: Some("revision C\n"),
};

pub(super) fn draft(word: &str) -> Draft {
    Draft::says(format!(
        "The title block has a line {} already, and that one stands.",
        quoted(word)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_word() {
        let fault = Fault::TitleTwice {
            word: "revision".to_owned(),
        };
        let message = "The title block has a line “revision” already, and that one stands.";
        check("revision C", "revision", fault, message, &[]);
    }
}
