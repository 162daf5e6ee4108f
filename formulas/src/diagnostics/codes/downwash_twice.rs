//! Downwash by both functions for it in one sheet.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "downwash-twice",
    severity: Severity::Advice,
    what: "A sheet takes the downwash of its wing by one function.",
    why: "Each gives all of it: that of the far wake and that of DATCOM differ by a third at usual arms, and together they count it twice.",
    example: Some(
        "e = downwash_angle(0.6, 7)\nk = downwash_slope(7, 0.6, 9 m, 2 deg, 4.4 m, 0.3 m)\n",
    ),
    fixed: Some("k = downwash_slope(7, 0.6, 9 m, 2 deg, 4.4 m, 0.3 m)\n"),
};

pub(super) fn draft(function: &str, other: &str) -> Draft {
    Draft::says(format!(
        "This sheet takes downwash by {function} here and by {other} above: each gives all of it."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_both_functions() {
        let text = "k = downwash_slope(7, 0.6, 9 m, 2 deg, 4.4 m, 0.3 m)";
        let fault = Fault::DownwashTwice {
            function: "downwash_slope".to_owned(),
            other: "downwash_angle".to_owned(),
        };
        let message = "This sheet takes downwash by downwash_slope here and by downwash_angle above: each gives all of it.";
        check(text, "downwash_slope", fault, message, &[]);
    }
}
