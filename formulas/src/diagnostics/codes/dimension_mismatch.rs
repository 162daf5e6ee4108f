//! Two dimensions that do not go together.

use crate::diagnostics::draft::{Draft, put_behind};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{behind_number, cannot, with_what};
use crate::problem::Operand;

pub(super) const ROW: Code = Code {
    code: "dimension-mismatch",
    severity: Severity::Error,
    what: "What is added, compared or chosen between has one dimension.",
    why: "A force is never added to a length; somewhere a factor is missing.",
    example: Some("P [lb] = 120\nx [ft] = 4\ny = P + x\n"),
    fixed: Some("P [lb] = 120\nx [ft] = 4\ny = P*x\n"),
};

pub(super) fn draft(sign: &str, left: &Operand, right: &Operand) -> Draft {
    let message = format!(
        "{} and {} {}.",
        with_what(left),
        with_what(right),
        cannot(sign)
    );
    let draft = with_unit(Draft::says(message), left, right);
    with_unit(draft, right, left)
}

/// A bare number beside a quantity has probably lost its unit.
fn with_unit(draft: Draft, number: &Operand, other: &Operand) -> Draft {
    let bare = number
        .text
        .starts_with(|c: char| c.is_ascii_digit() || c == '.')
        && number.text.parse::<f64>().is_ok();
    match &other.unit {
        Some(unit) if bare && !other.dimension.is_number() => {
            let unit = behind_number(unit);
            draft.offers(
                format!("Write {}{unit}", number.text),
                put_behind(number.span, unit),
            )
        }
        _ => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, operand};
    use crate::problem::{Fault, Operand};
    use engine::quantity::Dimension;

    fn mismatch(sign: &str, left: Operand, right: Operand) -> Fault {
        Fault::DimensionMismatch {
            sign: sign.to_owned(),
            left,
            right,
        }
    }

    #[test]
    fn names_both_sides() {
        let text = "y = P + x";
        let force = || operand(text, "P", Dimension::FORCE, Some("lb"));
        let length = || operand(text, "x", Dimension::LENGTH, Some("ft"));
        for (sign, cannot) in [
            ("+", "cannot be added"),
            ("-", "cannot be subtracted"),
            ("<=", "cannot be compared"),
            ("if", "cannot be the branches of one if"),
            ("max", "cannot stand side by side in max"),
        ] {
            let message = format!("P (a force, lb) and x (a length, ft) {cannot}.");
            check(text, "+", mismatch(sign, force(), length()), &message, &[]);
        }
    }

    #[test]
    fn a_bare_number_is_offered_the_unit_of_the_other_side() {
        let text = "y = x + 3";
        check(
            text,
            "+",
            mismatch(
                "+",
                operand(text, "x", Dimension::LENGTH, Some("ft")),
                operand(text, "3", Dimension::NONE, None),
            ),
            "x (a length, ft) and 3 (a pure number) cannot be added.",
            &[("Write 3 ft", false, "y = x + 3 ft")],
        );
    }

    #[test]
    fn nameless_dimensions_are_told_by_their_unit() {
        let text = "y = S*S*S - x";
        let left = operand(text, "S*S*S", Dimension::of(6, 0, 0, 0, 0), Some("ft^6"));
        let right = operand(text, "x", Dimension::LENGTH, None);
        check(
            text,
            "-",
            mismatch("-", left, right),
            "S*S*S (in ft^6) and x (a length) cannot be subtracted.",
            &[],
        );
    }
}
