//! A bracket of another dimension than the value.

use crate::diagnostics::draft::{Draft, Site, put};
use crate::diagnostics::finding::{Code, Severity};
use crate::diagnostics::wording::{is_what, short, with_article};
use crate::problem::Operand;
use crate::span::Span;
use crate::syntax::StatementKind;
use engine::quantity::Dimension;

pub(super) const ROW: Code = Code {
    code: "bracket-dimension",
    severity: Severity::Error,
    what: "The unit in the bracket of a definition fits what its right side works out to.",
    why: "A factor was forgotten or is too many, and a table of results would carry the wrong unit.",
    example: Some("S [ft^2] = 142\nq [lb/ft^2] = S\n"),
    fixed: Some("S [ft^2] = 142\nq [ft^2] = S\n"),
};

pub(super) fn draft(
    site: &Site<'_>,
    symbol: &str,
    bracket: &str,
    dimension: Dimension,
    value: &Operand,
) -> Draft {
    let due = match dimension.name() {
        Some(name) if bracket == "1" => with_article(name),
        Some(name) => format!("in {bracket} ({name})"),
        None => format!("in {bracket}"),
    };
    let message = format!(
        "{symbol} is to be {due}, but {} {}.",
        short(&value.text),
        is_what(value)
    );
    let draft = Draft::says(message);
    match (&value.unit, bracket_place(site, symbol)) {
        (Some(unit), Some(at)) => draft.offers(format!("Write [{unit}]"), put(at, unit)),
        _ => draft,
    }
}

/// Where the unit stands that the statement gives to its symbol.
fn bracket_place(site: &Site<'_>, symbol: &str) -> Option<Span> {
    let unit = match &site.statement?.kind {
        StatementKind::Definition(d) if d.symbol.text == symbol => d.unit.as_ref(),
        StatementKind::Function(f) if f.name.text == symbol => f.unit.as_ref(),
        _ => None,
    };
    unit.map(|unit| unit.span)
}

#[cfg(test)]
mod tests {
    use crate::diagnostics::check::{check_in, definition, operand, place, sheet};
    use crate::problem::{Fault, Operand};
    use engine::quantity::Dimension;

    fn says(
        text: &str,
        bracket: &str,
        due: Dimension,
        value: Operand,
        message: &str,
        fixes: &[(&str, bool, &str)],
    ) {
        let fault = Fault::BracketDimension {
            symbol: "q".to_owned(),
            bracket: bracket.to_owned(),
            bracket_dimension: due,
            value,
        };
        check_in(
            &sheet(text, definition(text, "q")),
            text,
            place(text, "["),
            fault,
            message,
            fixes,
        );
    }

    #[test]
    fn names_both_dimensions_and_offers_the_unit_of_the_value() {
        let text = "q [lb/ft^2] = S";
        says(
            text,
            "lb/ft^2",
            Dimension::PRESSURE,
            operand(text, "S", Dimension::AREA, Some("ft^2")),
            "q is to be in lb/ft^2 (pressure), but S is an area (ft^2).",
            &[("Write [ft^2]", false, "q [ft^2] = S")],
        );
    }

    #[test]
    fn pure_numbers_and_nameless_dimensions_are_told_in_words() {
        let text = "q [1] = S";
        let message = "q is to be a pure number, but S is an area.";
        says(
            text,
            "1",
            Dimension::NONE,
            operand(text, "S", Dimension::AREA, None),
            message,
            &[],
        );
        let text = "q [ft] = n";
        let message = "q is to be in ft (length), but n is a pure number.";
        says(
            text,
            "ft",
            Dimension::LENGTH,
            operand(text, "n", Dimension::NONE, None),
            message,
            &[],
        );
        let text = "q [kg.m^3] = S*S*S";
        let value = operand(text, "S*S*S", Dimension::of(6, 0, 0, 0, 0), None);
        let message = "q is to be in kg.m^3, but S*S*S is in m^6.";
        says(
            text,
            "kg.m^3",
            Dimension::of(3, 1, 0, 0, 0),
            value,
            message,
            &[],
        );
    }
}
