//! A labelled list that leaves out a label.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::listed;

pub(super) const ROW: Code = Code {
    code: "label-missing",
    severity: Severity::Error,
    what: "A labelled list has a value for each label of its axis; one left out on purpose is none or excluded.",
    why: "A case forgotten in one list would be missing from every result.",
    example: Some("vary cg: fwd | aft\nx [ft] by cg = fwd: 5.95\n"),
    fixed: Some("vary cg: fwd | aft\nx [ft] by cg = fwd: 5.95 | aft: none\n"),
};

pub(super) fn draft(symbol: &str, axis: &str, labels: &[String]) -> Draft {
    Draft::says(format!(
        "{symbol} has no value for {} of {axis}.",
        listed(labels, "and")
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    #[test]
    fn names_the_labels() {
        let fault = Fault::LabelMissing {
            symbol: "x".to_owned(),
            axis: "cg".to_owned(),
            labels: names(&["mid", "aft"]),
        };
        check(
            "x [ft] by cg = fwd: 5.95",
            "x",
            fault,
            "x has no value for mid and aft of cg.",
            &[],
        );
    }
}
