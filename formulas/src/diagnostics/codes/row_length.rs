//! A row longer or shorter than its table.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{counted, grouped};

pub(super) const ROW: Code = Code {
    code: "row-length",
    severity: Severity::Error,
    what: "A row has as many entries as the first line of its table.",
    why: "With one left out, all that follow would stand in the wrong column.",
    example: Some("table point | V [kt] | n\nA | 55\nend\n"),
    fixed: Some("table point | V [kt] | n\nA | 55 | 3.8\nend\n"),
};

pub(super) fn draft(expected: usize, found: usize) -> Draft {
    let (has, due) = (counted(found as u64, "entry"), grouped(expected as u64));
    Draft::says(format!(
        "This row has {has}, and the first line of its table has {due}."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn counts_both() {
        for (found, message) in [
            (
                1,
                "This row has 1 entry, and the first line of its table has 3.",
            ),
            (
                2,
                "This row has 2 entries, and the first line of its table has 3.",
            ),
        ] {
            check(
                "A | 55",
                "A | 55",
                Fault::RowLength { expected: 3, found },
                message,
                &[],
            );
        }
    }
}
