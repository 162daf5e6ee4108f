//! A sheet with too many axes.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::grouped;

pub(super) const ROW: Code = Code {
    code: "axis-limit",
    severity: Severity::Error,
    what: "A sheet has at most so many axes.",
    why: "No result could be shown, or checked, over that many.",
    example: Some(
        "table a1, a2, a3, a4, a5, a6, a7, a8, a9, a10, a11, a12, a13, a14, a15, a16, a17, a18, a19, a20, a21, a22, a23, a24, a25, a26, a27, a28, a29, a30, a31, a32, a33, a34, a35, a36, a37, a38, a39, a40, a41, a42, a43, a44, a45, a46, a47, a48, a49, a50, a51, a52, a53, a54, a55, a56, a57, a58, a59, a60, a61, a62, a63, a64, a65 | v\nx, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x, x | 1\nend\n",
    ),
    fixed: None,
};

pub(super) fn draft(limit: usize) -> Draft {
    let limit = grouped(limit as u64);
    Draft::says(format!(
        "A sheet has at most {limit} axes; this one is beyond and does not count."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_limit() {
        let message = "A sheet has at most 64 axes; this one is beyond and does not count.";
        check(
            "vary a65: x | y",
            "a65",
            Fault::AxisLimit { limit: 64 },
            message,
            &[],
        );
    }
}
