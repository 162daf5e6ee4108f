//! A unit in brackets behind a number.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::span::Span;

pub(super) const ROW: Code = Code {
    code: "bracket-after-number",
    severity: Severity::Error,
    what: "Behind a number its unit stands without brackets; in brackets it says in what unit a symbol is given.",
    why: "A bracket is the number one of that unit, so a sign would be missing before it.",
    example: Some("V = 65 [kt]\n"),
    fixed: Some("V = 65 kt\n"),
};

pub(super) fn draft(site: &Site<'_>, unit: &str) -> Draft {
    let at = bracket(site);
    let unit = unit.trim();
    let plain = unit
        .strip_prefix('1')
        .filter(|rest| rest.starts_with('/'))
        .unwrap_or(unit);
    if plain.is_empty() {
        return Draft::says("The brackets behind this number hold no unit.");
    }
    if plain.contains([' ', '*', '(', ')']) {
        // Such a unit can be typed in brackets only, where it is a factor like any other.
        return Draft::says(format!(
            "Between a number and [{unit}] a sign is missing: write *[{unit}]."
        ))
        .offers(format!("Write *[{unit}]"), put(at, format!("*[{unit}]")));
    }
    let power = site.behind().trim_start().starts_with(['^', '²', '³']);
    let message =
        format!("Behind a number the unit stands without brackets: write {plain}, not [{unit}].");
    let mend = put(at, format!(" {plain}{}", gap(site)));
    // A power behind the bracket takes the number along, behind the unit it takes the unit alone.
    Draft::says(message).fix(format!("Write {plain}"), !power, vec![mend])
}

/// A sign that would make the next name a part of the unit is kept off by a blank.
fn gap(site: &Site<'_>) -> &'static str {
    let joins = |c: char| c.is_alphanumeric() || matches!(c, '/' | '.' | '·' | '-');
    if site.behind().starts_with(joins) {
        " "
    } else {
        ""
    }
}

/// The bracket with the blanks before it.
fn bracket(site: &Site<'_>) -> Span {
    let open = site.typed().find('[').unwrap_or(0) + site.span.start as usize;
    let before = site.text.get(..open).unwrap_or("");
    Span::new(
        before.trim_end_matches([' ', '\t']).len(),
        site.span.end as usize,
    )
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn bracket(unit: &str) -> Fault {
        Fault::BracketAfterNumber {
            unit: unit.to_owned(),
        }
    }

    #[test]
    fn the_brackets_go() {
        let message = "Behind a number the unit stands without brackets: write kt, not [kt].";
        for (text, part) in [
            ("V = 65 [kt]", "65 [kt]"),
            ("V = 65[kt]", "[kt]"),
            ("V = 65  [kt]", "[kt]"),
        ] {
            check(
                text,
                part,
                bracket("kt"),
                message,
                &[("Write kt", true, "V = 65 kt")],
            );
        }
    }

    #[test]
    fn what_follows_is_kept_off_the_unit() {
        let message = "Behind a number the unit stands without brackets: write lb, not [lb].";
        let fixes = [("Write lb", true, "p = 560 lb /S")];
        check("p = 560 [lb]/S", "[lb]", bracket("lb"), message, &fixes);
        let fixes = [("Write lb", false, "p = 560 lb^2")];
        check("p = 560 [lb]^2", "[lb]", bracket("lb"), message, &fixes);
    }

    #[test]
    fn brackets_without_a_unit_say_so() {
        let message = "The brackets behind this number hold no unit.";
        check("V = 65 []", "[]", bracket(""), message, &[]);
    }

    #[test]
    fn a_slash_keeps_its_blank() {
        let message = "Behind a number the unit stands without brackets: write /deg, not [1/deg].";
        check(
            "a = 0.1[1/deg]",
            "[1/deg]",
            bracket("1/deg"),
            message,
            &[("Write /deg", true, "a = 0.1 /deg")],
        );
    }

    #[test]
    fn what_only_brackets_can_hold_becomes_a_factor() {
        let message = "Between a number and [lb * ft] a sign is missing: write *[lb * ft].";
        let fixes = [("Write *[lb * ft]", false, "M = 65*[lb * ft]")];
        check(
            "M = 65 [lb * ft]",
            "[lb * ft]",
            bracket("lb * ft"),
            message,
            &fixes,
        );
    }
}
