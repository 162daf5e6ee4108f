//! Points of an axis that go up and down.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "axis-order",
    severity: Severity::Warning,
    what: "The points of an axis of numbers rise all along or fall all along.",
    why: "Between points in disorder nothing can be read off, and a curve through them crosses itself.",
    example: Some("table alpha [deg] | CL\n0 | 0.2\n8 | 0.9\n4 | 0.6\nend\na = max(CL)\n"),
    fixed: Some("table alpha [deg] | CL\n0 | 0.2\n4 | 0.6\n8 | 0.9\nend\na = max(CL)\n"),
};

pub(super) fn draft(axis: &str) -> Draft {
    Draft::says(format!(
        "The points of {axis} neither rise nor fall all along; nothing can be read off between them."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_axis() {
        let fault = Fault::AxisOrder {
            axis: "alpha".to_owned(),
        };
        let message = "The points of alpha neither rise nor fall all along; nothing can be read off between them.";
        check("table alpha [deg] | CL", "alpha", fault, message, &[]);
    }
}
