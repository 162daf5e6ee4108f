//! A figure with too many curves or points.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::grouped_f64;

pub(super) const ROW: Code = Code {
    code: "figure-limit",
    severity: Severity::Error,
    what: "A figure has at most so many curves, and so many points in all of them together.",
    why: "Nobody can tell more curves apart, and every point takes room in the report.",
    example: Some(
        "vary x [m]: 0 to 3 step 1\nvary k [1]: 1 to 201 step 1\ny = k*x\nfigure \"Lines\": y against x each k\n",
    ),
    fixed: Some(
        "vary x [m]: 0 to 3 step 1\nvary k [1]: 1 to 201 step 50\ny = k*x\nfigure \"Lines\": y against x each k\n",
    ),
};

pub(super) fn draft(what: &str, found: f64, limit: f64) -> Draft {
    let (found, limit) = (grouped_f64(found), grouped_f64(limit));
    Draft::says(format!(
        "The figure would have {found} {what}; it has at most {limit}."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_count_and_limit() {
        let fault = Fault::FigureLimit {
            what: "curves",
            found: 1201.0,
            limit: 200.0,
        };
        check(
            "figure \"Lines\": y against x each k",
            "figure",
            fault,
            "The figure would have 1,201 curves; it has at most 200.",
            &[],
        );
    }
}
