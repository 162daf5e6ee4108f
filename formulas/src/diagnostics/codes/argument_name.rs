//! An argument by a name that the function does not have.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{listed, meant};

pub(super) const ROW: Code = Code {
    code: "argument-name",
    severity: Severity::Error,
    what: "A named argument has one of the names that the function states.",
    why: "The letters count: Cm and cm are two names.",
    example: Some("M = pitching_moment(cm: -0.05, q: 20 psf, S: 142 ft^2, c: 4.6 ft)\n"),
    fixed: Some("M = pitching_moment(Cm: -0.05, q: 20 psf, S: 142 ft^2, c: 4.6 ft)\n"),
};

pub(super) fn draft(
    site: &Site<'_>,
    function: &str,
    name: &str,
    names: &[String],
    nearest: &Option<String>,
) -> Draft {
    let has = listed(names, "and");
    let message = format!(
        "{function} has no argument {name}; it has {has}.{}",
        meant(nearest.as_deref())
    );
    let draft = Draft::says(message);
    match (nearest, site.find(name)) {
        (Some(near), Some(at)) => draft.offers(format!("Write {near}"), put(at, near)),
        _ => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, names};
    use crate::problem::Fault;

    #[test]
    fn lists_the_names_and_proposes_the_nearest() {
        let fault = |nearest: Option<&str>| Fault::ArgumentName {
            function: "pitching_moment".to_owned(),
            name: "cm".to_owned(),
            names: names(&["Cm", "q", "S", "c"]),
            nearest: nearest.map(str::to_owned),
        };
        let text = "M = pitching_moment(cm: -0.05)";
        check(
            text,
            "cm",
            fault(Some("Cm")),
            "pitching_moment has no argument cm; it has Cm, q, S and c. Did you mean Cm?",
            &[("Write Cm", false, "M = pitching_moment(Cm: -0.05)")],
        );
        check(
            text,
            "cm",
            fault(None),
            "pitching_moment has no argument cm; it has Cm, q, S and c.",
            &[],
        );
    }
}
