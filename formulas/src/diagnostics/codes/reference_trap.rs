//! Arguments that a method takes, but that are seldom meant.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{first_conditions, in_conditions};
use crate::problem::Conditions;

pub(super) const ROW: Code = Code {
    code: "reference-trap",
    severity: Severity::Advice,
    what: "Coefficients have the sign and the size that sections and wings have.",
    why: "A moment coefficient with a lost sign, or next to nought, makes a tail load look smaller than it is.",
    example: Some("M = pitching_moment(-0.01, 1500 Pa, 12 m^2, 1.2 m)\n"),
    fixed: Some("M = pitching_moment(-0.05, 1500 Pa, 12 m^2, 1.2 m)\n"),
};

pub(super) fn draft(function: &str, text: &str, conditions: &Conditions) -> Draft {
    let (count, first) = (in_conditions(conditions), first_conditions(conditions));
    Draft::says(format!(
        "Look at what {function} is given{count}{first}: {text}."
    ))
    .about(conditions)
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, conditions};
    use crate::problem::{Conditions, Fault};

    #[test]
    fn says_what_is_suspect_and_where() {
        let fault = |conditions| Fault::ReferenceTrap {
            function: "pitching_moment".to_owned(),
            text: "a moment coefficient next to 0 (here Cm -0.01)".to_owned(),
            conditions,
        };
        let rest = "a moment coefficient next to 0 (here Cm -0.01).";
        let one = Conditions {
            count: 1,
            first: vec![vec![]],
        };
        let (text, place) = ("M = pitching_moment(Cm, q, S, c)", "pitching_moment");
        let message = format!("Look at what pitching_moment is given: {rest}");
        check(text, place, fault(one), &message, &[]);
        let message = format!(
            "Look at what pitching_moment is given in 2 conditions (point A, cg aft; …): {rest}"
        );
        check(
            text,
            place,
            fault(conditions(2, &[("A", "aft")])),
            &message,
            &[],
        );
    }
}
