//! A formula nested too deeply.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::grouped;

pub(super) const ROW: Code = Code {
    code: "nesting-limit",
    severity: Severity::Error,
    what: "Brackets, signs, powers, else if and calls are nested at most so deep.",
    why: "No one can check a formula that deep, and reading it could exhaust the machine.",
    example: Some(
        "y = (((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((((1)))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))))\n",
    ),
    fixed: None,
};

pub(super) fn draft(limit: u32) -> Draft {
    let limit = grouped(u64::from(limit));
    Draft::says(format!(
        "More than {limit} brackets, signs or calls stand inside one another here; split the line."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_limit() {
        let message =
            "More than 200 brackets, signs or calls stand inside one another here; split the line.";
        check(
            "y = ((1))",
            "(1)",
            Fault::NestingLimit { limit: 200 },
            message,
            &[],
        );
    }
}
