//! A power of a quantity whose exponent is not typed in place.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{is_what, short};
use crate::problem::Operand;

pub(super) const ROW: Code = Code {
    code: "exponent-not-fixed",
    severity: Severity::Error,
    what: "The exponent of a quantity with a dimension is made of numbers only.",
    why: "With an exponent that could change, the line would have no unit of its own.",
    example: Some("S [ft^2] = 142\nn = 2\na = S^n\n"),
    fixed: Some("S [ft^2] = 142\na = S^2\n"),
};

pub(super) fn draft(base: &Operand) -> Draft {
    let text = short(&base.text);
    Draft::says(format!(
        "{text} {}, so its exponent is to be a plain number such as 2 or 0.5.",
        is_what(base)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, operand};
    use crate::problem::Fault;
    use engine::quantity::Dimension;

    #[test]
    fn names_the_base() {
        let text = "a = S^n";
        let fault = Fault::ExponentNotFixed {
            base: operand(text, "S", Dimension::AREA, Some("ft^2")),
        };
        let message =
            "S is an area (ft^2), so its exponent is to be a plain number such as 2 or 0.5.";
        check(text, "n", fault, message, &[]);
    }
}
