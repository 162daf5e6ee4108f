//! An if inside arithmetic without brackets.

use crate::diagnostics::draft::{Draft, Site, put, put_before};
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "if-in-arithmetic",
    severity: Severity::Error,
    what: "An if stands alone as a right side, argument, list value, cell or branch; elsewhere it stands in brackets.",
    why: "Without brackets one cannot see whether what follows belongs to the last branch.",
    example: Some("a = 1\nb = 2 + if a > 0 then 2 else 3\n"),
    fixed: Some("a = 1\nb = 2 + (if a > 0 then 2 else 3)\n"),
};

pub(super) fn draft(site: &Site<'_>) -> Draft {
    let draft = Draft::says("Inside arithmetic an if stands in brackets.");
    match site.end_of_part() {
        Some(end) => {
            let around = vec![put_before(site.span, "("), put(end, ")")];
            draft.fix("Put it in brackets", false, around)
        }
        None => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    const MESSAGE: &str = "Inside arithmetic an if stands in brackets.";

    #[test]
    fn offers_the_brackets() {
        let text = "b = 2 + if a > 0 then 2 else 3 ; remark\n";
        let mended = "b = 2 + (if a > 0 then 2 else 3) ; remark\n";
        let fixes = [("Put it in brackets", false, mended)];
        check(text, "if", Fault::IfPlace, MESSAGE, &fixes);
    }

    #[test]
    fn offers_nothing_where_the_end_is_unknown() {
        let text = "b = 2 + if a > 0 then 2 else ; remark\n 3\n";
        check(text, "if", Fault::IfPlace, MESSAGE, &[]);
    }
}
