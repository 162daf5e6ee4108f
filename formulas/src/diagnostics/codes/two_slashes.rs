//! A unit with two signs /.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::short;

pub(super) const ROW: Code = Code {
    code: "two-slashes",
    severity: Severity::Error,
    what: "A unit has at most one sign /, and all that follows it is below the line.",
    why: "People read a/b/c in two ways, and the two differ by a unit squared.",
    example: Some("mu = 2 kg/m/s\n"),
    fixed: Some("mu = 2 kg/m.s\n"),
};

pub(super) fn draft(site: &Site<'_>, text: &str, mend: &Option<String>) -> Draft {
    let message = format!(
        "{} has two signs /, and a unit has one: all that follows it is below the line",
        short(text)
    );
    match mend {
        None => Draft::says(message + "."),
        Some(mend) => {
            let at = site.find(text).unwrap_or(site.span);
            Draft::says(format!("{message}, as in {mend}."))
                .offers(format!("Write {mend}"), put(at, mend))
        }
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    #[test]
    fn the_second_slash_becomes_a_point() {
        check(
            "mu = 2 kg/m/s",
            "kg/m/s",
            Fault::SecondSlash {
                text: "kg/m/s".to_owned(),
                mend: Some("kg/m.s".to_owned()),
            },
            "kg/m/s has two signs /, and a unit has one: all that follows it is below the line, as in kg/m.s.",
            &[("Write kg/m.s", false, "mu = 2 kg/m.s")],
        );
    }

    #[test]
    fn without_a_mend_it_only_says_so() {
        let fault = Fault::SecondSlash {
            text: "lb/ft/S".to_owned(),
            mend: None,
        };
        let message =
            "lb/ft/S has two signs /, and a unit has one: all that follows it is below the line.";
        check("p = 2 lb/ft/S", "lb/ft/S", fault, message, &[]);
    }
}
