//! Steps of an axis that do not meet its end, which is left out.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "axis-end-left-out",
    severity: Severity::Advice,
    what: "The last step of an axis of numbers meets the end that is written.",
    why: "The end is left out where steps pass over it, and it is often the condition that governs.",
    example: Some("vary y [m]: 0 to 10 step 3\n"),
    fixed: Some("vary y [m]: 0 to 10 step 2.5\n"),
};

pub(super) fn draft(_: &Site<'_>, axis: &str, last: &str, end: &str) -> Draft {
    Draft::says(format!(
        "{axis} stops at {last}: its steps do not meet {end}, which is left out."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_last_point_and_the_end() {
        check(
            "vary y [m]: 0 to 10 step 3",
            "3",
            Fault::AxisEndLeftOut {
                axis: "y".to_owned(),
                last: "9 m".to_owned(),
                end: "10 m".to_owned(),
            },
            "y stops at 9 m: its steps do not meet 10 m, which is left out.",
            &[],
        );
    }
}
