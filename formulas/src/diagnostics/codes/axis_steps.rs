//! Steps or a count that do not lead from one end of an axis to the other.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::short;

pub(super) const ROW: Code = Code {
    code: "axis-steps",
    severity: Severity::Error,
    what: "The steps of an axis lead from its first value to its last, and a count is a whole number from 1 on.",
    why: "Otherwise it cannot be told which conditions are meant.",
    example: Some("vary y [m]: 0 to 10 step -1\n"),
    fixed: Some("vary y [m]: 0 to 10 step 1\n"),
};

pub(super) fn draft(site: &Site<'_>, axis: &str) -> Draft {
    Draft::says(format!(
        "{} does not lead from the first value of {axis} to the last.",
        short(site.typed())
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_axis() {
        check(
            "vary y [m]: 0 to 10 step -1",
            "-1",
            Fault::AxisSteps {
                axis: "y".to_owned(),
            },
            "-1 does not lead from the first value of y to the last.",
            &[],
        );
    }
}
