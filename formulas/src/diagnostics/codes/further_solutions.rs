//! An unknown with more than one solution.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{first_conditions, in_conditions};
use crate::problem::Conditions;

pub(super) const ROW: Code = Code {
    code: "further-solutions",
    severity: Severity::Advice,
    what: "Between its bounds an unknown has one solution.",
    why: "The first from the lower bound is taken, and another may be the one that is meant.",
    example: Some("unknown x between -2 and 3 such that x*x = 1\n"),
    fixed: Some("unknown x between 0 and 3 such that x*x = 1\n"),
};

pub(super) fn draft(symbol: &str, conditions: &Conditions) -> Draft {
    let (count, first) = (in_conditions(conditions), first_conditions(conditions));
    Draft::says(format!("{symbol} has more than one solution between its bounds{count}{first}; the first from the lower bound is taken."))
        .about(conditions)
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, conditions};
    use crate::problem::{Conditions, Fault};

    #[test]
    fn says_which_is_taken() {
        let fault = |conditions| Fault::FurtherSolutions {
            symbol: "x".to_owned(),
            conditions,
        };
        let text = "unknown x between -2 and 3 such that x*x = 1";
        let message = "x has more than one solution between its bounds; the first from the lower bound is taken.";
        check(
            text,
            "unknown x",
            fault(Conditions {
                count: 1,
                first: vec![vec![]],
            }),
            message,
            &[],
        );
        let message = "x has more than one solution between its bounds in 3 conditions (point A, cg aft; …); the first from the lower bound is taken.";
        check(
            text,
            "unknown x",
            fault(conditions(3, &[("A", "aft")])),
            message,
            &[],
        );
    }
}
