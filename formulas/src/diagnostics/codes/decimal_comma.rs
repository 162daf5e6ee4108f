//! A comma inside a number.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};

pub(super) const ROW: Code = Code {
    code: "decimal-comma",
    severity: Severity::Error,
    what: "A comma never stands directly between digits, except between arguments and between the keys of a row.",
    why: "In one country 1,225 is a little over one, in another over a thousand.",
    example: Some("V [kt] = 12,5\n"),
    fixed: Some("V [kt] = 12.5\n"),
};

pub(super) fn draft(site: &Site<'_>, text: &str, mend: &str) -> Draft {
    match grouped_reading(text) {
        None => Draft::says(format!(
            "Numbers have a decimal point here: {text} is to be written {mend}."
        ))
        .mends(format!("Write {mend}"), site.replace(mend)),
        Some(whole) => either(site, text, mend, &whole),
    }
}

/// Three digits behind the comma may be a fraction as well as thousands: only the writer knows.
fn either(site: &Site<'_>, text: &str, mend: &str, whole: &str) -> Draft {
    let message = format!(
        "Numbers have a decimal point and no commas here: {text} may mean {mend} or {whole}."
    );
    Draft::says(message)
        .offers(format!("Write {mend}"), site.replace(mend))
        .offers(format!("Write {whole}"), site.replace(whole))
}

/// The number without its commas, where they may have set off thousands.
fn grouped_reading(text: &str) -> Option<String> {
    let mut parts = text.split(',');
    let first = parts.next()?;
    let digits = |part: &str| part.bytes().all(|b| b.is_ascii_digit());
    let leads = (1..=3).contains(&first.len()) && digits(first) && !first.starts_with('0');
    (leads && parts.all(|part| part.len() == 3 && digits(part))).then(|| text.replace(',', ""))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn comma(text: &str, mend: &str) -> Fault {
        Fault::DecimalComma {
            text: text.to_owned(),
            mend: mend.to_owned(),
        }
    }

    #[test]
    fn the_comma_becomes_a_point() {
        for (text, mend) in [("12,5", "12.5"), ("0,125", "0.125"), ("1,2345", "1.2345")] {
            check(
                &format!("V [kt] = {text}"),
                text,
                comma(text, mend),
                &format!("Numbers have a decimal point here: {text} is to be written {mend}."),
                &[(&format!("Write {mend}"), true, &format!("V [kt] = {mend}"))],
            );
        }
    }

    #[test]
    fn thousands_are_left_to_the_writer() {
        check(
            "rho = 1,225 kg/m^3",
            "1,225",
            comma("1,225", "1.225"),
            "Numbers have a decimal point and no commas here: 1,225 may mean 1.225 or 1225.",
            &[
                ("Write 1.225", false, "rho = 1.225 kg/m^3"),
                ("Write 1225", false, "rho = 1225 kg/m^3"),
            ],
        );
    }
}
