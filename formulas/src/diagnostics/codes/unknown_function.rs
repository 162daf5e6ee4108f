//! A function that does not exist.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::meant;

pub(super) const ROW: Code = Code {
    code: "unknown-function",
    severity: Severity::Error,
    what: "A name before a bracket is a function of the catalogue or of the sheet.",
    why: "A function spelt wrong computes nothing.",
    example: Some("s = sqrtt(4)\n"),
    fixed: Some("s = sqrt(4)\n"),
};

pub(super) fn draft(site: &Site<'_>, name: &str, nearest: &Option<String>) -> Draft {
    Draft::says(format!(
        "There is no function called {name}.{}",
        meant(nearest.as_deref())
    ))
    .offers_name(site, nearest.as_deref())
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn proposes_the_nearest() {
        check(
            "s = thin_secton(\"2412\")",
            "thin_secton",
            Fault::UnknownFunction {
                name: "thin_secton".to_owned(),
                nearest: Some("thin_section".to_owned()),
            },
            "There is no function called thin_secton. Did you mean thin_section?",
            &[("Write thin_section", false, "s = thin_section(\"2412\")")],
        );
    }

    #[test]
    fn proposes_nothing_where_nothing_is_near() {
        let fault = Fault::UnknownFunction {
            name: "zz".to_owned(),
            nearest: None,
        };
        check(
            "s = zz(1)",
            "zz",
            fault,
            "There is no function called zz.",
            &[],
        );
    }
}
