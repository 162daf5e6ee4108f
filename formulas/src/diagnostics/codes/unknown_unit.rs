//! A unit that is not in the unit list.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{meant, short};
use crate::problem::Mend;

pub(super) const ROW: Code = Code {
    code: "unknown-unit",
    severity: Severity::Error,
    what: "Every name in a unit, behind a number or in brackets, is in the unit list.",
    why: "A guessed unit is a wrong factor; and a symbol is never taken for a unit.",
    example: Some("S [ft^2] = 142\np = 560 lb/S\n"),
    fixed: Some("S [ft^2] = 142\np = 560 lb / S\n"),
};

pub(super) fn draft(
    site: &Site<'_>,
    name: &str,
    nearest: &Option<String>,
    mend: &Option<Mend>,
) -> Draft {
    let unit = unit_part(site.typed());
    let missing = format!("{name} is not in the unit list");
    let message = if unit == name || !unit.contains(name) {
        missing
    } else {
        format!("{} is no unit: {missing}", short(unit))
    };
    let draft = Draft::says(format!("{message}.{}", meant(nearest.as_deref())));
    let draft = match mend {
        Some(mend) => apart(site, draft, name, mend),
        None => draft,
    };
    match (nearest, site.find(name)) {
        (Some(near), Some(at)) => draft.offers(format!("Write {near}"), put(at, near)),
        _ => draft,
    }
}

/// Sets the symbol off from the unit. That is right for certain only where the sheet has such a symbol.
fn apart(site: &Site<'_>, draft: Draft, name: &str, mend: &Mend) -> Draft {
    let title = match site.mended(mend) {
        Some(text) => format!("Write {}", short(&text)),
        None => format!("Set {name} off from the unit"),
    };
    let safe = site.defines(name);
    draft.fix(title, safe, vec![mend.clone()])
}

/// A unit without the number before it.
fn unit_part(typed: &str) -> &str {
    let number = |c: char| c.is_ascii_digit() || c == '.';
    typed.trim_start_matches(number).trim()
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, check_in, definition, place, sheet};
    use crate::problem::{Fault, Mend};

    const TEXT: &str = "p = 560 lb/S";

    fn unit(name: &str, nearest: Option<&str>, mend: Option<Mend>) -> Fault {
        Fault::UnknownUnit {
            name: name.to_owned(),
            nearest: nearest.map(str::to_owned),
            mend,
        }
    }

    fn blanks() -> Mend {
        Mend {
            span: place(TEXT, "/"),
            text: " / ".to_owned(),
        }
    }

    #[test]
    fn a_symbol_of_the_sheet_is_set_off() {
        let tree = sheet(TEXT, definition(TEXT, "S"));
        check_in(
            &tree,
            TEXT,
            place(TEXT, "lb/S"),
            unit("S", None, Some(blanks())),
            "lb/S is no unit: S is not in the unit list.",
            &[("Write lb / S", true, "p = 560 lb / S")],
        );
    }

    #[test]
    fn a_name_that_nothing_gives_is_set_off_on_demand() {
        for (part, title) in [
            ("560 lb/S", "Write 560 lb / S"),
            ("S", "Set S off from the unit"),
        ] {
            let message = if part == "S" {
                "S is not in the unit list."
            } else {
                "lb/S is no unit: S is not in the unit list."
            };
            check(
                TEXT,
                part,
                unit("S", None, Some(blanks())),
                message,
                &[(title, false, "p = 560 lb / S")],
            );
        }
    }

    #[test]
    fn proposes_the_nearest() {
        check(
            "c [feet] = 4.6",
            "feet",
            unit("feet", Some("ft"), None),
            "feet is not in the unit list. Did you mean ft?",
            &[("Write ft", false, "c [ft] = 4.6")],
        );
    }
}
