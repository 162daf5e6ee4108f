//! A unit that is easily taken for another.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::problem::Mend;
use crate::span::Span;

pub(super) const ROW: Code = Code {
    code: "likely-other-unit",
    severity: Severity::Advice,
    what: "nm beside NM, kN beside kn, and g where an acceleration or a load factor is due are pointed out.",
    why: "A nanometre for a nautical mile passes every check of dimensions.",
    example: Some("range = 200 nm\nleg = 30 NM\n"),
    fixed: Some("range = 200 NM\nleg = 30 NM\n"),
};

pub(super) fn draft(site: &Site<'_>, unit: &str, likely: &str) -> Draft {
    let here = match meaning(unit) {
        Some(meaning) => format!("is {meaning}"),
        None => "stands here".to_owned(),
    };
    let there = meaning(likely).map_or(String::new(), |meaning| format!(" ({meaning})"));
    let draft = Draft::says(format!("{unit} {here}; is {likely}{there} meant?"));
    match mend(site, unit, likely) {
        Some(mend) => draft.offers(format!("Write {likely}"), mend),
        None => draft,
    }
}

/// The pairs that differ in little but the case of a letter.
fn meaning(unit: &str) -> Option<&'static str> {
    Some(match unit {
        "nm" => "the nanometre",
        "NM" => "the nautical mile",
        "kN" => "the kilonewton",
        "kn" => "the knot",
        "g" => "the gram",
        "g0" => "the acceleration of gravity",
        _ => return None,
    })
}

/// The acceleration of gravity is a constant and no unit, so it becomes a factor of the number.
fn mend(site: &Site<'_>, unit: &str, likely: &str) -> Option<Mend> {
    let at = site.find(unit)?;
    if likely != "g0" {
        return Some(put(at, likely));
    }
    let number = site.text.get(..at.start as usize)?.trim_end();
    let ends_in_digit = number.ends_with(|c: char| c.is_ascii_digit());
    ends_in_digit.then(|| put(Span::new(number.len(), at.end as usize), "*g0"))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::check;
    use crate::problem::Fault;

    fn other(unit: &str, likely: &str) -> Fault {
        Fault::LikelyOtherUnit {
            unit: unit.to_owned(),
            likely: likely.to_owned(),
        }
    }

    #[test]
    fn offers_the_likely_unit() {
        check(
            "range = 200 nm",
            "nm",
            other("nm", "NM"),
            "nm is the nanometre; is NM (the nautical mile) meant?",
            &[("Write NM", false, "range = 200 NM")],
        );
    }

    #[test]
    fn offers_the_constant_as_a_factor() {
        check(
            "a = 3 g",
            "3 g",
            other("g", "g0"),
            "g is the gram; is g0 (the acceleration of gravity) meant?",
            &[("Write g0", false, "a = 3*g0")],
        );
        check(
            "a [g] = 3",
            "g",
            other("g", "g0"),
            "g is the gram; is g0 (the acceleration of gravity) meant?",
            &[],
        );
    }
}
