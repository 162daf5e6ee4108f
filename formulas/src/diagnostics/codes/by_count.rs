//! A list with more or fewer values than its axis has labels.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{counted, listed};

pub(super) const ROW: Code = Code {
    code: "by-count",
    severity: Severity::Error,
    what: "A list by an axis has a value for each label.",
    why: "With one value too few, a case would be missing from every result.",
    example: Some("vary loading: light | gross\nW [lb] by loading = 430 | 500 | 560\n"),
    fixed: Some("vary loading: light | gross\nW [lb] by loading = 430 | 560\n"),
};

pub(super) fn draft(symbol: &str, axis: &str, labels: &[String], found: usize) -> Draft {
    let has = counted(labels.len() as u64, "label");
    let given = counted(found as u64, "value");
    Draft::says(format!(
        "{axis} has {has} ({}), and {symbol} has {given}.",
        listed(labels, "and")
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    #[test]
    fn counts_both() {
        let fault = Fault::ByCount {
            symbol: "W".to_owned(),
            axis: "loading".to_owned(),
            labels: names(&["light", "gross"]),
            found: 3,
        };
        let message = "loading has 2 labels (light and gross), and W has 3 values.";
        check(
            "W [lb] by loading = 430 | 500 | 560",
            "W",
            fault,
            message,
            &[],
        );
    }
}
