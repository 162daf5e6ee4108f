//! Text, a number or a condition where another of these is due.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{capital, short};
use crate::problem::Mend;

pub(super) const ROW: Code = Code {
    code: "wrong-kind",
    severity: Severity::Error,
    what: "Numbers, texts and conditions each stand where they are due.",
    why: "A designation such as 2412 is a name made of digits and no number to calculate with.",
    example: Some("f = pitch_rate_angle(3.8, 90 KTAS, 11 ft, 3)\n"),
    fixed: Some("f = pitch_rate_angle(3.8, 90 KTAS, 11 ft, \"turn\")\n"),
};

pub(super) fn draft(
    site: &Site<'_>,
    place: &str,
    wanted: &str,
    found: &str,
    quote: &Option<Mend>,
) -> Draft {
    let place = capital(place);
    let typed = short(site.typed());
    let draft = Draft::says(if typed.is_empty() {
        format!("{place} is to be {wanted}, and {found} is given.")
    } else {
        format!("{place} is to be {wanted}, but {typed} is {found}.")
    });
    match quote {
        Some(mend) => draft.offers(format!("Write {}", mend.text), mend.clone()),
        None => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, place};
    use crate::problem::{Fault, Mend};

    fn kind(place: &str, wanted: &'static str, found: &'static str, quote: Option<Mend>) -> Fault {
        Fault::WrongKind {
            place: place.to_owned(),
            wanted,
            found,
            quote,
        }
    }

    #[test]
    fn a_designation_is_put_in_quotes() {
        let text = "s = thin_section(2412)";
        let quote = Mend {
            span: place(text, "2412"),
            text: "\"2412\"".to_owned(),
        };
        check(
            text,
            "2412",
            kind(
                "the argument designation of thin_section",
                "text",
                "a number",
                Some(quote),
            ),
            "The argument designation of thin_section is to be text, but 2412 is a number.",
            &[("Write \"2412\"", false, "s = thin_section(\"2412\")")],
        );
    }

    #[test]
    fn names_the_kind() {
        let message = "What stands behind if is to be a condition, but a is a number.";
        check(
            "b = if a then 1 else 2",
            "a",
            kind("what stands behind if", "a condition", "a number", None),
            message,
            &[],
        );
        let message = "a is to be a number, and text is given.";
        check(
            "a = \"x\"",
            "",
            kind("a", "a number", "text", None),
            message,
            &[],
        );
    }
}
