//! A point given twice on an axis of numbers.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::short;

pub(super) const ROW: Code = Code {
    code: "axis-point-twice",
    severity: Severity::Error,
    what: "The points of an axis of numbers are all different.",
    why: "Between two equal points nothing can be read off, and picking one would find two.",
    example: Some("vary alpha [deg]: 0 | 5 | 5\n"),
    fixed: Some("vary alpha [deg]: 0 | 5 | 10\n"),
};

pub(super) fn draft(axis: &str, value: &str) -> Draft {
    Draft::says(format!("{axis} has the point {} twice.", short(value)))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_point() {
        let fault = Fault::AxisPointTwice {
            axis: "alpha".to_owned(),
            value: "5 deg".to_owned(),
        };
        check(
            "vary alpha [deg]: 0 | 5 | 5",
            "5",
            fault,
            "alpha has the point 5 deg twice.",
            &[],
        );
    }
}
