//! An axis with too many labels.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::grouped;

pub(super) const ROW: Code = Code {
    code: "label-limit",
    severity: Severity::Error,
    what: "An axis has at most so many labels or points.",
    why: "A step typed a thousand times too small would fill the machine.",
    example: Some("vary x [1]: 0 to 1 count 100001\n"),
    fixed: Some("vary x [1]: 0 to 1 count 1001\n"),
};

pub(super) fn draft(axis: &str, limit: usize, found: u64) -> Draft {
    let (limit, found) = (grouped(limit as u64), grouped(found));
    Draft::says(format!(
        "{axis} would have {found} labels; an axis has at most {limit}."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_count_and_limit() {
        let fault = Fault::LabelLimit {
            axis: "x".to_owned(),
            limit: 100_000,
            found: 100_001,
        };
        let message = "x would have 100,001 labels; an axis has at most 100,000.";
        check("vary x [1]: 0 to 1 count 100001", "x", fault, message, &[]);
    }
}
