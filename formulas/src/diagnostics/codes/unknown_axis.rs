//! An axis that nothing declares.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::meant;

pub(super) const ROW: Code = Code {
    code: "unknown-axis",
    severity: Severity::Error,
    what: "Every axis that is named is declared by a vary, a table or a function that makes points.",
    why: "Values laid out over an axis that does not exist belong to no condition.",
    example: Some("vary loading: light | gross\nW [lb] by lading = 430 | 560\n"),
    fixed: Some("vary loading: light | gross\nW [lb] by loading = 430 | 560\n"),
};

pub(super) fn draft(site: &Site<'_>, name: &str, nearest: &Option<String>) -> Draft {
    Draft::says(format!(
        "There is no axis called {name}.{}",
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
            "W [lb] by lading = 430 | 560",
            "lading",
            Fault::UnknownAxis {
                name: "lading".to_owned(),
                nearest: Some("loading".to_owned()),
            },
            "There is no axis called lading. Did you mean loading?",
            &[("Write loading", false, "W [lb] by loading = 430 | 560")],
        );
    }

    #[test]
    fn proposes_nothing_where_nothing_is_near() {
        let fault = Fault::UnknownAxis {
            name: "zz".to_owned(),
            nearest: None,
        };
        check(
            "a = max(b over zz)",
            "zz",
            fault,
            "There is no axis called zz.",
            &[],
        );
    }
}
