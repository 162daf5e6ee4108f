//! A symbol that nothing gives a value.

use crate::diagnostics::draft::{Draft, Site};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{meant, quoted};

pub(super) const ROW: Code = Code {
    code: "unknown-symbol",
    severity: Severity::Error,
    what: "Every symbol in a formula is given somewhere in the sheet, or is one of the constants.",
    why: "A symbol spelt in two ways would be two symbols, and one of them has no value.",
    example: Some("P_t [lb] = 120\nrequire Pt < 200\n"),
    fixed: Some("P_t [lb] = 120\nrequire P_t < 200\n"),
};

pub(super) fn draft(
    site: &Site<'_>,
    name: &str,
    nearest: &Option<String>,
    other_script: bool,
) -> Draft {
    let message = match nearest {
        Some(same) if other_script => format!(
            "Nothing in this sheet is called {name} in these letters; {same} only looks the same in those of another script."
        ),
        _ => format!(
            "Nothing in this sheet is called {name}.{}",
            meant(nearest.as_deref())
        ),
    };
    Draft::says(message).offers_name(site, nearest.as_deref())
}

pub(super) fn in_sheet(
    site: &Site<'_>,
    sheet: &str,
    name: &str,
    nearest: &Option<String>,
) -> Draft {
    let message = format!(
        "Nothing in the sheet {} is called {name}.{}",
        quoted(sheet),
        meant(nearest.as_deref())
    );
    Draft::says(message).offers_name(site, nearest.as_deref())
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn unknown(name: &str, nearest: Option<&str>, other_script: bool) -> Fault {
        Fault::UnknownSymbol {
            name: name.to_owned(),
            nearest: nearest.map(str::to_owned),
            other_script,
        }
    }

    #[test]
    fn proposes_the_nearest() {
        check(
            "require Pt < 200",
            "Pt",
            unknown("Pt", Some("P_t"), false),
            "Nothing in this sheet is called Pt. Did you mean P_t?",
            &[("Write P_t", false, "require P_t < 200")],
        );
    }

    #[test]
    fn proposes_nothing_where_nothing_is_near() {
        check(
            "a = zz",
            "zz",
            unknown("zz", None, false),
            "Nothing in this sheet is called zz.",
            &[],
        );
    }

    #[test]
    fn tells_letters_of_another_script() {
        check(
            "q = W/Ѕ",
            "Ѕ",
            unknown("Ѕ", Some("S"), true),
            "Nothing in this sheet is called Ѕ in these letters; S only looks the same in those of another script.",
            &[("Write S", false, "q = W/S")],
        );
    }
}
