//! A point of an axis that is no plain number.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::short;

pub(super) const ROW: Code = Code {
    code: "axis-numbers",
    severity: Severity::Error,
    what: "The points of an axis of numbers are numbers and units only.",
    why: "Which conditions there are never depends on a result.",
    example: Some("b [m] = 10\nvary y [m]: 0 to b step 1\n"),
    fixed: Some("vary y [m]: 0 to 10 step 1\n"),
};

pub(super) fn draft(site: &Site<'_>, axis: &str) -> Draft {
    let typed = short(site.typed());
    let not = if typed.is_empty() {
        String::new()
    } else {
        format!(", and {typed} is more than that")
    };
    Draft::says(format!(
        "The points of {axis} are numbers and units only{not}."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_axis() {
        let fault = || Fault::AxisNumbers {
            axis: "y".to_owned(),
        };
        let text = "vary y [m]: 0 to b step 1";
        check(
            text,
            "b",
            fault(),
            "The points of y are numbers and units only, and b is more than that.",
            &[],
        );
        check(
            text,
            "",
            fault(),
            "The points of y are numbers and units only.",
            &[],
        );
    }
}
