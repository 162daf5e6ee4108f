//! A number in a form that is not read.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::quoted;

pub(super) const ROW: Code = Code {
    code: "number-form",
    severity: Severity::Error,
    what: "A number has its digits together, and digits behind its point.",
    why: "A stray blank or point inside a number is easily a typing slip, and a slip here is a factor of ten.",
    example: Some("S [ft^2] = 1 420\n"),
    fixed: Some("S [ft^2] = 1420\n"),
};

pub(super) fn draft(site: &Site<'_>, text: &str, mend: &str) -> Draft {
    let point = text.replace('.', "") == mend.replace('.', "");
    let reason = if point {
        "digits follow a decimal point"
    } else {
        "digits are not set apart in groups"
    };
    let (typed, due) = (quoted(text), quoted(mend));
    Draft::says(format!("{typed} is to be written {due}: {reason}.")).fix(
        format!("Write {mend}"),
        point || is_in_thousands(text),
        vec![site.replace(mend)],
    )
}

/// Whether the digits stand in groups of three, so that no list of numbers can be meant.
fn is_in_thousands(text: &str) -> bool {
    let whole = text.split(['.', 'e', 'E']).next().unwrap_or("");
    let mut groups = whole.split(|c: char| !c.is_ascii_digit());
    let first = groups.next().unwrap_or("");
    (1..=3).contains(&first.len()) && groups.all(|group| group.len() == 3)
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn says(typed: &str, mend: &str, reason: &str, safe: bool) {
        let fault = Fault::NumberForm {
            text: typed.to_owned(),
            mend: mend.to_owned(),
        };
        let message = format!("“{typed}” is to be written “{mend}”: {reason}.");
        let (title, mended) = (format!("Write {mend}"), format!("c = {mend} mm"));
        check(
            &format!("c = {typed} mm"),
            typed,
            fault,
            &message,
            &[(&title, safe, &mended)],
        );
    }

    #[test]
    fn a_point_without_digits_behind_it_goes() {
        for (typed, mend) in [("5.", "5"), ("5.e3", "5e3")] {
            says(typed, mend, "digits follow a decimal point", true);
        }
    }

    #[test]
    fn groups_of_three_are_closed_up() {
        let reason = "digits are not set apart in groups";
        for typed in ["12 000", "12_000", "12'000"] {
            says(typed, "12000", reason, true);
        }
        says("1,234,567.5", "1234567.5", reason, true);
    }

    #[test]
    fn other_groups_may_be_several_numbers() {
        says("1,2,3", "123", "digits are not set apart in groups", false);
    }
}
