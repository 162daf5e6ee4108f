//! A text without its closing quotation mark.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "unclosed-text",
    severity: Severity::Error,
    what: "A text in quotation marks ends on the line on which it begins.",
    why: "Without the second mark nobody can tell where the text stops and the formula goes on.",
    example: Some("s = thin_section(\"2412)\n"),
    fixed: Some("s = thin_section(\"2412\")\n"),
};

pub(super) fn draft() -> Draft {
    Draft::says("The text that begins here has no closing quotation mark.")
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn asks_for_the_closing_mark() {
        let message = "The text that begins here has no closing quotation mark.";
        check(
            "s = thin_section(\"2412)",
            "\"2412)",
            Fault::UnclosedText,
            message,
            &[],
        );
    }
}
