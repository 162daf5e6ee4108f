//! A row longer or shorter than its table.

use crate::diagnostics::draft::{Draft, Site};
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

pub(super) fn draft(site: &Site<'_>, expected: usize, found: usize) -> Draft {
    // Of a table with several keys the keys before the first bar may be the ones that do not fit.
    let keys = !site.typed().contains('|') && site.behind().trim_start().starts_with('|');
    let noun = if keys { "key" } else { "entry" };
    let (has, due) = (counted(found as u64, noun), grouped(expected as u64));
    Draft::says(format!(
        "This row has {has}, and the first line of its table has {due}."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn says(text: &str, part: &str, found: usize, message: &str) {
        check(
            text,
            part,
            Fault::RowLength { expected: 3, found },
            message,
            &[],
        );
    }

    #[test]
    fn counts_the_entries() {
        says(
            "A",
            "A",
            1,
            "This row has 1 entry, and the first line of its table has 3.",
        );
        says(
            "A | 55",
            "A | 55",
            2,
            "This row has 2 entries, and the first line of its table has 3.",
        );
    }

    #[test]
    fn counts_the_keys() {
        says(
            "up, 4 | 1.2",
            "up, 4",
            2,
            "This row has 2 keys, and the first line of its table has 3.",
        );
        says(
            "up | 1.2",
            "up",
            1,
            "This row has 1 key, and the first line of its table has 3.",
        );
    }
}
