//! A bare lift slope below 1.

use crate::diagnostics::draft::{Draft, Site, put_behind};
use crate::diagnostics::finding::{Code, Severity};
use crate::span::Span;

pub(super) const ROW: Code = Code {
    code: "slope-per-degree",
    severity: Severity::Warning,
    what: "A lift slope without a unit is per radian, where a wing has about 4 to 6.",
    why: "A slope of 0.1 is nearly always per degree, and taken per radian it is wrong by a factor of 57.",
    example: Some(
        "x = neutral_point(6.1 ft, 0.08, 142 ft^2, 4.6 ft, 17.3 ft, 3.6 /rad, 24 ft^2, 0.4)\n",
    ),
    fixed: Some(
        "x = neutral_point(6.1 ft, 0.08 /deg, 142 ft^2, 4.6 ft, 17.3 ft, 3.6 /rad, 24 ft^2, 0.4)\n",
    ),
};

pub(super) fn draft(site: &Site<'_>, argument: &str, value: f64, number: Option<Span>) -> Draft {
    let message =
        format!("The lift slope {argument} is {value}, which counts per radian; is it per degree?");
    let draft = Draft::says(message);
    let Some(number) = number else {
        return draft;
    };
    ["/deg", "/rad"].into_iter().fold(draft, |draft, unit| {
        let title = format!("Write {} {unit}", number.of(site.text));
        draft.offers(title, put_behind(number, format!(" {unit}")))
    })
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check, place};
    use crate::problem::Fault;
    use crate::span::Span;

    fn slope(number: Option<Span>) -> Fault {
        Fault::SlopePerDegree {
            argument: "section_slope".to_owned(),
            value: 0.1,
            number,
        }
    }

    const MESSAGE: &str =
        "The lift slope section_slope is 0.1, which counts per radian; is it per degree?";

    #[test]
    fn a_number_is_offered_both_units() {
        let text = "a = lift_slope(6, 0.1)";
        check(
            text,
            "0.1",
            slope(Some(place(text, "0.1"))),
            MESSAGE,
            &[
                ("Write 0.1 /deg", false, "a = lift_slope(6, 0.1 /deg)"),
                ("Write 0.1 /rad", false, "a = lift_slope(6, 0.1 /rad)"),
            ],
        );
    }

    #[test]
    fn a_symbol_is_only_pointed_out() {
        check("a = lift_slope(6, s)", "s", slope(None), MESSAGE, &[]);
    }
}
