//! A number in a form that is not read.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "number-form",
    severity: Severity::Error,
    what: "A number has its digits together, and digits on both sides of its point or at least behind it.",
    why: "A stray blank or point inside a number is easily a typing slip, and a slip here is a factor of ten.",
    example: Some("S [ft^2] = 1 420\n"),
    fixed: Some("S [ft^2] = 1420\n"),
};

pub(super) fn draft(site: &Site<'_>, text: &str, mend: &str) -> Draft {
    let reason = if text.ends_with('.') {
        "digits follow a decimal point"
    } else {
        "digits are not set apart in groups"
    };
    let message = format!(
        "{} is to be written {}: {reason}.",
        quoted(text),
        quoted(mend)
    );
    Draft::says(message).mends(format!("Write {mend}"), site.replace(mend))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn number(text: &str, mend: &str) -> Fault {
        Fault::NumberForm {
            text: text.to_owned(),
            mend: mend.to_owned(),
        }
    }

    #[test]
    fn a_point_without_digits_behind_it_goes() {
        check(
            "c = 5. m",
            "5.",
            number("5.", "5"),
            "“5.” is to be written “5”: digits follow a decimal point.",
            &[("Write 5", true, "c = 5 m")],
        );
    }

    #[test]
    fn groups_are_closed_up() {
        for text in ["1 000", "1_000"] {
            check(
                &format!("c = {text} mm"),
                text,
                number(text, "1000"),
                &format!("“{text}” is to be written “1000”: digits are not set apart in groups."),
                &[("Write 1000", true, "c = 1000 mm")],
            );
        }
    }
}
