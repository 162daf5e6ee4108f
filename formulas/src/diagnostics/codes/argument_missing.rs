//! An argument that is not given.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "argument-missing",
    severity: Severity::Error,
    what: "Every argument without a value of its own is given.",
    why: "No value is guessed for it.",
    example: Some("M = pitching_moment(-0.05, 20 psf, c: 4.6 ft)\n"),
    fixed: Some("M = pitching_moment(-0.05, 20 psf, 142 ft^2, c: 4.6 ft)\n"),
};

pub(super) fn draft(function: &str, name: &str) -> Draft {
    Draft::says(format!("The argument {name} of {function} is missing."))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_argument() {
        let fault = Fault::ArgumentMissing {
            function: "pitching_moment".to_owned(),
            name: "S".to_owned(),
        };
        let text = "M = pitching_moment(-0.05, 20 psf, c: 4.6 ft)";
        check(
            text,
            "pitching_moment",
            fault,
            "The argument S of pitching_moment is missing.",
            &[],
        );
    }
}
