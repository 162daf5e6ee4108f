//! Several sets of rules in one sheet.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::listed;

pub(super) const ROW: Code = Code {
    code: "rules-mixed",
    severity: Severity::Advice,
    what: "A sheet takes its load factors, speeds and gusts from one set of rules.",
    why: "Rules belong together: one makes up for what another asks more of.",
    example: Some("a = factor_of_safety(\"CS-VLA\")\nb = factor_of_safety(\"14 CFR 23\")\n"),
    fixed: Some("a = factor_of_safety(\"CS-VLA\")\nb = factor_of_safety(\"CS-VLA\")\n"),
};

pub(super) fn draft(rules: &[String]) -> Draft {
    Draft::says(format!(
        "This sheet takes from several sets of rules: {}.",
        listed(rules, "and")
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    #[test]
    fn lists_the_rules() {
        let fault = Fault::RulesMixed {
            rules: names(&["CS-VLA", "14 CFR 23"]),
        };
        let message = "This sheet takes from several sets of rules: CS-VLA and 14 CFR 23.";
        check(
            "b = factor_of_safety(\"14 CFR 23\")",
            "\"14 CFR 23\"",
            fault,
            message,
            &[],
        );
    }
}
