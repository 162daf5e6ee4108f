//! Several sets of rules in one sheet.

use crate::diagnostics::draft::Draft;
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::listed;

pub(super) const ROW: Code = Code {
    code: "rules-mixed",
    severity: Severity::Advice,
    what: "A sheet takes its load factors, speeds and gusts from one set of rules, that of its basis line.",
    why: "Rules belong together: one makes up for what another asks more of.",
    example: Some("a = factor_of_safety(\"CS-VLA\")\nb = factor_of_safety(\"14 CFR 23\")\n"),
    fixed: Some("a = factor_of_safety(\"CS-VLA\")\nb = factor_of_safety(\"CS-VLA\")\n"),
};

pub(super) fn draft(rules: &[String], basis: &Option<String>) -> Draft {
    let taken = listed(rules, "and");
    Draft::says(match basis {
        Some(basis) => format!("The basis of this sheet is “{basis}”, and it takes from {taken}."),
        None => format!("This sheet takes from several sets of rules: {taken}."),
    })
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    #[test]
    fn lists_the_rules() {
        let (text, part) = ("b = factor_of_safety(\"14 CFR 23\")", "\"14 CFR 23\"");
        let fault = |basis: Option<&str>, rules| Fault::RulesMixed {
            rules: names(rules),
            basis: basis.map(str::to_owned),
        };
        let message = "This sheet takes from several sets of rules: CS-VLA and 14 CFR 23.";
        check(
            text,
            part,
            fault(None, &["CS-VLA", "14 CFR 23"]),
            message,
            &[],
        );
        let message = "The basis of this sheet is “CS-VLA 421”, and it takes from 14 CFR 23.";
        check(
            text,
            part,
            fault(Some("CS-VLA 421"), &["14 CFR 23"]),
            message,
            &[],
        );
    }
}
