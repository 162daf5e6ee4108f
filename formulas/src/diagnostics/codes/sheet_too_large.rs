//! A sheet larger than is read.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::grouped;

pub(super) const ROW: Code = Code {
    code: "sheet-too-large",
    severity: Severity::Error,
    what: "A sheet has at most so many bytes and lines; what is beyond is not read.",
    why: "Results at the end of such a sheet would be missing without a word.",
    example: None,
    fixed: None,
};

pub(super) fn size(bytes: usize, limit: usize) -> Draft {
    let (bytes, limit) = (grouped(bytes as u64), grouped(limit as u64));
    Draft::says(format!(
        "The sheet has {bytes} bytes; what is beyond {limit} is not read."
    ))
}

pub(super) fn lines(lines: usize, limit: usize) -> Draft {
    let (lines, limit) = (grouped(lines as u64), grouped(limit as u64));
    Draft::says(format!(
        "The sheet has {lines} lines; those beyond {limit} are not read."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_size_and_limit() {
        let fault = Fault::SizeLimit {
            bytes: 1_200_000,
            limit: 1_048_576,
        };
        let message = "The sheet has 1,200,000 bytes; what is beyond 1,048,576 is not read.";
        check("a = 1", "1", fault, message, &[]);
    }

    #[test]
    fn names_lines_and_limit() {
        let fault = Fault::LineLimit {
            lines: 20_001,
            limit: 20_000,
        };
        check(
            "a = 1",
            "1",
            fault,
            "The sheet has 20,001 lines; those beyond 20,000 are not read.",
            &[],
        );
    }
}
