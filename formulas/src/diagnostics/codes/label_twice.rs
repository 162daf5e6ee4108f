//! A label given twice.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "label-twice",
    severity: Severity::Error,
    what: "The labels of an axis are all different, and a list or table has each once.",
    why: "Two values for one label leave open which counts.",
    example: Some("vary cg: fwd | aft | fwd\n"),
    fixed: Some("vary cg: fwd | mid | aft\n"),
};

pub(super) fn draft(axis: &str, label: &str) -> Draft {
    Draft::says(format!(
        "The label {} of {axis} is given twice.",
        quoted(label)
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_label() {
        let fault = Fault::LabelTwice {
            axis: "cg".to_owned(),
            label: "fwd".to_owned(),
        };
        check(
            "vary cg: fwd | aft | fwd",
            "fwd",
            fault,
            "The label “fwd” of cg is given twice.",
            &[],
        );
    }
}
