//! An if without else.

use crate::diagnostics::draft::{Draft, Site, put_behind};
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "if-without-else",
    severity: Severity::Error,
    what: "Every if says with else what holds otherwise.",
    why: "A condition that is not met would leave the value to chance.",
    example: Some("a = 1\nb = if a > 0 then 2\n"),
    fixed: Some("a = 1\nb = if a > 0 then 2 else 3\n"),
};

pub(super) fn draft(site: &Site<'_>) -> Draft {
    let draft = Draft::says("This if does not say what holds otherwise: else is missing.");
    if site.typed().starts_with("if") && site.typed().contains("then") {
        draft.offers("Add else none", put_behind(site.span, " else none"))
    } else {
        draft
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    const MESSAGE: &str = "This if does not say what holds otherwise: else is missing.";

    #[test]
    fn offers_none_for_the_rest() {
        let fixes = [("Add else none", false, "b = if a > 0 then 2 else none")];
        check(
            "b = if a > 0 then 2",
            "if a > 0 then 2",
            Fault::IfWithoutElse,
            MESSAGE,
            &fixes,
        );
    }

    #[test]
    fn offers_nothing_where_the_end_is_unknown() {
        check(
            "b = if a > 0 then 2",
            "if",
            Fault::IfWithoutElse,
            MESSAGE,
            &[],
        );
    }
}
