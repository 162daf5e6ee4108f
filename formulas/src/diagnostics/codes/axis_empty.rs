//! An axis without a point.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "axis-empty",
    severity: Severity::Error,
    what: "An axis has at least one label or point.",
    why: "Over an axis without points there is nothing to work out.",
    example: Some("table point | V\nend\n"),
    fixed: Some("table point | V\nA | 2\nend\n"),
};

pub(super) fn draft(axis: &str) -> Draft {
    Draft::says(format!("The axis {axis} has no points."))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_axis() {
        let fault = Fault::AxisEmpty {
            axis: "y".to_owned(),
        };
        check(
            "vary y [m]: 0 to 10 step -1",
            "y",
            fault,
            "The axis y has no points.",
            &[],
        );
    }
}
