//! A pure number where an angle is due.

use crate::diagnostics::draft::{Draft, Site, put_behind};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{bracketed, capital, short};
use crate::span::Span;

pub(super) const ROW: Code = Code {
    code: "number-as-angle",
    severity: Severity::Warning,
    what: "What stands under [deg], or as an argument that is an angle, is an angle.",
    why: "A lift coefficient over a slope per degree is in degrees, but without its unit the slope counts per radian.",
    example: Some("CL = 0.5\nalpha [deg] = CL/0.1\n"),
    fixed: Some("CL = 0.5\nalpha [deg] = CL/0.1 /deg\n"),
};

pub(super) fn draft(
    site: &Site<'_>,
    place: &str,
    number: Option<Span>,
    divides: Option<Span>,
) -> Draft {
    let typed = short(site.typed());
    let place = capital(place);
    let message =
        format!("{place} is to be an angle, but {typed} is a pure number and is taken in radians.");
    let draft = Draft::says(message);
    let draft = match divides {
        Some(below) => draft.offers(
            format!("Write {} /deg", below.of(site.text)),
            put_behind(below, " /deg"),
        ),
        None => draft,
    };
    ["deg", "rad"]
        .into_iter()
        .fold(draft, |draft, unit| match number {
            Some(number) => {
                let title = format!("Write {} {unit}", number.of(site.text));
                draft.offers(title, put_behind(number, format!(" {unit}")))
            }
            None => in_unit(site, draft, unit),
        })
}

/// Makes an expression so many of a unit.
fn in_unit(site: &Site<'_>, draft: Draft, unit: &str) -> Draft {
    let times = format!("{}*[{unit}]", bracketed(site.typed()));
    draft.offers(format!("Write {}", short(&times)), site.replace(times))
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, place};
    use crate::problem::Fault;
    use crate::span::Span;

    fn fault(place: &str, number: Option<Span>, divides: Option<Span>) -> Fault {
        Fault::NumberAsAngle {
            place: place.to_owned(),
            number,
            divides,
        }
    }

    #[test]
    fn a_slope_below_the_line_is_offered_per_degree() {
        let text = "alpha [deg] = CL/0.1";
        check(
            text,
            "CL/0.1",
            fault("alpha", None, Some(place(text, "0.1"))),
            "alpha is to be an angle, but CL/0.1 is a pure number and is taken in radians.",
            &[
                ("Write 0.1 /deg", false, "alpha [deg] = CL/0.1 /deg"),
                (
                    "Write (CL/0.1)*[deg]",
                    false,
                    "alpha [deg] = (CL/0.1)*[deg]",
                ),
                (
                    "Write (CL/0.1)*[rad]",
                    false,
                    "alpha [deg] = (CL/0.1)*[rad]",
                ),
            ],
        );
    }

    #[test]
    fn a_number_is_offered_both_units() {
        let text = "e = tail_lift(a, downwash: 3)";
        check(
            text,
            "3",
            fault(
                "the argument downwash of tail_lift",
                Some(place(text, "3")),
                None,
            ),
            "The argument downwash of tail_lift is to be an angle, but 3 is a pure number and is taken in radians.",
            &[
                ("Write 3 deg", false, "e = tail_lift(a, downwash: 3 deg)"),
                ("Write 3 rad", false, "e = tail_lift(a, downwash: 3 rad)"),
            ],
        );
    }

    #[test]
    fn a_symbol_is_offered_both_units() {
        let message = "a is to be an angle, but t is a pure number and is taken in radians.";
        let fixes = [
            ("Write t*[deg]", false, "a [deg] = t*[deg]"),
            ("Write t*[rad]", false, "a [deg] = t*[rad]"),
        ];
        check("a [deg] = t", "t", fault("a", None, None), message, &fixes);
    }
}
