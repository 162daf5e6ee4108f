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
    let sign = mend.as_ref().map_or("*", |mend| mend.text.trim());
    let due = match sign {
        "." => "units are joined by a point",
        _ => "a product is written with *",
    };
    let typed = short(site.typed());
    let place = if typed.is_empty() {
        "here".to_owned()
    } else {
        format!("before {}", quoted(&typed))
    };
    let draft = Draft::says(format!("A sign is missing {place}: {due}."));
    match mend {
        Some(mend) => draft.offers(format!("Put in {}", quoted(sign)), mend.clone()),
        None => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, place};
    use crate::problem::{Fault, Mend};

    fn offers(
        text: &str,
        part: &str,
        gap: &str,
        sign: &str,
        message: &str,
        title: &str,
        mended: &str,
    ) {
        let mend = Mend {
            span: place(text, gap),
            text: sign.to_owned(),
        };
        check(
            text,
            part,
            Fault::ImpliedProduct { mend: Some(mend) },
            message,
            &[(title, false, mended)],
        );
    }

    #[test]
    fn offers_the_sign() {
        let message = "A sign is missing before “(”: a product is written with *.";
        offers(
            "b = 3 (a)",
            "(",
            " ",
            "*",
            message,
            "Put in “*”",
            "b = 3*(a)",
        );
        let message = "A sign is missing before “lb”: units are joined by a point.";
        offers(
            "M = 5 ft lb",
            "lb",
            " ",
            ".",
            message,
            "Put in “.”",
            "M = 5 ft.lb",
        );
    }

    #[test]
    fn does_without_a_text_or_a_mend() {
        let message = "A sign is missing here: a product is written with *.";
        check(
            "b = S c",
            "",
            Fault::ImpliedProduct { mend: None },
            message,
            &[],
        );
    }
}
