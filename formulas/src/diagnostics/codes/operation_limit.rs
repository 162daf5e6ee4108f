//! A sheet that needs too many operations.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::grouped_f64;

pub(super) const ROW: Code = Code {
    code: "operation-limit",
    severity: Severity::Error,
    what: "One recalculation takes at most so many operations; they are counted and not timed.",
    why: "Every machine stops at the same place, and none for ever.",
    example: None,
    fixed: None,
};

pub(super) fn draft(limit: f64) -> Draft {
    let limit = grouped_f64(limit);
    Draft::says(format!(
        "With this line the sheet would need more than {limit} operations; it is not worked out."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_limit() {
        let message = "With this line the sheet would need more than 20,000,000,000 operations; it is not worked out.";
        check(
            "y = a*b",
            "y",
            Fault::OperationLimit { limit: 2e10 },
            message,
            &[],
        );
    }
}
