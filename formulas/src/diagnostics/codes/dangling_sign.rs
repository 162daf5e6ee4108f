//! A line that stops behind a sign that asks for more.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "dangling-sign",
    severity: Severity::Error,
    what: "A line that ends in a sign goes on in the next one, unless that is blank, begins with a statement word or is a definition.",
    why: "The rest of the formula is missing, or was cut off by the line that follows.",
    example: Some("a = 2 +\nb = 3\n"),
    fixed: Some("a = 2 + 1\nb = 3\n"),
};

pub(super) fn draft(sign: &str) -> Draft {
    Draft::says(format!(
        "The line stops behind {}, and something is still due.",
        quoted(sign)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_sign() {
        let fault = Fault::Dangling {
            sign: "+".to_owned(),
        };
        check(
            "a = 2 +",
            "+",
            fault,
            "The line stops behind “+”, and something is still due.",
            &[],
        );
    }
}
