//! A statement with too many operations.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::grouped;

pub(super) const ROW: Code = Code {
    code: "operator-limit",
    severity: Severity::Error,
    what: "A statement has at most so many operations, also with own functions written out.",
    why: "A short line can stand for a very long formula where own functions use one another.",
    example: Some(
        "f(x) = x + x + x + x + x + x + x + x + x + x\ng(x) = f(x) + f(x) + f(x) + f(x) + f(x) + f(x) + f(x) + f(x) + f(x) + f(x)\nh(x) = g(x) + g(x) + g(x) + g(x) + g(x) + g(x) + g(x) + g(x) + g(x) + g(x)\nk(x) = h(x) + h(x) + h(x) + h(x) + h(x) + h(x) + h(x) + h(x) + h(x) + h(x)\ny = k(1) + k(2) + k(3) + k(4) + k(5) + k(6) + k(7) + k(8) + k(9) + k(10) + k(11)\n",
    ),
    fixed: None,
};

pub(super) fn draft(limit: u32) -> Draft {
    let limit = grouped(u64::from(limit));
    Draft::says(format!(
        "This line has more than {limit} operations, own functions written out; split it."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_limit() {
        let message =
            "This line has more than 100,000 operations, own functions written out; split it.";
        check(
            "y = k(1)",
            "k(1)",
            Fault::OperatorLimit { limit: 100_000 },
            message,
            &[],
        );
    }
}
