//! An argument outside what it can be at all.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::short;

pub(super) const ROW: Code = Code {
    code: "argument-range",
    severity: Severity::Error,
    what: "Arguments with a natural limit are held to it.",
    why: "A station at 25 instead of 25 % of the chord would lie far behind the airplane.",
    example: Some("x = station_at_percent(25, 2 m, 1.4 m)\n"),
    fixed: Some("x = station_at_percent(25 %, 2 m, 1.4 m)\n"),
};

pub(super) fn draft(site: &Site<'_>, function: &str, argument: &str, text: &str) -> Draft {
    let typed = short(site.typed());
    let not = if typed.is_empty() {
        String::new()
    } else {
        format!(", and not {typed}")
    };
    Draft::says(format!(
        "The argument {argument} of {function} is to be {text}{not}."
    ))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn names_the_limit() {
        let fault = || Fault::ArgumentRange {
            function: "station_at_percent".to_owned(),
            argument: "percent".to_owned(),
            text: "at most 1.5, such as 0.25 or 25 %".to_owned(),
        };
        let text = "x = station_at_percent(25, 2 m, 1.4 m)";
        let message =
            "The argument percent of station_at_percent is to be at most 1.5, such as 0.25 or 25 %";
        check(text, "25", fault(), &format!("{message}, and not 25."), &[]);
        check(text, "", fault(), &format!("{message}."), &[]);
    }
}
