//! A method outside the range where it holds.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{first_conditions, in_conditions};
use crate::problem::Conditions;

pub(super) const ROW: Code = Code {
    code: "outside-validity",
    severity: Severity::Advice,
    what: "The arguments of a method lie where its source says that it holds.",
    why: "The value stands, but nobody has measured that far.",
    example: Some("s = lift_slope(1.2)\n"),
    fixed: Some("s = lift_slope(7)\n"),
};

pub(super) fn draft(function: &str, text: &str, conditions: &Conditions) -> Draft {
    let (count, first) = (in_conditions(conditions), first_conditions(conditions));
    let text = text.trim().trim_end_matches('.');
    Draft::says(format!(
        "{function} is used outside its range{count}{first}: {text}."
    ))
    .about(conditions)
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, conditions};
    use crate::problem::{Conditions, Fault};

    #[test]
    fn names_range_and_conditions() {
        let fault = |conditions| Fault::Validity {
            function: "lift_slope".to_owned(),
            text: "the aspect ratio is 1.2, and the method holds from 3.".to_owned(),
            conditions,
        };
        let rest = "the aspect ratio is 1.2, and the method holds from 3.";
        let one = Conditions {
            count: 1,
            first: vec![vec![]],
        };
        let message = format!("lift_slope is used outside its range: {rest}");
        check(
            "s = lift_slope(1.2)",
            "lift_slope",
            fault(one),
            &message,
            &[],
        );
        let message = format!(
            "lift_slope is used outside its range in 2 conditions (point A, cg aft; …): {rest}"
        );
        check(
            "s = lift_slope(1.2)",
            "lift_slope",
            fault(conditions(2, &[("A", "aft")])),
            &message,
            &[],
        );
    }
}
