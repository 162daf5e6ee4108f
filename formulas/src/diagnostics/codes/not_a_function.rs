//! A symbol used like a function.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::span::Span;

pub(super) const ROW: Code = Code {
    code: "not-a-function",
    severity: Severity::Error,
    what: "Only a function stands directly before a bracket.",
    why: "A product whose sign was left out looks like a call.",
    example: Some("S [ft^2] = 142\nq = S(3)\n"),
    fixed: Some("S [ft^2] = 142\nq = S*(3)\n"),
};

pub(super) fn draft(site: &Site<'_>, name: &str) -> Draft {
    let draft = Draft::says(format!(
        "{name} is a symbol and not a function; a product is written {name}*(…)."
    ));
    if site.typed().starts_with(name) {
        let behind = site.span.start + name.len() as u32;
        draft.offers(
            "Put in *",
            put(
                Span {
                    start: behind,
                    end: behind,
                },
                "*",
            ),
        )
    } else {
        draft
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn offers_the_sign() {
        let message = "S is a symbol and not a function; a product is written S*(…).";
        for part in ["S", "S(3)"] {
            let fault = Fault::NotAFunction {
                name: "S".to_owned(),
            };
            check(
                "q = S(3)",
                part,
                fault,
                message,
                &[("Put in *", false, "q = S*(3)")],
            );
        }
    }
}
