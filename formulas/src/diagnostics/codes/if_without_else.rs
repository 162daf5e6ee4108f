//! An if without else.

use crate::diagnostics::draft::{Draft, Site, put};
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
    match site.end_of_part() {
        Some(end) => draft.offers("Add else none", put(end, " else none")),
        None => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    const MESSAGE: &str = "This if does not say what holds otherwise: else is missing.";

    fn offers(text: &str, mended: &str) {
        let fixes = [("Add else none", false, mended)];
        check(text, "if", Fault::IfWithoutElse, MESSAGE, &fixes);
    }

    #[test]
    fn offers_none_for_the_rest() {
        offers("b = if a > 0 then 2\n", "b = if a > 0 then 2 else none\n");
        offers(
            "b = if a > 0 then 2 ; remark\n",
            "b = if a > 0 then 2 else none ; remark\n",
        );
        offers(
            "b = max(if a = f(1, 2) then 2, 3)",
            "b = max(if a = f(1, 2) then 2 else none, 3)",
        );
        offers(
            "b by c = if d = \",|\" then 2 | 3",
            "b by c = if d = \",|\" then 2 else none | 3",
        );
    }

    #[test]
    fn offers_nothing_where_the_end_is_unknown() {
        let text = "b = if a > 0 then ; remark\n 2\n";
        check(text, "if", Fault::IfWithoutElse, MESSAGE, &[]);
    }
}
