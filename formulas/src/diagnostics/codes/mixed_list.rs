//! A list with labels at some values only.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "mixed-list",
    severity: Severity::Error,
    what: "In a list by an axis either every value has its label or none has.",
    why: "A value without a label among labelled ones could belong to any that is left.",
    example: Some("vary cg: fwd | aft\nx [ft] by cg = fwd: 5.95 | 6.45\n"),
    fixed: Some("vary cg: fwd | aft\nx [ft] by cg = fwd: 5.95 | aft: 6.45\n"),
};

pub(super) fn draft() -> Draft {
    Draft::says(
        "Some values of this list have a label and some have none: label all of them or none.",
    )
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn asks_for_all_or_none() {
        let message =
            "Some values of this list have a label and some have none: label all of them or none.";
        check(
            "x [ft] by cg = fwd: 5.95 | 6.45",
            "6.45",
            Fault::MixedList,
            message,
            &[],
        );
    }
}
