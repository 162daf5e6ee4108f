//! A line with too many conditions.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::grouped_f64;

pub(super) const ROW: Code = Code {
    code: "condition-limit",
    severity: Severity::Error,
    what: "A line has at most so many conditions, the product of the lengths of its axes.",
    why: "Every axis multiplies the work and the memory of all lines that vary over it.",
    example: Some("vary a [1]: 0 to 1 count 10000\nvary b [1]: 0 to 1 count 10001\ny = a*b\n"),
    fixed: Some("vary a [1]: 0 to 1 count 100\nvary b [1]: 0 to 1 count 101\ny = a*b\n"),
};

pub(super) fn draft(symbol: &str, found: f64, limit: f64) -> Draft {
    let (found, limit) = (grouped_f64(found), grouped_f64(limit));
    Draft::says(format!(
        "{symbol} would have {found} conditions; a line has at most {limit}."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_count_and_limit() {
        let fault = Fault::ConditionLimit {
            symbol: "y".to_owned(),
            found: 100_010_000.0,
            limit: 1e8,
        };
        check(
            "y = a*b",
            "y",
            fault,
            "y would have 100,010,000 conditions; a line has at most 100,000,000.",
            &[],
        );
    }
}
