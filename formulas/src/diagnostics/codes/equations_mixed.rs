//! Equations that mix the conditions over which their unknown varies.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "equations-mixed",
    severity: Severity::Error,
    what: "An unknown is solved for condition by condition, so its equations look at one condition at a time.",
    why: "Where an equation takes the largest value, a sum or another label along an axis over which the unknown \
          varies itself, the conditions can only be solved together.",
    example: Some(
        "vary cg: fwd | aft\nk by cg = 1 | 2\nunknown x between 0 and 9 such that k*x = max(k*x over cg) - 1\n",
    ),
    fixed: Some(
        "vary cg: fwd | aft\nk by cg = 1 | 2\nunknown x between 0 and 9 such that max(k*x over cg) = 1\n",
    ),
};

pub(super) fn draft(symbol: &str) -> Draft {
    Draft::says(format!(
        "The equations of {symbol} look along an axis over which {symbol} itself varies; it is solved for condition by condition."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn says_that_conditions_are_solved_one_by_one() {
        let fault = Fault::UnknownCoupled {
            symbol: "x".to_owned(),
        };
        let message = "The equations of x look along an axis over which x itself varies; it is solved for condition by condition.";
        check("unknown x between 0 and 3", "x", fault, message, &[]);
    }
}
