//! A load factor with a unit.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::short;

pub(super) const ROW: Code = Code {
    code: "load-factor-unit",
    severity: Severity::Advice,
    what: "A load factor is a bare number.",
    why: "Typed so, 3.8 g is a mass of 3.8 grams, and lift would come out as mass times weight.",
    example: Some("n = 3.8 g\nL [lb] = n*560 lb\n"),
    fixed: Some("n = 3.8\nL [lb] = n*560 lb\n"),
};

pub(super) fn draft(site: &Site<'_>, text: &str, mend: &str) -> Draft {
    let draft = Draft::says(format!(
        "A load factor is a bare number: write {mend} and not {}.",
        short(text)
    ));
    match site.find(text) {
        Some(at) => draft.offers(format!("Write {mend}"), put(at, mend)),
        None => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn offers_the_bare_number() {
        let fault = Fault::LoadFactorUnit {
            text: "3.8 g".to_owned(),
            mend: "3.8".to_owned(),
        };
        let message = "A load factor is a bare number: write 3.8 and not 3.8 g.";
        check(
            "n = 3.8 g",
            "3.8 g",
            fault,
            message,
            &[("Write 3.8", false, "n = 3.8")],
        );
    }
}
