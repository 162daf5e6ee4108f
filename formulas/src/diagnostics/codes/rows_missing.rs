//! A table that leaves out labels of its axis.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::listed;

pub(super) const ROW: Code = Code {
    code: "rows-missing",
    severity: Severity::Advice,
    what: "A table that fills an axis has a row for each of its labels.",
    why: "What it leaves out has no value, and neither has what rests on it.",
    example: Some("vary flap: up | land\ntable flap | CL_max\nup | 1.4\nend\n"),
    fixed: Some("vary flap: up | land\ntable flap | CL_max\nup | 1.4\nland | 1.9\nend\n"),
};

pub(super) fn draft(axis: &str, labels: &[String]) -> Draft {
    Draft::says(format!(
        "This table has no row for {} of {axis}: no value stands there.",
        listed(labels, "and")
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    #[test]
    fn names_the_labels() {
        let fault = Fault::RowsMissing {
            axis: "flap".to_owned(),
            labels: names(&["take-off", "land"]),
        };
        let message = "This table has no row for take-off and land of flap: no value stands there.";
        check("table flap | CL_max", "flap", fault, message, &[]);
    }
}
