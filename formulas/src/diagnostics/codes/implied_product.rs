//! Two factors with nothing between them.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{quoted, short};
use crate::problem::Mend;

pub(super) const ROW: Code = Code {
    code: "implied-product",
    severity: Severity::Error,
    what: "A product is written with its sign *; only a number and its unit stand side by side.",
    why: "Two symbols side by side may be a product or one symbol with a blank in it.",
    example: Some("a = 2\nb = 3 (a + 1)\n"),
    fixed: Some("a = 2\nb = 3*(a + 1)\n"),
};

pub(super) fn draft(site: &Site<'_>, mend: &Option<Mend>) -> Draft {
    let typed = short(site.typed());
    let draft = Draft::says(if typed.is_empty() {
        "A sign is missing here; a product is written with *.".to_owned()
    } else {
        format!(
            "A sign is missing at {}; a product is written with *.",
            quoted(&typed)
        )
    });
    match mend {
        Some(mend) => draft.offers("Put in *", mend.clone()),
        None => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, place};
    use crate::problem::{Fault, Mend};

    #[test]
    fn offers_the_sign() {
        let text = "b = 3 (a + 1)";
        let mend = Mend {
            span: place(text, " ("),
            text: "*(".to_owned(),
        };
        check(
            text,
            "3 (a + 1)",
            Fault::ImpliedProduct { mend: Some(mend) },
            "A sign is missing at “3 (a + 1)”; a product is written with *.",
            &[("Put in *", false, "b = 3*(a + 1)")],
        );
    }

    #[test]
    fn does_without_a_text_or_a_mend() {
        let message = "A sign is missing here; a product is written with *.";
        check(
            "b = S c",
            "",
            Fault::ImpliedProduct { mend: None },
            message,
            &[],
        );
    }
}
