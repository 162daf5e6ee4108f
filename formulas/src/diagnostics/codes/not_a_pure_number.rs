//! A quantity with a dimension where a pure number is due.

use crate::diagnostics::draft::{Draft, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{bracketed, capital, is_what, short};
use crate::problem::Operand;

pub(super) const ROW: Code = Code {
    code: "not-a-pure-number",
    severity: Severity::Error,
    what: "Exponents, and the arguments of functions such as exp and ln, are pure numbers.",
    why: "The exponential of three feet has no meaning; of three feet over one foot it has.",
    example: Some("x [ft] = 3\ny = exp(x)\n"),
    fixed: Some("x [ft] = 3\ny = exp(x/[ft])\n"),
};

pub(super) fn draft(place: &str, value: &Operand) -> Draft {
    let text = short(&value.text);
    let message = format!(
        "{} is to be a pure number, but {text} {}.",
        capital(place),
        is_what(value)
    );
    let draft = Draft::says(message);
    let Some(unit) = &value.unit else {
        return draft;
    };
    let over = format!("{}/[{unit}]", bracketed(&value.text));
    draft.offers(format!("Write {}", short(&over)), put(value.span, over))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, operand};
    use crate::problem::Fault;
    use engine::quantity::Dimension;

    #[test]
    fn offers_the_number_of_units() {
        let text = "y = exp(x)";
        let fault = Fault::NotANumber {
            place: "the argument of exp".to_owned(),
            value: operand(text, "x", Dimension::LENGTH, Some("ft")),
        };
        let message = "The argument of exp is to be a pure number, but x is a length (ft).";
        check(
            text,
            "x",
            fault,
            message,
            &[("Write x/[ft]", false, "y = exp(x/[ft])")],
        );
    }

    #[test]
    fn a_sum_is_bracketed() {
        let text = "y = 2^(a + b)";
        let fault = Fault::NotANumber {
            place: "the exponent".to_owned(),
            value: operand(text, "a + b", Dimension::LENGTH, Some("m")),
        };
        let message = "The exponent is to be a pure number, but a + b is a length (m).";
        check(
            text,
            "a + b",
            fault,
            message,
            &[("Write (a + b)/[m]", false, "y = 2^((a + b)/[m])")],
        );
    }
}
