//! A function that makes an axis, elsewhere than alone as a right side.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "made-axis-place",
    severity: Severity::Error,
    what: "A function that makes an axis stands alone as a right side.",
    why: "The axis is named as the result of the line.",
    example: Some("x = max(section_points(\"2412\", 20).x)\n"),
    fixed: Some("s = section_points(\"2412\", 20)\nx = max(s.x)\n"),
};

pub(super) fn draft(function: &str) -> Draft {
    Draft::says(format!(
        "{function} makes an axis that is named as its result: it stands alone as a right side, as in s = {function}(…)."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn says_where_it_stands() {
        let fault = Fault::MadeAxisPlace {
            function: "section_points".to_owned(),
        };
        let message = "section_points makes an axis that is named as its result: it stands alone as a right side, as in s = section_points(…).";
        check(
            "x = 2*section_points(a)",
            "section_points",
            fault,
            message,
            &[],
        );
    }
}
