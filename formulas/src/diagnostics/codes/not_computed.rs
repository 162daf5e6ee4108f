//! Something that is read and checked but not worked out.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "not-computed",
    severity: Severity::Advice,
    what: "Everything that a sheet asks for is worked out.",
    why: "What is not has no value, and neither has what rests on it.",
    example: None,
    fixed: None,
};

pub(super) fn draft(what: &str) -> Draft {
    Draft::says(format!("This version does not work out {what}."))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_it() {
        let fault = Fault::NotComputed {
            what: "schrenk_load".to_owned(),
        };
        check(
            "p = schrenk_load(l, c, L)",
            "schrenk_load",
            fault,
            "This version does not work out schrenk_load.",
            &[],
        );
    }
}
