//! Texts that name the labels of an axis, and are not typed as such.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "made-axis-texts",
    severity: Severity::Error,
    what: "The texts that become labels of an axis are typed in a column or list.",
    why: "Which conditions there are never depends on a result.",
    example: None,
    fixed: None,
};

pub(super) fn draft(function: &str, argument: &str) -> Draft {
    Draft::says(format!(
        "{argument} of {function} names the labels of an axis: it is a column of a table or a list by axis, with texts in quotes typed in it."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn says_what_it_may_be() {
        let fault = Fault::MadeAxisTexts {
            function: "lifting_surfaces".to_owned(),
            argument: "surface".to_owned(),
        };
        let message = "surface of lifting_surfaces names the labels of an axis: it is a column of a table or a list by axis, with texts in quotes typed in it.";
        check("w = lifting_surfaces(a)", "a", fault, message, &[]);
    }
}
