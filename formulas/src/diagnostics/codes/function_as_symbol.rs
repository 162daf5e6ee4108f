//! A function used like a symbol.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "function-as-symbol",
    severity: Severity::Error,
    what: "A function is followed by its arguments in brackets.",
    why: "Without arguments it has no value.",
    example: Some("q = sqrt + 1\n"),
    fixed: Some("q = sqrt(4) + 1\n"),
};

pub(super) fn draft(name: &str) -> Draft {
    Draft::says(format!(
        "{name} is a function and has no value without its arguments in brackets."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn asks_for_arguments() {
        let fault = Fault::FunctionAsSymbol {
            name: "sqrt".to_owned(),
        };
        check(
            "q = sqrt + 1",
            "sqrt",
            fault,
            "sqrt is a function and has no value without its arguments in brackets.",
            &[],
        );
    }
}
