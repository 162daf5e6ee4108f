//! A label that its axis does not have.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{meant, quoted};

pub(super) const ROW: Code = Code {
    code: "unknown-label",
    severity: Severity::Error,
    what: "A label that is named is one of those of its axis, letter for letter.",
    why: "A value for a label that does not exist belongs to no condition.",
    example: Some("vary cg: fwd | aft\nx [ft] by cg = fwd: 5.95 | aff: 6.45\n"),
    fixed: Some("vary cg: fwd | aft\nx [ft] by cg = fwd: 5.95 | aft: 6.45\n"),
};

pub(super) fn draft(site: &Site<'_>, axis: &str, label: &str, nearest: &Option<String>) -> Draft {
    let message = format!(
        "{axis} has no label {}.{}",
        quoted(label),
        meant(nearest.as_deref())
    );
    let draft = Draft::says(message);
    match (nearest, site.find(label)) {
        (Some(near), Some(at)) => draft.offers(format!("Write {near}"), put(at, near)),
        _ => draft,
    }
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn label(nearest: Option<&str>) -> Fault {
        Fault::UnknownLabel {
            axis: "cg".to_owned(),
            label: "aff".to_owned(),
            nearest: nearest.map(str::to_owned),
        }
    }

    #[test]
    fn proposes_the_nearest_and_keeps_the_quotes() {
        let message = "cg has no label “aff”. Did you mean aft?";
        let fixes = [("Write aft", false, "P = L at (cg: \"aft\")")];
        check(
            "P = L at (cg: \"aff\")",
            "\"aff\"",
            label(Some("aft")),
            message,
            &fixes,
        );
    }

    #[test]
    fn proposes_nothing_where_nothing_is_near() {
        check(
            "aff | 6.45",
            "aff",
            label(None),
            "cg has no label “aff”.",
            &[],
        );
    }
}
