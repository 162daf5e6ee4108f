//! A word of the language in the place of a name.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "word-as-name",
    severity: Severity::Error,
    what: "The words of the language, such as if, over and table, name no symbol, axis or parameter.",
    why: "A line that begins with such a word would be read as another statement.",
    example: Some("over [ft] = 3\n"),
    fixed: Some("overhang [ft] = 3\n"),
};

pub(super) fn draft(word: &str) -> Draft {
    Draft::says(format!(
        "{} is a word of the language and cannot be a name here.",
        quoted(word)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_word() {
        let fault = Fault::WordAsName {
            word: "over".to_owned(),
        };
        check(
            "over [ft] = 3",
            "over",
            fault,
            "“over” is a word of the language and cannot be a name here.",
            &[],
        );
    }
}
